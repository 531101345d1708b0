// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/PastedReadings.h"

#include "ui/bench/PastedBlock.h"
#include "ui/bench/ReadingsColumns.h"
#include "ui/bench/ReadingsModel.h"
#include "ui/commands/ReadingNumbers.h"
#include "ui/words/Words.h"

#include <QCoreApplication>

namespace spanwright {

namespace {

constexpr std::size_t MostCellsNamed = 4;

struct Words {
    Q_DECLARE_TR_FUNCTIONS(PastedReadings)
};

QString refusalText(const std::vector<PastedBlock::Refused>& cells) {
    QStringList lines{Words::tr("Nothing was pasted.")};
    for (const PastedBlock::Refused& cell : cells) {
        if (lines.size() > static_cast<qsizetype>(MostCellsNamed)) {
            lines << Words::tr("… and %1 more.").arg(cells.size() - MostCellsNamed);
            break;
        }
        lines << Words::tr("Line %1, cell %2: %3").arg(cell.row).arg(cell.column).arg(errorText(cell.error));
    }
    return lines.join(QLatin1Char('\n'));
}

} // namespace

PastedReadings pastedReadings(const PastedBlock& block, const ReadingsModel& model, const ReadingsColumns& columns, const QModelIndex& start) {
    PastedReadings pasted;
    if (!block.refused.empty()) {
        pasted.refusal = refusalText(block.refused);
        return pasted;
    }
    const int first = ReadingsModel::numberColumn(start.column()) ? start.column() : static_cast<int>(ReadingsModel::ReferenceValue);
    const int below = start.row() + static_cast<int>(block.rows.size());
    if (first + block.width() - 1 > columns.lastTyped(below)) {
        pasted.refusal = Words::tr("Nothing was pasted. The block is %1 columns wide and does not fit from here: start at an earlier column.").arg(block.width());
        return pasted;
    }
    for (int row = start.row(); row < below; ++row) {
        const std::vector<Decimal>& values = block.rows[static_cast<std::size_t>(row - start.row())];
        Reading reading = model.readingAt(row);
        for (int c = 0; c < block.width(); ++c)
            numberOf(reading, *ReadingsModel::numberColumn(first + c)) = values[static_cast<std::size_t>(c)];
        pasted.rows.push_back(std::move(reading));
    }
    for (int c = 0; c < block.width(); ++c)
        pasted.columns.insert(*ReadingsModel::numberColumn(first + c));
    return pasted;
}

} // namespace spanwright
