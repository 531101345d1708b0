// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/evaluate/PrintedFunction.h"

#include <QString>

namespace spanwright {

/// How the coefficients are written for what reads them.
enum class CoefficientForm {
    Plain, ///< formula and numbers, to be typed
    C,     ///< functions in C99, to be compiled
    Csv,   ///< a table: kind, name, value, unit
};
/// "plain", "c", "csv".
std::optional<CoefficientForm> coefficientForm(const QString& name);

/// The whole text: what it is of, the function, where it is valid, check values, that it is no certificate, and the program's mark. Numbers have a decimal
/// point in every locale, since machines read them.
QString coefficientText(const Record& record, const PrintedFunction& printed, CoefficientForm form);

} // namespace spanwright
