// SPDX-License-Identifier: MIT
#include <bismar/mechanics/beam_column.hpp>

#include "mechanics/arguments.hpp"

#include <bismar/error.hpp>

#include <algorithm>

namespace bismar {

namespace {

/// C_m (1 + slope n) with the slope between 0 and its cap.
double amplified(double moment_factor, double slope, double cap, double n) {
  return moment_factor * (1.0 + std::clamp(slope, 0.0, cap) * n);
}

double twisting_factor(const BeamColumn& m) {
  const bool elastic = m.kind == BeamColumnKind::elastic;
  const double c = (elastic ? 0.05 : 0.1) * m.n_z / (m.C_mLT - 0.25);
  if (!elastic && m.lambda_z < 0.4) {
    return std::min(0.6 + m.lambda_z, 1.0 - c * m.lambda_z);
  }
  return 1.0 - c * std::min(m.lambda_z, 1.0);
}

}  // namespace

double equivalent_moment_factor(double end_ratio) {
  FaultList faults;
  mechanics::require_finite(faults, "end_ratio", end_ratio);
  if (end_ratio < -1.0 || end_ratio > 1.0) {
    mechanics::add_out_of_range(faults, "end_ratio", end_ratio, "from -1 to 1");
  }
  faults.throw_if_any();
  return std::max(0.4, 0.6 + 0.4 * end_ratio);
}

InteractionFactors interaction_factors(const BeamColumn& m) {
  FaultList faults;
  mechanics::require_not_negative(faults, "member.lambda_y", m.lambda_y);
  mechanics::require_not_negative(faults, "member.lambda_z", m.lambda_z);
  mechanics::require_not_negative(faults, "member.n_y", m.n_y);
  mechanics::require_not_negative(faults, "member.n_z", m.n_z);
  mechanics::require_positive(faults, "member.C_my", m.C_my);
  mechanics::require_positive(faults, "member.C_mz", m.C_mz);
  if (m.twists && !(m.C_mLT > 0.25)) {
    mechanics::add_out_of_range(faults, "member.C_mLT", m.C_mLT, "above 0.25");
  }
  faults.throw_if_any();
  InteractionFactors k;
  if (m.kind == BeamColumnKind::elastic) {
    k.yy = amplified(m.C_my, 0.6 * m.lambda_y, 0.6, m.n_y);
    k.zz = amplified(m.C_mz, 0.6 * m.lambda_z, 0.6, m.n_z);
    k.yz = k.zz;
    k.zy = 0.8 * k.yy;
  } else {
    k.yy = amplified(m.C_my, m.lambda_y - 0.2, 0.8, m.n_y);
    k.zz = m.kind == BeamColumnKind::i_plastic
               ? amplified(m.C_mz, 2.0 * m.lambda_z - 0.6, 1.4, m.n_z)
               : amplified(m.C_mz, m.lambda_z - 0.2, 0.8, m.n_z);
    k.yz = 0.6 * k.zz;
    k.zy = 0.6 * k.yy;
  }
  if (m.twists) {
    k.zy = twisting_factor(m);
  }
  return k;
}

BeamColumnSums beam_column_sums(const BeamColumnShares& s, const InteractionFactors& k) {
  FaultList faults;
  mechanics::require_not_negative(faults, "shares.axial_y", s.axial_y);
  mechanics::require_not_negative(faults, "shares.axial_z", s.axial_z);
  mechanics::require_not_negative(faults, "shares.moment_y", s.moment_y);
  mechanics::require_not_negative(faults, "shares.moment_z", s.moment_z);
  faults.throw_if_any();
  return {.about_y = s.axial_y + k.yy * s.moment_y + k.yz * s.moment_z,
          .about_z = s.axial_z + k.zy * s.moment_y + k.zz * s.moment_z};
}

double aisc_interaction(double axial, double moment_x, double moment_y) {
  FaultList faults;
  mechanics::require_not_negative(faults, "axial", axial);
  mechanics::require_not_negative(faults, "moment_x", moment_x);
  mechanics::require_not_negative(faults, "moment_y", moment_y);
  faults.throw_if_any();
  const double bending = moment_x + moment_y;
  return axial >= 0.2 ? axial + 8.0 / 9.0 * bending : axial / 2.0 + bending;
}

}  // namespace bismar
