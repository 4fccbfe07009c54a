// SPDX-License-Identifier: MIT
#include <bismar/sizing/result.hpp>

#include <numeric>

namespace bismar {

std::size_t Funnel::count(FunnelLine::Stage stage) const {
  return std::accumulate(
      lines.begin(), lines.end(), std::size_t{0}, [stage](std::size_t sum, const FunnelLine& line) {
        return sum + (line.stage == stage ? line.candidates : 0);
      });
}

}  // namespace bismar
