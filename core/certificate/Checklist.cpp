// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/certificate/Checklist.h"

#include "core/record/Fields.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

constexpr auto Block = GapLevel::Block;
constexpr auto Warn = GapLevel::Warn;

class List {
  public:
    void add(Gap gap, GapLevel level, const char* stage, std::string field, std::vector<Fact> facts = {}) {
        items_.push_back({gap, level, stage, std::move(field), std::move(facts)});
    }
    void want(const std::string& text, Gap gap, GapLevel level, const char* field) {
        if (text.find_first_not_of(" \t\n") == std::string::npos)
            add(gap, level, "job", field);
    }
    [[nodiscard]] std::vector<ChecklistItem> take() { return std::move(items_); }

  private:
    std::vector<ChecklistItem> items_;
};

std::string phaseName(Phase phase) {
    return std::string(nameOf(phase));
}

void identification(const Record& record, List& list) {
    const Job& job = record.job;
    const Item& item = record.item;
    list.want(job.laboratory, Gap::NoLaboratory, Block, "job.laboratory");
    list.want(job.laboratoryAddress, Gap::NoLaboratoryAddress, Block, "job.laboratory_address");
    list.want(job.certificateNumber, Gap::NoNumber, Block, "job.certificate_number");
    list.want(job.customer, Gap::NoCustomer, Block, "job.customer");
    list.want(job.customerContact, Gap::NoCustomerContact, Block, "job.customer_contact");
    list.want(job.method, Gap::NoMethod, Block, "job.method");
    list.want(job.methodEdition, Gap::NoMethodEdition, Block, "job.method_edition");
    list.want(item.description, Gap::NoDescription, Block, "item.description");
    list.want(item.maker, Gap::NoMaker, Block, "item.maker");
    list.want(item.model, Gap::NoModel, Block, "item.model");
    list.want(item.serial, Gap::NoSerial, Block, "item.serial");
    if (!item.rangeLow || !item.rangeHigh)
        list.add(Gap::NoRange, Warn, "job", item.rangeLow ? "item.range_high" : "item.range_low");
    const bool output = item.outputLow && item.outputHigh;
    if (!output && item.reference.unit != item.indication.unit)
        list.add(Gap::NoOutput, Warn, "job", item.outputLow ? "item.output_high" : "item.output_low");
    list.want(job.conditionReceived, Gap::NoCondition, Warn, "job.condition_received");
    list.want(job.received, Gap::NoReceipt, Warn, "job.received");
    list.want(job.place, Gap::NoPlace, Warn, "job.place");
    list.want(job.customerSupplied, Gap::NoCustomerData, Warn, "job.customer_supplied");
    list.want(job.externalProviders, Gap::NoExternalProviders, Warn, "job.external_providers");
    if (!job.replaces.empty() && job.replaces == job.certificateNumber)
        list.add(Gap::ReplacesItself, Block, "job", "job.certificate_number");
    if (!job.replaces.empty())
        list.want(job.replacesReason, Gap::NoReasonOfReplacement, Block, "job.replaces_reason");
    if (!job.recalibrationDate.empty() && !job.recalibrationAgreed)
        list.add(Gap::RecalibrationNotAgreed, Block, "job", "job.recalibration_agreed");
}

/// ISO 8601 dates compare as text.
void dates(const Record& record, const Evaluation& evaluation, List& list) {
    const Job& job = record.job;
    const std::string& calibrated = evaluation.calibrated;
    if (calibrated.empty())
        list.add(Gap::NoCalibrationDate, Block, "job", "job.calibrated");
    if (!calibrated.empty() && !job.issued.empty() && calibrated > job.issued)
        list.add(Gap::CalibratedAfterIssue, Block, "job", "job.issued", {{"calibrated", calibrated}, {"issued", job.issued}});
    if (!calibrated.empty() && !job.received.empty() && calibrated < job.received)
        list.add(Gap::CalibratedBeforeReceipt, Warn, "job", "job.received", {{"calibrated", calibrated}, {"received", job.received}});
}

void conditions(const Record& record, List& list) {
    const auto& influences = record.conditions.influences;
    if (influences.empty())
        list.add(Gap::NoConditions, Block, "job", "conditions.influences");
    for (std::size_t i = 0; i < influences.size(); ++i) {
        const Condition& condition = influences[i];
        const std::string field = "conditions.influences." + std::to_string(i);
        const std::vector<Fact> facts = {{"quantity", condition.quantity.name}};
        if (!condition.start || !condition.end)
            list.add(Gap::ConditionMissing, Block, "job", field + (condition.start ? ".end" : ".start"), facts);
        const auto outside = [&condition](const std::optional<Decimal>& value) {
            return value && ((condition.low && compareValue(*value, *condition.low) < 0) ||
                             (condition.high && compareValue(*value, *condition.high) > 0));
        };
        if (outside(condition.start) || outside(condition.end))
            list.add(Gap::ConditionOutside, Warn, "job", field + (outside(condition.start) ? ".start" : ".end"), facts);
    }
}

/// Whether the values that the standard had to give lie in its range.
bool covers(const Standard& standard, const Evaluation& evaluation) {
    for (const auto& phase : evaluation.phases) {
        if (!phase)
            continue;
        for (const PointResult& point : phase->verdict.points) {
            const double value = standard.role == StandardRole::Reference ? point.reference : point.indication;
            const double slack = 1e-3 * std::fabs(value) + point.expanded;
            if ((standard.rangeLow && value < standard.rangeLow->toDouble() - slack) ||
                (standard.rangeHigh && value > standard.rangeHigh->toDouble() + slack))
                return false;
        }
    }
    return true;
}

void standard(const Record& record, const Evaluation& evaluation, std::size_t index, List& list) {
    const Standard& one = record.standards[index];
    const std::string field = "standards." + std::to_string(index) + '.';
    const std::vector<Fact> facts = {{"standard", one.id.empty() ? std::to_string(index + 1) : one.id}};
    if (one.certificate.empty())
        list.add(Gap::StandardWithoutCertificate, Block, "job", field + "certificate", facts);
    if (one.issuer.empty())
        list.add(Gap::StandardWithoutIssuer, Warn, "job", field + "issuer", facts);
    if (one.due.empty())
        list.add(Gap::StandardWithoutDue, Warn, "job", field + "due", facts);
    if (!one.expandedUncertainty)
        list.add(Gap::StandardWithoutUncertainty, Block, "job", field + "expanded_uncertainty", facts);
    const std::string& unit = one.role == StandardRole::Reference ? record.item.reference.unit : record.item.indication.unit;
    if (!one.unit.empty() && !unit.empty() && one.unit != unit)
        list.add(Gap::StandardUnitDiffers, Block, "job", field + "unit",
                 {facts[0], {"unit", one.unit}, {"expected", unit}});
    if (!covers(one, evaluation))
        list.add(Gap::StandardRangeTooSmall, Warn, "job", field + "range_high", facts);
    if (one.correctionUse == CorrectionUse::None && !one.corrections.empty())
        list.add(Gap::CorrectionNotApplied, Warn, "job", field + "correction_use", facts);
}

void overdue(const Record& record, const Evaluation& evaluation, List& list) {
    for (const Evaluation::OverdueStandard& late : evaluation.overdue) {
        if (late.index >= record.standards.size())
            continue;
        const Standard& one = record.standards[late.index];
        const std::string field = "standards." + std::to_string(late.index) + '.';
        const std::vector<Fact> facts = {{"standard", one.id}, {"days", std::to_string(late.days)}, {"by", one.overdueBy}};
        if (one.overdueReason.empty() || one.overdueBy.empty())
            list.add(Gap::StandardOverdue, Block, "job", field + (one.overdueReason.empty() ? "overdue_reason" : "overdue_by"), facts);
        else
            list.add(Gap::StandardOverdueAccepted, Warn, "job", field + "overdue_reason", facts);
    }
}

void traceability(const Record& record, const Evaluation& evaluation, List& list) {
    list.want(record.job.traceability, Gap::NoTraceability, Block, "job.traceability");
    const auto& all = record.standards;
    if (std::none_of(all.begin(), all.end(), [](const Standard& s) { return s.role == StandardRole::Reference; }))
        list.add(Gap::NoStandard, Block, "job", "standards");
    for (std::size_t i = 0; i < all.size(); ++i)
        standard(record, evaluation, i, list);
    overdue(record, evaluation, list);
}

bool hasReadings(const Evaluation& evaluation, Phase phase) {
    const PhaseEvaluation* one = evaluation.phase(phase);
    return one != nullptr && one->complete > one->excluded;
}

void adjustment(const Record& record, const Evaluation& evaluation, List& list) {
    const bool found = hasReadings(evaluation, Phase::AsFound), left = hasReadings(evaluation, Phase::AsLeft);
    if (!found && !left)
        list.add(Gap::NoResults, Block, "bench", "readings");
    if (!record.job.adjusted) {
        if (left)
            list.add(Gap::AsLeftWithoutAdjustment, Warn, "job", "job.adjusted");
        return;
    }
    list.want(record.job.adjustment, Gap::AdjustmentNotDescribed, Block, "job.adjustment");
    if (!found && left && record.job.noAsFoundReason.empty())
        list.add(Gap::NoAsFound, Warn, "job", "job.no_as_found_reason");
    if (found && !left)
        list.add(Gap::NoAsLeft, Block, "bench", "readings");
}

void readingsOf(const Record& record, const PhaseEvaluation& phase, List& list) {
    const Fact named{"phase", phaseName(phase.phase)};
    // Readings whose set points are stated meet the plan where it asks for them; of others only their number tells.
    const DecimalColumn& setPoint = record.readings->setPoint();
    const std::size_t open = setPoint.missing() < setPoint.size() ? openPlanned(record.plan, *record.readings, phase.phase, Met::WhenComplete).size()
                                                                  : phase.planned - std::min(phase.complete, phase.planned);
    if (open > 0)
        list.add(Gap::PlanNotDone, Warn, "bench", "readings",
                 {named, {"planned", std::to_string(phase.planned)}, {"complete", std::to_string(phase.planned - open)}});
    const double share = phase.complete > 0 ? static_cast<double>(phase.excluded) / static_cast<double>(phase.complete) : 0;
    if (share > record.choices.exclusionLimit.toDouble())
        list.add(Gap::ManyExcluded, Warn, "bench", "exclusions",
                 {named, {"count", std::to_string(phase.excluded)}, {"of", std::to_string(phase.complete)},
                  {"limit", record.choices.exclusionLimit.text()}});
    const auto& points = phase.budget.points;
    const bool stated = !points.empty() && std::all_of(points.begin(), points.end(), [](const SetPointBudget& point) {
        return point.expanded > 0 && std::isfinite(point.expanded);
    });
    if (!stated)
        list.add(Gap::NoUncertainty, Block, "budget", "budget.lines", {named});
    const bool unrepeated = std::any_of(phase.budget.warnings.begin(), phase.budget.warnings.end(), [](const Warning& warning) {
        return warning.code == WarningCode::FigureUndefined && !warning.facts.empty() && warning.facts[0].value == "repeatability";
    });
    if (unrepeated)
        list.add(Gap::NoRepeatability, Warn, "budget", "budget.lines", {named});
    for (std::size_t i = 0; i < phase.findings.size(); ++i)
        if (phase.findings[i].severity == Severity::Serious)
            list.add(Gap::SeriousFinding, Warn, "bench", "findings", {named, {"index", std::to_string(i)}});
}

void results(const Record& record, const Evaluation& evaluation, List& list) {
    if (record.item.reference.unit.empty())
        list.add(Gap::NoUnit, Block, "job", "item.reference.unit", {{"quantity", "reference"}});
    if (record.item.indication.unit.empty())
        list.add(Gap::NoUnit, Block, "job", "item.indication.unit", {{"quantity", "indication"}});
    adjustment(record, evaluation, list);
    for (const Phase phase : bothPhases)
        if (const PhaseEvaluation* one = evaluation.phase(phase); one != nullptr && one->readings > 0)
            readingsOf(record, *one, list);
    const auto& exclusions = record.exclusions->all();
    const auto silent = std::count_if(exclusions.begin(), exclusions.end(), [](const Exclusion& exclusion) {
        return exclusion.reason == ExclusionReason::Other && exclusion.words.empty();
    });
    if (silent > 0)
        list.add(Gap::ExclusionWithoutReason, Block, "bench", "exclusions", {{"count", std::to_string(silent)}});
    for (const OmittedLine& omitted : record.budget.omitted)
        if (omitted.reason.empty())
            list.add(Gap::OmittedWithoutReason, Block, "budget", "budget.omitted", {{"line", std::string(nameOf(omitted.line))}});
}

void decision(const Record& record, const Evaluation& evaluation, List& list) {
    const Limits& limits = record.limits;
    if (!limits.stated)
        return;
    if (limits.specification.empty())
        list.add(Gap::NoSpecification, Block, "budget", "limits.specification");
    const bool stated = limits.percentOfReading || limits.percentOfSpan || limits.constant;
    if (!stated)
        list.add(Gap::NoLimits, Block, "budget", "limits.percent_of_span");
    for (const Phase phase : bothPhases)
        if (stated && hasReadings(evaluation, phase) && !evaluation.phase(phase)->verdict.overall)
            list.add(Gap::NoDecision, Block, "job", "item.output_low", {{"phase", phaseName(phase)}});
    if (limits.agreedWith.empty() || limits.agreedOn.empty())
        list.add(Gap::RuleNotAgreed, Warn, "budget", limits.agreedWith.empty() ? "limits.agreed_with" : "limits.agreed_on");
    else if (!evaluation.calibrated.empty() && limits.agreedOn > evaluation.calibrated)
        list.add(Gap::RuleAgreedLate, Warn, "budget", "limits.agreed_on",
                 {{"agreed", limits.agreedOn}, {"calibrated", evaluation.calibrated}});
}

void function(const Record& record, const Evaluation& evaluation, List& list) {
    const PhaseEvaluation* phase = evaluation.phase(record.choices.phase);
    const bool valid = phase != nullptr && phase->fit && phase->fit->high >= phase->fit->low;
    if (!valid)
        list.add(Gap::NoFunction, Block, "bench", "choices.function", {{"phase", phaseName(record.choices.phase)}});
    else if (phase->fit->method == Method::Robust)
        list.add(Gap::RobustFunction, Block, "bench", "choices.method");
}

void people(const Record& record, const Evaluation& evaluation, List& list) {
    const std::pair<SignOffRole, Gap> roles[] = {{SignOffRole::Performed, Gap::NotPerformed},
                                                 {SignOffRole::Checked, Gap::NotChecked},
                                                 {SignOffRole::Authorised, Gap::NotAuthorised}};
    for (const auto& [role, gap] : roles) {
        const auto& all = record.signOffs;
        const bool there = std::any_of(all.begin(), all.end(), [wanted = role](const SignOff& one) {
            return one.role == wanted && !one.name.empty() && !one.position.empty() && !one.date.empty();
        });
        if (!there)
            list.add(gap, Warn, "certificate", "signoffs." + std::string(nameOf(role)));
    }
    for (const SignOff& one : record.signOffs)
        if (!one.date.empty() && one.date < evaluation.calibrated)
            list.add(Gap::SignedBeforeCalibration, Block, "certificate", "signoffs." + std::string(nameOf(one.role)),
                     {{"role", std::string(nameOf(one.role))}, {"date", one.date}, {"calibrated", evaluation.calibrated}});
}

} // namespace

std::vector<ChecklistItem> checklist(const Record& record, const Evaluation& evaluation) {
    List list;
    identification(record, list);
    dates(record, evaluation, list);
    conditions(record, list);
    traceability(record, evaluation, list);
    results(record, evaluation, list);
    decision(record, evaluation, list);
    function(record, evaluation, list);
    people(record, evaluation, list);
    return list.take();
}

bool blocked(const std::vector<ChecklistItem>& list) {
    return std::any_of(list.begin(), list.end(), [](const ChecklistItem& item) { return item.level == GapLevel::Block; });
}

ChecklistItem numberUsedElsewhere(const std::string& number, const std::string& file) {
    return {Gap::NumberUsedElsewhere, Warn, "job", "job.certificate_number", {{"number", number}, {"file", file}}};
}

} // namespace spanwright
