// SPDX-License-Identifier: MIT
#include "format.hpp"

#include "format_builders.hpp"
#include "format_member.hpp"

#include <bismar/catalogue/property.hpp>
#include <bismar/job/job.hpp>
#include <bismar/mechanics/limit_state.hpp>

#include <utility>

namespace bismar::detail {

namespace {

using namespace build;

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
                         key("operations", tables("operations")),
                         key("weld_zones", tables("weld zones of aluminium"))},
                        "Tables by kind; a kind that is left out is the starter's.")},
                "What parts can be made of and by; default \"starter\".");
}

// --- part
// ------------------------------------------------------------------------------------------

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
       key("shear_deflection",
           yes_or_no("Shear counts in the deflection and the frequency; default false.")),
       key("rotation", quantity(QuantityKind::angle, Sign::positive, "Largest slope of the axis.")),
       key("frequency",
           quantity(QuantityKind::frequency, Sign::positive, "Least first natural frequency.")),
       key("elongation", length("Largest change of length by heat and axial force.")),
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
           word({"curves", "euler", "johnson"},
                "Column curves (default); Euler's load alone, which is no check by itself; "
                "Johnson's parabola with Euler's curve beyond it.")),
       key("lateral_restraint",
           yes_or_no("The compressed side is held across: no lateral-torsional buckling.")),
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
  return object({required("name", text("A name that no other part of the job has.")),
                 key("quantity",
                     quantity(QuantityKind::count,
                              Sign::positive,
                              "Parts made over the life of the tooling; default 1.")),
                 key("batch",
                     quantity(QuantityKind::count,
                              Sign::positive,
                              "Parts made at a time; default the whole quantity.")),
                 required("member", member_format()),
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
       key("explain",
           word({"front", "full"},
                "front (default): what cannot come near the front is not examined further; full: "
                "every candidate is, so that each exclusion has its reason.")),
       key("epsilon",
           quantity(QuantityKind::ratio,
                    Sign::positive,
                    "How far, in mass and in cost, a design of shapes with several free sizes may "
                    "lie before the front; up to 0.1, default 0.001.")),
       key("delta",
           quantity(QuantityKind::ratio,
                    Sign::positive,
                    "The margin to every limit of the designs that this holds for; up to 0.01, "
                    "default 1e-6.")),
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
