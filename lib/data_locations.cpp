// SPDX-License-Identifier: MIT
#include "data_locations.hpp"

#include "data_paths.hpp"

#include <algorithm>
#include <filesystem>
#include <system_error>

#ifndef BISMAR_STATIC_DEFINE
#include <dlfcn.h>
#endif

namespace bismar::detail {

namespace {

namespace fs = std::filesystem;

/// The file that holds this code, or an empty path where the system does not tell.
fs::path own_file() {
  std::error_code failure;
#ifdef BISMAR_STATIC_DEFINE
  // dladdr would give argv[0], which a caller may set to anything.
  const fs::path file = fs::canonical("/proc/self/exe", failure);
#else
  static const char anchor = 0;  // its address lies in this library, whoever calls
  Dl_info info{};
  if (dladdr(&anchor, &info) == 0 || info.dli_fname == nullptr) {
    return {};
  }
  const fs::path file = fs::canonical(info.dli_fname, failure);
#endif
  return failure ? fs::path() : file;
}

bool lies_in(const fs::path& file, const fs::path& folder) {
  std::error_code failure;
  const fs::path real_folder = fs::canonical(folder, failure);
  if (failure) {
    return false;
  }
  const auto [end_of_folder, rest] =
      std::mismatch(real_folder.begin(), real_folder.end(), file.begin(), file.end());
  return end_of_folder == real_folder.end();
}

}  // namespace

std::vector<std::string> data_locations() {
  std::vector<std::string> locations;
  const fs::path file = own_file();
  if (!file.empty()) {
    locations.push_back((file.parent_path() / data_from_module).lexically_normal().string());
    if (lies_in(file, build_tree)) {
      locations.emplace_back(source_data);
    }
  }
  locations.emplace_back(installed_data);
  return locations;
}

}  // namespace bismar::detail
