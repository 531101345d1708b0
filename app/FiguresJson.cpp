// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/FiguresJson.h"

#include "app/FigureNames.h"
#include "app/FitJson.h"
#include "app/JsonWriter.h"
#include "app/MissingFigures.h"
#include "app/PerformanceJson.h"
#include "app/SpreadJson.h"
#include "core/record/Fields.h"
#include "ui/words/Words.h"

namespace spanwright {

namespace {

using Layout = JsonWriter::Layout;

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
    writeFit(json, record, evaluation);
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
