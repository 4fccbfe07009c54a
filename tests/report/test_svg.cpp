// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/report/labels.hpp>
#include <bismar/report/svg.hpp>

#include <algorithm>
#include <cmath>
#include <limits>
#include <random>

#include "report/xml_check.hpp"
#include "support/catch.hpp"

using namespace bismar::report;

TEST_CASE("coordinates are short and never negative zero") {
  CHECK(coordinate(1.0) == "1");
  CHECK(coordinate(100.0) == "100");
  CHECK(coordinate(1.5) == "1.5");
  CHECK(coordinate(1.256) == "1.26");
  CHECK(coordinate(-0.001) == "0");
  CHECK_THROWS_AS(coordinate(std::numeric_limits<double>::quiet_NaN()), bismar::InternalError);
  CHECK_THROWS_AS(coordinate(std::numeric_limits<double>::infinity()), bismar::InternalError);
}

TEST_CASE("texts cannot break the document") {
  CHECK(escape_xml("a & b < c > d \" e ' f") == "a &amp; b &lt; c &gt; d &quot; e &#39; f");
  CHECK(escape_xml(std::string_view("a\0b", 3)) ==
        "a\xEF\xBF\xBD"
        "b");
  CHECK(escape_xml("\x1b[1m") == "\xEF\xBF\xBD[1m");
  CHECK(escape_xml("\xFFok") == "\xEF\xBF\xBDok");
  CHECK(escape_xml("\xED\xA0\x80") == "\xEF\xBF\xBD\xEF\xBF\xBD\xEF\xBF\xBD");  // a surrogate
  CHECK(escape_xml("Gr\xC3\xB6\xC3\x9F"
                   "e") ==
        "Gr\xC3\xB6\xC3\x9F"
        "e");

  Svg svg;
  svg.begin_group("<g> & \"more\"");
  svg.text({1.0, 2.0}, "</text><script>", {});
  svg.end_group();
  const xml::Document document = xml::parse(svg.document(10.0, 10.0, "a<b", "c&d"));
  CHECK(document.fault.empty());
  CHECK(document.elements.back().text == "</text><script>");
}

TEST_CASE("the checker of these tests finds what is not well-formed") {
  CHECK(xml::parse("<a><b/></a>").fault.empty());
  for (const char* bad : {"<a>",
                          "<a></b>",
                          "<a b=1/>",
                          "<a b=\"<\"/>",
                          "<a>&</a>",
                          "<a>&x;</a>",
                          "<a/><b/>",
                          "<a b=\"1\" b=\"2\"/>",
                          "text",
                          "",
                          "<a>\x01</a>",
                          "<a b=\"1\"c=\"2\"/>"}) {
    INFO(bad);
    CHECK_FALSE(xml::parse(bad).fault.empty());
  }
}

TEST_CASE("groups must be closed, and closed only once") {
  Svg svg;
  CHECK_THROWS_AS(svg.end_group(), bismar::InternalError);
  svg.begin_group();
  CHECK_THROWS_AS(svg.document(1.0, 1.0, "", ""), bismar::InternalError);
}

// Advance widths at 1000 units: Nimbus Sans Regular from its AFM file (n 556, i 222, W 944, blank
// 278), DejaVu Sans from its hmtx table (n 634, i 278, W 989, blank 318); both read from Debian 12
// packages.
TEST_CASE("the estimated width of a text is at least its width in both fonts") {
  CHECK(text_width("n", 1000.0) == Approx(634.0));
  CHECK(text_width("iW ", 1000.0) == Approx(278.0 + 989.0 + 318.0));
  CHECK(text_width("nn", 10.0) == Approx(2.0 * text_width("n", 10.0)));
  CHECK(text_width("n", 10.0, true) > text_width("n", 10.0));
  CHECK(text_width("", 10.0) == 0.0);
}

TEST_CASE("wrapped lines fit the width unless a word alone does not") {
  for (const std::string& line : wrap_text("quenched and tempered steel", 11.0, 90.0)) {
    CHECK(text_width(line, 11.0) <= 90.0);
  }
  CHECK(wrap_text("", 11.0, 50.0) == std::vector<std::string>{""});
  CHECK(wrap_text("unbreakable", 11.0, 5.0) == std::vector<std::string>{"unbreakable"});
}

TEST_CASE("segments cross boxes and each other where they should") {
  const Box box{10.0, 10.0, 10.0, 10.0};
  CHECK(crosses(Segment{{0.0, 15.0}, {30.0, 15.0}}, box));
  CHECK(crosses(Segment{{12.0, 12.0}, {13.0, 13.0}}, box));
  CHECK(crosses(Segment{{0.0, 0.0}, {30.0, 30.0}}, box));
  CHECK_FALSE(crosses(Segment{{0.0, 0.0}, {30.0, 5.0}}, box));
  CHECK_FALSE(crosses(Segment{{0.0, 15.0}, {9.0, 15.0}}, box));
  CHECK_FALSE(crosses(Segment{{10.0, 0.0}, {10.0, 30.0}}, box));  // along the edge
  CHECK(crosses(Segment{{0.0, 0.0}, {2.0, 2.0}}, Segment{{0.0, 2.0}, {2.0, 0.0}}));
  CHECK(crosses(Segment{{0.0, 0.0}, {2.0, 0.0}}, Segment{{1.0, 0.0}, {1.0, 5.0}}));
  CHECK_FALSE(crosses(Segment{{0.0, 0.0}, {2.0, 0.0}}, Segment{{3.0, -1.0}, {3.0, 1.0}}));
}

TEST_CASE("placed labels overlap nothing, whatever the points") {
  std::mt19937 random(42);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  std::size_t placed = 0;
  std::size_t asked = 0;
  for (int round = 0; round < 120; ++round) {
    LabelField field;
    field.area = {0.0, 0.0, 600.0, 400.0};
    const std::size_t n = 1 + random() % 40;
    std::vector<LabelRequest> requests;
    const double spread = round % 3 == 0 ? 0.1 : 1.0;  // every third round is a dense cluster
    for (std::size_t i = 0; i < n; ++i) {
      requests.push_back({{300.0 + 580.0 * spread * (unit(random) - 0.5),
                           200.0 + 380.0 * spread * (unit(random) - 0.5)},
                          5.0,
                          20.0 + 120.0 * unit(random),
                          14.0 + 26.0 * unit(random),
                          120.0});
    }
    for (int i = 0; i < 3; ++i) {
      field.obstacles.push_back({500.0 * unit(random), 350.0 * unit(random), 60.0, 20.0});
      field.strokes.push_back({{600.0 * unit(random), 0.0}, {600.0 * unit(random), 400.0}});
      field.barriers.push_back({{600.0 * unit(random), 0.0}, {600.0 * unit(random), 40.0}});
      field.dots.push_back({600.0 * unit(random), 400.0 * unit(random)});
    }
    constexpr double gap = 3.0;
    const auto places = place_labels(requests, field, gap);
    REQUIRE(places.size() == n);
    for (std::size_t i = 0; i < n; ++i) {
      ++asked;
      if (!places[i]) continue;
      ++placed;
      const Box& box = places[i]->box;
      REQUIRE(box.width == Approx(requests[i].width));
      REQUIRE(field.area.contains(box));
      for (const Box& obstacle : field.obstacles) REQUIRE_FALSE(box.overlaps(obstacle));
      for (const Segment& barrier : field.barriers) REQUIRE_FALSE(crosses(barrier, box));
      for (std::size_t j = 0; j < n; ++j) {
        const Box marker{requests[j].marker.x - 5.0, requests[j].marker.y - 5.0, 10.0, 10.0};
        REQUIRE_FALSE(box.overlaps(marker));
        if (j == i || !places[j]) continue;
        REQUIRE_FALSE(box.overlaps(places[j]->box, 0.999 * gap));
        if (!places[j]->leader) continue;
        REQUIRE_FALSE(crosses(*places[j]->leader, box));
        if (places[i]->leader) REQUIRE_FALSE(crosses(*places[i]->leader, *places[j]->leader));
      }
    }
  }
  // A placer that places nothing would pass the checks above.
  CHECK(placed > asked / 3);
}

TEST_CASE("a lone label stands beside its marker without a leader") {
  const std::vector<LabelRequest> one = {{{100.0, 100.0}, 5.0, 60.0, 14.0, 90.0}};
  const auto places = place_labels(one,
                                   {.area = {0.0, 0.0, 300.0, 200.0},
                                    .obstacles = {},
                                    .barriers = {},
                                    .strokes = {},
                                    .dots = {}});
  REQUIRE(places.front());
  CHECK_FALSE(places.front()->leader);
  CHECK(places.front()->box.x > 100.0);
  CHECK(places.front()->box.bottom() < 100.0);
}

TEST_CASE("a label without room is left out") {
  const std::vector<LabelRequest> one = {{{10.0, 10.0}, 5.0, 60.0, 14.0, 90.0}};
  const LabelField field{{0.0, 0.0, 20.0, 20.0}, {}, {}, {}, {}};
  CHECK_FALSE(place_labels(one, field).front());
}

TEST_CASE("fanned-out boxes keep order, bounds and gap, and move as little as can be") {
  std::mt19937 random(3);
  std::uniform_real_distribution<double> unit(0.0, 1.0);
  for (int round = 0; round < 200; ++round) {
    const std::size_t n = 1 + random() % 12;
    std::vector<double> centres;
    std::vector<double> widths;
    for (std::size_t i = 0; i < n; ++i) {
      centres.push_back(300.0 * unit(random));
      widths.push_back(4.0 + 20.0 * unit(random));
    }
    std::sort(centres.begin(), centres.end());
    const auto placed = fan_out(centres, widths, 0.0, 400.0, 5.0);
    REQUIRE(placed);
    double cost = 0.0;
    for (std::size_t i = 0; i < n; ++i) {
      CHECK((*placed)[i] - 0.5 * widths[i] >= -1e-9);
      CHECK((*placed)[i] + 0.5 * widths[i] <= 400.0 + 1e-9);
      if (i > 0) {
        CHECK((*placed)[i] - (*placed)[i - 1] >= 0.5 * (widths[i] + widths[i - 1]) + 5.0 - 1e-9);
      }
      cost += std::pow((*placed)[i] - centres[i], 2.0);
    }
    // No small feasible change of one or of several neighbours is better.
    for (std::size_t a = 0; a < n; ++a) {
      for (std::size_t b = a; b < n; ++b) {
        for (const double step : {-0.01, 0.01}) {
          std::vector<double> other = *placed;
          for (std::size_t i = a; i <= b; ++i) other[i] += step;
          bool feasible = true;
          double other_cost = 0.0;
          for (std::size_t i = 0; i < n; ++i) {
            feasible = feasible && other[i] - 0.5 * widths[i] >= 0.0 &&
                       other[i] + 0.5 * widths[i] <= 400.0;
            if (i > 0) {
              feasible =
                  feasible && other[i] - other[i - 1] >= 0.5 * (widths[i] + widths[i - 1]) + 5.0;
            }
            other_cost += std::pow(other[i] - centres[i], 2.0);
          }
          if (feasible) CHECK(other_cost >= cost - 1e-9);
        }
      }
    }
  }
}

TEST_CASE("fanning out says when there is no room, and refuses what is not sorted") {
  const std::vector<double> centres = {1.0, 2.0, 3.0};
  const std::vector<double> widths = {10.0, 10.0, 10.0};
  CHECK_FALSE(fan_out(centres, widths, 0.0, 39.0, 5.0));
  CHECK(fan_out(centres, widths, 0.0, 40.0, 5.0));
  CHECK(fan_out({}, {}, 0.0, 1.0)->empty());
  const std::vector<double> wrong = {2.0, 1.0, 3.0};
  CHECK_THROWS_AS(fan_out(wrong, widths, 0.0, 100.0), bismar::InternalError);
  CHECK_THROWS_AS(fan_out(centres, std::vector<double>{1.0}, 0.0, 100.0), bismar::InternalError);
}
