// SPDX-License-Identifier: MIT
#include <bismar/numeric/floating_point_guard.hpp>

#if defined(__SSE2__) || defined(_M_X64)
#define BISMAR_HAS_MXCSR
#include <xmmintrin.h>
#endif

namespace bismar {
namespace {

#if defined(BISMAR_HAS_MXCSR)

constexpr unsigned flush_bits = 0x8040U;  // MXCSR: FTZ is bit 15, DAZ is bit 6

std::uint64_t read_control() noexcept { return _mm_getcsr(); }
void write_control(std::uint64_t control) noexcept { _mm_setcsr(static_cast<unsigned>(control)); }

#elif defined(__aarch64__)

constexpr std::uint64_t flush_bits = (1ULL << 24U) | 1ULL;  // FPCR: FZ is bit 24, FIZ is bit 0

std::uint64_t read_control() noexcept {
  std::uint64_t control = 0;
  __asm__ __volatile__("mrs %0, fpcr" : "=r"(control));
  return control;
}
void write_control(std::uint64_t control) noexcept {
  __asm__ __volatile__("msr fpcr, %0" : : "r"(control));
}

#else

constexpr std::uint64_t flush_bits = 0;

std::uint64_t read_control() noexcept { return 0; }
void write_control(std::uint64_t /*control*/) noexcept {}

#endif

}  // namespace

FloatingPointGuard::FloatingPointGuard() noexcept : environment_{}, control_(read_control()) {
  std::feholdexcept(&environment_);
  std::fesetround(FE_TONEAREST);
  write_control(read_control() & ~static_cast<std::uint64_t>(flush_bits));
}

FloatingPointGuard::~FloatingPointGuard() {
  std::fesetenv(&environment_);
  // C libraries differ in whether fesetenv gives the flush modes back, so they are written here.
  write_control(control_);
}

}  // namespace bismar
