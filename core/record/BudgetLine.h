// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/base/Decimal.h"

#include <optional>
#include <string>
#include <vector>

namespace spanwright {

enum class Distribution { Normal, Rectangular, Triangular, UShaped, Student };
/// The unit in which an amount is stated.
enum class Side { Reference, Indication };

/// A contribution added by hand (GUM 4.3). `amount` is U for Normal (divided by `divisor`, the k of its source), a half-width for
/// the bounded distributions, a standard uncertainty for Student.
struct ManualBudgetLine {
    std::string name;
    std::string source;
    Side side = Side::Indication;
    Distribution distribution = Distribution::Rectangular;
    std::optional<Decimal> amount;
    std::optional<Decimal> divisor;          ///< only for Normal; empty: 2
    std::optional<Decimal> degreesOfFreedom; ///< empty: infinite
    std::optional<Decimal> sensitivity;      ///< empty: 1
    bool operator==(const ManualBudgetLine&) const = default;
};

/// The contributions that follow from the record by themselves; each source is used once.
enum class DerivedLine {
    StandardUncertainty, ///< U/k of every reference standard
    StandardDrift,
    ReferenceResolution,
    IndicationResolution,
    Repeatability,
    RunToRun,
    Hysteresis, ///< half the gap, rectangular, where the mean of rising and falling is stated
    Fit,        ///< of the calibration function, where a value is taken from it
};

/// A derived line that the engineer left out, and why.
struct OmittedLine {
    DerivedLine line = DerivedLine::Hysteresis;
    std::string reason;
    bool operator==(const OmittedLine&) const = default;
};

struct BudgetInput {
    std::vector<ManualBudgetLine> lines;
    std::vector<OmittedLine> omitted;
    Decimal coverage{9545, 4, {}}; ///< probability of U
    bool operator==(const BudgetInput&) const = default;
};

} // namespace spanwright
