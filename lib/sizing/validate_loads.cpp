// SPDX-License-Identifier: MIT
#include "sizing/part_faults.hpp"

#include <bismar/mechanics/load_effects.hpp>

#include <cmath>
#include <set>
#include <string_view>
#include <vector>

namespace bismar {

namespace {

class LoadCheck {
 public:
  LoadCheck(const Part& part, PartFaults& faults) : part_(part), faults_(faults) {}

  void load_cases() {
    if (part_.body.load_cases.empty()) {
      faults_.fault(Code::empty,
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
        faults_.fault(Code::duplicate,
                      where + "/name",
                      one.name,
                      "a name of its own",
                      "Two load cases are called \"" + one.name + "\".");
      }
      for (const auto& [id, factor] : one.factors) {
        std::string place = where;
        place.append("/factors/").append(id);
        if (limit_state(id) == nullptr) {
          faults_.fault(Code::unknown_name,
                        place,
                        id,
                        "a limit state",
                        "There is no limit state \"" + id + "\"." + did_you_mean(id, ids));
        }
        faults_.positive(factor, place, "factor");
      }
      if (!(one.duration >= 0.0) || !std::isfinite(one.duration)) {
        faults_.fault(Code::out_of_range,
                      where + "/duration",
                      plain(one.duration),
                      "zero or more",
                      "The duration of a load cannot be negative.");
      }
      if (one.loads.empty() && one.direct &&
          (part_.limits.deflection || part_.limits.rotation || part_.limits.twist)) {
        faults_.fault(
            Code::conflict,
            where + "/direct",
            "",
            "loads at their stations",
            "The limits on deflection, rotation and twist need to know where the loads act; the "
            "load case "
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

  void details() {
    const MemberDetails& d = part_.body.details;
    const std::string where = "/member/details";
    share(d.net_area, where + "/net_area", "net area over gross area");
    share(d.net_modulus, where + "/net_modulus", "net modulus over gross modulus");
    at_least_one(d.k_t_axial, where + "/k_t_axial");
    at_least_one(d.k_t_bending, where + "/k_t_bending");
    at_least_one(d.k_t_torsion, where + "/k_t_torsion");
    faults_.optional_positive(d.notch_radius, where + "/notch_radius", "notch radius");
    faults_.optional_positive(d.detail_category, where + "/detail_category", "detail category");
    if (!(d.reliability >= 0.5 && d.reliability <= 0.999999)) {
      faults_.fault(Code::out_of_range,
                    where + "/reliability",
                    plain(d.reliability),
                    "from 0.5 to 0.999999",
                    "The reliability of a fatigue strength lies between 0.5 and 0.999999; it is " +
                        plain(d.reliability) + ".");
    }
    if (d.crack) {
      crack(*d.crack, where + "/crack");
    }
    for (std::size_t i = 0; i < d.masses.size(); ++i) {
      mass(d.masses[i], where + "/masses/" + std::to_string(i));
    }
  }

 private:
  /// Above zero and at most one.
  void share(double value, const std::string& where, const std::string& what) {
    if (!(value > 0.0 && value <= 1.0)) {
      faults_.fault(Code::out_of_range,
                    where,
                    plain(value),
                    "above 0 and at most 1",
                    "The " + what + " lies above 0 and at most at 1; it is " + plain(value) + ".");
    }
  }

  void at_least_one(double value, const std::string& where) {
    if (!(value >= 1.0) || !std::isfinite(value)) {
      faults_.fault(Code::out_of_range,
                    where,
                    plain(value),
                    "1 or more",
                    "A stress concentration factor is 1 or more; it is " + plain(value) + ".");
    }
  }

  void crack(const Crack& crack, const std::string& where) {
    const bool deep = faults_.positive(crack.depth, where + "/depth", "depth of a crack");
    if (deep && crack.kind == Crack::Kind::surface && !(crack.half_length >= crack.depth)) {
      faults_.fault(Code::out_of_range,
                    where + "/half_length",
                    plain(crack.half_length),
                    "at least the depth",
                    "Half the length of a surface crack is at least its depth.");
    }
  }

  void mass(const AttachedMass& mass, const std::string& where) {
    faults_.positive(mass.mass, where + "/mass", "carried mass");
    if (!(mass.at >= 0.0 && mass.at <= part_.body.length * (1.0 + 1e-12))) {
      faults_.fault(Code::out_of_range,
                    where + "/at",
                    plain(mass.at),
                    "a place on the member",
                    "The mass sits beyond the ends of the member.");
    }
  }

  const Part& part_;
  PartFaults& faults_;
};

}  // namespace

void validate_loads(const Part& part, PartFaults& faults) {
  LoadCheck check(part, faults);
  check.load_cases();
  check.details();
}

}  // namespace bismar
