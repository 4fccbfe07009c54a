// SPDX-License-Identifier: MIT
#include "sizing/part_faults.hpp"

#include <bismar/mechanics/load_effects.hpp>

#include <algorithm>
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
      if (one.direct && displaces(*one.direct) &&
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
                "\" gives internal forces directly. Give loads with stations, or leave those "
                "limits "
                "out.");
      }
      combinations(one, where);
      if (std::isfinite(part_.body.length) && part_.body.length > 0.0) {
        try {
          static_cast<void>(reduce(one, part_.body.length));
        } catch (const Error& error) {
          faults_.append(error, where);
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
    const auto& cases = part_.body.load_cases;
    const bool tires = std::any_of(
        cases.begin(), cases.end(), [](const LoadCase& one) { return one.fatigue.has_value(); });
    if (d.detail_category && !tires) {
      conflict(where + "/detail_category",
               "A detail category is for fatigue, and no load case has \"fatigue\".");
    }
    if (d.detail_category && (*d.detail_category < 36e6 || *d.detail_category > 160e6)) {
      faults_.fault(Code::out_of_range,
                    where + "/detail_category",
                    plain(*d.detail_category * 1e-6) + " MPa",
                    "from 36 to 160 MPa",
                    "The detail categories of EN 1993-1-9 run from 36 to 160 MPa.");
    }
    if (!d.masses.empty() && !part_.limits.frequency) {
      conflict(where + "/masses",
               "Carried masses are for the natural frequency, on which there is no limit.");
    }
    if (d.notch_radius && d.k_t_axial == 1.0 && d.k_t_bending == 1.0 && d.k_t_torsion == 1.0) {
      conflict(where + "/notch_radius",
               "A notch radius needs a stress concentration factor k_t above 1 beside it.");
    }
    if (part_.limits.shear_deflection && !part_.limits.deflection && !part_.limits.frequency) {
      conflict("/limits/shear_deflection",
               "Shear is for the deflection and the frequency, on which there is no limit.");
    }
    if (d.crack) {
      crack(*d.crack, where + "/crack");
    }
    for (std::size_t i = 0; i < d.masses.size(); ++i) {
      mass(d.masses[i], where + "/masses/" + std::to_string(i));
    }
  }

 private:
  /// Shear, moment or torque given directly: what it bends and twists is not known.
  static bool displaces(const InternalForces& f) {
    return f.V_y != 0.0 || f.V_z != 0.0 || f.M_y != 0.0 || f.M_z != 0.0 || f.T != 0.0;
  }

  void conflict(const std::string& where, const std::string& message) {
    faults_.fault(Code::conflict, where, "", "", message);
  }

  /// What one load case cannot have together, and keys that nothing would read.
  void combinations(const LoadCase& one, const std::string& where) {
    const MemberDetails& d = part_.body.details;
    const bool accelerated = one.acceleration_z != 0.0 || one.acceleration_y != 0.0;
    if (one.direct && accelerated) {
      conflict(where + "/direct",
               "Internal forces given directly and own mass are not added up. Put the moments of "
               "the own mass into the direct forces, or give loads with stations.");
    }
    const bool off_centre = one.eccentricity && *one.eccentricity > 0.0;
    if (off_centre &&
        (part_.limits.deflection || part_.limits.rotation || one.fatigue || d.crack)) {
      conflict(where + "/eccentricity",
               "An eccentricity is held against strength and stability only, not against "
               "deflection, rotation, fatigue or a crack. Give its moments N e as loads at both "
               "ends instead.");
    }
    if (one.restrained && one.temperature_change == 0.0) {
      conflict(where + "/restrained",
               "Restrained ends matter where the temperature changes; give a temperature_change.");
    }
    if (one.restrained && one.support_z == Support::cantilever) {
      conflict(where + "/restrained",
               "A cantilever has a free end, which nothing keeps from moving when it warms.");
    }
    if (one.restrained && one.temperature_change != 0.0 && (one.fatigue || d.crack)) {
      conflict(where + "/restrained",
               "The force of a restrained temperature change is not held against fatigue or a "
               "crack. Give it as an axial load instead.");
    }
  }

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
