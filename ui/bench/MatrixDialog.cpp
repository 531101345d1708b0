// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/MatrixDialog.h"

#include "core/exchange/FileBytes.h"
#include "core/exchange/MatrixTable.h"
#include "core/fit/StatedCovariance.h"
#include "ui/bench/MatrixModel.h"
#include "ui/commands/PartCommand.h"
#include "ui/look/Look.h"
#include "ui/words/Words.h"

#include <QApplication>
#include <QClipboard>
#include <QFileDialog>
#include <QFileInfo>
#include <QHeaderView>
#include <QKeyEvent>
#include <QLabel>
#include <QPushButton>
#include <QTableView>
#include <QVBoxLayout>

#include <algorithm>

namespace spanwright {

MatrixDialog::MatrixDialog(Workbench& workbench, QWidget* parent)
    : SheetDialog(QStringLiteral("matrixDialog"), tr("Covariances between readings"), parent), workbench_(workbench), model_(new MatrixModel(this)), table_(new QTableView), about_(new QLabel), refusal_(new QLabel) {
    about_->setObjectName(QStringLiteral("matrixAbout"));
    refusal_->setObjectName(QStringLiteral("matrixRefusal"));
    refusal_->setForegroundRole(inkRole::warning);
    for (QLabel* label : {about_, refusal_}) {
        label->setTextFormat(Qt::PlainText);
        label->setWordWrap(true);
        label->setMinimumWidth(480);
    }
    table_->setObjectName(QStringLiteral("matrixTable"));
    table_->setAccessibleName(tr("Matrix of covariances"));
    table_->setModel(model_);
    table_->setMinimumSize(640, 320);
    table_->setEditTriggers(QAbstractItemView::NoEditTriggers);
    table_->setShowGrid(false);
    table_->setCornerButtonEnabled(false);
    table_->horizontalHeader()->setHighlightSections(false);
    table_->horizontalHeader()->setDefaultSectionSize(84);
    table_->verticalHeader()->setSectionResizeMode(QHeaderView::Fixed);
    table_->verticalHeader()->setHighlightSections(false);
    table_->verticalHeader()->setDefaultSectionSize(QFontMetrics(textFont(TextRole::Body)).height() + 6);
    body()->addWidget(about_);
    body()->addWidget(table_, 1);
    body()->addWidget(refusal_);
    const auto button = [&](const char* id, const QString& text, QDialogButtonBox::ButtonRole role, void (MatrixDialog::*run)()) {
        QPushButton* made = addButton(text, role, QLatin1String(id));
        made->setAutoDefault(false);
        connect(made, &QPushButton::clicked, this, run);
        changing_.push_back(made);
        return made;
    };
    button("matrixLoad", tr("&Load…"), QDialogButtonBox::ActionRole, &MatrixDialog::load);
    button("matrixPaste", tr("&Paste"), QDialogButtonBox::ActionRole, &MatrixDialog::paste);
    remove_ = button("matrixRemove", tr("&Remove"), QDialogButtonBox::DestructiveRole, &MatrixDialog::remove);
    addClose();
    connect(&workbench_, &Workbench::recordChanged, this, &MatrixDialog::refresh);
    refresh();
}

void MatrixDialog::refresh() {
    const Record& record = workbench_.record();
    const UncertaintyMatrix& matrix = record.uncertaintyMatrix;
    model_->show(matrix);
    const auto& phases = record.readings->phases();
    std::size_t readings = 0;
    for (std::size_t row = 0; row < phases.size(); ++row)
        readings += phases[row] == record.choices.phase && record.readings->complete(row) ? 1 : 0;
    if (matrix.empty()) {
        about_->setText(tr("None are stated. Load or paste a table of numbers: %1 rows and columns for the indications alone, or %2 for all "
                           "references followed by all indications, in the order of the readings. Leave out the calibration error of the "
                           "standard: it is known from the job.")
                            .arg(readings)
                            .arg(2 * readings));
    } else {
        const bool both = matrix.rows.front().side == Side::Reference;
        const QString source = QString::fromStdString(matrix.source);
        about_->setText(both ? tr("References and indications, from %1. They take part where both are taken as uncertain; with weights from the "
                                  "stated uncertainties, those of the quantity that is fitted do.")
                                   .arg(source)
                             : tr("Indications, from %1. They take part with weights from the stated uncertainties, and where both are taken as "
                                  "uncertain.")
                                   .arg(source));
    }
    about_->setMinimumHeight(about_->heightForWidth(about_->minimumWidth()));
    if (table_->isVisibleTo(this) == matrix.empty()) {
        table_->setVisible(!matrix.empty());
        adjustSize();
    }
    for (QPushButton* button : changing_)
        button->setEnabled(!workbench_.readOnly());
    remove_->setEnabled(!workbench_.readOnly() && !matrix.empty());
}

void MatrixDialog::take(const std::string& text, const QString& source) {
    const Record& record = workbench_.record();
    const auto numbers = readMatrix(text);
    auto matrix = numbers ? uncertaintyMatrix(*numbers, record, record.choices.phase, source.toStdString()) : numbers.error();
    refusal_->setText(matrix ? QString() : errorText(matrix.error()));
    refusal_->setMinimumHeight(matrix ? 0 : refusal_->heightForWidth(refusal_->minimumWidth()));
    if (!matrix)
        return;
    workbench_.perform(changePart(record, &Record::uncertaintyMatrix, tr("take in covariances between readings"),
                                  [&](UncertaintyMatrix& stated) { stated = std::move(*matrix); }));
}

void MatrixDialog::load() {
    auto* dialog = new QFileDialog(this, tr("Load covariances"), {}, tr("Tables of numbers (*.csv *.txt);;All files (*)"));
    dialog->setObjectName(QStringLiteral("matrixFile"));
    dialog->setAttribute(Qt::WA_DeleteOnClose);
    dialog->setFileMode(QFileDialog::ExistingFile);
    connect(dialog, &QFileDialog::fileSelected, this, [this](const QString& path) {
        const auto file = FileBytes::read(path.toStdString());
        if (file)
            take(std::string(file->bytes()), QFileInfo(path).fileName());
        else
            refusal_->setText(errorText(file.error()));
    });
    dialog->open();
}

void MatrixDialog::paste() {
    take(QApplication::clipboard()->text().toStdString(), tr("the clipboard"));
}

void MatrixDialog::remove() {
    refusal_->clear();
    workbench_.perform(changePart(workbench_.record(), &Record::uncertaintyMatrix, tr("remove covariances between readings"),
                                  [](UncertaintyMatrix& stated) { stated = {}; }));
}

void MatrixDialog::keyPressEvent(QKeyEvent* event) {
    if (event->matches(QKeySequence::Paste) && !workbench_.readOnly())
        paste();
    else
        QDialog::keyPressEvent(event);
}

} // namespace spanwright
