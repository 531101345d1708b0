// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/ChoiceOptions.h"
#include "app/Commands.h"
#include "app/FiguresText.h"
#include "app/OptionEffects.h"
#include "app/RecordFile.h"
#include "app/TextApplication.h"
#include "core/evaluate/evaluate.h"

#include <algorithm>
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
    if (const auto only = onlyFile(*arguments, "figures"); !only)
        return only.error();
    return arguments;
}

/// The phase that was chosen; the other one when the chosen one has no readings, unless --phase asks for it.
Result<const PhaseEvaluation*> shownPhase(const Evaluation& evaluation, const Arguments& arguments, Phase chosen) {
    if (const PhaseEvaluation* phase = evaluation.phase(chosen))
        return phase;
    const PhaseEvaluation* other = evaluation.phase(chosen == Phase::AsFound ? Phase::AsLeft : Phase::AsFound);
    if (other == nullptr)
        return Error(ErrorCode::NoReadings);
    return arguments.has("--phase") ? Result<const PhaseEvaluation*>(noReadingsOf(chosen)) : other;
}

std::int32_t lastRun(const Record& record) {
    const std::vector<std::int32_t>& runs = record.readings->runs();
    return runs.empty() ? 0 : *std::max_element(runs.begin(), runs.end());
}

/// Whether the positions say how the item was turned in every run, and give figures.
bool positionsFit(const Record& record, const PhaseEvaluation& phase) {
    return phase.force && record.plan.positions.size() == static_cast<std::size_t>(lastRun(record));
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
    if (const auto misleading = misleadingOption(*arguments, *loaded))
        return refuseUsage(console, file, *misleading);
    for (const std::string& note : loaded->notes)
        console.err << "spanwright: " << note << '\n';

    const Record& record = loaded->record;
    Progress progress;
    const auto evaluation = evaluate(record, progress);
    if (!evaluation)
        return refuse(console, evaluation.error().with("file", file));
    const auto shown = shownPhase(*evaluation, *arguments, record.choices.phase);
    if (!shown)
        return refuse(console, shown.error().with("file", file));
    const PhaseEvaluation* phase = *shown;
    if (!phase->fit)
        return refuse(console, phase->notFitted.value_or(Error(ErrorCode::NoReadings)).with("file", file));
    if (arguments->has("--positions") && !positionsFit(record, *phase)) {
        console.err << "spanwright: " << file << ": --positions gives " << record.plan.positions.size() << " positions for " << lastRun(record)
                    << " runs, or they give no force figures. State one position for each run, two of them different, name the column of the runs with --run, "
                       "and read three forces or more\n";
        return Refused;
    }
    for (const std::string& note : optionsWithoutEffect(*arguments, record, *phase))
        console.err << "spanwright: " << file << ": " << note << '\n';
    const RowsShown rows = arguments->has("--rows") ? RowsShown::Yes : RowsShown::No;
    return print(console, arguments->has("--json") ? figuresJson(record, *phase, rows) : figuresText(record, *phase, rows).toStdString());
}

} // namespace spanwright
