// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

namespace bismar {

/// Equivalent stress of a direct stress and a shear stress at one point of a member [Pa].
///
///     sigma_v = sqrt(sigma^2 + 3 tau^2)
///
/// For ductile, isotropic materials under plane stress with one direct stress.
/// @param sigma  Direct stress [Pa].  @param tau  Shear stress [Pa]. Signs do not matter.
/// Source: distortion-energy criterion; Shigley's Mechanical Engineering Design, 9th ed., section
/// 5-5 (section from memory).
[[nodiscard]] BISMAR_API double von_mises(double sigma, double tau);

/// Largest principal stress of a direct stress and a shear stress [Pa], tension positive.
///
///     sigma_1 = sigma / 2 + sqrt((sigma / 2)^2 + tau^2)
///
/// Never below zero for tau != 0. The largest principal compression is largest_principal(-sigma,
/// tau). Source: Mohr's circle.
[[nodiscard]] BISMAR_API double largest_principal(double sigma, double tau);

}  // namespace bismar
