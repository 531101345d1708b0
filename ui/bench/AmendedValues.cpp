// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/AmendedValues.h"

#include "ui/commands/ReadingNumbers.h"
#include "ui/look/NumberText.h"

#include <QCoreApplication>
#include <QDateTime>
#include <QLocale>

namespace spanwright {

namespace {

struct Words {
    Q_DECLARE_TR_FUNCTIONS(AmendedValues)
};

/// "reading 17 indication" in the journal.
std::optional<std::pair<ReadingId, NumberColumn>> placeOf(const std::string& where) {
    const QString text = QString::fromStdString(where);
    if (!text.startsWith(QStringLiteral("reading ")))
        return std::nullopt;
    const qsizetype end = text.indexOf(QLatin1Char(' '), 8);
    for (const ReadingNumber& number : readingNumbers)
        if (end > 0 && text.mid(end + 1) == QLatin1String(number.name))
            return std::pair(text.mid(8, end - 8).toLongLong(), number.column);
    return std::nullopt;
}

QString shown(const std::string& decimal) {
    const auto value = Decimal::parse(decimal);
    return value ? typedText(*value) : QString::fromStdString(decimal);
}

} // namespace

void AmendedValues::follow(const Journal& journal) {
    const auto& entries = journal.entries();
    if (entries.size() < read_ || (read_ > 0 && entries[read_ - 1] != last_)) {
        amended_.clear();
        read_ = 0;
    }
    for (; read_ < entries.size(); ++read_)
        if (entries[read_].what == "value-amended")
            if (const auto place = placeOf(entries[read_].where))
                amended_.insert(*place);
    if (read_ > 0)
        last_ = entries[read_ - 1];
}

bool AmendedValues::contains(ReadingId id) const {
    const auto found = amended_.lower_bound({id, NumberColumn{}});
    return found != amended_.end() && found->first == id;
}

QString AmendedValues::history(const Journal& journal, ReadingId id, NumberColumn column) {
    QStringList lines;
    for (const JournalEntry& entry : journal.entries()) {
        if (placeOf(entry.where) != std::pair(id, column))
            continue;
        const QString when = QLocale().toString(QDateTime::fromMSecsSinceEpoch(entry.at), QLocale::ShortFormat);
        QString line = Words::tr("%1 → %2, %3 %4").arg(shown(entry.before), shown(entry.after), QString::fromStdString(entry.who), when);
        if (!entry.reason.empty())
            line += QStringLiteral(": ") + QString::fromStdString(entry.reason);
        if (entry.what != "value-amended" && entry.what != "value-entered")
            line += QStringLiteral(" (") + QString::fromStdString(entry.what) + QLatin1Char(')');
        lines << line.simplified();
    }
    return lines.join(QLatin1Char('\n'));
}

} // namespace spanwright
