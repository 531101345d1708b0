// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/PaperApplication.h"

#include <QGuiApplication>

namespace spanwright {

namespace {

int argumentCount = 3;
char name[] = "spanwright", option[] = "-platform", platform[] = "offscreen";
char* argumentList[] = {name, option, platform, nullptr};

} // namespace

PaperApplication::PaperApplication() {
    if (QCoreApplication::instance() == nullptr)
        application_ = std::make_unique<QGuiApplication>(argumentCount, argumentList);
}

PaperApplication::~PaperApplication() = default;

} // namespace spanwright
