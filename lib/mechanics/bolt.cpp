// SPDX-License-Identifier: MIT
#include <bismar/mechanics/bolt.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <cmath>
#include <numbers>

namespace bismar {

namespace {

constexpr double megapascal = 1e6;

void require_thread(FaultList& faults, double diameter, double pitch) {
  mechanics::require_positive(faults, "diameter", diameter);
  mechanics::require_positive(faults, "pitch", pitch);
  if (std::isfinite(pitch) && diameter > 0.0 && pitch >= diameter) {
    mechanics::add_out_of_range(faults, "pitch", pitch, "less than the diameter");
  }
}

}  // namespace

double thread_stress_area(double diameter, double pitch) {
  FaultList faults;
  require_thread(faults, diameter, pitch);
  faults.throw_if_any();
  const double d = diameter - 0.9382 * pitch;
  return std::numbers::pi / 4.0 * d * d;
}

double nominal_stress_area(double diameter, double pitch) {
  const double square_millimetres = thread_stress_area(diameter, pitch) * 1e6;
  const double unit = std::pow(10.0, std::floor(std::log10(square_millimetres)) - 2.0);
  return std::round(square_millimetres / unit) * unit * 1e-6;
}

NominalBoltStrength designated_strength(int first, int second) {
  FaultList faults;
  if (first < 1 || first > 20) {
    mechanics::add_out_of_range(faults, "first", first, "a whole number from 1 to 20");
  }
  if (second < 1 || second > 9) {
    mechanics::add_out_of_range(faults, "second", second, "a whole number from 1 to 9");
  }
  faults.throw_if_any();
  return {.tensile = 100.0 * first * megapascal, .yield = 10.0 * first * second * megapascal};
}

BoltStrength bolt_strength(BoltClass bolt_class, double diameter) {
  FaultList faults;
  mechanics::require_positive(faults, "diameter", diameter);
  faults.throw_if_any();
  switch (bolt_class) {
    case BoltClass::c8_8:
      // A size read as 16 mm from a table must stay 16 mm after the unit conversion.
      if (diameter <= 16e-3 * (1.0 + 1e-9)) {
        return {.tensile = 800.0 * megapascal,
                .proof = 640.0 * megapascal,
                .proof_stress = 580.0 * megapascal};
      }
      return {.tensile = 830.0 * megapascal,
              .proof = 660.0 * megapascal,
              .proof_stress = 600.0 * megapascal};
    case BoltClass::c10_9:
      return {.tensile = 1040.0 * megapascal,
              .proof = 940.0 * megapascal,
              .proof_stress = 830.0 * megapascal};
    case BoltClass::c12_9:
      return {.tensile = 1220.0 * megapascal,
              .proof = 1100.0 * megapascal,
              .proof_stress = 970.0 * megapascal};
  }
  throw InternalError("bolt class without a strength");
}

double proof_load(BoltClass bolt_class, double diameter, double pitch) {
  return nominal_stress_area(diameter, pitch) * bolt_strength(bolt_class, diameter).proof_stress;
}

double ultimate_load(BoltClass bolt_class, double diameter, double pitch) {
  return nominal_stress_area(diameter, pitch) * bolt_strength(bolt_class, diameter).tensile;
}

double torque_factor(BoltFinish finish) {
  switch (finish) {
    case BoltFinish::nonplated_black:
      return 0.30;
    case BoltFinish::zinc_plated:
      return 0.20;
    case BoltFinish::lubricated:
      return 0.18;
    case BoltFinish::cadmium_plated:
      return 0.16;
    case BoltFinish::anti_seize:
      return 0.12;
  }
  throw InternalError("bolt finish without a torque factor");
}

double preload_from_torque(double torque, double torque_factor, double diameter) {
  FaultList faults;
  mechanics::require_positive(faults, "torque", torque);
  mechanics::require_positive(faults, "torque_factor", torque_factor);
  mechanics::require_positive(faults, "diameter", diameter);
  faults.throw_if_any();
  return torque / (torque_factor * diameter);
}

double bolt_stress(double force, double stress_area) {
  FaultList faults;
  mechanics::require_not_negative(faults, "force", force);
  mechanics::require_positive(faults, "stress_area", stress_area);
  faults.throw_if_any();
  return force / stress_area;
}

double preload_from_proof(double share, double stress_area, double proof_stress) {
  FaultList faults;
  mechanics::require_positive(faults, "share", share);
  if (std::isfinite(share) && share > 1.0) {
    mechanics::add_out_of_range(faults, "share", share, "at most 1");
  }
  mechanics::require_positive(faults, "stress_area", stress_area);
  mechanics::require_positive(faults, "proof_stress", proof_stress);
  faults.throw_if_any();
  return share * stress_area * proof_stress;
}

double joint_stiffness_share(double bolt_stiffness, double member_stiffness) {
  FaultList faults;
  mechanics::require_positive(faults, "bolt_stiffness", bolt_stiffness);
  mechanics::require_positive(faults, "member_stiffness", member_stiffness);
  faults.throw_if_any();
  return bolt_stiffness / (bolt_stiffness + member_stiffness);
}

double joint_bolt_force(double preload, double share, double outer_load) {
  FaultList faults;
  mechanics::require_not_negative(faults, "preload", preload);
  mechanics::require_not_negative(faults, "share", share);
  if (std::isfinite(share) && share > 1.0) {
    mechanics::add_out_of_range(faults, "share", share, "between 0 and 1");
  }
  mechanics::require_not_negative(faults, "outer_load", outer_load);
  if (faults.empty() && (1.0 - share) * outer_load > preload) {
    mechanics::add_out_of_range(
        faults, "outer_load", outer_load, "below preload / (1 - share), where the joint opens");
  }
  faults.throw_if_any();
  return preload + share * outer_load;
}

}  // namespace bismar
