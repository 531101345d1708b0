// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/PerformanceJson.h"

#include "core/performance/LoadingRange.h"

namespace spanwright {

namespace {

using Layout = JsonWriter::Layout;

void writeProcessFigure(JsonWriter& json, std::string_view name, const std::optional<ProcessFigure>& figure) {
    json.key(name);
    if (figure)
        json.beginObject().field("value", figure->value).field("percent_of_span", figure->percentOfSpan)
            .field("set_point", figure->setPoint).endObject();
    else
        json.null();
}

} // namespace

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

} // namespace spanwright
