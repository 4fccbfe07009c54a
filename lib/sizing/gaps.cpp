// SPDX-License-Identifier: MIT
#include "sizing/gaps.hpp"

#include "sizing/derating.hpp"
#include "sizing/shape_section.hpp"

#include <algorithm>
#include <array>

namespace bismar {

namespace {

bool step_lacks_value(const SizingProblem& problem, std::uint32_t material, const StepState& step) {
  return !step.priced ||
         std::any_of(step.cases.begin(),
                     step.cases.end(),
                     [](const ResolvedMaterial& resolved) {
                       return !resolved.missing.empty() || !resolved.member.rho;
                     }) ||
         !open_limits(problem, material, step).empty();
}

}  // namespace

std::optional<Range> limited_value(const MaterialTable& table,
                                   const PropertyLimit& limit,
                                   std::size_t row) {
  if (const auto known = property(limit.property)) {
    return table.value(*known, row);
  }
  return table.extra(limit.property, row);
}

double limited_end(const PropertyReader& reader,
                   const PropertyLimit& limit,
                   const Range& range,
                   bool at_least) {
  if (const auto known = property(limit.property)) {
    const auto& ends = reader.settings().range_ends;
    if (const auto own = ends.find(*known); own != ends.end()) {
      return range.at(own->second);
    }
    if (*known == Property::price || *known == Property::density) {
      return range.at(reader.end(*known));
    }
  }
  return at_least ? range.low : range.high;
}

std::vector<std::string> open_limits(const SizingProblem& problem,
                                     std::uint32_t material,
                                     const StepState& step) {
  const auto& limits = problem.part().limits;
  const auto& info = problem.catalogue().materials.info(material);
  std::vector<std::string> out;
  for (const auto& limit : limits.properties) {
    if (!limited_value(problem.catalogue().materials, limit, step.row)) {
      out.push_back(limit.property);
    }
  }
  if (limits.medium && !info.corrosion.contains(*limits.medium)) {
    out.push_back("corrosion in " + *limits.medium);
  }
  if (limits.medium && problem.reader().value(Property::gamma_M, step.row)) {
    // Timber in or at water is service class 3 of EN 1995-1-1, for which the table has no factors.
    out.emplace_back("k_mod in service class 3");
  }
  const MemberDetails& details = problem.part().body.details;
  const auto& cases = problem.part().body.load_cases;
  if (details.crack && !info.isotropic) {
    out.emplace_back("fracture toughness along and across the grain");
  }
  const bool weld_tires = (details.welded || details.detail_category) &&
                          std::any_of(cases.begin(), cases.end(), [](const LoadCase& one) {
                            return one.fatigue.has_value();
                          });
  if (weld_tires && !is_steel(info)) {
    out.emplace_back("fatigue strength of a weld");  // EN 1993-1-9 is for steel
  }
  if (limits.temperature) {
    const auto highest = highest_temperature(
        problem.reader(), info, step.row, *limits.temperature, problem.part().body.load_cases);
    if (!highest) {
      out.emplace_back("maximum loaded temperature");
    } else if (*limits.temperature > *highest && *highest == room_values_up_to) {
      out.emplace_back("strength above 100 C");
    }
  }
  return out;
}

bool lacks_value(SizingProblem& problem, std::uint32_t material) {
  const auto& states = problem.states(material);
  return std::any_of(states.begin(), states.end(), [&](const StepState& step) {
    return step_lacks_value(problem, material, step);
  });
}

bool lacks_value(SizingProblem& problem, const Candidate& candidate) {
  if (lacks_value(problem, candidate.material)) {
    return true;
  }
  const auto& shape = problem.part().body.shapes[candidate.shape];
  if (shape.family == SectionFamily::polygon) {
    // Thin ones are left open: compiling knows.
    const auto& compiled = problem.add(candidate);
    const bool lacks = !compiled.undecided.empty() || !compiled.undecided_limits.empty();
    problem.remove_last();
    return lacks;
  }
  std::vector<SectionProperties> samples;
  for (const auto& sizes : sample_sizes(shape)) {
    samples.push_back(problem.sections().at(candidate.shape, Route{}, 1.0, sizes));
  }
  for (const StepState& step : problem.states(candidate.material)) {
    for (std::size_t c = 0; c < step.cases.size(); ++c) {
      const auto& member = step.cases[c].member;
      for (const LimitState* state : limit_states()) {
        const auto needed = state->needs(problem.effects()[c], member);
        const bool complete = std::all_of(needed.begin(), needed.end(), [&](Symbol symbol) {
          return value_of(member, symbol).has_value();
        });
        const bool applies =
            !complete && std::any_of(samples.begin(), samples.end(), [&](const auto& section) {
              return state->applies(problem.effects()[c], problem.member_limits(), member, section);
            });
        if (applies) {
          return true;
        }
      }
    }
  }
  return false;
}

std::string traits(SizingProblem& problem, std::uint32_t material) {
  std::string out;
  for (const StepState& step : problem.states(material)) {
    out += step_lacks_value(problem, material, step) ? '?' : '.';
    for (const auto& resolved : step.cases) {
      const MemberMaterial& member = resolved.member;
      std::uint32_t bits = 0;
      for (const Symbol symbol : all_symbols) {
        bits = 2 * bits + (value_of(member, symbol) ? 1U : 0U);
      }
      bits = 2 * bits + (member.ceramic ? 1U : 0U);
      bits = 2 * bits + (member.steel ? 1U : 0U);
      bits = 2 * bits + (member.cast_iron ? 1U : 0U);
      bits = 2 * bits + (member.weld_yield_factor ? 1U : 0U);
      out += static_cast<char>('0' + static_cast<int>(member.rule));
      out += static_cast<char>('0' + static_cast<int>(member.column_law));
      for (int byte = 0; byte < 4; ++byte) {
        out += static_cast<char>((bits >> (8 * byte)) & 0xffU);
      }
    }
  }
  return out;
}

}  // namespace bismar
