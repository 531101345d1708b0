// SPDX-License-Identifier: GPL-3.0-or-later
#include "ui/words/FieldNames.h"

#include <QtGlobal>

#include <algorithm>
#include <iterator>

namespace spanwright {

namespace {

#define WORDS(text) QT_TRANSLATE_NOOP("FieldNames", text)

constexpr FieldName names[] = {
    {"job.number", WORDS("work order")},
    {"job.certificate_number", WORDS("certificate number")},
    {"job.laboratory", WORDS("laboratory")},
    {"job.laboratory_address", WORDS("address of the laboratory")},
    {"job.place", WORDS("place")},
    {"job.customer", WORDS("customer")},
    {"job.customer_contact", WORDS("contact of the customer")},
    {"job.customer_supplied", WORDS("data supplied by the customer")},
    {"job.method", WORDS("procedure")},
    {"job.method_edition", WORDS("edition of the procedure")},
    {"job.method_deviations", WORDS("additions, deviations, exclusions")},
    {"job.received", WORDS("received on")},
    {"job.condition_received", WORDS("condition on receipt")},
    {"job.calibrated", WORDS("calibrated on")},
    {"job.issued", WORDS("issued on")},
    {"job.traceability", WORDS("metrological traceability")},
    {"job.external_providers", WORDS("results from external providers")},
    {"job.adjusted", WORDS("the item was adjusted"), FieldKind::YesNo},
    {"job.adjustment", WORDS("what was adjusted")},
    {"job.no_as_found_reason", WORDS("why there are no results as found")},
    {"job.opinions", WORDS("opinions and interpretations")},
    {"job.recalibration_agreed", WORDS("a recalibration date is agreed"), FieldKind::YesNo},
    {"job.recalibration_date", WORDS("recalibration date")},
    {"job.replaces", WORDS("replaces certificate")},
    {"job.replaces_reason", WORDS("reason of the replacement")},

    {"item.description", WORDS("item, description")},
    {"item.maker", WORDS("item, maker")},
    {"item.model", WORDS("item, model")},
    {"item.serial", WORDS("item, serial number")},
    {"item.tag", WORDS("item, tag")},
    {"item.reference.name", WORDS("reference quantity")},
    {"item.reference.unit", WORDS("unit of the reference")},
    {"item.indication.name", WORDS("indicated quantity")},
    {"item.indication.unit", WORDS("unit of the indication")},
    {"item.range_low", WORDS("item, range from"), FieldKind::Number},
    {"item.range_high", WORDS("item, range to"), FieldKind::Number},
    {"item.output_low", WORDS("item, indication at the low end"), FieldKind::Number},
    {"item.output_high", WORDS("item, indication at the high end"), FieldKind::Number},
    {"item.resolution", WORDS("resolution of the indication"), FieldKind::Number},
    {"item.reference_resolution", WORDS("resolution of the reference"), FieldKind::Number},

    {"standards.#.id", WORDS("standard %1, id")},
    {"standards.#.description", WORDS("standard %1, what it is")},
    {"standards.#.role", WORDS("standard %1, gives the"), FieldKind::Code},
    {"standards.#.certificate", WORDS("standard %1, certificate")},
    {"standards.#.issuer", WORDS("standard %1, issued by")},
    {"standards.#.calibrated_on", WORDS("standard %1, calibrated on")},
    {"standards.#.due", WORDS("standard %1, due")},
    {"standards.#.unit", WORDS("standard %1, unit")},
    {"standards.#.range_low", WORDS("standard %1, range from"), FieldKind::Number},
    {"standards.#.range_high", WORDS("standard %1, range to"), FieldKind::Number},
    {"standards.#.resolution", WORDS("standard %1, resolution"), FieldKind::Number},
    {"standards.#.expanded_uncertainty", WORDS("standard %1, U"), FieldKind::Number},
    {"standards.#.coverage_factor", WORDS("standard %1, k"), FieldKind::Number},
    {"standards.#.form", WORDS("standard %1, U stated"), FieldKind::Code},
    {"standards.#.drift", WORDS("standard %1, drift"), FieldKind::Number},
    {"standards.#.correction_use", WORDS("standard %1, correction table"), FieldKind::Code},
    {"standards.#.corrections.#.at", WORDS("standard %1, correction %2, at"), FieldKind::Number},
    {"standards.#.corrections.#.correction", WORDS("standard %1, correction %2"), FieldKind::Number},
    {"standards.#.overdue_reason", WORDS("standard %1, why used though overdue")},
    {"standards.#.overdue_by", WORDS("standard %1, use authorised by")},

    {"conditions.influences.#.quantity.name", WORDS("condition %1, quantity")},
    {"conditions.influences.#.quantity.unit", WORDS("condition %1, unit")},
    {"conditions.influences.#.start", WORDS("condition %1, at the start"), FieldKind::Number},
    {"conditions.influences.#.end", WORDS("condition %1, at the end"), FieldKind::Number},
    {"conditions.influences.#.low", WORDS("condition %1, not below"), FieldKind::Number},
    {"conditions.influences.#.high", WORDS("condition %1, not above"), FieldKind::Number},
    {"conditions.remarks", WORDS("remarks on the conditions")},

    {"plan.set_points.#", WORDS("plan, set point %1"), FieldKind::Number},
    {"plan.directions", WORDS("plan, directions"), FieldKind::Code},
    {"plan.runs", WORDS("plan, runs as found"), FieldKind::Number},
    {"plan.repeats", WORDS("plan, readings a visit"), FieldKind::Number},
    {"plan.as_left_runs", WORDS("plan, runs as left"), FieldKind::Number},
    {"plan.dwell_seconds", WORDS("plan, least wait in seconds"), FieldKind::Number},
    {"plan.preloads", WORDS("plan, preloads"), FieldKind::Number},
    {"plan.positions.#", WORDS("plan, position of run %1 in degrees"), FieldKind::Number},
    {"plan.reference_typed", WORDS("plan, the reference is typed at each reading"), FieldKind::YesNo},

    {"choices.function", WORDS("calibration function"), FieldKind::Code},
    {"choices.fit", WORDS("the function gives the"), FieldKind::Code},
    {"choices.method", WORDS("method of the fit"), FieldKind::Code},
    {"choices.weights", WORDS("weights"), FieldKind::Code},
    {"choices.covariance", WORDS("uncertainty of the function"), FieldKind::Code},
    {"choices.shared_error", WORDS("calibration error shared by readings"), FieldKind::Code},
    {"choices.coverage", WORDS("coverage probability of the intervals"), FieldKind::Number},
    {"choices.phase", WORDS("phase in view"), FieldKind::Code},
    {"choices.at.#", WORDS("place %1 for the bands"), FieldKind::Number},
    {"choices.read.#", WORDS("indication %1 to be read back"), FieldKind::Number},
    {"choices.repeats", WORDS("new readings in a mean"), FieldKind::Number},
    {"choices.outliers", WORDS("most outliers looked for"), FieldKind::Number},
    {"choices.outlier_level", WORDS("level of the outlier tests"), FieldKind::Number},
    {"choices.robust", WORDS("weights of the robust fit"), FieldKind::Code},
    {"choices.tolerance_share", WORDS("share in the tolerance band"), FieldKind::Number},
    {"choices.exclusion_limit", WORDS("share that may be excluded"), FieldKind::Number},
    {"choices.separate_directions", WORDS("rising and falling apart"), FieldKind::YesNo},
    {"choices.split_on_certificate", WORDS("variance split on the certificate"), FieldKind::YesNo},

    {"uncertainty_matrix", WORDS("covariances between readings")},

    {"budget.lines.#.name", WORDS("budget line %1, name")},
    {"budget.lines.#.source", WORDS("budget line %1, where it comes from")},
    {"budget.lines.#.side", WORDS("budget line %1, in the unit of the"), FieldKind::Code},
    {"budget.lines.#.distribution", WORDS("budget line %1, distribution"), FieldKind::Code},
    {"budget.lines.#.amount", WORDS("budget line %1, amount"), FieldKind::Number},
    {"budget.lines.#.divisor", WORDS("budget line %1, divisor"), FieldKind::Number},
    {"budget.lines.#.degrees_of_freedom", WORDS("budget line %1, degrees of freedom"), FieldKind::Number},
    {"budget.lines.#.sensitivity", WORDS("budget line %1, sensitivity"), FieldKind::Number},
    {"budget.omitted.#.line", WORDS("contribution %1 left out"), FieldKind::Code},
    {"budget.omitted.#.reason", WORDS("contribution %1 left out, reason")},
    {"budget.coverage", WORDS("coverage probability of U"), FieldKind::Number},

    {"limits.stated", WORDS("a statement of conformity is wanted"), FieldKind::YesNo},
    {"limits.specification", WORDS("limits, specification")},
    {"limits.percent_of_reading", WORDS("limits, % of reading"), FieldKind::Number},
    {"limits.percent_of_span", WORDS("limits, % of span"), FieldKind::Number},
    {"limits.constant", WORDS("limits, constant"), FieldKind::Number},
    {"limits.side", WORDS("limits, in the unit of the"), FieldKind::Code},
    {"limits.rule", WORDS("decision rule"), FieldKind::Code},
    {"limits.fraction", WORDS("decision rule, r of the guard band"), FieldKind::Number},
    {"limits.agreed_with", WORDS("decision rule, agreed with")},
    {"limits.agreed_on", WORDS("decision rule, agreed on")},

    {"signoffs.#.role", WORDS("signature %1, role"), FieldKind::Code},
    {"signoffs.#.name", WORDS("signature %1, name")},
    {"signoffs.#.position", WORDS("signature %1, position")},
    {"signoffs.#.date", WORDS("signature %1, date")},

    {"dismissals.#.finding", WORDS("finding %1 dismissed"), FieldKind::Code},
    {"dismissals.#.figures", WORDS("finding %1 dismissed, its figures")},
    {"dismissals.#.reason", WORDS("finding %1 dismissed, reason")},
    {"dismissals.#.by", WORDS("finding %1 dismissed, by")},
    {"dismissals.#.date", WORDS("finding %1 dismissed, date")},
};

#undef WORDS

} // namespace

const FieldName* fieldName(std::string_view path) {
    const auto found = std::find_if(std::begin(names), std::end(names), [&](const FieldName& name) { return name.path == path; });
    return found == std::end(names) ? nullptr : found;
}

} // namespace spanwright
