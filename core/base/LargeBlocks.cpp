// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/LargeBlocks.h"

#include <cstdlib> // says whose library it is
#ifdef __GLIBC__
#include <malloc.h>
#endif

namespace spanwright {

void keepLargeBlocks() {
#ifdef __GLIBC__
    constexpr int Kept = 512 << 20; ///< bytes at the end of the heap that are not given back
    mallopt(M_MMAP_THRESHOLD, Kept);
    mallopt(M_TRIM_THRESHOLD, Kept);
    mallopt(M_ARENA_MAX, 1); // evaluated in one thread, given back in another
#endif
}

} // namespace spanwright
