// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/SpreadJson.h"

#include "app/FigureNames.h"

namespace spanwright {

namespace {

using Layout = JsonWriter::Layout;

enum class RowShape { WithoutTest, WithTest };

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

} // namespace

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

} // namespace spanwright
