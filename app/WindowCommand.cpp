// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/WindowCommand.h"

#include "app/Arguments.h"

#include <QApplication>
#include <QFileInfo>

#include <ostream>

namespace spanwright {

namespace {

constexpr OptionSpec known[] = {{"--stage"}, {"--scheme"}};

Error badValue(const char* option, const std::string& text) {
    return Error(ErrorCode::UsageValueBad, {{"option", option}, {"text", text}});
}

/// Whether there is something to draw on. Qt would end the program otherwise, with a message about plug-ins.
bool displayThere() {
    if (!qEnvironmentVariableIsEmpty("QT_QPA_PLATFORM") || !qEnvironmentVariableIsEmpty("WAYLAND_DISPLAY"))
        return true;
    const QString display = qEnvironmentVariable("DISPLAY");
    if (!display.startsWith(QLatin1Char(':')))
        return !display.isEmpty();
    const QString number = display.mid(1).section(QLatin1Char('.'), 0, 0);
    return QFileInfo::exists(QStringLiteral("/tmp/.X11-unix/X") + number);
}

} // namespace

Result<StartOptions> startOptions(const Words& words) {
    const auto arguments = parseArguments(words, known);
    if (!arguments)
        return arguments.error();
    StartOptions options;
    if (const auto text = arguments->value("--stage")) {
        options.stage = stageOfName(QString::fromStdString(*text));
        if (!options.stage)
            return badValue("--stage", *text);
    }
    if (const auto text = arguments->value("--scheme")) {
        if (*text != "light" && *text != "dark")
            return badValue("--scheme", *text);
        options.scheme = *text == "dark" ? SchemeName::Dark : SchemeName::Light;
    }
    for (const std::string& file : arguments->files) {
        const QString path = QString::fromStdString(file);
        const bool nameOfFile = path.contains(QLatin1Char('/')) || path.contains(QLatin1Char('.'));
        if (!QFileInfo::exists(path))
            return nameOfFile ? Error(ErrorCode::FileMissing, {{"file", file}}) : Error(ErrorCode::UsageUnknownCommand, {{"text", file}});
        options.files << path;
    }
    return options;
}

int windowCommand(int& argc, char** argv, const Words& words, Console console) {
    const auto options = startOptions(words);
    if (!options)
        return refuse(console, options.error());
    if (!displayThere()) {
        console.err << "spanwright: there is no display for the window. Commands work without one: spanwright figures FILE; see "
                       "spanwright --help.\n";
        return Refused;
    }
    QApplication application(argc, argv);
    QApplication::setApplicationName(QStringLiteral("spanwright"));
    QApplication::setApplicationVersion(QStringLiteral(SPANWRIGHT_VERSION));
    return runWindow(application, *options);
}

} // namespace spanwright
