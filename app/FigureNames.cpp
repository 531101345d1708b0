// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/FigureNames.h"

#include "core/diagnose/FindingName.h"

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
    case WarningCode::NoIndication: return "no-indication";
    case WarningCode::SeveralIndications: return "several-indications";
    case WarningCode::MatrixUnused: return "matrix-unused";
    case WarningCode::SealBroken: return "seal-broken";
    case WarningCode::JournalBroken: return "journal-broken";
    case WarningCode::ResultsDiffer: return "results-differ";
    }
    return {};
}

std::string_view codeName(FindingCode code) {
    return findingName(code);
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

std::string_view codeName(ValueState state) {
    switch (state) {
    case ValueState::Sound: return "sound";
    case ValueState::NoAnswer: return "no-answer";
    case ValueState::OutsideRange: return "outside-range";
    case ValueState::SeveralAnswers: return "several-answers";
    case ValueState::NoFiniteInterval: return "no-finite-interval";
    case ValueState::NoUncertainty: return "no-uncertainty";
    }
    return {};
}

} // namespace spanwright
