// SPDX-License-Identifier: MIT
#include <bismar/mechanics/scaled_section.hpp>

namespace bismar {

SectionProperties scaled(const SectionProperties& section, double factor) {
  SectionProperties out = section;
  const double square = factor * factor;
  const double cube = square * factor;
  const double fourth = square * square;
  for (double* length : {&out.height,
                         &out.width,
                         &out.wall,
                         &out.ruling_dimension,
                         &out.perimeter,
                         &out.inner_perimeter}) {
    *length *= factor;
  }
  for (double* area : {&out.area, &out.A_v_y, &out.A_v_z, &out.A_v_junction}) {
    *area *= square;
  }
  for (double* modulus : {&out.W_el_y, &out.W_el_z, &out.W_pl_y, &out.W_pl_z, &out.W_t}) {
    *modulus *= cube;
  }
  for (double* moment : {&out.I_y, &out.I_z, &out.I_t}) {
    *moment *= fourth;
  }
  return out;
}

}  // namespace bismar
