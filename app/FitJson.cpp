// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/FitJson.h"

#include "app/FigureNames.h"
#include "core/record/Fields.h"

#include <cmath>

namespace spanwright {

namespace {

using Layout = JsonWriter::Layout;

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

void writeBands(JsonWriter& json, const PhaseEvaluation& evaluation, double share) {
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
}

void writeValuesRead(JsonWriter& json, const PhaseEvaluation& evaluation) {
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

} // namespace

void writeFit(JsonWriter& json, const Record& record, const PhaseEvaluation& evaluation) {
    const Fit& fit = *evaluation.fit;
    writeCoefficients(json, fit);
    json.field("residual_sd", fit.residualSd).field("degrees_of_freedom", fit.degreesOfFreedom);
    json.field("r_squared", fit.rSquared).field("chi_squared", fit.chiSquared);
    if (fit.chiSquared)
        json.field("chi_squared_p", fit.chiSquaredP);
    writeMethod(json, record, fit);
    if (evaluation.degrees)
        writeDegrees(json, *evaluation.degrees);
}

void writeAnswers(JsonWriter& json, const PhaseEvaluation& evaluation, double toleranceShare) {
    writeBands(json, evaluation, toleranceShare);
    writeValuesRead(json, evaluation);
}

} // namespace spanwright
