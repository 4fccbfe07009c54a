// SPDX-License-Identifier: MIT
#include "sizing/dominance.hpp"

#include "sizing/enumeration.hpp"
#include "sizing/gaps.hpp"

#include <bismar/mechanics/section.hpp>

#include <algorithm>
#include <array>
#include <tuple>

namespace bismar {

namespace {

/// How a value counts: -1 the higher the better, +1 the lower, 0 must be equal.
class Directions {
 public:
  Directions(const SizingProblem& problem,
             std::size_t load_case,
             const MemberMaterial& material,
             bool walls) {
    // A wide flat beam and a tube stand for all sections: one turns aside, the other has walls.
    std::vector<SectionProperties> sections = {solid_rectangle(0.1, 0.01)};
    if (walls) {
      sections.push_back(round_tube(0.1, 0.01, Forming::unknown));
      sections.push_back(i_section(0.2, 0.1, 0.006, 0.009, 0.01));
      sections.push_back(angle(0.1, 0.1, 0.01, 0.0, 0.0));
    }
    const auto& effects = problem.effects()[load_case];
    for (const LimitState* state : limit_states()) {
      const bool applies = std::any_of(sections.begin(), sections.end(), [&](const auto& section) {
        return state->applies(effects, problem.member_limits(), material, section);
      });
      if (!applies) {
        continue;
      }
      for (const Symbol symbol : all_symbols) {
        note(symbol, state->trend_with(symbol));
      }
    }
    // Mass and, with it, cost.
    note(Symbol::rho, Trend::rises);
  }

  [[nodiscard]] int of(Symbol symbol) const {
    const auto& one = marks_[static_cast<std::size_t>(symbol)];
    if (one.neither || (one.high && one.low)) {
      return 0;
    }
    return one.high ? -1 : 1;
  }
  [[nodiscard]] bool is_read(Symbol symbol) const {
    const auto& one = marks_[static_cast<std::size_t>(symbol)];
    return one.neither || one.high || one.low;
  }

 private:
  struct Mark {
    bool high = false;  ///< Some limit state wants it high.
    bool low = false;
    bool neither = false;
  };
  void note(Symbol symbol, Trend trend) {
    auto& one = marks_[static_cast<std::size_t>(symbol)];
    one.high = one.high || trend == Trend::falls;
    one.low = one.low || trend == Trend::rises;
    one.neither = one.neither || trend == Trend::neither;
  }
  std::array<Mark, all_symbols.size()> marks_{};
};

/// A material as dominance sees it: what must be equal, and what the lower the better.
struct Profile {
  std::vector<double> equal;
  std::vector<double> better;
  std::vector<double> densities;  ///< A step; among `better` too.
};

class Search {
 public:
  Search(SizingProblem& problem, bool walls)
      : problem_(problem), walls_(walls), kinds_(problem.catalogue()) {}

  Dominance run(std::span<const std::uint32_t> materials) {
    Dominance out;
    const auto& table = problem_.catalogue().materials;
    out.by.assign(table.size(), Dominance::none);
    out.is_lighter.assign(table.size(), 0);
    std::vector<std::uint32_t> sorted(materials.begin(), materials.end());
    const auto less = [&](std::uint32_t a, std::uint32_t b) {
      return kinds_(&table.info(a), &table.info(b));
    };
    std::stable_sort(sorted.begin(), sorted.end(), less);
    for (std::size_t from = 0; from < sorted.size();) {
      std::size_t to = from + 1;
      while (to < sorted.size() && !less(sorted[from], sorted[to])) {
        ++to;
      }
      if (to - from > 1) {
        kind(std::span(sorted).subspan(from, to - from), out);
      }
      from = to;
    }
    return out;
  }

 private:
  void kind(std::span<const std::uint32_t> materials, Dominance& out) {
    struct Row {
      std::uint32_t material;
      Profile profile;
    };
    std::vector<Row> rows;
    for (const auto m : materials) {
      rows.push_back({m, profile(m)});
    }
    std::stable_sort(rows.begin(), rows.end(), [](const Row& a, const Row& b) {
      return std::tie(a.profile.equal, a.profile.better, a.material) <
             std::tie(b.profile.equal, b.profile.better, b.material);
    });
    std::vector<const Row*> kept;
    for (const Row& row : rows) {
      // What is replaced stands behind what replaces it, and alike rows stand together.
      if (!kept.empty() && kept.back()->profile.equal != row.profile.equal) {
        kept.clear();
      }
      const auto by = std::find_if(kept.begin(), kept.end(), [&](const Row* other) {
        for (std::size_t i = 0; i < row.profile.better.size(); ++i) {
          if (!(other->profile.better[i] <= row.profile.better[i])) {
            return false;
          }
        }
        return true;
      });
      if (by == kept.end()) {
        kept.push_back(&row);
      } else {
        out.by[row.material] = (*by)->material;
        out.is_lighter[row.material] = (*by)->profile.densities != row.profile.densities ? 1 : 0;
        ++out.replaced;
      }
    }
  }

  Profile profile(std::uint32_t material) {
    Profile out;
    const auto steps = problem_.catalogue().materials.steps(material);
    const auto& states = problem_.states(material);
    for (std::size_t s = 0; s < steps.size(); ++s) {
      const StepState& state = states[s];
      out.equal.insert(out.equal.end(), {steps[s].above, steps[s].up_to});
      out.equal.push_back(state.priced ? 1.0 : 0.0);
      out.better.insert(out.better.end(), {state.density, state.usual_price});
      out.densities.push_back(state.density);
      add_limits(material, state, out);
      for (std::size_t c = 0; c < state.cases.size(); ++c) {
        add_case(state.cases[c], c, out);
      }
    }
    return out;
  }

  /// What the job asks of a material by itself.
  void add_limits(std::uint32_t material, const StepState& state, Profile& out) {
    const auto& limits = problem_.part().limits;
    out.equal.push_back(static_cast<double>(open_limits(problem_, material, state).size()));
    for (std::size_t p = 0; p < limits.properties.size(); ++p) {
      const auto u = problem_.property_utilisation(p, state.row);
      out.equal.push_back(u ? 1.0 : 0.0);
      out.better.push_back(u && *u > 1.0 ? 1.0 : 0.0);
    }
    if (limits.temperature) {
      const auto lowest = problem_.reader().value(Property::service_temperature_min, state.row);
      const auto highest = highest_temperature(problem_.reader(),
                                               problem_.catalogue().materials.info(material),
                                               state.row,
                                               *limits.temperature,
                                               problem_.part().body.load_cases);
      const bool fails =
          (lowest && *limits.temperature < *lowest) || (highest && *limits.temperature > *highest);
      out.better.push_back(fails ? 1.0 : 0.0);
    }
  }

  void add_case(const ResolvedMaterial& resolved, std::size_t load_case, Profile& out) {
    const MemberMaterial& member = resolved.member;
    const Directions directions(problem_, load_case, member, walls_);
    for (const Symbol symbol : all_symbols) {
      if (!directions.is_read(symbol)) {
        continue;
      }
      const auto& value = value_of(member, symbol);
      out.equal.push_back(value ? 1.0 : 0.0);
      const int direction = directions.of(symbol);
      if (direction == 0) {
        out.equal.push_back(value.value_or(0.0));
      } else {
        out.better.push_back(direction * value.value_or(0.0));
      }
    }
    for (const Property property : resolved.missing) {
      out.equal.push_back(1000.0 + static_cast<double>(property));
    }
    // An axial modulus of its own counts as the modulus does.
    const double axial = member.E_axial.value_or(0.0);
    out.equal.push_back(member.E_axial ? 1.0 : 0.0);
    if (directions.is_read(Symbol::E) && directions.of(Symbol::E) != 0) {
      out.better.push_back(directions.of(Symbol::E) * axial);
    } else {
      out.equal.push_back(axial);
    }
    for (const double value : {static_cast<double>(member.rule),
                               static_cast<double>(member.column_law),
                               member.ceramic ? 1.0 : 0.0,
                               member.steel ? 1.0 : 0.0,
                               member.cast_iron ? 1.0 : 0.0,
                               member.endurance_cycles,
                               member.weld_yield_factor.value_or(-1.0),
                               member.weld_tensile_factor.value_or(-1.0),
                               member.k_cr,
                               member.strength_factor,
                               resolved.depth_reference,
                               resolved.depth_exponent}) {
      out.equal.push_back(value);
    }
  }

  SizingProblem& problem_;
  bool walls_;
  KindOrder kinds_;
};

}  // namespace

Dominance find_dominance(SizingProblem& problem,
                         std::span<const std::uint32_t> materials,
                         bool walls) {
  return Search(problem, walls).run(materials);
}

}  // namespace bismar
