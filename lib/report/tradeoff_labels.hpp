// SPDX-License-Identifier: MIT
// The names of the front's points in the trade-off picture.
#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include <bismar/report/labels.hpp>
#include <bismar/report/text_report.hpp>

#include "report/plot.hpp"

namespace bismar::report {

/// The two axes of a trade-off.
struct Plot {
  Axis mass;
  Axis cost;
  [[nodiscard]] Point at(double m, double c) const { return {mass.at(m), cost.at(c)}; }
  [[nodiscard]] bool shows(double m, double c) const { return mass.shows(m) && cost.shows(c); }
  [[nodiscard]] Box area() const {
    return {mass.at(mass.low()),
            cost.at(cost.high()),
            mass.at(mass.high()) - mass.at(mass.low()),
            cost.at(cost.low()) - cost.at(cost.high())};
  }
};

/// A front point that wants a name.
struct Entry {
  std::size_t design = 0;
  std::string letter;              // of the choice, empty when the ruler does not name the design
  std::vector<std::string> lines;  // of the full label: the name, then the size
  std::size_t name_lines = 0;
  std::string key_text;
};

Entry make_entry(const Result& result,
                 const Representative& representative,
                 const ExchangeRuler& ruler,
                 const ChoiceLetters& letters);

/// Names the front points; what finds no place gets a letter or number and a line in the key.
/// @param field    Takes up what was drawn.
/// @param unnamed  Raised by the number of points that carry nothing.
std::vector<KeyEntry> draw_labels(Svg& svg,
                                  const Result& result,
                                  const Plot& plot,
                                  const std::vector<Entry>& entries,
                                  LabelField& field,
                                  std::size_t& unnamed);

}  // namespace bismar::report
