// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/FigureNames.h"

namespace spanwright {

std::string_view codeName(WarningCode code) {
    switch (code) {
    case WarningCode::ColumnNotExact: return "column-not-exact";
    case WarningCode::NoReplicates: return "no-replicates";
    case WarningCode::OneRun: return "one-run";
    case WarningCode::OneDirection: return "one-direction";
    case WarningCode::NoDegreesOfFreedom: return "no-degrees-of-freedom";
    case WarningCode::RankLost: return "rank-lost";
    case WarningCode::NotConverged: return "not-converged";
    case WarningCode::Extrapolated: return "extrapolated";
    case WarningCode::NoFiniteInterval: return "no-finite-interval";
    case WarningCode::NoAnswer: return "no-answer";
    case WarningCode::SeveralAnswers: return "several-answers";
    case WarningCode::NotMonotonic: return "not-monotonic";
    case WarningCode::IncompleteReadings: return "incomplete-readings";
    case WarningCode::FigureUndefined: return "figure-undefined";
    case WarningCode::ApproximateMethod: return "approximate-method";
    case WarningCode::SealBroken: return "seal-broken";
    case WarningCode::JournalBroken: return "journal-broken";
    case WarningCode::ResultsDiffer: return "results-differ";
    }
    return {};
}

std::string_view codeName(FindingCode code) {
    switch (code) {
    case FindingCode::LackOfFit: return "lack-of-fit";
    case FindingCode::HiddenCurvature: return "hidden-curvature";
    case FindingCode::Hysteresis: return "hysteresis";
    case FindingCode::RunZeroShift: return "run-zero-shift";
    case FindingCode::RunGainChange: return "run-gain-change";
    case FindingCode::FirstRunDiffers: return "first-run-differs";
    case FindingCode::ScatterGrows: return "scatter-grows";
    case FindingCode::Autocorrelated: return "autocorrelated";
    case FindingCode::NonNormal: return "non-normal";
    case FindingCode::Straggler: return "straggler";
    case FindingCode::Outlier: return "outlier";
    case FindingCode::Influential: return "influential";
    case FindingCode::ExcludedReadings: return "excluded-readings";
    case FindingCode::SetPointExcluded: return "set-point-excluded";
    case FindingCode::ManyExcluded: return "many-excluded";
    case FindingCode::TooFewReadings: return "too-few-readings";
    case FindingCode::OutsideBand: return "outside-band";
    case FindingCode::DegreeNotJustified: return "degree-not-justified";
    case FindingCode::ThroughZeroNotSupported: return "through-zero-not-supported";
    case FindingCode::RepeatedReading: return "repeated-reading";
    case FindingCode::Extrapolation: return "extrapolation";
    }
    return {};
}

std::string_view codeName(Severity severity) {
    switch (severity) {
    case Severity::Note: return "note";
    case Severity::Attention: return "attention";
    case Severity::Serious: return "serious";
    }
    return {};
}

std::string_view codeName(Remedy remedy) {
    switch (remedy) {
    case Remedy::None: return "none";
    case Remedy::CompareFunction: return "compare-function";
    case Remedy::CarryToBudget: return "carry-to-budget";
    case Remedy::SeeExclusions: return "see-exclusions";
    case Remedy::SeeReadings: return "see-readings";
    case Remedy::ChooseWeights: return "choose-weights";
    case Remedy::TakeMoreReadings: return "take-more-readings";
    case Remedy::CheckRun: return "check-run";
    }
    return {};
}

std::string_view codeName(SplitPart part) {
    switch (part) {
    case SplitPart::Total: return "total";
    case SplitPart::Regression: return "regression";
    case SplitPart::Residual: return "residual";
    case SplitPart::LackOfFit: return "lack_of_fit";
    case SplitPart::PureError: return "pure_error";
    case SplitPart::Hysteresis: return "hysteresis";
    case SplitPart::RunOffset: return "run_offset";
    case SplitPart::RunSlope: return "run_slope";
    case SplitPart::Repeatability: return "repeatability";
    }
    return {};
}

std::string_view codeName(ConformityState state) {
    switch (state) {
    case ConformityState::Pass: return "pass";
    case ConformityState::ConditionalPass: return "conditional-pass";
    case ConformityState::ConditionalFail: return "conditional-fail";
    case ConformityState::Fail: return "fail";
    }
    return {};
}

} // namespace spanwright
