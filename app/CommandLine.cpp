// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/CommandLine.h"

#include "app/Commands.h"
#include "app/Help.h"
#include "app/WindowCommand.h"
#include "core/base/LargeBlocks.h"

#include <QLocale>

#include <algorithm>
#include <iostream>

namespace spanwright {

namespace {

struct Command {
    const char* name;
    int (*run)(const Words&, Console);
};

constexpr Command commands[] = {
    {"figures", figuresCommand},
    {"check", checkCommand},
    {"certificate", certificateCommand},
    {"convert", convertCommand},
    {"coefficients", coefficientsCommand},
    {"self-test", selfTestCommand},
};

bool asksFor(const Words& words, const char* option) {
    return std::find(words.begin(), words.end(), option) != words.end();
}

} // namespace

std::optional<int> runCommand(const Words& words, Console console) {
    if (asksFor(words, "--help") || asksFor(words, "-h")) {
        console.out << helpText();
        return Done;
    }
    if (asksFor(words, "--version")) {
        console.out << "spanwright " SPANWRIGHT_VERSION "\n";
        return Done;
    }
    if (words.empty())
        return std::nullopt;
    for (const Command& command : commands)
        if (words.front() == command.name)
            return command.run(Words(words.begin() + 1, words.end()), console);
    return std::nullopt;
}

int runProgram(int argc, char** argv) {
    keepLargeBlocks();
    const Words words(argv + 1, argv + argc);
    // What commands print is read by programs and pasted into reports: the same in every locale.
    const QLocale own;
    QLocale::setDefault(QLocale::c());
    if (const auto status = runCommand(words, {std::cout, std::cerr}))
        return *status;
    QLocale::setDefault(own);
    return windowCommand(argc, argv, words, {std::cout, std::cerr});
}

} // namespace spanwright
