// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/mechanics/section.hpp>
#include <bismar/sizing/front.hpp>

#include <optional>
#include <span>
#include <string>
#include <vector>

namespace bismar {

/// What the pictures of a front show besides the result.
struct PictureOptions {
  std::optional<double> mass_cap = {};    ///< [kg], drawn as a line where it lies in the view.
  std::optional<double> cost_cap = {};    ///< [currency], likewise.
  std::optional<double> alpha_from = {};  ///< Lower end of the ruler's scale [currency/kg], > 0 ...
  std::optional<double> alpha_to =
      {};              ///< ... and its upper end; by default around the breakpoints.
  double fold = 0.02;  ///< Designs this close share one label.
  double near = 0.05;  ///< The band of near designs, for the words only.
};

// Every picture is an SVG 1.1 document in UTF-8, 960 px wide where no width is given, on white, in
// forms and line styles that stay readable without colour. Labels never overlap: what finds no
// place goes into a key. The same input gives the same bytes. A result without a front gives a
// picture that says so. Each ends with the caution.

/// The trade-off of mass and cost: near and other feasible designs faint, the front as a staircase,
/// designs that some alpha chooses as filled discs, the other front designs as open diamonds.
/// Axes are logarithmic where the front spans more than about a decade. The view keeps to the
/// front; a remark counts the feasible designs outside it.
[[nodiscard]] BISMAR_API std::string tradeoff_svg(const Result& result,
                                                  const ExchangeRuler& ruler,
                                                  const PictureOptions& options = {});

/// The exchange ruler: a logarithmic alpha axis cut into stretches, each with its choice; beneath,
/// how far the runner-up is behind, and who it is. Open diamonds are front designs that no alpha
/// chooses, where they come closest.
[[nodiscard]] BISMAR_API std::string ruler_svg(const Result& result,
                                               const ExchangeRuler& ruler,
                                               const PictureOptions& options = {});

/// Both on one sheet (fits A4 upright): the trade-off above, the ruler below, letters tie them.
[[nodiscard]] BISMAR_API std::string front_picture_svg(const Result& result,
                                                       const ExchangeRuler& ruler,
                                                       const PictureOptions& options = {});

/// What the drawing of a section shows besides its outline.
struct SectionPictureOptions {
  bool load_along_z = true;   ///< An arrow down onto the section.
  bool load_along_y = false;  ///< An arrow from the side.
  std::string load_z = {};    ///< Beside the arrow, "655 N".
  std::string load_y = {};
  std::string title = {};
};

/// The section to scale, with its axes y and z, its load arrows and its dimensions in mm.
///
/// Corner radii of hollow sections follow from the perimeters; the flange thickness of I sections
/// and channels follows from the area without root radii (the picture says so), so that it may
/// differ by a few percent from the table. A polygon is drawn as its convex outline, which is all
/// that its properties tell; the overload below draws it whole.
/// @throws bismar::Error  out_of_range: height or width not finite and > 0.
[[nodiscard]] BISMAR_API std::string section_svg(const SectionProperties& section,
                                                 const SectionPictureOptions& options = {});

/// A polygon section as it is, recesses and holes included; the drawing above knows its convex
/// outline only.
///
/// @param section  Of the polygon, at its real size.
/// @param outline, holes  Corners as in Shape, in any scale and origin, either way round: drawn so
///   that the outline is as high as the section.
/// @throws bismar::Error  out_of_range: height or width not finite and > 0; missing: fewer than 3
///   corners, place "outline" or "holes/0"; not_finite: a corner; conflict, place "outline": it has
///   no height, or at the section's height another width than the section.
[[nodiscard]] BISMAR_API std::string section_svg(const SectionProperties& section,
                                                 std::span<const SectionPoint> outline,
                                                 std::span<const std::vector<SectionPoint>> holes,
                                                 const SectionPictureOptions& options = {});

/// The utilisations of a design as bars against the limit at 1. Bars beyond 1.25 are cut and
/// marked.
[[nodiscard]] BISMAR_API std::string utilisation_svg(const Design& design);

}  // namespace bismar
