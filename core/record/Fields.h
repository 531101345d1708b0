// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Record.h"

#include <array>
#include <concepts>
#include <string_view>
#include <type_traits>
#include <utility>

namespace spanwright {

/// The names of an enumeration's values as they stand in files, figures and the journal, in the order of the values.
template <class E>
struct EnumNames;

#define SPANWRIGHT_ENUM_NAMES(Type, ...)                                                                                   \
    template <>                                                                                                            \
    struct EnumNames<Type> {                                                                                               \
        static constexpr auto names = std::to_array<std::string_view>({__VA_ARGS__});                                      \
    }

SPANWRIGHT_ENUM_NAMES(Phase, "as-found", "as-left");
SPANWRIGHT_ENUM_NAMES(Direction, "", "rising", "falling");
SPANWRIGHT_ENUM_NAMES(ExclusionReason, "not-settled", "typing-slip", "wrong-reference", "disturbance", "out-of-range",
                      "instrument-fault", "other");
SPANWRIGHT_ENUM_NAMES(StandardRole, "reference", "indication");
SPANWRIGHT_ENUM_NAMES(UncertaintyForm, "absolute", "percent-of-reading");
SPANWRIGHT_ENUM_NAMES(CorrectionUse, "none", "apply", "already-applied");
SPANWRIGHT_ENUM_NAMES(PlanDirections, "rising", "falling", "rising-then-falling");
SPANWRIGHT_ENUM_NAMES(FitDirection, "indication", "reference");
SPANWRIGHT_ENUM_NAMES(Method, "least-squares", "both-uncertain", "robust");
SPANWRIGHT_ENUM_NAMES(RobustWeight, "huber", "bisquare");
SPANWRIGHT_ENUM_NAMES(Weights, "equal", "stated", "replicates", "proportional", "variance-function");
SPANWRIGHT_ENUM_NAMES(CovarianceScale, "residuals", "stated");
SPANWRIGHT_ENUM_NAMES(SharedError, "budget", "fit");
SPANWRIGHT_ENUM_NAMES(Distribution, "normal", "rectangular", "triangular", "u-shaped", "student");
SPANWRIGHT_ENUM_NAMES(Side, "reference", "indication");
SPANWRIGHT_ENUM_NAMES(DerivedLine, "standard", "standard-drift", "reference-resolution", "indication-resolution",
                      "repeatability", "run-to-run", "hysteresis", "fit");
SPANWRIGHT_ENUM_NAMES(DecisionRule, "simple", "guarded-u", "guarded-fraction", "four-state");
SPANWRIGHT_ENUM_NAMES(SignOffRole, "performed", "checked", "authorised");

#undef SPANWRIGHT_ENUM_NAMES

template <class E>
constexpr std::string_view nameOf(E value) {
    return EnumNames<E>::names[static_cast<std::size_t>(value)];
}

/// The value of that name; empty when there is none.
template <class E>
std::optional<E> valueOf(std::string_view name) {
    const auto& names = EnumNames<E>::names;
    for (std::size_t i = 0; i < names.size(); ++i)
        if (names[i] == name)
            return static_cast<E>(i);
    return std::nullopt;
}

/// Visits every field of a part of the record in the order of the file: visitor(name, field). A field is a string, a bool, an
/// int, a ReadingId, an enumeration, a FunctionChoice, a Decimal, an optional of these, a part that fields() also knows, or a vector of
/// these. The session file, the journal's differences and the tests all walk records this way, so a new field is added here
/// once. `P` is the part or the const part.
template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Job>
{
    visit("number", part.number);
    visit("certificate_number", part.certificateNumber);
    visit("laboratory", part.laboratory);
    visit("laboratory_address", part.laboratoryAddress);
    visit("place", part.place);
    visit("customer", part.customer);
    visit("customer_contact", part.customerContact);
    visit("customer_supplied", part.customerSupplied);
    visit("method", part.method);
    visit("method_edition", part.methodEdition);
    visit("method_deviations", part.methodDeviations);
    visit("received", part.received);
    visit("condition_received", part.conditionReceived);
    visit("calibrated", part.calibrated);
    visit("issued", part.issued);
    visit("traceability", part.traceability);
    visit("external_providers", part.externalProviders);
    visit("adjusted", part.adjusted);
    visit("adjustment", part.adjustment);
    visit("no_as_found_reason", part.noAsFoundReason);
    visit("opinions", part.opinions);
    visit("recalibration_agreed", part.recalibrationAgreed);
    visit("recalibration_date", part.recalibrationDate);
    visit("replaces", part.replaces);
    visit("replaces_reason", part.replacesReason);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Quantity>
{
    visit("name", part.name);
    visit("unit", part.unit);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Item>
{
    visit("description", part.description);
    visit("maker", part.maker);
    visit("model", part.model);
    visit("serial", part.serial);
    visit("tag", part.tag);
    visit("reference", part.reference);
    visit("indication", part.indication);
    visit("range_low", part.rangeLow);
    visit("range_high", part.rangeHigh);
    visit("output_low", part.outputLow);
    visit("output_high", part.outputHigh);
    visit("resolution", part.resolution);
    visit("reference_resolution", part.referenceResolution);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, CorrectionPoint>
{
    visit("at", part.at);
    visit("correction", part.correction);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Standard>
{
    visit("id", part.id);
    visit("description", part.description);
    visit("role", part.role);
    visit("certificate", part.certificate);
    visit("issuer", part.issuer);
    visit("calibrated_on", part.calibratedOn);
    visit("due", part.due);
    visit("unit", part.unit);
    visit("range_low", part.rangeLow);
    visit("range_high", part.rangeHigh);
    visit("resolution", part.resolution);
    visit("expanded_uncertainty", part.expandedUncertainty);
    visit("coverage_factor", part.coverageFactor);
    visit("form", part.form);
    visit("drift", part.drift);
    visit("correction_use", part.correctionUse);
    visit("corrections", part.corrections);
    visit("overdue_reason", part.overdueReason);
    visit("overdue_by", part.overdueBy);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Condition>
{
    visit("quantity", part.quantity);
    visit("start", part.start);
    visit("end", part.end);
    visit("low", part.low);
    visit("high", part.high);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Conditions>
{
    visit("influences", part.influences);
    visit("remarks", part.remarks);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Plan>
{
    visit("set_points", part.setPoints);
    visit("directions", part.directions);
    visit("runs", part.runs);
    visit("repeats", part.repeats);
    visit("as_left_runs", part.asLeftRuns);
    visit("dwell_seconds", part.dwellSeconds);
    visit("preloads", part.preloads);
    visit("positions", part.positions);
    visit("reference_typed", part.referenceTyped);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Choices>
{
    visit("function", part.function);
    visit("fit", part.fit);
    visit("method", part.method);
    visit("weights", part.weights);
    visit("covariance", part.covariance);
    visit("shared_error", part.sharedError);
    visit("coverage", part.coverage);
    visit("phase", part.phase);
    visit("at", part.at);
    visit("read", part.read);
    visit("repeats", part.repeats);
    visit("outliers", part.outliers);
    visit("outlier_level", part.outlierLevel);
    visit("robust", part.robust);
    visit("tolerance_share", part.toleranceShare);
    visit("exclusion_limit", part.exclusionLimit);
    visit("separate_directions", part.separateDirections);
    visit("split_on_certificate", part.splitOnCertificate);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, ManualBudgetLine>
{
    visit("name", part.name);
    visit("source", part.source);
    visit("side", part.side);
    visit("distribution", part.distribution);
    visit("amount", part.amount);
    visit("divisor", part.divisor);
    visit("degrees_of_freedom", part.degreesOfFreedom);
    visit("sensitivity", part.sensitivity);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, OmittedLine>
{
    visit("line", part.line);
    visit("reason", part.reason);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, BudgetInput>
{
    visit("lines", part.lines);
    visit("omitted", part.omitted);
    visit("coverage", part.coverage);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Limits>
{
    visit("stated", part.stated);
    visit("specification", part.specification);
    visit("percent_of_reading", part.percentOfReading);
    visit("percent_of_span", part.percentOfSpan);
    visit("constant", part.constant);
    visit("side", part.side);
    visit("rule", part.rule);
    visit("fraction", part.fraction);
    visit("agreed_with", part.agreedWith);
    visit("agreed_on", part.agreedOn);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, SignOff>
{
    visit("role", part.role);
    visit("name", part.name);
    visit("position", part.position);
    visit("date", part.date);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, Dismissal>
{
    visit("finding", part.finding);
    visit("figures", part.figures);
    visit("reason", part.reason);
    visit("by", part.by);
    visit("date", part.date);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, MatrixRow>
{
    visit("reading", part.reading);
    visit("side", part.side);
    visit("covariances", part.covariances);
}

template <class P, class V>
void fields(P& part, V&& visit)
    requires std::same_as<std::remove_const_t<P>, UncertaintyMatrix>
{
    visit("source", part.source);
    visit("rows", part.rows);
}

/// The parts of a record that are changed as a whole (all but readings, exclusions and journal), in the order of the file.
template <class R, class V>
void parts(R& record, V&& visit)
    requires std::same_as<std::remove_const_t<R>, Record>
{
    visit("job", record.job);
    visit("item", record.item);
    visit("standards", record.standards);
    visit("conditions", record.conditions);
    visit("plan", record.plan);
    visit("choices", record.choices);
    visit("uncertainty_matrix", record.uncertaintyMatrix);
    visit("budget", record.budget);
    visit("limits", record.limits);
    visit("signoffs", record.signOffs);
    visit("dismissals", record.dismissals);
}

} // namespace spanwright
