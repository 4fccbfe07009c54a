// SPDX-License-Identifier: MIT
#include "sizing/study.hpp"

#include <bismar/numeric/floating_point_guard.hpp>
#include <bismar/numeric/root.hpp>
#include <bismar/sizing/front.hpp>
#include <bismar/sizing/index.hpp>

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <optional>
#include <set>
#include <span>
#include <string>
#include <vector>

namespace bismar {

namespace {

/// How far a property is moved to make a size hold.
constexpr double most_change = 10.0;

/// Properties that are moved, each by a factor; the price comes last, after the symbols.
struct Changes {
  std::span<const Symbol> symbols;
  std::span<const double> factors;  ///< One a symbol, then one for the price where it is given.

  [[nodiscard]] double density() const {
    for (std::size_t i = 0; i < symbols.size(); ++i) {
      if (symbols[i] == Symbol::rho) {
        return factors[i];
      }
    }
    return 1.0;
  }
  [[nodiscard]] double price() const {
    return factors.size() > symbols.size() ? factors.back() : 1.0;
  }
};

/// A size under changed properties.
struct Evaluated {
  double mass = 0.0;
  double material_cost = 0.0;
  double cost = 0.0;
  std::vector<double> utilisations;
};

class Asked {
 public:
  Asked(const Design& design,
        const Part& part,
        const Catalogue& catalogue,
        const Settings& settings)
      : problem_(part, catalogue, settings),
        compiled_(problem_.add(design.candidate, design.size, design.free_sizes)),
        detail_(problem_.detail(0, design.size)),
        size_(design.size) {}

  DesignIndices run() {
    DesignIndices out;
    out.free_size = compiled_.variable.kind == Variable::Kind::continuous;
    if (out.free_size) {
      free_size(out);
    } else {
      neighbours(out);
    }
    return out;
  }

 private:
  [[nodiscard]] const MemberMaterial& member(const Piece& piece, std::size_t load_case) const {
    return piece.step->cases[load_case].member;
  }

  [[nodiscard]] Evaluated evaluate(double x, const Changes& changes) const {
    const auto detail = problem_.detail(0, x);
    const Piece& piece = *detail.piece;
    const double density = changes.density();
    const double net_mass = detail.net_mass * density;
    Purchase purchase = *detail.purchase;
    purchase.mass *= density;
    Range price = piece.step->price;
    price.low *= changes.price();
    price.high *= changes.price();
    const double usual_price = piece.step->usual_price * changes.price();

    Evaluated out;
    const MadePart made{detail.section, net_mass, purchase};
    out.mass = net_mass + compiled_.cost->finish_mass(detail.section);
    out.cost = compiled_.cost->total(made, price, usual_price);
    out.material_cost =
        compiled_.cost->breakdown(made, price, usual_price).bought_mass * usual_price;

    std::array<double, 2> unchanged{};
    out.utilisations.resize(compiled_.constraints.size());
    problem_.evaluate_plain(0, x, unchanged, out.utilisations);
    for (std::size_t i = 0; i < compiled_.constraints.size(); ++i) {
      double& u = out.utilisations[i];
      switch (compiled_.constraints[i].kind) {
        case Constraint::Kind::limit_state:
          if (piece.applies[i]) {
            u = limit_utilisation(compiled_.constraints[i], piece, detail.section, changes);
          }
          break;
        case Constraint::Kind::route_mass_min:
          u /= density;
          break;
        case Constraint::Kind::route_mass_max:
          u *= density;
          break;
        case Constraint::Kind::mass_cap:
          u = out.mass / *problem_.part().limits.mass;
          break;
        case Constraint::Kind::cost_cap:
          u = out.cost / *problem_.part().limits.cost;
          break;
        default:
          break;
      }
    }
    return out;
  }

  [[nodiscard]] double limit_utilisation(const Constraint& constraint,
                                         const Piece& piece,
                                         const SectionProperties& section,
                                         const Changes& changes) const {
    auto material = piece.step->cases[constraint.load_case].at_depth(section.height);
    for (std::size_t s = 0; s < changes.symbols.size(); ++s) {
      if (auto& value = value_of(material, changes.symbols[s])) {
        *value *= changes.factors[s];
      }
      if (changes.symbols[s] == Symbol::E && material.E_axial) {
        *material.E_axial *= changes.factors[s];
      }
    }
    return constraint.state->utilisation({section,
                                          material,
                                          problem_.effects()[constraint.load_case],
                                          problem_.member_limits(),
                                          problem_.part().body.length,
                                          constraint.factor});
  }

  /// Values of the material that the limit states among these constraints read on the piece.
  [[nodiscard]] std::vector<Symbol> symbols_read(const Piece& piece,
                                                 std::span<const std::size_t> constraints) const {
    std::set<Symbol> out;
    for (const std::size_t i : constraints) {
      const auto& one = compiled_.constraints[i];
      if (one.kind != Constraint::Kind::limit_state) {
        continue;
      }
      for (const Symbol symbol :
           one.state->needs(problem_.effects()[one.load_case], member(piece, one.load_case))) {
        out.insert(symbol);
      }
    }
    return {out.begin(), out.end()};
  }

  [[nodiscard]] std::string load_case_of(const Constraint& constraint) const {
    const bool of_loads =
        constraint.kind == Constraint::Kind::limit_state && constraint.state->reads_loads();
    return of_loads ? problem_.part().body.load_cases[constraint.load_case].name : std::string();
  }

  void free_size(DesignIndices& out) {
    const Piece& piece = *detail_.piece;
    SizedDesign sized;
    sized.size = size_;
    // A piece is open below: its end belongs to the piece before, but for the first.
    const bool first = &piece == &compiled_.pieces.front();
    sized.lower =
        first ? piece.lower : std::nextafter(piece.lower, std::numeric_limits<double>::max());
    sized.upper = piece.upper;
    sized.constraints = compiled_.constraints.size();

    // Which limits are active decides which properties count: ask with the density alone first.
    const std::vector<Symbol> density = {Symbol::rho};
    const Sensitivity held = analyse(sized, density, &Evaluated::mass);
    std::vector<std::size_t> active;
    for (const ActiveLimit& one : held.active) {
      active.push_back(one.constraint);
      const auto& constraint = compiled_.constraints[one.constraint];
      out.governing.push_back(
          {constraint.label, load_case_of(constraint), one.multiplier, one.relative_multiplier});
    }
    if (held.at_lower) {
      out.governing.push_back({first ? "least size" : "thickness step or blank", {}, {}, {}});
    }

    std::vector<Symbol> symbols = density;
    for (const Symbol symbol : symbols_read(piece, active)) {
      if (symbol != Symbol::rho) {
        symbols.push_back(symbol);
      }
    }
    const Sensitivity mass = analyse(sized, symbols, &Evaluated::mass);
    const Sensitivity material = analyse(sized, symbols, &Evaluated::material_cost);
    const Sensitivity cost = analyse(sized, symbols, &Evaluated::cost);
    for (std::size_t s = 0; s <= symbols.size(); ++s) {
      PropertyElasticity one;
      if (s == symbols.size()) {
        one.name = "price";
        one.property = Property::price;
        one.value = piece.step->usual_price;
      } else {
        one.name = name(symbols[s]);
        one.property = property_of(symbols[s]);
        one.value = value_read(piece, active, symbols[s]);
      }
      one.mass = mass.objective[s];
      one.material_cost = material.objective[s];
      one.cost = cost.objective[s];
      out.elasticities.push_back(std::move(one));
    }
  }

  /// As the first of the governing limit states sees it.
  [[nodiscard]] double value_read(const Piece& piece,
                                  std::span<const std::size_t> active,
                                  Symbol symbol) const {
    for (const std::size_t i : active) {
      const auto& one = compiled_.constraints[i];
      if (one.kind != Constraint::Kind::limit_state) {
        continue;
      }
      const auto material = piece.step->cases[one.load_case].at_depth(detail_.section.height);
      if (const auto& value = value_of(material, symbol)) {
        return *value;
      }
    }
    return value_of(member(piece, 0), symbol).value_or(0.0);
  }

  [[nodiscard]] Sensitivity analyse(SizedDesign sized,
                                    std::span<const Symbol> symbols,
                                    double Evaluated::*objective) const {
    sized.parameters.assign(symbols.size() + 1, 1.0);
    sized.objective = [this, symbols, objective](double x, std::span<const double> factors) {
      return evaluate(x, {symbols, factors}).*objective;
    };
    sized.utilisations = [this, symbols](
                             double x, std::span<const double> factors, std::span<double> u) {
      const Evaluated one = evaluate(x, {symbols, factors});
      std::copy(one.utilisations.begin(), one.utilisations.end(), u.begin());
    };
    return sensitivity(sized);
  }

  void neighbours(DesignIndices& out) const {
    const Evaluated here = evaluate(size_, {});
    const auto closer = [&](const std::optional<NextSize>& found, double mass, double cost) {
      const double gap = std::abs(mass - here.mass);
      const double best = found ? std::abs(found->mass_difference) : gap;
      return !found || gap < best || (gap == best && cost < found->cost);
    };
    for (const double x : compiled_.variable.values) {
      const auto detail = problem_.detail(0, x);
      if (detail.piece->step == nullptr || !detail.purchase) {
        continue;  // no strength is tabulated, or no stock length is long enough
      }
      const Evaluated there = evaluate(x, {});
      if (there.mass == here.mass) {
        continue;
      }
      auto& side = there.mass < here.mass ? out.lighter : out.heavier;
      if (closer(side, there.mass, there.cost)) {
        side = next_size(x, there, here);
      }
    }
    for (auto* side : {&out.lighter, &out.heavier}) {
      if (*side) {
        add_needed(**side);
      }
    }
  }

  [[nodiscard]] NextSize next_size(double x, const Evaluated& there, const Evaluated& here) const {
    const auto detail = problem_.detail(0, x);
    NextSize out;
    out.size = x;
    out.size_text =
        detail.piece->item != nullptr ? detail.piece->item->designation : size_text(detail.section);
    out.mass = there.mass;
    out.cost = there.cost;
    out.mass_difference = there.mass - here.mass;
    out.cost_difference = there.cost - here.cost;
    const auto& u = there.utilisations;
    out.feasible = std::all_of(u.begin(), u.end(), [](double one) { return one <= 1.0; });
    const auto largest = std::max_element(u.begin(), u.end());
    if (largest != u.end()) {
      const auto& constraint = compiled_.constraints[static_cast<std::size_t>(largest - u.begin())];
      out.limit = constraint.label;
      out.load_case = load_case_of(constraint);
      out.utilisation = *largest;
    }
    return out;
  }

  void add_needed(NextSize& next) const {
    if (next.feasible) {
      return;
    }
    const Evaluated there = evaluate(next.size, {});
    const Piece& piece = *problem_.detail(0, next.size).piece;
    std::vector<std::size_t> broken;
    for (std::size_t i = 0; i < there.utilisations.size(); ++i) {
      if (there.utilisations[i] > 1.0) {
        broken.push_back(i);
      }
    }
    for (const Symbol symbol : symbols_read(piece, broken)) {
      if (const auto factor = factor_needed(next.size, symbol, broken)) {
        next.needed.push_back({std::string(name(symbol)), property_of(symbol), *factor});
      }
    }
  }

  /// The least change of one value that makes every utilisation hold.
  [[nodiscard]] std::optional<double> factor_needed(double x,
                                                    Symbol symbol,
                                                    std::span<const std::size_t> broken) const {
    const auto moves = [&](Trend trend) {
      return std::all_of(broken.begin(), broken.end(), [&](std::size_t i) {
        const auto* state = compiled_.constraints[i].state;
        return state != nullptr && state->trend_with(symbol) == trend;
      });
    };
    const std::array<Symbol, 1> symbols = {symbol};
    const auto worst = [&](double factor) {
      const std::array<double, 1> factors = {factor};
      const auto u = evaluate(x, {symbols, factors}).utilisations;
      return *std::max_element(u.begin(), u.end());
    };
    const RootOptions options{.relative_width = 1e-6};
    if (moves(Trend::falls)) {
      return smallest_feasible(worst, 1.0, most_change, options).x;
    }
    if (moves(Trend::rises)) {
      return largest_feasible(worst, 1.0 / most_change, 1.0, options).x;
    }
    return std::nullopt;
  }

  SizingProblem problem_;
  const CompiledCandidate& compiled_;
  SizingProblem::Detail detail_;
  double size_;
};

}  // namespace

DesignIndices design_indices(const Design& design,
                             const Part& part,
                             const Catalogue& catalogue,
                             const Settings& settings) {
  const FloatingPointGuard guard;
  // Checks part, candidate and size, and throws what is wrong with them.
  static_cast<void>(
      evaluate(part, catalogue, design.candidate, design.size, design.free_sizes, settings));
  return Asked(design, part, catalogue, settings).run();
}

}  // namespace bismar
