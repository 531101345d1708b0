// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/budget/makeBudget.h"

#include "core/budget/Combine.h"
#include "core/budget/PointMeans.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace spanwright {

namespace {

constexpr double Infinite = std::numeric_limits<double>::infinity();
constexpr int ReadBackPlaces = 101;

/// A variance that the readings gave, unit of the fit's ordinate squared, and its degrees of freedom.
struct Spread {
    double variance = 0;
    double degreesOfFreedom = 0;
};

/// What the readings of the phase say about their own spread.
struct Spreads {
    std::optional<Spread> repeatability, runs;
    bool otherPhase = false;
    Side side = Side::Indication; ///< the unit that they are in
};

std::optional<Spread> spreadOf(const std::optional<SplitRow>& row) {
    if (!row || row->df <= 0)
        return std::nullopt;
    return Spread{row->ss / row->df, static_cast<double>(row->df)};
}

std::optional<Spread> componentOf(const VarianceSplit& split, SplitPart part) {
    for (const VarianceComponent& component : split.components)
        if (component.part == part && component.degreesOfFreedom > 0)
            return Spread{component.variance, component.degreesOfFreedom};
    return std::nullopt;
}

/// Pooled within set point and direction (JCGM 100:2008, 4.2.4, note 3), readings moved to equal reference with the sensitivity.
std::optional<Spread> pooled(const Item& item, const Sample& sample) {
    struct Cell {
        double n = 0, mean = 0, ss = 0;
    };
    std::vector<Cell> cells(sample.groupValue.size() * 3);
    for (std::size_t i = 0; i < sample.size(); ++i) {
        const auto group = static_cast<std::size_t>(sample.group[i]);
        const auto direction = sample.direction.empty() ? 0U : static_cast<unsigned>(sample.direction[i]);
        const double reference = toDouble(sample.reference[i]), indication = toDouble(sample.indication[i]);
        const double moved = indication - sensitivityAt(item, nullptr, reference, indication) * (reference - sample.groupValue[group]);
        Cell& cell = cells[group * 3 + direction];
        cell.n += 1;
        const double step = moved - cell.mean;
        cell.mean += step / cell.n;
        cell.ss += step * (moved - cell.mean);
    }
    double ss = 0, df = 0;
    for (const Cell& cell : cells) {
        ss += cell.ss;
        df += std::max(0.0, cell.n - 1);
    }
    return df > 0 ? std::optional(Spread{ss / df, df}) : std::nullopt;
}

/// Where direction is known, pure error holds the hysteresis and is no measure of repeatability.
void takeFrom(const VarianceSplit& split, Spreads& spreads) {
    spreads.repeatability = spreadOf(split.repeatability);
    if (!spreads.repeatability && !split.hysteresis)
        spreads.repeatability = spreadOf(split.pureError);
    spreads.runs = componentOf(split, SplitPart::RunOffset);
}

Spreads spreadsOf(const Record& record, const Sample& sample, const Fit* fit, const VarianceSplit* split,
                  const VarianceSplit* otherPhase) {
    Spreads spreads;
    if (fit == nullptr || split == nullptr) {
        spreads.repeatability = pooled(record.item, sample);
        return spreads;
    }
    spreads.side = fit->direction == FitDirection::Indication ? Side::Indication : Side::Reference;
    takeFrom(*split, spreads);
    if (!spreads.repeatability && otherPhase != nullptr) {
        takeFrom(*otherPhase, spreads);
        spreads.otherPhase = true;
    }
    return spreads;
}

/// The place at which a budget is drawn up.
struct Place {
    double reference = 0, indication = 0;
    double slope = 1;
    /// What a weighted variance of the split is multiplied by to be the variance of one reading here; 1 for equal weights.
    double weightScale = 1;
};

Place placeAt(const Record& record, const Fit* fit, double reference, double indication) {
    Place place{reference, indication, sensitivityAt(record.item, fit, reference, indication), 1};
    if (fit != nullptr && (fit->weights != Weights::Equal || fit->method == Method::BothUncertain)) {
        const double here = fit->curve->readingVariance(fit->direction == FitDirection::Indication ? reference : indication);
        const double unit = fit->covarianceScale == CovarianceScale::Residuals ? fit->residualSd * fit->residualSd : 1;
        if (unit > 0 && std::isfinite(here / unit))
            place.weightScale = here / unit;
    }
    return place;
}

class Lines {
  public:
    Lines(const Record& record, const Place& place) : record_(record), place_(place) {}

    void add(DerivedLine line, Side side, Distribution distribution, double amount, double divisor, double df) {
        if (omitted(line))
            return;
        BudgetItem item = budgetItem(side, distribution, amount, divisor, df, side == Side::Reference ? place_.slope : 1);
        item.derived = line;
        items_.push_back(std::move(item));
    }

    void addStandards() {
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

    void addReferenceResolution() { addResolution(DerivedLine::ReferenceResolution, Side::Reference, record_.item.referenceResolution, StandardRole::Reference); }
    void addIndicationResolution() { addResolution(DerivedLine::IndicationResolution, Side::Indication, record_.item.resolution, StandardRole::Indication); }

    /// The spread of a mean of `n`.
    void addSpread(DerivedLine line, Side side, const Spread& spread, std::size_t n, bool fromOtherPhase) {
        const std::size_t before = items_.size();
        add(line, side, Distribution::Student, std::sqrt(spread.variance * place_.weightScale), std::sqrt(static_cast<double>(n)),
            spread.degreesOfFreedom);
        if (items_.size() > before)
            items_.back().fromOtherPhase = fromOtherPhase;
    }

    void addManual() {
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

    [[nodiscard]] std::vector<BudgetItem> take() { return std::move(items_); }

  private:
    [[nodiscard]] bool omitted(DerivedLine line) const {
        const auto& all = record_.budget.omitted;
        return std::any_of(all.begin(), all.end(), [line](const OmittedLine& left) { return left.line == line; });
    }

    void addCommon(DerivedLine line, const std::string& id, Side side, Distribution distribution, double amount, double divisor) {
        const std::size_t before = items_.size();
        add(line, side, distribution, amount, divisor, Infinite);
        if (items_.size() == before)
            return;
        items_.back().name = id;
        items_.back().common = true;
    }

    /// Of the item where it is stated, else the coarsest of the standards in that role: what was written down has one resolution.
    void addResolution(DerivedLine line, Side side, const std::optional<Decimal>& ofItem, StandardRole role) {
        double step = ofItem ? ofItem->toDouble() : 0;
        if (!ofItem)
            for (const Standard& standard : record_.standards)
                if (standard.role == role && standard.resolution)
                    step = std::max(step, standard.resolution->toDouble());
        if (step > 0)
            add(line, side, Distribution::Rectangular, step / 2, divisorOf(Distribution::Rectangular), Infinite);
    }

    const Record& record_;
    Place place_;
    std::vector<BudgetItem> items_;
};

SetPointBudget budgetAt(const Record& record, const PointMeans& point, const Fit* fit, const Spreads& spreads, double coverage) {
    const Place place = placeAt(record, fit, point.reference, point.indication);
    Lines lines(record, place);
    lines.addStandards();
    lines.addReferenceResolution();
    lines.addIndicationResolution();
    if (spreads.repeatability)
        lines.addSpread(DerivedLine::Repeatability, spreads.side, *spreads.repeatability, point.n, spreads.otherPhase);
    if (spreads.runs)
        lines.addSpread(DerivedLine::RunToRun, spreads.side, *spreads.runs, point.runs, spreads.otherPhase);
    if (point.gap)
        lines.add(DerivedLine::Hysteresis, Side::Indication, Distribution::Rectangular, std::fabs(*point.gap) / 2,
                  divisorOf(Distribution::Rectangular), Infinite);
    lines.addManual();
    return combine(point.setPoint, point.direction, lines.take(), coverage, place.slope);
}

struct ReadBackLines {
    Place place;
    std::vector<BudgetItem> items;
    /// u² of the reference value.
    [[nodiscard]] double variance() const {
        double sum = 0;
        for (const BudgetItem& item : items)
            sum += item.contribution * item.contribution;
        return sum / (place.slope * place.slope);
    }
};

ReadBackLines readBackAt(const Record& record, const Fit& fit, double x) {
    const bool forward = fit.direction == FitDirection::Indication;
    const double y = fit.curve->value(x);
    const Place place = placeAt(record, &fit, forward ? x : y, forward ? y : x);
    const Side side = forward ? Side::Indication : Side::Reference;
    const double df = fit.degreesOfFreedom > 0 ? fit.degreesOfFreedom : Infinite;
    Lines lines(record, place);
    lines.addStandards();
    lines.addReferenceResolution();
    lines.add(DerivedLine::Fit, side, Distribution::Student, std::sqrt(fit.curve->variance(x)), 1, df);
    lines.add(DerivedLine::Repeatability, side, Distribution::Student, std::sqrt(fit.curve->readingVariance(x)), 1, df);
    lines.addManual();
    return {place, lines.take()};
}

std::optional<SetPointBudget> worstReadBack(const Record& record, const Fit& fit, double coverage) {
    if (fit.function.family == FunctionFamily::Constant || fit.degreesOfFreedom <= 0 || !(fit.high > fit.low))
        return std::nullopt;
    std::optional<ReadBackLines> worst;
    double largest = -1;
    for (int i = 0; i < ReadBackPlaces; ++i) {
        ReadBackLines here = readBackAt(record, fit, fit.low + (fit.high - fit.low) * i / (ReadBackPlaces - 1));
        const double variance = here.variance();
        if (std::isfinite(variance) && variance > largest) {
            largest = variance;
            worst = std::move(here);
        }
    }
    if (!worst)
        return std::nullopt;
    return combine(worst->place.reference, Direction::Unknown, std::move(worst->items), coverage, worst->place.slope);
}

} // namespace

Budget makeBudget(const Record& record, const Sample& sample, const Fit* fit, const VarianceSplit* split,
                  const VarianceSplit* otherPhase) {
    Budget budget;
    budget.coverage = record.budget.coverage.toDouble();
    const Spreads spreads = spreadsOf(record, sample, fit, split, otherPhase);
    if (!spreads.repeatability)
        budget.warnings.push_back({WarningCode::FigureUndefined, {{"figure", "repeatability"}, {"reason", "no-replicates"}}});
    if (sample.groupValue.size() > MostStatedPoints)
        budget.warnings.push_back({WarningCode::FigureUndefined, {{"figure", "results"}, {"reason", "too-many-set-points"}}});
    budget.means = pointMeans(record, sample, fit);
    for (const PointMeans& point : budget.means)
        budget.points.push_back(budgetAt(record, point, fit, spreads, budget.coverage));
    if (fit != nullptr && fit->curve != nullptr)
        budget.readBack = worstReadBack(record, *fit, budget.coverage);
    return budget;
}

} // namespace spanwright
