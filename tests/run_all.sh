#!/bin/sh
# SPDX-License-Identifier: MIT
# Installs what is missing, builds everything with warnings as errors, checks that every public
# header compiles alone, and runs all tests.
#
#   sh tests/run_all.sh [BUILD_FOLDER]      (default: build/test)
set -eu

source_dir=$(CDPATH='' cd -- "$(dirname -- "$0")/.." && pwd)
build_dir=${1:-$source_dir/build/test}
jobs=$(getconf _NPROCESSORS_ONLN 2>/dev/null || echo 2)

. "$source_dir/.ci/packages.sh"
need_packages g++ cmake ninja-build pkg-config catch2 nlohmann-json3-dev libeigen3-dev \
  libpagmo-dev libbenchmark-dev libcli11-dev libfmt-dev libvalijson-dev librsvg2-bin

cmake -S "$source_dir" -B "$build_dir" -G Ninja -DCMAKE_BUILD_TYPE=Release \
  -DBISMAR_DEVELOPER_MODE=ON -DBISMAR_BUILD_BENCHMARKS=ON
cmake --build "$build_dir" --parallel "$jobs"
cmake --build "$build_dir" --parallel "$jobs" --target all_verify_interface_header_sets
ctest --test-dir "$build_dir" --output-on-failure --no-tests=error --parallel "$jobs"
