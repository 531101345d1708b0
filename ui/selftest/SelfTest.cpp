// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/selftest/SelfTest.h"

#include "core/evaluate/evaluate.h"
#include "core/record/Fields.h"

#include <QFile>
#include <QJsonArray>
#include <QJsonDocument>
#include <QJsonObject>

#include <algorithm>
#include <cmath>
#include <limits>

/// The resources of a static library are taken in only where somebody asks for them; the macro must stand in no namespace.
static void takeInResources() {
    Q_INIT_RESOURCE(resources);
}

namespace spanwright {

namespace {

std::optional<Decimal> decimal(const QJsonValue& cell) {
    const Result<Decimal> number = Decimal::parse(cell.toString().toStdString());
    return number ? std::optional(*number) : std::nullopt;
}

std::vector<Decimal> decimals(const QJsonValue& list) {
    std::vector<Decimal> numbers;
    for (const QJsonValue& cell : list.toArray())
        if (const auto number = decimal(cell))
            numbers.push_back(*number);
    return numbers;
}

DecimalColumn column(const QJsonValue& list) {
    DecimalColumn numbers;
    for (const QJsonValue& cell : list.toArray())
        numbers.push_back(decimal(cell));
    return numbers;
}

Choices choicesOf(const QJsonObject& stated) {
    Choices choices;
    if (const auto function = parseFunctionName(stated["function"].toString().toStdString()))
        choices.function = *function;
    choices.weights = valueOf<Weights>(stated["weights"].toString().toStdString()).value_or(choices.weights);
    choices.covariance = valueOf<CovarianceScale>(stated["covariance"].toString().toStdString()).value_or(choices.covariance);
    choices.coverage = decimal(stated["coverage"]).value_or(choices.coverage);
    choices.at = decimals(stated["at"]);
    choices.read = decimals(stated["read"]);
    if (stated["repeats"].toString() == QLatin1String("inf"))
        choices.repeats.reset();
    else if (stated.contains(QLatin1String("repeats")))
        choices.repeats = stated["repeats"].toString().toInt();
    return choices;
}

Record recordOf(const QJsonObject& stated) {
    ReadingColumns::Block block;
    block.reference = column(stated["reference"]);
    block.indication = column(stated["indication"]);
    block.uIndication = column(stated["u_indication"]);
    block.n = block.indication.size();
    Record record;
    record.choices = choicesOf(stated["choices"].toObject());
    record.readings.edit().appendBlock(std::move(block), record.nextReadingId);
    return record;
}

constexpr double missing = std::numeric_limits<double>::quiet_NaN();

double inRow(const std::optional<SplitRow>& row, const QString& field) {
    if (!row)
        return missing;
    return field == QLatin1String("ss") ? row->ss : row->f.value_or(missing);
}

double inSplit(const VarianceSplit& split, const QString& row, const QString& field) {
    if (row == QLatin1String("residual"))
        return inRow(split.residual, field);
    if (row == QLatin1String("regression"))
        return inRow(split.regression, field);
    if (row == QLatin1String("lack_of_fit"))
        return inRow(split.lackOfFit, field);
    return row == QLatin1String("pure_error") ? inRow(split.pureError, field) : missing;
}

/// A figure by its path in figures JSON.
double figureAt(const PhaseEvaluation& e, const QStringList& path) {
    const QString& first = path.front();
    const auto index = path.size() > 1 ? path[1].toUInt() : 0U;
    const QString last = path.back();
    if (first == QLatin1String("coefficients") && index < e.fit->coefficients.size())
        return last == QLatin1String("value") ? e.fit->coefficients[index].value : e.fit->coefficients[index].standardUncertainty;
    if (first == QLatin1String("coefficient_covariance")) {
        const std::size_t p = e.fit->coefficients.size(), at = index * p + last.toUInt();
        return at < e.fit->covariance.size() ? e.fit->covariance[at] : missing;
    }
    if (first == QLatin1String("residual_sd"))
        return e.fit->residualSd;
    if (first == QLatin1String("r_squared"))
        return e.fit->rSquared.value_or(missing);
    if (first == QLatin1String("chi_squared"))
        return e.fit->chiSquared.value_or(missing);
    if (first == QLatin1String("lag1_autocorrelation"))
        return e.diagnostics ? e.diagnostics->lag1Autocorrelation.value_or(missing) : missing;
    if (first == QLatin1String("split") && e.split)
        return inSplit(*e.split, path[1], last);
    if (first == QLatin1String("at") && index < e.at.size())
        return last == QLatin1String("value") ? e.at[index].value : last == QLatin1String("low") ? e.at[index].simultaneous.low
                                                                                                  : e.at[index].simultaneous.high;
    if (first == QLatin1String("read") && index < e.read.size())
        return last == QLatin1String("low")    ? e.read[index].low
               : last == QLatin1String("high") ? e.read[index].high
                                               : e.read[index].reference.value_or(missing);
    return missing;
}

SelfTestFigure compared(const QString& name, const QString& printed, double got) {
    SelfTestFigure figure{name, printed, got};
    const Result<Decimal> expected = Decimal::parse(printed.toStdString());
    if (!expected || std::isnan(got))
        return figure;
    const DoubleDouble want = expected->toDoubleDouble();
    const double difference = std::abs(toDouble(DoubleDouble(got) - want));
    const double size = std::abs(toDouble(want));
    constexpr double most = 15;
    figure.digits = difference == 0 ? most : size > 0 ? std::clamp(-std::log10(difference / size), 0.0, most) : 0;
    const double halfUnit = 0.5 * std::pow(10.0, -expected->decimals);
    figure.holds = difference <= halfUnit * (1 + 1e-9) + std::numeric_limits<double>::epsilon() * size;
    return figure;
}

SelfTestCase runCase(const QJsonObject& stated) {
    SelfTestCase result{stated["name"].toString(), stated["source"].toString(), 0, {}};
    const Record record = recordOf(stated);
    result.readings = record.readings->size();
    Progress progress;
    const Result<Evaluation> evaluation = evaluate(record, progress);
    const PhaseEvaluation* phase = evaluation ? evaluation->phase(Phase::AsFound) : nullptr;
    for (const QJsonValue& pair : stated["expected"].toArray()) {
        const QString name = pair.toArray()[0].toString();
        const bool fitted = phase != nullptr && phase->fit.has_value();
        result.figures.push_back(
            compared(name, pair.toArray()[1].toString(), fitted ? figureAt(*phase, name.split(QLatin1Char('.'))) : missing));
    }
    return result;
}

} // namespace

std::size_t SelfTestOutcome::figures() const {
    std::size_t count = 0;
    for (const SelfTestCase& one : cases)
        count += one.figures.size();
    return count;
}

std::size_t SelfTestOutcome::failed() const {
    std::size_t count = 0;
    for (const SelfTestCase& one : cases)
        count += one.failed();
    return count;
}

std::size_t SelfTestCase::failed() const {
    return static_cast<std::size_t>(
        std::count_if(figures.begin(), figures.end(), [](const SelfTestFigure& figure) { return !figure.holds; }));
}

SelfTestOutcome runSelfTest() {
    Progress progress;
    return runSelfTest(progress);
}

SelfTestOutcome runSelfTest(Progress& progress) {
    takeInResources();
    QFile file(QStringLiteral(":/self-test.json"));
    SelfTestOutcome outcome;
    if (!file.open(QIODevice::ReadOnly))
        return outcome;
    const QJsonArray cases = QJsonDocument::fromJson(file.readAll()).object()["cases"].toArray();
    for (const QJsonValue& stated : cases) {
        if (progress.cancelled())
            break;
        outcome.cases.push_back(runCase(stated.toObject()));
        progress.report(static_cast<double>(outcome.cases.size()) / static_cast<double>(cases.size()));
    }
    return outcome;
}

std::vector<const SelfTestCase*> failuresFirst(const SelfTestOutcome& outcome) {
    std::vector<const SelfTestCase*> cases;
    for (const SelfTestCase& one : outcome.cases)
        cases.push_back(&one);
    std::stable_partition(cases.begin(), cases.end(), [](const SelfTestCase* one) { return one->failed() > 0; });
    return cases;
}

} // namespace spanwright
