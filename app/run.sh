#!/usr/bin/env bash
# SPDX-License-Identifier: GPL-3.0-or-later
# Installs what is missing, builds, and opens the window on a sample session, or on what is named:
#   ./app/run.sh [ARGUMENT OF spanwright…]
# Where there is no display, prints the figures of the sample and writes its certificate draft.
set -euo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/.."
here=$OLDPWD
. app/prepare.sh

# Whether an X server answers at $DISPLAY.
display_reachable() {
  local display=${DISPLAY:-}
  local host=${display%:*} number=${display##*:}
  [ -n "$display" ] || return 1
  case $host in
    '' | unix) [ -S "/tmp/.X11-unix/X${number%%.*}" ] ;;
    *) (exec 3<>"/dev/tcp/$host/$((6000 + ${number%%.*}))") 2>/dev/null ;;
  esac
}

install_missing "${build_packages[@]}"
build build spanwright

program=$PWD/build/spanwright
sample=$PWD/sample-data/pressure-transmitter.spanwright
draft=$PWD/build/pressure-transmitter.pdf
if [ $# -gt 0 ]; then
  cd "$here"
  exec "$program" "$@"
elif display_reachable; then
  exec "$program" "$sample"
fi
"$program" figures "$sample"
"$program" certificate "$sample" --to "$draft" --replace
echo "There is no display for the window. The certificate draft of the sample is in $draft"
