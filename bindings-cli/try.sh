#!/bin/sh
# SPDX-License-Identifier: MIT
# Installs what the command-line program needs, builds it alone, and runs the demo job: the front of
# a crank lever over the whole starter table, the exchange ruler, and a picture of each.
#
#   sh bindings-cli/try.sh [JOB.json]      (default: data/jobs/crank_lever.json)
set -eu

source_dir=$(CDPATH='' cd -- "$(dirname -- "$0")/.." && pwd)
build_dir=$source_dir/build/cli
job=${1:-$source_dir/data/jobs/crank_lever.json}
jobs=$(getconf _NPROCESSORS_ONLN 2>/dev/null || echo 2)

. "$source_dir/.ci/packages.sh"
need_packages g++ cmake ninja-build nlohmann-json3-dev libcli11-dev libfmt-dev

# -O1: the results are the same bits, the program is quick enough for one part, and it is there a
# third sooner than with the usual -O3.
echo "Building the program in $build_dir (a minute or two)"
mkdir -p "$build_dir"
if ! {
  cmake -S "$source_dir" -B "$build_dir" -G Ninja -DCMAKE_BUILD_TYPE=Release \
    -DCMAKE_CXX_FLAGS_RELEASE='-O1 -DNDEBUG' -DBISMAR_BUILD_TESTS=OFF \
    -DBISMAR_WITH_PAGMO=OFF -DBISMAR_WITH_EIGEN=OFF &&
    cmake --build "$build_dir" --parallel "$jobs" --target bismar_cli
} >"$build_dir/build.log" 2>&1; then
  tail -n 40 "$build_dir/build.log" >&2
  echo "The build failed; the whole log is $build_dir/build.log" >&2
  exit 1
fi

program=$build_dir/bindings-cli/bismar
name=$(basename "$job" .json)
pictures=$source_dir/build/pictures
mkdir -p "$pictures"

run() {
  printf '\n$ bismar'
  printf ' %s' "$@"
  printf '\n\n'
  "$program" "$@"
}
run front "$job" --plot "$pictures/$name-front.svg"
run sweep "$job" --plot "$pictures/$name-ruler.svg"
printf '\nThe program: %s\nThe pictures: %s\n              %s\n' \
  "$program" "$pictures/$name-front.svg" "$pictures/$name-ruler.svg"
