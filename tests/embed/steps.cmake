# SPDX-License-Identifier: MIT
# One consumer test, run by ctest as: cmake -D STEP=... -D ... -P steps.cmake
cmake_minimum_required(VERSION 3.25)
include("${SETTINGS}")

function(run)
  execute_process(COMMAND ${ARGV} COMMAND_ECHO STDOUT COMMAND_ERROR_IS_FATAL ANY)
endfunction()

# The text of the first fenced block of this language in README.md.
function(readme_block language result)
  file(READ "${SOURCE_DIR}/README.md" readme)
  # Semicolons and brackets would make CMake see lists in the text.
  string(REPLACE ";" "<semicolon>" readme "${readme}")
  string(FIND "${readme}" "```${language}\n" from)
  if(from EQUAL -1)
    message(FATAL_ERROR "README.md has no block of ${language}")
  endif()
  string(LENGTH "```${language}\n" skipped)
  math(EXPR from "${from} + ${skipped}")
  string(SUBSTRING "${readme}" ${from} -1 rest)
  string(FIND "${rest}" "```" length)
  string(SUBSTRING "${rest}" 0 ${length} block)
  set(${result} "${block}" PARENT_SCOPE)
endfunction()

# The consumer's program is the one that README.md shows, and prints what README.md says.
function(run_consumer)
  readme_block(cpp shown)
  file(READ "${EMBED_DIR}/consumer.cpp" source)
  string(REPLACE ";" "<semicolon>" source "${source}")
  if(NOT source STREQUAL "// SPDX-License-Identifier: MIT\n${shown}")
    message(FATAL_ERROR "README.md shows another program than tests/embed/consumer.cpp:\n${shown}")
  endif()
  readme_block(text expected)
  execute_process(
    COMMAND ${ARGV}
    COMMAND_ECHO STDOUT
    OUTPUT_VARIABLE printed
    COMMAND_ERROR_IS_FATAL ANY
  )
  if(NOT printed STREQUAL expected)
    message(FATAL_ERROR "The program printed\n${printed}instead of\n${expected}")
  endif()
endfunction()

set(configure "${CMAKE_COMMAND}" -G "${GENERATOR}" "-DCMAKE_CXX_COMPILER=${CXX_COMPILER}"
              "-DCMAKE_CXX_COMPILER_LAUNCHER=${CXX_COMPILER_LAUNCHER}"
)

if(STEP STREQUAL "install")
  # From scratch, so that nothing old hides what is missing.
  file(REMOVE_RECURSE "${PREFIX}")
  run("${CMAKE_COMMAND}" --install "${BINARY_DIR}" --prefix "${PREFIX}")

elseif(STEP STREQUAL "headers")
  # Every public header is listed in its floor's CMakeLists.txt and so installed, and no other file.
  file(GLOB_RECURSE public RELATIVE "${SOURCE_DIR}/include" "${SOURCE_DIR}/include/*.h*")
  list(APPEND public bismar/export.hpp bismar/version.hpp)
  file(GLOB_RECURSE installed RELATIVE "${PREFIX}/${INCLUDE_DIR}" "${PREFIX}/${INCLUDE_DIR}/*")
  if(NOT "job" IN_LIST COMPONENTS)
    list(FILTER public EXCLUDE REGEX "^bismar/job/")
  endif()
  if(NOT "evolve" IN_LIST COMPONENTS)
    list(FILTER public EXCLUDE REGEX "^bismar/evolve/")
  endif()
  list(SORT public)
  list(SORT installed)
  if(NOT public STREQUAL installed)
    set(missing ${public})
    list(REMOVE_ITEM missing ${installed})
    set(surplus ${installed})
    list(REMOVE_ITEM surplus ${public})
    message(FATAL_ERROR "Headers not installed: ${missing}; installed but not public: ${surplus}")
  endif()

elseif(STEP STREQUAL "find_package")
  # LINKED is the component that the program asks for and links.
  run(${configure} -S "${EMBED_DIR}/installed" -B "${WORK_DIR}/installed_${LINKED}"
      "-DCMAKE_PREFIX_PATH=${PREFIX}" "-DWANTED_VERSION=${MAJOR}.${MINOR}"
      "-DWANTED_COMPONENTS=${LINKED}" "-DLINKED=${LINKED}" "-DCMAKE_CXX_FLAGS=${CXX_FLAGS}"
  )
  run("${CMAKE_COMMAND}" --build "${WORK_DIR}/installed_${LINKED}")
  run_consumer("${WORK_DIR}/installed_${LINKED}/consumer")

elseif(STEP STREQUAL "moved")
  # The installed tree may be moved: nothing in it holds on to the first place.
  file(REMOVE_RECURSE "${WORK_DIR}/moved")
  file(COPY "${PREFIX}/" DESTINATION "${WORK_DIR}/moved/elsewhere")
  file(RENAME "${PREFIX}" "${PREFIX}.away")
  execute_process(
    COMMAND
      ${configure} -S "${EMBED_DIR}/installed" -B "${WORK_DIR}/moved/build"
      "-DCMAKE_PREFIX_PATH=${WORK_DIR}/moved/elsewhere" "-DWANTED_VERSION=${MAJOR}.${MINOR}"
      "-DWANTED_COMPONENTS=${LINKED}" "-DLINKED=${LINKED}" "-DCMAKE_CXX_FLAGS=${CXX_FLAGS}"
    COMMAND_ECHO STDOUT
    RESULT_VARIABLE configured
  )
  set(built 1)
  if(configured EQUAL 0)
    execute_process(
      COMMAND "${CMAKE_COMMAND}" --build "${WORK_DIR}/moved/build" RESULT_VARIABLE built
    )
  endif()
  file(RENAME "${PREFIX}.away" "${PREFIX}")
  if(NOT configured EQUAL 0 OR NOT built EQUAL 0)
    message(FATAL_ERROR "The installed tree does not work at another place")
  endif()
  run_consumer("${WORK_DIR}/moved/build/consumer")

elseif(STEP STREQUAL "program")
  # The installed program, moved, works with the tables beside it and with no others.
  set(tree "${WORK_DIR}/program")
  file(REMOVE_RECURSE "${tree}")
  file(COPY "${PREFIX}/" DESTINATION "${tree}")
  set(front "${tree}/${BIN_DIR}/bismar" front "${tree}/${DATA_DIR}/jobs/crank_lever.json")
  run(${front})
  file(WRITE "${tree}/${DATA_DIR}/materials.csv" "no table\n")
  execute_process(COMMAND ${front} RESULT_VARIABLE result ERROR_VARIABLE said)
  file(REMOVE_RECURSE "${tree}")
  if(NOT result EQUAL 2 OR NOT said MATCHES "materials.csv")
    message(FATAL_ERROR "With a spoilt materials.csv the program ends with ${result}:\n${said}")
  endif()

elseif(STEP STREQUAL "refused")
  # WANTED_VERSION or WANTED_COMPONENTS cannot be met; the message must say so.
  execute_process(
    COMMAND
      ${configure} -S "${EMBED_DIR}/installed" -B "${WORK_DIR}/refused"
      "-DCMAKE_PREFIX_PATH=${PREFIX}" "-DWANTED_VERSION=${WANTED_VERSION}"
      "-DWANTED_COMPONENTS=${WANTED_COMPONENTS}"
    COMMAND_ECHO STDOUT
    RESULT_VARIABLE configured
    OUTPUT_VARIABLE said
    ERROR_VARIABLE said
  )
  file(REMOVE_RECURSE "${WORK_DIR}/refused")
  if(configured EQUAL 0)
    message(FATAL_ERROR "find_package accepted what it has to refuse")
  endif()
  string(REGEX REPLACE "[ \n]+" " " said "${said}")
  if(NOT said MATCHES "${EXPECTED_MESSAGE}")
    message(FATAL_ERROR "The refusal does not say '${EXPECTED_MESSAGE}':\n${said}")
  endif()

elseif(STEP STREQUAL "pkg_config")
  set(ENV{PKG_CONFIG_PATH} "${PREFIX}/${LIB_DIR}/pkgconfig")
  execute_process(
    COMMAND "${PKG_CONFIG}" --cflags --libs bismar
    OUTPUT_VARIABLE flags
    OUTPUT_STRIP_TRAILING_WHITESPACE COMMAND_ERROR_IS_FATAL ANY
  )
  execute_process(
    COMMAND "${PKG_CONFIG}" --modversion bismar
    OUTPUT_VARIABLE version
    OUTPUT_STRIP_TRAILING_WHITESPACE COMMAND_ERROR_IS_FATAL ANY
  )
  if(NOT version STREQUAL VERSION)
    message(FATAL_ERROR "pkg-config says version '${version}', not '${VERSION}'")
  endif()
  separate_arguments(flags UNIX_COMMAND "${flags}")
  separate_arguments(cxx_flags UNIX_COMMAND "${CXX_FLAGS}")
  run("${CXX_COMPILER}" -std=c++20 ${cxx_flags} "${EMBED_DIR}/consumer.cpp" -o
      "${WORK_DIR}/pkg_config_consumer" ${flags} "-Wl,-rpath,${PREFIX}/${LIB_DIR}"
  )
  run_consumer("${WORK_DIR}/pkg_config_consumer")

elseif(STEP STREQUAL "subproject")
  set(host ${configure} -S "${EMBED_DIR}/subproject" -B "${WORK_DIR}/subproject"
           "-DBISMAR_SOURCE_DIR=${SOURCE_DIR}" "-DBUILD_SHARED_LIBS=${SHARED_LIBS}"
           # Some optimisation: the random tests of the core take minutes without.
           "-DCMAKE_BUILD_TYPE=Debug" "-DCMAKE_CXX_FLAGS_DEBUG=-O1"
           "-DCMAKE_CXX_FLAGS=-isystem ${EMBED_DIR}/no_optional_packages ${CXX_FLAGS}"
  )
  run(${host} -DHOST_WANTS_TESTS=OFF -UBISMAR_BUILD_TESTS)
  run("${CMAKE_COMMAND}" --build "${WORK_DIR}/subproject" --parallel ${PROCESSORS})
  run_consumer("${WORK_DIR}/subproject/consumer")
  # The core alone passes its tests.
  run(${host} -DHOST_WANTS_TESTS=ON -DBISMAR_BUILD_TESTS=ON)
  run("${CMAKE_COMMAND}" --build "${WORK_DIR}/subproject" --parallel ${PROCESSORS})
  run("${CTEST}" --test-dir "${WORK_DIR}/subproject/bismar/tests" --output-on-failure
      --no-tests=error --parallel ${PROCESSORS}
  )

elseif(STEP STREQUAL "fast_math")
  # The header refuses to be compiled where infinities and exact comparisons do not hold.
  foreach(flag IN ITEMS -ffast-math -Ofast -ffinite-math-only -funsafe-math-optimizations
                        -fassociative-math -O2
  )
    execute_process(
      COMMAND "${CXX_COMPILER}" -std=c++20 ${flag} -fsyntax-only "-I${PREFIX}/${INCLUDE_DIR}"
              "${EMBED_DIR}/consumer.cpp"
      RESULT_VARIABLE compiled
      ERROR_VARIABLE said
    )
    message(STATUS "${flag}: exit ${compiled}")
    if(flag STREQUAL "-O2")
      if(NOT compiled EQUAL 0)
        message(FATAL_ERROR "${flag} is refused: ${said}")
      endif()
    elseif(flag STREQUAL "-fassociative-math")
      # The compiler drops this one by itself while signed zeros count.
      if(compiled EQUAL 0 AND NOT said MATCHES "disabled")
        message(FATAL_ERROR "${flag} is accepted")
      endif()
    elseif(compiled EQUAL 0 OR NOT said MATCHES "bismar cannot be compiled under")
      message(FATAL_ERROR "${flag} is accepted: ${said}")
    endif()
  endforeach()

else()
  message(FATAL_ERROR "No such step: '${STEP}'")
endif()
