// SPDX-License-Identifier: MIT
#include <bismar/mechanics/scaled_section.hpp>

namespace bismar {

SectionProperties scaled(const SectionProperties& section, double factor) {
  SectionProperties out;
  scale_into(section, factor, out);
  return out;
}

void scale_into(const SectionProperties& section, double factor, SectionProperties& out) {
  out = section;
  const double square = factor * factor;
  const double cube = square * factor;
  const double fourth = square * square;
  for (double* length : {&out.height,
                         &out.width,
                         &out.wall,
                         &out.ruling_dimension,
                         &out.perimeter,
                         &out.inner_perimeter,
                         &out.y_shear,
                         &out.z_shear}) {
    *length *= factor;
  }
  for (double* area : {&out.area,
                       &out.A_v_y,
                       &out.A_v_z,
                       &out.A_v_junction,
                       &out.A_v_flange,
                       &out.A_s_y,
                       &out.A_s_z}) {
    *area *= square;
  }
  for (double* modulus : {&out.W_el_y, &out.W_el_z, &out.W_pl_y, &out.W_pl_z, &out.W_t}) {
    *modulus *= cube;
  }
  for (double* moment : {&out.I_y, &out.I_z, &out.I_yz, &out.I_t}) {
    *moment *= fourth;
  }
  out.I_w *= fourth * square;
  for (SectionPoint& fibre : out.fibres) {
    fibre.y *= factor;
    fibre.z *= factor;
  }
}

}  // namespace bismar
