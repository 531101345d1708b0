# SPDX-License-Identifier: GPL-3.0-or-later
# Sourced by app/run.sh and tests/run.sh: what Spanwright needs of Debian 12, and how it is configured and built.

build_packages=(g++ cmake ninja-build qt6-base-dev qt6-charts-dev libqt6opengl6-dev libeigen3-dev libboost-dev libqd-dev libssl-dev
  libtbb-dev fontconfig fonts-open-sans)
test_packages=(poppler-utils)

# install_missing PACKAGE…: installs those that are not there, as root or with sudo.
install_missing() {
  local package missing=() as_root=()
  for package; do
    [ "$(dpkg-query -W -f='${db:Status-Status}' "$package" 2>/dev/null)" = installed ] || missing+=("$package")
  done
  [ ${#missing[@]} -eq 0 ] && return
  if [ "$(id -u)" -ne 0 ]; then
    command -v sudo >/dev/null || { echo "As root, first: apt-get install ${missing[*]}" >&2; return 1; }
    as_root=(sudo)
  fi
  echo "Installing ${missing[*]}" >&2
  "${as_root[@]}" apt-get update -qq
  "${as_root[@]}" env DEBIAN_FRONTEND=noninteractive apt-get install -y -qq --no-install-recommends "${missing[@]}" >/dev/null
}

# build DIRECTORY TARGET… [-- CMAKE_OPTION…]: configures once, then builds what changed.
build() {
  local directory=$1 targets=() options=()
  shift
  while [ $# -gt 0 ] && [ "$1" != -- ]; do targets+=("$1"); shift; done
  [ $# -gt 0 ] && shift && options=("$@")
  if [ ! -f "$directory/build.ninja" ]; then
    cmake -S . -B "$directory" -G Ninja -DCMAKE_BUILD_TYPE=Release "${options[@]}" >&2
  fi
  cmake --build "$directory" --parallel "$(nproc)" --target "${targets[@]}" >&2
}
