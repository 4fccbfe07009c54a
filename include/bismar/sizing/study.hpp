// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/catalogue/catalogue.hpp>
#include <bismar/exchange/penalty.hpp>
#include <bismar/export.hpp>
#include <bismar/sizing/front.hpp>

#include <functional>
#include <memory>
#include <string>

namespace bismar {

/// A part that is sized again and again while a load, a cap, a limit or the exchange constant is
/// changed: for tools with a slider.
///
///     Study study(part, catalogue);
///     study.solve();
///     study.change([](Part& part) { part.body.load_cases[0].loads[0].value = 700.0; });
///     const Result& result = study.solve();
///     const Design* best = study.choice(ExchangeConstant::per_kilogram(5.0));
///
/// A result is always that of front() for the present part, catalogue and settings, whatever was
/// changed and solved before; only the telemetry differs. What spares time: the part is checked
/// when it changes and not when it is solved; what can exist is looked up anew only when what its
/// rules read has changed (shapes, stock, finishes, and the limits on routes, processes, forms,
/// classes, materials and structural use); and where no shape has free dimensions the materials of
/// the last front are looked at first, so that most others are left out by their bounds alone.
///
/// Under Explain::full, and where nothing is feasible, every candidate is solved and nothing is
/// spared. A polygon's torsion is solved anew each time.
///
/// One thread at a time may use a study; several studies may share a catalogue. A study that was
/// moved from can only be destroyed or assigned to.
class BISMAR_API Study {
 public:
  /// @param catalogue  Must not change while a study holds it.
  /// @throws bismar::Error  every fault of the part and settings (see validate());
  /// invalid_argument: no catalogue ("catalogue").
  explicit Study(Part part, std::shared_ptr<const Catalogue> catalogue, Settings settings = {});
  ~Study();
  Study(Study&& other) noexcept;
  Study& operator=(Study&& other) noexcept;
  Study(const Study&) = delete;
  Study& operator=(const Study&) = delete;

  [[nodiscard]] const Part& part() const noexcept;
  [[nodiscard]] const Settings& settings() const noexcept;
  [[nodiscard]] const Catalogue& catalogue() const noexcept;

  /// Lets `edit` change a copy of the part, and takes it over where it has no fault. Results held
  /// by reference, and designs in them, are no longer there afterwards.
  /// @throws bismar::Error  every fault; the part and its result are then as before, and so they
  /// are where `edit` throws.
  void change(const std::function<void(Part&)>& edit);
  /// The same for the settings.
  void change_settings(const std::function<void(Settings&)>& edit);

  /// The front of the part as it is now. Solved where something has changed, or the last solution
  /// was stopped; otherwise the result that is there.
  /// @return Held by the study, until the next change or solution.
  const Result& solve(const RunOptions& run = {});

  /// The design of the front with the least Z = C + alpha m, or null where nothing is feasible.
  /// Where several have it, the cheapest and of these the first. Solves first where solve() would.
  ///
  /// Two designs are compared by alpha (m_a - m_b) against C_b - C_a, three roundings, so that a
  /// large alpha neither overflows nor swallows the costs.
  /// @return Held by the study, until the next change or solution.
  [[nodiscard]] const Design* choice(ExchangeConstant alpha);

  /// The exchange ruler of the result. Solves first where solve() would.
  [[nodiscard]] ExchangeRuler ruler(Per per = Per::material);

  /// Where one material stands, and why.
  /// @throws bismar::Error (unknown_name) with the nearest id.
  [[nodiscard]] Answer why(const std::string& material) const;

 private:
  struct Implementation;
  std::unique_ptr<Implementation> implementation_;
};

}  // namespace bismar
