// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "ui/bench/AmendedValues.h"
#include "ui/commands/Workbench.h"

#include <QAbstractTableModel>

#include <optional>
#include <vector>

namespace spanwright {

/// The readings of the phase shown as a table: those taken, then those the plan still asks for, or one free row when it asks for
/// none. Thin over the record's columns and the evaluation's; nothing is computed here but text.
class ReadingsModel : public QAbstractTableModel {
    Q_OBJECT

  public:
    enum Column {
        Number,
        Run,
        DirectionMark,
        SetPoint,
        ReferenceValue,
        IndicationValue,
        ReferenceUncertainty,
        IndicationUncertainty,
        Covariance,
        ResidualValue,
        State,
        ColumnCount
    };
    /// What is stated of a reading's uncertainty; shown where it is used.
    static constexpr Column statedColumns[] = {ReferenceUncertainty, IndicationUncertainty, Covariance};
    enum Role { ExcludedRole = Qt::UserRole, AmendedRole, PlannedRole, DirectionRole, MissingDigitsRole, OutsideRole, HurriedRole };

    explicit ReadingsModel(Workbench& workbench, QObject* parent = nullptr);

    int rowCount(const QModelIndex& parent = {}) const override;
    int columnCount(const QModelIndex& parent = {}) const override;
    QVariant data(const QModelIndex& index, int role) const override;
    QVariant headerData(int section, Qt::Orientation orientation, int role) const override;
    Qt::ItemFlags flags(const QModelIndex& index) const override;

    [[nodiscard]] Phase phase() const { return phase_; }
    /// Rows that hold a reading; those behind them are planned or free.
    [[nodiscard]] int taken() const { return static_cast<int>(rows_.size()); }
    [[nodiscard]] std::optional<ReadingId> idAt(int row) const;
    [[nodiscard]] int rowOf(ReadingId id) const; ///< −1 when it is not in this phase
    /// The reading of a row, or what a planned or free row would become once a value is typed.
    [[nodiscard]] Reading readingAt(int row) const;
    /// The cell in which the next value is to be typed.
    [[nodiscard]] QModelIndex nextCell() const;
    /// The column of the record that a column of the table shows; empty for those that cannot be typed.
    static std::optional<NumberColumn> numberColumn(int column);
    static Column columnOf(NumberColumn column);
    /// Whether any reading states it.
    [[nodiscard]] bool isStated(Column column) const;
    /// What happened to a value: the journal's entries about it, in words, oldest first.
    [[nodiscard]] QString history(int row, int column) const;

    void refreshRecord();
    void refreshFigures();

  private:
    [[nodiscard]] std::size_t recordRow(int row) const { return rows_[static_cast<std::size_t>(row)]; }
    [[nodiscard]] QString text(int row, int column) const;
    [[nodiscard]] QString plannedText(int row, int column) const;
    [[nodiscard]] QString stateText(int row) const;
    [[nodiscard]] QString hurriedText(int row) const;
    [[nodiscard]] QString tip(int row, int column) const;
    [[nodiscard]] double residual(ReadingId id) const;
    [[nodiscard]] int missingDigits(int row, int column) const;

    Workbench& workbench_;
    Phase phase_ = Phase::AsFound;
    std::vector<std::uint32_t> rows_; ///< rows of the record's columns that belong to the phase
    std::vector<PlannedReading> planned_;
    std::shared_ptr<const PhaseEvaluation> figures_;
    int residualDecimals_ = 4;
    AmendedValues amended_;
};

} // namespace spanwright
