// SPDX-License-Identifier: MIT
#include "sizing/explain.hpp"
#include "sizing/index_lines.hpp"
#include "sizing/words.hpp"

#include <bismar/error.hpp>
#include <bismar/numeric/floating_point_guard.hpp>
#include <bismar/quantity/format.hpp>
#include <bismar/sizing/front.hpp>

#include <algorithm>
#include <cmath>
#include <span>

namespace bismar {

namespace {

constexpr std::size_t shown_candidates = 6;

std::string lower(std::string_view text) {
  std::string out(text);
  for (char& c : out) {
    if (c >= 'A' && c <= 'Z') {
      c = static_cast<char>(c - 'A' + 'a');
    }
  }
  return out;
}

/// The ids that contain what was typed, or whose material's name does; else the nearest id.
std::string suggestion(const std::string& typed,
                       const Catalogue& catalogue,
                       std::span<const std::string_view> ids) {
  constexpr std::size_t most = 5;
  const std::string wanted = lower(typed);
  std::vector<std::string> found;
  for (std::size_t m = 0; m < catalogue.materials.size() && !wanted.empty(); ++m) {
    const auto& info = catalogue.materials.info(m);
    if (lower(info.id).find(wanted) != std::string::npos ||
        lower(info.name).find(wanted) != std::string::npos) {
      found.push_back(info.id);
    }
  }
  if (found.empty()) {
    return did_you_mean(typed, ids);
  }
  std::string text = " Did you mean ";
  const std::size_t shown = std::min(found.size(), most);
  for (std::size_t i = 0; i < shown; ++i) {
    text += (i == 0                                    ? "\""
             : i + 1 == shown && shown == found.size() ? " or \""
                                                       : ", \"") +
            found[i] + "\"";
  }
  if (shown < found.size()) {
    text += " or one of " + std::to_string(found.size() - shown) + " more";
  }
  return text + "?";
}

std::uint32_t find_material(const std::string& id, const Catalogue& catalogue) {
  if (const auto found = catalogue.materials.find(id)) {
    return static_cast<std::uint32_t>(*found);
  }
  std::vector<std::string_view> ids;
  for (std::size_t m = 0; m < catalogue.materials.size(); ++m) {
    ids.emplace_back(catalogue.materials.info(m).id);
  }
  // A grade's plain name is what people type: take it where it is the name of one material only.
  std::vector<std::uint32_t> named;
  for (std::size_t m = 0; m < catalogue.materials.size(); ++m) {
    if (catalogue.materials.info(m).name == id) {
      named.push_back(static_cast<std::uint32_t>(m));
    }
  }
  if (named.size() == 1) {
    return named.front();
  }
  std::string message = "There is no material \"" + id + "\" in the catalogue.";
  if (named.size() > 1) {
    message = "\"" + id + "\" is the name of " + std::to_string(named.size()) +
              " materials; name one by its id:";
    for (const auto m : named) {
      message += " " + catalogue.materials.info(m).id;
    }
    message += ".";
  } else {
    message += suggestion(id, catalogue, ids) +
               " A material is named by its id, or by its name where no other has the same.";
  }
  throw Error({Code::unknown_name, "material", id, "an id of the material table", message});
}

/// Where a point lies relative to the front: the design that beats it by most.
const Design* beaten_by(const Result& result, double mass, double cost) {
  const Design* best = nullptr;
  double most = 0.0;
  for (std::size_t i = 0; i < result.front_count; ++i) {
    const auto& design = result.designs[i];
    if (design.mass <= mass && design.cost <= cost) {
      const double margin = (mass - design.mass) / mass + (cost - design.cost) / cost;
      if (best == nullptr || margin > most) {
        best = &design;
        most = margin;
      }
    }
  }
  return best;
}

std::string what(const Design& design) {
  const std::string section =
      design.stock_item.empty() ? design.shape + " " + design.size_text : design.size_text;
  return design.material_name + ", " + section + ", " + design.route +
         (design.treatment.empty() ? "" : " and " + design.treatment) +
         (design.finish == "none" ? "" : ", " + design.finish);
}

class Asked {
 public:
  Asked(std::uint32_t material,
        const Part& part,
        const Catalogue& catalogue,
        const Settings& settings)
      : part_(part),
        catalogue_(catalogue),
        settings_(settings),
        material_(material),
        result_(front(part, catalogue, settings)),
        solved_(solve_candidates(part, catalogue, settings, {}, material)) {}

  Answer run() {
    const auto count = [&](Outcome::Kind kind) {
      return std::count_if(solved_.outcomes.begin(),
                           solved_.outcomes.end(),
                           [kind](const Outcome& outcome) { return outcome.kind == kind; });
    };
    if (count(Outcome::Kind::feasible) > 0) {
      feasible();
    } else if (count(Outcome::Kind::infeasible) > 0) {
      infeasible();
    } else if (count(Outcome::Kind::undecided) + count(Outcome::Kind::excluded) > 0) {
      undecided();
    } else {
      cannot_exist();
    }
    return std::move(answer_);
  }

 private:
  void say(std::string line) { answer_.lines.push_back(std::move(line)); }
  /// The design that is shown: on the front, else near it, else the one least beaten.
  void feasible() {
    const auto& id = catalogue_.materials.info(material_).id;
    for (std::size_t i = 0; i < result_.designs.size(); ++i) {
      if (result_.designs[i].material == id) {
        answer_.design = result_.designs[i];
        answer_.standing =
            i < result_.front_count ? Answer::Standing::front : Answer::Standing::near;
        break;
      }
    }
    if (!answer_.design) {
      dominated();
    } else if (answer_.standing == Answer::Standing::front) {
      on_front();
    } else {
      answer_.headline = "Near the front, within " + plain(settings_.near * 100.0, 3) +
                         " %: " + what(*answer_.design) + ".";
      say_beaten(*answer_.design);
    }
    details();
  }

  void on_front() {
    const auto& design = *answer_.design;
    const auto ruler = exchange_ruler(result_, part_, catalogue_, Per::material, settings_);
    answer_.headline = "On the front: " + what(design) + ", " + mass_text(design.mass) + ", " +
                       money_text(design.cost, result_.currency) + ".";
    bool chosen = false;
    for (const auto& stretch : ruler.stretches) {
      if (stretch.choice != design.material) {
        continue;
      }
      chosen = true;
      std::string line = "It is the choice where a kilogram is worth ";
      line += stretch.to ? format_significant(stretch.from, 3) + " to " +
                               format_significant(*stretch.to, 3)
                         : "more than " + format_significant(stretch.from, 3);
      say(line + " " + result_.currency + "/kg.");
    }
    for (const auto& one : ruler.unsupported) {
      if (!chosen && result_.designs[one.design].material == design.material) {
        say("No worth of a kilogram makes it the choice; at " + format_significant(one.at, 3) +
            " " + result_.currency + "/kg it is only " + money_text(one.regret, result_.currency) +
            " behind.");
      }
    }
  }

  void dominated() {
    // The best design of the material by the share that the front beats it by.
    const Outcome* best = nullptr;
    Outcome::Point point;
    double least = 0.0;
    for (const auto& outcome : solved_.outcomes) {
      for (const auto& one : outcome.points) {
        const auto* other = beaten_by(result_, one.mass, one.cost);
        const double margin =
            other == nullptr ? 0.0 : std::max(one.mass / other->mass, one.cost / other->cost);
        if (best == nullptr || margin < least) {
          best = &outcome;
          point = one;
          least = margin;
        }
      }
    }
    answer_.standing = Answer::Standing::dominated;
    std::size_t group = 0;
    answer_.design = make_design(*solved_.problem, *best, point, group);
    answer_.headline = "Feasible, but beaten: " + what(*answer_.design) + ", " +
                       mass_text(point.mass) + ", " + money_text(point.cost, result_.currency) +
                       ".";
    say_beaten(*answer_.design);
  }

  void say_beaten(const Design& design) {
    if (const auto* other = beaten_by(result_, design.mass, design.cost)) {
      say(what(*other) + " is " + mass_text(design.mass - other->mass) + " lighter and " +
          money_text(design.cost - other->cost, result_.currency) + " cheaper.");
    }
  }

  void details() {
    const auto& design = *answer_.design;
    const auto found =
        std::find_if(solved_.outcomes.begin(), solved_.outcomes.end(), [&](const Outcome& outcome) {
          return outcome.candidate == design.candidate;
        });
    const bool own_ratios = found->group == Outcome::no_group;
    if (own_ratios) {
      solved_.problem->add(design.candidate, design.size, design.free_sizes);
    }
    const auto group = own_ratios ? solved_.problem->groups() - 1 : found->group;
    answer_.checks = limit_lines(*solved_.problem, group, design);
    answer_.sources = provenance_lines(*solved_.problem, group, design);
    answer_.index = index_lines(
        design, solved_.problem->part(), solved_.problem->catalogue(), solved_.problem->settings());
  }

  void infeasible() {
    answer_.standing = Answer::Standing::infeasible;
    std::vector<const Outcome*> all;
    for (const auto& outcome : solved_.outcomes) {
      if (outcome.kind == Outcome::Kind::infeasible) {
        all.push_back(&outcome);
      }
    }
    std::stable_sort(all.begin(), all.end(), [](const Outcome* a, const Outcome* b) {
      return a->least_utilisation < b->least_utilisation;
    });
    answer_.headline = "Infeasible: " + all.front()->reason + ".";
    for (std::size_t i = 0; i < all.size() && i < shown_candidates; ++i) {
      for (auto& line : infeasible_lines(*solved_.problem, *all[i])) {
        say(std::move(line));
      }
    }
    if (all.size() > shown_candidates) {
      say("... and " + std::to_string(all.size() - shown_candidates) +
          " more candidates of this material.");
    }
  }

  void undecided() {
    answer_.standing = Answer::Standing::undecided;
    const auto& first = solved_.outcomes.front();
    answer_.headline = "Undecided: the table has no value for " + first.reason + ".";
    say("Add the value to the table, or let the job fill gaps with the class median and flag every "
        "use.");
  }

  void cannot_exist() {
    answer_.standing = Answer::Standing::cannot_exist;
    const auto& info = catalogue_.materials.info(material_);
    if (const auto broken = material_rules(info, part_.limits)) {
      answer_.headline = "Cannot exist here: " + std::string(name(broken->rule)) + ".";
      say(broken->text);
      return;
    }
    answer_.headline = "Cannot exist: no route of the job makes this part of it.";
    for (const auto route : route_choices(part_, catalogue_)) {
      say(catalogue_.routes[route].id + ": " + why_not(route));
    }
  }

  /// The first rule that a route breaks with every shape and list of the part.
  std::string why_not(std::uint32_t route) const {
    Candidate candidate;
    candidate.material = material_;
    candidate.route = route;
    candidate.finish = finish_choices(part_, catalogue_).front();
    const auto treatments = needed_treatments(
        catalogue_.materials.info(material_), catalogue_.routes[route], catalogue_);
    candidate.treatment = treatments.empty() ? Candidate::none : treatments.front();
    std::string text;
    for (std::uint32_t s = 0; s < part_.body.shapes.size(); ++s) {
      candidate.shape = s;
      if (const auto broken = first_broken_rule(candidate, part_, catalogue_);
          broken && text.empty()) {
        text = broken->text;
      }
    }
    candidate.shape = Candidate::none;
    for (const auto list : stock_lists(part_, catalogue_)) {
      candidate.stock = list;
      if (const auto broken = first_broken_rule(candidate, part_, catalogue_);
          broken && text.empty()) {
        text = broken->text;
      }
    }
    return text;
  }

  const Part& part_;
  const Catalogue& catalogue_;
  const Settings& settings_;
  std::uint32_t material_;
  Result result_;
  Solved solved_;
  Answer answer_;
};

}  // namespace

Answer why(const std::string& material,
           const Part& part,
           const Catalogue& catalogue,
           const Settings& settings) {
  const FloatingPointGuard guard;
  validate(part, catalogue, settings);
  return Asked(find_material(material, catalogue), part, catalogue, settings).run();
}

}  // namespace bismar
