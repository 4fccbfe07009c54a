// SPDX-License-Identifier: MIT
#include "mechanics/random_sections.hpp"

#include <bismar/error.hpp>

#include <algorithm>
#include <cmath>

namespace bismar::test {

namespace {

double uniform(std::mt19937_64& random, double low, double high) {
  return std::uniform_real_distribution<double>(low, high)(random);
}

double spread(std::mt19937_64& random, double low, double high) {
  return std::exp(uniform(random, std::log(low), std::log(high)));
}

/// A share of what fits: over three powers of ten, and now and then close to the end.
double share(std::mt19937_64& random) {
  return uniform(random, 0.0, 1.0) < 0.2 ? uniform(random, 0.9, 0.9999)
                                         : spread(random, 1e-3, 0.9999);
}

/// Zero, or up to `most`.
double radius(std::mt19937_64& random, double most) {
  return uniform(random, 0.0, 1.0) < 0.3 ? 0.0 : uniform(random, 0.0, 0.999) * most;
}

RandomSection draw(SectionFamily family, Proportions proportions, std::mt19937_64& random) {
  const bool slender = proportions == Proportions::slender;
  RandomSection out;
  const double h = spread(random, 1e-2, 1.0);
  const std::size_t count = size_variables(family).size();
  out.sizes.push_back(h);
  if (family == SectionFamily::round_tube) {
    out.sizes.push_back(share(random) * h / 2.0);
    return out;
  }
  if (count == 1) {
    return out;
  }
  const bool two_sided = count == 2;
  const double widest = two_sided ? 100.0 : 10.0;
  const double b = h * (slender ? spread(random, 0.1, 2.0) : spread(random, 1.0 / widest, widest));
  out.sizes.push_back(b);
  if (two_sided) {
    return out;
  }
  const double least = std::min(h, b);
  if (count == 3) {
    if (family == SectionFamily::angle) {
      const double t = share(random) * least * (slender ? 0.2 : 1.0);
      out.sizes.push_back(t);
      out.fixed.root_radius = radius(random, slender ? 1.5 * t : least - t);
      out.fixed.toe_radius =
          radius(random, std::max(0.0, std::min(t, least - t - out.fixed.root_radius)));
      return out;
    }
    const bool rounded =
        family == SectionFamily::rectangular_tube && uniform(random, 0.0, 1.0) < 0.5;
    out.fixed.corners = rounded ? Corners::en_10210 : Corners::sharp;
    out.sizes.push_back(share(random) * least * (slender ? 0.2 : rounded ? 0.25 : 0.5));
    return out;
  }
  const double half = family == SectionFamily::tee ? 1.0 : 0.5;
  const double f = share(random) * (slender ? 0.1 * least : half * h);
  const double w = slender ? uniform(random, 0.333, 1.0) * f : share(random) * b;
  out.sizes.push_back(w);
  out.sizes.push_back(f);
  const double overhang = family == SectionFamily::channel ? b - w : (b - w) / 2.0;
  const double room = std::min(half * h - f, overhang);
  out.fixed.root_radius = radius(random, slender ? std::min(1.5 * f, room) : std::max(room, 0.0));
  return out;
}

}  // namespace

bool fits(SectionFamily family, const RandomSection& section, Proportions proportions) {
  try {
    static_cast<void>(section_of(family, section.sizes, section.fixed));
  } catch (const Error&) {
    return false;
  }
  return proportions == Proportions::any || is_slender(family, section.sizes, section.fixed);
}

RandomSection random_section(SectionFamily family,
                             Proportions proportions,
                             std::mt19937_64& random) {
  RandomSection section = draw(family, proportions, random);
  while (!fits(family, section, proportions)) {
    section = draw(family, proportions, random);
  }
  return section;
}

std::vector<Moves> moves(SectionFamily family,
                         std::size_t variable,
                         Proportions proportions,
                         int pairs,
                         std::mt19937_64& random) {
  std::vector<Moves> table(section_quantity_count);
  for (int pair = 0; pair < pairs; ++pair) {
    const RandomSection from = random_section(family, proportions, random);
    RandomSection to = from;
    // A small step finds the slope, a large one what lies between.
    to.sizes[variable] *=
        uniform(random, 0.0, 1.0) < 0.7 ? 1.0 + 1e-4 : 1.0 + uniform(random, 0.0, 0.5);
    if (!fits(family, to, proportions)) {
      continue;
    }
    const SectionProperties a = section_of(family, from.sizes, from.fixed);
    const SectionProperties b = section_of(family, to.sizes, to.fixed);
    for (std::size_t q = 0; q < section_quantity_count; ++q) {
      const double before = quantity_of(a, static_cast<SectionQuantity>(q));
      const double after = quantity_of(b, static_cast<SectionQuantity>(q));
      // Far below a step's own effect, above what rounding makes of equal numbers.
      const double rounding = 1e-12 * std::abs(before);
      (after > before + rounding   ? table[q].rose
       : after < before - rounding ? table[q].fell
                                   : table[q].stayed) += 1;
    }
  }
  return table;
}

}  // namespace bismar::test
