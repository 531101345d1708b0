// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/CommandLine.h"

#include <cstdio>

namespace spanwright {

int runProgram(int argc, char** argv) {
    if (argc > 1) {
        std::fprintf(stderr, "spanwright: unknown command: %s\n", argv[1]);
        return 2;
    }
    return 0;
}

} // namespace spanwright
