#!/bin/sh
# Installs what is missing, builds, and rates the demo site.
set -e
cd "$(dirname "$0")/.."
. vessels/prepare.sh
need_for_build
cmake -C .presets/release.cmake -S . -B build -G Ninja -DVATWRIGHT_TESTS=OFF >&2
cmake --build build --target vatwright >&2
exec build/vatwright screen vessels/brackwater.toml vessels/plasticizer.toml
