// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/MissingFigures.h"

#include <algorithm>
#include <string_view>

namespace spanwright {

namespace {

/// A figure (or all that begin with it), the warning that explains it when there is one, else the reason's code.
struct Rule {
    std::string_view path;
    WarningCode explained = WarningCode::FigureUndefined;
    std::string_view reason;
};

constexpr Rule rules[] = {
    {"coefficients.standard_uncertainty", WarningCode::NoDegreesOfFreedom, "no-degrees-of-freedom"},
    {"coefficients.", WarningCode::NoDegreesOfFreedom, "no-degrees-of-freedom"},
    {"coefficient_covariance", WarningCode::NoDegreesOfFreedom, "no-degrees-of-freedom"},
    {"residual_sd", WarningCode::NoDegreesOfFreedom, "no-degrees-of-freedom"},
    {"r_squared", WarningCode::FigureUndefined, "no-spread"},
    {"chi_squared", WarningCode::FigureUndefined, "no-stated-uncertainties"},
    {"split.lack_of_fit.", WarningCode::FigureUndefined, "no-test"},
    {"split.regression.", WarningCode::FigureUndefined, "no-test"},
    {"split.residual.", WarningCode::NoDegreesOfFreedom, "no-degrees-of-freedom"},
    {"split.hysteresis.", WarningCode::FigureUndefined, "no-test"},
    {"split.run_offset.", WarningCode::FigureUndefined, "no-test"},
    {"split.run_slope.", WarningCode::FigureUndefined, "no-test"},
    {"split.lack_of_fit", WarningCode::NoReplicates, "set-points"},
    {"split.pure_error", WarningCode::NoReplicates, "no-replicates"},
    {"split.hysteresis", WarningCode::OneDirection, "one-direction"},
    {"split.run_", WarningCode::OneRun, "one-run"},
    {"split.repeatability", WarningCode::FigureUndefined, "directions-and-runs"},
    {"split.components.", WarningCode::FigureUndefined, "no-degrees-of-freedom"},
    {"split", WarningCode::FigureUndefined, "no-degrees-of-freedom"},
    {"at.", WarningCode::NoDegreesOfFreedom, "no-degrees-of-freedom"},
    {"read.reference", WarningCode::NoAnswer, "no-answer"},
    {"read.", WarningCode::NoFiniteInterval, "no-finite-interval"},
    {"diagnostics.durbin_watson", WarningCode::FigureUndefined, "too-few-readings"},
    {"diagnostics.lag1_autocorrelation", WarningCode::FigureUndefined, "too-few-readings"},
    {"diagnostics.effective_readings", WarningCode::FigureUndefined, "too-few-readings"},
    {"diagnostics.shapiro_wilk", WarningCode::FigureUndefined, "three-to-5000-readings"},
    {"diagnostics.breusch_pagan", WarningCode::FigureUndefined, "no-slope-in-function"},
    {"diagnostics.equal_variances", WarningCode::FigureUndefined, "no-replicates-everywhere"},
    {"diagnostics.linearity", WarningCode::FigureUndefined, "not-a-line"},
    {"diagnostics.outliers", WarningCode::FigureUndefined, "too-few-readings"},
    {"performance.hysteresis", WarningCode::OneDirection, "one-direction"},
    {"performance.non_repeatability", WarningCode::OneRun, "one-run"},
    {"performance.measured_error", WarningCode::FigureUndefined, "no-output-range"},
    {"performance.inaccuracy", WarningCode::FigureUndefined, "no-output-range"},
    {"performance", WarningCode::FigureUndefined, "no-set-points"},
    {"rows.", WarningCode::FigureUndefined, "takes-no-part"},
};

bool runsStated(const RowFigures& rows) {
    return std::any_of(rows.runs.begin(), rows.runs.end(), [](std::int32_t run) { return run > 0; });
}

/// The reason of a rule, or a truer one that the evaluation knows; a warning explains only the former.
struct Reason {
    std::string code;
    bool ofRule = true;
};

Reason reasonOf(const std::string& path, const Rule* rule, const PhaseEvaluation& evaluation) {
    const bool freedom = evaluation.fit && evaluation.fit->degreesOfFreedom > 0;
    if (evaluation.fit && evaluation.fit->correlated && path.starts_with("rows."))
        return {"correlated"};
    const bool exact = freedom && evaluation.fit->residualSd == 0;
    for (const char* scatters : {"at.tolerance", "diagnostics.breusch_pagan", "diagnostics.linearity"})
        if (exact && path.starts_with(scatters))
            return {"no-scatter", false};
    if (path.starts_with("at.tolerance") && evaluation.fit && evaluation.fit->covarianceScale == CovarianceScale::Stated)
        return {"stated-covariance", false};
    if (freedom && path.starts_with("at."))
        return {"outside-domain", false};
    if (path.starts_with("degrees."))
        return {"no-scatter", false};
    if (path.starts_with("performance.non_repeatability") && !runsStated(evaluation.rows))
        return {"run-not-stated"};
    return {std::string(rule == nullptr ? "not-given" : rule->reason)};
}

} // namespace

std::vector<Warning> reasonsFor(const std::vector<std::string>& missing, const PhaseEvaluation& evaluation) {
    const auto said = [&](WarningCode code) {
        return code != WarningCode::FigureUndefined &&
               std::any_of(evaluation.warnings.begin(), evaluation.warnings.end(), [&](const Warning& w) { return w.code == code; });
    };
    std::vector<std::pair<std::string, std::string>> figuresOf; // by reason, in order
    const bool correlated = evaluation.fit && evaluation.fit->correlated;
    for (const std::string& path : missing) {
        if (correlated && (path == "split" || path == "diagnostics"))
            continue; // said by a warning of its own
        const auto* found = std::find_if(std::begin(rules), std::end(rules), [&](const Rule& r) { return path.starts_with(r.path); });
        const Rule* rule = found == std::end(rules) ? nullptr : found;
        const auto [reason, ofRule] = reasonOf(path, rule, evaluation);
        if (ofRule && rule != nullptr && (said(rule->explained) || (path.starts_with("split.") && said(WarningCode::NoReplicates))))
            continue;
        const auto known = std::find_if(figuresOf.begin(), figuresOf.end(), [&code = reason](const auto& entry) { return entry.first == code; });
        if (known == figuresOf.end())
            figuresOf.emplace_back(reason, path);
        else
            known->second += ", " + path;
    }
    std::vector<Warning> warnings;
    for (auto& [reason, figures] : figuresOf)
        warnings.push_back({WarningCode::FigureUndefined, {{"figure", figures}, {"reason", reason}}});
    return warnings;
}

} // namespace spanwright
