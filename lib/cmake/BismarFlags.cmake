# SPDX-License-Identifier: MIT
# Compiler settings for the project's own targets. They hang on INTERFACE targets that are linked
# PRIVATE through $<BUILD_INTERFACE:>, so that nothing of them reaches a consumer.

add_library(bismar_warnings INTERFACE)
target_compile_options(
  bismar_warnings
  INTERFACE
    -Wall
    -Wextra
    -Wpedantic
    -Wshadow
    -Wconversion
    -Wsign-conversion
    -Wdouble-promotion
    -Wold-style-cast
    -Wnon-virtual-dtor
    -Woverloaded-virtual
    -Wcast-align
    -Wimplicit-fallthrough
    -Wmissing-declarations
    $<$<CXX_COMPILER_ID:GNU>:-Wduplicated-cond>
    $<$<CXX_COMPILER_ID:GNU>:-Wlogical-op>
    $<$<CXX_COMPILER_ID:GNU>:-Wsuggest-override>
    # GCC 12 sees overlapping copies in std::string's own operator+ at -O3 (its PR 105651).
    $<$<CXX_COMPILER_ID:GNU>:-Wno-restrict>
    $<$<BOOL:${BISMAR_DEVELOPER_MODE}>:-Werror>
)

# No contraction of a*b+c: the same source gives the same bits with and without FMA units.
add_library(bismar_codegen INTERFACE)
target_compile_options(bismar_codegen INTERFACE -ffp-contract=off)

if(BISMAR_SANITIZE)
  if(NOT BISMAR_SANITIZE MATCHES "^(address|undefined|address,undefined|thread)$")
    message(
      FATAL_ERROR
        "BISMAR_SANITIZE is '${BISMAR_SANITIZE}'; allowed: address, undefined, address,undefined "
        "or thread."
    )
  endif()
  target_compile_options(
    bismar_codegen INTERFACE -fsanitize=${BISMAR_SANITIZE} -fno-sanitize-recover=all
                             -fno-omit-frame-pointer
  )
  target_compile_definitions(bismar_codegen INTERFACE _GLIBCXX_ASSERTIONS)
  target_link_options(bismar_codegen INTERFACE -fsanitize=${BISMAR_SANITIZE})
endif()

# Settings that every library of the project shares; NAME is the name after "bismar::".
function(bismar_configure_target target name)
  add_library(bismar::${name} ALIAS ${target})
  set_target_properties(
    ${target}
    PROPERTIES EXPORT_NAME ${name}
               VERSION ${PROJECT_VERSION}
               # While the major version is 0 every minor version may break the binary interface.
               SOVERSION ${PROJECT_VERSION_MAJOR}.${PROJECT_VERSION_MINOR}
               CXX_EXTENSIONS OFF
               # A static library may end up in a shared one of the host.
               POSITION_INDEPENDENT_CODE ON
               # An installed bismar::job finds the core beside it.
               INSTALL_RPATH "$ORIGIN"
               CXX_VISIBILITY_PRESET hidden
               VISIBILITY_INLINES_HIDDEN ON
               VERIFY_INTERFACE_HEADER_SETS ON
  )
  target_compile_features(${target} PUBLIC cxx_std_20)
  target_include_directories(${target} PRIVATE "${PROJECT_SOURCE_DIR}/lib")
  target_link_libraries(
    ${target} PRIVATE $<BUILD_INTERFACE:bismar_warnings> $<BUILD_INTERFACE:bismar_codegen>
  )
endfunction()
