#!/usr/bin/env bash
# Fetches documentation that other people wrote, full of printed results, for survey.py to scan.
#
#   tests/realdocs/fetch.sh [FOLDER]        default: realdocs/ at the root of the repository
#
# It needs Debian or a relative of it: the packages come through apt-get and are only unpacked,
# never installed. Nothing of them is committed (realdocs/ is git-ignored): each package keeps
# its own licence, to be found in FOLDER/PACKAGE/usr/share/doc/PACKAGE/copyright.
set -euo pipefail

packages=(
  r-cran-aer
  r-cran-afex
  r-cran-car
  r-cran-emmeans
  r-cran-multilevel
  r-cran-psych
  r-cran-rstatix
  python-statsmodels-doc
)

root=$(cd "$(dirname "${BASH_SOURCE[0]}")/../.." && pwd)
target=${1:-$root/realdocs}
mkdir -p "$target"
target=$(cd "$target" && pwd)
download=$(mktemp -d)
trap 'rm -rf "$download"' EXIT
# As root, apt-get drops its rights while it downloads, so the folder must be its user's.
if [ "$(id -u)" = 0 ] && id -u _apt > /dev/null 2>&1; then
  chown _apt "$download"
fi

for package in "${packages[@]}"; do
  if [ -d "$target/$package" ]; then
    echo "$package: already there"
    continue
  fi
  (cd "$download" && apt-get -qq download "$package")
  rm -rf "$target/$package.part"
  dpkg-deb -x "$download/${package}"_*.deb "$target/$package.part"
  mv "$target/$package.part" "$target/$package"
  echo "$package: $(find "$target/$package" -type f | wc -l) files"
done
