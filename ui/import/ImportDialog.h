// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"
#include "ui/commands/RecordCommand.h"
#include "ui/import/TableReading.h"

#include <QDialog>

#include <memory>
#include <optional>

class QCheckBox;
class QComboBox;
class QLabel;
class QLineEdit;
class QProgressBar;
class QPushButton;
class QSpinBox;
class QTableView;
class QVBoxLayout;

namespace spanwright {

class ImportIssues;
class ImportPreview;

/// Shows how a table of text was understood, with its first rows, and lets everything be changed before anything is taken in. A large
/// table is read beside the window, and given up with the dialog.
class ImportDialog : public QDialog {
    Q_OBJECT

  public:
    ImportDialog(TableSource source, const QString& origin, const Record& record, QWidget* parent);
    ~ImportDialog() override;
    /// The one step that takes the readings in, once the dialog was accepted.
    [[nodiscard]] std::unique_ptr<RecordCommand> takeCommand();

  private:
    void guess();
    void showLook(const TableLook& look);
    void refuse(const Error& error);
    void readAll();
    void showRead(Result<ImportedReadings> read);
    void showSum(const QString& sum);
    void showBusy(double share);
    void showRules();
    void showDoubts();
    void roleChosen(std::size_t column, int role);
    void makeTop(QVBoxLayout* all);
    [[nodiscard]] CsvWishes wishes() const;
    bool eventFilter(QObject* watched, QEvent* event) override;
    void takeMissingWords();
    [[nodiscard]] std::vector<std::string> missingWords() const; ///< as they stand in the field

    TableReading* reading_;
    QString origin_;
    Record record_; ///< shares its readings; asked for what is already known
    std::optional<CsvRules> rules_;
    ImportMapping mapping_;
    std::vector<PreviewRow> rows_;
    std::optional<ImportedReadings> read_;

    QComboBox* encoding_;
    QComboBox* separator_;
    QComboBox* decimal_;
    QSpinBox* headerRows_;
    QCheckBox* unitsRow_;
    QLineEdit* missing_;
    std::vector<std::string> stated_; ///< words for no value, as the table was read with
    QComboBox* phase_;
    QCheckBox* takeNames_;
    QLabel* doubts_;
    QLabel* sum_;
    QProgressBar* bar_;
    QLabel* issuesHead_;
    ImportPreview* preview_;
    ImportIssues* issues_;
    QTableView* issuesView_;
    QPushButton* accept_;
    bool changing_ = false;
    bool rolesChosen_ = false;          ///< by hand, for columns of these names
    std::vector<std::string> columns_;
};

} // namespace spanwright
