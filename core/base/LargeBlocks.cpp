// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/LargeBlocks.h"

#include <cstdint>
#include <cstdlib> // says whose library it is
#ifdef __GLIBC__
#include <malloc.h>
#include <sys/mman.h>
#include <unistd.h>
#endif

namespace spanwright {

void keepLargeBlocks() {
#ifdef __GLIBC__
    constexpr int Kept = 512 << 20; ///< bytes at the end of the heap that are not given back
    constexpr std::uintptr_t Page = 2 << 20;
    mallopt(M_MMAP_THRESHOLD, Kept);
    mallopt(M_TRIM_THRESHOLD, Kept);
    mallopt(M_ARENA_MAX, 1); // evaluated in one thread, given back in another
    const auto placeOf = [](void* address) { return reinterpret_cast<std::uintptr_t>(address); };
    const auto before = placeOf(sbrk(0));
    // The heap grows by so much at once, as addresses without memory, which comes in large pages when it is first written to.
    mallopt(M_TOP_PAD, Kept);
    void* volatile grown = std::malloc(Page); // volatile: else the compiler leaves both out
    std::free(grown);
    const auto end = placeOf(sbrk(0)), from = (before + Page - 1) / Page * Page;
    if (from < end) // only what was added: it may be that the heap could not grow
        madvise(reinterpret_cast<void*>(from), end - from, MADV_HUGEPAGE);
#endif
}

} // namespace spanwright
