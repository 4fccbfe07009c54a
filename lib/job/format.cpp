// SPDX-License-Identifier: MIT
#include "format.hpp"

#include <bismar/catalogue/property.hpp>
#include <bismar/job/job.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <utility>

namespace bismar::detail {

namespace {

using Type = Format::Type;

Key key(std::string name, Format format) {
  return {std::move(name), std::make_shared<const Format>(std::move(format)), false};
}

Key required(std::string name, Format format) {
  Key made = key(std::move(name), std::move(format));
  made.required = true;
  return made;
}

Format text(std::string about) {
  Format format;
  format.type = Type::text;
  format.about = std::move(about);
  return format;
}

Format yes_or_no(std::string about) {
  Format format;
  format.type = Type::boolean;
  format.about = std::move(about);
  return format;
}

Format whole(std::vector<int> numbers, std::string about) {
  Format format;
  format.type = Type::whole;
  format.numbers = std::move(numbers);
  format.about = std::move(about);
  return format;
}

Format quantity(QuantityKind kind, Sign sign, std::string about) {
  Format format;
  format.type = Type::quantity;
  format.kind = kind;
  format.sign = sign;
  format.about = std::move(about);
  return format;
}

Format range(QuantityKind kind, std::string about) {
  Format format = quantity(kind, Sign::positive, std::move(about));
  format.type = Type::range;
  return format;
}

Format word(std::vector<std::string> words, std::string about) {
  Format format;
  format.type = Type::word;
  format.words = std::move(words);
  format.about = std::move(about);
  return format;
}

Format list_of(Format item, std::string about) {
  Format format;
  format.type = Type::list;
  format.item = std::make_shared<const Format>(std::move(item));
  format.about = std::move(about);
  return format;
}

Format object(std::vector<Key> keys, std::string about) {
  Format format;
  format.type = Type::object;
  format.keys = std::move(keys);
  format.about = std::move(about);
  return format;
}

Format map_of(std::vector<std::string> words, Format item, std::string about) {
  Format format;
  format.type = Type::map;
  format.words = std::move(words);
  format.item = std::make_shared<const Format>(std::move(item));
  format.about = std::move(about);
  return format;
}

Format any_of(std::vector<Format> alternatives, std::string about) {
  Format format;
  format.type = Type::any_of;
  format.alternatives = std::move(alternatives);
  format.about = std::move(about);
  return format;
}

Format tagged(std::vector<Format::Variant> variants, std::string about) {
  Format format;
  format.type = Type::tagged;
  format.variants = std::move(variants);
  format.about = std::move(about);
  return format;
}

Format names(std::string about) { return list_of(text("An id or a word."), std::move(about)); }

std::vector<std::string> limit_state_ids() {
  std::vector<std::string> ids;
  for (const LimitState* state : limit_states()) {
    ids.emplace_back(state->id());
  }
  return ids;
}

std::vector<std::string> property_names() {
  std::vector<std::string> all;
  for (const PropertyInfo& property : properties()) {
    all.emplace_back(property.name);
  }
  return all;
}

// --- catalogue
// -------------------------------------------------------------------------------------

Format tables(const std::string& what) {
  Format file = object(
      {required("file", text("Path of a CSV file, relative to the job file.")),
       key("delimiter", word({",", ";", "|", "tab"}, "What separates the cells; default \",\".")),
       key("decimal", word({".", ","}, "The decimal mark; default \".\".")),
       key("currency", text("Currency of price columns that name none; default the job's.")),
       key("replaces",
           yes_or_no("Whether an entry of this file takes the place of an earlier one "
                     "with the same id; default false, then that is a fault."))},
      "A CSV file with its format.");
  return list_of(
      any_of({text("\"starter\" or the path of a CSV file."), std::move(file)}, "One table."),
      "Tables of " + what + ", read one after the other; default [\"starter\"].");
}

Format catalogue() {
  return any_of({word({"starter"}, "The tables that come with the program."),
                 object({key("materials", tables("materials")),
                         key("stock", tables("stock sizes")),
                         key("routes", tables("routes and treatments")),
                         key("finishes", tables("finishes")),
                         key("operations", tables("operations"))},
                        "Tables by kind; a kind that is left out is the starter's.")},
                "What parts can be made of and by; default \"starter\".");
}

// --- part
// ------------------------------------------------------------------------------------------

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
      "Which sizes can be made or bought.");
}

Format::Variant shape(const std::string& tag,
                      const std::string& size,
                      const std::string& proportion,
                      const std::string& wall) {
  std::vector<Key> keys;
  if (!proportion.empty()) {
    keys.push_back(required(proportion,
                            quantity(QuantityKind::ratio,
                                     Sign::positive,
                                     "Height over width, both outside; height is along z.")));
  }
  if (!wall.empty()) {
    keys.push_back(required(
        wall, quantity(QuantityKind::ratio, Sign::positive, "Wall thickness over that size.")));
  }
  keys.push_back(key(size, range(QuantityKind::length, "Allowed outside size: \"low..high\".")));
  keys.push_back(key("sizes", sizes()));
  return {tag, {required(tag, object(std::move(keys), "A shape of one free size."))}};
}

Format shapes() {
  return list_of(tagged({shape("round", "diameter", "", ""),
                         shape("square", "side", "", ""),
                         shape("rectangle", "height", "height_to_width", ""),
                         shape("ellipse", "height", "height_to_width", ""),
                         shape("round_tube", "diameter", "", "wall_to_diameter"),
                         shape("rectangular_tube", "height", "height_to_width", "wall_to_height")},
                        "A parametric cross-section."),
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
  const Format support = word({"cantilever", "pinned"},
                              "cantilever: fixed at x = 0, free at x = L; pinned: at both ends.");
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
       key("loads", loads()),
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

Format property_limits() {
  const Format bound =
      any_of({quantity(QuantityKind::ratio, Sign::any, "For a property without a unit."),
              text("A value with the property's unit, such as \"350 MPa\".")},
             "A value of the property.");
  return list_of(object({required("property",
                                  text("Name of a property or of a column of your own "
                                       "table.")),
                         key("at_least", bound),
                         key("at_most", bound)},
                        "Bounds on one property of the material."),
                 "Bounds on properties of the material.");
}

Format limits() {
  const auto length = [](const std::string& about) {
    return quantity(QuantityKind::length, Sign::positive, about);
  };
  return object(
      {key("deflection", length("Largest deflection.")),
       key("twist",
           quantity(QuantityKind::angle, Sign::positive, "Largest twist over the length.")),
       key("height", length("Envelope along z.")),
       key("width", length("Envelope along y.")),
       key("wall", length("Least wall thickness.")),
       key("slenderness",
           quantity(QuantityKind::ratio,
                    Sign::positive,
                    "Cap on effective length over radius of gyration of a member in compression; "
                    "default 200.")),
       key("column_method",
           word({"curves", "euler"},
                "Column curves (default), or Euler's load alone, which is no check by itself.")),
       key("mass", quantity(QuantityKind::mass, Sign::positive, "Cap on the mass of a part.")),
       key("cost", quantity(QuantityKind::money, Sign::positive, "Cap on the cost of a part.")),
       key("routes", names("Only these primary routes.")),
       key("forbidden_routes", names("None of these routes.")),
       key("processes", names("Processes that the material must allow, all of them.")),
       key("forms", names("The material must be sold in one of these forms.")),
       key("classes", names("Only these material classes.")),
       key("materials", names("Only these materials, by id.")),
       key("forbidden_materials", names("None of these materials or classes.")),
       key("properties", property_limits()),
       key("medium", text("What the part stands in, such as \"fresh water\".")),
       key("corrosion_at_least",
           word({"poor", "fair", "good"}, "Least rating in the medium; default good.")),
       key("temperature", quantity(QuantityKind::temperature, Sign::any, "Service temperature.")),
       key("allow_brittle", yes_or_no("Admits brittle materials that are sold on request.")),
       key("allow_hard", yes_or_no("Admits very hard materials that are sold on request."))},
      "What every design must stay within.");
}

Format part() {
  return object(
      {required("name", text("A name that no other part of the job has.")),
       key("quantity",
           quantity(QuantityKind::count,
                    Sign::positive,
                    "Parts made over the life of the tooling; default 1.")),
       key("batch",
           quantity(QuantityKind::count,
                    Sign::positive,
                    "Parts made at a time; default the whole quantity.")),
       required(
           "member",
           object(
               {required("length", quantity(QuantityKind::length, Sign::positive, "Length L.")),
                key("shapes", shapes()),
                key("stock",
                    any_of({word({"all"}, "Every list of sections in the catalogue."),
                            names("Stock lists by id.")},
                           "Stock sizes to try.")),
                required("load_cases", list_of(load_case(), "Every design holds in all of them."))},
               "A prismatic member along x; z is up, y is across.")),
       key("limits", limits()),
       key("finishes",
           names("Finishes to try, by id, \"none\" for a bare part; default "
                 "[\"none\"].")),
       key("operations",
           list_of(object({required("operation", text("Id of the operation.")),
                           key("units",
                               quantity(QuantityKind::ratio,
                                        Sign::positive,
                                        "Cuts, holes, metres ... a part; default 1."))},
                          "A step that every design gets."),
                   "Steps that every design gets.")),
       key("service_class",
           whole({1, 2},
                 "Climate of timber (EN 1995-1-1, 2.3.1.3): 1 indoors (default), 2 under "
                 "a roof."))},
      "A part to be sized.");
}

Format settings() {
  const std::vector<std::string> ends = {"low", "mid", "geometric mid", "high"};
  const auto ratio = [](const std::string& about) {
    return quantity(QuantityKind::ratio, Sign::not_negative, about);
  };
  return object(
      {key("missing",
           word({"undecided", "exclude", "class median"},
                "What to do with a candidate whose material lacks a value that is needed; default "
                "undecided.")),
       key("range_ends",
           map_of(property_names(),
                  word(ends, "Which value of a range is used."),
                  "By property; the others keep their defaults (strength and modulus low, density "
                  "and price mid).")),
       key("route_end",
           word(ends,
                "Which value of a range of routes, finishes and operations is used; default "
                "geometric mid.")),
       key("near", ratio("Designs within this of the front are kept; default 5 %.")),
       key("fold", ratio("Designs within this are shown as one; default 2 %.")),
       key("doubtful_sizes", yes_or_no("Offers stock sizes that are marked doubtful.")),
       key("kerf", quantity(QuantityKind::length, Sign::not_negative, "Saw cut; default 3 mm.")),
       key("machining_allowance",
           quantity(QuantityKind::length,
                    Sign::not_negative,
                    "Added to each outside dimension of a machined part; default 2 mm.")),
       key("scrap_credit",
           ratio("Fraction of its price at which scrap metal is sold back; default 0."))},
      "How the tables are read and what is kept.");
}

Format job() {
  Format rates = map_of({},
                        quantity(QuantityKind::money,
                                 Sign::positive,
                                 "What one unit of it is worth "
                                 "in the job's currency."),
                        "Other currencies that occur, such as \"USD\": \"0.92 EUR\".");
  rates.key_pattern = "^[A-Z]{3}$";
  return object(
      {required("bismar", whole({job_format_version}, "Version of the job format.")),
       key("title", text("One line for reports.")),
       key("currency", text("ISO 4217 code of the job's currency; default EUR.")),
       key("rates", std::move(rates)),
       key("catalogue", catalogue()),
       key("settings", settings()),
       required("parts", list_of(part(), "Parts, each sized for itself.")),
       key("exchange",
           object({key("mass",
                       range(QuantityKind::price_per_mass,
                             "Worth of a kilogram that is of interest: \"low..high\"."))},
                  "Exchange constants."))},
      "A job: parts to be sized, and with what. Values are SI inside; in this file every value "
      "with "
      "a dimension is a text with its unit. The loader checks more than a schema can say: units, "
      "names, bounds that contradict each other.");
}

}  // namespace

const Format& job_format() {
  static const Format format = job();
  return format;
}

bool takes_plain_number(QuantityKind kind) {
  return kind == QuantityKind::ratio || kind == QuantityKind::count;
}

}  // namespace bismar::detail
