// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/PrintedFunction.h"

#include <string>

namespace spanwright {

/// What the functions and their arguments are called.
struct CodeNames {
    std::string reference, indication;
};
/// From the names of the quantities; "reference" and "indication" where these make no two different names in C.
CodeNames codeNames(const Item& item);

/// A complete function in C99 that gives the ordinate for an abscissa, polynomials by Horner's scheme. Needs <math.h>.
std::string functionCode(const PrintedFunction& printed, const CodeNames& names);
/// The function that gives the abscissa for an ordinate: a closed form, or the range halved 60 times. Halving calls the function of
/// functionCode(). Empty where there is none.
std::string inverseCode(const PrintedFunction& printed, const CodeNames& names);

} // namespace spanwright
