// SPDX-License-Identifier: MIT
#include <bismar/sizing/part.hpp>

#include "sizing/part_faults.hpp"
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
    validate_shapes(part_, faults_);
    stock();
    validate_loads(part_, faults_);
    limits();
    names();
    settings();
    faults_.throw_if_any();
  }

 private:
  /// Every word must be one of `known`.
  void known_words(const std::vector<std::string>& words,
                   const std::set<std::string>& known,
                   const std::string& where,
                   const std::string& what) {
    const std::vector<std::string_view> list(known.begin(), known.end());
    for (std::size_t i = 0; i < words.size(); ++i) {
      if (!known.contains(words[i])) {
        faults_.fault(Code::unknown_name,
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
        faults_.fault(Code::duplicate,
                      where + "/" + std::to_string(i),
                      words[i],
                      "each once",
                      "The " + what + " \"" + words[i] + "\" stands twice; leave one of them out.");
      }
    }
  }

  void numbers() {
    faults_.positive(part_.body.length, "/member/length", "length");
    if (!(part_.quantity >= 1.0) || !std::isfinite(part_.quantity)) {
      faults_.fault(Code::out_of_range,
                    "/quantity",
                    plain(part_.quantity),
                    "at least 1",
                    "The quantity must be at least one part; it is " + plain(part_.quantity) + ".");
    }
    if (part_.batch && (!(*part_.batch >= 1.0) || *part_.batch > part_.quantity)) {
      faults_.fault(Code::out_of_range,
                    "/batch",
                    plain(*part_.batch),
                    "from 1 to the quantity",
                    "A batch holds from one part to the whole quantity of " +
                        plain(part_.quantity) + "; it is " + plain(*part_.batch) + ".");
    }
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

  void limits() {
    const auto& limits = part_.limits;
    faults_.optional_positive(limits.deflection, "/limits/deflection", "deflection limit");
    faults_.optional_positive(limits.rotation, "/limits/rotation", "rotation limit");
    faults_.optional_positive(limits.frequency, "/limits/frequency", "least natural frequency");
    faults_.optional_positive(limits.elongation, "/limits/elongation", "limit of elongation");
    faults_.optional_positive(limits.twist, "/limits/twist", "twist limit");
    faults_.optional_positive(limits.height, "/limits/height", "height of the envelope");
    faults_.optional_positive(limits.width, "/limits/width", "width of the envelope");
    faults_.optional_positive(limits.wall, "/limits/wall", "least wall");
    faults_.optional_positive(limits.mass, "/limits/mass", "mass cap");
    faults_.optional_positive(limits.cost, "/limits/cost", "cost cap");
    faults_.optional_positive(
        limits.temperature, "/limits/temperature", "service temperature in kelvin");
    faults_.positive(limits.slenderness, "/limits/slenderness", "slenderness cap");
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
      faults_.fault(
          Code::unknown_name,
          where + "/property",
          limit.property,
          "a property or column",
          "There is no property \"" + limit.property + "\"." + did_you_mean(limit.property, words));
    }
    if (!limit.at_least && !limit.at_most) {
      faults_.fault(Code::missing,
                    where,
                    "",
                    "at_least or at_most",
                    "The limit on " + limit.property + " needs \"at_least\" or \"at_most\".");
    }
    for (const auto& value : {limit.at_least, limit.at_most}) {
      if (value && !std::isfinite(*value)) {
        faults_.fault(Code::not_finite,
                      where,
                      plain(*value),
                      "a finite number",
                      "The limit on " + limit.property + " is not finite.");
      }
    }
    if (limit.at_least && limit.at_most && *limit.at_least > *limit.at_most) {
      faults_.fault(Code::conflict,
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
      faults_.fault(Code::empty,
                    "/finishes",
                    "",
                    "at least \"none\"",
                    "The list of finishes is empty; write \"none\" for no finish.");
    }
    if (limits.medium && !media.contains(*limits.medium)) {
      const std::vector<std::string_view> words(media.begin(), media.end());
      faults_.fault(Code::unknown_name,
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
      faults_.positive(use.units, where, "number of units");
    }
    if (catalogue_.materials.size() == 0) {
      faults_.fault(Code::empty, "", "", "at least one material", "The catalogue has no material.");
    }
  }

  void settings() {
    const auto share = [&](double value, const std::string& where, const std::string& what) {
      if (!(value >= 0.0 && value <= 1.0)) {
        faults_.fault(Code::out_of_range,
                      where,
                      plain(value),
                      "from 0 to 1",
                      "The " + what + " must lie between 0 and 1; it is " + plain(value) + ".");
      }
    };
    share(settings_.near, "/settings/near", "margin of near designs");
    share(settings_.fold, "/settings/fold", "margin of folding");
    share(settings_.scrap_credit, "/settings/scrap_credit", "scrap credit");
    const auto margin = [&](double value, double most, const std::string& key) {
      if (!(value > 0.0 && value <= most)) {
        faults_.fault(Code::out_of_range,
                      "/settings/" + key,
                      plain(value),
                      "above 0, at most " + plain(most),
                      "The margin " + key + " must lie above 0 and be at most " + plain(most) +
                          "; it is " + plain(value) + ".");
      }
    };
    margin(settings_.epsilon, 0.1, "epsilon");
    margin(settings_.delta, 0.01, "delta");
    const auto length = [&](double value, const std::string& where, const std::string& what) {
      if (!(value >= 0.0) || !std::isfinite(value)) {
        faults_.fault(Code::out_of_range,
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
  PartFaults faults_;
};

}  // namespace

void validate(const Part& part, const Catalogue& catalogue, const Settings& settings) {
  PartCheck(part, catalogue, settings).run();
}

}  // namespace bismar
