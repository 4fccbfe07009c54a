// SPDX-License-Identifier: MIT
#include <bismar/numeric/parallel.hpp>

#include <bismar/error.hpp>
#include <bismar/numeric/floating_point_guard.hpp>

#include <algorithm>
#include <condition_variable>
#include <exception>
#include <memory>
#include <mutex>
#include <system_error>
#include <thread>
#include <utility>
#include <vector>

namespace bismar {
namespace {

using Work = FunctionRef<void(std::size_t, std::size_t, std::size_t)>;

/// What the threads of one call share. Owned jointly, because a task of the executor may start
/// after the call has returned; it then finds nothing to claim and never touches `work_`.
class Run {
 public:
  Run(std::size_t n, std::size_t chunk, std::stop_token stop, Work work)
      : n_(n),
        chunk_(chunk),
        count_(n / chunk + (n % chunk != 0 ? 1 : 0)),
        stop_(std::move(stop)),
        work_(work) {}

  [[nodiscard]] std::size_t count() const { return count_; }

  /// Does chunks until none is left to begin.
  void help() {
    std::size_t index = 0;
    while (claim(index)) {
      std::exception_ptr thrown;
      try {
        const FloatingPointGuard guard;
        const std::size_t begin = index * chunk_;
        work_(begin, begin + std::min(chunk_, n_ - begin), index);
      } catch (...) {
        thrown = std::current_exception();
      }
      settle(index, std::move(thrown));
    }
  }

  /// Waits for the chunks that have begun.
  ParallelOutcome finish() {
    std::unique_lock lock(mutex_);
    is_closed_ = true;
    idle_.wait(lock, [this] { return running_ == 0; });
    if (thrown_) {
      std::rethrow_exception(thrown_);
    }
    return {.is_complete = done_ == count_, .chunks_done = done_};
  }

 private:
  bool claim(std::size_t& index) {
    const std::scoped_lock lock(mutex_);
    if (is_closed_ || thrown_ || next_ == count_ || stop_.stop_requested()) {
      return false;
    }
    index = next_++;
    ++running_;
    return true;
  }

  void settle(std::size_t index, std::exception_ptr thrown) {
    const std::scoped_lock lock(mutex_);
    --running_;
    if (!thrown) {
      ++done_;
    } else if (!thrown_ || index < thrown_index_) {
      thrown_ = std::move(thrown);
      thrown_index_ = index;
    }
    if (running_ == 0) {
      idle_.notify_all();
    }
  }

  const std::size_t n_;
  const std::size_t chunk_;
  const std::size_t count_;
  const std::stop_token stop_;
  const Work work_;
  std::mutex mutex_;
  std::condition_variable idle_;
  std::size_t next_ = 0;
  std::size_t running_ = 0;
  std::size_t done_ = 0;
  bool is_closed_ = false;
  std::exception_ptr thrown_;
  std::size_t thrown_index_ = 0;
};

}  // namespace

ParallelOutcome parallel_for_chunks(std::size_t n, const ParallelOptions& options, Work work) {
  if (options.chunk == 0) {
    throw Error(Fault{Code::invalid_argument,
                      "chunk",
                      "0",
                      "1 or more",
                      "a chunk of 0 items never ends the work; give 1 or more"});
  }
  const auto run = std::make_shared<Run>(n, options.chunk, options.stop, work);
  const unsigned wanted =
      options.threads != 0 ? options.threads : std::max(1U, std::thread::hardware_concurrency());
  const std::size_t threads = std::min<std::size_t>(wanted, run->count());

  if (options.executor) {
    // An exception of the executor itself must not leave while tasks use the caller's work.
    std::exception_ptr refused;
    try {
      for (std::size_t i = 1; i < threads; ++i) {
        options.executor([run] { run->help(); });
      }
    } catch (...) {
      refused = std::current_exception();
    }
    if (refused) {
      run->finish();
      std::rethrow_exception(refused);
    }
    run->help();
    return run->finish();
  }

  std::vector<std::jthread> others;
  if (threads > 1) {
    others.reserve(threads - 1);
    try {
      while (others.size() + 1 < threads) {
        others.emplace_back([run] { run->help(); });
      }
    } catch (const std::system_error&) {
      // The system has no more threads: those at work take all chunks, so only time is lost.
    }
  }
  run->help();
  return run->finish();
}

}  // namespace bismar
