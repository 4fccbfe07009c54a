// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cstdint>
#include <map>
#include <optional>
#include <string>
#include <vector>

namespace bismar {

/// How a member is held, for bending about one axis.
enum class Support : std::uint8_t {
  cantilever,     ///< Fixed at x = 0, free at x = L.
  pinned_pinned,  ///< Pinned at both ends.
  fixed_pinned,   ///< Fixed at x = 0, pinned at x = L.
  fixed_fixed,    ///< Fixed at both ends.
};

/// Direction of a transverse load.
enum class Along : std::uint8_t { z, y };

/// One characteristic service load. No factor is ever baked into it.
struct Load {
  enum class Kind : std::uint8_t {
    force,        ///< Transverse point force [N] at `at`.
    moment,       ///< Point moment [N m] at `at`, bending about y for along z, about z for along y;
                  ///< positive: it moves the free end of a cantilever along that axis.
    distributed,  ///< Transverse load [N/m] from `at` to `to`, linear from `value` to `value_to`.
    axial,        ///< Axial force [N] over the whole length: tension positive.
    torque,       ///< Torque about x [N m], applied at `at`, held at x = 0.
  };
  Kind kind = Kind::force;
  Along along = Along::z;
  double value = 0.0;
  double value_to = 0.0;
  double at = 0.0;  ///< Station [m], 0 <= at <= L.
  double to = 0.0;  ///< End of a distributed load [m].
};

[[nodiscard]] BISMAR_API Load force(double newtons, double at, Along along = Along::z);
[[nodiscard]] BISMAR_API Load moment(double newton_metres, double at, Along along = Along::z);
[[nodiscard]] BISMAR_API Load
distributed(double from_value, double to_value, double from, double to, Along along = Along::z);
[[nodiscard]] BISMAR_API Load axial(double newtons);
[[nodiscard]] BISMAR_API Load torque(double newton_metres, double at);

/// Tightening torque of a bolt [N m].
///
///     T = K F d
///
/// @param torque_factor K [-], > 0.  @param preload F [N], > 0.  @param diameter d, nominal [m], >
/// 0. K is not a constant of nature: lubrication and finish move it between about 0.1 and 0.3.
/// Source: Shigley's Mechanical Engineering Design, 9th ed., section 8-8 and Table 8-15.
[[nodiscard]] BISMAR_API double torque_from_preload(double torque_factor,
                                                    double preload,
                                                    double diameter);

/// The force on a lever of length `arm` [m] that makes that torque, F = K F_preload d / arm [N].
[[nodiscard]] BISMAR_API double lever_force_from_preload(double torque_factor,
                                                         double preload,
                                                         double diameter,
                                                         double arm);

/// Internal forces given directly, at one section: N tension positive.
struct InternalForces {
  double N = 0.0;    ///< [N]
  double V_y = 0.0;  ///< [N]
  double V_z = 0.0;  ///< [N]
  double M_y = 0.0;  ///< [N m]
  double M_z = 0.0;  ///< [N m]
  double T = 0.0;    ///< [N m]
};

/// How often and how far a load case swings.
struct FatigueLoading {
  double cycles = 1e6;         ///< Times the whole load case comes and goes, >= 1.
  double stress_ratio = -1.0;  ///< Least over largest stress, -1 (reversed) to 1, 0 = pulsating.
};

/// Loads that act together. Factors act per limit state and are kept by the limit state's id;
/// a limit state without an entry uses its own default.
struct LoadCase {
  std::string name = "service";
  Support support_z = Support::cantilever;  ///< For loads along z (bending about y).
  Support support_y = Support::cantilever;  ///< For loads along y.
  std::vector<Load> loads = {};
  std::optional<InternalForces> direct = {};  ///< Adds one section with these forces.
  /// Where the second support stands [m], 0 < x <= L, absent = at x = L. Beyond it the member
  /// overhangs. For pinned_pinned and fixed_pinned only.
  std::optional<double> second_support = {};
  /// Acceleration across the member that its own mass feels [m/s^2]: 9.80665 for its weight, more
  /// for a member that is moved. Taken adverse: it never relieves another load.
  double acceleration_z = 0.0;
  double acceleration_y = 0.0;
  /// Eccentricity of the compression at both ends [m]. Absent: 0 where the column curves stand for
  /// imperfections, L / 500 with the methods that know none (Euler, Johnson).
  std::optional<double> eccentricity = {};
  double temperature_change = 0.0;  ///< From the state as assembled [K]; its sign does not matter.
  bool restrained = false;          ///< The ends keep their distance when the temperature changes.
  std::optional<FatigueLoading> fatigue = {};  ///< Absent: the load case is static.
  std::map<std::string, double> factors = {};
  double duration = 0.0;     ///< How long the load lasts [s]; 0 = short (not above an hour).
  bool hand_loaded = false;  ///< Loaded by hand: an unknown elongation leaves a material undecided.
  bool impact = false;       ///< Loaded by impact: likewise.
};

/// A member held alike in both planes with its loads, for the short form of a part.
[[nodiscard]] BISMAR_API LoadCase cantilever(std::vector<Load> loads, std::string name = "service");
[[nodiscard]] BISMAR_API LoadCase pinned_pinned(std::vector<Load> loads,
                                                std::string name = "service");
[[nodiscard]] BISMAR_API LoadCase fixed_pinned(std::vector<Load> loads,
                                               std::string name = "service");
[[nodiscard]] BISMAR_API LoadCase fixed_fixed(std::vector<Load> loads,
                                              std::string name = "service");

}  // namespace bismar
