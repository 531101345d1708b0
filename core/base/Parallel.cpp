// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/base/Parallel.h"

#include <tbb/parallel_for.h>

namespace spanwright {

void inParallel(unsigned threads, const std::function<void(unsigned)>& part) {
    tbb::parallel_for(0u, threads, part);
}

} // namespace spanwright
