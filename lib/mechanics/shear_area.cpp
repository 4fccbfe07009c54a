// SPDX-License-Identifier: MIT
#include <bismar/mechanics/shear_area.hpp>

#include <bismar/error.hpp>

#include <algorithm>
#include <numbers>
#include <string>
#include <utility>

namespace bismar {

double plastic_shear_area_i(
    double height, double width, double web, double flange, double root_radius) {
  const double area = i_section(height, width, web, flange, root_radius).area;
  return std::max(area - 2.0 * width * flange + (web + 2.0 * root_radius) * flange,
                  (height - 2.0 * flange) * web);
}

double plastic_shear_area_channel(double height,
                                  double width,
                                  double web,
                                  double flange,
                                  double root_radius,
                                  double flange_slope) {
  const double area = channel(height, width, web, flange, root_radius, flange_slope).area;
  return area - 2.0 * width * flange + (web + root_radius) * flange;
}

double plastic_shear_area_tee(
    double height, double width, double web, double flange, double root_radius) {
  const double area = tee(height, width, web, flange, root_radius).area;
  return area - width * flange + (web + 2.0 * root_radius) * flange / 2.0;
}

double plastic_shear_area_tube(const SectionProperties& section) {
  if (section.family == SectionFamily::rectangular_tube) {
    return section.area * section.height / (section.width + section.height);
  }
  if (section.family == SectionFamily::round_tube) {
    return 2.0 * section.area / std::numbers::pi;
  }
  Fault fault;
  fault.code = Code::out_of_range;
  fault.where = "section";
  fault.found = std::string(name(section.family));
  fault.allowed = "a rectangular or a round tube";
  fault.message =
      "Found a section of the kind \"" + fault.found + "\"; it must be " + fault.allowed + ".";
  throw Error(std::move(fault));
}

}  // namespace bismar
