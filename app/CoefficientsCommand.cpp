// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/ChoiceOptions.h"
#include "app/Commands.h"
#include "app/RecordFile.h"
#include "app/ResultFile.h"
#include "app/TextApplication.h"
#include "core/session/WholeFile.h"
#include "core/evaluate/Calibration.h"
#include "core/evaluate/evaluate.h"
#include "ui/words/CoefficientText.h"

#include <ostream>

namespace spanwright {

namespace {

constexpr OptionSpec known[] = {{"--form"}, {"--to"}, {"--replace", OptionKind::Flag}, {"--phase"}};

Result<Arguments> argumentsOf(const Words& words) {
    auto arguments = parseArguments(words, known);
    if (!arguments)
        return arguments;
    if (const auto only = onlyFile(*arguments, "coefficients"); !only)
        return only.error();
    return arguments;
}

} // namespace

int coefficientsCommand(const Words& words, Console console) {
    const TextApplication application;
    const auto arguments = argumentsOf(words);
    if (!arguments)
        return refuse(console, arguments.error());
    const std::string name = arguments->value("--form").value_or("plain");
    const auto form = coefficientForm(QString::fromStdString(name));
    if (!form)
        return refuse(console, Error(ErrorCode::UsageValueBad, {{"option", "--form"}, {"text", name}}));
    const std::string& file = arguments->files.front();
    const std::string to = arguments->value("--to").value_or(std::string(StandardOutput));
    if (to.empty())
        return refuse(console, Error(ErrorCode::UsageValueMissing, {{"option", "--to"}}));
    if (to != StandardOutput)
        if (const auto free = resultFree(to, {file}, *arguments, isOwnCoefficients); !free)
            return refuse(console, free.error());

    auto session = loadSessionFile(file);
    if (!session)
        return refuse(console, session.error());
    if (!session->broken.empty())
        return refuseFile(console, file, session->broken);
    Record& record = session->record;
    const auto choices = withOptions(record.choices, *arguments, DecimalMark::Point);
    if (!choices)
        return refuse(console, choices.error());
    record.choices.phase = choices->phase;
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    if (!evaluation)
        return refuse(console, evaluation.error().with("file", file));
    const PhaseEvaluation* phase = calibrationOf(*evaluation, record.choices.phase);
    if (phase != nullptr && arguments->has("--phase") && phase->phase != record.choices.phase)
        return refuse(console, noReadingsOf(record.choices.phase).with("file", file));
    const auto printed = phase != nullptr ? printedFunction(record, *phase) : std::nullopt;
    if (!printed)
        return refuse(console, Error(ErrorCode::NoReadings, {{"file", file}}));
    const std::string text = coefficientText(record, *printed, *form).toStdString();
    if (to == StandardOutput)
        return print(console, text);
    if (const auto written = writeWhole(to, text); !written)
        return refuse(console, written.error());
    console.out << "coefficients written to " << to << '\n';
    return Done;
}

} // namespace spanwright
