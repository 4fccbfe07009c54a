// SPDX-License-Identifier: MIT
#include "sizing/explain.hpp"

#include "sizing/words.hpp"

#include <bismar/quantity/format.hpp>

#include <algorithm>
#include <cmath>
#include <filesystem>
#include <set>

namespace bismar {

namespace {

std::string evidence_text(Evidence evidence) {
  switch (evidence) {
    case Evidence::from_memory:
      return "unverified";
    case Evidence::seen:
      return "seen in print";
    case Evidence::estimated:
      return "estimated";
    case Evidence::user:
      return "user's table";
  }
  return {};
}

std::string basis_text(Basis basis) {
  switch (basis) {
    case Basis::minimum:
      return "minimum";
    case Basis::typical:
      return "typical";
    case Basis::indicative:
      return "indicative";
  }
  return {};
}

std::string value_text(double value, const PropertyInfo& info, const std::string& currency) {
  if (info.property == Property::price) {
    return plain(value, 4) + " " + currency + "/kg";
  }
  return info.unit.empty() ? plain(value, 4) : format_engineering(value, info.unit, 4);
}

std::string range_text(const Range& range, const PropertyInfo& info, const std::string& currency) {
  const auto low = value_text(range.low, info, currency);
  return range.low == range.high ? low : low + " .. " + value_text(range.high, info, currency);
}

/// Symbols that the failing limit states read and that a larger value of would help.
std::vector<Symbol> helpful_symbols(const SizingProblem& problem,
                                    const CompiledCandidate& compiled,
                                    const Outcome& outcome) {
  std::set<Symbol> out;
  for (const auto index : outcome.failed) {
    const auto& constraint = compiled.constraints[index];
    const auto piece = std::find_if(compiled.pieces.begin(),
                                    compiled.pieces.end(),
                                    [](const Piece& one) { return one.step != nullptr; });
    if (constraint.kind != Constraint::Kind::limit_state || piece == compiled.pieces.end()) {
      continue;
    }
    const auto& member = piece->step->cases[constraint.load_case].member;
    for (const Symbol symbol :
         constraint.state->needs(problem.effects()[constraint.load_case], member)) {
      if (constraint.state->trend_with(symbol) == Trend::falls) {
        out.insert(symbol);
      }
    }
  }
  return {out.begin(), out.end()};
}

/// How one limit state comes about, in the load cases in which it does so alike.
struct Account {
  const LimitState* state;
  Explanation explanation;
  std::vector<std::size_t> load_cases;
  bool governs;
};

/// The line with the load cases that it is of: "Yield, in daily use: ...". A part with one load
/// case needs none.
std::string with_load_cases(const Account& account, const std::vector<LoadCase>& load_cases) {
  const std::string& line = account.explanation.line;
  if (load_cases.size() < 2) {
    return line;
  }
  std::string where;
  if (account.load_cases.size() == load_cases.size()) {
    where = "in every load case";
  } else {
    for (const auto one : account.load_cases) {
      where += (where.empty() ? "in load case \"" : "\", \"") + load_cases[one].name;
    }
    where += "\"";
  }
  // Lines begin with the name of their limit state and a colon.
  const auto colon = line.find(": ");
  return colon == std::string::npos ? line + " (" + where + ")"
                                    : line.substr(0, colon) + ", " + where + line.substr(colon);
}

/// The least factor on a value of the material that makes the candidate feasible, up to ten.
std::optional<double> factor_needed(SizingProblem& problem, const Outcome& outcome, Symbol symbol) {
  const auto material = outcome.candidate.material;
  std::size_t evaluations = 0;
  Solved solved;  // its counts are not asked for
  const auto feasible_at = [&](double factor) {
    const auto before = problem.multiply(material, symbol, factor);
    const auto again = outcome.group == Outcome::no_group
                           ? solve_free(problem, outcome.candidate, {}, nullptr, solved)
                           : solve_group(problem, outcome.group, evaluations);
    const bool good = again.kind == Outcome::Kind::feasible;
    problem.restore(material, before);
    return good;
  };
  double high = 10.0;
  if (!feasible_at(high)) {
    return std::nullopt;
  }
  double low = 1.0;
  // To three digits: it is advice.
  while (high / low > 1.0005) {
    const double middle = std::sqrt(low * high);
    (feasible_at(middle) ? high : low) = middle;
  }
  return high;
}

}  // namespace

std::string mass_text(double kilograms) { return format_significant(kilograms, 4) + " kg"; }

std::string money_text(double amount, const std::string& currency) {
  return format_significant(amount, 4) + " " + currency;
}

std::vector<std::string> provenance_lines(const SizingProblem& problem,
                                          std::size_t group,
                                          const Design& design) {
  const auto& compiled = problem.compiled(group);
  const auto detail = problem.detail(group, design.size);
  const auto& step = *detail.piece->step;
  auto used = properties_read(problem, compiled, *detail.piece);
  used.insert(Property::elongation);  // it decided which strength rule holds
  std::vector<std::string> out;
  for (const Property property : used) {
    const auto range = problem.catalogue().materials.value(property, step.row);
    if (!range) {
      continue;
    }
    const auto from = problem.catalogue().materials.provenance(property, step.row);
    std::string line = std::string(info(property).name) + " " +
                       range_text(*range, info(property), problem.catalogue().currency) + ": " +
                       std::filesystem::path(from.table).filename().string();
    if (from.row > 0) {
      line += " line " + std::to_string(from.row);
    }
    line += ", " + (from.source.empty() ? "no source given" : from.source) + ", " +
            basis_text(from.basis) + ", " + evidence_text(from.evidence);
    out.push_back(std::move(line));
  }
  return out;
}

std::vector<std::string> limit_lines(const SizingProblem& problem,
                                     std::size_t group,
                                     const Design& design) {
  const auto& compiled = problem.compiled(group);
  const auto detail = problem.detail(group, design.size);
  const auto& governing = design.utilisations[design.governing];
  std::vector<Account> accounts;
  for (std::size_t i = 0; i < compiled.constraints.size(); ++i) {
    const auto& constraint = compiled.constraints[i];
    if (!detail.piece->applies[i]) {
      continue;
    }
    const auto& resolved = detail.piece->step->cases[constraint.load_case];
    const auto member = resolved.at_depth(detail.section.height);
    const CheckInput input{detail.section,
                           member,
                           problem.effects()[constraint.load_case],
                           problem.member_limits(),
                           problem.part().body.length,
                           constraint.factor};
    auto explanation = constraint.state->explain(input);
    const bool governs =
        constraint.label == governing.limit &&
        (governing.load_case.empty() ||
         governing.load_case == problem.part().body.load_cases[constraint.load_case].name);
    const auto same = std::find_if(accounts.begin(), accounts.end(), [&](const Account& one) {
      return one.state == constraint.state && one.explanation.line == explanation.line &&
             one.explanation.steps == explanation.steps;
    });
    if (same != accounts.end()) {
      same->load_cases.push_back(constraint.load_case);
      same->governs = same->governs || governs;
    } else {
      accounts.push_back(
          {constraint.state, std::move(explanation), {constraint.load_case}, governs});
    }
  }
  std::vector<std::string> out;
  for (const auto& account : accounts) {
    out.push_back(with_load_cases(account, problem.part().body.load_cases));
    if (account.governs) {
      for (const auto& one : account.explanation.steps) {
        out.push_back("  " + one);
      }
      out.push_back("  Source: " + std::string(account.state->source()));
    }
  }
  return out;
}

std::vector<std::string> infeasible_lines(SizingProblem& problem, const Outcome& asked) {
  Outcome outcome = asked;
  const bool free = asked.group == Outcome::no_group;
  const auto& compiled =
      free ? problem.add(asked.candidate,
                         1.0,
                         middle_sizes(problem.part().body.shapes[asked.candidate.shape]))
           : problem.compiled(asked.group);
  for (std::size_t i = 0; free && i < compiled.constraints.size(); ++i) {
    if (compiled.constraints[i].label == outcome.reason) {
      outcome.failed.push_back(i);
    }
  }
  const auto labels = names(outcome.candidate, problem.part(), problem.catalogue());
  std::string how = labels.shape + ", " + labels.route +
                    (labels.treatment.empty() ? "" : " and " + labels.treatment) +
                    (labels.finish == "none" ? "" : ", " + labels.finish);
  std::string line = how + ": " + outcome.reason;
  if (std::isfinite(outcome.least_utilisation) && outcome.least_utilisation > 1.0) {
    line +=
        ", at best " + format_significant(outcome.least_utilisation, 3) + " times what is allowed";
  }
  std::vector<std::string> out = {line + "."};
  const auto& currency = problem.catalogue().currency;
  for (const Symbol symbol : helpful_symbols(problem, compiled, outcome)) {
    const auto factor = factor_needed(problem, outcome, symbol);
    if (!factor) {
      continue;
    }
    const auto property = property_of(symbol);
    for (const auto& piece : compiled.pieces) {
      if (piece.step == nullptr) {
        continue;
      }
      // The table's own value, so that the advice can be looked up in a table.
      if (const auto value = problem.reader().value(property, piece.step->row)) {
        out.push_back("It would come in with a " + std::string(info(property).name) +
                      " of at least about " +
                      value_text(*value * *factor, info(property), currency) + " instead of " +
                      value_text(*value, info(property), currency) + ".");
      }
      break;
    }
  }
  return out;
}

}  // namespace bismar
