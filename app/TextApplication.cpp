// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/TextApplication.h"

#include "ui/words/EnglishPlurals.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

int argumentCount = 1;
char name[] = "spanwright";
char* argumentList[] = {name, nullptr};

} // namespace

TextApplication::TextApplication() {
    if (QCoreApplication::instance() != nullptr)
        return;
    application_ = std::make_unique<QCoreApplication>(argumentCount, argumentList);
    speakEnglish(*application_);
}

TextApplication::~TextApplication() = default;

} // namespace spanwright
