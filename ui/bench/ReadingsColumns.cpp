// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/ReadingsColumns.h"

#include "ui/bench/ReadingsModel.h"
#include "ui/look/Look.h"

#include <QTableView>

#include <algorithm>

namespace spanwright {

namespace {

constexpr int NumberPadding = 14;
constexpr int RowsLookedAt = 60; // at each end of the table, where the widest numbers mostly are
constexpr int alwaysSeen[] = {ReadingsModel::ReferenceValue, ReadingsModel::IndicationValue, ReadingsModel::ResidualValue};

} // namespace

void ReadingsColumns::showStated(bool shown) {
    statedWanted_ = shown;
    measure();
}

bool ReadingsColumns::statedShown() const {
    return !table_.isColumnHidden(ReadingsModel::Covariance);
}

int ReadingsColumns::widthOfNumbers(int column) const {
    const QFontMetrics body(textFont(TextRole::Body)), small(textFont(TextRole::Small));
    int widest = body.horizontalAdvance(QStringLiteral("000000"));
    for (const QString& line : model_.headerData(column, Qt::Horizontal, Qt::DisplayRole).toString().split(QLatin1Char('\n')))
        widest = std::max(widest, small.horizontalAdvance(line));
    const int rows = model_.rowCount();
    for (int row = 0; row < rows; row = row + 1 == RowsLookedAt ? std::max(RowsLookedAt, rows - RowsLookedAt) : row + 1)
        widest = std::max(widest, body.horizontalAdvance(model_.index(row, column).data().toString()));
    return widest + NumberPadding;
}

void ReadingsColumns::measure() {
    needed_[ReadingsModel::SetPoint] = widthOfNumbers(ReadingsModel::SetPoint);
    for (const int column : alwaysSeen)
        needed_[column] = widthOfNumbers(column);
    for (const ReadingsModel::Column column : ReadingsModel::statedColumns) {
        const bool shown = statedWanted_ || model_.isStated(column);
        table_.setColumnHidden(column, !shown);
        needed_[column] = shown ? widthOfNumbers(column) : 0;
    }
    fit();
}

void ReadingsColumns::fit() {
    const int digit = QFontMetrics(textFont(TextRole::Body)).horizontalAdvance(QLatin1Char('0'));
    const int number = digit * 3 + NumberPadding, run = digit * 2 + 18, mark = 22, state = digit * 8 + 16;
    const int setPoint = needed_[ReadingsModel::SetPoint] + NumberPadding;
    int least = number + run + mark;
    for (const int column : alwaysSeen)
        least += needed_[column];
    for (const int column : ReadingsModel::statedColumns) {
        table_.setColumnWidth(column, needed_[column]);
        least += needed_[column];
    }
    const int room = table_.viewport()->width();
    const bool withSetPoint = room >= least + setPoint;
    const bool withState = room >= least + setPoint + state;
    table_.setColumnHidden(ReadingsModel::SetPoint, !withSetPoint);
    table_.setColumnHidden(ReadingsModel::State, !withState);
    const int spare = std::max(0, room - least - (withSetPoint ? setPoint : 0) - (withState ? state : 0));
    const int share = spare / (3 + (withSetPoint ? 1 : 0));
    table_.setColumnWidth(ReadingsModel::Number, number);
    table_.setColumnWidth(ReadingsModel::Run, run);
    table_.setColumnWidth(ReadingsModel::DirectionMark, mark);
    table_.setColumnWidth(ReadingsModel::SetPoint, setPoint + share);
    for (const int column : alwaysSeen)
        table_.setColumnWidth(column, needed_[column] + share);
    table_.setColumnWidth(ReadingsModel::State, state);
}

int ReadingsColumns::lastTyped(int row) const {
    int last = ReadingsModel::IndicationValue;
    for (const int column : ReadingsModel::statedColumns)
        if (!table_.isColumnHidden(column) && row <= model_.taken())
            last = column;
    return last;
}

} // namespace spanwright
