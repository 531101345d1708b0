// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/Suspects.h"

#include "core/diagnose/Slips.h"
#include "ui/bench/TypedCheck.h"
#include "ui/commands/ReadingCommands.h"
#include "ui/commands/ReadingNumbers.h"
#include "ui/look/NumberText.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

constexpr std::size_t MostLookedAt = 5000;

QString tr(const char* text) {
    return QCoreApplication::translate("Suspects", text);
}

bool inside(const Reading& reading, const PhaseEvaluation* figures, const Item& item) {
    return reading.reference && reading.indication && insideOfReadings(*reading.indication, reading.reference->toDouble(), figures, item);
}

/// Twice as far from the middle of the interval as it reaches: of a whole block of sound readings some lie outside, hardly one so far.
bool farOutside(const Reading& reading, const PhaseEvaluation* figures, const Item& item) {
    if (!reading.reference || !reading.indication)
        return false;
    const auto expected = expectedAt(reading.reference->toDouble(), figures, item);
    return expected && expected->from == Expected::From::Readings &&
           std::abs(reading.indication->toDouble() - (expected->low + expected->high) / 2) > expected->high - expected->low;
}

/// Slips of the readings as they would stand in the record.
std::vector<Slip> slipsAmong(const Record& record, const std::vector<Reading>& rows, std::vector<ReadingId>& ids) {
    if (rows.size() == 1) {
        ids = {rows.front().id};
        return slipsOf(record, rows.front());
    }
    Record trial = record;
    PutReadings put({}, rows);
    put.apply(trial);
    ids = put.ids();
    return slipsIn(trial, rows.front().phase);
}

class Questions {
  public:
    Questions(const std::vector<Reading>& rows, const std::set<NumberColumn>& columns) : rows_(rows), columns_(columns) {}

    void add(const Slip& slip, std::size_t row) {
        if (slip.kind == SlipKind::BeforeSettled || slip.kind == SlipKind::OffResolution)
            return;
        // Of a reference just typed the indication may tell that it does not fit, but not what it should be.
        const bool pair = slip.column == NumberColumn::Indication && !columns_.contains(slip.column) && slip.distance != 0;
        const NumberColumn column = pair ? NumberColumn::Reference : slip.column;
        const auto& typed = numberOf(rows_[row], column);
        if (typed && columns_.contains(column))
            add(row, column, pair ? std::nullopt : slip.suggestion,
                pair ? tr("With reference %1 the indication lies far from what the other readings say.").arg(typedText(*typed)) : slipText(slip, *typed));
    }

    void add(std::size_t row, NumberColumn column, const TypedCheck& check) {
        if (check.doubtful && columns_.contains(column))
            add(row, column, std::nullopt, tr("%1: %2").arg(typedText(*numberOf(rows_[row], column)), check.sentence));
    }

    [[nodiscard]] std::vector<Suspect> take() {
        std::stable_sort(made_.begin(), made_.end(), [](const Suspect& a, const Suspect& b) { return a.row < b.row; });
        return std::move(made_);
    }

  private:
    void add(std::size_t row, NumberColumn column, std::optional<Decimal> suggestion, const QString& sentence) {
        const bool known = std::any_of(made_.begin(), made_.end(), [&](const Suspect& s) { return s.row == row && s.column == column; });
        if (!known)
            made_.push_back({row, column, *numberOf(rows_[row], column), std::move(suggestion), sentence});
    }

    const std::vector<Reading>& rows_;
    const std::set<NumberColumn>& columns_;
    std::vector<Suspect> made_;
};

} // namespace

std::vector<Suspect> suspectsAmong(const Record& record, const PhaseEvaluation* figures, const std::vector<Reading>& rows, const std::set<NumberColumn>& columns) {
    if (rows.empty() || rows.size() + record.readings->size() > MostLookedAt)
        return {};
    Questions questions(rows, columns);
    const bool judges = figures && figures->fit && rows.size() <= figures->fit->used;
    std::vector<ReadingId> ids;
    for (const Slip& slip : slipsAmong(record, rows, ids)) {
        const auto found = std::find(ids.begin(), ids.end(), slip.id);
        if (found == ids.end())
            continue;
        const auto row = static_cast<std::size_t>(found - ids.begin());
        // A slip that would explain the number is asked about all the same.
        const bool farOff = slip.kind == SlipKind::Unexplained;
        if (!farOff || !judges || !inside(rows[row], figures, record.item))
            questions.add(slip, row);
    }
    for (std::size_t row = 0; row < rows.size(); ++row) {
        if (rows[row].reference)
            questions.add(row, NumberColumn::Reference, checkReference(*rows[row].reference, rows[row].setPoint, record.item));
        if (judges && farOutside(rows[row], figures, record.item))
            questions.add(row, NumberColumn::Indication, checkIndication(*rows[row].indication, rows[row].reference->toDouble(), figures, record.item));
    }
    return questions.take();
}

std::vector<Reading> answered(std::vector<Reading> rows, const std::vector<Suspect>& suspects) {
    for (const Suspect& suspect : suspects)
        if (suspect.useSuggestion && suspect.suggestion)
            numberOf(rows[suspect.row], suspect.column) = suspect.suggestion;
    return rows;
}

QString answerText(const Suspect& suspect) {
    return suspect.useSuggestion ? tr("taken instead of %1 when asked").arg(typedText(suspect.typed)) : tr("kept as typed when asked: %1").arg(suspect.sentence);
}

} // namespace spanwright
