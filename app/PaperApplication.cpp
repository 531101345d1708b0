// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/PaperApplication.h"

#include "ui/words/EnglishPlurals.h"

#include <QGuiApplication>

#include <cstdio>

namespace spanwright {

namespace {

int argumentCount = 3;
char name[] = "spanwright", option[] = "-platform", platform[] = "offscreen";
char* argumentList[] = {name, option, platform, nullptr};

/// Without a desktop Qt complains about folders that paper does not need; the error stream is for what the user must know.
void passOn(QtMsgType type, const QMessageLogContext&, const QString& text) {
    if (type == QtCriticalMsg || type == QtFatalMsg)
        std::fprintf(stderr, "spanwright: %s\n", qPrintable(text));
}

} // namespace

PaperApplication::PaperApplication() {
    if (QCoreApplication::instance() != nullptr)
        return;
    previous_ = qInstallMessageHandler(passOn);
    application_ = std::make_unique<QGuiApplication>(argumentCount, argumentList);
    speakEnglish(*application_);
}

PaperApplication::~PaperApplication() {
    if (application_)
        qInstallMessageHandler(previous_);
}

} // namespace spanwright
