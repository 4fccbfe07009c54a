// SPDX-License-Identifier: MIT
#include "mechanics/sections/cut_profile.hpp"

#include <algorithm>
#include <cmath>

namespace bismar::mechanics {

namespace {

/// Area and first moment (about u = 0) between an arc of radius r and its tangent, from the point
/// of contact at u = 0 to u: integrals of r - sqrt(r^2 - u^2) and of u times that.
double cap_area(double r, double u) {
  const double chord = std::sqrt(std::max(0.0, (r - u) * (r + u)));
  return r * u - (u * chord + r * r * std::asin(std::min(1.0, u / r))) / 2.0;
}

double cap_moment(double r, double u) {
  const double chord = std::sqrt(std::max(0.0, (r - u) * (r + u)));
  return r * u * u / 2.0 - (r * r * r - chord * chord * chord) / 3.0;
}

/// How much of a spandrel of radius r lies within the distance d of its corner, and its first
/// moment about the corner. The contact with the side lies at d = r, so u = r - d.
struct Part {
  double area = 0.0;
  double moment = 0.0;
};

Part within(double r, double d) {
  const double u = r - std::clamp(d, 0.0, r);
  const double area = cap_area(r, r) - cap_area(r, u);
  const double about_contact = cap_moment(r, r) - cap_moment(r, u);
  return {.area = area, .moment = r * area - about_contact};
}

}  // namespace

void CutProfile::add_strip(double from, double to, double width) {
  strips_.push_back({.from = from, .to = to, .width = width});
  low_ = std::min(low_, from);
  high_ = std::max(high_, to);
}

void CutProfile::add_spandrels(double x, double direction, double radius, double count) {
  if (radius > 0.0) {
    spandrels_.push_back({.corner = x, .direction = direction, .radius = radius, .count = count});
  }
}

double CutProfile::area_below(double x) const {
  double area = 0.0;
  for (const Strip& strip : strips_) {
    area += strip.width * (std::clamp(x, strip.from, strip.to) - strip.from);
  }
  for (const Spandrels& s : spandrels_) {
    const double r = s.radius;
    if (s.direction > 0.0) {
      area += s.count * within(r, x - s.corner).area;
    } else {
      area += s.count * (within(r, r).area - within(r, s.corner - x).area);
    }
  }
  return area;
}

double CutProfile::first_moment_below(double x) const {
  double first = 0.0;
  for (const Strip& strip : strips_) {
    const double to = std::clamp(x, strip.from, strip.to);
    first += strip.width * (to - strip.from) * (to + strip.from) / 2.0;
  }
  for (const Spandrels& s : spandrels_) {
    const double r = s.radius;
    Part part;
    if (s.direction > 0.0) {
      part = within(r, x - s.corner);
    } else {
      const Part whole = within(r, r);
      const Part above = within(r, s.corner - x);
      part = {.area = whole.area - above.area, .moment = whole.moment - above.moment};
    }
    first += s.count * (s.corner * part.area + s.direction * part.moment);
  }
  return first;
}

double CutProfile::plastic_modulus() const {
  const double half = area_below(high_) / 2.0;
  double low = low_;
  double high = high_;
  for (int step = 0; step < 60; ++step) {
    const double x = (low + high) / 2.0;
    (area_below(x) < half ? low : high) = x;
  }
  // Both halves have the same area, so the line's own distance drops out.
  return first_moment_below(high_) - 2.0 * first_moment_below((low + high) / 2.0);
}

}  // namespace bismar::mechanics
