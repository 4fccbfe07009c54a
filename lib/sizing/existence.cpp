// SPDX-License-Identifier: MIT
#include <bismar/sizing/existence.hpp>

#include "sizing/blank.hpp"
#include "sizing/shape_section.hpp"
#include "sizing/strength.hpp"
#include "sizing/words.hpp"

#include <algorithm>
#include <array>
#include <cctype>

namespace bismar {

namespace {

bool found_in(std::string_view text, std::string_view word) {
  return text.find(word) != std::string_view::npos;
}

bool is_extrusion(const Route& route) { return contains_word(route.process_words, "extrusion"); }

bool rolls_tube(const Route& route) { return contains_word(route.leaves, "welded tube"); }

/// Makes an open section by bending sheet of one thickness.
bool bends_sheet(const Route& route) {
  return contains_word(route.leaves, "open section") &&
         shares_word(route.process_words,
                     std::array<std::string, 3>{"cold forming", "press forming", "hot forming"});
}

/// A temper whose letter and digits stand as a word of its own, as "T3" in "T3, bar".
bool has_temper(std::string_view condition, std::string_view prefix) {
  for (std::size_t at = 0; at + prefix.size() < condition.size() + 1; ++at) {
    const bool starts = at == 0 || std::isalnum(static_cast<unsigned char>(condition[at - 1])) == 0;
    const std::size_t next = at + prefix.size();
    const bool digit =
        std::isdigit(static_cast<unsigned char>(prefix.back())) != 0 ||
        (next < condition.size() && std::isdigit(static_cast<unsigned char>(condition[next])) != 0);
    if (starts && digit && condition.substr(at, prefix.size()) == prefix) {
      return true;
    }
  }
  return false;
}

/// "T6", "H14", "H900", "P1070", "TH1050", "R430" as a word of its own: heat-treatment,
/// strain-hardening and (copper alloys) drawn tempers.
bool has_temper(std::string_view condition) {
  static constexpr std::array<std::string_view, 5> prefixes = {"TH", "T", "H", "P", "R"};
  return std::any_of(prefixes.begin(), prefixes.end(), [&](std::string_view prefix) {
    return has_temper(condition, prefix);
  });
}

/// Strength from cold work, which extrusion destroys as forging does; what extrusion keeps is the
/// temper that is set at the press and by ageing afterwards (T4, T5, T6).
bool is_cold_worked(std::string_view condition) {
  static constexpr std::array<std::string_view, 5> tempers = {"T3", "T8", "T9", "H", "R"};
  static constexpr std::array<std::string_view, 3> words = {
      "cold drawn", "cold rolled", "cold worked"};
  return std::any_of(tempers.begin(),
                     tempers.end(),
                     [&](std::string_view temper) { return has_temper(condition, temper); }) ||
         std::any_of(words.begin(), words.end(), [&](std::string_view word) {
           return found_in(condition, word);
         });
}

/// A seam takes the strength of heat treatment, ageing and cold work; of aluminium O, H111 and H112
/// have nothing to lose.
bool is_softened_by_welding(const MaterialInfo& material) {
  const std::string_view condition = material.condition;
  if (material.material_class == "aluminium") {
    return has_temper(condition, "T") ||
           (has_temper(condition, "H") && !found_in(condition, "H111") &&
            !found_in(condition, "H112"));
  }
  if (is_steel(material)) {
    return !steel_keeps_strength_welded(condition);
  }
  return is_cold_worked(condition) || found_in(condition, "aged");
}

}  // namespace

std::string_view name(Rule rule) {
  switch (rule) {
    case Rule::not_asked_for:
      return "not asked for";
    case Rule::structural_use:
      return "not for structural use";
    case Rule::material_class:
      return "route does not serve the class";
    case Rule::process:
      return "process not possible";
    case Rule::output_form:
      return "route cannot leave the shape";
    case Rule::input_form:
      return "not sold in a form the route takes";
    case Rule::casting_route:
      return "cast grade, other route";
    case Rule::condition_lost:
      return "condition lost";
    case Rule::treatment:
      return "treatment does not fit";
    case Rule::stock_family:
      return "no such stock";
    case Rule::stock_thickness:
      return "no such thickness";
    case Rule::finish:
      return "finish does not go on it";
  }
  return "unknown rule";
}

bool keeps_stock(const Route& route) { return contains_word(route.leaves, "stock"); }

bool machines_blank(const Route& route) { return contains_word(route.process_words, "machining"); }

bool takes_sheet_thickness(const Route& route) {
  return (contains_word(route.leaves, "flat") || rolls_tube(route) || bends_sheet(route)) &&
         shares_word(route.takes, std::array<std::string, 2>{"sheet", "plate"});
}

bool is_tube(SectionFamily family) {
  return family == SectionFamily::round_tube || family == SectionFamily::rectangular_tube ||
         family == SectionFamily::elliptical_tube;
}

bool is_open_section(SectionFamily family) {
  return family == SectionFamily::i_section || family == SectionFamily::channel ||
         family == SectionFamily::tee || family == SectionFamily::angle;
}

bool forms_hot(const Route& route) {
  return contains_word(route.process_words, "hot forging") ||
         contains_word(route.process_words, "hot forming");
}

bool can_leave(const Route& route, SectionFamily family) {
  if (route.kind != RouteKind::primary || keeps_stock(route)) {
    return false;
  }
  const auto leaves = [&](std::string_view word) { return contains_word(route.leaves, word); };
  switch (family) {
    case SectionFamily::solid_round:
    case SectionFamily::solid_ellipse:
    case SectionFamily::solid_hexagon:
      return leaves("solid");
    case SectionFamily::solid_square:
      return leaves("solid") || leaves("rectangle");
    case SectionFamily::solid_rectangle:
      return leaves("solid") || leaves("rectangle") || leaves("flat");
    case SectionFamily::round_tube:
      return leaves("tube") || leaves("cored tube") || leaves("welded tube");
    case SectionFamily::rectangular_tube: {
      const bool wound = contains_word(route.process_words, "filament winding");
      return (leaves("tube") && !wound) || leaves("cored tube") || leaves("welded tube");
    }
    case SectionFamily::elliptical_tube:
      return leaves("tube") || leaves("cored tube");
    case SectionFamily::channel:
    case SectionFamily::angle:
      return leaves("open section");
    case SectionFamily::i_section:
    case SectionFamily::tee:
      // Bending a sheet makes one thickness without a branch.
      return leaves("open section") && !bends_sheet(route);
    case SectionFamily::polygon:
      return leaves("solid") || leaves("tube") || leaves("cored tube") ||
             (leaves("open section") && !bends_sheet(route));
  }
  return false;
}

bool strength_is_lost_when_hot(std::string_view condition) {
  // "controlled cooled from hot forming" and "normalised" are reached by the forging itself.
  static constexpr std::array<std::string_view, 9> words = {"quenched",
                                                            "hardened",
                                                            "tempered",
                                                            "aged",
                                                            "cold drawn",
                                                            "cold rolled",
                                                            "cold worked",
                                                            "stress relieved",
                                                            "thermomechanically"};
  return has_temper(condition) ||
         std::any_of(words.begin(), words.end(), [&](std::string_view word) {
           return found_in(condition, word);
         });
}

bool sets_strength(const Route& step, const MaterialInfo& material) {
  return (step.process_words.empty() || shares_word(step.process_words, material.processes)) &&
         restores(step, material.material_class, material.condition);
}

std::optional<Exclusion> material_rules(const MaterialInfo& material, const Limits& limits) {
  const auto exclude = [&](std::string text) {
    return Exclusion{Rule::not_asked_for, std::move(text)};
  };
  if (!limits.classes.empty() && !contains_word(limits.classes, material.material_class)) {
    return exclude("The job asks for " + joined(limits.classes) + "; this is " +
                   material.material_class + ".");
  }
  if (!limits.materials.empty() && !contains_word(limits.materials, material.id)) {
    return exclude("The job names its materials and this is not one of them.");
  }
  if (contains_word(limits.forbidden_materials, material.id) ||
      contains_word(limits.forbidden_materials, material.material_class)) {
    return exclude("The job forbids this material or its class.");
  }
  if (!limits.forms.empty() && !shares_word(limits.forms, material.forms)) {
    return exclude("The job asks for the form " + joined(limits.forms, " or ") +
                   "; it is sold as " + joined(material.forms) + ".");
  }
  for (const auto& process : limits.processes) {
    if (!contains_word(material.processes, process)) {
      return exclude("The job requires the process \"" + process + "\"; it allows " +
                     joined(material.processes) + ".");
    }
  }
  if (material.use == StructuralUse::no) {
    return Exclusion{Rule::structural_use,
                     "Its values are means or it is a core material: it is never a member."};
  }
  if (material.use == StructuralUse::on_request) {
    const bool hard = is_metal(material.material_class);
    if (hard ? !limits.allow_hard : !limits.allow_brittle) {
      return Exclusion{Rule::structural_use,
                       hard ? "Very hard: admitted only with \"allow_hard\"."
                            : "Brittle: admitted only with \"allow_brittle\"."};
    }
  }
  return std::nullopt;
}

std::optional<Exclusion> route_rules(const MaterialInfo& material, const Route& route) {
  if (!contains_word(route.classes, material.material_class)) {
    return Exclusion{Rule::material_class,
                     "The route \"" + route.title + "\" serves " + joined(route.classes) +
                         ", not " + material.material_class + "."};
  }
  if (!route.process_words.empty() && !shares_word(route.process_words, material.processes)) {
    return Exclusion{Rule::process,
                     "The route needs " + joined(route.process_words, " or ") +
                         "; the material allows " + joined(material.processes) + "."};
  }
  if (is_cast(material) && machines_blank(route)) {
    return Exclusion{Rule::casting_route,
                     "A cast grade becomes a part by its own casting route (" +
                         joined(material.processes) + "), not from bar or plate."};
  }
  // Hot forging makes its own blank: it takes bar, and grades that are listed as forgings.
  const bool takes = shares_word(route.takes, material.forms) ||
                     (forms_hot(route) && contains_word(material.forms, "forging"));
  if (!takes) {
    return Exclusion{Rule::input_form,
                     "The route takes " + joined(route.takes, " or ") +
                         "; the material is sold as " + joined(material.forms) + "."};
  }
  if (rolls_tube(route) && !contains_word(material.processes, "welding (good)") &&
      !contains_word(material.processes, "welding (fair)")) {
    return Exclusion{Rule::process,
                     "A rolled tube is closed by a weld; the material allows " +
                         joined(material.processes) + "."};
  }
  if ((is_extrusion(route) && is_metal(material.material_class) &&
       is_cold_worked(material.condition)) ||
      (rolls_tube(route) && is_softened_by_welding(material))) {
    return Exclusion{Rule::condition_lost,
                     "The route \"" + route.title +
                         "\" does not keep the strength of the condition \"" + material.condition +
                         "\"."};
  }
  return std::nullopt;
}

std::optional<Exclusion> drawn_form_rules(const MaterialInfo& material,
                                          const Route& route,
                                          SectionFamily family) {
  // What comes out of a die has the strength that its product form has: a row for tube, bar or
  // profile.
  const bool drawn = is_extrusion(route) || contains_word(route.process_words, "pultrusion");
  const bool from_granulate =
      contains_word(route.takes, "moulding") && contains_word(material.forms, "moulding");
  if (!drawn || from_granulate) {
    return std::nullopt;
  }
  const bool tube = is_tube(family);
  const bool open = is_open_section(family);
  const bool section = contains_word(material.forms, "section");
  const bool listed = tube   ? contains_word(material.forms, "tube")
                      : open ? section
                             : contains_word(material.forms, "bar") ||
                                   (section && !found_in(material.condition, "open profile"));
  if (listed) {
    return std::nullopt;
  }
  return Exclusion{Rule::input_form,
                   std::string("The values of this row hold for ") +
                       joined(material.forms, " and ") + ", not for a" +
                       (tube   ? " tube."
                        : open ? "n open section."
                               : " solid bar.")};
}

std::optional<Exclusion> proportion_rules(const Route& route, const Shape& shape) {
  const auto range = [&](std::string_view dimension) { return ratio_range(shape, dimension); };
  const bool has_flange = shape.family == SectionFamily::channel;
  const bool differ = has_flange && (range("web").high < range("flange").low ||
                                     range("flange").high < range("web").low);
  if (bends_sheet(route) && differ) {
    return Exclusion{Rule::output_form,
                     "The route \"" + route.title +
                         "\" bends sheet of one thickness; web and flange of this " +
                         std::string(name(shape.family)) + " differ."};
  }
  if (shape.family == SectionFamily::polygon) {
    const bool hollow = !shape.holes.empty();
    const bool leaves =
        hollow
            ? contains_word(route.leaves, "tube") || contains_word(route.leaves, "cored tube")
            : contains_word(route.leaves, "solid") || contains_word(route.leaves, "open section");
    if (!leaves) {
      return Exclusion{Rule::output_form,
                       "The route \"" + route.title + "\" leaves " + joined(route.leaves) +
                           (hollow ? ", not a polygon with holes." : ", not a polygon.")};
    }
  }
  return std::nullopt;
}

std::optional<Exclusion> shape_rules(const Route& route, SectionFamily family, bool from_stock) {
  if (from_stock && !keeps_stock(route)) {
    return Exclusion{Rule::output_form,
                     "The route \"" + route.title + "\" leaves " + joined(route.leaves) +
                         ", never a bought section unchanged."};
  }
  if (!from_stock && !can_leave(route, family)) {
    return Exclusion{Rule::output_form,
                     "The route \"" + route.title + "\" leaves " + joined(route.leaves) +
                         ", not a free size of " + std::string(name(family)) + "."};
  }
  return std::nullopt;
}

std::optional<Exclusion> finish_rules(const MaterialInfo& material, const Finish& finish) {
  if (!contains_word(finish.classes, material.material_class) ||
      (!finish.process_words.empty() && !shares_word(finish.process_words, material.processes))) {
    return Exclusion{Rule::finish,
                     "The finish \"" + finish.title + "\" goes on " + joined(finish.classes) +
                         " that allow " + joined(finish.process_words, " or ") + "."};
  }
  return std::nullopt;
}

std::vector<std::uint32_t> needed_treatments(const MaterialInfo& material,
                                             const Route& route,
                                             const Catalogue& catalogue) {
  // A hot route may make the condition itself: press hardening, controlled cooling from the forging
  // heat.
  if (!forms_hot(route) || !strength_is_lost_when_hot(material.condition) ||
      sets_strength(route, material)) {
    return {Candidate::none};
  }
  std::vector<std::uint32_t> out;
  for (std::size_t r = 0; r < catalogue.routes.size(); ++r) {
    if (catalogue.routes[r].kind == RouteKind::treatment &&
        sets_strength(catalogue.routes[r], material)) {
      out.push_back(static_cast<std::uint32_t>(r));
    }
  }
  return out;
}

std::optional<Exclusion> first_broken_rule(const Candidate& candidate,
                                           const Part& part,
                                           const Catalogue& catalogue) {
  const auto& material = catalogue.materials.info(candidate.material);
  const auto& route = catalogue.routes[candidate.route];
  const bool from_stock = candidate.stock != Candidate::none;
  if (auto broken = material_rules(material, part.limits)) {
    return broken;
  }
  if (auto broken = route_rules(material, route)) {
    return broken;
  }
  const auto needed = needed_treatments(material, route, catalogue);
  if (needed.empty()) {
    return Exclusion{
        Rule::condition_lost,
        "Its strength comes from the condition \"" + material.condition +
            "\", which hot forming destroys, and no treatment of the catalogue sets it anew."};
  }
  if (std::find(needed.begin(), needed.end(), candidate.treatment) == needed.end()) {
    return Exclusion{Rule::treatment,
                     candidate.treatment == Candidate::none
                         ? "Its condition needs a treatment after hot forming."
                         : "The treatment does not set the strength of this condition."};
  }
  const auto family = from_stock ? catalogue.stock[candidate.stock].family
                                 : part.body.shapes[candidate.shape].family;
  if (auto broken = shape_rules(route, family, from_stock)) {
    return broken;
  }
  if (!from_stock) {
    if (auto broken = proportion_rules(route, part.body.shapes[candidate.shape])) {
      return broken;
    }
    if (auto broken = drawn_form_rules(material, route, family)) {
      return broken;
    }
  }
  if (from_stock) {
    if (!any_suits(catalogue.stock[candidate.stock], material, route)) {
      return Exclusion{
          Rule::stock_family,
          "No size of \"" + catalogue.stock[candidate.stock].title + "\" is made of it."};
    }
  }
  if (candidate.finish != Candidate::none) {
    return finish_rules(material, catalogue.finishes[candidate.finish]);
  }
  return std::nullopt;
}

}  // namespace bismar
