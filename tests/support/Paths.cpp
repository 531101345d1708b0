// SPDX-License-Identifier: GPL-3.0-or-later
#include "tests/support/Paths.h"

namespace spanwright::test {

std::string sourceDir() {
    return SPANWRIGHT_SOURCE_DIR;
}

std::string programPath() {
    return SPANWRIGHT_PROGRAM;
}

} // namespace spanwright::test
