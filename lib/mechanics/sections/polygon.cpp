// SPDX-License-Identifier: MIT
#include <bismar/mechanics/polygon.hpp>

#include "mechanics/polygon_cuts.hpp"
#include "mechanics/polygon_faults.hpp"
#include "mechanics/polygon_torsion.hpp"
#include "mechanics/polygon_wall.hpp"
#include "mechanics/rings.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

namespace bismar {

namespace {

using mechanics::cross;
using mechanics::Edge;
using mechanics::Ring;

double area_of(const std::vector<Ring>& rings) {
  double area = 0.0;
  for (const Ring& ring : rings) {
    area += mechanics::signed_area(ring);
  }
  return area;
}

/// By Green's theorem; every edge adds the triangle that it makes with the origin.
SectionPoint centroid_of(const std::vector<Ring>& rings) {
  SectionPoint first;
  for (const Edge& edge : mechanics::edges_of(rings)) {
    const double triangle = cross(edge.from, edge.to) / 2.0;
    first.y += triangle * (edge.from.y + edge.to.y) / 3.0;
    first.z += triangle * (edge.from.z + edge.to.z) / 3.0;
  }
  const double area = area_of(rings);
  return {first.y / area, first.z / area};
}

mechanics::CutMoments moments_of(const std::vector<Edge>& edges) {
  mechanics::CutMoments sum;
  for (const Edge& edge : edges) {
    const SectionPoint& a = edge.from;
    const SectionPoint& b = edge.to;
    const double twice = cross(a, b);
    sum.I_y += twice * (a.z * a.z + a.z * b.z + b.z * b.z) / 12.0;
    sum.I_z += twice * (a.y * a.y + a.y * b.y + b.y * b.y) / 12.0;
    sum.I_yz += twice * (a.y * b.z + 2.0 * a.y * a.z + 2.0 * b.y * b.z + b.y * a.z) / 24.0;
  }
  // What rounding leaves of the product of a symmetric section would tilt its axes.
  if (std::abs(sum.I_yz) < 1e-13 * (sum.I_y + sum.I_z)) {
    sum.I_yz = 0.0;
  }
  return sum;
}

void set_envelope(SectionProperties& section, const Ring& outer) {
  SectionPoint low = outer[0];
  SectionPoint high = outer[0];
  for (const SectionPoint& point : outer) {
    low = {std::min(low.y, point.y), std::min(low.z, point.z)};
    high = {std::max(high.y, point.y), std::max(high.z, point.z)};
  }
  section.height = high.z - low.z;
  section.width = high.y - low.y;
  section.W_el_y = section.I_y / std::max(high.z, -low.z);
  section.W_el_z = section.I_z / std::max(high.y, -low.y);
}

}  // namespace

SectionProperties polygon(std::span<const SectionPoint> outer,
                          std::span<const std::vector<SectionPoint>> holes) {
  std::vector<Ring> rings = mechanics::checked_rings(outer, holes);
  const SectionPoint centroid = centroid_of(rings);
  for (Ring& ring : rings) {
    for (SectionPoint& point : ring) {
      point.y -= centroid.y;
      point.z -= centroid.z;
    }
  }
  const std::vector<Edge> edges = mechanics::edges_of(rings);
  const mechanics::CutMoments moments = moments_of(edges);

  SectionProperties section;
  section.family = SectionFamily::polygon;
  section.area = area_of(rings);
  for (const Edge& edge : edges) {
    (edge.ring == 0 ? section.perimeter : section.inner_perimeter) += edge.length;
  }
  section.I_y = moments.I_y;
  section.I_z = moments.I_z;
  section.I_yz = moments.I_yz;
  set_envelope(section, rings[0]);
  section.fibres = mechanics::convex_hull(rings[0]);
  section.wall = mechanics::least_wall(edges, section.fibres);
  section.ruling_dimension = mechanics::largest_circle(rings, edges);

  const mechanics::Cuts along_z = cuts_across(mechanics::CutDirection::z, edges, moments);
  const mechanics::Cuts along_y = cuts_across(mechanics::CutDirection::y, edges, moments);
  section.W_pl_y = along_z.W_pl;
  section.W_pl_z = along_y.W_pl;
  section.A_v_z = along_z.A_v;
  section.A_v_y = along_y.A_v;
  section.A_s_z = along_z.A_s;
  section.A_s_y = along_y.A_s;

  const mechanics::PolygonTorsion torsion = mechanics::polygon_torsion(rings);
  section.I_t = torsion.I_t;
  section.W_t = torsion.W_t;
  return section;
}

void check_polygon(std::span<const SectionPoint> outer,
                   std::span<const std::vector<SectionPoint>> holes) {
  static_cast<void>(mechanics::checked_rings(outer, holes));
}

SectionPoint polygon_centroid(std::span<const SectionPoint> outer,
                              std::span<const std::vector<SectionPoint>> holes) {
  const SectionPoint centroid = centroid_of(mechanics::checked_rings(outer, holes));
  return {outer[0].y + centroid.y, outer[0].z + centroid.z};
}

}  // namespace bismar
