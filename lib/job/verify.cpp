// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/job/result_json.hpp>
#include <bismar/numeric/floating_point_guard.hpp>
#include <bismar/quantity/format.hpp>

#include <algorithm>
#include <cmath>
#include <utility>

namespace bismar {

namespace {

class Verifier {
 public:
  explicit Verifier(const StoredResult& stored) : stored_(stored) {}

  Verification run() {
    if (stored_.digest != stored_.actual_digest) {
      add("digest", stored_.digest, stored_.actual_digest);
    }
    compare_tables();
    for (const std::string& sentence : stored_.unresolved) {
      add("tables", "", sentence);
    }
    for (const PartResult& result : stored_.results) {
      check_part(result.result);
    }
    return std::move(found_);
  }

 private:
  void add(std::string where, std::string stored, std::string recomputed) {
    found_.differences.push_back({std::move(where), std::move(stored), std::move(recomputed)});
  }

  void compare(const std::string& where, double stored, double recomputed) {
    ++found_.values;
    const double scale = std::max({1.0, std::abs(stored), std::abs(recomputed)});
    const double difference = std::abs(stored - recomputed) / scale;
    found_.largest_difference = std::max(found_.largest_difference, difference);
    if (!(difference <= verify_tolerance)) {
      add(where,
          format_number(stored),
          std::isfinite(recomputed) ? format_number(recomputed) : "not finite");
    }
  }

  void compare_tables() {
    for (const CatalogueSource& then : stored_.sources) {
      const auto now = std::find_if(
          stored_.job.sources.begin(), stored_.job.sources.end(), [&](const CatalogueSource& s) {
            return s.kind == then.kind && s.file == then.file;
          });
      const std::string where = "table " + then.kind + ' ' + then.file;
      if (now == stored_.job.sources.end()) {
        add(where, then.digest, "not read");
      } else if (now->digest != then.digest) {
        add(where, then.digest, now->digest);
      }
    }
  }

  void check_part(const Result& result) {
    const auto part = std::find_if(stored_.job.parts.begin(),
                                   stored_.job.parts.end(),
                                   [&](const Part& p) { return p.name == result.part; });
    if (part == stored_.job.parts.end()) {
      add(result.part, "a result", "the job has no such part");
      return;
    }
    for (const Design& design : result.designs) {
      check_design(design, *part);
    }
    check_dominance(result);
    std::size_t counted = 0;
    for (const FunnelLine& line : result.funnel.lines) {
      counted += line.candidates;
    }
    if (counted != result.funnel.considered) {
      add(result.part + " / funnel",
          std::to_string(result.funnel.considered) + " considered",
          std::to_string(counted) + " counted");
    }
  }

  void check_design(const Design& design, const Part& part) {
    const std::string where = part.name + " / " + design.id;
    if (design.candidate.material == Candidate::none) {
      return;  // named under `unresolved`
    }
    ++found_.designs;
    Design now;
    try {
      now = evaluate(part,
                     stored_.job.catalogue,
                     design.candidate,
                     design.size,
                     design.free_sizes,
                     stored_.job.settings);
    } catch (const Error& error) {
      add(where, "a design", error.what());
      return;
    }
    if (now.id != design.id) {
      add(where + " / id", design.id, now.id);
    }
    compare(where + " / mass", design.mass, now.mass);
    compare(where + " / cost", design.cost, now.cost);
    check_utilisations(where, design, now);
    check_cost(where, design.cost_breakdown, now.cost_breakdown);
  }

  void check_utilisations(const std::string& where, const Design& design, const Design& now) {
    for (const Utilisation& u : design.utilisations) {
      const std::string place =
          where + " / utilisation " + u.limit + (u.load_case.empty() ? "" : ", " + u.load_case);
      const auto same = std::find_if(
          now.utilisations.begin(), now.utilisations.end(), [&](const Utilisation& other) {
            return other.limit == u.limit && other.load_case == u.load_case;
          });
      if (same == now.utilisations.end()) {
        add(place, format_number(u.value), "not checked");
        continue;
      }
      compare(place, u.value, same->value);
      compare(place + " / factor", u.factor, same->factor);
    }
    for (const Utilisation& u : now.utilisations) {
      const std::string place =
          where + " / utilisation " + u.limit + (u.load_case.empty() ? "" : ", " + u.load_case);
      if (std::none_of(design.utilisations.begin(),
                       design.utilisations.end(),
                       [&](const Utilisation& other) {
                         return other.limit == u.limit && other.load_case == u.load_case;
                       })) {
        add(place, "not checked", std::isfinite(u.value) ? format_number(u.value) : "not finite");
      }
      if (!(u.value <= 1.0)) {
        add(place, "at most 1", std::isfinite(u.value) ? format_number(u.value) : "not finite");
      }
    }
  }

  void check_cost(const std::string& where, const CostBreakdown& stored, const CostBreakdown& now) {
    if (stored.lines.size() != now.lines.size()) {
      add(where + " / cost lines",
          std::to_string(stored.lines.size()),
          std::to_string(now.lines.size()));
      return;
    }
    for (std::size_t i = 0; i < stored.lines.size(); ++i) {
      if (stored.lines[i].item != now.lines[i].item) {
        add(where + " / cost line", stored.lines[i].item, now.lines[i].item);
      }
      compare(
          where + " / cost " + stored.lines[i].item, stored.lines[i].amount, now.lines[i].amount);
    }
    compare(where + " / bought mass", stored.bought_mass, now.bought_mass);
  }

  /// Exact comparison is right for dominance: an equal pair is a tie, not a loss.
  void check_dominance(const Result& result) {
    for (std::size_t i = 0; i < result.front_count; ++i) {
      const Design& design = result.designs[i];
      const auto beats = [&design](const auto& other) {
        return other.mass <= design.mass && other.cost <= design.cost &&
               (other.mass < design.mass || other.cost < design.cost);
      };
      const auto better = std::find_if(result.designs.begin(), result.designs.end(), beats);
      if (better != result.designs.end()) {
        add(result.part + " / " + design.id, "on the front", "dominated by " + better->id);
      } else if (std::any_of(result.others.begin(), result.others.end(), beats)) {
        add(result.part + " / " + design.id, "on the front", "dominated by another stored point");
      }
    }
  }

  const StoredResult& stored_;
  Verification found_;
};

}  // namespace

std::string Difference::text() const {
  return where + ": stored " + (stored.empty() ? "nothing" : stored) + ", now " + recomputed;
}

Verification verify(const StoredResult& stored) {
  const FloatingPointGuard guard;
  return Verifier(stored).run();
}

}  // namespace bismar
