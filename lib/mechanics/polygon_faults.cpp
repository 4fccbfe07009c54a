// SPDX-License-Identifier: MIT
#include "mechanics/polygon_faults.hpp"

#include "mechanics/text.hpp"

#include <bismar/error.hpp>
#include <bismar/mechanics/polygon.hpp>

#include <algorithm>
#include <cmath>
#include <cstddef>
#include <string>
#include <utility>

namespace bismar::mechanics {

namespace {

/// Closer than this share of the outline's size is in touch.
constexpr double touching = 1e-9;
/// Largest size over mean thickness: strips up to 2000 : 1, needles up to
/// 1000 : 1. What is thinner takes ever more time, up to minutes.
constexpr double most_slender = 2000.0;

std::string place_of(std::size_t ring) {
  return ring == 0 ? "/outer" : "/holes/" + std::to_string(ring - 1);
}

std::string place_of(std::size_t ring, std::size_t point) {
  return place_of(ring) + "/" + std::to_string(point);
}

std::string points(std::size_t a, std::size_t n) {
  return std::to_string(a) + " to " + std::to_string((a + 1) % n);
}

class Checker {
 public:
  explicit Checker(const std::vector<Ring>& rings)
      : rings_(rings), sound_(rings.size(), true), size_(size_of(rings[0])) {}

  void check() {
    for (std::size_t r = 0; r < rings_.size(); ++r) {
      check_points(r);
      if (sound_[r]) {
        check_repeats(r);
      }
      if (sound_[r]) {
        check_area(r);
      }
      if (sound_[r]) {
        check_edges(r);
      }
    }
    // A ring that is wrong in itself has no inside to compare others with.
    for (std::size_t r = 1; r < rings_.size(); ++r) {
      for (std::size_t other = 0; other < r; ++other) {
        if (sound_[r] && sound_[other]) {
          check_pair(r, other);
        }
      }
    }
    if (faults_.empty()) {
      check_thickness();
    }
    faults_.throw_if_any();
  }

 private:
  void add(Code code, std::string where, std::string found, std::string allowed, std::string text) {
    Fault fault;
    fault.code = code;
    fault.where = std::move(where);
    fault.found = std::move(found);
    fault.allowed = std::move(allowed);
    fault.message = std::move(text);
    faults_.add(std::move(fault));
  }

  /// Larger side of the box round the finite points.
  static double size_of(const Ring& ring) {
    SectionPoint low;
    SectionPoint high;
    bool first = true;
    for (const SectionPoint& p : ring) {
      if (std::isfinite(p.y) && std::isfinite(p.z)) {
        low = first ? p : SectionPoint{std::min(low.y, p.y), std::min(low.z, p.z)};
        high = first ? p : SectionPoint{std::max(high.y, p.y), std::max(high.z, p.z)};
        first = false;
      }
    }
    return std::max(high.y - low.y, high.z - low.z);
  }

  void check_points(std::size_t r) {
    const Ring& ring = rings_[r];
    if (ring.size() < 3) {
      sound_[r] = false;
      add(Code::missing,
          place_of(r),
          std::to_string(ring.size()) + " points",
          "at least 3 points",
          "Found " + std::to_string(ring.size()) + " points; a closed line needs at least 3.");
    }
    for (std::size_t i = 0; i < ring.size(); ++i) {
      if (!std::isfinite(ring[i].y) || !std::isfinite(ring[i].z)) {
        sound_[r] = false;
        add(Code::not_finite,
            place_of(r, i),
            "not a finite number",
            "finite coordinates",
            "A coordinate of this point is not a finite number.");
      }
    }
  }

  void check_repeats(std::size_t r) {
    const Ring& ring = rings_[r];
    for (std::size_t i = 1; i < ring.size(); ++i) {
      for (std::size_t j = 0; j < i; ++j) {
        if (std::hypot(ring[i].y - ring[j].y, ring[i].z - ring[j].z) <= touching * size_) {
          sound_[r] = false;
          add(Code::duplicate,
              place_of(r, i),
              "the place of point " + std::to_string(j),
              "a place of its own",
              "This point is at the place of point " + std::to_string(j) +
                  "; leave it out (the last point is joined to the first by itself).");
          break;
        }
      }
    }
  }

  void check_area(std::size_t r) {
    if (std::abs(signed_area(rings_[r])) <= touching * size_ * size_of(rings_[r])) {
      sound_[r] = false;
      add(Code::out_of_range,
          place_of(r),
          "no area",
          "an area above zero",
          "These points enclose no area: they lie on a line, or the line runs back over itself.");
    }
  }

  void check_edges(std::size_t r) {
    const Ring& ring = rings_[r];
    const std::size_t n = ring.size();
    const auto at = [&](std::size_t i) -> const SectionPoint& { return ring[i % n]; };
    // The first place only: the others follow from it.
    for (std::size_t i = 0; i < n && sound_[r]; ++i) {
      for (std::size_t j = 0; j < i; ++j) {
        bool meet = false;
        if (j + 1 == i || (j == 0 && i + 1 == n)) {
          // Neighbours share a point; they meet again only where one runs back over the other.
          const std::size_t shared = j + 1 == i ? i : j;
          const SectionPoint& before = at(shared + n - 1);
          const SectionPoint& after = at(shared + 1);
          const SectionPoint& corner = at(shared);
          meet = std::min(distance(before, corner, after), distance(after, before, corner)) <=
                 touching * size_;
        } else {
          meet = distance(at(i), at(i + 1), at(j), at(j + 1)) <= touching * size_;
        }
        if (meet) {
          sound_[r] = false;
          add(Code::conflict,
              place_of(r, i),
              "the edge from point " + points(i, n),
              "edges that do not meet",
              "The edge from point " + points(i, n) + " meets the edge from point " + points(j, n) +
                  ": an outline must not cross or touch itself.");
          break;
        }
      }
    }
  }

  void check_pair(std::size_t hole, std::size_t other) {
    const Ring& a = rings_[hole];
    const Ring& b = rings_[other];
    const std::string what = other == 0 ? "the outline" : "hole " + std::to_string(other - 1);
    bool apart = true;
    for (std::size_t i = 0; i < a.size() && apart; ++i) {
      for (std::size_t j = 0; j < b.size(); ++j) {
        if (distance(a[i], a[(i + 1) % a.size()], b[j], b[(j + 1) % b.size()]) <=
            touching * size_) {
          apart = false;
          add(Code::conflict,
              place_of(hole, i),
              "the edge from point " + points(i, a.size()),
              "an edge clear of " + what,
              "The edge from point " + points(i, a.size()) + " crosses or touches " + what +
                  " at its edge from point " + points(j, b.size()) +
                  "; holes need material round them.");
          break;
        }
      }
    }
    if (!apart) {
      return;
    }
    if (other == 0 && !is_inside(a[0], b)) {
      add(Code::conflict,
          place_of(hole),
          "outside the outline",
          "inside the outline",
          "This hole lies outside the outline.");
    } else if (other != 0 && (is_inside(a[0], b) || is_inside(b[0], a))) {
      add(Code::conflict,
          place_of(hole),
          "one inside the other",
          "holes side by side",
          "This hole and " + what + " lie one inside the other.");
    }
  }

  /// Twice the area over the whole perimeter is the mean thickness of anything thin, however it is
  /// turned, bent or closed, and half the thickness of a slender triangle.
  void check_thickness() {
    double area = 0.0;
    double perimeter = 0.0;
    for (std::size_t r = 0; r < rings_.size(); ++r) {
      const Ring& ring = rings_[r];
      const double inside = std::abs(signed_area(ring));
      area += r == 0 ? inside : -inside;
      for (std::size_t i = 0; i < ring.size(); ++i) {
        const SectionPoint edge = ring[(i + 1) % ring.size()] - ring[i];
        perimeter += std::hypot(edge.y, edge.z);
      }
    }
    const double slender = size_ * perimeter / (2.0 * area);
    if (!(slender <= most_slender)) {
      add(Code::out_of_range,
          place_of(0),
          number(slender) + " times its mean thickness",
          "a size of at most " + number(most_slender) + " times the mean thickness",
          "The section is " + number(slender) +
              " times as large as its mean thickness (twice the area over the perimeter, holes "
              "included); at most " +
              number(most_slender) + " times can be solved. Make it thicker, or check its points.");
    }
  }

  const std::vector<Ring>& rings_;
  std::vector<bool> sound_;
  double size_ = 0.0;
  FaultList faults_;
};

}  // namespace

std::vector<Ring> checked_rings(std::span<const SectionPoint> outer,
                                std::span<const std::vector<SectionPoint>> holes) {
  std::size_t count = outer.size();
  for (const std::vector<SectionPoint>& hole : holes) {
    count += hole.size();
  }
  if (count > most_polygon_points) {
    Fault fault;
    fault.code = Code::out_of_range;
    fault.where = "/outer";
    fault.found = std::to_string(count) + " points";
    fault.allowed = "at most " + std::to_string(most_polygon_points);
    fault.message = "Found " + fault.found + " with those of the holes; " + fault.allowed +
                    " are allowed. Round corners with fewer points.";
    throw Error(std::move(fault));
  }
  // From the first point: a far origin would cost digits in every moment.
  const SectionPoint origin = outer.empty() ? SectionPoint{} : outer[0];
  std::vector<Ring> rings;
  const auto add = [&](std::span<const SectionPoint> ring) {
    Ring moved;
    moved.reserve(ring.size());
    for (const SectionPoint& point : ring) {
      // Kept where the origin itself is not finite, so that only the wrong points are named.
      const bool known = std::isfinite(origin.y) && std::isfinite(origin.z);
      moved.push_back(known ? point - origin : point);
    }
    rings.push_back(std::move(moved));
  };
  add(outer);
  for (const std::vector<SectionPoint>& hole : holes) {
    add(hole);
  }
  Checker(rings).check();
  for (std::size_t r = 0; r < rings.size(); ++r) {
    if ((signed_area(rings[r]) > 0.0) != (r == 0)) {
      std::reverse(rings[r].begin(), rings[r].end());
    }
  }
  return rings;
}

}  // namespace bismar::mechanics
