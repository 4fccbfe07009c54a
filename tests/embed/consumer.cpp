// SPDX-License-Identifier: MIT
// The program of a consumer: the same source is built through find_package, as a subproject and
// through pkg-config. It prints the version of the library and the answer to a typo.
#include <bismar/error.hpp>
#include <bismar/version.hpp>

#include <iostream>
#include <string_view>
#include <vector>

int main() {
  const std::vector<std::string_view> words{"deflection", "yield"};
  try {
    throw bismar::Error({.code = bismar::Code::unknown_name,
                         .where = "/limits",
                         .message = "Unknown limit." + bismar::did_you_mean("deflexion", words)});
  } catch (const bismar::Error& error) {
    std::cout << "bismar " << bismar::version() << " says " << error.what() << '\n';
  }
}
