// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/record/Choices.h"

#include <QString>

namespace spanwright {

/// How a function is fitted, in words.
QString weightsText(Weights weights);
QString methodText(Method method);
QString robustText(RobustWeight weight);

} // namespace spanwright
