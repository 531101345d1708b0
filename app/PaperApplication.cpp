// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/PaperApplication.h"

#include <QGuiApplication>
#include <QLoggingCategory>

namespace spanwright {

namespace {

int argumentCount = 3;
char name[] = "spanwright", option[] = "-platform", platform[] = "offscreen";
char* argumentList[] = {name, option, platform, nullptr};

} // namespace

PaperApplication::PaperApplication() {
    if (QCoreApplication::instance() != nullptr)
        return;
    // Without a desktop Qt complains about folders that are not needed for paper; the error stream is for what the user must know.
    QLoggingCategory::setFilterRules(QStringLiteral("default.warning=false"));
    application_ = std::make_unique<QGuiApplication>(argumentCount, argumentList);
    QLoggingCategory::setFilterRules({});
}

PaperApplication::~PaperApplication() = default;

} // namespace spanwright
