// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Arguments.h"
#include "app/Commands.h"
#include "core/evaluate/KeyFigures.h"
#include "core/evaluate/evaluate.h"
#include "core/exchange/FileBytes.h"
#include "core/session/SessionJson.h"
#include "ui/words/Words.h"

#include <ostream>

namespace spanwright {

int checkCommand(const Words& words, Console console) {
    const auto arguments = parseArguments(words, {});
    if (!arguments)
        return refuse(console, arguments.error());
    if (arguments->files.size() != 1)
        return refuse(console, Error(ErrorCode::UsageNoFile, {{"command", "check"}}));
    const std::string& file = arguments->files.front();
    const auto bytes = FileBytes::read(file);
    if (!bytes)
        return refuse(console, bytes.error());
    const auto session = readSession(bytes->bytes());
    if (!session)
        return refuse(console, session.error().with("file", file));
    Progress progress;
    const auto evaluation = evaluate(session->record, progress);
    if (!evaluation)
        return refuse(console, evaluation.error().with("file", file));

    std::vector<Warning> wrong = session->warnings;
    const auto differences = differingFigures(session->results.figures, *evaluation);
    wrong.insert(wrong.end(), differences.begin(), differences.end());
    for (const Warning& warning : wrong)
        console.err << "spanwright: " << file << ": " << warningText(warning).toStdString() << '\n';
    if (!wrong.empty())
        return Refused;
    console.out << file << ": seal and journal hold; " << session->record.readings->size() << " readings; "
                << session->results.figures.size() << " stored results recomputed, none differs\n";
    return Done;
}

} // namespace spanwright
