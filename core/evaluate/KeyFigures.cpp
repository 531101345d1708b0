// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/evaluate/KeyFigures.h"

#include "core/record/Fields.h"

#include <charconv>
#include <cmath>
#include <map>

namespace spanwright {

namespace {

using Figures = std::vector<std::pair<std::string, std::string>>;

std::string shortest(double value) {
    char text[32];
    const auto [end, problem] = std::to_chars(std::begin(text), std::end(text), value);
    return problem == std::errc{} ? std::string(text, end) : std::string();
}

void add(Figures& figures, const std::string& name, const std::optional<double>& value) {
    if (value && !std::isnan(*value))
        figures.emplace_back(name, shortest(*value));
}

void addRow(Figures& figures, const std::string& name, const std::optional<SplitRow>& row) {
    if (!row)
        return;
    add(figures, name + ".ss", row->ss);
    add(figures, name + ".df", row->df);
}

void addFit(Figures& figures, const std::string& phase, const Fit& fit) {
    for (const Coefficient& coefficient : fit.coefficients) {
        add(figures, phase + "coefficients." + coefficient.name, coefficient.value);
        add(figures, phase + "standard_uncertainties." + coefficient.name, coefficient.standardUncertainty);
    }
    add(figures, phase + "residual_sd", fit.residualSd);
    add(figures, phase + "degrees_of_freedom", fit.degreesOfFreedom);
    add(figures, phase + "r_squared", fit.rSquared);
    add(figures, phase + "chi_squared", fit.chiSquared);
}

void addResults(Figures& figures, const std::string& phase, const PhaseEvaluation& evaluation) {
    for (const PointResult& point : evaluation.verdict.points) {
        std::string name = phase + "results." + shortest(point.setPoint);
        if (point.direction != Direction::Unknown)
            name += "." + std::string(nameOf(point.direction));
        add(figures, name + ".error", point.error);
        add(figures, name + ".expanded", point.expanded);
    }
}

/// Whether two stored texts are the same figure to 12 digits.
bool agree(const std::string& a, const std::string& b) {
    if (a == b)
        return true;
    double x = 0, y = 0;
    const auto readX = std::from_chars(a.data(), a.data() + a.size(), x);
    const auto readY = std::from_chars(b.data(), b.data() + b.size(), y);
    if (readX.ec != std::errc{} || readY.ec != std::errc{})
        return false;
    return std::abs(x - y) <= 1e-12 * std::max(std::abs(x), std::abs(y));
}

} // namespace

std::vector<std::pair<std::string, std::string>> keyFigures(const Evaluation& evaluation) {
    Figures figures;
    for (const auto& phase : evaluation.phases) {
        if (!phase)
            continue;
        const std::string name = std::string(nameOf(phase->phase)) + ".";
        add(figures, name + "readings", static_cast<double>(phase->readings));
        add(figures, name + "excluded", static_cast<double>(phase->excluded));
        if (phase->fit)
            addFit(figures, name, *phase->fit);
        if (phase->split) {
            addRow(figures, name + "lack_of_fit", phase->split->lackOfFit);
            addRow(figures, name + "hysteresis", phase->split->hysteresis);
            addRow(figures, name + "repeatability", phase->split->repeatability);
        }
        addResults(figures, name, *phase);
    }
    return figures;
}

std::vector<Warning> differingFigures(const std::vector<std::pair<std::string, std::string>>& stored, const Evaluation& now) {
    std::map<std::string, std::string> current;
    for (auto& [name, text] : keyFigures(now))
        current.emplace(name, text);
    std::vector<Warning> differences;
    for (const auto& [name, text] : stored) {
        const auto found = current.find(name);
        if (found == current.end())
            differences.push_back({WarningCode::ResultsDiffer, {{"figure", name}, {"stored", text}, {"now", "nothing"}}});
        else if (!agree(text, found->second))
            differences.push_back({WarningCode::ResultsDiffer, {{"figure", name}, {"stored", text}, {"now", found->second}}});
    }
    return differences;
}

} // namespace spanwright
