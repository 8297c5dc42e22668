#!/bin/sh
# demo.sh [OUT]: builds loqsmith and processes both sample runs into OUT
# (out/ of the checkout when left out).
set -eu
cd "$(dirname "$0")/.."
out=${1:-out}
case $out in
  /*) ;;
  *) [ $# -eq 0 ] || out=$OLDPWD/$out ;;
esac

sh tests/debian-packages.sh g++ cmake ninja-build libboost-dev \
  libboost-program-options-dev libeigen3-dev libssl-dev \
  nlohmann-json3-dev libdeflate-dev

echo "Building loqsmith (a few minutes the first time)"
mkdir -p build
launcher=
if command -v ccache >/dev/null; then
  launcher=-DCMAKE_CXX_COMPILER_LAUNCHER=ccache
fi
cmake -S . -B build/demo -G Ninja -DCMAKE_BUILD_TYPE=Release $launcher \
  -DLOQSMITH_TESTS=OFF >build/demo.log 2>&1 || { cat build/demo.log; exit 1; }
ninja -C build/demo -j 2 --quiet loqsmith
loqsmith=$(find build/demo -type f -name loqsmith -perm -u+x)

for run in well-water-herbicides tablet-coating-solvents; do
  echo
  echo "Processing sample-runs/$run"
  status=0
  "$loqsmith" process "sample-runs/$run" --out "$out" || status=$?
  # 1 means: done, and something needs a person. That is no failure.
  [ "$status" -le 1 ] || exit "$status"
done

echo
echo "Look into $out:"
for run in well-water-herbicides tablet-coating-solvents; do
  for latest in "$out/$run"/run-*; do :; done
  echo "  $latest/results.csv"
  echo "  $latest/report.html"
done
echo "What is true of each sample stands in sample-runs/truth/."
