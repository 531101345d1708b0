// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Arguments.h"
#include "app/Commands.h"
#include "app/PaperApplication.h"
#include "core/session/WholeFile.h"
#include "ui/selftest/SelfTest.h"

#include <ostream>

namespace spanwright {

int selfTestCommand(const Words& words, Console console) {
    static constexpr OptionSpec known[] = {{"--to"}, {"--replace", OptionKind::Flag}};
    const auto arguments = parseArguments(words, known);
    if (!arguments)
        return refuse(console, arguments.error());
    if (!arguments->files.empty())
        return refuse(console, Error(ErrorCode::UsageUnknownCommand, {{"text", arguments->files.front()}}));
    const auto to = arguments->value("--to");
    if (to)
        if (const auto free = mayBeWritten(*to, {}, arguments->has("--replace") ? Replacing::Allowed : Replacing::Refused); !free)
            return refuse(console, free.error());
    const SelfTestOutcome outcome = runSelfTest();
    console.out << selfTestText(outcome).toStdString();
    if (to) {
        const PaperApplication paper;
        if (!writeSelfTestPdf(outcome, selfTestOccasion(), QString::fromStdString(*to)))
            return refuse(console, Error(ErrorCode::FileNotWritable, {{"file", *to}}));
    }
    return outcome.cases.empty() || outcome.failed() > 0 ? Refused : Done;
}

} // namespace spanwright
