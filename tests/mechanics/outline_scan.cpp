// SPDX-License-Identifier: MIT
#include "mechanics/outline_scan.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <numbers>

namespace bismar::test {

namespace {

constexpr double pi = std::numbers::pi;

struct Slab {
  double low = 0.0;
  double high = 0.0;
  double width_low = 0.0;  ///< Width is linear inside.
  double width_high = 0.0;
  [[nodiscard]] double width(double z) const {
    return width_low + (width_high - width_low) * (z - low) / (high - low);
  }
  /// Integral of width times (z - about).
  [[nodiscard]] double first(double from, double to, double about) const {
    const double middle = (from + to) / 2.0;  // Simpson, exact for the quadratic
    return (to - from) / 6.0 *
           (width(from) * (from - about) + 4.0 * width(middle) * (middle - about) +
            width(to) * (to - about));
  }
  [[nodiscard]] double area(double to) const { return (to - low) * (width_low + width(to)) / 2.0; }
};

std::vector<double> crossings(const std::vector<Outline>& outlines, double z) {
  std::vector<double> ys;
  for (const Outline& outline : outlines) {
    for (std::size_t i = 0; i < outline.size(); ++i) {
      const SectionPoint& a = outline[i];
      const SectionPoint& b = outline[(i + 1) % outline.size()];
      if ((a.z < z) != (b.z < z)) {
        ys.push_back(a.y + (b.y - a.y) * (z - a.z) / (b.z - a.z));
      }
    }
  }
  std::sort(ys.begin(), ys.end());
  return ys;
}

}  // namespace

void add_arc(Outline& outline, double y, double z, double radius, double from, double to) {
  if (radius <= 0.0) {
    outline.push_back({.y = y, .z = z});
    return;
  }
  constexpr int steps = 400;
  for (int k = 0; k <= steps; ++k) {
    const double phi = from + (to - from) * k / steps;
    outline.push_back({.y = y + radius * std::cos(phi), .z = z + radius * std::sin(phi)});
  }
}

Outline ellipse(double semi_y, double semi_z) {
  constexpr int steps = 6000;
  Outline outline;
  for (int k = 0; k < steps; ++k) {
    const double phi = 2.0 * pi * (k + 0.5) / steps;
    outline.push_back({.y = semi_y * std::cos(phi), .z = semi_z * std::sin(phi)});
  }
  return outline;
}

Outline transposed(const Outline& outline) {
  Outline other = outline;
  for (SectionPoint& point : other) {
    std::swap(point.y, point.z);
  }
  return other;
}

OutlineScan::OutlineScan(const std::vector<Outline>& outlines) {
  std::vector<double> levels;
  for (const Outline& outline : outlines) {
    for (const SectionPoint& point : outline) {
      levels.push_back(point.z);
    }
  }
  std::sort(levels.begin(), levels.end());
  const double size = levels.back() - levels.front();
  std::vector<Slab> slabs;
  double Sy = 0.0;
  double Sz = 0.0;
  double Jyy = 0.0;
  double Jzz = 0.0;
  double Jyz = 0.0;
  for (std::size_t k = 0; k + 1 < levels.size(); ++k) {
    const double low = levels[k];
    const double high = levels[k + 1];
    if (high - low < 1e-12 * size) {
      continue;
    }
    // Two Gauss points: exact for the cubics that straight edges give.
    const double middle = (low + high) / 2.0;
    const double reach = (high - low) / 2.0 / std::numbers::sqrt3;
    double widths[2] = {0.0, 0.0};
    for (int g = 0; g < 2; ++g) {
      const double at = middle + (g == 0 ? -reach : reach);
      const double weight = (high - low) / 2.0;
      const std::vector<double> ys = crossings(outlines, at);
      for (std::size_t i = 0; i + 1 < ys.size(); i += 2) {
        const double from = ys[i];
        const double to = ys[i + 1];
        const double width = to - from;
        widths[g] += width;
        area += weight * width;
        Sy += weight * width * (from + to) / 2.0;
        Sz += weight * width * at;
        Jyy += weight * (to * to * to - from * from * from) / 3.0;
        Jzz += weight * width * at * at;
        Jyz += weight * width * (from + to) / 2.0 * at;
      }
    }
    const double mean = (widths[0] + widths[1]) / 2.0;
    const double half = (widths[1] - widths[0]) / 2.0 * std::numbers::sqrt3;
    slabs.push_back(
        {.low = low, .high = high, .width_low = mean - half, .width_high = mean + half});
  }
  y = Sy / area;
  z = Sz / area;
  I_y = Jzz - area * z * z;
  I_z = Jyy - area * y * y;
  I_yz = Jyz - area * y * z;

  double below = 0.0;
  double halving = levels.front();
  for (const Slab& slab : slabs) {
    const double whole = slab.area(slab.high);
    if (below < area / 2.0 && below + whole >= area / 2.0) {
      double low = slab.low;
      double high = slab.high;
      for (int step = 0; step < 60; ++step) {
        halving = (low + high) / 2.0;
        (below + slab.area(halving) < area / 2.0 ? low : high) = halving;
      }
    }
    below += whole;
  }
  double outside = 0.0;  // first moment about the centroid of what lies below
  for (const Slab& slab : slabs) {
    const double cut = std::clamp(halving, slab.low, slab.high);
    W_pl += slab.first(cut, slab.high, halving) - slab.first(slab.low, cut, halving);
    constexpr int parts = 40;
    const double step = (slab.high - slab.low) / parts;
    for (int p = 0; p < parts; ++p) {
      const double from = slab.low + p * step;
      const double middle = from + step / 2.0;
      const double S = outside + slab.first(from, middle, z);
      peak_shear = std::max(peak_shear, std::abs(S) / (I_y * slab.width(middle)));
      energy += step * S * S / (slab.width(middle) * I_y * I_y);
      outside += slab.first(from, from + step, z);
    }
  }
}

}  // namespace bismar::test
