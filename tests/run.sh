#!/bin/sh
# Installs what is missing, builds with one compiler and runs all tests; then builds the rooms that meet the outside world with the
# other compiler and sanitizers, runs their tests, and feeds the readers random files for a minute.
set -e
cd "$(dirname "$0")/.."
. vessels/prepare.sh
need_for_build
need "the tests" include/catch2/catch.hpp=catch2 include/gsl/gsl_odeiv2.h=libgsl-dev clang++=clang \
  "lib/llvm-*/lib/clang/*/lib/linux/libclang_rt.fuzzer-$(uname -m).a=libclang-rt-14-dev"

cmake -C .presets/release.cmake -S . -B build -G Ninja -DVATWRIGHT_TESTS=ON
cmake --build build
ctest --test-dir build --output-on-failure -j 2

cmake -C .presets/sanitize.cmake -S . -B build-sanitize -G Ninja
cmake --build build-sanitize --target fuzz_read test_error test_quantity test_field test_input test_kinetics test_numeric
for room in error quantity field input kinetics numeric; do
  build-sanitize/test_$room
done
corpus=build-sanitize/corpus
mkdir -p "$corpus"
cp vessels/*.toml "$corpus"
find tests/refused -name '*.toml' -exec cp {} "$corpus" \;
build-sanitize/fuzz_read -max_total_time=60 -timeout=10 -rss_limit_mb=4096 -max_len=8192 -verbosity=0 "$corpus"
echo "random files for a minute: no crash"
