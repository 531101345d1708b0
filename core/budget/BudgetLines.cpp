// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/budget/BudgetLines.h"

#include "core/budget/Combine.h"
#include "core/budget/PointMeans.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr double Infinite = std::numeric_limits<double>::infinity();

} // namespace

BudgetPlace budgetPlace(const Record& record, const Fit* fit, double reference, double indication) {
    BudgetPlace place{reference, indication, sensitivityAt(record.item, fit, reference, indication), 1};
    if (fit != nullptr && (fit->weights != Weights::Equal || fit->method == Method::BothUncertain)) {
        const double here = fit->curve->readingVariance(fit->direction == FitDirection::Indication ? reference : indication);
        const double unit = fit->covarianceScale == CovarianceScale::Residuals ? fit->residualSd * fit->residualSd : 1;
        if (unit > 0 && std::isfinite(here / unit))
            place.weightScale = here / unit;
    }
    return place;
}

void BudgetLines::add(DerivedLine line, Side side, Distribution distribution, double amount, double divisor, double degreesOfFreedom) {
    if (omitted(line))
        return;
    BudgetItem item = budgetItem(side, distribution, amount, divisor, degreesOfFreedom, side == Side::Reference ? place_.slope : 1);
    item.derived = line;
    items_.push_back(std::move(item));
}

void BudgetLines::addStandards() {
    for (const Standard& standard : record_.standards) {
        const bool reference = standard.role == StandardRole::Reference;
        const double reading = std::fabs(reference ? place_.reference : place_.indication);
        const double unit = standard.form == UncertaintyForm::PercentOfReading ? reading / 100 : 1;
        const Side side = reference ? Side::Reference : Side::Indication;
        if (standard.expandedUncertainty) {
            const double k = standard.coverageFactor ? standard.coverageFactor->toDouble() : 2;
            addCommon(DerivedLine::StandardUncertainty, standard.id, side, Distribution::Normal,
                      standard.expandedUncertainty->toDouble() * unit, k);
        }
        if (standard.drift)
            addCommon(DerivedLine::StandardDrift, standard.id, side, Distribution::Rectangular, standard.drift->toDouble() * unit,
                      divisorOf(Distribution::Rectangular));
    }
}

void BudgetLines::addReferenceResolution() {
    addResolution(DerivedLine::ReferenceResolution, Side::Reference, record_.item.referenceResolution, StandardRole::Reference);
}

void BudgetLines::addIndicationResolution() {
    addResolution(DerivedLine::IndicationResolution, Side::Indication, record_.item.resolution, StandardRole::Indication);
}

void BudgetLines::addSpread(DerivedLine line, Side side, const Spread& spread, std::size_t n, bool fromOtherPhase) {
    const std::size_t before = items_.size();
    add(line, side, Distribution::Student, std::sqrt(spread.variance * place_.weightScale), std::sqrt(static_cast<double>(n)),
        spread.degreesOfFreedom);
    if (items_.size() > before)
        items_.back().fromOtherPhase = fromOtherPhase;
}

void BudgetLines::addManual() {
    for (const ManualBudgetLine& line : record_.budget.lines) {
        if (!line.amount)
            continue;
        double divisor = divisorOf(line.distribution);
        if (line.distribution == Distribution::Normal)
            divisor = line.divisor ? line.divisor->toDouble() : 2;
        const double own = line.sensitivity ? line.sensitivity->toDouble() : 1;
        const double df = line.degreesOfFreedom ? line.degreesOfFreedom->toDouble() : Infinite;
        BudgetItem item = budgetItem(line.side, line.distribution, line.amount->toDouble(), divisor, df,
                                     line.side == Side::Reference ? own * place_.slope : own);
        item.name = line.name;
        items_.push_back(std::move(item));
    }
}

bool BudgetLines::omitted(DerivedLine line) const {
    const auto& all = record_.budget.omitted;
    return std::any_of(all.begin(), all.end(), [line](const OmittedLine& left) { return left.line == line; });
}

void BudgetLines::addCommon(DerivedLine line, const std::string& id, Side side, Distribution distribution, double amount, double divisor) {
    const std::size_t before = items_.size();
    add(line, side, distribution, amount, divisor, Infinite);
    if (items_.size() == before)
        return;
    items_.back().name = id;
    items_.back().common = true;
}

/// Of the item where it is stated, else the coarsest of the standards in that role: what was written down has one resolution.
void BudgetLines::addResolution(DerivedLine line, Side side, const std::optional<Decimal>& ofItem, StandardRole role) {
    double step = ofItem ? ofItem->toDouble() : 0;
    if (!ofItem)
        for (const Standard& standard : record_.standards)
            if (standard.role == role && standard.resolution)
                step = std::max(step, standard.resolution->toDouble());
    if (step > 0)
        add(line, side, Distribution::Rectangular, step / 2, divisorOf(Distribution::Rectangular), Infinite);
}

} // namespace spanwright
