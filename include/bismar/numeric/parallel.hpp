// SPDX-License-Identifier: MIT
#pragma once

#include <bismar/export.hpp>
#include <bismar/numeric/function_ref.hpp>

#include <cstddef>
#include <functional>
#include <stop_token>

namespace bismar {

/// The host's own threads: takes a task and runs it once, at some time, on any thread; running it
/// before returning is allowed, and so is never running it. May be called from the thread that
/// calls `parallel_for_chunks` only.
using Executor = std::function<void(std::function<void()> task)>;

/// How the work is cut and who does it. Only `chunk` changes what the chunks are; the rest changes
/// the time.
struct ParallelOptions {
  std::size_t chunk = 1;  ///< Items per chunk, >= 1; the last chunk may be shorter.
  unsigned threads = 0;   ///< Threads at work, the caller's own included; 0: as the machine has.
  /// Where the other threads come from; empty: threads are started for this call and joined.
  Executor executor = {};
  std::stop_token stop = {};  ///< A stop lets chunks that have begun end and begins no other.
};

/// What became of a run.
struct ParallelOutcome {
  bool is_complete = true;      ///< Every chunk was done; false only after a stop.
  std::size_t chunks_done = 0;  ///< How many.
};

/// Calls work(begin, end, chunk_index) for the chunks [0, c), [c, 2c), ... of n items, on several
/// threads.
///
/// Fixed-order results: chunk k is the same items whatever the threads, chunks are begun in the
/// order of their index, and each runs once, so work that writes only to its own items or to a slot
/// numbered by chunk_index, summed up afterwards in the order of the slots, gives the same result
/// bit for bit with any number of threads.
///
/// Exceptions: after work throws, chunks that have begun end and no other is begun; then the
/// exception of the chunk with the lowest index is thrown here. It is the same one with any number
/// of threads (unless a stop comes first), because every lower chunk had begun before.
///
/// The calling thread works too, and never waits for a task that the executor has not started, so a
/// busy or a single-threaded executor cannot block it. Each thread works in the floating-point mode
/// of `FloatingPointGuard`. When the system refuses to start a thread the others do its share.
///
/// @param n      Number of items; 0 calls nothing.
/// @param work   Called from several threads at once (one call per thread at a time).
/// @throws bismar::Error  invalid_argument: chunk is 0 ("chunk"). What work throws, as above.
BISMAR_API ParallelOutcome parallel_for_chunks(
    std::size_t n,
    const ParallelOptions& options,
    FunctionRef<void(std::size_t begin, std::size_t end, std::size_t chunk_index)> work);

}  // namespace bismar
