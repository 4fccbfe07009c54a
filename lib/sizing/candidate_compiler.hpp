// SPDX-License-Identifier: MIT
#pragma once

#include "sizing/problem.hpp"

#include <memory>
#include <vector>

namespace bismar {

/// Makes a candidate ready for solving: its variable, the pieces of its sizes, its constraints.
class CandidateCompiler {
 public:
  /// @param size, free_sizes  A design whose ratios a shape with free dimensions gets; otherwise 0.
  CandidateCompiler(SizingProblem& problem,
                    const Candidate& candidate,
                    double size = 0.0,
                    const FreeSizes& free_sizes = {});
  [[nodiscard]] std::unique_ptr<CompiledCandidate> run();

 private:
  void stock_pieces();
  void shape_pieces();
  void set_sizes();
  [[nodiscard]] std::vector<double> sheet_sizes() const;
  [[nodiscard]] const StepState* state_at(double thickness) const;
  /// The dimension that the strength steps of the material are read at.
  [[nodiscard]] double strength_thickness(const SectionProperties& section) const;
  /// A free polygon with walls so thin that buckling of its parts is not covered.
  [[nodiscard]] bool thin_polygon() const;
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
