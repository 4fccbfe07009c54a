// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/sizing/part.hpp>
#include <bismar/sizing/result.hpp>

#include <cstdint>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace bismar {

/// Why a candidate cannot exist. Each rule is a line of the funnel, in the order of the checks, but
/// for `treatment`: sizing tries the treatment that is needed, so only a question about one
/// candidate can meet it.
enum class Rule : std::uint8_t {
  not_asked_for,   ///< The job's own filters: classes, materials, forms, processes.
  structural_use,  ///< Rows marked "no" are never members; "on request" needs the job's leave.
  material_class,  ///< The route does not serve this class of material.
  process,         ///< None of the route's process words is among the material's processes.
  output_form,     ///< The route cannot leave this shape.
  input_form,      ///< The material is not sold in a form that the route takes.
  casting_route,   ///< A cast row enters only through its own casting route.
  condition_lost,  ///< Hot forming destroys the strength of its condition and no treatment restores
                   ///< it.
  treatment,       ///< The treatment does not set the strength of this condition, or is not needed.
  stock_family,    ///< No size of the list is made of this material.
  stock_thickness,  ///< A flat part must have the thickness of a sheet or plate that can be bought.
  finish,           ///< The finish does not go on this material.
};
[[nodiscard]] BISMAR_API std::string_view name(Rule rule);

/// A broken rule, in words.
struct Exclusion {
  Rule rule = Rule::not_asked_for;
  std::string text;  ///< One sentence with what was asked and what is there.
};

/// Whether the route ends with a stock section unchanged (sawing), and so never makes a free size.
[[nodiscard]] BISMAR_API bool keeps_stock(const Route& route);

/// Whether the wall of what the route leaves is that of a bought sheet, plate or board: flat parts
/// cut from it, tubes rolled from it.
[[nodiscard]] BISMAR_API bool takes_sheet_thickness(const Route& route);

/// Whether the route removes material from a blank (machining): its strength was set in the blank.
[[nodiscard]] BISMAR_API bool machines_blank(const Route& route);

/// Whether the route heats the material so far that hardened, tempered, aged and cold-worked
/// strength is lost.
[[nodiscard]] BISMAR_API bool forms_hot(const Route& route);

[[nodiscard]] BISMAR_API bool is_tube(SectionFamily family);
/// I, channel, T, angle.
[[nodiscard]] BISMAR_API bool is_open_section(SectionFamily family);

/// Whether the route can leave a free size of this shape. Never true for a route that keeps stock.
///
/// solid: every solid; tube: round, elliptical and rectangular tubes, but no rectangular ones from
/// winding; cored tube (castings): all of them; welded tube (roll forming): round and rectangular;
/// rectangle (planing): square and rectangle; flat (cutting from sheet, laying up): rectangle; open
/// section: I, channel, T and angle, of bent sheet channel and angle only; cup: no shape of this
/// version. A polygon goes with solids, tubes or open sections, see proportion_rules().
[[nodiscard]] BISMAR_API bool can_leave(const Route& route, SectionFamily family);

/// Whether this condition owes its strength to hardening, tempering, ageing or cold work, which hot
/// forming destroys.
[[nodiscard]] BISMAR_API bool strength_is_lost_when_hot(std::string_view condition);

/// Whether a treatment, or a hot route by itself, sets the strength of this material's condition
/// anew: it restores the condition (see restores()) and the material allows its process.
[[nodiscard]] BISMAR_API bool sets_strength(const Route& step, const MaterialInfo& material);

// The rules one by one; each returns the first that is broken, or nothing.
[[nodiscard]] BISMAR_API std::optional<Exclusion> material_rules(const MaterialInfo& material,
                                                                 const Limits& limits);
[[nodiscard]] BISMAR_API std::optional<Exclusion> route_rules(const MaterialInfo& material,
                                                              const Route& route);
[[nodiscard]] BISMAR_API std::optional<Exclusion> shape_rules(const Route& route,
                                                              SectionFamily family,
                                                              bool from_stock);
/// What the ratios of a free shape ask of a route that can leave its family: bent sheet has one
/// thickness; a polygon with holes is a tube, one without a solid or an open section.
[[nodiscard]] BISMAR_API std::optional<Exclusion> proportion_rules(const Route& route,
                                                                   const Shape& shape);
/// Extruded and pultruded shapes need a row for that product form: tube, bar or section.
[[nodiscard]] BISMAR_API std::optional<Exclusion> drawn_form_rules(const MaterialInfo& material,
                                                                   const Route& route,
                                                                   SectionFamily family);
[[nodiscard]] BISMAR_API std::optional<Exclusion> finish_rules(const MaterialInfo& material,
                                                               const Finish& finish);
/// Treatments (indices into `catalogue.routes`) that the candidate needs: {none} when it needs
/// none, empty when nothing restores its strength.
[[nodiscard]] BISMAR_API std::vector<std::uint32_t> needed_treatments(const MaterialInfo& material,
                                                                      const Route& route,
                                                                      const Catalogue& catalogue);

/// All rules for one candidate, in their order.
[[nodiscard]] BISMAR_API std::optional<Exclusion> first_broken_rule(const Candidate& candidate,
                                                                    const Part& part,
                                                                    const Catalogue& catalogue);

}  // namespace bismar
