// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QTranslator>

class QCoreApplication;

namespace spanwright {

/// Makes "1 reading" and "2 readings" of "%n reading(s)" in English, where no translation is installed. A translator that is
/// installed later comes before it.
class EnglishPlurals : public QTranslator {
    Q_OBJECT

  public:
    using QTranslator::QTranslator;
    [[nodiscard]] bool isEmpty() const override { return false; }
    [[nodiscard]] QString translate(const char* context, const char* source, const char* disambiguation, int n) const override;
};

/// Installs it once in the application.
void speakEnglish(QCoreApplication& application);

} // namespace spanwright
