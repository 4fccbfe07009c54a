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

/// Loads that act together. Factors act per limit state and are kept by the limit state's id;
/// a limit state without an entry uses its own default.
struct LoadCase {
  std::string name = "service";
  Support support_z = Support::cantilever;  ///< For loads along z (bending about y).
  Support support_y = Support::cantilever;  ///< For loads along y.
  std::vector<Load> loads = {};
  std::optional<InternalForces> direct = {};  ///< Adds one section with these forces.
  std::map<std::string, double> factors = {};
  double duration = 0.0;     ///< How long the load lasts [s]; 0 = short (not above an hour).
  bool hand_loaded = false;  ///< Loaded by hand: an unknown elongation leaves a material undecided.
  bool impact = false;       ///< Loaded by impact: likewise.
};

/// A cantilever with its loads, for the short form of a part.
[[nodiscard]] BISMAR_API LoadCase cantilever(std::vector<Load> loads, std::string name = "service");
[[nodiscard]] BISMAR_API LoadCase pinned_pinned(std::vector<Load> loads,
                                                std::string name = "service");

}  // namespace bismar
