#!/bin/sh
# debian-packages.sh PACKAGE...: installs those that are missing, quietly.
set -eu

missing=
for package in "$@"; do
  if ! dpkg -s "$package" 2>/dev/null | grep -q '^Status: .* installed$'; then
    missing="$missing $package"
  fi
done
[ -n "$missing" ] || exit 0

if ! command -v apt-get >/dev/null; then
  echo "Not a Debian system: install what corresponds to$missing" >&2
  exit 1
fi
as_root=
if [ "$(id -u)" -ne 0 ]; then
  if ! command -v sudo >/dev/null; then
    echo "Missing, and no sudo here; as root: apt-get install$missing" >&2
    exit 1
  fi
  as_root=sudo
fi
echo "Installing$missing"
export DEBIAN_FRONTEND=noninteractive
$as_root apt-get update -qq
# Word splitting is wanted: one word a package.
# shellcheck disable=SC2086
$as_root apt-get install -y -qq --no-install-recommends $missing >/dev/null
