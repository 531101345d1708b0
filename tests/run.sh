#!/usr/bin/env bash
# SPDX-License-Identifier: GPL-3.0-or-later
# Installs what is missing, builds, and runs every test:
#   ./tests/run.sh [--sanitize] [OPTION OF ctest…]      --sanitize: under AddressSanitizer and UndefinedBehaviorSanitizer
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/.."
. app/prepare.sh

directory=build options=()
if [ "${1:-}" = --sanitize ]; then
  shift
  directory=build/sanitize options=(-DSPANWRIGHT_SANITIZE=ON)
fi

install_missing "${build_packages[@]}" "${test_packages[@]}"
build "$directory" all -- "${options[@]}"

export QT_QPA_PLATFORM=offscreen
export UBSAN_OPTIONS=print_stacktrace=1
ctest --test-dir "$directory" --output-on-failure --parallel "$(nproc)" "$@"
