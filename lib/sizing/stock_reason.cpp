// SPDX-License-Identifier: MIT
// Why nothing is feasible out of a stock list.
#include "sizing/stock_walk.hpp"

#include <algorithm>
#include <array>
#include <bit>
#include <cstdint>
#include <limits>
#include <vector>

namespace bismar {

namespace {

constexpr double infinity = std::numeric_limits<double>::infinity();

using Kind = Constraint::Kind;

}  // namespace

void StockWalk::explain() {
  probe();
  for (std::size_t i = 0; i < least_.size(); ++i) {
    find_least(i);
    if (least_[i] > 1.0) {
      solution_.excluded_by = i;
      solution_.least_utilisation = least_[i];
      return;
    }
  }
  explain_clash();
}

/// The largest and the smallest size meet most limits; beyond the table everything but the
/// thickness counts as met.
void StockWalk::probe() {
  const Piece* smallest = nullptr;
  const Piece* largest = nullptr;
  for (const auto p : piece_at_) {
    if (p == StockDemands::no_place || compiled_.pieces[p].step == nullptr) {
      continue;
    }
    smallest = smallest == nullptr ? &compiled_.pieces[p] : smallest;
    largest = &compiled_.pieces[p];
  }
  if (largest != nullptr) {
    evaluate(*largest);
  }
  if (smallest != largest) {
    evaluate(*smallest);
  }
  if (untabulated_) {
    evaluate(*std::find_if(compiled_.pieces.begin(),
                           compiled_.pieces.end(),
                           [](const Piece& piece) { return piece.step == nullptr; }));
  }
}

/// Evaluates the size whose key is least, the first of equals.
template <class Key>
void StockWalk::evaluate_least(Key&& key) {
  const Piece* best = nullptr;
  double least = infinity;
  for (const Piece& piece : compiled_.pieces) {
    if (piece.step == nullptr) {
      continue;
    }
    const double value = key(piece);
    if (best == nullptr || value < least) {
      least = value;
      best = &piece;
    }
  }
  if (best != nullptr) {
    evaluate(*best);
  }
}

void StockWalk::find_least(std::size_t i) {
  if (least_[i] <= 1.0) {
    return;
  }
  switch (compiled_.constraints[i].kind) {
    case Kind::thickness_limit:
    case Kind::corners:
      // Met by any size with a strength, and one was probed where there is any.
      break;
    case Kind::property:
    case Kind::corrosion:
    case Kind::temperature:
      for (const Step& step : steps_) {
        for (const bool hollow : {false, true}) {
          const auto found = std::find_if(
              compiled_.pieces.begin(), compiled_.pieces.end(), [&](const Piece& piece) {
                return piece.step == step.state && (piece.section.inner_perimeter > 0.0) == hollow;
              });
          if (found != compiled_.pieces.end()) {
            evaluate(*found);
          }
        }
      }
      break;
    case Kind::limit_state:
      find_least_limit_state(i);
      break;
    case Kind::blank:
      evaluate_least([this](const Piece& piece) { return worth(piece).bought ? 0.0 : 1.0; });
      break;
    // A quotient rounds as its numbers order it, so that the least one is at the extreme number.
    case Kind::route_wall:
      evaluate_least([](const Piece& piece) { return -piece.section.wall; });
      break;
    case Kind::route_section:
      evaluate_least([](const Piece& piece) { return piece.section.wall; });
      break;
    case Kind::route_mass_min:
      evaluate_least([this](const Piece& piece) {
        return -(piece.step->density * piece.section.area * problem_.part().body.length);
      });
      break;
    case Kind::route_mass_max:
      evaluate_least([this](const Piece& piece) {
        return piece.step->density * piece.section.area * problem_.part().body.length;
      });
      break;
    case Kind::mass_cap:
      evaluate_least([this](const Piece& piece) { return worth(piece).mass; });
      break;
    case Kind::cost_cap:
      evaluate_least([this](const Piece& piece) { return worth(piece).cost; });
      break;
  }
}

void StockWalk::find_least_limit_state(std::size_t i) {
  // From the largest down: it comes closest to most limits, and then bounds turn down the others.
  for (std::size_t place = piece_at_.size(); place-- > 0;) {
    if (piece_at_[place] == StockDemands::no_place) {
      continue;
    }
    const Piece& piece = compiled_.pieces[piece_at_[place]];
    if (piece.step == nullptr || !piece.applies[i]) {
      least_[i] = 0.0;
      return;
    }
    if (lower_bound(i, piece) >= least_[i]) {
      continue;
    }
    ++counts_.checked;
    least_[i] = std::min(least_[i], utilisation(i, piece));
    if (least_[i] <= 1.0) {
      return;
    }
  }
}

double StockWalk::lower_bound(std::size_t i, const Piece& piece) {
  const Constraint& constraint = compiled_.constraints[i];
  const auto all = demands_.terms();
  const auto found = std::find_if(all.begin(), all.end(), [&](const auto& one) {
    return one.state == constraint.state && one.load_case == constraint.load_case;
  });
  if (found == all.end()) {
    return 0.0;
  }
  const std::size_t place = demands_.place_of(static_cast<std::size_t>(piece.size));
  const auto& capacities = step_of(piece).capacities;
  double least = 0.0;
  for (std::size_t t = 0; t < found->kept.size(); ++t) {
    const std::size_t k = found->first + t;
    if (capacities[k] < infinity) {
      least = std::max(least, demands_.table().demand(k, place) / capacities[k]);
    }
  }
  return least;
}

std::vector<StockWalk::Bounded> StockWalk::bounded_sizes() {
  std::vector<Bounded> out;
  constexpr std::size_t block = DemandTable::block;
  std::array<double, block> shares{};
  for (const Step& step : steps_) {
    for (std::size_t b = 0; b < step.places.size(); ++b) {
      if (step.places[b] == 0) {
        continue;
      }
      shares.fill(0.0);
      const auto demands = demands_.table().demands_of_block(b);
      for (std::size_t k = 0; k < step.capacities.size(); ++k) {
        if (step.capacities[k] == infinity) {
          continue;
        }
        // Its roundings are far below the slack of the capacity.
        const double inverse = 1.0 / step.capacities[k];
        for (std::size_t s = 0; s < block; ++s) {
          shares[s] = std::max(shares[s], demands[k * block + s] * inverse);
        }
      }
      for (std::uint64_t word = step.places[b]; word != 0; word &= word - 1) {
        const auto s = static_cast<std::size_t>(std::countr_zero(word));
        const Piece& piece = compiled_.pieces[piece_at_[b * block + s]];
        const double of_material = piece.section.inner_perimeter > 0.0 ? step.hollow : step.solid;
        out.push_back({.piece = &piece, .least = std::max(shares[s], of_material)});
      }
    }
  }
  std::sort(out.begin(), out.end(), [](const Bounded& a, const Bounded& b) {
    return a.least != b.least ? a.least < b.least : a.piece->size < b.piece->size;
  });
  return out;
}

/// A value that the worst utilisation of a size is nowhere below, without its full evaluation: of
/// the limits on its material as far as they are known, of its blank, and of one constraint.
double StockWalk::glance(const Piece& piece, std::size_t constraint) {
  const Step& step = step_of(piece);
  double least = piece.section.inner_perimeter > 0.0 ? step.hollow : step.solid;
  const Kind kind = compiled_.constraints[constraint].kind;
  if (kind == Kind::limit_state && piece.applies[constraint]) {
    ++counts_.checked;
    least = std::max(least, utilisation(constraint, piece));
  } else if (kind == Kind::blank && !worth(piece).bought) {
    least = infinity;
  }
  return least;
}

void StockWalk::explain_clash() {
  // As solve_exact() tells it: the size whose worst utilisation is least, the first of equals, but
  // none that is infinite ...
  const auto sizes = bounded_sizes();
  const Piece* closest = nullptr;
  double least = infinity;
  std::size_t decisive = 0;
  for (const Bounded& one : sizes) {
    if (one.least > least) {
      break;
    }
    // What was worst before turns down most of the others by itself.
    const double known = glance(*one.piece, decisive);
    if (known > least || known == infinity) {
      continue;
    }
    evaluate(*one.piece);
    const auto at_worst = std::max_element(utilisations_.begin(), utilisations_.end());
    const bool first_of_equals =
        closest != nullptr && *at_worst == least && one.piece->size < closest->size;
    if (*at_worst < least || first_of_equals) {
      least = *at_worst;
      closest = one.piece;
    }
    if (closest == nullptr || closest == one.piece) {
      decisive = static_cast<std::size_t>(at_worst - utilisations_.begin());
    }
  }
  evaluate(closest != nullptr ? *closest : compiled_.pieces.back());
  const auto first = static_cast<std::size_t>(
      std::max_element(utilisations_.begin(), utilisations_.end()) - utilisations_.begin());
  solution_.least_utilisation = utilisations_[first];

  // ... and, of the sizes that meet its worst limit, what fails where the least does, the last of
  // equals.
  std::size_t second = first;
  double least_of_second = infinity;
  double second_size = -infinity;
  const auto is_better = [&](double worst, const Piece& piece) {
    return worst < least_of_second || (worst == least_of_second && piece.size > second_size);
  };
  const auto consider = [&](const Piece& piece) {
    evaluate(piece);
    const auto other = std::max_element(utilisations_.begin(), utilisations_.end());
    if (utilisations_[first] <= 1.0 && is_better(*other, piece)) {
      least_of_second = *other;
      second_size = piece.size;
      second = static_cast<std::size_t>(other - utilisations_.begin());
    }
  };
  // Beyond the table everything but the thickness counts as met, for the last such size as for all.
  const auto beyond = std::find_if(compiled_.pieces.rbegin(),
                                   compiled_.pieces.rend(),
                                   [](const Piece& piece) { return piece.step == nullptr; });
  if (beyond != compiled_.pieces.rend()) {
    consider(*beyond);
  }
  const bool is_state = compiled_.constraints[first].kind == Kind::limit_state;
  for (const Bounded& one : sizes) {
    if (one.least > least_of_second) {
      break;
    }
    if (is_state && one.piece->applies[first] &&
        (lower_bound(first, *one.piece) > 1.0 || utilisation(first, *one.piece) > 1.0)) {
      continue;
    }
    if (is_better(glance(*one.piece, second), *one.piece)) {
      consider(*one.piece);
    }
  }
  const bool falls = problem_.utilisation_trend(group_, first, 0) == Trend::falls;
  solution_.clash_falling = falls ? first : second;
  solution_.clash_rising = falls ? second : first;
}

}  // namespace bismar
