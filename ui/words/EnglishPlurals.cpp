// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/words/EnglishPlurals.h"

#include <QCoreApplication>

namespace spanwright {

QString EnglishPlurals::translate(const char*, const char* source, const char*, int n) const {
    if (n < 0 || !source)
        return {};
    QString text = QString::fromUtf8(source);
    // "is/are" and "this/these" stand in the source as "is|are" in brackets: "%n cell(s) [is|are] empty".
    for (qsizetype open = text.indexOf(QLatin1Char('[')); open >= 0; open = text.indexOf(QLatin1Char('['))) {
        const qsizetype bar = text.indexOf(QLatin1Char('|'), open), close = text.indexOf(QLatin1Char(']'), open);
        if (bar < 0 || close < bar)
            break;
        const QString word = n == 1 ? text.mid(open + 1, bar - open - 1) : text.mid(bar + 1, close - bar - 1);
        text.replace(open, close - open + 1, word);
    }
    return text.replace(QLatin1String("(s)"), n == 1 ? QString() : QStringLiteral("s"));
}

void speakEnglish(QCoreApplication& application) {
    if (!application.findChild<EnglishPlurals*>())
        QCoreApplication::installTranslator(new EnglishPlurals(&application));
}

} // namespace spanwright
