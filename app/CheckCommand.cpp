// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Arguments.h"
#include "app/Commands.h"
#include "app/RecordFile.h"
#include "app/TextApplication.h"
#include "core/evaluate/KeyFigures.h"
#include "core/evaluate/evaluate.h"

#include <ostream>

namespace spanwright {

int checkCommand(const Words& words, Console console) {
    const TextApplication application;
    const auto arguments = parseArguments(words, {});
    if (!arguments)
        return refuse(console, arguments.error());
    const auto only = onlyFile(*arguments, "check");
    if (!only)
        return refuse(console, only.error());
    const std::string& file = *only;
    const auto session = loadSessionFile(file);
    if (!session)
        return refuse(console, session.error());
    Progress progress;
    const auto evaluation = evaluate(session->record, progress);
    if (!evaluation)
        return refuse(console, evaluation.error().with("file", file));

    std::vector<Warning> wrong = session->broken;
    const auto differences = differingFigures(session->results.figures, *evaluation);
    wrong.insert(wrong.end(), differences.begin(), differences.end());
    if (!wrong.empty())
        return refuseFile(console, file, wrong);
    console.out << file << ": seal and journal hold; " << session->record.readings->size() << " readings; "
                << session->results.figures.size() << " stored results recomputed, none differs\n";
    return Done;
}

} // namespace spanwright
