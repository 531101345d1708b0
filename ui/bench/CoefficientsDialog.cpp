// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/CoefficientsDialog.h"

#include "core/evaluate/Calibration.h"
#include "core/session/WholeFile.h"
#include "ui/look/Look.h"
#include "ui/words/Words.h"

#include <QApplication>
#include <QClipboard>
#include <QComboBox>
#include <QFileDialog>
#include <QFileInfo>
#include <QFontDatabase>
#include <QFormLayout>
#include <QLabel>
#include <QPlainTextEdit>
#include <QPushButton>
#include <QVBoxLayout>

namespace spanwright {

namespace {

QString suffixOf(CoefficientForm form) {
    switch (form) {
    case CoefficientForm::Plain: return QStringLiteral("txt");
    case CoefficientForm::C: return QStringLiteral("c");
    case CoefficientForm::Csv: return QStringLiteral("csv");
    }
    return {};
}

/// The item's serial number as the name of a file.
QString suggestionFor(const Record& record, CoefficientForm form) {
    QString name;
    for (const QChar c : QString::fromStdString(record.item.serial))
        name += c.isLetterOrNumber() || c == QLatin1Char('-') ? c : QChar(QLatin1Char('-'));
    return (name.isEmpty() ? QStringLiteral("coefficients") : name + QStringLiteral("-coefficients")) + QLatin1Char('.') + suffixOf(form);
}

} // namespace

TextPathAsk screenTextPath() {
    return [](QWidget* parent, const QString& suggestion) {
        return QFileDialog::getSaveFileName(parent, CoefficientsDialog::tr("Save the coefficients"), suggestion);
    };
}

CoefficientsDialog::CoefficientsDialog(Workbench& workbench, TextPathAsk ask, QWidget* parent)
    : SheetDialog(QStringLiteral("coefficientsDialog"), tr("Coefficients for a data logger"), parent), workbench_(workbench), ask_(std::move(ask)), form_(new QComboBox), text_(new QPlainTextEdit), said_(new QLabel) {
    resize(800, 600);
    form_->setObjectName(QStringLiteral("coefficientForm"));
    form_->addItem(tr("Formula and numbers, to be typed"));
    form_->addItem(tr("C functions, to be compiled"));
    form_->addItem(tr("Table, separated by commas"));
    auto* form = new QFormLayout;
    form->addRow(tr("&Written as"), form_);
    body()->addLayout(form);
    text_->setObjectName(QStringLiteral("coefficientText"));
    text_->setAccessibleName(tr("Coefficients as text"));
    text_->setReadOnly(true);
    text_->setTabChangesFocus(true);
    text_->setLineWrapMode(QPlainTextEdit::NoWrap);
    QFont font = QFontDatabase::systemFont(QFontDatabase::FixedFont);
    font.setPointSizeF(textFont(TextRole::Body).pointSizeF());
    text_->setFont(font);
    body()->addWidget(text_, 1);
    said_->setObjectName(QStringLiteral("coefficientSaid"));
    said_->setWordWrap(true);
    said_->setTextFormat(Qt::PlainText);
    said_->setForegroundRole(inkRole::quiet);
    body()->addWidget(said_);
    copy_ = addButton(tr("C&opy"), QDialogButtonBox::ActionRole, QStringLiteral("coefficientCopy"));
    save_ = addButton(tr("&Save…"), QDialogButtonBox::ActionRole, QStringLiteral("coefficientSave"));
    addClose();
    copy_->setDefault(true);
    connect(copy_, &QPushButton::clicked, this, &CoefficientsDialog::copy);
    connect(save_, &QPushButton::clicked, this, &CoefficientsDialog::save);
    connect(form_, &QComboBox::currentIndexChanged, this, &CoefficientsDialog::refresh);
    connect(&workbench_, &Workbench::evaluationChanged, this, &CoefficientsDialog::refresh);
    refresh();
}

CoefficientForm CoefficientsDialog::form() const {
    constexpr CoefficientForm forms[] = {CoefficientForm::Plain, CoefficientForm::C, CoefficientForm::Csv};
    return forms[form_->currentIndex()];
}

void CoefficientsDialog::refresh() {
    const Record& record = workbench_.record();
    const PhaseEvaluation* phase = calibrationOf(*workbench_.evaluation(), record.choices.phase);
    const auto printed = phase != nullptr ? printedFunction(record, *phase) : std::nullopt;
    copy_->setEnabled(printed.has_value());
    save_->setEnabled(printed.has_value());
    text_->setPlainText(printed ? coefficientText(record, *printed, form()) : QString());
    said_->setText(!printed         ? tr("There is no calibration function yet.")
                   : printed->share ? tr("The fewest digits that keep every value in the calibrated range within 1/20 of its expanded uncertainty.")
                                    : tr("No uncertainty is known, so the numbers stand in full precision."));
}

void CoefficientsDialog::copy() {
    QApplication::clipboard()->setText(text_->toPlainText());
    said_->setText(tr("Copied."));
}

void CoefficientsDialog::save() {
    const QString path = ask_(this, suggestionFor(workbench_.record(), form()));
    if (path.isEmpty())
        return;
    const auto written = writeWhole(path.toStdString(), text_->toPlainText().toStdString());
    said_->setText(written ? tr("Saved as %1.").arg(QFileInfo(path).fileName()) : errorText(written.error()));
}

} // namespace spanwright
