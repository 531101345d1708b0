// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/Arguments.h"
#include "app/Commands.h"
#include "app/PaperApplication.h"
#include "app/ResultFile.h"
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
    std::optional<std::string> to;
    if (arguments->has("--to")) {
        const auto name = documentName(*arguments, "--to");
        if (!name)
            return refuse(console, name.error());
        if (const auto free = resultFree(*name, {}, *arguments, isOwnValidationRecord); !free)
            return refuse(console, free.error());
        to = *name;
    }
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
