// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/bench/IntervalsDialog.h"

#include "core/interval/Bands.h"
#include "ui/bench/NumberEdit.h"
#include "ui/look/Look.h"
#include "ui/look/NumberText.h"
#include "ui/plot/PlotSubject.h"
#include "ui/words/Words.h"

#include <QGridLayout>
#include <QHBoxLayout>
#include <QLabel>
#include <QPushButton>
#include <QSpinBox>
#include <QVBoxLayout>

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

void clear(QGridLayout& grid) {
    while (QLayoutItem* item = grid.takeAt(0)) {
        delete item->widget();
        delete item;
    }
}

void putRow(QGridLayout& grid, int row, const QStringList& cells, QPalette::ColorRole role) {
    for (int column = 0; column < cells.size(); ++column) {
        auto* cell = new QLabel(cells[column]);
        cell->setTextFormat(Qt::PlainText);
        cell->setForegroundRole(column == 0 ? inkRole::quiet : role);
        cell->setTextInteractionFlags(Qt::TextSelectableByMouse);
        grid.addWidget(cell, row, column, column == 0 ? Qt::AlignLeft : Qt::AlignRight);
    }
}

/// To one digit beyond the first that `u` touches.
QString toUncertainty(double value, double u) {
    return u > 0 && std::isfinite(u) ? fixedText(value, std::clamp(1 - static_cast<int>(std::floor(std::log10(u))), 0, 20))
                                     : significantText(value, 8);
}

QString between(double low, double high, double u) {
    return toUncertainty(low, u) + QStringLiteral(" … ") + toUncertainty(high, u);
}

} // namespace

IntervalsDialog::IntervalsDialog(Workbench& workbench, QWidget* parent)
    : SheetDialog(QStringLiteral("intervalsDialog"), tr("Coefficients and intervals"), parent), workbench_(workbench), coefficients_(new QGridLayout), intervals_(new QGridLayout), together_(new QLabel),
      placeName_(new QLabel), place_(new NumberEdit), repeats_(new QSpinBox), words_(new QLabel) {
    setMinimumWidth(560);
    for (QGridLayout* grid : {coefficients_, intervals_}) {
        grid->setHorizontalSpacing(space::card + space::step);
        grid->setVerticalSpacing(space::half);
    }
    for (QLabel* label : {together_, words_}) {
        label->setTextFormat(Qt::PlainText);
        label->setWordWrap(true);
        label->setForegroundRole(inkRole::quiet);
        label->setFont(textFont(TextRole::Small));
    }
    together_->setObjectName(QStringLiteral("jointWords"));
    words_->setObjectName(QStringLiteral("placeWords"));
    place_->setObjectName(QStringLiteral("intervalPlace"));
    place_->setAccessibleName(tr("Place at which the intervals are given"));
    placeName_->setBuddy(place_);
    repeats_->setObjectName(QStringLiteral("intervalRepeats"));
    repeats_->setAccessibleName(tr("Number of new readings in a mean"));
    repeats_->setRange(1, 1000);
    repeats_->setValue(workbench_.record().choices.repeats.value_or(1));
    auto* asked = new QHBoxLayout;
    asked->addWidget(placeName_);
    asked->addWidget(place_, 1);
    asked->addWidget(new QLabel(tr("mean of")));
    asked->addWidget(repeats_);
    asked->addWidget(new QLabel(tr("readings")));
    body()->addLayout(coefficients_);
    body()->addWidget(together_);
    body()->addSpacing(space::step);
    body()->addLayout(asked);
    body()->addLayout(intervals_);
    body()->addWidget(words_);
    body()->addStretch(1);
    addClose();
    connect(place_, &QLineEdit::textChanged, this, &IntervalsDialog::refresh);
    connect(repeats_, &QSpinBox::valueChanged, this, &IntervalsDialog::refresh);
    connect(&workbench_, &Workbench::evaluationChanged, this, &IntervalsDialog::refresh);
    refresh();
}

void IntervalsDialog::refresh() {
    const Record& record = workbench_.record();
    const PhaseEvaluation* phase = workbench_.evaluation()->phase(record.choices.phase);
    clear(*coefficients_);
    clear(*intervals_);
    together_->clear();
    words_->clear();
    if (!phase || !phase->fit) {
        words_->setText(phase && phase->notFitted ? errorText(*phase->notFitted) : tr("There is no calibration function yet."));
        return;
    }
    showCoefficients(*phase);
    showPlace(*phase);
}

void IntervalsDialog::showCoefficients(const PhaseEvaluation& phase) {
    const Fit& fit = *phase.fit;
    const QString share = shareText(fit.coverage);
    putRow(*coefficients_, 0, {QString(), tr("value"), tr("standard uncertainty"), tr("%1, by itself").arg(share), tr("%1, all together").arg(share)}, inkRole::quiet);
    int row = 1;
    for (const Coefficient& c : fit.coefficients)
        putRow(*coefficients_, row++,
               {withUnit(QString::fromStdString(c.name), QString::fromStdString(c.unit)), toUncertainty(c.value, c.standardUncertainty),
                significantText(c.standardUncertainty, 2), between(c.low, c.high, c.standardUncertainty), between(c.jointLow, c.jointHigh, c.standardUncertainty)},
               QPalette::WindowText);
    QString words = tr("By itself: k = %1. All together: k = %2 (Bonferroni).").arg(significantText(fit.coverageFactor, 4), significantText(fit.jointFactor, 4));
    words += fit.covarianceScale == CovarianceScale::Stated ? tr(" From the stated uncertainties as they are.") : tr(" From the residual spread.");
    if (fit.chiSquared && fit.chiSquaredP)
        words += tr(" χ² = %1, p = %2.").arg(significantText(*fit.chiSquared, 4), pText(*fit.chiSquaredP)).replace(QStringLiteral("= <"), QStringLiteral("<"));
    if (const QString settled = convergenceText(fit.convergence); !settled.isEmpty())
        words += tr(" The fit %1.").arg(settled);
    together_->setText(words);
}

void IntervalsDialog::showPlace(const PhaseEvaluation& phase) {
    const Record& record = workbench_.record();
    const Fit& fit = *phase.fit;
    const bool forward = fit.direction == FitDirection::Indication;
    const Quantity& in = forward ? record.item.reference : record.item.indication;
    const QString out = QString::fromStdString(forward ? record.item.indication.unit : record.item.reference.unit);
    placeName_->setText(forward ? tr("At the &reference") : tr("At the &indication"));
    place_->setUnit(QString::fromStdString(in.unit));
    const Result<Decimal> typed = place_->number();
    if (!typed) {
        words_->setText(place_->text().trimmed().isEmpty() ? tr("Type a value to see where the function lies and where readings will be.") : errorText(typed.error()));
        return;
    }
    const double x = typed->toDouble();
    const BandPoint point = bandAt(fit, x);
    const double u = std::sqrt(fit.curve->variance(x) + fit.curve->readingVariance(x));
    const auto line = [&](int row, const QString& name, const Interval& interval) {
        putRow(*intervals_, row, {name, between(interval.low, interval.high, u), QStringLiteral("± ") + significantText((interval.high - interval.low) / 2, 2)}, QPalette::WindowText);
    };
    putRow(*intervals_, 0, {QString(), withUnit(toUncertainty(point.value, u), out), withUnit(tr("half-width /"), out)}, inkRole::quiet);
    line(1, tr("the function there"), point.mean);
    line(2, tr("the function everywhere at once"), point.simultaneous);
    line(3, tr("one new reading"), point.newReading);
    if (repeats_->value() > 1)
        line(4, tr("mean of %1 new readings").arg(repeats_->value()), meanOfRepeatsAt(fit, x, repeats_->value()));
    const double share = record.choices.toleranceShare.toDouble();
    if (fit.covarianceScale == CovarianceScale::Residuals && fit.degreesOfFreedom > 0)
        line(5, tr("%1 of all readings").arg(shareText(share)), toleranceAt(fit, x, share));
    if (!point.inside)
        words_->setText(tr("This lies outside the calibrated range: no reading covers it."));
}

} // namespace spanwright
