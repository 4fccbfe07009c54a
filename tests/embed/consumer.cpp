// SPDX-License-Identifier: MIT
#include <bismar/bismar.hpp>

#include <iostream>

int main() {
  const auto catalogue = bismar::starter_catalogue();  // materials, stock, routes, finishes
  bismar::Part lever{.name = "crank lever 300", .quantity = 10000};
  lever.body = {.length = 0.300,  // [m]
                .shapes = {bismar::ellipse({.height_to_width = 1.25})},
                .load_cases = {bismar::cantilever({bismar::force(655.0, 0.300)})}};  // [N], service
  lever.limits = {.deflection = 12e-3, .mass = 0.5, .cost = 6.0, .routes = {"hot-forging"}};
  const auto result = bismar::front(lever, catalogue);
  for (const auto& stretch : bismar::exchange_ruler(result, lever, catalogue).stretches) {
    std::cout << "from " << bismar::format_significant(stretch.from)
              << " EUR/kg: " << result.designs[stretch.design].material_name << '\n';
  }
}
