// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>

#include <cfenv>
#include <cstdint>

namespace bismar {

/// Gives the calling thread the floating-point mode that the library's results are defined in, and
/// gives the host's own mode back at the end of the scope.
///
/// On entry: round to nearest, subnormal numbers kept (neither flushed to zero as results nor read
/// as zero), no traps. On exit the whole environment of the entry is back: rounding, flush modes,
/// traps, and the exception flags, so that flags raised inside are not seen by the host.
///
/// Scope: rounding and traps wherever <cfenv> has them; the flush modes on x86 with SSE (FTZ and
/// DAZ of MXCSR) and on AArch64 (FZ and FIZ of FPCR). Another processor keeps its flush modes. The
/// x87 precision control is left alone: the library computes in SSE registers there.
///
/// A compiler may move arithmetic on local values across the guard. So the guard stands at an entry
/// point, and the work is done in functions called after it that are compiled elsewhere. The mode
/// belongs to a thread: `parallel_for_chunks` sets it in each of its threads.
///
/// Locale needs no guard: numbers are read and written with std::from_chars and std::to_chars.
class BISMAR_API FloatingPointGuard {
 public:
  FloatingPointGuard() noexcept;
  ~FloatingPointGuard();
  FloatingPointGuard(const FloatingPointGuard&) = delete;
  FloatingPointGuard& operator=(const FloatingPointGuard&) = delete;
  FloatingPointGuard(FloatingPointGuard&&) = delete;
  FloatingPointGuard& operator=(FloatingPointGuard&&) = delete;

 private:
  std::fenv_t environment_;
  std::uint64_t control_;  // the control register that holds the flush modes; 0 where there is none
};

}  // namespace bismar
