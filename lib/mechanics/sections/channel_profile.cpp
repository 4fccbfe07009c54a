// SPDX-License-Identifier: MIT
#include "mechanics/sections/channel_profile.hpp"

#include <array>
#include <cmath>
#include <cstddef>
#include <numbers>

namespace bismar::mechanics {

namespace {

/// Gauss-Legendre points and weights on [0, 1], ten points: exact to degree 19. On an arc of a
/// quarter turn the integrands (powers of sine and cosine to degree 4) are then exact to rounding.
struct GaussPoint {
  double u;
  double weight;
};
constexpr std::size_t half_points = 5;
constexpr std::array<double, half_points> abscissae = {0.14887433898163121089,
                                                       0.43339539412924719080,
                                                       0.67940956829902440623,
                                                       0.86506336668898451073,
                                                       0.97390652851717172008};
constexpr std::array<double, half_points> weights = {0.29552422471475287017,
                                                     0.26926671930999635509,
                                                     0.21908636251598204400,
                                                     0.14945134915058059315,
                                                     0.06667134430868813759};

constexpr std::array<GaussPoint, 2 * half_points> gauss_points() {
  std::array<GaussPoint, 2 * half_points> points{};
  for (std::size_t i = 0; i < half_points; ++i) {
    points[2 * i] = {(1.0 - abscissae[i]) / 2.0, weights[i] / 2.0};
    points[2 * i + 1] = {(1.0 + abscissae[i]) / 2.0, weights[i] / 2.0};
  }
  return points;
}
constexpr std::array<GaussPoint, 2 * half_points> gauss = gauss_points();

constexpr double quarter_turn = std::numbers::pi / 2.0;

}  // namespace

ChannelProfile::ChannelProfile(const Dimensions& dimensions) : size_(dimensions) {
  angle_ = std::atan(size_.flange_slope);
  // EN 10365 / EN 10279: eight per cent flanges (h <= 300 mm) are measured at half the width, five
  // per cent flanges (h > 300 mm) at half the overhang; parallel ones are the same everywhere.
  const double overhang = size_.width - size_.web;
  measured_at_ = size_.flange_slope > 0.065 ? size_.width / 2.0 : size_.width - overhang / 2.0;
  const double cosine = std::cos(angle_);
  const double sine = std::sin(angle_);

  Arc& root = arcs_[0];
  root.radius = size_.root_radius;
  root.centre_y = size_.web + root.radius;
  root.centre_z = face(root.centre_y) - root.radius / cosine;
  face_from_ = root.centre_y - root.radius * sine;

  // Tapered flanges are rounded at the tip with half the root radius; parallel ones are square.
  Arc& toe = arcs_[1];
  toe.radius = size_.flange_slope > 0.0 ? size_.root_radius / 2.0 : 0.0;
  toe.centre_y = size_.width - toe.radius;
  toe.centre_z = face(toe.centre_y) + toe.radius / cosine;
  face_to_ = toe.centre_y + toe.radius * sine;
}

double ChannelProfile::face(double y) const {
  return size_.height / 2.0 - size_.flange - size_.flange_slope * (measured_at_ - y);
}

bool ChannelProfile::fits() const {
  return face_from_ <= face_to_ && web_end() >= 0.0 && flange_face_at_web() > 0.0 &&
         arcs_[1].centre_z < size_.height / 2.0;
}

ChannelProfile::EdgePoint ChannelProfile::at(int piece, double u) const {
  if (piece == 0) {
    return {.y = size_.web * u, .z = 0.0, .dy = size_.web, .length = 0.0};
  }
  if (piece == 2) {
    const double run = face_to_ - face_from_;
    const double y = face_from_ + run * u;
    return {.y = y, .z = face(y), .dy = run, .length = run / std::cos(angle_)};
  }
  // An arc turns from the vertical to the face, or from the face to the vertical.
  const Arc& arc = piece == 1 ? arcs_[0] : arcs_[1];
  const double turn = quarter_turn - angle_;
  if (piece == 1) {
    const double phi = turn * u;  // from the web's face
    return {.y = arc.centre_y - arc.radius * std::cos(phi),
            .z = arc.centre_z + arc.radius * std::sin(phi),
            .dy = turn * arc.radius * std::sin(phi),
            .length = turn * arc.radius};
  }
  const double phi = angle_ + turn * u;  // from the vertical through the centre
  return {.y = arc.centre_y + arc.radius * std::sin(phi),
          .z = arc.centre_z - arc.radius * std::cos(phi),
          .dy = turn * arc.radius * std::cos(phi),
          .length = turn * arc.radius};
}

ChannelProfile::Moments ChannelProfile::moments() const {
  const double top = size_.height / 2.0;
  Moments m;
  for (int piece = 0; piece < pieces; ++piece) {
    for (const GaussPoint& point : gauss) {
      const EdgePoint edge = at(piece, point.u);
      const double weight = point.weight * edge.dy;
      const double depth = top - edge.z;
      m.area += weight * depth;
      m.first_y += weight * depth * edge.y;
      m.second_y += weight * depth * edge.y * edge.y;
      m.first_z += weight * depth * (top + edge.z) / 2.0;
      m.second_z += weight * (top * top * top - edge.z * edge.z * edge.z) / 3.0;
      m.half_outline += point.weight * edge.length;
    }
  }
  // Back of the web, outer face, tip, and the web's inner face up to the root arc.
  m.half_outline += top + size_.width + (top - arcs_[1].centre_z) + web_end();
  return m;
}

void ChannelProfile::add_up_to(int piece, double u, double& area, double& first) const {
  const double top = size_.height / 2.0;
  for (const GaussPoint& point : gauss) {
    const EdgePoint edge = at(piece, u * point.u);
    const double strip = u * point.weight * edge.dy * (top - edge.z);
    area += strip;
    first += strip * edge.y;
  }
}

double ChannelProfile::plastic_modulus_z() const {
  const Moments whole = moments();
  double area = 0.0;
  double first = 0.0;
  for (int piece = 0; piece < pieces; ++piece) {
    double area_after = area;
    double first_after = first;
    add_up_to(piece, 1.0, area_after, first_after);
    if (area_after < whole.area / 2.0 && piece + 1 < pieces) {
      area = area_after;
      first = first_after;
      continue;
    }
    // The halving line is in this piece; the area grows with u, so bisection finds it.
    double low = 0.0;
    double high = 1.0;
    for (int step = 0; step < 60; ++step) {
      const double u = (low + high) / 2.0;
      double area_here = area;
      double first_here = first;
      add_up_to(piece, u, area_here, first_here);
      (area_here < whole.area / 2.0 ? low : high) = u;
    }
    add_up_to(piece, (low + high) / 2.0, area, first);
    break;
  }
  // Both halves have the same area, so their moments about the line differ by the line's own share.
  return 2.0 * (whole.first_y - 2.0 * first);
}

}  // namespace bismar::mechanics
