// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/certificate/CertificatePage.h"

#include "ui/certificate/ChecklistView.h"
#include "ui/certificate/PagePreview.h"
#include "ui/certificate/Paper.h"
#include "ui/certificate/SignOffCard.h"
#include "ui/certificate/writeCertificate.h"
#include "ui/commands/FieldForm.h"
#include "ui/look/Card.h"
#include "ui/look/Look.h"
#include "ui/words/Words.h"

#include <QAction>
#include <QDateTime>
#include <QFileDialog>
#include <QHBoxLayout>
#include <QLabel>
#include <QMessageBox>
#include <QPrintDialog>
#include <QPrinter>
#include <QPushButton>
#include <QRegularExpression>
#include <QVBoxLayout>

namespace spanwright {

namespace {

constexpr int SideWidth = 396;

/// The certificate's number as the name of a file.
QString fileName(const Record& record) {
    QString name = QString::fromStdString(record.job.certificateNumber);
    name.replace(QRegularExpression(QStringLiteral("[^\\w.-]+")), QStringLiteral("-"));
    return (name.isEmpty() ? QStringLiteral("certificate") : name) + QStringLiteral(".pdf");
}

QString stateText(const std::vector<ChecklistItem>& gaps) {
    if (blocked(gaps))
        return CertificatePage::tr("Something is missing: it prints only as an incomplete draft, and is marked so on every page.");
    for (const ChecklistItem& item : gaps)
        if (item.gap == Gap::NotPerformed || item.gap == Gap::NotChecked || item.gap == Gap::NotAuthorised)
            return CertificatePage::tr("A draft for review. It stays marked as a draft until all three people have signed off.");
    return CertificatePage::tr("All three people have signed off. It becomes valid only when the laboratory releases it.");
}

} // namespace

CertificateAsks screenAsks() {
    return {[](QWidget* parent, const QString& suggestion) {
                return QFileDialog::getSaveFileName(parent, CertificatePage::tr("Save the certificate draft"), suggestion,
                                                    CertificatePage::tr("PDF (*.pdf)"));
            },
            [](QWidget* parent, QPrinter& printer) { return QPrintDialog(&printer, parent).exec() == QDialog::Accepted; },
            [](QWidget* parent, const QString& title, const QString& text) { QMessageBox::information(parent, title, text); }};
}

CertificatePage::CertificatePage(Workbench& workbench, CertificateAsks asks, QWidget* parent)
    : QWidget(parent), workbench_(workbench), asks_(std::move(asks)), preview_(new PagePreview) {
    setObjectName(QStringLiteral("certificatePage"));
    addPageAction("certificate.print", tr("&Print the certificate draft…"), QKeySequence::Print, &CertificatePage::print);
    addPageAction("certificate.pdf", tr("Save the certificate draft as P&DF…"), QKeySequence(QStringLiteral("Ctrl+Shift+P")), &CertificatePage::saveAsPdf);
    auto* row = new QHBoxLayout(this);
    row->setContentsMargins(space::card, space::card, space::card, space::card);
    row->setSpacing(space::step + space::half);
    row->addWidget(preview_, 1);
    row->addWidget(buildSide());
    connect(&workbench_, &Workbench::evaluationChanged, this, &CertificatePage::refresh);
    refresh();
}

void CertificatePage::addPageAction(const char* id, const QString& text, const QKeySequence& keys, void (CertificatePage::*what)()) {
    auto* action = new QAction(text, this);
    action->setObjectName(QLatin1String(id));
    action->setShortcut(keys);
    connect(action, &QAction::triggered, this, what);
    addAction(action);
}

QWidget* CertificatePage::buildSide() {
    auto* side = new QWidget;
    side->setFixedWidth(SideWidth);
    auto* column = new QVBoxLayout(side);
    column->setContentsMargins(0, 0, 0, 0);
    column->setSpacing(space::step + space::half);

    auto* draft = new Card(tr("Draft"));
    state_ = new QLabel;
    state_->setObjectName(QStringLiteral("certificateState"));
    state_->setWordWrap(true);
    draft->body()->addWidget(state_);
    auto* buttons = new QHBoxLayout;
    buttons->setSpacing(space::step);
    for (QAction* action : actions()) {
        const bool pdf = action->objectName() == QLatin1String("certificate.pdf");
        auto* button = new QPushButton(pdf ? tr("Save as PDF…") : tr("Print…"));
        button->setObjectName(pdf ? QStringLiteral("saveCertificate") : QStringLiteral("printCertificate"));
        button->setAccessibleName(action->text().remove(QLatin1Char('&')));
        connect(button, &QPushButton::clicked, action, &QAction::trigger);
        buttons->addWidget(button);
    }
    buttons->addStretch(1);
    draft->body()->addLayout(buttons);
    draft->body()->addWidget(fieldCheck(workbench_, QStringLiteral("choices.split_on_certificate"), tr("Print the variance split on the second page"),
                                        &Record::choices, [](Choices& choices) -> bool& { return choices.splitOnCertificate; }));
    column->addWidget(draft);

    auto* list = new Card(tr("Checklist"));
    list->setNote(tr("ISO/IEC 17025, 7.8"));
    checklist_ = new ChecklistView;
    list->body()->addWidget(checklist_, 1);
    connect(checklist_, &ChecklistView::goTo, this, &CertificatePage::goTo);
    column->addWidget(list, 1);
    column->addWidget(new SignOffCard(workbench_));
    return side;
}

QString CertificatePage::today() const {
    return QDateTime::fromMSecsSinceEpoch(workbench_.now()).date().toString(Qt::ISODate);
}

void CertificatePage::showEvent(QShowEvent* event) {
    QWidget::showEvent(event);
    number_.clear();
    lookForNumber();
    if (stale_)
        refresh();
}

void CertificatePage::lookForNumber() {
    const std::string& number = workbench_.record().job.certificateNumber;
    if (number == number_)
        return;
    number_ = number;
    const std::string found = asks_.sameNumber ? asks_.sameNumber(QString::fromStdString(number)).toStdString() : std::string();
    stale_ = stale_ || found != sameNumberIn_;
    sameNumberIn_ = found;
}

void CertificatePage::refresh() {
    stale_ = !isVisible();
    if (stale_)
        return;
    const Record& record = workbench_.record();
    const auto evaluation = workbench_.evaluation();
    lookForNumber();
    std::vector<ChecklistItem> gaps = checklist(record, *evaluation);
    if (!sameNumberIn_.empty())
        gaps.push_back(numberUsedElsewhere(number_, sameNumberIn_));
    checklist_->show(gaps, record, *evaluation);
    state_->setText(stateText(gaps));
    preview_->setPages(layOutCertificate(record, *evaluation, certificateContext(record, *evaluation, today())));
}

void CertificatePage::saveAsPdf() {
    const QString path = asks_.pdfPath(this, fileName(workbench_.record()));
    if (path.isEmpty())
        return;
    const auto evaluation = workbench_.evaluation();
    const auto context = certificateContext(workbench_.record(), *evaluation, today());
    const auto written = writeCertificatePdf(workbench_.record(), *evaluation, path, context, WithGaps::MarkIncomplete);
    if (!written)
        asks_.tell(this, tr("The certificate draft was not saved"), errorText(written.error()));
}

void CertificatePage::print() {
    QPrinter printer(QPrinter::HighResolution);
    printer.setPageSize(QPageSize(QPageSize::A4));
    printer.setFullPage(true);
    printer.setDocName(fileName(workbench_.record()));
    if (!asks_.printer(this, printer))
        return;
    const auto evaluation = workbench_.evaluation();
    const auto context = certificateContext(workbench_.record(), *evaluation, today());
    if (!paintDocument(layOutCertificate(workbench_.record(), *evaluation, context), printer))
        asks_.tell(this, tr("The certificate draft was not printed"), tr("The printer could not be started. Check that it is on and connected."));
}

} // namespace spanwright
