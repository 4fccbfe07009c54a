#!/bin/sh
# SPDX-License-Identifier: MIT
# Format and static checks, for those who change the code. Not part of the test command, because
# they need LLVM 14 and several minutes.
#
#   sh tests/lint.sh [BUILD_FOLDER [FILE...]]      (default: build/test, all sources)
set -eu

source_dir=$(CDPATH='' cd -- "$(dirname -- "$0")/.." && pwd)
build_dir=${1:-$source_dir/build/test}
[ $# -gt 0 ] && shift
jobs=$(getconf _NPROCESSORS_ONLN 2>/dev/null || echo 2)
cd "$source_dir"

. .ci/packages.sh
need_packages clang-format clang-tidy

if [ ! -f "$build_dir/build.ninja" ]; then
  echo "Build first: sh tests/run_all.sh $build_dir" >&2
  exit 2
fi
cmake -DCMAKE_EXPORT_COMPILE_COMMANDS=ON "$build_dir" >/dev/null

# GCC's own warning options are unknown to clang.
tidy="clang-tidy -p $build_dir --quiet --extra-arg=-Wno-unknown-warning-option"
if [ $# -eq 0 ]; then
  find include lib tests bindings-cli benchmarks \( -name '*.hpp' -o -name '*.cpp' \) -print0 |
    xargs -0 clang-format --dry-run -Werror
  # shellcheck disable=SC2086  # $tidy is a command with its options
  find lib bindings-cli -name '*.cpp' -print0 | xargs -0 -P "$jobs" -n 2 $tidy
else
  clang-format --dry-run -Werror "$@"
  $tidy "$@"
fi
echo "No findings."
