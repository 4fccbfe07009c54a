// SPDX-License-Identifier: MIT
#pragma once

namespace bismar::mechanics {

// Shear areas of the deflection from the energy of the shear stress V S / (I b), with S and I of
// the same plates without fillets: A_s = I^2 / integral of S^2 / b along the depth.

/// Two flanges and a web (an I; a channel alike).
double energy_shear_area_i(double height, double width, double web, double flange);
/// One flange and a stem; `centroid` from the flange's outer face is found inside.
double energy_shear_area_tee(double height, double width, double web, double flange);
/// A box of constant wall along its height, with the flow along the mid-lines of all four walls.
double energy_shear_area_box(double height, double width, double wall);

}  // namespace bismar::mechanics
