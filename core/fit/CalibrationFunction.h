// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Choices.h"

#include <optional>
#include <span>
#include <string>
#include <string_view>
#include <vector>

namespace spanwright {

/// What there is to know about a family of calibration functions before it is fitted; x and y are abscissa and
/// ordinate. One table, used by the window's chooser, the fit and the tests.
struct FunctionFacts {
    FunctionFamily family;
    std::string_view formula;
    std::string_view where;                ///< the domain as a formula; empty: everywhere
    std::string_view source;               ///< where it is published
    int lowestOrder = 0, highestOrder = 0; ///< degree or terms; 0 when there is none to choose
    std::size_t termsBeyondOrder = 0;      ///< coefficients = order + this
    bool linear = true;                    ///< in its coefficients
    std::optional<FitDirection> only;      ///< where it gives one quantity only
};

std::span<const FunctionFacts> calibrationFunctions();
const FunctionFacts& factsOf(FunctionFamily family);

/// Number of coefficients; of a table, the least.
std::size_t coefficientCount(const FunctionChoice& choice);
/// The least number of set points that determine the function.
std::size_t leastSetPoints(const FunctionChoice& choice);

struct CoefficientName {
    std::string name;
    std::string unit;
};

/// Names and units of `count` coefficients as they are reported, from the units of abscissa and ordinate.
std::vector<CoefficientName> coefficientNames(const FunctionChoice& choice, const std::string& abscissaUnit,
                                              const std::string& ordinateUnit, std::size_t count);

} // namespace spanwright
