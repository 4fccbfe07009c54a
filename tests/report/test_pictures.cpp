// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/report/pictures.hpp>
#include <bismar/report/svg.hpp>

#include <algorithm>
#include <charconv>
#include <cmath>
#include <limits>
#include <optional>
#include <set>
#include <string>
#include <utility>
#include <vector>

#include "report/synthetic.hpp"
#include "report/xml_check.hpp"
#include "support/catch.hpp"

using namespace bismar;

namespace {

double number_of(const std::optional<std::string>& text) {
  double value = 0.0;
  if (text) std::from_chars(text->data(), text->data() + text->size(), value);
  return value;
}

// The vertical shift of all groups around an element.
double shift_of(const xml::Document& document, const xml::Element& element) {
  double shift = 0.0;
  for (const std::size_t p : element.parents) {
    const auto transform = document.elements[p].attribute("transform");
    if (!transform || transform->rfind("translate(", 0) != 0) continue;
    const std::size_t blank = transform->find(' ');
    shift += number_of(transform->substr(blank + 1));
  }
  return shift;
}

struct Drawn {
  report::Box box;
  std::string text;
};

// Boxes of all texts, by the wide estimate of their widths; cap height and descenders are about
// 0.75 and 0.2 of the size.
std::vector<Drawn> texts_of(const xml::Document& document) {
  std::vector<Drawn> out;
  for (const xml::Element& e : document.elements) {
    if (e.name != "text") continue;
    const double size = number_of(e.attribute("font-size"));
    const bool bold = e.attribute("font-weight").has_value();
    const double width = report::text_width(e.text, size, bold);
    double x = number_of(e.attribute("x"));
    const double y = number_of(e.attribute("y")) + shift_of(document, e);
    const std::string anchor = e.attribute("text-anchor").value_or("start");
    if (anchor == "middle") x -= 0.5 * width;
    if (anchor == "end") x -= width;
    report::Box box{x, y - 0.75 * size, width, 0.95 * size};
    if (e.attribute("transform")) {  // turned upright about its anchor
      const double ax = number_of(e.attribute("x"));
      const double left = anchor == "middle" ? -0.5 * width : anchor == "end" ? -width : 0.0;
      box = {ax - 0.75 * size, y - left - width, 0.95 * size, width};
    }
    out.push_back({box, e.text});
  }
  return out;
}

void check_picture(const std::string& svg) {
  const xml::Document document = xml::parse(svg);
  REQUIRE(document.fault.empty());
  REQUIRE(document.elements.front().name == "svg");
  const double width = number_of(document.elements.front().attribute("width"));
  const double height = number_of(document.elements.front().attribute("height"));
  const std::vector<Drawn> texts = texts_of(document);
  REQUIRE_FALSE(texts.empty());
  for (std::size_t i = 0; i < texts.size(); ++i) {
    INFO(texts[i].text);
    // Small print is wrapped by the wide estimate too, so everything must lie on the page.
    CHECK(texts[i].box.x >= 0.0);
    CHECK(texts[i].box.right() <= width);
    CHECK(texts[i].box.y >= 0.0);
    CHECK(texts[i].box.bottom() <= height);
    for (std::size_t j = i + 1; j < texts.size(); ++j) {
      INFO(texts[j].text);
      CHECK_FALSE(texts[i].box.overlaps(texts[j].box, -0.6));
    }
  }
  // Discs and diamonds of the front are never written over.
  for (const xml::Element& e : document.elements) {
    if (e.name != "circle" || number_of(e.attribute("r")) < 5.0) continue;
    const double cx = number_of(e.attribute("cx"));
    const double cy = number_of(e.attribute("cy")) + shift_of(document, e);
    for (const Drawn& t : texts) {
      INFO(t.text << " over a disc at " << cx << " " << cy);
      CHECK_FALSE(t.box.overlaps({cx - 4.0, cy - 4.0, 8.0, 8.0}));
    }
  }
}

bool shows(const std::string& svg, const std::string& text) {
  for (const xml::Element& e : xml::parse(svg).elements) {
    if (e.name == "text" && e.text.find(text) != std::string::npos) return true;
  }
  return false;
}

// Texts as one string, so that wrapped sentences can be searched.
std::string words(const std::string& svg) {
  std::string all;
  for (const xml::Element& e : xml::parse(svg).elements) {
    if (e.name == "text") all += e.text + " ";
  }
  return all;
}

}  // namespace

TEST_CASE("pictures of fronts are well-formed and their texts never overlap") {
  for (const std::size_t n : {1U, 2U, 3U, 5U, 8U, 12U, 20U, 30U, 60U}) {
    for (const double ratio : {1.05, 1.25, 1.9, 4.0}) {
      const synthetic::Study study = synthetic::convex(n, ratio);
      INFO(n << " stretches, ratio " << ratio);
      REQUIRE(study.ruler.stretches.size() == n);
      check_picture(front_picture_svg(study.result, study.ruler));
    }
  }
}

TEST_CASE("the lever's picture shows choices, caps, near designs and what lies outside") {
  const synthetic::Study study = synthetic::lever();
  PictureOptions options;
  options.mass_cap = 1.0;
  options.cost_cap = 20.0;
  const std::string svg = front_picture_svg(study.result, study.ruler, options);
  check_picture(svg);
  for (const char* text : {"EN AW-6082, T6",
                           "ellipse 29.3 x 23.4 mm",
                           "mass cap 1 kg",
                           "cost cap 20 EUR",
                           "4.26",
                           "55.1",
                           "128",
                           "within 5 % of the front",
                           "on the front, best for none"}) {
    INFO(text);
    CHECK(shows(svg, text));
  }
  CHECK(words(svg).find("feasible designs lie outside the view") != std::string::npos);
  CHECK(words(svg).find("Caution: preliminary sizing") != std::string::npos);

  options.cost_cap = 500.0;
  const std::string far = tradeoff_svg(study.result, study.ruler, options);
  check_picture(far);
  CHECK(words(far).find("The cost cap 500 EUR lies outside the view.") != std::string::npos);
}

TEST_CASE("the same input gives the same picture") {
  const synthetic::Study study = synthetic::lever();
  CHECK(front_picture_svg(study.result, study.ruler) ==
        front_picture_svg(study.result, study.ruler));
  CHECK(ruler_svg(study.result, study.ruler) == ruler_svg(study.result, study.ruler));
  CHECK(utilisation_svg(study.result.designs[0]) == utilisation_svg(study.result.designs[0]));
}

TEST_CASE("long names and names with markup stay apart and harmless") {
  synthetic::Study study = synthetic::convex(8);
  for (std::size_t i = 0; i < study.result.designs.size(); ++i) {
    Design& d = study.result.designs[i];
    d.material_name =
        "<b>alloy</b> & \"friends\" of an exceedingly long-winded designation, solution "
        "treated, quenched and aged, number " +
        std::to_string(i);
  }
  study.ruler = synthetic::RulerBuilder(study.result).build(8);
  check_picture(front_picture_svg(study.result, study.ruler));
  check_picture(tradeoff_svg(study.result, study.ruler));
  check_picture(ruler_svg(study.result, study.ruler));
}

TEST_CASE("ties share one label") {
  synthetic::Study study = synthetic::convex(4);
  Design twin = study.result.designs[1];
  twin.material_name = twin.material = "twin alloy";
  study.result.designs.insert(study.result.designs.begin() + 2, twin);
  study = synthetic::finish(study.result, 5);
  const std::string svg = front_picture_svg(study.result, study.ruler);
  check_picture(svg);
  CHECK(shows(svg, "(+1 alike)"));
}

TEST_CASE("a front of many unsupported designs keeps its labels apart") {
  synthetic::Study study;
  for (int i = 0; i < 40; ++i) {
    // On the rising side of a concave arc only the two ends are ever best.
    const double t = i / 39.0;
    study.result.designs.push_back(synthetic::design(
        "metal " + std::to_string(i), "round bar", 1.0 + t, 1.0 + std::sqrt(1.0 - t * t)));
  }
  study = synthetic::finish(study.result, 40);
  REQUIRE(study.ruler.unsupported.size() == 38);
  const std::string svg = front_picture_svg(study.result, study.ruler);
  check_picture(svg);
  CHECK(words(svg).find("and 34 more") != std::string::npos);
}

TEST_CASE("a cloud of a hundred thousand designs stays a small file") {
  synthetic::Study study = synthetic::lever();
  const auto base = study.result.others;
  for (int k = 0; k < 250; ++k) {
    for (FeasiblePoint p : base) {
      p.mass += 1e-5 * k;
      study.result.others.push_back(p);
    }
  }
  REQUIRE(study.result.others.size() > 100000);
  CHECK(tradeoff_svg(study.result, study.ruler).size() < 200000);
}

TEST_CASE("without a front the pictures say so") {
  const synthetic::Study study = synthetic::nothing_feasible();
  for (const std::string& svg : {tradeoff_svg(study.result, study.ruler),
                                 ruler_svg(study.result, study.ruler),
                                 front_picture_svg(study.result, study.ruler)}) {
    check_picture(svg);
    CHECK(words(svg).find("No candidate meets every limit; 212 fail first by deflection.") !=
          std::string::npos);
    CHECK(shows(svg, "strut with <too> tight & small limits"));
  }
}

TEST_CASE("a front without a ruler still has its picture") {
  const synthetic::Study study = synthetic::lever();
  check_picture(front_picture_svg(study.result, {}));
  CHECK(shows(ruler_svg(study.result, {}), "The exchange ruler has no stretches."));
}

TEST_CASE("the ruler's scale can be set, and says what lies outside") {
  const synthetic::Study study = synthetic::lever();
  PictureOptions options;
  options.alpha_from = 5.0;
  options.alpha_to = 100.0;
  const std::string svg = ruler_svg(study.result, study.ruler, options);
  check_picture(svg);
  CHECK(words(svg).find("2 of 4 stretches lie outside the scale shown.") != std::string::npos);
  options.alpha_to = 1.0;  // upside down
  check_picture(ruler_svg(study.result, study.ruler, options));
}

TEST_CASE("every letter in the ruler's key stands in the picture, and every letter there is told") {
  const synthetic::Study study = synthetic::lever();
  // The whole scale, and windows that leave stretches and runners-up outside.
  const std::vector<std::pair<double, double>> windows = {
      {0.5, 500.0}, {5.0, 100.0}, {60.0, 100.0}, {200.0, 400.0}};
  for (const auto& [low, high] : windows) {
    PictureOptions options;
    options.alpha_from = low;
    options.alpha_to = high;
    const std::string svg = ruler_svg(study.result, study.ruler, options);
    INFO(low << " to " << high);
    // Names follow their letters; what comes after the title of the axis is the key.
    const auto is_letter = [](const std::string& text) {
      return text.size() == 1 && text[0] >= 'A' && text[0] <= 'Z';
    };
    const auto is_name = [&](const std::string& text) {
      return std::any_of(
          study.result.designs.begin(), study.result.designs.end(), [&](const Design& d) {
            return text.starts_with(d.material_name.substr(0, d.material_name.find(' ')));
          });
    };
    std::set<std::string> shown;
    std::set<std::string> told;
    std::set<std::string> in_key;
    bool key = false;
    const std::vector<Drawn> texts = texts_of(xml::parse(svg));
    for (std::size_t i = 0; i + 1 < texts.size(); ++i) {
      key = key || texts[i].text.starts_with("alpha, the worth");
      if (!is_letter(texts[i].text)) continue;
      (key ? in_key : shown).insert(texts[i].text);
      if (is_name(texts[i + 1].text)) told.insert(texts[i].text);
    }
    CHECK(shown.size() >= 2);
    CHECK(shown == told);
    CHECK(std::includes(shown.begin(), shown.end(), in_key.begin(), in_key.end()));
  }
}

TEST_CASE("a section is drawn to scale with its load and dimensions") {
  SectionProperties ellipse;
  ellipse.family = SectionFamily::solid_ellipse;
  ellipse.height = 0.040;
  ellipse.width = 0.032;
  SectionPictureOptions options;
  options.load_z = "655 N";
  options.load_along_y = true;
  options.load_y = "90 N";
  options.title = "lever & handle";
  const std::string svg = section_svg(ellipse, options);
  check_picture(svg);
  for (const char* text : {"40 mm", "32 mm", "655 N", "90 N", "y", "z", "lever & handle"}) {
    CHECK(shows(svg, text));
  }
  for (const xml::Element& e : xml::parse(svg).elements) {
    if (e.name != "ellipse") continue;
    CHECK(number_of(e.attribute("ry")) / number_of(e.attribute("rx")) ==
          Approx(1.25).epsilon(1e-3));
  }
}

TEST_CASE("every family of section has its drawing") {
  SectionProperties s;
  s.height = 0.100;
  s.width = 0.060;
  s.wall = 0.005;
  s.area = 1.3e-3;
  s.perimeter = 0.303;
  s.inner_perimeter = 0.271;
  for (const auto family : {SectionFamily::solid_round,
                            SectionFamily::solid_square,
                            SectionFamily::solid_rectangle,
                            SectionFamily::solid_ellipse,
                            SectionFamily::round_tube,
                            SectionFamily::rectangular_tube,
                            SectionFamily::i_section,
                            SectionFamily::channel}) {
    s.family = family;
    check_picture(section_svg(s));
  }
  s.family = SectionFamily::i_section;
  CHECK(words(section_svg(s)).find("root radii left out") != std::string::npos);
}

namespace {

// A channel of three 10 mm walls, 100 x 60 mm, open upwards, with a square hole in its bottom. In
// millimetres and away from the origin: the drawing scales it.
const std::vector<SectionPoint> trough = {
    {5, 7}, {65, 7}, {65, 107}, {55, 107}, {55, 17}, {15, 17}, {15, 107}, {5, 107}};
const std::vector<std::vector<SectionPoint>> trough_holes = {
    {{33, 10}, {37, 10}, {37, 14}, {33, 14}}};

SectionProperties trough_section() {
  SectionProperties s;
  s.family = SectionFamily::polygon;
  s.height = 0.100;
  s.width = 0.060;
  s.fibres = {{-0.030, -0.036}, {0.030, -0.036}, {0.030, 0.064}, {-0.030, 0.064}};
  return s;
}

}  // namespace

TEST_CASE("a polygon is drawn with its recesses and holes where its outline is given") {
  const SectionProperties s = trough_section();
  const std::string hull = section_svg(s);
  check_picture(hull);
  CHECK(words(hull).find("recesses and holes left out") != std::string::npos);
  CHECK(hull.find("<path") == std::string::npos);

  const std::string svg = section_svg(s, trough, trough_holes);
  check_picture(svg);
  CHECK(words(svg).find("left out") == std::string::npos);
  CHECK(shows(svg, "100 mm"));
  std::size_t paths = 0;
  for (const xml::Element& e : xml::parse(svg).elements) {
    if (e.name != "path") continue;
    ++paths;
    CHECK(e.attribute("fill-rule") == std::optional<std::string>("evenodd"));
    const std::string d = e.attribute("d").value_or("");
    CHECK(std::count(d.begin(), d.end(), 'M') == 2);   // outline and hole
    CHECK(std::count(d.begin(), d.end(), 'L') == 10);  // 8 and 4 corners
    // 210 px are 100 mm: the middle of the page is at x = 220 + 8, so the outline begins 30 mm =
    // 63 px left of it and is 126 px wide, its recess 84 px.
    CHECK(d.starts_with("M165 "));
    CHECK(d.find("L291 ") != std::string::npos);
    CHECK(d.find("L270 ") != std::string::npos);
    CHECK(d.find("L186 ") != std::string::npos);
    // The hole begins 28 mm = 58.8 px from the left edge.
    CHECK(d.find("M223.8 ") != std::string::npos);
  }
  CHECK(paths == 1);
}

TEST_CASE("an outline that is not the section's is refused") {
  const SectionProperties s = trough_section();
  const auto fault_of = [&](const std::vector<SectionPoint>& outline,
                            const std::vector<std::vector<SectionPoint>>& holes) {
    try {
      static_cast<void>(section_svg(s, outline, holes));
    } catch (const Error& error) {
      REQUIRE(error.faults().size() == 1);
      return error.faults()[0];
    }
    FAIL("no error");
    return Fault{};
  };
  CHECK(fault_of({{0, 0}, {1, 0}}, {}).code == Code::missing);
  const Fault hole = fault_of(trough, {{{33, 10}}});
  CHECK(hole.code == Code::missing);
  CHECK(hole.where == "holes/0");
  const double nan = std::numeric_limits<double>::quiet_NaN();
  CHECK(fault_of({{0, 0}, {nan, 0}, {1, 1}}, {}).code == Code::not_finite);
  CHECK(fault_of({{0, 0}, {1, 0}, {2, 0}}, {}).code == Code::conflict);          // no height
  CHECK(fault_of({{0, 0}, {1, 0}, {1, 1}, {0, 1}}, {}).code == Code::conflict);  // a square
  SectionProperties flat = s;
  flat.height = 0.0;
  CHECK_THROWS_AS(section_svg(flat, trough, trough_holes), Error);
}

TEST_CASE("a section without dimensions is refused, every fault at once") {
  SectionProperties s;
  s.family = SectionFamily::round_tube;
  s.width = -1.0;
  try {
    static_cast<void>(section_svg(s));
    FAIL("no error");
  } catch (const Error& error) {
    REQUIRE(error.faults().size() == 3);
    CHECK(error.faults()[0].code == Code::out_of_range);
    CHECK(error.faults()[0].where == "height");
    CHECK(error.faults()[1].where == "width");
    CHECK(error.faults()[2].where == "wall");
  }
}

TEST_CASE("the utilisation strip shows every limit, also beyond 1 and without bound") {
  Design d = synthetic::design("steel", "20 x 16 mm", 1.0, 2.0);
  d.utilisations.push_back({"flexural buckling with a very long name of its load case",
                            "winding the gate up in a gale",
                            1.18,
                            1.5});
  d.utilisations.push_back({"twist", "winding", 7.5, 1.0});
  d.utilisations.push_back(
      {"slenderness", "winding", std::numeric_limits<double>::infinity(), 1.0});
  const std::string svg = utilisation_svg(d);
  check_picture(svg);
  for (const char* text : {"yield, winding, factor 1.5", "0.999", "1.180", "7.500", "inf"})
    CHECK(shows(svg, text));
  d.utilisations.clear();
  check_picture(utilisation_svg(d));
}
