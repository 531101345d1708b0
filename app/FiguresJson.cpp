// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/FiguresJson.h"

#include "app/FigureNames.h"
#include "app/JsonWriter.h"
#include "app/MissingFigures.h"
#include "core/performance/LoadingRange.h"
#include "core/record/Fields.h"
#include "ui/words/Words.h"

#include <cmath>

namespace spanwright {

namespace {

using Layout = JsonWriter::Layout;

enum class RowShape { WithoutTest, WithTest };

void writeInterval(JsonWriter& json, std::string_view name, const Interval& interval) {
    json.key(name).beginObject().field("low", interval.low).field("high", interval.high).endObject();
}

void writeCoefficients(JsonWriter& json, const Fit& fit) {
    json.key("coefficients").beginArray(Layout::Lines);
    for (const Coefficient& c : fit.coefficients) {
        json.beginObject().field("name", c.name).field("value", c.value);
        json.field("standard_uncertainty", c.standardUncertainty).field("low", c.low).field("high", c.high);
        json.field("joint_low", c.jointLow).field("joint_high", c.jointHigh);
        if (!c.unit.empty())
            json.field("unit", c.unit);
        json.endObject();
    }
    json.endArray();
    json.key("coefficient_covariance").beginArray(Layout::Lines);
    const std::size_t p = fit.terms();
    for (std::size_t i = 0; i < p; ++i) {
        json.beginArray();
        for (std::size_t j = 0; j < p; ++j)
            json.value(fit.covariance[i * p + j]);
        json.endArray();
    }
    json.endArray();
}

/// How it was fitted, where that is more than its name.
void writeMethod(JsonWriter& json, const Record& record, const Fit& fit) {
    json.key("convergence").beginObject().field("reached", fit.convergence.reached).field("iterations", fit.convergence.iterations);
    json.field("reason", fit.convergence.reason).endObject();
    if (fit.correlated)
        json.field("correlated", true).field("shared_error", nameOf(fit.sharedError));
    if (fit.method != Method::Robust)
        return;
    json.field("robust", nameOf(record.choices.robust)).key("weighed_down").beginArray();
    for (const WeighedDown& reading : fit.weighedDown)
        json.beginObject().field("row", reading.row + 1).field("weight", reading.weight).endObject();
    json.endArray();
}

void writeDegrees(JsonWriter& json, const DegreeLadder& ladder) {
    json.key("degrees").beginObject(Layout::Lines).field("suggested", ladder.suggested);
    json.field("by_partial_f", ladder.byPartialF).field("by_aicc", ladder.byAicc).field("by_e74", ladder.byE74);
    json.key("steps").beginArray(Layout::Lines);
    for (const DegreeStep& step : ladder.steps) {
        json.beginObject().field("degree", step.degree).field("residual_sd", step.residualSd);
        if (step.f)
            json.field("f", *step.f).field("p", step.p);
        if (step.aicc)
            json.field("aicc", *step.aicc);
        if (step.ratio && step.e74 && std::isfinite(*step.e74))
            json.field("e74_ratio", *step.ratio).field("e74_limit", *step.e74);
        if (step.degree > 1)
            json.field("change", step.change).field("change_at", step.changeAt).field("worth_it", step.worth);
        json.field("monotonic", step.monotonic).endObject();
    }
    json.endArray().endObject();
}

void writeSplitRow(JsonWriter& json, std::string_view name, const std::optional<SplitRow>& row, RowShape shape) {
    json.key(name);
    if (!row) {
        json.null();
        return;
    }
    json.beginObject().field("ss", row->ss).field("df", row->df);
    if (name != "total")
        json.field("ms", row->ms);
    if (shape == RowShape::WithTest)
        json.field("f", row->f).field("p", row->p);
    json.endObject();
}

void writeSplit(JsonWriter& json, const std::optional<VarianceSplit>& split) {
    json.key("split");
    if (!split) {
        json.null();
        return;
    }
    json.beginObject(Layout::Lines);
    writeSplitRow(json, "total", split->total, RowShape::WithoutTest);
    writeSplitRow(json, "regression", split->regression, RowShape::WithTest);
    writeSplitRow(json, "residual", split->residual, RowShape::WithoutTest);
    writeSplitRow(json, "lack_of_fit", split->lackOfFit, RowShape::WithTest);
    writeSplitRow(json, "pure_error", split->pureError, RowShape::WithoutTest);
    writeSplitRow(json, "hysteresis", split->hysteresis, RowShape::WithTest);
    writeSplitRow(json, "run_offset", split->runOffset, RowShape::WithTest);
    writeSplitRow(json, "run_slope", split->runSlope, RowShape::WithTest);
    writeSplitRow(json, "repeatability", split->repeatability, RowShape::WithoutTest);
    json.field("against", codeName(split->against));
    if (split->lackOfFitNaive)
        writeSplitRow(json, "lack_of_fit_naive", split->lackOfFitNaive, RowShape::WithTest);
    if (split->lackOfFitAdjusted)
        writeSplitRow(json, "lack_of_fit_adjusted", split->lackOfFitAdjusted, RowShape::WithTest);
    if (!split->components.empty()) {
        json.key("components").beginArray(Layout::Lines);
        for (const VarianceComponent& c : split->components) {
            json.beginObject().field("part", codeName(c.part)).field("variance", c.variance).field("df", c.degreesOfFreedom);
            json.field("low", c.low).field("high", c.high).field("share_of_total", c.shareOfTotal);
            json.field("share_of_noise", c.shareOfNoise).endObject();
        }
        json.endArray();
    }
    json.endObject();
}

void writeAnswers(JsonWriter& json, const PhaseEvaluation& evaluation, double share) {
    const bool forward = evaluation.fit->direction == FitDirection::Indication;
    const bool spread = evaluation.fit->covarianceScale == CovarianceScale::Residuals && evaluation.fit->degreesOfFreedom > 0;
    json.key("at").beginArray(Layout::Lines);
    for (const BandPoint& point : evaluation.at) {
        json.beginObject().field("reference", forward ? point.x : point.value).field("indication", forward ? point.value : point.x);
        writeInterval(json, "mean", point.mean);
        writeInterval(json, "new_reading", point.newReading);
        writeInterval(json, "simultaneous", point.simultaneous);
        if (point.meanOfRepeats)
            writeInterval(json, "mean_of_repeats", *point.meanOfRepeats);
        if (spread)
            writeInterval(json, "tolerance", toleranceAt(*evaluation.fit, point.x, share));
        else
            json.key("tolerance").null();
        json.field("inside_range", point.inside).endObject();
    }
    json.endArray();
    json.key("read").beginArray(Layout::Lines);
    for (const ReadValue& answer : evaluation.read) {
        json.beginObject().field("indication", answer.indication).field("reference", answer.reference);
        json.field("standard_uncertainty", answer.standardUncertainty).field("low", answer.low).field("high", answer.high);
        json.field("inside_range", answer.insideRange).field("state", codeName(answer.state));
        if (answer.budget)
            json.field("expanded_uncertainty", answer.budget->expandedReference).field("coverage_factor", answer.budget->coverageFactor)
                .field("coverage_probability", evaluation.budget.coverage);
        if (!answer.others.empty()) {
            json.key("others").beginArray();
            for (const double other : answer.others)
                json.value(other);
            json.endArray();
        }
        json.endObject();
    }
    json.endArray();
}

void writeTest(JsonWriter& json, std::string_view name, std::string_view statistic, const std::optional<TestResult>& test) {
    json.key(name);
    if (!test) {
        json.null();
        return;
    }
    json.beginObject().field(statistic, test->statistic);
    if (test->df)
        json.field("df", *test->df);
    json.field("p", test->p).endObject();
}

void writeOutliers(JsonWriter& json, const Diagnostics& d) {
    json.key("outliers").beginObject().key("grubbs");
    if (d.grubbs)
        json.beginObject().field("g", d.grubbs->g).field("row", d.grubbs->row).field("critical", d.grubbs->critical).endObject();
    else
        json.null();
    json.key("esd").beginArray();
    for (const OutlierTrial& trial : d.esd)
        json.beginObject().field("row", trial.row).field("r", trial.r).field("lambda", trial.lambda).endObject();
    json.endArray().field("esd_count", d.esdCount).endObject();
}

void writeDiagnostics(JsonWriter& json, const std::optional<Diagnostics>& diagnostics) {
    json.key("diagnostics");
    if (!diagnostics) {
        json.null();
        return;
    }
    const Diagnostics& d = *diagnostics;
    json.beginObject(Layout::Lines).key("durbin_watson");
    if (d.durbinWatson)
        json.beginObject().field("d", *d.durbinWatson).field("p_positive", d.durbinWatsonP).endObject();
    else
        json.null();
    json.field("lag1_autocorrelation", d.lag1Autocorrelation).field("effective_readings", d.effectiveReadings);
    writeTest(json, "shapiro_wilk", "w", d.shapiroWilk);
    writeTest(json, "breusch_pagan", "statistic", d.breuschPagan);
    json.key("equal_variances").beginObject();
    writeTest(json, "bartlett", "statistic", d.bartlett);
    writeTest(json, "levene", "f", d.levene);
    json.key("cochran");
    if (d.cochran)
        json.beginObject().field("c", *d.cochran).field("critical", d.cochranCritical).endObject();
    else
        json.null();
    json.endObject();
    writeTest(json, "linearity", "f", d.linearity);
    writeOutliers(json, d);
    json.endObject();
}

void writeProcessFigure(JsonWriter& json, std::string_view name, const std::optional<ProcessFigure>& figure) {
    json.key(name);
    if (figure)
        json.beginObject().field("value", figure->value).field("percent_of_span", figure->percentOfSpan)
            .field("set_point", figure->setPoint).endObject();
    else
        json.null();
}

void writePerformance(JsonWriter& json, const std::optional<ProcessFigures>& performance) {
    json.key("performance");
    if (!performance) {
        json.null();
        return;
    }
    const ProcessFigures& p = *performance;
    json.beginObject(Layout::Lines).field("span", p.span);
    writeProcessFigure(json, "measured_error_max", p.measuredErrorMax);
    writeProcessFigure(json, "inaccuracy_high", p.inaccuracyHigh);
    writeProcessFigure(json, "inaccuracy_low", p.inaccuracyLow);
    writeProcessFigure(json, "hysteresis", p.hysteresis);
    writeProcessFigure(json, "hysteresis_in_cycle", p.hysteresisInCycle);
    writeProcessFigure(json, "non_repeatability", p.nonRepeatability);
    writeProcessFigure(json, "non_linearity_terminal", p.nonLinearityTerminal);
    writeProcessFigure(json, "non_linearity_independent", p.nonLinearityIndependent);
    writeProcessFigure(json, "non_linearity_zero_based", p.nonLinearityZeroBased);
    json.endObject();
}

/// Figures of a force transducer, in % of the deflection unless named otherwise; those without readings are left out.
void writeForce(JsonWriter& json, const ForceFigures& force) {
    const auto known = [&](std::string_view name, const std::optional<double>& figure) {
        if (figure)
            json.field(name, *figure);
    };
    json.key("force").beginObject(Layout::Lines);
    json.field("degree", force.degree).field("residual_sd", force.residualSd);
    json.field("lower_limit_factor", force.lowerLimitFactor).field("lower_limit_force", force.lowerLimitForce);
    json.field("lowest_force_class_a", force.lowestForceClassA).field("lowest_force_class_aa", force.lowestForceClassAA);
    json.field("loading_from_class_a", loadingRange(force, force.lowestForceClassA).from)
        .field("loading_from_class_aa", loadingRange(force, force.lowestForceClassAA).from);
    known("zero", force.zero);
    const auto largest = [&](std::string_view name, const std::optional<ForceFigures::Largest>& figure) {
        if (figure)
            json.key(name).beginObject().field("percent", figure->value).field("force", figure->force).endObject();
    };
    largest("reproducibility_max", force.reproducibility);
    largest("repeatability_max", force.repeatability);
    largest("interpolation_max", force.interpolation);
    largest("reversibility_max", force.reversibility);
    json.key("rotated_runs").beginArray();
    for (const int run : force.series.rotated)
        json.value(static_cast<std::size_t>(run));
    json.endArray();
    json.key("steps").beginArray(Layout::Lines);
    for (const ForceStep& step : force.steps) {
        json.beginObject().field("force", step.force).field("mean", step.mean);
        known("reproducibility", step.reproducibility);
        known("repeatability", step.repeatability);
        known("interpolation", step.interpolation);
        known("reversibility", step.reversibility);
        json.endObject();
    }
    json.endArray().endObject();
}

void writeFindings(JsonWriter& json, const Record& record, const std::vector<Finding>& findings) {
    json.key("findings").beginArray(Layout::Lines);
    for (const Finding& finding : findings) {
        json.beginObject().field("code", codeName(finding.code)).field("severity", codeName(finding.severity));
        json.field("text", findingWords(finding, record).sentence.toStdString()).key("rows").beginArray();
        for (const ReadingId id : finding.rows)
            json.value(record.readings->indexOf(id) + 1);
        json.endArray().key("figures").beginObject();
        for (const Figure& figure : finding.figures)
            json.field(figure.name, figure.value);
        json.endObject().field("remedy", codeName(finding.remedy)).endObject();
    }
    json.endArray();
}

void writeRows(JsonWriter& json, const Record& record, const RowFigures& rows) {
    json.key("rows").beginArray(Layout::Lines);
    for (std::size_t i = 0; i < rows.size(); ++i) {
        json.beginObject().field("row", record.readings->indexOf(rows.ids[i]) + 1).field("reference", rows.reference[i]);
        json.field("indication", rows.indication[i]).field("fitted", rows.fitted[i]).field("residual", rows.residual[i]);
        const InfluenceFigures influence = rows.influenceOf(i);
        json.field("standardised", influence.standardised).field("studentised", influence.studentised);
        json.field("leverage", rows.leverage[i]).field("cook", influence.cook).field("excluded", rows.excluded[i] != 0).endObject();
    }
    json.endArray();
}

void writeWarnings(JsonWriter& json, const std::vector<Warning>& warnings) {
    json.key("warnings").beginArray(Layout::Lines);
    for (const Warning& warning : warnings)
        json.beginObject().field("code", codeName(warning.code)).field("text", warningText(warning).toStdString()).endObject();
    json.endArray();
}

} // namespace

std::string figuresJson(const Record& record, const PhaseEvaluation& evaluation, RowsShown rows) {
    const Fit& fit = *evaluation.fit;
    JsonWriter json;
    json.beginObject(Layout::Lines);
    json.field("function", functionName(fit.function)).field("fit", nameOf(fit.direction)).field("method", nameOf(fit.method));
    json.field("weights", nameOf(fit.weights)).field("covariance", nameOf(fit.covarianceScale)).field("coverage", fit.coverage);
    json.field("phase", nameOf(evaluation.phase)).key("readings").beginObject().field("used", fit.used);
    json.field("excluded", evaluation.excluded).field("set_points", fit.setPoints).endObject();
    writeCoefficients(json, fit);
    json.field("residual_sd", fit.residualSd).field("degrees_of_freedom", fit.degreesOfFreedom);
    json.field("r_squared", fit.rSquared).field("chi_squared", fit.chiSquared);
    if (fit.chiSquared)
        json.field("chi_squared_p", fit.chiSquaredP);
    writeMethod(json, record, fit);
    if (evaluation.degrees)
        writeDegrees(json, *evaluation.degrees);
    writeSplit(json, evaluation.split);
    writeAnswers(json, evaluation, record.choices.toleranceShare.toDouble());
    const std::size_t warningsHere = json.written().size();

    writeDiagnostics(json, evaluation.diagnostics);
    writePerformance(json, evaluation.performance);
    if (evaluation.force)
        writeForce(json, *evaluation.force);
    writeFindings(json, record, evaluation.findings);
    if (rows == RowsShown::Yes)
        writeRows(json, record, evaluation.rows);
    json.endObject();

    std::vector<Warning> warnings = evaluation.warnings;
    for (Warning& warning : reasonsFor(json.missing(), evaluation))
        warnings.push_back(std::move(warning));
    JsonWriter inner(JsonWriter::Start::InsideObject);
    writeWarnings(inner, warnings);
    std::string text = json.written();
    return text.insert(warningsHere, inner.written()) + "\n";
}

} // namespace spanwright
