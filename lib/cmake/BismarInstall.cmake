# SPDX-License-Identifier: MIT
# Install rules: libraries, headers, the CMake package, the pkg-config file, the data.
include(CMakePackageConfigHelpers)

foreach(directory IN ITEMS LIBDIR INCLUDEDIR DATADIR BINDIR)
  if(IS_ABSOLUTE "${CMAKE_INSTALL_${directory}}")
    message(
      FATAL_ERROR
        "CMAKE_INSTALL_${directory} is the absolute path '${CMAKE_INSTALL_${directory}}'. Give a "
        "path relative to the prefix, so that the installed tree can be moved."
    )
  endif()
endforeach()

set(BISMAR_CMAKE_DIR "${CMAKE_INSTALL_LIBDIR}/cmake/bismar")
set(BISMAR_PC_DIR "${CMAKE_INSTALL_LIBDIR}/pkgconfig")

set(BISMAR_COMPONENTS "")
set(BISMAR_PC_LIBS "")
foreach(component IN ITEMS core job evolve eigen bismar)
  if(TARGET bismar_${component})
    list(APPEND BISMAR_COMPONENTS ${component})
    if(component MATCHES "^(core|job)$")
      # A static linker wants users of a library before the library. bismar::evolve is left out, so
      # that not every program comes to need pagmo2.
      list(PREPEND BISMAR_PC_LIBS -lbismar_${component})
    endif()
    install(
      TARGETS bismar_${component}
      EXPORT bismarTargets
      LIBRARY DESTINATION "${CMAKE_INSTALL_LIBDIR}"
      ARCHIVE DESTINATION "${CMAKE_INSTALL_LIBDIR}"
      RUNTIME DESTINATION "${CMAKE_INSTALL_BINDIR}"
      INCLUDES
      DESTINATION "${CMAKE_INSTALL_INCLUDEDIR}"
      FILE_SET HEADERS
      DESTINATION "${CMAKE_INSTALL_INCLUDEDIR}"
    )
  endif()
endforeach()
install(
  EXPORT bismarTargets
  NAMESPACE bismar::
  DESTINATION "${BISMAR_CMAKE_DIR}"
)

set_property(GLOBAL PROPERTY BISMAR_COMPONENTS "${BISMAR_COMPONENTS}")

# A shared library carries its private dependencies itself; with a static one the consumer's link
# needs them. nlohmann/json is headers only and has been compiled in.
set(BISMAR_EVOLVE_NEEDS_PAGMO OFF)
if(TARGET bismar_evolve AND NOT BUILD_SHARED_LIBS)
  set(BISMAR_EVOLVE_NEEDS_PAGMO ON)
endif()
configure_package_config_file(
  "${CMAKE_CURRENT_LIST_DIR}/bismarConfig.cmake.in" "${CMAKE_CURRENT_BINARY_DIR}/bismarConfig.cmake"
  INSTALL_DESTINATION "${BISMAR_CMAKE_DIR}"
  PATH_VARS BISMAR_DATA_DIR
)
# While the major version is 0, a new minor version may break both source and binary.
write_basic_package_version_file(
  "${CMAKE_CURRENT_BINARY_DIR}/bismarConfigVersion.cmake" COMPATIBILITY SameMinorVersion
)
install(FILES "${CMAKE_CURRENT_BINARY_DIR}/bismarConfig.cmake"
              "${CMAKE_CURRENT_BINARY_DIR}/bismarConfigVersion.cmake"
        DESTINATION "${BISMAR_CMAKE_DIR}"
)

file(RELATIVE_PATH BISMAR_PC_PREFIX "/${BISMAR_PC_DIR}" "/")
string(REGEX REPLACE "/$" "" BISMAR_PC_PREFIX "${BISMAR_PC_PREFIX}")
list(JOIN BISMAR_PC_LIBS " " BISMAR_PC_LIBS)
set(BISMAR_PC_LIBS_PRIVATE "-pthread -ldl")
if(BUILD_SHARED_LIBS)
  set(BISMAR_PC_CFLAGS "")
else()
  set(BISMAR_PC_CFLAGS "-DBISMAR_STATIC_DEFINE")
  # An archive does not pull in what it needs, and not every caller asks for --static.
  string(APPEND BISMAR_PC_LIBS " ${BISMAR_PC_LIBS_PRIVATE}")
endif()
configure_file(
  "${CMAKE_CURRENT_LIST_DIR}/bismar.pc.in" "${CMAKE_CURRENT_BINARY_DIR}/bismar.pc" @ONLY
)
install(FILES "${CMAKE_CURRENT_BINARY_DIR}/bismar.pc" DESTINATION "${BISMAR_PC_DIR}")

install(FILES "${PROJECT_SOURCE_DIR}/lib/LICENSE"
        DESTINATION "${CMAKE_INSTALL_DATADIR}/doc/bismar"
)
install(DIRECTORY "${PROJECT_SOURCE_DIR}/data/" DESTINATION "${BISMAR_DATA_DIR}")
