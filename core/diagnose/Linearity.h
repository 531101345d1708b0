// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/diagnose/Diagnostics.h"

namespace spanwright {

/// Straight line against quadratic: F = (SS_line − SS_quadratic)/(SS_quadratic/(n − 3)) with 1 and n − 3 degrees of
/// freedom (ISO 8466-1, Mandel's test), the indication over the reference with the weights of the fit, whatever function
/// that is; of very many readings that a line was fitted to, from its residuals. Empty for fewer than four readings or
/// three different references.
[[nodiscard]] std::optional<TestResult> linearityTest(const Sample& sample, const Residuals& residuals, const Fit& fit);

} // namespace spanwright
