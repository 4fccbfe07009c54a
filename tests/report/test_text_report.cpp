// SPDX-License-Identifier: MIT
#include <bismar/catalogue/csv.hpp>
#include <bismar/report/table.hpp>
#include <bismar/report/text_report.hpp>

#include <algorithm>
#include <charconv>
#include <limits>
#include <string>

#include "report/synthetic.hpp"
#include "support/catch.hpp"

using namespace bismar;

namespace {

bool has(const std::string& text, const std::string& part) {
  return text.find(part) != std::string::npos;
}

// One line, so that wrapped sentences can be searched.
std::string unwrapped(const std::string& text) {
  std::string out;
  for (const char c : text) {
    if (c != '\n' && c != ' ') {
      out += c;
    } else if (!out.empty() && out.back() != ' ') {
      out += ' ';
    }
  }
  return out;
}

std::size_t widest(const std::string& text) {
  std::size_t most = 0;
  for (std::size_t at = 0; at < text.size();) {
    const std::size_t end = text.find('\n', at);
    most = std::max(most, report::display_width(text.substr(at, end - at)));
    at = end + 1;
  }
  return most;
}

double read(std::string_view cell) {
  double value = -1.0;
  std::from_chars(cell.data(), cell.data() + cell.size(), value);
  return value;
}

std::size_t column(const CsvDocument& csv, std::string_view name) {
  for (std::size_t c = 0; c < csv.columns(); ++c) {
    if (csv.header(c) == name) return c;
  }
  FAIL("no column " << name);
  return 0;
}

}  // namespace

TEST_CASE(
    "the text of a front tells headline, funnel, front, ruler, marks and caution in this order") {
  const synthetic::Study study = synthetic::lever();
  const std::string text = front_text(study.result, &study.ruler);
  std::size_t at = 0;
  for (const char* part : {"crank lever 300 (invented): 6 designs on the mass-cost front",
                           "Candidates: 31 518 considered = 31 200 cannot exist + 41 undecided",
                           "\nFront\n",
                           "EN AW-6082, T6",
                           "Factors on the loads, by limit: yield 1.5; deflection 1.",
                           "\nExchange ruler",
                           "up to 4.26",
                           "from 128",
                           "\nMarks",
                           "[b] typical strength divided by 1.25",
                           "\nNotes\n",
                           "PA 66, 30 % glass fibre: elongation",
                           "Caution: preliminary sizing."}) {
    INFO(part);
    const std::size_t found = text.find(part, at);
    REQUIRE(found != std::string::npos);
    at = found;
  }
  CHECK(widest(text) <= 100);
  CHECK(has(text, "0.437"));
  CHECK(has(text, "6.34..10.30"));
  CHECK(has(unwrapped(text), "next size 30.0"));
  CHECK_FALSE(has(text, "\x1b["));
  CHECK(text == front_text(study.result, &study.ruler));
}

TEST_CASE("the ruler as a table reads exactly so") {
  const synthetic::Study study = synthetic::convex(3);
  const std::string text = front_text(study.result, &study.ruler);
  const std::size_t from = text.find("\nExchange ruler");
  REQUIRE(from != std::string::npos);
  // By hand: masses 2, 1.6, 1.28 kg; costs 3, 3 + 0.4 x 0.5 = 3.2, 3.2 + 0.32 x 0.8 = 3.456 EUR, so
  // the choice changes at 0.5 and 0.8 EUR/kg. Lightest and heaviest come out equal at 0.456 / 0.72
  // = 0.633 EUR/kg, 0.0533 EUR behind the middle one.
  CHECK(text.substr(from, text.find("\nCaution") - from) ==
        "\n"
        "Exchange ruler: least cost + alpha x mass, alpha = worth of a saved kilogram\n"
        "alpha                                               mass   cost\n"
        "[EUR/kg]        least cost + alpha x mass           [kg]  [EUR]  runner-up, and how far "
        "behind [EUR]\n"
        "--------------  ----------------------------------  ----  -----  "
        "-----------------------------------\n"
        "up to 0.500     alloy 1, quenched and tempered      2.00   3.00  alloy 2, quenched and "
        "tempered,\n"
        "                round bar 20, hot-forging +                      0.00 to 0.20\n"
        "                quench-temper\n"
        "0.500 to 0.800  alloy 2, quenched and tempered      1.60   3.20  0.500 to 0.633: alloy 1, "
        "quenched\n"
        "                round bar 21, hot-forging +                      and tempered, 0.00 to "
        "0.053\n"
        "                quench-temper                                    0.633 to 0.800: alloy 3, "
        "quenched\n"
        "                                                                 and tempered, 0.00 to "
        "0.053\n"
        "from 0.800      alloy 3, quenched and tempered      1.28   3.46  alloy 2, quenched and "
        "tempered,\n"
        "                round bar 22, hot-forging +                      from 0.00 upwards\n"
        "                quench-temper\n");
}

TEST_CASE("text keeps to narrower widths") {
  const synthetic::Study study = synthetic::lever();
  for (const std::size_t width : {120U, 100U, 90U}) {
    TextOptions options;
    options.width = width;
    CHECK(widest(front_text(study.result, &study.ruler, options)) <= width);
  }
}

TEST_CASE("colour adds escape sequences and changes nothing else") {
  const synthetic::Study study = synthetic::lever();
  TextOptions options;
  const std::string plain = front_text(study.result, &study.ruler, options);
  options.colour = true;
  std::string coloured = front_text(study.result, &study.ruler, options);
  CHECK(coloured != plain);
  for (const char* code : {"\x1b[1m", "\x1b[0m"}) {
    for (std::size_t at = coloured.find(code); at != std::string::npos; at = coloured.find(code)) {
      coloured.erase(at, 4);
    }
  }
  CHECK(coloured == plain);
}

TEST_CASE("all shows every kept design and every reason, unfolded") {
  const synthetic::Study study = synthetic::lever();
  TextOptions options;
  options.all = true;
  const std::string text = front_text(study.result, &study.ruler, options);
  CHECK(has(text, "EN AW-6061, T6"));
  CHECK(has(text, "the route does not leave this shape"));
  CHECK_FALSE(has(text, "alike)"));
  options.all = false;
  options.reasons = true;
  const std::string folded = front_text(study.result, &study.ruler, options);
  CHECK(has(folded, "the route does not leave this shape"));
  CHECK(has(folded, "(+1 alike)"));
  CHECK(has(unwrapped(folded),
            "2 near designs lie within 5 % of the front, all of them counted as alike above."));
}

TEST_CASE("the fold puts close designs under one, chosen ones first, and loses none") {
  Result r;
  const auto add = [&](double mass, double cost) {
    r.designs.push_back(synthetic::design("m" + std::to_string(r.designs.size()), "", mass, cost));
  };
  add(1.000, 10.00);
  add(1.010, 9.95);  // alike 0 and 2
  add(1.019, 9.90);  // chosen: represents 0 and 1
  add(1.500, 5.00);
  r.front_count = 4;
  add(1.510, 5.05);  // near, alike 3
  add(3.000, 5.00);  // near, alone: never a representative
  ExchangeRuler ruler;
  ruler.stretches.resize(1);
  ruler.stretches[0].design = 2;
  const auto folded = fold_front(r, &ruler, 0.02);
  REQUIRE(folded.size() == 2);
  CHECK(folded[0].design == 2);
  CHECK(folded[0].alike == std::vector<std::size_t>{0, 1});
  CHECK(folded[1].design == 3);
  CHECK(folded[1].alike == std::vector<std::size_t>{4});
  CHECK(fold_front(r, nullptr, 0.02)[0].design == 0);
  CHECK(fold_front(r, nullptr, 0.0).size() == 4);
  CHECK(fold_front({}, nullptr, 0.02).empty());
}

TEST_CASE("an empty front says why in words") {
  const synthetic::Study study = synthetic::nothing_feasible();
  const std::string text = front_text(study.result, &study.ruler);
  CHECK(has(text, "no candidate meets every limit"));
  CHECK(has(text, "212  deflection"));
  CHECK(has(text, "Caution"));
  CHECK_FALSE(has(text, "Exchange ruler"));
}

TEST_CASE("a single design is told as such") {
  const synthetic::Study study = synthetic::convex(1);
  const std::string text = front_text(study.result, &study.ruler);
  CHECK(has(text, "one design is both lightest and cheapest"));
  CHECK(has(text, "any"));
  CHECK(has(text, "none"));
}

TEST_CASE("why tells standing, utilisations and the account of the cost") {
  Answer answer;
  answer.headline = "EN AW-6082 is on the front.";
  answer.lines = {"best from 4.26 to 55.1 EUR/kg"};
  answer.design = synthetic::lever().result.designs[1];
  const std::string text = why_text(answer, "EUR");
  for (const char* part : {"EN AW-6082 is on the front.",
                           "- best from 4.26",
                           "deflection",
                           "governs",
                           "tooling",
                           "2000 EUR over 2000 parts",
                           "total",
                           "9.85",
                           "7.88 to 12.80",
                           "typical strength divided",
                           "Caution"}) {
    INFO(part);
    CHECK(has(text, part));
  }
  answer.design.reset();
  CHECK_FALSE(has(why_text(answer, "EUR"), "total"));
}

TEST_CASE("check reads the job back in the units of the shop") {
  Part part;
  part.name = "crank lever 300";
  part.quantity = 2000;
  part.body.length = 0.300;
  Shape shape;
  shape.family = SectionFamily::solid_ellipse;
  shape.height_to_width = 1.25;
  shape.height_min = 0.008;
  shape.height_max = 0.040;
  part.body.shapes = {shape};
  LoadCase load_case;
  load_case.name = "winding";
  Load load;
  load.value = 655.0;
  load.at = 0.3;
  load_case.loads = {load};
  load_case.factors["yield"] = 1.5;
  part.body.load_cases = {load_case};
  part.limits.deflection = 0.010;
  part.limits.mass = 0.5;
  part.limits.cost = 20.0;
  part.limits.routes = {"hot-forging"};
  part.limits.temperature = 333.15;
  const std::string text = check_text(part, {});
  for (const char* words : {"crank lever 300: the job is valid",
                            "300 mm",
                            "height/width 1.25",
                            "8.00 to 40.0 mm",
                            "force 655 N along z at 300 mm",
                            "factor 1.5 on yield",
                            "10.0 mm",
                            "0.500 kg",
                            "20.00 EUR",
                            "hot-forging",
                            "60.0 degC",
                            "Caution"}) {
    INFO(words);
    CHECK(has(text, words));
  }
}

TEST_CASE("check names sizes, supports, angles and what fatigue reads as the trade does") {
  Part part;
  part.quantity = 1;
  part.body.length = 3.6;
  part.body.shapes = {round(),
                      square(),
                      hexagon(),
                      round_tube({.wall_to_height = 0.1}),
                      polygon_shape({{0, 0}, {4, 0}, {4, 4}, {0, 4}}, {{{1, 1}, {2, 1}, {1, 2}}})};
  part.body.load_cases = {fixed_pinned({force(-9000.0, 1.6)}, "raising"),
                          pinned_pinned({force(-1000.0, 3.6)}, "step"),
                          pinned_pinned({force(-1000.0, 3.6)}, "whole")};
  part.body.load_cases[0].second_support = 3.2;
  part.body.load_cases[1].second_support = 3.2;
  part.body.load_cases[2].second_support = 3.6;  // the end: no overhang
  // 0.5 degrees are pi / 360 = 0.0087266 rad.
  part.limits.rotation = 0.0087266462599716;
  part.limits.twist = 0.017453292519943;
  const std::string text = unwrapped(check_text(part, {}));
  for (const char* words : {"solid round, diameter 4.00 to 500 mm",
                            "solid square, side 4.00 to 500 mm",
                            "solid hexagon, width across flats 4.00 to 500 mm",
                            "round tube, wall/diameter 0.1, diameter 4.00 to 500 mm",
                            "polygon of 4 corners with 1 hole, height 4.00 to 500 mm",
                            "load case raising fixed at x = 0, pinned at 3200 mm, overhang beyond",
                            "load case step pinned at x = 0 and at 3200 mm, overhang beyond",
                            "load case whole pinned at both ends force",
                            "0.500 deg (0.00873 rad)",
                            "1.00 deg (0.0175 rad)",
                            "quantity 1 part "}) {
    INFO(words);
    CHECK(has(text, words));
  }
  CHECK_FALSE(has(text, "second support"));
  // Static and by default: nothing of fatigue.
  for (const char* words : {"surface", "reliability", "mean stress"}) CHECK_FALSE(has(text, words));

  Part rough = part;
  rough.body.details.surface = SurfaceFinish::hot_rolled;
  CHECK(has(unwrapped(check_text(rough, {})), "surface hot rolled"));
  CHECK_FALSE(has(check_text(rough, {}), "Goodman"));

  part.body.load_cases[1].fatigue = FatigueLoading{};
  const std::string swinging = unwrapped(check_text(part, {}));
  CHECK(has(swinging, "surface machined"));
  CHECK(has(swinging, "reliability in fatigue 0.99"));
  CHECK(has(swinging, "mean stress in fatigue Goodman"));
}

TEST_CASE("check names every free size of a shape with its range") {
  Part part;
  part.body.length = 1.0;
  part.body.shapes = {rectangle({.height_to_width = Ratio(0.5, 2.0),
                                 .height_min = 8e-3,
                                 .height_max = 40e-3,
                                 .sizes = Sizes::multiples_of(1e-3)}),
                      round_tube({.wall_to_height = Ratio(0.02, 0.2)}),
                      elliptical_tube({.wall_to_height = 0.06}),
                      i_section({.height_to_width = Ratio(1.0, 2.0),
                                 .flange_to_height = 0.08,
                                 .root_radius_to_height = 0.02})};
  const std::string text = unwrapped(check_text(part, {}));
  for (const char* words :
       {"solid rectangle, 2 free sizes: height 8.00 to 40.0 mm, width 0.500 to 2.00 times the "
        "height, each in steps of 1.00 mm",
        "round tube, 2 free sizes: diameter 4.00 to 500 mm, wall 0.0200 to 0.200 times the "
        "diameter, each any size",
        // Left out: free in the default range of part.hpp, h/b = 0.2..5.
        "elliptical tube, wall/height 0.06, 2 free sizes: height 4.00 to 500 mm, width 0.200 to "
        "5.00 times the height",
        "I section, flange/height 0.08, root radius/height 0.02, 3 free sizes: height 4.00 to 500 "
        "mm, width 0.500 to 1.00 times the height, web 0.00500 to 0.100 times the height"}) {
    INFO(words);
    CHECK(has(text, words));
  }
}

TEST_CASE("the report states what the search of several free sizes promises") {
  synthetic::Study study = synthetic::lever();
  Result& result = study.result;
  const auto text = [&] { return unwrapped(front_text(result, &study.ruler)); };
  CHECK_FALSE(has(text(), "margin"));
  result.delta = 1e-6;
  result.telemetry.boxes = 12345;
  result.epsilon_reached = 1e-3;
  CHECK(has(text(),
            "Front complete within 0.10 % for every design with a margin of 1e-6; boxes examined: "
            "12 345."));
  result.epsilon_reached = 0.000331;  // never stated tighter than it is
  CHECK(has(text(), "Front complete within 0.034 % for"));
  result.epsilon_reached = 0.0996;
  CHECK(has(text(), "Front complete within 10 % for"));
  result.epsilon_reached = 0.0;
  CHECK(has(text(), "Front complete for every design with a margin of 1e-6;"));
  result.epsilon_reached = std::numeric_limits<double>::infinity();
  CHECK(has(text(), "Front not proven complete"));
  CHECK_FALSE(has(text(), "Front complete"));
  result.epsilon_reached = 1e-3;
  result.exact = false;  // stopped, or a design left out
  CHECK(has(text(), "Front not proven complete"));

  Result empty = synthetic::nothing_feasible().result;
  empty.delta = 1e-5;
  CHECK(has(unwrapped(front_text(empty, nullptr)),
            "Proven: no decided candidate has a design with a margin of 1e-5"));
  empty.exact = false;
  CHECK_FALSE(has(unwrapped(front_text(empty, nullptr)), "Proven"));
}

TEST_CASE("the next size of a design with several free sizes says what becomes of the others") {
  synthetic::Study study = synthetic::lever();
  CHECK(has(unwrapped(front_text(study.result, nullptr)), "next size 30.0 mm: 0.458 kg"));
  study.result.designs[2].free_sizes[0] = 0.0234;
  CHECK(has(unwrapped(front_text(study.result, nullptr, {.width = 200})),
            "next size 30.0 mm, same proportions: 0.458 kg"));
}

TEST_CASE("the front as CSV reads back to the same numbers and texts") {
  synthetic::Study study = synthetic::lever();
  study.result.designs[0].material_name = "alloy \"X\", half; hard";
  study.result.designs[0].mass = 1.0 / 3.0;
  for (const char delimiter : {',', ';'}) {
    CsvOptions options;
    options.delimiter = delimiter;
    FaultList faults;
    const CsvDocument csv =
        CsvDocument::parse(front_csv(study.result, options), "front.csv", delimiter, faults);
    REQUIRE(faults.empty());
    REQUIRE(csv.rows() == study.result.designs.size());
    CHECK(csv.cell(0, column(csv, "material name")) == "alloy \"X\", half; hard");
    for (std::size_t d = 0; d < csv.rows(); ++d) {
      const Design& design = study.result.designs[d];
      CHECK(read(csv.cell(d, column(csv, "mass [kg]"))) == design.mass);
      CHECK(read(csv.cell(d, column(csv, "cost [EUR]"))) == design.cost);
      CHECK(read(csv.cell(d, column(csv, "u deflection / winding"))) ==
            design.utilisations[1].value);
      CHECK(csv.cell(d, column(csv, "height [mm]")) == "24.3");
      CHECK(csv.cell(d, column(csv, "standing")) ==
            (d < study.result.front_count ? "front" : "near"));
    }
  }
  CsvOptions front_only;
  front_only.near = false;
  FaultList faults;
  CHECK(CsvDocument::parse(front_csv(study.result, front_only), "f", ',', faults).rows() ==
        study.result.front_count);
}

TEST_CASE("the ruler as CSV has a row for each runner-up sub-stretch") {
  const synthetic::Study study = synthetic::lever();
  FaultList faults;
  const CsvDocument csv =
      CsvDocument::parse(ruler_csv(study.result, study.ruler), "ruler.csv", ',', faults);
  REQUIRE(faults.empty());
  std::size_t row = 0;
  for (const NamedStretch& stretch : study.ruler.stretches) {
    for (const NamedStretch::RunnerUp& r : stretch.runners_up) {
      CHECK(read(csv.cell(row, column(csv, "from [EUR/kg]"))) == stretch.from);
      CHECK(csv.cell(row, column(csv, "choice")) == stretch.choice);
      CHECK(read(csv.cell(row, column(csv, "regret from [EUR]"))) == r.regret_from);
      CHECK(csv.cell(row, column(csv, "runner-up to [EUR/kg]")).empty() == !r.to.has_value());
      ++row;
    }
  }
  CHECK(row == csv.rows());
  const synthetic::Study single = synthetic::convex(1);
  const CsvDocument one =
      CsvDocument::parse(ruler_csv(single.result, single.ruler), "ruler.csv", ',', faults);
  REQUIRE(one.rows() == 1);
  CHECK(one.cell(0, column(one, "runner-up")).empty());
}

TEST_CASE("the ruler calls materials by their names, not by their ids") {
  synthetic::Study study = synthetic::convex(2);
  for (Design& d : study.result.designs) d.material = "id-of-" + d.material_name.substr(0, 7);
  for (NamedStretch& s : study.ruler.stretches) {
    s.choice = study.result.designs[s.design].material;
    for (NamedStretch::RunnerUp& r : s.runners_up) r.choice = "id-of-" + r.choice.substr(0, 7);
  }
  const std::string text = front_text(study.result, &study.ruler);
  CHECK_FALSE(has(text, "id-of-"));
  CHECK(has(text, "up to 0.500  alloy 1, quenched and tempered"));
}
