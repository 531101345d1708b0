// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/ChoiceOptions.h"
#include "app/Commands.h"
#include "app/FiguresText.h"
#include "app/RecordFile.h"
#include "app/TextApplication.h"
#include "core/evaluate/evaluate.h"

#include <ostream>

namespace spanwright {

namespace {

Result<Arguments> argumentsOf(const Words& words) {
    std::vector<OptionSpec> known{{"--json", OptionKind::Flag}, {"--rows", OptionKind::Flag}};
    known.insert(known.end(), choiceOptions().begin(), choiceOptions().end());
    known.insert(known.end(), tableOptions().begin(), tableOptions().end());
    auto arguments = parseArguments(words, known);
    if (!arguments)
        return arguments;
    if (arguments->files.empty())
        return Error(ErrorCode::UsageNoFile, {{"command", "figures"}});
    if (arguments->files.size() > 1)
        return Error(ErrorCode::UsageUnknownCommand, {{"text", arguments->files[1]}});
    return arguments;
}

/// The phase that was chosen; the other one when the chosen one has no readings.
const PhaseEvaluation* shownPhase(const Evaluation& evaluation, Phase chosen) {
    const PhaseEvaluation* phase = evaluation.phase(chosen);
    return phase != nullptr ? phase : evaluation.phase(chosen == Phase::AsFound ? Phase::AsLeft : Phase::AsFound);
}

} // namespace

int figuresCommand(const Words& words, Console console) {
    const TextApplication application;
    const auto arguments = argumentsOf(words);
    if (!arguments)
        return refuse(console, arguments.error());
    const std::string& file = arguments->files.front();
    const auto loaded = loadRecord(file, *arguments);
    if (!loaded)
        return refuse(console, loaded.error());
    if (!loaded->broken.empty())
        return refuseFile(console, file, loaded->broken);
    for (const std::string& note : loaded->notes)
        console.err << "spanwright: " << note << '\n';

    const Record& record = loaded->record;
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    if (!evaluation)
        return refuse(console, evaluation.error().with("file", file));
    const PhaseEvaluation* phase = shownPhase(*evaluation, record.choices.phase);
    if (phase == nullptr)
        return refuse(console, Error(ErrorCode::NoReadings, {{"file", file}}));
    if (!phase->fit)
        return refuse(console, phase->notFitted.value_or(Error(ErrorCode::NoReadings)).with("file", file));
    const RowsShown rows = arguments->has("--rows") ? RowsShown::Yes : RowsShown::No;
    console.out << (arguments->has("--json") ? figuresJson(record, *phase, rows) : figuresText(record, *phase, rows).toStdString());
    console.out.flush();
    return console.out.good() ? Done : refuse(console, Error(ErrorCode::FileWriteFailed, {{"file", "standard output"}}));
}

} // namespace spanwright
