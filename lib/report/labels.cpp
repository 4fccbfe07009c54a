// SPDX-License-Identifier: MIT
#include <bismar/report/labels.hpp>

#include <algorithm>
#include <array>
#include <cmath>

#include <bismar/error.hpp>

namespace bismar::report {
namespace {

Box marker_box(const LabelRequest& request) {
  return {request.marker.x - request.radius,
          request.marker.y - request.radius,
          2.0 * request.radius,
          2.0 * request.radius};
}

double cross(Point o, Point a, Point b) {
  return (a.x - o.x) * (b.y - o.y) - (a.y - o.y) * (b.x - o.x);
}

bool within(Point p, const Segment& s) {
  return std::min(s.from.x, s.to.x) <= p.x && p.x <= std::max(s.from.x, s.to.x) &&
         std::min(s.from.y, s.to.y) <= p.y && p.y <= std::max(s.from.y, s.to.y);
}

// Sixteen directions as multiples of exact values, so that libm does not decide a place.
struct Direction {
  double x;
  double y;
  double dislike;  // below and right of a front there is the most room, so these come first
};
constexpr double c22 = 0.9238795325112867;
constexpr double c45 = 0.7071067811865476;
constexpr double c67 = 0.3826834323650898;
constexpr std::array<Direction, 16> directions = {{{c45, -c45, 0.0},
                                                   {-c45, c45, 0.3},
                                                   {1.0, 0.0, 0.2},
                                                   {-1.0, 0.0, 0.6},
                                                   {c22, -c67, 0.1},
                                                   {c67, -c22, 0.4},
                                                   {-c22, c67, 0.5},
                                                   {-c67, c22, 0.5},
                                                   {0.0, -1.0, 0.8},
                                                   {0.0, 1.0, 0.8},
                                                   {c45, c45, 0.9},
                                                   {-c45, -c45, 0.9},
                                                   {c22, c67, 0.9},
                                                   {c67, c22, 0.9},
                                                   {-c22, -c67, 1.0},
                                                   {-c67, -c22, 1.0}}};
constexpr std::array<double, 9> distances = {3.0, 8.0, 16.0, 26.0, 38.0, 52.0, 70.0, 92.0, 120.0};
constexpr double leader_from = 8.0;  // from this distance on a leader shows what belongs together

Box box_at(const LabelRequest& request, const Direction& direction, double distance) {
  const double reach = request.radius + distance;
  const auto side = [](double component) {
    return component > 0.01 ? 1.0 : component < -0.01 ? -1.0 : 0.0;
  };
  const double cx =
      request.marker.x + reach * direction.x + 0.5 * request.width * side(direction.x);
  const double cy =
      request.marker.y + reach * direction.y + 0.5 * request.height * side(direction.y);
  return {cx - 0.5 * request.width, cy - 0.5 * request.height, request.width, request.height};
}

Segment leader_to(const LabelRequest& request, const Box& box) {
  const Point end{std::clamp(request.marker.x, box.x, box.right()),
                  std::clamp(request.marker.y, box.y, box.bottom())};
  const double dx = end.x - request.marker.x;
  const double dy = end.y - request.marker.y;
  const double length = std::max(std::sqrt(dx * dx + dy * dy), 1e-9);
  const double start = request.radius + 1.0;
  return {{request.marker.x + dx / length * start, request.marker.y + dy / length * start}, end};
}

class Placer {
 public:
  Placer(std::span<const LabelRequest> requests, const LabelField& field, double gap)
      : requests_(requests), field_(field), gap_(gap), leaders_(field.barriers) {}

  std::vector<std::optional<LabelPlace>> run() {
    std::vector<std::optional<LabelPlace>> places(requests_.size());
    for (std::size_t i = 0; i < requests_.size(); ++i) {
      places[i] = best(i);
      if (!places[i]) continue;
      boxes_.push_back(places[i]->box);
      if (places[i]->leader) leaders_.push_back(*places[i]->leader);
    }
    return places;
  }

 private:
  [[nodiscard]] bool box_is_free(const Box& box) const {
    if (!field_.area.contains(box)) return false;
    const auto hit = [&](const Box& other) { return box.overlaps(other, gap_); };
    if (std::any_of(boxes_.begin(), boxes_.end(), hit)) return false;
    const auto covered = [&](const Box& other) { return box.overlaps(other, 1.0); };
    if (std::any_of(field_.obstacles.begin(), field_.obstacles.end(), covered)) return false;
    for (const LabelRequest& request : requests_) {
      if (box.overlaps(marker_box(request), 0.5)) return false;
    }
    return std::none_of(
        leaders_.begin(), leaders_.end(), [&](const Segment& l) { return crosses(l, box); });
  }

  [[nodiscard]] bool leader_is_free(const Segment& leader, std::size_t own) const {
    const auto through = [&](const Box& box) { return crosses(leader, box); };
    if (std::any_of(boxes_.begin(), boxes_.end(), through)) return false;
    if (std::any_of(field_.obstacles.begin(), field_.obstacles.end(), through)) return false;
    for (std::size_t i = 0; i < requests_.size(); ++i) {
      if (i != own && crosses(leader, marker_box(requests_[i]))) return false;
    }
    return std::none_of(leaders_.begin(), leaders_.end(), [&](const Segment& other) {
      return crosses(leader, other);
    });
  }

  [[nodiscard]] double dislike(const Box& box) const {
    // A curve of many pieces must not count more than a straight stroke.
    constexpr double stroke_dislike = 4.0;
    constexpr double most_stroke_dislike = 8.0;
    double sum = 0.0;
    for (const Segment& stroke : field_.strokes) sum += crosses(stroke, box) ? stroke_dislike : 0.0;
    sum = std::min(sum, most_stroke_dislike);
    constexpr double dot_dislike = 2.0;
    constexpr double most_dot_dislike = 8.0;
    double dots = 0.0;
    for (const Point& dot : field_.dots) {
      dots += box.overlaps({dot.x - 3.0, dot.y - 3.0, 6.0, 6.0}) ? dot_dislike : 0.0;
    }
    return sum + std::min(dots, most_dot_dislike);
  }

  [[nodiscard]] std::optional<LabelPlace> best(std::size_t i) const {
    const LabelRequest& request = requests_[i];
    std::optional<LabelPlace> best;
    double least = 0.0;
    for (std::size_t d = 0; d < distances.size() && distances[d] <= request.reach; ++d) {
      for (const Direction& direction : directions) {
        const double base = 1.1 * static_cast<double>(d) + direction.dislike;
        if (best && base >= least) continue;
        const Box box = box_at(request, direction, distances[d]);
        if (!box_is_free(box)) continue;
        std::optional<Segment> leader;
        if (distances[d] >= leader_from) {
          leader = leader_to(request, box);
          if (!leader_is_free(*leader, i)) continue;
        }
        const double score = base + dislike(box);
        if (best && score >= least) continue;
        best = LabelPlace{box, leader};
        least = score;
      }
    }
    return best;
  }

  std::span<const LabelRequest> requests_;
  const LabelField& field_;
  double gap_;
  std::vector<Box> boxes_;
  std::vector<Segment> leaders_;
};

}  // namespace

bool crosses(const Segment& segment, const Box& box) {
  // Clips the segment to the slab of each axis in turn.
  double enter = 0.0;
  double leave = 1.0;
  const auto clip = [&](double start, double delta, double low, double high) {
    if (delta == 0.0) return start > low && start < high;
    const double a = (low - start) / delta;
    const double b = (high - start) / delta;
    enter = std::max(enter, std::min(a, b));
    leave = std::min(leave, std::max(a, b));
    return enter < leave;
  };
  return clip(segment.from.x, segment.to.x - segment.from.x, box.x, box.right()) &&
         clip(segment.from.y, segment.to.y - segment.from.y, box.y, box.bottom());
}

bool crosses(const Segment& a, const Segment& b) {
  const double d1 = cross(b.from, b.to, a.from);
  const double d2 = cross(b.from, b.to, a.to);
  const double d3 = cross(a.from, a.to, b.from);
  const double d4 = cross(a.from, a.to, b.to);
  if (((d1 > 0.0 && d2 < 0.0) || (d1 < 0.0 && d2 > 0.0)) &&
      ((d3 > 0.0 && d4 < 0.0) || (d3 < 0.0 && d4 > 0.0))) {
    return true;
  }
  return (d1 == 0.0 && within(a.from, b)) || (d2 == 0.0 && within(a.to, b)) ||
         (d3 == 0.0 && within(b.from, a)) || (d4 == 0.0 && within(b.to, a));
}

std::vector<std::optional<LabelPlace>> place_labels(std::span<const LabelRequest> requests,
                                                    const LabelField& field,
                                                    double gap) {
  return Placer(requests, field, gap).run();
}

std::optional<std::vector<double>> fan_out(std::span<const double> centres,
                                           std::span<const double> widths,
                                           double from,
                                           double to,
                                           double gap) {
  if (centres.size() != widths.size()) throw InternalError("fan_out: lengths differ");
  if (!std::is_sorted(centres.begin(), centres.end())) {
    throw InternalError("fan_out: the centres do not ascend");
  }
  const std::size_t n = centres.size();
  if (n == 0) return std::vector<double>();

  // With z_i = left edge - room taken by the boxes before, "no overlap" reads "z never falls".
  struct Block {
    double sum;
    double size;
    [[nodiscard]] double mean() const { return sum / size; }
  };
  std::vector<double> offset(n);
  std::vector<Block> blocks;
  double taken = 0.0;
  for (std::size_t i = 0; i < n; ++i) {
    offset[i] = taken;
    taken += widths[i] + gap;
    blocks.push_back({centres[i] - 0.5 * widths[i] - offset[i], 1.0});
    while (blocks.size() > 1 && blocks[blocks.size() - 2].mean() >= blocks.back().mean()) {
      const Block last = blocks.back();
      blocks.pop_back();
      blocks.back().sum += last.sum;
      blocks.back().size += last.size;
    }
  }
  const double highest = to - (taken - gap);
  if (highest < from) return std::nullopt;
  std::vector<double> out;
  out.reserve(n);
  for (const Block& block : blocks) {
    const double z = std::clamp(block.mean(), from, highest);
    for (double k = 0.0; k < block.size; k += 1.0) {
      const std::size_t i = out.size();
      out.push_back(z + offset[i] + 0.5 * widths[i]);
    }
  }
  return out;
}

}  // namespace bismar::report
