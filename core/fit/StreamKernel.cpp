// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/StreamKernel.h"

#define SPANWRIGHT_KERNEL plain
#include "core/fit/StreamKernel.inc"

namespace spanwright {

const StreamKernel& streamKernel() {
#ifdef __x86_64__
    if (__builtin_cpu_supports("avx2") && __builtin_cpu_supports("popcnt"))
        return avx2::kernel;
#endif
    return plain::kernel;
}

} // namespace spanwright
