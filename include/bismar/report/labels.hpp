// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/report/svg.hpp>

#include <optional>
#include <span>
#include <vector>

namespace bismar::report {

/// A straight stroke of a picture.
struct Segment {
  Point from;
  Point to;
};

/// Whether a segment comes into the inside of a box.
[[nodiscard]] BISMAR_API bool crosses(const Segment& segment, const Box& box);
/// Whether two segments have a point in common.
[[nodiscard]] BISMAR_API bool crosses(const Segment& a, const Segment& b);

/// A label that wants a place beside its marker.
struct LabelRequest {
  Point marker;
  double radius = 4.0;  ///< Of the marker.
  double width = 0.0;
  double height = 0.0;
  double reach = 90.0;  ///< How far from the marker it may stand.
};

/// Where a label stands.
struct LabelPlace {
  Box box;
  std::optional<Segment> leader;  ///< From the marker to the box, where the box stands off.
};

/// What labels have to respect.
struct LabelField {
  Box area;                       ///< Labels stay inside.
  std::vector<Box> obstacles;     ///< Never covered: markers, other text.
  std::vector<Segment> barriers;  ///< Never covered nor crossed: leaders of labels placed before.
  std::vector<Segment> strokes;   ///< Better not covered.
  std::vector<Point> dots;        ///< Better not covered, of less weight.
};

/// Places labels one after the other, in the order given: earlier ones choose first.
///
/// Promise: a placed box lies inside the area, is at least `gap` away from every other placed box,
/// and covers no obstacle, no barrier, no marker of any request and no leader; a leader crosses no
/// other label's box, no obstacle, no barrier and no other leader. A label for which no tried
/// position allows that is left out (nullopt): the caller shows it by a number in a key.
/// Deterministic; time about (requests x positions) x (boxes + strokes + dots).
[[nodiscard]] BISMAR_API std::vector<std::optional<LabelPlace>> place_labels(
    std::span<const LabelRequest> requests, const LabelField& field, double gap = 3.0);

/// Spreads boxes along a line so that none overlap, as close to their wishes as can be: minimises
/// the sum of squared shifts (isotonic regression of the left edges by pooling neighbours).
///
/// @param centres  Wished centres, ascending.  @param widths  One for each.
/// @return the centres in [from, to] with at least `gap` between boxes, or nothing when they do not
/// fit.
/// @throws bismar::InternalError  different lengths, or centres not ascending.
[[nodiscard]] BISMAR_API std::optional<std::vector<double>> fan_out(std::span<const double> centres,
                                                                    std::span<const double> widths,
                                                                    double from,
                                                                    double to,
                                                                    double gap = 6.0);

}  // namespace bismar::report
