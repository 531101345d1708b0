#!/usr/bin/env bash
# SPDX-License-Identifier: GPL-3.0-or-later
# Builds the measuring programs and runs them one after the other; each prints ratios against a reference taken in the same run:
#   ./tests/bench/run.sh [NAME…]      NAME: startup, fit, import, … ; default: all
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/../.."
. app/prepare.sh

install_missing "${build_packages[@]}" libgsl-dev
names=("$@")
[ $# -gt 0 ] || mapfile -t names < <(basename -a -s .cpp tests/bench/bench_*.cpp | sed 's/^bench_//')
targets=("${names[@]/#/bench_}")
case " ${names[*]} " in *' startup '*) targets+=(minimal_chart_window) ;; esac
build build/bench "${targets[@]}" -- -DSPANWRIGHT_BENCH=ON

export QT_QPA_PLATFORM=offscreen
for name in "${names[@]}"; do
  echo "== $name"
  "build/bench/tests/bench_$name"
done
