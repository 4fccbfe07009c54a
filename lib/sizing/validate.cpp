// SPDX-License-Identifier: MIT
#include <bismar/sizing/part.hpp>

#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/quantity/format.hpp>

#include <algorithm>
#include <cmath>
#include <set>

namespace bismar {

namespace {

/// Collects the faults of one part; places are JSON pointers inside it, as a job writes them.
class PartCheck {
 public:
  PartCheck(const Part& part, const Catalogue& catalogue, const Settings& settings)
      : part_(part), catalogue_(catalogue), settings_(settings) {}

  void run() {
    numbers();
    shapes();
    stock();
    load_cases();
    limits();
    names();
    settings();
    faults_.throw_if_any();
  }

 private:
  void fault(
      Code code, std::string where, std::string found, std::string allowed, std::string message) {
    faults_.add({code, std::move(where), std::move(found), std::move(allowed), std::move(message)});
  }

  /// A finite positive number, or a fault.
  bool positive(double value, const std::string& where, const std::string& what) {
    if (std::isfinite(value) && value > 0.0) {
      return true;
    }
    fault(std::isfinite(value) ? Code::out_of_range : Code::not_finite,
          where,
          plain(value),
          "a positive number",
          "The " + what + " must be finite and above zero; it is " + plain(value) + ".");
    return false;
  }

  void optional_positive(const std::optional<double>& value,
                         const std::string& where,
                         const std::string& what) {
    if (value) {
      positive(*value, where, what);
    }
  }

  /// Every word must be one of `known`.
  void known_words(const std::vector<std::string>& words,
                   const std::set<std::string>& known,
                   const std::string& where,
                   const std::string& what) {
    const std::vector<std::string_view> list(known.begin(), known.end());
    for (std::size_t i = 0; i < words.size(); ++i) {
      if (!known.contains(words[i])) {
        fault(Code::unknown_name,
              where + "/" + std::to_string(i),
              words[i],
              "a " + what + " of the catalogue",
              "There is no " + what + " \"" + words[i] + "\" in the catalogue." +
                  did_you_mean(words[i], list));
      }
    }
  }

  /// A word twice would give the same design twice.
  void no_repeats(const std::vector<std::string>& words,
                  const std::string& where,
                  const std::string& what) {
    std::set<std::string> seen;
    for (std::size_t i = 0; i < words.size(); ++i) {
      if (!seen.insert(words[i]).second) {
        fault(Code::duplicate,
              where + "/" + std::to_string(i),
              words[i],
              "each once",
              "The " + what + " \"" + words[i] + "\" stands twice; leave one of them out.");
      }
    }
  }

  void numbers() {
    positive(part_.body.length, "/member/length", "length");
    if (!(part_.quantity >= 1.0) || !std::isfinite(part_.quantity)) {
      fault(Code::out_of_range,
            "/quantity",
            plain(part_.quantity),
            "at least 1",
            "The quantity must be at least one part; it is " + plain(part_.quantity) + ".");
    }
    if (part_.batch && (!(*part_.batch >= 1.0) || *part_.batch > part_.quantity)) {
      fault(Code::out_of_range,
            "/batch",
            plain(*part_.batch),
            "from 1 to the quantity",
            "A batch holds from one part to the whole quantity of " + plain(part_.quantity) +
                "; it is " + plain(*part_.batch) + ".");
    }
  }

  void shapes() {
    if (part_.body.shapes.empty() && part_.body.stock.empty()) {
      fault(Code::empty,
            "/member/shapes",
            "",
            "shapes or stock lists",
            "The member has neither a shape nor a stock list to try. Name at least one, or "
            "\"stock\": \"all\".");
    }
    for (std::size_t i = 0; i < part_.body.shapes.size(); ++i) {
      const std::string where = "/member/shapes/" + std::to_string(i);
      shape(part_.body.shapes[i], where);
      for (std::size_t j = 0; j < i; ++j) {
        if (part_.body.shapes[j] == part_.body.shapes[i]) {
          fault(Code::duplicate,
                where,
                std::string(name(part_.body.shapes[i].family)),
                "each once",
                "This shape stands twice with the same ratios and sizes; leave one of them out.");
        }
      }
    }
  }

  void shape(const Shape& shape, const std::string& where) {
    const std::string word(name(shape.family));
    const bool tube = shape.family == SectionFamily::round_tube ||
                      shape.family == SectionFamily::rectangular_tube;
    const bool flat = shape.family == SectionFamily::solid_rectangle ||
                      shape.family == SectionFamily::solid_ellipse ||
                      shape.family == SectionFamily::rectangular_tube;
    if (shape.family == SectionFamily::i_section || shape.family == SectionFamily::channel) {
      fault(Code::unsupported,
            where,
            word,
            "solids and tubes, or a stock list",
            "A free " + word +
                " has four free sizes; this version sizes shapes with one. Use a stock list.");
      return;
    }
    ratio(shape.height_to_width, flat, where, "height_to_width", word);
    ratio(shape.wall_to_height, tube, where, "wall_to_height", word);
    if (tube && shape.wall_to_height && *shape.wall_to_height > 0.0) {
      const double room = 0.5 * std::min(1.0, 1.0 / shape.height_to_width.value_or(1.0));
      if (*shape.wall_to_height >= room) {
        fault(Code::out_of_range,
              where + "/wall_to_height",
              plain(*shape.wall_to_height),
              "below " + plain(room, 4),
              "The wall leaves no bore: wall_to_height must be below " + plain(room, 4) + ".");
      }
    }
    const bool bounds = positive(shape.height_min, where + "/height", "least height") &&
                        positive(shape.height_max, where + "/height", "largest height");
    if (bounds && shape.height_min >= shape.height_max) {
      fault(Code::conflict,
            where + "/height",
            "",
            "least below largest",
            "The least height must be below the largest one.");
    }
    if (bounds) {
      sizes(shape, where + "/sizes");
    }
  }

  void ratio(const std::optional<double>& value,
             bool has_one,
             const std::string& where,
             const std::string& key,
             const std::string& word) {
    if (value && !has_one) {
      fault(Code::conflict,
            where + "/" + key,
            plain(*value),
            "nothing",
            "A " + word + " has no " + key + ".");
    } else if (value) {
      positive(*value, where + "/" + key, key);
    } else if (has_one) {
      fault(Code::unsupported,
            where,
            "",
            "a fixed " + key,
            "A " + word + " without " + key +
                " has two or more free sizes, which needs a solver that proves its bounds; this "
                "version does "
                "not have it. Fix the ratio \"" +
                key + "\", or give several shapes with different ratios.");
    }
  }

  void sizes(const Shape& shape, const std::string& where) {
    const auto& sizes = shape.sizes;
    switch (sizes.kind) {
      case Sizes::Kind::continuous:
        return;
      case Sizes::Kind::step:
        if (positive(sizes.step, where + "/step", "size step") &&
            (shape.height_max - shape.height_min) / sizes.step > 1e5) {
          fault(Code::out_of_range,
                where + "/step",
                plain(sizes.step),
                "a coarser step",
                "The step makes more than 100,000 sizes; take a coarser one or a smaller range.");
        } else if (sizes.step > 0.0 &&
                   std::floor(shape.height_max / sizes.step) * sizes.step < shape.height_min) {
          no_size(where);
        }
        return;
      case Sizes::Kind::series:
        try {
          if (preferred_numbers(sizes.series, shape.height_min, shape.height_max).empty()) {
            no_size(where);
          }
        } catch (const Error& error) {
          faults_.append(error, where);
        }
        return;
      case Sizes::Kind::list: {
        if (sizes.values.empty()) {
          fault(Code::empty, where, "", "at least one size", "The list of sizes is empty.");
          return;
        }
        bool any = false;
        for (std::size_t i = 0; i < sizes.values.size(); ++i) {
          if (positive(sizes.values[i], where + "/" + std::to_string(i), "size")) {
            any =
                any || (sizes.values[i] >= shape.height_min && sizes.values[i] <= shape.height_max);
          }
        }
        if (!any) {
          no_size(where);
        }
        return;
      }
    }
  }

  void no_size(const std::string& where) {
    fault(Code::conflict,
          where,
          "",
          "a size inside the range of heights",
          "None of the sizes lies in the range of heights.");
  }

  void stock() {
    std::set<std::string> lists = {"all"};
    for (const auto& list : catalogue_.stock) {
      if (!list.sheet) {
        lists.insert(list.id);
      }
    }
    known_words(part_.body.stock, lists, "/member/stock", "stock list of sections");
    no_repeats(part_.body.stock, "/member/stock", "stock list");
  }

  void load_cases() {
    if (part_.body.load_cases.empty()) {
      fault(Code::empty,
            "/member/load_cases",
            "",
            "at least one load case",
            "The member has no load case: nothing would size it.");
    }
    std::set<std::string> seen;
    std::vector<std::string_view> ids;
    for (const LimitState* state : limit_states()) {
      ids.push_back(state->id());
    }
    for (std::size_t i = 0; i < part_.body.load_cases.size(); ++i) {
      const auto& one = part_.body.load_cases[i];
      const std::string where = "/member/load_cases/" + std::to_string(i);
      if (!seen.insert(one.name).second) {
        fault(Code::duplicate,
              where + "/name",
              one.name,
              "a name of its own",
              "Two load cases are called \"" + one.name + "\".");
      }
      for (const auto& [id, factor] : one.factors) {
        std::string place = where;
        place.append("/factors/").append(id);
        if (limit_state(id) == nullptr) {
          fault(Code::unknown_name,
                place,
                id,
                "a limit state",
                "There is no limit state \"" + id + "\"." + did_you_mean(id, ids));
        }
        positive(factor, place, "factor");
      }
      if (!(one.duration >= 0.0) || !std::isfinite(one.duration)) {
        fault(Code::out_of_range,
              where + "/duration",
              plain(one.duration),
              "zero or more",
              "The duration of a load cannot be negative.");
      }
      if (one.loads.empty() && one.direct && (part_.limits.deflection || part_.limits.twist)) {
        fault(Code::conflict,
              where + "/direct",
              "",
              "loads at their stations",
              "The limits on deflection and twist need to know where the loads act; the load case "
              "\"" +
                  one.name +
                  "\" gives internal forces only. Give loads with stations, or leave those limits "
                  "out.");
      }
      if (std::isfinite(part_.body.length) && part_.body.length > 0.0) {
        try {
          static_cast<void>(reduce(one, part_.body.length));
        } catch (const Error& error) {
          faults_.append(error, where + "/");
        }
      }
    }
  }

  void limits() {
    const auto& limits = part_.limits;
    optional_positive(limits.deflection, "/limits/deflection", "deflection limit");
    optional_positive(limits.twist, "/limits/twist", "twist limit");
    optional_positive(limits.height, "/limits/height", "height of the envelope");
    optional_positive(limits.width, "/limits/width", "width of the envelope");
    optional_positive(limits.wall, "/limits/wall", "least wall");
    optional_positive(limits.mass, "/limits/mass", "mass cap");
    optional_positive(limits.cost, "/limits/cost", "cost cap");
    optional_positive(limits.temperature, "/limits/temperature", "service temperature in kelvin");
    positive(limits.slenderness, "/limits/slenderness", "slenderness cap");
    for (std::size_t i = 0; i < limits.properties.size(); ++i) {
      property_limit(limits.properties[i], "/limits/properties/" + std::to_string(i));
    }
  }

  void property_limit(const PropertyLimit& limit, const std::string& where) {
    const auto extras = catalogue_.materials.extra_names();
    if (!property(limit.property) && !contains_word(extras, limit.property)) {
      std::vector<std::string_view> words;
      for (const auto& one : properties()) {
        words.push_back(one.name);
      }
      words.insert(words.end(), extras.begin(), extras.end());
      fault(
          Code::unknown_name,
          where + "/property",
          limit.property,
          "a property or column",
          "There is no property \"" + limit.property + "\"." + did_you_mean(limit.property, words));
    }
    if (!limit.at_least && !limit.at_most) {
      fault(Code::missing,
            where,
            "",
            "at_least or at_most",
            "The limit on " + limit.property + " needs \"at_least\" or \"at_most\".");
    }
    for (const auto& value : {limit.at_least, limit.at_most}) {
      if (value && !std::isfinite(*value)) {
        fault(Code::not_finite,
              where,
              plain(*value),
              "a finite number",
              "The limit on " + limit.property + " is not finite.");
      }
    }
    if (limit.at_least && limit.at_most && *limit.at_least > *limit.at_most) {
      fault(Code::conflict,
            where,
            "",
            "at_least not above at_most",
            "The limit on " + limit.property + " asks for at least more than at most.");
    }
  }

  /// Names that must be in the catalogue.
  void names() {
    std::set<std::string> routes;
    std::set<std::string> finishes = {"none"};
    std::set<std::string> operations;
    std::set<std::string> classes;
    std::set<std::string> ids;
    std::set<std::string> forms;
    std::set<std::string> processes;
    std::set<std::string> media;
    for (const auto& route : catalogue_.routes) {
      if (route.kind == RouteKind::primary) {
        routes.insert(route.id);
      }
    }
    for (const auto& finish : catalogue_.finishes) {
      finishes.insert(finish.id);
    }
    for (const auto& operation : catalogue_.operations) {
      operations.insert(operation.id);
    }
    for (std::size_t m = 0; m < catalogue_.materials.size(); ++m) {
      const auto& info = catalogue_.materials.info(m);
      classes.insert(info.material_class);
      ids.insert(info.id);
      forms.insert(info.forms.begin(), info.forms.end());
      processes.insert(info.processes.begin(), info.processes.end());
      for (const auto& [medium, rating] : info.corrosion) {
        media.insert(medium);
      }
    }
    const auto& limits = part_.limits;
    known_words(limits.routes, routes, "/limits/routes", "primary route");
    known_words(limits.forbidden_routes, routes, "/limits/forbidden_routes", "primary route");
    known_words(limits.classes, classes, "/limits/classes", "material class");
    known_words(limits.materials, ids, "/limits/materials", "material");
    std::set<std::string> either = ids;
    either.insert(classes.begin(), classes.end());
    known_words(
        limits.forbidden_materials, either, "/limits/forbidden_materials", "material or class");
    known_words(limits.forms, forms, "/limits/forms", "form");
    known_words(limits.processes, processes, "/limits/processes", "process");
    known_words(part_.finishes, finishes, "/finishes", "finish");
    no_repeats(part_.finishes, "/finishes", "finish");
    no_repeats(limits.routes, "/limits/routes", "route");
    if (part_.finishes.empty()) {
      fault(Code::empty,
            "/finishes",
            "",
            "at least \"none\"",
            "The list of finishes is empty; write \"none\" for no finish.");
    }
    if (limits.medium && !media.contains(*limits.medium)) {
      const std::vector<std::string_view> words(media.begin(), media.end());
      fault(Code::unknown_name,
            "/limits/medium",
            *limits.medium,
            "a medium of the material table",
            "No material has a rating in \"" + *limits.medium + "\"." +
                did_you_mean(*limits.medium, words));
    }
    for (std::size_t i = 0; i < part_.operations.size(); ++i) {
      const auto& use = part_.operations[i];
      const std::string where = "/operations/" + std::to_string(i);
      known_words({use.operation}, operations, where, "operation");
      positive(use.units, where, "number of units");
    }
    if (catalogue_.materials.size() == 0) {
      fault(Code::empty, "", "", "at least one material", "The catalogue has no material.");
    }
  }

  void settings() {
    const auto share = [&](double value, const std::string& where, const std::string& what) {
      if (!(value >= 0.0 && value <= 1.0)) {
        fault(Code::out_of_range,
              where,
              plain(value),
              "from 0 to 1",
              "The " + what + " must lie between 0 and 1; it is " + plain(value) + ".");
      }
    };
    share(settings_.near, "/settings/near", "margin of near designs");
    share(settings_.fold, "/settings/fold", "margin of folding");
    share(settings_.scrap_credit, "/settings/scrap_credit", "scrap credit");
    const auto length = [&](double value, const std::string& where, const std::string& what) {
      if (!(value >= 0.0) || !std::isfinite(value)) {
        fault(Code::out_of_range,
              where,
              plain(value),
              "zero or more",
              "The " + what + " cannot be negative.");
      }
    };
    length(settings_.kerf, "/settings/kerf", "saw cut");
    length(settings_.machining_allowance, "/settings/machining_allowance", "machining allowance");
  }

  const Part& part_;
  const Catalogue& catalogue_;
  const Settings& settings_;
  FaultList faults_;
};

}  // namespace

void validate(const Part& part, const Catalogue& catalogue, const Settings& settings) {
  PartCheck(part, catalogue, settings).run();
}

}  // namespace bismar
