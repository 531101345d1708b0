// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/DoubleDouble.h"

namespace spanwright {

DoubleDouble toDoubleDouble(std::int64_t integer) {
    // Both halves are exact in double: the upper one is a multiple of 2^32, the lower one below 2^32.
    const std::int64_t low = integer & 0xffffffff;
    const std::int64_t high = integer - low;
    return DoubleDouble(static_cast<double>(high)) + static_cast<double>(low);
}

DoubleDouble powerOfTen(int exponent) {
    DoubleDouble power = 1.0;
    DoubleDouble base = 10.0;
    for (unsigned rest = static_cast<unsigned>(exponent < 0 ? -exponent : exponent); rest != 0; rest >>= 1) {
        if (rest & 1)
            power *= base;
        base *= base;
    }
    return exponent < 0 ? 1.0 / power : power;
}

} // namespace spanwright
