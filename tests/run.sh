#!/bin/sh
# Builds and tests everything, first as released, then under the address and
# undefined-behaviour sanitizers. Works in build/ of the checkout.
set -eu
cd "$(dirname "$0")/.."

sh tests/debian-packages.sh g++ cmake ninja-build libboost-dev \
  libboost-program-options-dev libeigen3-dev libssl-dev \
  nlohmann-json3-dev libdeflate-dev libgtest-dev libxml2-utils locales systemd

launcher=
if command -v ccache >/dev/null; then
  launcher=-DCMAKE_CXX_COMPILER_LAUNCHER=ccache
fi

# build FOLDER CMAKE-OPTION...
build() {
  folder=$1
  shift
  cmake -S . -B "$folder" -G Ninja $launcher "$@" >"$folder.log" 2>&1 ||
    { cat "$folder.log"; return 1; }
  ninja -C "$folder" -j 2 --quiet
}

mkdir -p build
echo "Release: building"
build build/release -DCMAKE_BUILD_TYPE=Release
echo "Release: testing"
ctest --test-dir build/release -j 2 --output-on-failure --no-tests=error

echo "Sanitizers: building"
build build/asan-ubsan -C tests/build-modes/asan-ubsan.cmake
echo "Sanitizers: testing"
ctest --test-dir build/asan-ubsan -j 2 --output-on-failure --no-tests=error
