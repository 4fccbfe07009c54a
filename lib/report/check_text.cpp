// SPDX-License-Identifier: MIT
#include <algorithm>
#include <numbers>
#include <span>
#include <string>
#include <vector>

#include <bismar/mechanics/section_builder.hpp>
#include <bismar/report/table.hpp>
#include <bismar/report/text_report.hpp>

#include "report/words.hpp"

namespace bismar {
namespace {

using report::number;

std::string mm(double metres) { return number(metres * 1e3) + " mm"; }

std::string angle(double radians) {
  return number(radians * 180.0 / std::numbers::pi) + " deg (" + number(radians) + " rad)";
}

// "1 hole", "2 holes".
std::string counted(std::size_t n, const std::string& what) {
  return report::count(n) + " " + what + (n == 1 ? "" : "s");
}

// What people call the size of a shape: its height, diameter, side or width across flats.
std::string size_word(SectionFamily family) {
  const std::span<const SectionDimension> all = dimensions(family);
  return all.empty() ? "height" : std::string(all.front().name);
}

std::string listed(const std::vector<std::string>& words) {
  std::string out;
  for (const std::string& word : words) out += (out.empty() ? "" : ", ") + word;
  return out;
}

std::string sizes_text(const Sizes& sizes) {
  switch (sizes.kind) {
    case Sizes::Kind::continuous:
      return "any size";
    case Sizes::Kind::step:
      return "in steps of " + mm(sizes.step);
    case Sizes::Kind::series:
      return "in sizes of " + sizes.series;
    case Sizes::Kind::list:
      return "in " + counted(sizes.values.size(), "listed size");
  }
  return {};
}

// ", height/width 1.25" where the ratio is fixed; a free one is told with the free sizes.
std::string fixed_ratio(const std::string& what, const std::optional<Ratio>& ratio) {
  if (!ratio || !ratio->is_fixed()) return {};
  return ", " + what + " " + report::exact(ratio->low);
}

// "height 8.00 to 40.0 mm", and every dimension that is free beside it: "width 0.500 to 2.00 times
// the height".
std::string free_sizes_text(const Shape& shape, const std::string& size) {
  const std::vector<FreeDimension> free = free_dimensions(shape);
  std::string out = free.empty() ? "" : counted(free.size() + 1, "free size") + ": ";
  out += size + " " + number(shape.height_min * 1e3) + " to " + mm(shape.height_max);
  for (const FreeDimension& one : free) {
    out += ", " + std::string(one.name) + " " + number(one.to_height.low) + " to " +
           number(one.to_height.high) + " times the " + size;
  }
  return out + (free.empty() ? ", " : ", each ") + sizes_text(shape.sizes);
}

std::string shape_text(const Shape& shape) {
  std::string out(name(shape.family));
  const std::string size = size_word(shape.family);
  out += fixed_ratio("height/width", shape.height_to_width);
  out += fixed_ratio("wall/" + size, shape.wall_to_height);
  out += fixed_ratio("web/height", shape.web_to_height);
  out += fixed_ratio("flange/height", shape.flange_to_height);
  if (shape.root_radius_to_height) {
    out += ", root radius/height " + report::exact(*shape.root_radius_to_height);
  }
  if (!shape.outline.empty()) out += " of " + counted(shape.outline.size(), "corner");
  if (!shape.holes.empty()) out += " with " + counted(shape.holes.size(), "hole");
  return out + ", " + free_sizes_text(shape, size);
}

std::string support_text(Support support, const std::optional<double>& second) {
  switch (support) {
    case Support::cantilever:
      return "cantilever, fixed at x = 0";
    case Support::pinned_pinned:
      return second ? "pinned at x = 0 and at " + mm(*second) : "pinned at both ends";
    case Support::fixed_pinned:
      return "fixed at x = 0, pinned at " + (second ? mm(*second) : "the end");
    case Support::fixed_fixed:
      return "fixed at both ends";
  }
  return {};
}

std::string load_text(const Load& load) {
  const std::string along = load.along == Along::z ? " along z" : " along y";
  switch (load.kind) {
    case Load::Kind::force:
      return "force " + number(load.value) + " N" + along + " at " + mm(load.at);
    case Load::Kind::moment:
      return "moment " + number(load.value) + " N.m from loads" + along + " at " + mm(load.at);
    case Load::Kind::distributed:
      return "distributed " + number(load.value) + " to " + number(load.value_to) + " N/m" + along +
             " from " + mm(load.at) + " to " + mm(load.to);
    case Load::Kind::axial:
      return std::string(load.value < 0.0 ? "axial compression " : "axial tension ") +
             number(load.value < 0.0 ? -load.value : load.value) + " N";
    case Load::Kind::torque:
      return "torque " + number(load.value) + " N.m at " + mm(load.at);
  }
  return {};
}

std::vector<std::string> load_case_lines(const LoadCase& load_case, double length) {
  std::vector<std::string> lines;
  // A second support at the end is the usual one.
  std::optional<double> second = load_case.second_support;
  if (second && !(*second < length)) second.reset();
  std::string support = support_text(load_case.support_z, second);
  if (load_case.support_y != load_case.support_z) {
    support +=
        " for loads along z, " + support_text(load_case.support_y, second) + " for loads along y";
  }
  if (second) support += ", overhang beyond";
  lines.push_back(std::move(support));
  for (const Load& load : load_case.loads) lines.push_back(load_text(load));
  if (load_case.acceleration_z > 0.0) {
    lines.push_back("own mass, " + number(load_case.acceleration_z) + " m/s2 along z");
  }
  if (load_case.acceleration_y > 0.0) {
    lines.push_back("own mass, " + number(load_case.acceleration_y) + " m/s2 along y");
  }
  if (load_case.direct) {
    const InternalForces& f = *load_case.direct;
    lines.push_back("direct N " + number(f.N) + " N, V_y " + number(f.V_y) + " N, V_z " +
                    number(f.V_z) + " N, M_y " + number(f.M_y) + " N.m, M_z " + number(f.M_z) +
                    " N.m, T " + number(f.T) + " N.m");
  }
  if (load_case.eccentricity) {
    lines.push_back("compression off centre by " + mm(*load_case.eccentricity));
  }
  if (load_case.temperature_change != 0.0) {
    lines.push_back("temperature change " + number(load_case.temperature_change) + " K" +
                    (load_case.restrained ? ", ends restrained" : ""));
  }
  if (load_case.fatigue) {
    const double cycles = load_case.fatigue->cycles;
    lines.push_back((cycles == 1.0 ? std::string("1 cycle") : number(cycles) + " cycles") +
                    " at stress ratio " + number(load_case.fatigue->stress_ratio));
  }
  for (const auto& [limit, factor] : load_case.factors) {
    lines.push_back("factor " + report::exact(factor) + " on " + limit);
  }
  if (load_case.duration > 0.0) {
    lines.push_back("lasts " + number(load_case.duration / 3600.0) + " h");
  }
  if (load_case.hand_loaded) lines.emplace_back("loaded by hand");
  if (load_case.impact) lines.emplace_back("loaded by impact");
  return lines;
}

class Facts {
 public:
  void add(std::string what, std::string value) {
    table_.add_row({std::move(what), std::move(value)});
  }
  void add_list(const std::string& what, const std::vector<std::string>& words) {
    if (!words.empty()) add(what, listed(words));
  }
  void add_length(const std::string& what, const std::optional<double>& metres) {
    if (metres) add(what, mm(*metres));
  }
  [[nodiscard]] std::string text(const TextOptions& options) const {
    return table_.text(options.width,
                       0,
                       options.colour ? report::bold_on : "",
                       options.colour ? report::emphasis_off : "");
  }

 private:
  report::Table table_{
      {{"what", report::Align::left, false}, {"as read", report::Align::left, true}}};
};

std::string_view surface_text(SurfaceFinish surface) {
  switch (surface) {
    case SurfaceFinish::polished:
      return "polished";
    case SurfaceFinish::ground:
      return "ground";
    case SurfaceFinish::machined:
      return "machined";
    case SurfaceFinish::hot_rolled:
      return "hot rolled";
    case SurfaceFinish::as_forged:
      return "as forged";
  }
  return {};
}

std::string_view criterion_text(FatigueCriterion criterion) {
  switch (criterion) {
    case FatigueCriterion::goodman:
      return "Goodman";
    case FatigueCriterion::gerber:
      return "Gerber";
    case FatigueCriterion::soderberg:
      return "Soderberg";
  }
  return {};
}

// What fatigue reads, defaults included where a load case swings.
void add_fatigue(Facts& facts, const MemberDetails& details, bool swings) {
  const MemberDetails plain;
  if (swings || details.surface != plain.surface) {
    facts.add("surface", std::string(surface_text(details.surface)));
  }
  if (swings || details.reliability != plain.reliability) {
    facts.add("reliability in fatigue", report::exact(details.reliability));
  }
  if (swings || details.criterion != plain.criterion) {
    facts.add("mean stress in fatigue", std::string(criterion_text(details.criterion)));
  }
}

void add_details(Facts& facts, const MemberDetails& details) {
  const MemberDetails plain;
  const auto factor = [&](const std::string& what, double value, double usual) {
    if (value != usual) facts.add(what, report::exact(value));
  };
  factor("net area", details.net_area, plain.net_area);
  factor("net modulus", details.net_modulus, plain.net_modulus);
  factor("stress concentration, axial", details.k_t_axial, plain.k_t_axial);
  factor("stress concentration, bending", details.k_t_bending, plain.k_t_bending);
  factor("stress concentration, torsion", details.k_t_torsion, plain.k_t_torsion);
  facts.add_length("notch radius", details.notch_radius);
  if (details.welded) facts.add("weld", "across the member where it is most stressed");
  if (details.detail_category) {
    facts.add("detail category", number(*details.detail_category * 1e-6) + " MPa");
  }
  if (details.crack) {
    const Crack& crack = *details.crack;
    facts.add("crack",
              crack.kind == Crack::Kind::edge ? "edge, " + mm(crack.depth) + " deep"
                                              : "surface, " + mm(crack.depth) + " deep, " +
                                                    mm(2.0 * crack.half_length) + " long");
  }
  for (const AttachedMass& mass : details.masses) {
    facts.add("carried mass", number(mass.mass) + " kg at " + mm(mass.at));
  }
}

void add_limits(Facts& facts, const Limits& limits, const std::string& currency) {
  facts.add_length(limits.shear_deflection ? "deflection with shear at most" : "deflection at most",
                   limits.deflection);
  if (limits.rotation) facts.add("rotation at most", angle(*limits.rotation));
  if (limits.twist) facts.add("twist at most", angle(*limits.twist));
  if (limits.frequency) facts.add("natural frequency at least", number(*limits.frequency) + " Hz");
  facts.add_length("elongation at most", limits.elongation);
  facts.add_length("height at most", limits.height);
  facts.add_length("width at most", limits.width);
  facts.add_length("wall at least", limits.wall);
  facts.add("slenderness at most", report::exact(limits.slenderness) + " (members in compression)");
  if (limits.column_method == ColumnMethod::euler) {
    facts.add("columns", "Euler load alone, as asked: no imperfection, no yielding");
  } else if (limits.column_method == ColumnMethod::johnson) {
    facts.add("columns", "Johnson's parabola and Euler's curve, as asked: no imperfection");
  }
  if (limits.lateral_restraint) facts.add("held across", "no lateral-torsional buckling");
  if (limits.mass) facts.add("mass at most", number(*limits.mass) + " kg");
  if (limits.cost) facts.add("cost at most", report::money(*limits.cost) + " " + currency);
  facts.add_list("only routes", limits.routes);
  facts.add_list("not by routes", limits.forbidden_routes);
  facts.add_list("processes needed", limits.processes);
  facts.add_list("sold as", limits.forms);
  facts.add_list("only classes", limits.classes);
  facts.add_list("only materials", limits.materials);
  facts.add_list("not these materials", limits.forbidden_materials);
  for (const PropertyLimit& p : limits.properties) {
    std::string bounds;
    if (p.at_least) bounds = "at least " + report::exact(*p.at_least);
    if (p.at_most) {
      bounds += (bounds.empty() ? "at most " : ", at most ") + report::exact(*p.at_most);
    }
    facts.add(p.property, bounds + " (SI)");
  }
  if (limits.medium) {
    constexpr std::string_view words[] = {"poor", "fair", "good"};
    facts.add("medium",
              *limits.medium + ", resistance at least " +
                  std::string(words[static_cast<std::size_t>(limits.corrosion_at_least)]));
  }
  if (limits.temperature) {
    facts.add("service temperature", number(*limits.temperature - 273.15) + " degC");
  }
  if (limits.allow_brittle) facts.add("brittle materials", "allowed");
  if (limits.allow_hard) facts.add("very hard materials", "allowed");
}

}  // namespace

std::string check_text(const Part& part, const Catalogue& catalogue, const TextOptions& options) {
  std::string out =
      report::emphasised(part.name + ": the job is valid. It reads as follows.", options.colour);
  out += "\n\n";

  Facts facts;
  const auto parts = [](double n) { return report::exact(n) + (n == 1.0 ? " part" : " parts"); };
  facts.add("quantity", parts(part.quantity));
  if (part.batch) facts.add("batch", parts(*part.batch));
  facts.add("length", mm(part.body.length));
  for (const Shape& shape : part.body.shapes) facts.add("shape", shape_text(shape));
  facts.add_list("stock lists", part.body.stock);
  for (const LoadCase& load_case : part.body.load_cases) {
    std::string lines;
    for (const std::string& line : load_case_lines(load_case, part.body.length)) {
      lines += (lines.empty() ? "" : "\n") + line;
    }
    facts.add("load case " + load_case.name, std::move(lines));
  }
  add_details(facts, part.body.details);
  const bool swings = std::any_of(part.body.load_cases.begin(),
                                  part.body.load_cases.end(),
                                  [](const LoadCase& one) { return one.fatigue.has_value(); });
  add_fatigue(facts, part.body.details, swings);
  add_limits(facts, part.limits, catalogue.currency);
  facts.add_list("finishes to try", part.finishes);
  for (const OperationUse& use : part.operations) {
    facts.add("operation", report::exact(use.units) + " x " + use.operation);
  }
  std::size_t sizes = 0;
  for (const StockList& list : catalogue.stock) sizes += list.items.size();
  facts.add("tables",
            counted(catalogue.materials.size(), "material") + ", " + counted(sizes, "stock size") +
                " in " + counted(catalogue.stock.size(), "list") + ", " +
                counted(catalogue.routes.size(), "route") + ", " +
                report::count(catalogue.finishes.size()) +
                (catalogue.finishes.size() == 1 ? " finish" : " finishes") + ", prices in " +
                catalogue.currency);
  out += facts.text(options);
  out += "\nLoads are service values; the factors of each limit act when it is checked.\n\n";
  return out + report::paragraph(caution(), options.width);
}

}  // namespace bismar
