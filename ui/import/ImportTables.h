// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/exchange/CsvReader.h"
#include "core/exchange/ReadingImport.h"

#include <QAbstractTableModel>
#include <QTableWidget>

namespace spanwright {

/// What a column of the table can be of a reading, in the order of the chooser; the first is "not taken in".
enum class ImportRole { None, Reference, Indication, SetPoint, Direction, Run, UReference, UIndication, UCovariance, Time };
inline constexpr int ImportRoles = static_cast<int>(ImportRole::Time) + 1;
QString importRoleText(ImportRole role);
std::optional<std::size_t>& roleColumn(ImportMapping& mapping, ImportRole role);
ImportRole roleOf(const ImportMapping& mapping, std::size_t column);

/// The first rows as they stand in the file, under a chooser for each column. What is refused is marked and says why.
class ImportPreview : public QTableWidget {
    Q_OBJECT

  public:
    explicit ImportPreview(QWidget* parent = nullptr);
    void show(const CsvRules& rules, const ImportMapping& mapping, const std::vector<PreviewRow>& rows);
    void clearAll();

  signals:
    void roleChosen(std::size_t column, int role);
};

/// Every cell that is not what its column asks for, with its line in the file.
class ImportIssues : public QAbstractTableModel {
    Q_OBJECT

  public:
    using QAbstractTableModel::QAbstractTableModel;
    void fill(const CellIssues& issues, const CsvRules& rules);
    void clear();
    [[nodiscard]] int rowCount(const QModelIndex& parent = {}) const override;
    [[nodiscard]] int columnCount(const QModelIndex& parent = {}) const override;
    [[nodiscard]] QVariant data(const QModelIndex& index, int role) const override;
    [[nodiscard]] QVariant headerData(int section, Qt::Orientation orientation, int role) const override;

  private:
    struct Row {
        QString line, column, text, why;
    };
    std::vector<Row> rows_;
};

} // namespace spanwright
