// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/Rounding.h"
#include "core/certificate/Certificate.h"
#include "core/certificate/FunctionSection.h"
#include "core/certificate/ResultSection.h"
#include "core/certificate/ShortText.h"
#include "core/record/Fields.h"

#include <algorithm>
#include <cmath>

namespace spanwright {

namespace {

DraftState stateOf(const std::vector<ChecklistItem>& gaps) {
    if (blocked(gaps))
        return DraftState::Incomplete;
    const bool unsigned_ = std::any_of(gaps.begin(), gaps.end(), [](const ChecklistItem& item) {
        return item.gap == Gap::NotPerformed || item.gap == Gap::NotChecked || item.gap == Gap::NotAuthorised;
    });
    return unsigned_ ? DraftState::Draft : DraftState::SignedOff;
}

Digits typed(const DecimalColumn& column, std::size_t row) {
    const auto value = column.at(row);
    return value ? value->text() : Digits{};
}

std::vector<ExcludedLine> excludedLines(const Record& record) {
    std::vector<ExcludedLine> lines;
    const ReadingColumns& readings = *record.readings;
    for (const Exclusion& exclusion : record.exclusions->all()) {
        const std::size_t row = readings.indexOf(exclusion.id);
        if (row == readings.size())
            continue;
        lines.push_back({row + 1, readings.phases()[row], readings.runs()[row], readings.directions()[row],
                         typed(readings.setPoint(), row), typed(readings.reference(), row), typed(readings.indication(), row),
                         exclusion.reason, exclusion.words, exclusion.by});
    }
    return lines;
}

std::string standardsWith(const Record& record, CorrectionUse use) {
    std::string ids;
    for (const Standard& standard : record.standards)
        if (standard.correctionUse == use)
            ids += (ids.empty() ? "" : ", ") + standard.id;
    return ids;
}

/// Set point at which rising and falling errors left have opposite signs and are furthest apart, by more than U.
std::optional<double> hysteresisLeft(const PhaseEvaluation* left) {
    if (left == nullptr)
        return std::nullopt;
    const auto& points = left->verdict.points;
    std::optional<double> place;
    double widest = 0;
    for (std::size_t i = 0; i + 1 < points.size(); ++i) {
        const PointResult &a = points[i], &b = points[i + 1];
        const double gap = std::fabs(a.error - b.error);
        if (a.setPoint == b.setPoint && a.error * b.error < 0 && gap > std::max({a.expanded, b.expanded, widest})) {
            place = a.setPoint;
            widest = gap;
        }
    }
    return place;
}

bool exceedsLimit(const PhaseEvaluation& phase, double limit) {
    return static_cast<double>(phase.excluded) > limit * static_cast<double>(phase.complete);
}

/// Set points at which every reading is excluded.
std::vector<double> emptiedSetPoints(const PhaseEvaluation& phase) {
    std::vector<double> setPoints;
    for (const Finding& finding : phase.findings)
        if (finding.code == FindingCode::SetPointExcluded)
            for (const Figure& figure : finding.figures)
                if (figure.name == "set_point")
                    setPoints.push_back(figure.value);
    return setPoints;
}

std::vector<StatementLine> noticesOf(const Record& record, const Evaluation& evaluation) {
    std::vector<StatementLine> notices;
    if (!record.job.replaces.empty())
        notices.push_back({Statement::Replaces, {{"number", record.job.replaces}, {"reason", record.job.replacesReason}}});
    const PhaseEvaluation* found = evaluation.phase(Phase::AsFound);
    if (found != nullptr && found->verdict.overall) {
        const auto& points = found->verdict.points;
        const bool outside = std::any_of(points.begin(), points.end(), [](const PointResult& point) {
            return point.limit && std::fabs(point.error) > *point.limit;
        });
        if (outside)
            notices.push_back({Statement::AsFoundOutsideLimits, {}});
        else if (*found->verdict.overall != ConformityState::Pass)
            notices.push_back({Statement::AsFoundNotAccepted, {}});
    }
    if (record.job.adjusted && found == nullptr)
        notices.push_back({Statement::NoAsFound, {{"reason", record.job.noAsFoundReason}}});
    const double limit = record.choices.exclusionLimit.toDouble();
    for (const Phase which : bothPhases)
        if (const PhaseEvaluation* phase = evaluation.phase(which); phase != nullptr && exceedsLimit(*phase, limit))
            notices.push_back({Statement::ManyExcluded, {{"phase", std::string(nameOf(which))}, {"count", std::to_string(phase->excluded)},
                                                         {"of", std::to_string(phase->complete)}, {"limit", shortText(std::stod(roundedText(100 * limit, 2)))}}});
    for (const Phase which : bothPhases)
        if (const PhaseEvaluation* phase = evaluation.phase(which))
            for (const double setPoint : emptiedSetPoints(*phase))
                notices.push_back({Statement::SetPointExcluded, {{"phase", std::string(nameOf(which))}, {"set_point", shortText(setPoint)},
                                                                 {"unit", record.item.reference.unit}}});
    if (const auto setPoint = hysteresisLeft(evaluation.phase(Phase::AsLeft)))
        notices.push_back({Statement::HysteresisLeft, {{"set_point", shortText(*setPoint)}, {"unit", record.item.reference.unit}}});
    for (const Evaluation::OverdueStandard& late : evaluation.overdue) {
        const Standard& standard = record.standards[late.index];
        notices.push_back({Statement::OverdueStandard,
                           {{"standard", standard.id},
                            {"days", std::to_string(late.days)},
                            {"reason", standard.overdueReason},
                            {"by", standard.overdueBy}}});
    }
    return notices;
}

void uncertaintyStatements(const Record& record, const Certificate& certificate, std::vector<StatementLine>& lines) {
    lines.push_back({Statement::ExpandedUncertainty, {{"coverage", certificate.coveragePercent}}});
    const auto& phases = certificate.phases;
    if (std::any_of(phases.begin(), phases.end(), [](const PhaseSection& phase) { return phase.rectangular; }))
        lines.push_back({Statement::Rectangular, {}});
    bool hysteresis = false, both = false;
    for (const PhaseSection& phase : phases) {
        const Fact named{"phase", std::string(nameOf(phase.phase))};
        if (!phase.budget)
            continue;
        bool repeatability = false, otherPhase = false, resolution = false;
        for (const BudgetRow& row : phase.budget->rows) {
            hysteresis = hysteresis || row.derived == DerivedLine::Hysteresis;
            repeatability = repeatability || row.derived == DerivedLine::Repeatability;
            otherPhase = otherPhase || row.fromOtherPhase;
            resolution = resolution || row.derived == DerivedLine::IndicationResolution;
        }
        both = both || (resolution && repeatability);
        if (otherPhase)
            lines.push_back({Statement::RepeatabilityFromOtherPhase, {named}});
        if (!repeatability)
            lines.push_back({Statement::RepeatabilityMissing, {named}});
    }
    if (both)
        lines.push_back({Statement::ResolutionAndRepeatability, {}});
    if (record.choices.separateDirections)
        lines.push_back({Statement::HysteresisSeparate, {}});
    else if (hysteresis)
        lines.push_back({Statement::HysteresisInUncertainty, {}});
    for (const OmittedLine& omitted : record.budget.omitted)
        lines.push_back({Statement::LineOmitted, {{"line", std::string(nameOf(omitted.line))}, {"reason", omitted.reason}}});
    lines.push_back({Statement::DriftNotIncluded, {}});
}

std::vector<StatementLine> statementsOf(const Record& record, const Certificate& certificate) {
    std::vector<StatementLine> lines;
    const auto& phases = certificate.phases;
    if (std::any_of(phases.begin(), phases.end(), [](const PhaseSection& phase) { return phase.errorKnown; }))
        lines.push_back({Statement::ErrorSign, {}});
    uncertaintyStatements(record, certificate, lines);
    const std::pair<CorrectionUse, Statement> uses[] = {{CorrectionUse::Apply, Statement::CorrectionsApplied},
                                                        {CorrectionUse::AlreadyApplied, Statement::CorrectionsAlreadyApplied},
                                                        {CorrectionUse::None, Statement::CorrectionsNone}};
    for (const auto& [use, statement] : uses)
        if (const std::string ids = standardsWith(record, use); !ids.empty())
            lines.push_back({statement, {{"standards", ids}}});
    lines.push_back({Statement::NoSampling, {}});
    lines.push_back({Statement::OnlyThisItem, {}});
    lines.push_back({Statement::NotReproducedInPart, {}});
    if (record.job.recalibrationAgreed && !record.job.recalibrationDate.empty())
        lines.push_back({Statement::Recalibration, {{"date", record.job.recalibrationDate}}});
    return lines;
}

} // namespace

Certificate buildCertificate(const Record& record, const Evaluation& evaluation, const CertificateContext& context) {
    Certificate certificate;
    certificate.gaps = checklist(record, evaluation);
    certificate.state = stateOf(certificate.gaps);
    certificate.job = record.job;
    certificate.item = record.item;
    certificate.standards = record.standards;
    certificate.conditions = record.conditions;
    certificate.limits = record.limits;
    certificate.signOffs = record.signOffs;
    certificate.calibrated = evaluation.calibrated;
    certificate.coveragePercent = roundedText(100 * record.budget.coverage.toDouble(), std::max(0, record.budget.coverage.decimals - 2));
    for (const Phase which : bothPhases)
        if (const PhaseEvaluation* phase = evaluation.phase(which); phase != nullptr && !phase->verdict.points.empty())
            certificate.phases.push_back(phaseSection(record, *phase));
    if (const PhaseEvaluation* phase = evaluation.phase(record.choices.phase))
        if (phase->fit && phase->fit->method != Method::Robust)
            certificate.function = functionSection(record, *phase);
    certificate.excluded = excludedLines(record);
    certificate.notices = noticesOf(record, evaluation);
    certificate.statements = statementsOf(record, certificate);
    certificate.program = context.program;
    certificate.drawnUpOn = context.drawnUpOn;
    certificate.digest = context.digest;
    return certificate;
}

} // namespace spanwright
