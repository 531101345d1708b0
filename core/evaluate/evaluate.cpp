// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/evaluate.h"

#include "core/base/AllSame.h"
#include "core/base/ClassSums.h"
#include "core/base/Parallel.h"
#include "core/budget/makeBudget.h"
#include "core/diagnose/Findings.h"
#include "core/evaluate/Dates.h"
#include "core/evaluate/RowTable.h"
#include "core/fit/DegreeLadder.h"
#include "core/fit/fitFunction.h"
#include "core/fit/fitMany.h"
#include "core/verdict/makeVerdict.h"

#include <algorithm>

namespace spanwright {

namespace {

constexpr std::size_t CurvePoints = 241;
constexpr std::size_t MostOnLadder = 1000;
constexpr double BeyondRange = 0.03; ///< share of the range by which the curve is drawn further on both sides

/// Of the abscissae of a fit, those of excluded readings included.
Bounds<double> rangeOf(const Fit& fit, const std::optional<Sample>& withExcluded) {
    Bounds<double> range{fit.low, fit.high};
    if (withExcluded) {
        const PairColumn& x = fit.direction == FitDirection::Indication ? withExcluded->reference : withExcluded->indication;
        range = laneBounds(0, x.size(), [&](std::size_t i) { return x.high[i]; });
    }
    return range;
}

double largestHalfWidth(const Fit& fit, double low, double high) {
    double largest = 0;
    for (const BandPoint& point : bandCurve(fit, low, high, CurvePoints))
        largest = std::max(largest, (point.newReading.high - point.newReading.low) / 2);
    return largest;
}

/// The steps for one phase, in the order in which they follow from each other.
class PhaseSteps {
  public:
    /// `earlier`: the phase evaluated before, for what this one's readings cannot give; may be null.
    PhaseSteps(const Record& record, Phase phase, const PhaseEvaluation* earlier, Progress& progress)
        : record_(record), choices_(record.choices), earlier_(earlier), progress_(progress), used_(makeSample(record, phase)) {
        result_.phase = phase;
    }

    Result<PhaseEvaluation> run() {
        count();
        if (result_.excluded > 0)
            withExcluded_ = makeSampleWithExcluded(record_, result_.phase);
        Result<FitOutcome> fitted = fitFunction(used_, choices_);
        if (progress_.cancelled())
            return Error(ErrorCode::Cancelled);
        progress_.report(0.4);
        if (fitted)
            result_.fit = fitted->fit;
        else
            result_.notFitted = fitted.error();
        const Residuals* residuals = fitted ? &fitted->residuals : nullptr;
        auto performance = beside(used_.size(), [&] { return processFigures(used_, record_.item); });
        result_.force = forceFigures(used_, choices_, record_.item.resolution ? record_.item.resolution->toDouble() : 0, record_.plan.positions);
        if (fitted) {
            examine(fitted->residuals);
            draw();
            climb();
            answer();
            compare(*fitted);
        }
        result_.performance = performance.get();
        auto named = beside(used_.size(), [&] { return namedRows(*record_.readings, result_.phase); });
        auto decided = beside(used_.size(), [&] { decide(); });
        interpret(residuals);
        decided.get();
        if (progress_.cancelled())
            return Error(ErrorCode::Cancelled);
        progress_.report(0.8);
        gatherWarnings();
        std::optional<Residuals> left;
        if (fitted)
            left = std::move(fitted->residuals);
        result_.rows = rowTable({record_, result_.phase, std::move(used_), std::move(withExcluded_), fit(), std::move(left)}, named.get());
        return std::move(result_);
    }

  private:
    [[nodiscard]] const Fit* fit() const { return result_.fit ? &*result_.fit : nullptr; }

    void count() {
        result_.readings = used_.size() + used_.excluded + used_.incomplete;
        result_.excluded = used_.excluded;
        result_.complete = used_.size() + used_.excluded;
        result_.planned = plannedReadings(record_.plan, result_.phase).size();
    }

    /// The split and the tests are defined for readings whose errors are independent.
    void examine(const Residuals& residuals) {
        if (result_.fit->correlated) {
            for (const char* figure : {"split", "diagnostics"})
                result_.warnings.push_back({WarningCode::FigureUndefined, {{"figure", figure}, {"reason", "correlated"}}});
            return;
        }
        auto split = beside(used_.size(), [&] { return splitVariance(used_, residuals, *result_.fit); });
        const DiagnoseQuestion question{record_.readings->ids(), choices_.outliers, choices_.outlierLevel.toDouble()};
        result_.diagnostics = diagnose(used_, residuals, *result_.fit, question);
        result_.split = split.get();
    }

    void draw() {
        const Bounds<double> range = rangeOf(*result_.fit, withExcluded_);
        const double beyond = BeyondRange * (range.high - range.low);
        if (range.high > range.low)
            result_.curve = bandCurve(*result_.fit, range.low - beyond, range.high + beyond, CurvePoints);
        else
            result_.curve = {bandAt(*result_.fit, range.low)};
    }

    /// Degrees side by side, where the function is one of them and the readings are few enough for every change.
    void climb() {
        const FunctionFamily family = choices_.function.family;
        if ((family != FunctionFamily::Line && family != FunctionFamily::Polynomial) || used_.size() > MostOnLadder ||
            choices_.method != Method::LeastSquares || result_.fit->correlated)
            return;
        const bool indication = result_.fit->direction == FitDirection::Indication;
        const auto& resolution = indication ? record_.item.resolution : record_.item.referenceResolution;
        DegreeLadder ladder = degreeLadder(used_, choices_, resolution ? resolution->toDouble() : 0);
        if (!ladder.steps.empty())
            result_.degrees = std::move(ladder);
    }

    void answer() {
        for (const Decimal& reference : choices_.at)
            answerAt(reference);
        for (const Decimal& y : choices_.read)
            result_.read.push_back(readValue(record_, *result_.fit, result_.split ? &*result_.split : nullptr, y.toDouble(), choices_.repeats));
    }

    /// The bands at a reference value; of a function that gives the reference, at the indication that belongs to it.
    void answerAt(const Decimal& reference) {
        const Fit& fit = *result_.fit;
        double x = reference.toDouble();
        if (fit.direction == FitDirection::Reference) {
            const std::vector<double> places = abscissaeOf(fit, x);
            if (places.size() != 1)
                result_.warnings.push_back({places.empty() ? WarningCode::NoIndication : WarningCode::SeveralIndications, {{"value", reference.text()}}});
            if (places.empty())
                return;
            x = places.front();
        }
        BandPoint point = bandAt(fit, x);
        point.meanOfRepeats = meanOfRepeatsAt(fit, x, choices_.repeats);
        if (!point.inside)
            result_.warnings.push_back({WarningCode::Extrapolated, {{"value", reference.text()}}});
        result_.at.push_back(point);
    }

    /// The same function with the excluded readings among them.
    void compare(const FitOutcome& without) {
        if (!withExcluded_)
            return;
        std::optional<Fit> other = fitTakenBackIn(without, used_, *withExcluded_, choices_);
        if (!other)
            if (Result<FitOutcome> fitted = fitFunction(*withExcluded_, choices_))
                other = std::move(fitted->fit);
        if (other)
            result_.withoutExclusions =
                WithoutExclusions{other->coefficients, other->residualSd, largestHalfWidth(*other, other->low, other->high)};
    }

    void interpret(const Residuals* residuals) {
        const auto pointer = [](const auto& part) { return part ? &*part : nullptr; };
        FindingsInput input{record_, result_.phase, used_};
        input.fit = fit();
        input.residuals = fit() != nullptr && fit()->correlated ? nullptr : residuals;
        input.split = pointer(result_.split);
        input.diagnostics = pointer(result_.diagnostics);
        input.performance = pointer(result_.performance);
        if (result_.withoutExclusions)
            input.residualSdWithAll = result_.withoutExclusions->residualSd;
        result_.findings = findings(input);
    }

    void decide() {
        if (used_.size() == 0)
            return;
        const VarianceSplit* split = result_.split ? &*result_.split : nullptr;
        const VarianceSplit* other = earlier_ != nullptr && earlier_->split ? &*earlier_->split : nullptr;
        result_.budget = makeBudget(record_, used_, fit(), split, other);
        result_.verdict = makeVerdict(record_, fit(), result_.budget);
    }

    void gatherWarnings() {
        const auto take = [&](const std::vector<Warning>& warnings) {
            for (const Warning& warning : warnings)
                if (std::find(result_.warnings.begin(), result_.warnings.end(), warning) == result_.warnings.end())
                    result_.warnings.push_back(warning);
        };
        take(used_.warnings);
        if (result_.fit)
            take(result_.fit->warnings);
        if (result_.split)
            take(result_.split->warnings);
        if (result_.diagnostics)
            take(result_.diagnostics->warnings);
        if (result_.performance)
            take(result_.performance->warnings);
        for (const ReadBackAnswer& answer : result_.read)
            take(answer.warnings);
        take(result_.budget.warnings);
        take(result_.verdict.warnings);
    }

    const Record& record_;
    const Choices& choices_;
    const PhaseEvaluation* earlier_;
    Progress& progress_;
    Sample used_;
    std::optional<Sample> withExcluded_;
    PhaseEvaluation result_;
};

std::string dayOfMeasurement(const Record& record) {
    if (!record.job.calibrated.empty())
        return record.job.calibrated;
    const std::vector<std::int64_t>& times = record.readings->enteredAt();
    if (times.empty())
        return {};
    const std::int64_t last = allSame(times) ? times.front() : boundsInHalves(times.size(), [&](std::size_t i) { return times[i]; }).high;
    return last == 0 ? std::string() : dateOf(last);
}

std::vector<Evaluation::OverdueStandard> overdueStandards(const Record& record, const std::string& day) {
    std::vector<Evaluation::OverdueStandard> overdue;
    const auto measured = dayNumber(day);
    for (std::size_t i = 0; measured && i < record.standards.size(); ++i) {
        const auto due = dayNumber(record.standards[i].due);
        if (due && *due < *measured)
            overdue.push_back({i, static_cast<int>(*measured - *due)});
    }
    return overdue;
}

} // namespace

Result<Evaluation> evaluate(const Record& record, Progress& progress) {
    Evaluation evaluation;
    auto day = beside(record.readings->size(), [&] { return dayOfMeasurement(record); });
    for (const Phase phase : bothPhases) {
        if (!record.readings->anyIn(phase))
            continue;
        const auto& found = evaluation.phases[static_cast<std::size_t>(Phase::AsFound)];
        Result<PhaseEvaluation> result = PhaseSteps(record, phase, found ? &*found : nullptr, progress).run();
        if (!result)
            return result.error();
        evaluation.phases[static_cast<std::size_t>(phase)] = std::move(result).value();
    }
    evaluation.calibrated = day.get();
    evaluation.overdue = overdueStandards(record, evaluation.calibrated);
    progress.report(1);
    return evaluation;
}

} // namespace spanwright
