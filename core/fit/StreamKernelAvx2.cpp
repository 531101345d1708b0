// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/StreamKernel.h"

#ifdef __x86_64__
#pragma GCC target("avx2,popcnt")
#define SPANWRIGHT_KERNEL avx2
#include "core/fit/StreamKernel.inc"
#endif
