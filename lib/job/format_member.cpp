// SPDX-License-Identifier: MIT
#include "format_member.hpp"

#include "format_builders.hpp"
#include "member_words.hpp"

#include <bismar/mechanics/limit_state.hpp>
#include <bismar/quantity/format.hpp>
#include <bismar/sizing/part.hpp>

#include <utility>

namespace bismar::detail {

namespace {

using namespace build;

std::vector<std::string> limit_state_ids() {
  std::vector<std::string> ids;
  for (const LimitState* state : limit_states()) {
    ids.emplace_back(state->id());
  }
  return ids;
}

Format sizes() {
  return any_of(
      {word({"continuous", "R5", "R10", "R20", "R40"},
            "Any size (default), or preferred numbers of ISO 3 in millimetres."),
       object({required(
                  "step",
                  quantity(
                      QuantityKind::length, Sign::positive, "Sizes are whole multiples of this."))},
              "Sizes in steps."),
       list_of(quantity(QuantityKind::length, Sign::positive, "One size."), "These sizes only.")},
      "Which sizes can be made or bought: each free dimension of the shape is taken from them.");
}

Format corners(std::string about) {
  return list_of(
      list_of(quantity(QuantityKind::length, Sign::any, "A coordinate."), "A corner: [y, z]."),
      std::move(about));
}

/// A ratio: fixed, a range, or left out and free.
Format ratio(const RatioWords& words, SectionFamily family) {
  if (words.free_key.empty()) {
    return quantity(QuantityKind::ratio, Sign::not_negative, std::string(words.about));
  }
  const Ratio usual = default_ratio(family, words.free_key);
  return range(QuantityKind::ratio,
               std::string(words.about) +
                   " A number fixes it, in a range \"low..high\" the sizing is free; default " +
                   format_number(usual.low) + ".." + format_number(usual.high) + ".");
}

Format::Variant shape(const ShapeWords& words) {
  std::vector<Key> keys;
  for (const RatioWords& one : words.ratios) {
    keys.push_back(key(std::string(one.key), ratio(one, words.family)));
  }
  if (words.family == SectionFamily::polygon) {
    keys.push_back(
        required("outline", corners("Corners in order, at any scale; the height is the size.")));
    keys.push_back(key("holes", list_of(corners("One hole."), "Holes, at the outline's scale.")));
  }
  keys.push_back(key(std::string(words.size),
                     range(QuantityKind::length, "Allowed outside size: \"low..high\".")));
  keys.push_back(key("sizes", sizes()));
  const std::string tag(words.tag);
  const std::string about = words.ratios.empty()
                                ? "A shape of one free size."
                                : "A shape; its size is free, and so is each ratio that is a range "
                                  "or left out.";
  return {tag, {required(tag, object(std::move(keys), about))}};
}

Format shapes() {
  std::vector<Format::Variant> variants;
  for (const ShapeWords& words : shape_words()) {
    variants.push_back(shape(words));
  }
  return list_of(tagged(std::move(variants), "A parametric cross-section."),
                 "Cross-sections that are made to size.");
}

Format station(const std::string& about) {
  return any_of({word({"end", "middle"}, "The end x = L or the middle x = L/2."),
                 quantity(QuantityKind::length, Sign::not_negative, "Distance x from the start.")},
                about);
}

Key along() { return key("along", word({"z", "y"}, "Direction of the load; default z.")); }

Format loads() {
  const Key at = required("at", station("Where it acts."));
  std::vector<Format::Variant> kinds;
  kinds.push_back(
      {"force",
       {required("force", quantity(QuantityKind::force, Sign::any, "Transverse point force.")),
        at,
        along()}});
  kinds.push_back(
      {"moment",
       {required("moment", quantity(QuantityKind::moment, Sign::any, "Bending moment at a point.")),
        at,
        along()}});
  kinds.push_back(
      {"distributed",
       {required("distributed",
                 quantity(QuantityKind::line_load, Sign::any, "Transverse load per length.")),
        key("distributed_to",
            quantity(QuantityKind::line_load,
                     Sign::any,
                     "Its value at the end of a linear course; "
                     "default the same.")),
        key("from", station("Where it begins; default the start of the member.")),
        key("to", station("Where it ends; default the end of the member.")),
        along()}});
  kinds.push_back({"axial",
                   {required("axial",
                             quantity(QuantityKind::force,
                                      Sign::any,
                                      "Axial force over the whole "
                                      "length: tension positive, "
                                      "compression negative."))}});
  kinds.push_back(
      {"torque",
       {required("torque",
                 quantity(QuantityKind::moment, Sign::any, "Torque about x, held at x = 0.")),
        at}});
  kinds.push_back(
      {"from_preload",
       {required(
            "from_preload",
            object({required("preload",
                             quantity(QuantityKind::force, Sign::positive, "Bolt preload F.")),
                    required("diameter",
                             quantity(QuantityKind::length,
                                      Sign::positive,
                                      "Nominal diameter d of the thread.")),
                    required("torque_factor",
                             quantity(QuantityKind::ratio, Sign::positive, "K in T = K F d."))},
                   "The force that makes the tightening torque T = K F d at the station: "
                   "T / at.")),
        at,
        along()}});
  return list_of(tagged(std::move(kinds), "One characteristic service load, without any factor."),
                 "Loads that act together.");
}

Format load_case() {
  const Format support = word(
      {"cantilever", "pinned", "fixed pinned", "fixed"},
      "cantilever: fixed at x = 0, free at x = L; pinned: at both ends; fixed pinned: fixed at "
      "x = 0, pinned at x = L; fixed: at both ends.");
  const auto moment = [](const std::string& about) {
    return quantity(QuantityKind::moment, Sign::any, about);
  };
  const auto force = [](const std::string& about) {
    return quantity(QuantityKind::force, Sign::any, about);
  };
  return object(
      {key("name", text("A name that no other load case of the part has; default \"service\".")),
       required("support",
                any_of({support,
                        object({required("z", support), required("y", support)},
                               "For loads along z and along y.")},
                       "How the member is held.")),
       key("second_support",
           station("Where the second support of a pinned or fixed pinned member stands, if not at "
                   "its end: beyond it the member overhangs.")),
       key("loads", loads()),
       key("own_weight",
           yes_or_no("The member's own weight acts along z, always adverse; default false.")),
       key("acceleration",
           object({key("z", quantity(QuantityKind::acceleration, Sign::not_negative, "Along z.")),
                   key("y", quantity(QuantityKind::acceleration, Sign::not_negative, "Along y."))},
                  "What the member's own mass feels, instead of own_weight: always adverse.")),
       key("direct",
           object({key("N", force("Normal force, tension positive.")),
                   key("V_y", force("Shear force along y.")),
                   key("V_z", force("Shear force along z.")),
                   key("M_y", moment("Bending moment about y, from loads along z.")),
                   key("M_z", moment("Bending moment about z, from loads along y.")),
                   key("T", moment("Torque about x."))},
                  "Internal forces of one section, given directly.")),
       key("factors",
           map_of(limit_state_ids(),
                  quantity(QuantityKind::ratio, Sign::positive, "Factor of this limit state."),
                  "Factors by limit state; the others keep their defaults.")),
       key("eccentricity",
           quantity(QuantityKind::length,
                    Sign::not_negative,
                    "Eccentricity of the compression at both ends; default 0 with column curves, "
                    "L / 500 with Euler's or Johnson's method.")),
       key("temperature_change",
           quantity(
               QuantityKind::temperature_difference, Sign::any, "From the state as assembled.")),
       key("restrained", yes_or_no("The ends keep their distance when the temperature changes.")),
       key("fatigue",
           object({required("cycles",
                            quantity(QuantityKind::count,
                                     Sign::positive,
                                     "Times that the load comes and goes.")),
                   key("stress_ratio",
                       quantity(QuantityKind::ratio,
                                Sign::any,
                                "Least over largest stress: -1 reversed (default), 0 pulsating."))},
                  "How often and how far the load case swings.")),
       key("duration",
           quantity(QuantityKind::time,
                    Sign::positive,
                    "How long the load lasts; default: not above an hour.")),
       key("hand_loaded",
           yes_or_no("Loaded by hand: a material of unknown elongation is left undecided.")),
       key("impact",
           yes_or_no("Loaded by impact: a material of unknown elongation is left undecided."))},
      "Loads and supports that act together.");
}

Format details() {
  const auto share = [](const std::string& about) {
    return quantity(QuantityKind::ratio, Sign::positive, about);
  };
  return object(
      {key("net_area", share("Net over gross area past holes, keyways, threads; default 1.")),
       key("net_modulus", share("Net over gross section modulus; default 1.")),
       key("k_t_axial", share("Stress concentration factor on the net section; default 1.")),
       key("k_t_bending", share("Likewise in bending.")),
       key("k_t_torsion", share("Likewise in torsion.")),
       key("notch_radius",
           quantity(QuantityKind::length,
                    Sign::positive,
                    "Radius of the notch; default: full notch sensitivity.")),
       key("surface",
           word(surface_words(), "How the surface was left, for fatigue; default machined.")),
       key("reliability",
           quantity(QuantityKind::ratio,
                    Sign::positive,
                    "Of the fatigue strength, 0.5 to 0.999999; default 0.99.")),
       key("criterion",
           word(criterion_words(),
                "How mean stress and amplitude are held together; default "
                "goodman.")),
       key("detail_category",
           quantity(QuantityKind::stress,
                    Sign::positive,
                    "Welded detail: stress range at 2 million cycles, EN 1993-1-9.")),
       key("welded",
           yes_or_no("A weld crosses the member where it is most stressed; default false.")),
       key("crack",
           object({key("kind", word({"edge", "surface"}, "Default edge.")),
                   required("depth", quantity(QuantityKind::length, Sign::positive, "Depth a.")),
                   key("half_length",
                       quantity(QuantityKind::length,
                                Sign::positive,
                                "Half the length c of a surface crack; default the depth."))},
                  "A crack that inspection may miss, on the most stressed side.")),
       key("masses",
           list_of(object({required("mass", quantity(QuantityKind::mass, Sign::positive, "Mass.")),
                           required("at", station("Where it sits."))},
                          "A mass that the member carries where it vibrates."),
                   "Carried masses, for the natural frequency."))},
      "What the making leaves in the member: holes, notches, welds, cracks, surface.");
}

}  // namespace

Format member_format() {
  return object({required("length", quantity(QuantityKind::length, Sign::positive, "Length L.")),
                 key("shapes", shapes()),
                 key("stock",
                     any_of({word({"all"}, "Every list of sections in the catalogue."),
                             names("Stock lists by id.")},
                            "Stock sizes to try.")),
                 required("load_cases", list_of(load_case(), "Every design holds in all of them.")),
                 key("details", details())},
                "A prismatic member along x; z is up, y is across.");
}

}  // namespace bismar::detail
