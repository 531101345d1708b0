// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/OptionEffects.h"

#include "core/fit/CalibrationFunction.h"
#include "core/record/Fields.h"

namespace spanwright {

namespace {

using Notes = std::vector<std::string>;

void note(Notes& notes, const Arguments& arguments, const char* option, const std::string& reason) {
    if (arguments.has(option))
        notes.push_back(std::string(option) + " changes nothing here: " + reason);
}

/// What a function or a method decides by itself, whatever was chosen.
void noteOverruled(Notes& notes, const Arguments& arguments, const Choices& choices, const Fit& fit) {
    const std::string function = functionName(fit.function), method(nameOf(fit.method));
    if (fit.direction != choices.fit)
        note(notes, arguments, "--fit", function + " always gives the " + std::string(nameOf(fit.direction)));
    if (fit.weights != choices.weights)
        note(notes, arguments, "--weights", "the fit takes weights " + std::string(nameOf(fit.weights)));
    if (fit.covarianceScale != choices.covariance)
        note(notes, arguments, "--covariance", "the fit takes the covariance from " + std::string(nameOf(fit.covarianceScale)));
}

void noteUncertainties(Notes& notes, const Arguments& arguments, const Fit& fit) {
    const bool both = fit.method == Method::BothUncertain || fit.correlated;
    const bool stated = both || fit.weights == Weights::Stated || fit.covarianceScale == CovarianceScale::Stated;
    const bool forward = fit.direction == FitDirection::Indication;
    const char* ordinate = forward ? "--u-indication" : "--u-reference";
    const char* abscissa = forward ? "--u-reference" : "--u-indication";
    if (!stated)
        note(notes, arguments, ordinate, "the readings have weights " + std::string(nameOf(fit.weights)) + "; --weights stated takes it");
    if (both)
        return;
    const std::string exact = std::string(nameOf(fit.method)) + " takes the abscissa as exact; --method both-uncertain takes it";
    note(notes, arguments, abscissa, exact);
    note(notes, arguments, "--u-covariance", exact);
}

} // namespace

std::optional<std::string> misleadingOption(const Arguments& arguments, const LoadedRecord& loaded) {
    constexpr const char* ofTables[] = {"--reference",    "--indication",   "--set-point", "--direction", "--run",      "--u-reference",
                                        "--u-indication", "--u-covariance", "--time",      "--separator", "--encoding", "--missing"};
    for (const char* option : ofTables)
        if (loaded.session && arguments.has(option))
            return std::string(option) + " is for a table; this is a session, whose columns are known. Leave it out";
    const Method method = loaded.record.choices.method;
    if (arguments.has("--robust") && method != Method::Robust)
        return "--robust says which robust fit, and the method is " + std::string(nameOf(method)) + ". Add --method robust, or leave it out";
    return std::nullopt;
}

std::vector<std::string> optionsWithoutEffect(const Arguments& arguments, const Record& record, const PhaseEvaluation& phase) {
    Notes notes;
    const Choices& choices = record.choices;
    noteOverruled(notes, arguments, choices, *phase.fit);
    noteUncertainties(notes, arguments, *phase.fit);
    if (record.standards.empty())
        note(notes, arguments, "--shared-error", "no standard states an error that its readings share");
    if (choices.at.empty() && choices.read.empty())
        note(notes, arguments, "--repeats", "it belongs to --read and --at");
    if (choices.at.empty())
        note(notes, arguments, "--tolerance-share", "it belongs to --at");
    if (phase.diagnostics && arguments.has("--outliers") && phase.diagnostics->esd.size() < static_cast<std::size_t>(choices.outliers))
        notes.push_back("--outliers " + std::to_string(choices.outliers) + ": " + std::to_string(phase.diagnostics->esd.size()) +
                        " were tried, as " + std::to_string(phase.fit->used) + " readings that scatter allow no more");
    return notes;
}

} // namespace spanwright
