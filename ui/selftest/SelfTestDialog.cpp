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

enum Column { Verdict, Case, Figure, Printed, Computed, Digits, Source, Columns };

QTreeWidgetItem* rowOf(const SelfTestCase& one, const SelfTestFigure& figure) {
    auto* row = new QTreeWidgetItem({figure.holds ? SelfTestDialog::tr("agrees") : SelfTestDialog::tr("DIFFERS"), one.name,
                                     selfTestFigureText(figure.name), figure.printed, selfTestNumberText(figure.got),
                                     QString::number(figure.digits, 'f', 1), one.source});
    for (const Column column : {Printed, Computed, Digits})
        row->setTextAlignment(column, Qt::AlignRight | Qt::AlignVCenter);
    row->setToolTip(Source, one.source);
    row->setToolTip(Figure, figure.name);
    if (!figure.holds) {
        QFont bold = row->font(Verdict);
        bold.setBold(true);
        row->setFont(Verdict, bold);
        row->setForeground(Verdict, scheme().warning);
    }
    return row;
}

} // namespace

SelfTestDialog::SelfTestDialog(PdfPathAsk ask, QWidget* parent)
    : QDialog(parent), ask_(std::move(ask)), progress_(std::make_shared<Progress>()), verdict_(new QLabel), bar_(new QProgressBar), looks_(new QTimer(this)),
      table_(new QTreeWidget) {
    setObjectName(QStringLiteral("selfTestDialog"));
    setWindowTitle(tr("Self-test"));
    resize(1060, 620);
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
    table_->setHeaderLabels({tr("verdict"), tr("case"), tr("figure"), tr("printed"), tr("computed"), tr("digits"), tr("source")});
    table_->setRootIsDecorated(false);
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
        std::vector<const SelfTestFigure*> figures;
        for (const SelfTestFigure& figure : one->figures)
            figures.push_back(&figure);
        std::stable_partition(figures.begin(), figures.end(), [](const SelfTestFigure* figure) { return !figure->holds; });
        for (const SelfTestFigure* figure : figures)
            table_->addTopLevelItem(rowOf(*one, *figure));
    }
    for (int column = 0; column < Columns; ++column)
        table_->resizeColumnToContents(column);
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
