// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/numeric/parallel.hpp>

#include <algorithm>
#include <atomic>
#include <cfenv>
#include <chrono>
#include <cmath>
#include <cstddef>
#include <functional>
#include <mutex>
#include <numeric>
#include <set>
#include <stdexcept>
#include <stop_token>
#include <string>
#include <thread>
#include <utility>
#include <vector>

#include "support/catch.hpp"

namespace {

using std::size_t;

/// A sum whose last bits depend on its order.
double ordered_sum(size_t n, const bismar::ParallelOptions& options) {
  std::vector<double> slots(n / options.chunk + 1, 0.0);
  const auto outcome =
      bismar::parallel_for_chunks(n, options, [&](size_t begin, size_t end, size_t chunk) {
        for (size_t i = begin; i < end; ++i) {
          slots[chunk] += std::sin(static_cast<double>(i)) / (1.0 + static_cast<double>(i));
        }
      });
  if (!outcome.is_complete) {
    throw std::logic_error("not complete");
  }
  return std::accumulate(slots.begin(), slots.end(), 0.0);
}

}  // namespace

TEST_CASE("every item is visited once, in chunks that do not depend on the threads") {
  for (const unsigned threads : {1U, 2U, 5U}) {
    for (const size_t n : {0U, 1U, 6U, 7U, 8U, 1000U}) {
      std::vector<std::atomic<int>> visits(n);
      std::vector<std::pair<size_t, size_t>> chunks((n + 6) / 7);
      const auto outcome = bismar::parallel_for_chunks(
          n, {.chunk = 7, .threads = threads}, [&](size_t begin, size_t end, size_t chunk) {
            chunks[chunk] = {begin, end};
            for (size_t i = begin; i < end; ++i) {
              ++visits[i];
            }
          });
      CHECK(outcome.is_complete);
      CHECK(outcome.chunks_done == chunks.size());
      CHECK(std::all_of(visits.begin(), visits.end(), [](const auto& v) { return v == 1; }));
      for (size_t k = 0; k < chunks.size(); ++k) {
        CHECK(chunks[k] == std::pair(7 * k, std::min(7 * k + 7, n)));
      }
    }
  }
}

TEST_CASE("a sum over slots is the same bit for bit with any number of threads") {
  const double expected = ordered_sum(100'000, {.chunk = 37, .threads = 1});
  for (const unsigned threads : {0U, 2U, 5U, 16U}) {
    CHECK(ordered_sum(100'000, {.chunk = 37, .threads = threads}) == expected);
  }
}

TEST_CASE("the exception of the lowest chunk arrives, whatever the threads") {
  for (const unsigned threads : {1U, 2U, 5U}) {
    for (int repeat = 0; repeat < 20; ++repeat) {
      std::string message;
      try {
        bismar::parallel_for_chunks(200, {.threads = threads}, [](size_t, size_t, size_t chunk) {
          if (chunk == 17) {
            // Late on purpose: with several threads a higher chunk throws first.
            std::this_thread::sleep_for(std::chrono::milliseconds(2));
          }
          if (chunk >= 17) {
            throw std::runtime_error("chunk " + std::to_string(chunk));
          }
        });
      } catch (const std::runtime_error& error) {
        message = error.what();
      }
      CHECK(message == "chunk 17");
    }
  }
}

TEST_CASE("no chunk begins after an exception has been seen") {
  std::atomic<int> calls = 0;
  const auto work = [&](size_t, size_t, size_t chunk) {
    ++calls;
    if (chunk == 3) {
      throw std::runtime_error("stop");
    }
  };
  CHECK_THROWS_AS(bismar::parallel_for_chunks(1'000'000, {.threads = 1}, work), std::runtime_error);
  CHECK(calls == 4);
}

TEST_CASE("a stop lets begun chunks end, begins no other and is told") {
  for (const unsigned threads : {1U, 2U, 5U}) {
    std::stop_source stop;
    std::atomic<size_t> ended = 0;
    const auto outcome = bismar::parallel_for_chunks(
        10'000, {.threads = threads, .stop = stop.get_token()}, [&](size_t, size_t, size_t chunk) {
          if (chunk == 5) {
            stop.request_stop();
          }
          while (chunk > 5 && !stop.stop_requested()) {
            std::this_thread::yield();
          }
          ++ended;
        });
    CHECK_FALSE(outcome.is_complete);
    CHECK(outcome.chunks_done == ended);
    CHECK(outcome.chunks_done >= 6);
    CHECK(outcome.chunks_done < 6 + threads);
  }
}

TEST_CASE("a stop before the start does nothing, one in the last chunk takes nothing away") {
  std::stop_source stop;
  const auto finished = bismar::parallel_for_chunks(
      3, {.threads = 1, .stop = stop.get_token()}, [&](size_t, size_t, size_t chunk) {
        if (chunk == 2) {
          stop.request_stop();
        }
      });
  CHECK(finished.is_complete);

  std::atomic<int> calls = 0;
  const auto never = bismar::parallel_for_chunks(
      3, {.stop = stop.get_token()}, [&](size_t, size_t, size_t) { ++calls; });
  CHECK_FALSE(never.is_complete);
  CHECK(never.chunks_done == 0);
  CHECK(calls == 0);
}

TEST_CASE("the host's executor gives the same result, however it behaves") {
  const double expected = ordered_sum(10'000, {.chunk = 37, .threads = 1});

  SECTION("tasks run on threads of the host") {
    std::vector<std::jthread> host_threads;
    const bismar::Executor executor = [&](std::function<void()> task) {
      host_threads.emplace_back(std::move(task));
    };
    CHECK(ordered_sum(10'000, {.chunk = 37, .threads = 5, .executor = executor}) == expected);
    CHECK(host_threads.size() == 4);
  }
  SECTION("tasks run at once on the calling thread") {
    const bismar::Executor executor = [](const std::function<void()>& task) { task(); };
    CHECK(ordered_sum(10'000, {.chunk = 37, .threads = 5, .executor = executor}) == expected);
  }
  SECTION("tasks run only after the call has returned") {
    std::vector<std::function<void()>> queue;
    const bismar::Executor executor = [&](std::function<void()> task) {
      queue.push_back(std::move(task));
    };
    CHECK(ordered_sum(10'000, {.chunk = 37, .threads = 5, .executor = executor}) == expected);
    CHECK(queue.size() == 4);
    for (const auto& task : queue) {
      task();  // finds nothing to do, and must not touch the work that is gone
    }
  }
  SECTION("an executor that throws is reported") {
    const bismar::Executor executor = [](const std::function<void()>&) {
      throw std::runtime_error("queue full");
    };
    CHECK_THROWS_WITH(ordered_sum(100, {.threads = 2, .executor = executor}), "queue full");
  }
}

TEST_CASE("work runs in the library's floating-point mode on every thread") {
  std::fesetround(FE_UPWARD);
  std::mutex mutex;
  std::set<int> modes;
  bismar::parallel_for_chunks(100, {.threads = 3}, [&](size_t, size_t, size_t) {
    const std::scoped_lock lock(mutex);
    modes.insert(std::fegetround());
  });
  const int after = std::fegetround();
  std::fesetround(FE_TONEAREST);
  CHECK(modes == std::set<int>{FE_TONEAREST});
  CHECK(after == FE_UPWARD);
}

TEST_CASE("calls nest") {
  std::vector<double> sums(6);
  bismar::parallel_for_chunks(sums.size(), {.threads = 3}, [&](size_t begin, size_t, size_t) {
    sums[begin] = ordered_sum(1000, {.chunk = 10, .threads = 2});
  });
  const double expected = ordered_sum(1000, {.chunk = 10, .threads = 1});
  CHECK(std::all_of(sums.begin(), sums.end(), [&](double sum) { return sum == expected; }));
}

TEST_CASE("a chunk of no items is refused") {
  try {
    bismar::parallel_for_chunks(3, {.chunk = 0}, [](size_t, size_t, size_t) {});
    FAIL("accepted");
  } catch (const bismar::Error& error) {
    REQUIRE(error.faults().size() == 1);
    CHECK(error.faults()[0].where == "chunk");
    CHECK(error.faults()[0].code == bismar::Code::invalid_argument);
  }
}
