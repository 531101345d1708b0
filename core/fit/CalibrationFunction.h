// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Choices.h"

#include <string>
#include <vector>

namespace spanwright {

struct CoefficientName {
    std::string name;
    std::string unit;
};

/// Names and units of the coefficients as they are reported, from the units of abscissa and ordinate.
std::vector<CoefficientName> coefficientNames(const FunctionChoice& choice, const std::string& abscissaUnit, const std::string& ordinateUnit);

/// Number of coefficients.
std::size_t coefficientCount(const FunctionChoice& choice);

} // namespace spanwright
