// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/selftest/SelfTestDialog.h"

#include "ui/look/Look.h"
#include "ui/look/PaddedDelegate.h"
#include "ui/words/Words.h"

#include <QDate>
#include <QDialogButtonBox>
#include <QFileInfo>
#include <QHeaderView>
#include <QLabel>
#include <QProgressBar>
#include <QPushButton>
#include <QTimer>
#include <QTreeWidget>
#include <QVBoxLayout>
#include <QtConcurrent/QtConcurrentRun>

#include <algorithm>

namespace spanwright {

namespace {

constexpr int LookEvery = 50; // ms

enum Column { FigureColumn, PrintedColumn, ComputedColumn, DigitsColumn, VerdictColumn };

QTreeWidgetItem* figureRow(const SelfTestFigure& figure) {
    auto* row = new QTreeWidgetItem({selfTestFigureText(figure.name), figure.printed, selfTestNumberText(figure.got), QString::number(figure.digits, 'f', 1),
                                     figure.holds ? SelfTestDialog::tr("agrees") : SelfTestDialog::tr("DIFFERS")});
    for (const Column column : {PrintedColumn, ComputedColumn, DigitsColumn})
        row->setTextAlignment(column, Qt::AlignRight | Qt::AlignVCenter);
    row->setToolTip(FigureColumn, figure.name);
    if (!figure.holds) {
        QFont bold = row->font(VerdictColumn);
        bold.setBold(true);
        row->setFont(VerdictColumn, bold);
        row->setForeground(VerdictColumn, scheme().warning);
    }
    return row;
}

/// The case with its source over the whole width, and its figures under it, those that differ first.
QTreeWidgetItem* caseRow(const SelfTestCase& one) {
    auto* row = new QTreeWidgetItem({one.name + QStringLiteral("   ") + one.source});
    QFont font = row->font(FigureColumn);
    font.setWeight(QFont::DemiBold);
    row->setFont(FigureColumn, font);
    row->setToolTip(FigureColumn, one.source);
    for (const bool holds : {false, true})
        for (const SelfTestFigure& figure : one.figures)
            if (figure.holds == holds)
                row->addChild(figureRow(figure));
    return row;
}

} // namespace

SelfTestDialog::SelfTestDialog(PdfPathAsk ask, QWidget* parent)
    : QDialog(parent), ask_(std::move(ask)), progress_(std::make_shared<Progress>()), verdict_(new QLabel), bar_(new QProgressBar), looks_(new QTimer(this)),
      table_(new QTreeWidget) {
    setObjectName(QStringLiteral("selfTestDialog"));
    setWindowTitle(tr("Self-test"));
    resize(920, 640);
    auto* all = new QVBoxLayout(this);
    all->setContentsMargins(space::card, space::card, space::card, space::card);
    all->setSpacing(space::step);
    verdict_->setObjectName(QStringLiteral("selfTestVerdict"));
    verdict_->setFont(textFont(TextRole::Heading));
    verdict_->setWordWrap(true);
    verdict_->setText(tr("Published cases are being recomputed with this program on this machine…"));
    all->addWidget(verdict_);
    bar_->setObjectName(QStringLiteral("selfTestProgress"));
    bar_->setRange(0, 100);
    all->addWidget(bar_);
    table_->setObjectName(QStringLiteral("selfTestTable"));
    table_->setAccessibleName(tr("Published figures beside those computed here, those that differ first"));
    table_->setHeaderLabels({tr("figure"), tr("printed"), tr("computed"), tr("digits"), tr("verdict")});
    for (const Column column : {PrintedColumn, ComputedColumn, DigitsColumn})
        table_->headerItem()->setTextAlignment(column, Qt::AlignRight | Qt::AlignVCenter);
    table_->setUniformRowHeights(true);
    table_->setItemDelegate(new PaddedDelegate(table_));
    all->addWidget(table_, 1);
    auto* caution = new QLabel(tr("A figure agrees when it rounds to what its source prints. The record is one part of a validation; it does not "
                                  "replace the laboratory's own (ISO/IEC 17025:2017, 7.11.2)."));
    caution->setWordWrap(true);
    caution->setForegroundRole(inkRole::quiet);
    all->addWidget(caution);
    auto* buttons = new QDialogButtonBox;
    save_ = buttons->addButton(tr("&Save validation record as PDF…"), QDialogButtonBox::ActionRole);
    save_->setObjectName(QStringLiteral("selfTestSave"));
    save_->setEnabled(false);
    buttons->addButton(tr("&Close"), QDialogButtonBox::RejectRole)->setDefault(true);
    all->addWidget(buttons);
    connect(buttons, &QDialogButtonBox::rejected, this, &QDialog::reject);
    connect(save_, &QPushButton::clicked, this, &SelfTestDialog::savePdf);
    connect(looks_, &QTimer::timeout, this, [this] { bar_->setValue(static_cast<int>(100 * progress_->share())); });
    connect(&running_, &QFutureWatcherBase::finished, this, &SelfTestDialog::showOutcome);
    looks_->start(LookEvery);
    running_.setFuture(QtConcurrent::run([progress = progress_] { return runSelfTest(*progress); }));
}

SelfTestDialog::~SelfTestDialog() {
    progress_->cancel();
    running_.waitForFinished();
}

void SelfTestDialog::showOutcome() {
    looks_->stop();
    bar_->hide();
    outcome_ = running_.result();
    verdict_->setText(selfTestVerdict(outcome_));
    verdict_->setForegroundRole(outcome_.failed() > 0 || outcome_.cases.empty() ? inkRole::warning : QPalette::WindowText);
    for (const SelfTestCase* one : failuresFirst(outcome_)) {
        QTreeWidgetItem* row = caseRow(*one);
        table_->addTopLevelItem(row);
        row->setFirstColumnSpanned(true);
        row->setExpanded(true);
    }
    const int widths[] = {320, 190, 190, 70};
    for (int column = 0; column < VerdictColumn; ++column)
        table_->setColumnWidth(column, widths[column]);
    save_->setEnabled(!outcome_.cases.empty());
}

void SelfTestDialog::savePdf() {
    const QString path = ask_(this, QStringLiteral("spanwright-self-test-%1.pdf").arg(QDate::currentDate().toString(Qt::ISODate)));
    if (path.isEmpty())
        return;
    const bool written = writeSelfTestPdf(outcome_, selfTestOccasion(), path);
    const QString name = QFileInfo(path).fileName();
    const QString said = written ? tr("Saved as %1.").arg(name) : errorText(Error(ErrorCode::FileNotWritable, {{"file", name.toStdString()}}));
    verdict_->setText(selfTestVerdict(outcome_) + QLatin1Char(' ') + said);
}

} // namespace spanwright
