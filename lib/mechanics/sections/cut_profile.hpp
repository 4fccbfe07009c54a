// SPDX-License-Identifier: MIT
#pragma once

#include <vector>

namespace bismar::mechanics {

/// A section seen along one axis x: how much of it lies below a cut, in closed form. Made of strips
/// of constant width and of spandrels (what a fillet adds, what a rounded corner takes away).
class CutProfile {
 public:
  void add_strip(double from, double to, double width);
  /// Spandrels whose corner is at x and that reach from there towards `direction` (+1 or -1);
  /// `count` of them, negative where they are taken away.
  void add_spandrels(double x, double direction, double radius, double count);

  [[nodiscard]] double area_below(double x) const;
  /// First moment about x = 0 of what lies below the cut.
  [[nodiscard]] double first_moment_below(double x) const;
  /// Plastic modulus about the line across x that halves the area.
  [[nodiscard]] double plastic_modulus() const;

 private:
  struct Strip {
    double from = 0.0;
    double to = 0.0;
    double width = 0.0;
  };
  struct Spandrels {
    double corner = 0.0;
    double direction = 1.0;
    double radius = 0.0;
    double count = 1.0;
  };
  std::vector<Strip> strips_;
  std::vector<Spandrels> spandrels_;
  double low_ = 0.0;
  double high_ = 0.0;
};

}  // namespace bismar::mechanics
