// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/words/Sentence.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

constexpr qsizetype LongestQuote = 60;

QString oneLine(const std::string& text) {
    QString line = QString::fromStdString(text);
    for (QChar& c : line)
        if (c.category() == QChar::Other_Control || c == QChar::LineSeparator || c == QChar::ParagraphSeparator)
            c = QLatin1Char(' ');
    return line;
}

QString cut(const QString& text) {
    return text.size() > LongestQuote ? text.left(LongestQuote) + QChar(0x2026) : text;
}

} // namespace

const Fact* Sentence::find(const char* name) const {
    for (const Fact& fact : facts_)
        if (fact.name == name)
            return &fact;
    return nullptr;
}

bool Sentence::has(const char* name) const {
    return find(name) != nullptr;
}

QString Sentence::plain(const char* name, const QString& otherwise) {
    const Fact* fact = find(name);
    if (fact == nullptr)
        return otherwise;
    used_ << QString::fromLatin1(name);
    return oneLine(fact->value);
}

QString Sentence::quoted(const char* name, const QString& otherwise) {
    const QString text = plain(name);
    return text.isEmpty() ? otherwise : QChar(0x201C) + cut(text) + QChar(0x201D);
}

QString Sentence::place() {
    QStringList parts;
    if (has("file"))
        parts << plain("file");
    if (has("line"))
        parts << QCoreApplication::translate("Words", "line %1").arg(plain("line"));
    if (has("row"))
        parts << QCoreApplication::translate("Words", "row %1").arg(plain("row"));
    if (has("column"))
        parts << QCoreApplication::translate("Words", "column %1").arg(plain("column"));
    return parts.isEmpty() ? QString() : parts.join(QLatin1String(", ")) + QLatin1String(": ");
}

QString Sentence::file() {
    return has("file") ? plain("file") + QLatin1String(": ") : QString();
}

QString Sentence::rest() {
    QStringList parts;
    for (const Fact& fact : facts_)
        if (!used_.contains(QString::fromStdString(fact.name)))
            parts << oneLine(fact.name) + QLatin1String(": ") + cut(oneLine(fact.value));
    return parts.isEmpty() ? QString() : QLatin1String(" (") + parts.join(QLatin1String("; ")) + QLatin1Char(')');
}

} // namespace spanwright
