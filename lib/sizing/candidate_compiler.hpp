// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"

#include <memory>
#include <vector>

namespace bismar {

/// The value of a limited property in a row, whether of the library's properties or an extra
/// column.
[[nodiscard]] std::optional<Range> limited_value(const MaterialTable& table,
                                                 const PropertyLimit& limit,
                                                 std::size_t row);
/// The end of its range that counts: the study's own where it names one, otherwise the one on the
/// safe side.
[[nodiscard]] double limited_end(const PropertyReader& reader,
                                 const PropertyLimit& limit,
                                 const Range& range,
                                 bool at_least);

/// Makes a candidate ready for solving: its variable, the pieces of its sizes, its constraints.
class CandidateCompiler {
 public:
  CandidateCompiler(SizingProblem& problem, const Candidate& candidate);
  [[nodiscard]] std::unique_ptr<CompiledCandidate> run();

 private:
  void stock_pieces();
  void shape_pieces();
  void set_sizes();
  [[nodiscard]] std::vector<double> wanted_sizes(double lower, double upper) const;
  [[nodiscard]] std::vector<double> sheet_sizes() const;
  [[nodiscard]] const StepState* state_at(double thickness) const;
  /// The dimension that the strength steps of the material are read at.
  [[nodiscard]] double strength_thickness(const SectionProperties& section) const;
  [[nodiscard]] double blank_thickness(const Blank& blank) const;
  /// A free polygon with walls so thin that buckling of its parts is not covered.
  [[nodiscard]] bool thin_polygon() const;
  [[nodiscard]] std::vector<std::string> open_limits(const StepState& step) const;
  void collect_constraints();
  void add_limit_states();
  void find_undecided();

  SizingProblem& problem_;
  std::unique_ptr<CompiledCandidate> out_;
  const MaterialInfo& material_;
  const Route& route_;
  const std::vector<StepState>* states_ = nullptr;
};

}  // namespace bismar
