// SPDX-License-Identifier: MIT
#include "checks/mechanics_answers.hpp"

#include <bismar/mechanics/bolt.hpp>
#include <bismar/mechanics/member.hpp>

#include <array>
#include <optional>
#include <string>
#include <utility>

namespace bismar::checks {

namespace {

constexpr std::array<std::pair<const char*, BoltClass>, 3> classes = {
    {{"8.8", BoltClass::c8_8}, {"10.9", BoltClass::c10_9}, {"12.9", BoltClass::c12_9}}};

Answers thread(const Check& check) {
  const double d = check["d"];
  const double P = check["P"];
  Answers answers = {{"As", thread_stress_area(d, P)}};
  for (const auto& [name, bolt_class] : classes) {
    answers[std::string("Fp_") + name] = proof_load(bolt_class, d, P);
    answers[std::string("Fm_") + name] = ultimate_load(bolt_class, d, P);
  }
  return answers;
}

Answers designation() {
  Answers answers = {{"Rp02_min_8.8_d_gt_16", bolt_strength(BoltClass::c8_8, 20e-3).proof},
                     {"Rp02_min_10.9", bolt_strength(BoltClass::c10_9, 20e-3).proof},
                     {"Rp02_min_12.9", bolt_strength(BoltClass::c12_9, 20e-3).proof}};
  const std::array<std::pair<const char*, NominalBoltStrength>, 3> nominal = {
      {{"8.8", designated_strength(8, 8)},
       {"10.9", designated_strength(10, 9)},
       {"12.9", designated_strength(12, 9)}}};
  for (const auto& [name, strength] : nominal) {
    answers[std::string("Rm_nom_") + name] = strength.tensile;
    answers[std::string("Re_nom_") + name] = strength.yield;
  }
  return answers;
}

Answers finishes() {
  return {{"nonplated_black", torque_factor(BoltFinish::nonplated_black)},
          {"zinc_plated", torque_factor(BoltFinish::zinc_plated)},
          {"lubricated", torque_factor(BoltFinish::lubricated)},
          {"cadmium_plated", torque_factor(BoltFinish::cadmium_plated)},
          {"anti_seize", torque_factor(BoltFinish::anti_seize)}};
}

Answers tightened(const Check& check) {
  const double F = preload_from_torque(check["T"], check["K"], check["d"]);
  const double proof = preload_from_proof(1.0, check["As"], check["Sp"]);
  return {{"F", F},
          {"sigma", bolt_stress(F, check["As"])},
          {"proof_load", proof},
          {"fraction_of_proof", F / proof}};
}

Answers joint(const Check& check) {
  const double C = joint_stiffness_share(check["kb"], check["km"]);
  const double force = joint_bolt_force(check["Fi"], C, check["P"]);
  return {{"C", C},
          {"sigma_i", bolt_stress(check["Fi"], check["At"])},
          {"sigma_b", bolt_stress(force, check["At"])},
          {"T_K", torque_from_preload(check["K"], check["Fi"], check["d"])}};
}

Answers torque_for_proof(const Check& check) {
  const double F = preload_from_proof(check["fraction"], check["As"], check["Sp"]);
  return {{"F", F}, {"T", torque_from_preload(check["K"], F, check["d"])}};
}

}  // namespace

std::optional<Answers> bolt_answers(const Check& check) {
  if (!starts_with(check.id, "BLT")) {
    return std::nullopt;
  }
  if (check.id == "BLT-013") {
    return designation();
  }
  if (check.id == "BLT-014") {
    return finishes();
  }
  if (check.inputs.count("T") != 0) {
    return tightened(check);
  }
  if (check.inputs.count("Fi") != 0) {
    return joint(check);
  }
  return check.inputs.count("fraction") != 0 ? torque_for_proof(check) : thread(check);
}

}  // namespace bismar::checks
