// SPDX-License-Identifier: MIT
#include <bismar/mechanics/thin_wall.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <cstddef>
#include <numbers>
#include <string>

namespace bismar {

namespace {

constexpr double pi = std::numbers::pi;

void check(double mean_radius, double wall) {
  FaultList faults;
  mechanics::require_positive(faults, "mean_radius", mean_radius);
  mechanics::require_positive(faults, "wall", wall);
  faults.throw_if_any();
}

void check(const ThinChannel& channel) {
  FaultList faults;
  mechanics::require_positive(faults, "depth", channel.depth);
  mechanics::require_positive(faults, "flange_width", channel.flange_width);
  mechanics::require_positive(faults, "flange", channel.flange);
  mechanics::require_positive(faults, "web", channel.web);
  faults.throw_if_any();
}

}  // namespace

double thin_round_tube_area(double mean_radius, double wall) {
  check(mean_radius, wall);
  return 2.0 * pi * mean_radius * wall;
}

double thin_round_tube_second_moment(double mean_radius, double wall) {
  check(mean_radius, wall);
  return pi * mean_radius * mean_radius * mean_radius * wall;
}

double thin_open_torsion_constant(std::span<const ThinPlate> plates) {
  FaultList faults;
  double sum = 0.0;
  for (std::size_t i = 0; i < plates.size(); ++i) {
    const std::string place = "plates[" + std::to_string(i) + "]/";
    const auto& [length, thickness] = plates[i];
    mechanics::require_positive(faults, place + "length", length);
    mechanics::require_positive(faults, place + "thickness", thickness);
    sum += length * thickness * thickness * thickness / 3.0;
  }
  faults.throw_if_any();
  return sum;
}

double thin_channel_shear_centre(const ThinChannel& channel) {
  check(channel);
  const auto& [h, b, t_f, t_w] = channel;
  return 3.0 * b * b * t_f / (6.0 * b * t_f + h * t_w);
}

double thin_channel_warping_constant(const ThinChannel& channel) {
  check(channel);
  const auto& [h, b, t_f, t_w] = channel;
  return t_f * b * b * b * h * h / 12.0 * (3.0 * b * t_f + 2.0 * h * t_w) /
         (6.0 * b * t_f + h * t_w);
}

}  // namespace bismar
