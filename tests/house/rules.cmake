# SPDX-License-Identifier: MIT
# cmake -D RULE=... -D SOURCE_DIR=... -P rules.cmake
cmake_minimum_required(VERSION 3.25)

# The floors, lowest first: a file may include headers of its own floor and of lower ones.
set(floor_numeric 1)
set(floor_quantity 1)
set(floor_pareto 1)
set(floor_solver 2)
set(floor_exchange 2)
set(floor_eigen 2)
set(floor_mechanics 3)
set(floor_catalogue 4)
set(floor_sizing 5)
set(floor_family 6)
set(floor_uncertainty 6)
set(floor_model 6)
set(floor_evolve 6)
set(floor_job 7)
set(floor_report 7)

file(
  GLOB_RECURSE library_files
  RELATIVE "${SOURCE_DIR}"
  "${SOURCE_DIR}/include/*.h" "${SOURCE_DIR}/include/*.hpp" "${SOURCE_DIR}/lib/*.hpp"
  "${SOURCE_DIR}/lib/*.cpp"
)
list(LENGTH library_files count)
if(count LESS 5)
  message(FATAL_ERROR "Only ${count} sources found below ${SOURCE_DIR}")
endif()

set(faults "")
macro(fault)
  string(APPEND faults "  " ${ARGN} "\n")
endmacro()

# The floor's folder of a path such as include/bismar/solver/x.hpp or lib/solver/x.cpp.
function(folder_of path result)
  set(${result} "" PARENT_SCOPE)
  if(path MATCHES "^(include/bismar|lib)/([a-z_]+)/")
    set(${result} "${CMAKE_MATCH_2}" PARENT_SCOPE)
  endif()
endfunction()

if(RULE STREQUAL "floors")
  foreach(path IN LISTS library_files)
    folder_of("${path}" folder)
    if(NOT folder)
      continue()
    endif()
    if(NOT DEFINED floor_${folder})
      fault("${path}: '${folder}' is no floor")
      continue()
    endif()
    file(STRINGS "${SOURCE_DIR}/${path}" includes REGEX "^#include ")
    foreach(line IN LISTS includes)
      if(line MATCHES "[<\"](bismar/)?([a-z_]+)/[a-z_/]+\\.hpp[>\"]")
        # On its own, since if() expands its arguments before it matches.
        set(included "${CMAKE_MATCH_2}")
        if(DEFINED floor_${included} AND floor_${included} GREATER floor_${folder})
          fault("${path}: ${line} reaches up from floor ${floor_${folder}}")
        endif()
      endif()
    endforeach()
  endforeach()

elseif(RULE STREQUAL "licence")
  file(
    GLOB_RECURSE files
    RELATIVE "${SOURCE_DIR}"
    "${SOURCE_DIR}/tests/*.hpp" "${SOURCE_DIR}/tests/*.cpp" "${SOURCE_DIR}/tests/*.cmake"
    "${SOURCE_DIR}/tests/CMakeLists.txt" "${SOURCE_DIR}/lib/CMakeLists.txt"
    "${SOURCE_DIR}/lib/*.cmake" "${SOURCE_DIR}/bindings-cli/*.hpp"
    "${SOURCE_DIR}/bindings-cli/*.cpp" "${SOURCE_DIR}/benchmarks/*.cpp"
  )
  foreach(path IN LISTS files library_files)
    file(STRINGS "${SOURCE_DIR}/${path}" lines LIMIT_COUNT 1)
    if(NOT lines MATCHES "^(//|#) SPDX-License-Identifier: MIT$")
      fault("${path}: the first line states no licence")
    endif()
  endforeach()

elseif(RULE STREQUAL "length")
  # A file should be read in one sitting.
  file(
    GLOB_RECURSE files
    RELATIVE "${SOURCE_DIR}"
    "${SOURCE_DIR}/tests/*.cpp" "${SOURCE_DIR}/bindings-cli/*.cpp"
  )
  foreach(path IN LISTS files library_files)
    file(READ "${SOURCE_DIR}/${path}" text)
    string(REGEX REPLACE "[^\n]" "" ends "${text}")
    string(LENGTH "${ends}" lines)
    set(most 600)
    if(path MATCHES "^include/")
      set(most 300)
    endif()
    if(lines GREATER most)
      fault("${path}: ${lines} lines, at most ${most} are allowed")
    endif()
  endforeach()

elseif(RULE STREQUAL "core_alone")
  # JSON in lib/job only, pagmo in lib/evolve only, Eigen in the bridge only, and no header of
  # another project in public.
  foreach(path IN LISTS library_files)
    folder_of("${path}" folder)
    file(STRINGS "${SOURCE_DIR}/${path}" includes REGEX "^#include <(nlohmann|Eigen|pagmo)/")
    foreach(line IN LISTS includes)
      if(line MATCHES "<nlohmann/" AND path MATCHES "^lib/job/")
        continue()
      endif()
      if(line MATCHES "<pagmo/" AND path MATCHES "^lib/evolve/")
        continue()
      endif()
      if(line MATCHES "<Eigen/" AND folder STREQUAL "eigen")
        continue()
      endif()
      fault("${path}: ${line}")
    endforeach()
  endforeach()

elseif(RULE STREQUAL "silent")
  # The library neither prints nor exits nor reads the environment nor uses the locale.
  foreach(path IN LISTS library_files)
    file(
      STRINGS "${SOURCE_DIR}/${path}" lines
      REGEX
        "std::(cout|cerr|clog|printf|puts|getenv|exit|abort|terminate|locale|setlocale|stod|stof|strtod|to_string\\([a-z_]*double)|[^_a-z](printf|getenv|setenv|exit|abort|setlocale|strtod|atof)\\("
    )
    foreach(line IN LISTS lines)
      if(NOT line MATCHES "^ *//")
        string(STRIP "${line}" line)
        fault("${path}: ${line}")
      endif()
    endforeach()
  endforeach()

else()
  message(FATAL_ERROR "No such rule: '${RULE}'")
endif()

if(faults)
  message(FATAL_ERROR "The rule '${RULE}' is broken:\n${faults}")
endif()
