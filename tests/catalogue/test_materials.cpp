// SPDX-License-Identifier: MIT
#include <bismar/catalogue/materials.hpp>
#include <bismar/error.hpp>
#include <bismar/quantity/currency.hpp>

#include <algorithm>
#include <array>
#include <limits>
#include <random>
#include <string>
#include <vector>

#include "support/catch.hpp"

using bismar::Basis;
using bismar::Code;
using bismar::Evidence;
using bismar::MaterialInfo;
using bismar::MaterialTable;
using bismar::MaterialTableBuilder;
using bismar::Property;
using bismar::Range;
using bismar::Rating;
using bismar::StructuralUse;

namespace {

using Texts = std::vector<std::string>;

Texts faults_of(const std::string& text, const bismar::TableFormat& format = {}) {
  try {
    static_cast<void>(bismar::read_materials_text(text, "m.csv", format));
  } catch (const bismar::Error& error) {
    Texts texts;
    for (const bismar::Fault& fault : error.faults()) texts.push_back(fault.text());
    return texts;
  }
  return {};
}

std::vector<bismar::Fault> build_faults(MaterialTableBuilder& builder) {
  try {
    static_cast<void>(builder.build());
  } catch (const bismar::Error& error) {
    return {error.faults().begin(), error.faults().end()};
  }
  return {};
}

MaterialInfo steel(const std::string& id) {
  MaterialInfo info;
  info.id = id;
  info.name = id;
  info.material_class = "steel";
  return info;
}

MaterialTableBuilder::Row row_of(const std::string& id, std::optional<double> up_to, double yield) {
  MaterialTableBuilder::Row row;
  row.info = steel(id);
  row.up_to = up_to;
  row.values[Property::yield_strength] = {yield, yield};
  return row;
}

}  // namespace

TEST_CASE("rows of one id become one material with strength steps, in any order of the rows") {
  // The two limits of S235JR, EN 10025-2 as reproduced in public tables (S1 of data/SOURCES.md).
  const MaterialTable table = bismar::read_materials_text(
      "id,class,thickness limit [mm],yield strength [MPa],density [kg/m3]\n"
      "a,steel,40,225,7850\nb,steel,,300,7850\na,steel,16,235,7850\n",
      "m.csv");
  REQUIRE(table.size() == 2);
  REQUIRE(table.rows() == 3);
  CHECK(table.info(0).id == "a");
  CHECK(table.info(0).name == "a");
  REQUIRE(table.steps(0).size() == 2);
  CHECK(table.steps(0)[0].above == 0.0);
  CHECK(table.steps(0)[0].up_to == 0.016);
  CHECK(table.steps(0)[1].above == 0.016);
  CHECK(table.steps(0)[1].up_to == 0.040);
  CHECK(table.step_at(0, 0.001) == &table.steps(0)[0]);
  CHECK(table.step_at(0, 0.016) == &table.steps(0)[0]);
  CHECK(table.step_at(0, 0.0161) == &table.steps(0)[1]);
  CHECK(table.step_at(0, 0.040) == &table.steps(0)[1]);
  CHECK(table.step_at(0, 0.0401) == nullptr);
  CHECK(table.step_at(0, 0.0) == nullptr);
  CHECK(table.step_at(0, std::numeric_limits<double>::quiet_NaN()) == nullptr);
  CHECK(table.value(Property::yield_strength, table.steps(0)[0].row) == Range{235e6, 235e6});
  CHECK(table.value(Property::yield_strength, table.steps(0)[1].row) == Range{225e6, 225e6});
  CHECK(table.material_of(2) == 0);
  REQUIRE(table.steps(1).size() == 1);
  CHECK(table.steps(1)[0].up_to == std::numeric_limits<double>::infinity());
  CHECK(table.step_at(1, 10.0) == &table.steps(1)[0]);
  CHECK(table.find("b") == std::size_t{1});
  CHECK_FALSE(table.find("c"));
}

TEST_CASE("a lower limit of its own starts a step, and leaves a gap where the table has one") {
  const MaterialTable table = bismar::read_materials_text(
      "id,class,thickness above [mm],thickness limit [mm],yield strength [MPa]\n"
      "a,steel,20,150,260\nb,steel,,10,200\nb,steel,20,40,190\n",
      "m.csv");
  CHECK(table.steps(0)[0].above == 0.020);
  CHECK(table.step_at(0, 0.020) == nullptr);
  CHECK(table.step_at(0, 0.021) != nullptr);
  CHECK(table.step_at(1, 0.015) == nullptr);
  CHECK(table.step_at(1, 0.030) == &table.steps(1)[1]);
}

TEST_CASE("rows of one id may differ in strength, not in what does not step") {
  const std::string header =
      "id,class,thickness limit [mm],density [kg/m3],Young's modulus [GPa],yield strength [MPa],"
      "forms,basis,notes\n";
  CHECK(
      faults_of(header + "a,steel,16,7850,210,235,bar,minimum,x\n"
                         "a,steel,40,7850,,225,bar,minimum,x\n"
                         "a,iron,63,7800,210,215,bar;plate,typical,y\n") ==
      Texts{
          "m.csv:3:5: \"a\" differs from line 2 in \"Young's modulus [GPa]\": rows of one material "
          "may differ in strength only; give them ids of their own.",
          "m.csv:4: \"a\" differs from line 2 in \"class\": rows of one material may differ in "
          "strength only; give them ids of their own.",
          "m.csv:4: \"a\" differs from line 2 in \"forms\": rows of one material may differ in "
          "strength only; give them ids of their own.",
          "m.csv:4:4: \"a\" differs from line 2 in \"density [kg/m3]\": rows of one material may "
          "differ in strength only; give them ids of their own."});
  const MaterialTable table = bismar::read_materials_text(
      header +
          "a,steel,16,7850,210,235,bar,minimum,cast on\na,steel,40,7850,210,225,bar,typical,x\n"
          "a,steel,63,7850,210,215,bar,typical,x\n",
      "m.csv");
  CHECK(table.info(0).basis == Basis::typical);
  CHECK(table.basis(0) == Basis::minimum);
  CHECK(table.basis(1) == Basis::typical);
  CHECK(table.info(0).notes == "up to 16 mm: cast on; up to 63 mm: x");
}

TEST_CASE("one id twice with the same limit, and overlapping limits, are faults") {
  const std::string header = "id,class,thickness above [mm],thickness limit [mm]\n";
  CHECK(
      faults_of(header + "a,steel,,16\na,steel,,16\n") ==
      Texts{
          "m.csv:3: \"a\" is there twice with the same thickness limit: remove one row, or give it "
          "another id or limit."});
  CHECK(faults_of(header + "a,steel,,\na,steel,,\n").size() == 1);
  CHECK(faults_of(header + "a,steel,,16\na,steel,10,40\n") ==
        Texts{"m.csv:3: \"a\" overlaps in thickness with the row of the next smaller limit."});
  CHECK(faults_of(header + "a,steel,16,16\n") ==
        Texts{"m.csv:2: the lower thickness limit is not below the upper one."});
  CHECK(faults_of(header + "a,steel,,-5\n") ==
        Texts{"m.csv:2: the thickness limits must be above 0 and finite."});
}

TEST_CASE("nonsense values are faults with row and column, all at once") {
  CHECK(
      faults_of("id,class,Young's modulus [GPa],Poisson's ratio,density [kg/m3],yield strength "
                "[MPa],tensile strength [MPa],recycled fraction,elongation [%]\n"
                "a,steel,-210,0.5,7850,235,360,0.4,26\n"
                "b,steel,210,0.3,-7850,400,360,1.4,-1\n"
                "c,steel,0,0.3,0,235..500,360..480,0.4,26\n") ==
      Texts{
          "m.csv:2:3: \"Young's modulus [GPa]\" of \"a\": -210 GPa cannot be; allowed is above 0 "
          "in "
          "SI units.",
          "m.csv:2:4: \"Poisson's ratio\" of \"a\": 0.5 cannot be; allowed is above -1 and below "
          "0.5.",
          "m.csv:3:5: \"density [kg/m3]\" of \"b\": -7850 kg/m3 cannot be; allowed is above 0 in "
          "SI "
          "units.",
          "m.csv:3:9: \"elongation [%]\" of \"b\": -1 % cannot be; allowed is at least 0.",
          "m.csv:3:8: \"recycled fraction\" of \"b\": 1.4 cannot be; allowed is at least 0 and at "
          "most 1.",
          "m.csv:3:6: \"yield strength [MPa]\" of \"b\": 400 MPa is above the tensile strength of "
          "360 "
          "MPa.",
          "m.csv:4:5: \"density [kg/m3]\" of \"c\": 0 kg/m3 cannot be; allowed is above 0 in SI "
          "units.",
          "m.csv:4:3: \"Young's modulus [GPa]\" of \"c\": 0 GPa cannot be; allowed is above 0 in "
          "SI "
          "units.",
          "m.csv:4:6: \"yield strength [MPa]\" of \"c\": 500 MPa is above the tensile strength of "
          "480 "
          "MPa."});
  CHECK(faults_of("id,class,minimum service temperature [degC],maximum service temperature [degC]\n"
                  "a,steel,100,50\n") == Texts{"m.csv:2:3: \"minimum service temperature [degC]\" "
                                               "of \"a\": 100 degC is above the maximum "
                                               "service temperature of 50 degC."});
}

TEST_CASE("faults of cells and of meaning come in one list, those of an empty cell once") {
  CHECK(faults_of("id,class,density [kg/m3],Poisson's ratio\na,,x,0.7\n,steel,-1,\n").size() == 5);
  CHECK(faults_of("id,class,density [kg/m3]\n,steel,7850\n") ==
        Texts{"m.csv:2:1: \"id\": the cell must not be empty."});
  CHECK(faults_of("density [kg/m3]\n7850\n") == Texts{"m.csv:1: the column \"id\" is missing.",
                                                      "m.csv:1: the column \"class\" is missing."});
  CHECK(faults_of("").size() == 1);
  CHECK(faults_of("id,class\n").size() == 1);
  CHECK(faults_of("id,class,isotropic,structural use,basis,evidence,corrosion in fresh water\n"
                  "a,steel,perhaps,never,guess,heard,bad\n")
            .size() == 5);
}

TEST_CASE("values of the kinds known to be wrong in open tables are named") {
  // Invented rows with the errors found in open data: a G that is 0.16 or 1.38 times E/(2(1+nu))
  // (element tables), 5.3 % above it (stainless cards), an elongation of 0 beside a yield strength
  // (cards of cast irons and normalised steels). Numbers of the ratios: our own comparison.
  const MaterialTable table = bismar::read_materials_text(
      "id,class,Young's modulus [GPa],shear modulus [GPa],Poisson's ratio,yield strength [MPa],"
      "elongation [%]\n"
      "grey-metal,steel,329,20,0.31,,\n"
      "white-metal,steel,275,147.8,0.38,,\n"
      "stainless-card,stainless steel,200,81,0.3,200,40\n"
      "iron-card,cast iron,110,44,0.25,165,0\n"
      "sound,steel,210,80.77,0.3,235,26\n",
      "m.csv");
  CHECK(table.warnings() == Texts{"m.csv:2:4: \"shear modulus [GPa]\" of \"grey-metal\": 20 GPa is "
                                  "84.1 % below E / (2 (1 + "
                                  "nu)) = 126 GPa of an isotropic material.",
                                  "m.csv:3:4: \"shear modulus [GPa]\" of \"white-metal\": 147.8 "
                                  "GPa is 48.3 % above E / (2 (1 "
                                  "+ nu)) = 99.6 GPa of an isotropic material.",
                                  "m.csv:4:4: \"shear modulus [GPa]\" of \"stainless-card\": 81 "
                                  "GPa is 5.30 % above E / (2 (1 "
                                  "+ nu)) = 76.9 GPa of an isotropic material.",
                                  "m.csv:5:7: \"elongation [%]\" of \"iron-card\": 0 beside a "
                                  "yield strength: leave the cell "
                                  "empty where the elongation is not known."});
}

TEST_CASE("a wrong unit in a header and a misspelt property give warnings") {
  const MaterialTable table = bismar::read_materials_text(
      "id,class,Young's modulus [GPa],tensile strength [GPa],density [g/cm3],yeild strength [MPa]\n"
      "a,steel,210000,,7850,235\nb,steel,1,2,7.85,235\n",
      "m.csv");
  REQUIRE(table.warnings().size() == 4);
  CHECK(
      table.warnings()[0] ==
      "m.csv:1:6: the column \"yeild strength\" is not one the library knows. Did you mean \"yield "
      "strength\"?");
  CHECK(table.warnings()[1].find("m.csv:2:5: \"density [g/cm3]\"") == 0);
  CHECK(table.warnings()[2].find("m.csv:2:3: \"Young's modulus [GPa]\"") == 0);
  CHECK(table.warnings()[3].find("m.csv:3:4: \"tensile strength [GPa]\"") == 0);
  CHECK(table.extra("yeild strength", 0) == Range{235e6, 235e6});
}

TEST_CASE("an engineer's own spreadsheet works after renaming its headers") {
  // Invented shop list, as a German-locale spreadsheet saves it.
  const std::string text =
      "\xEF\xBB\xBF"
      "Name;Condition;Class;Forms;Processes;Density [g/cm3];Young\xE2\x80\x99s modulus [N/mm2];"
      "Yield strength min [N/mm2];Yield strength max [N/mm2];Price [EUR/t];Damping "
      "[%];Rack;Remark\r\n"
      "House steel;as rolled;steel;bar | plate;sawing | "
      "machining;7,85;210000;235;;1150,5;0,2..0,4;12;"
      "\"old \"\"A\"\" rack\r\nlow shelf\"\r\n"
      "House alloy;T6;aluminium;bar;sawing;2,7;70000;250;270;4200;;13;\r\n"
      ";;;;;;;;;;;;\r\n";
  bismar::TableFormat format;
  format.delimiter = ';';
  format.decimal = ',';
  const MaterialTable table = bismar::read_materials_text(text, "shop.csv", format);
  REQUIRE(table.size() == 2);
  const std::size_t house = table.find("house-steel-as-rolled").value();
  CHECK(table.info(house).forms == Texts{"bar", "plate"});
  CHECK(table.info(house).basis == Basis::typical);
  CHECK(table.info(house).isotropic);
  CHECK(table.value(Property::density, 0).value().low == Approx(7850.0).epsilon(1e-15));
  CHECK(table.value(Property::youngs_modulus, 0) == Range{210e9, 210e9});
  CHECK(table.value(Property::yield_strength, 0) == Range{235e6, 235e6});
  CHECK(table.value(Property::yield_strength, 1) == Range{250e6, 270e6});
  CHECK(table.value(Property::price, 0).value().low == Approx(1.1505).epsilon(1e-15));
  CHECK(table.currency() == "EUR");
  CHECK(table.extra_names() == Texts{"Damping [%]", "Rack"});
  const Range damping = table.extra("damping", 0).value();
  CHECK(damping.low == Approx(0.002).epsilon(1e-15));
  CHECK(damping.high == Approx(0.004).epsilon(1e-15));
  CHECK(table.extra("Damping [%]", 0) == damping);
  CHECK_FALSE(table.extra("damping", 1));
  CHECK(table.extra("rack", 1) == Range{13, 13});
  CHECK_FALSE(table.extra("shelf", 0));
  CHECK(table.text("Remark", 0) == "old \"A\" rack\r\nlow shelf");
  CHECK(table.text("remark", 1).empty());
  CHECK(table.warnings().empty());
  const bismar::Provenance provenance = table.provenance(Property::yield_strength, 1);
  CHECK(provenance.table == "shop.csv");
  CHECK(provenance.row == 4);
  CHECK(provenance.column == "Yield strength min [N/mm2]");
  CHECK(provenance.evidence == Evidence::user);
  CHECK(table.extra_provenance("damping", 0).value().column == "Damping [%]");
  CHECK_FALSE(table.extra_provenance("shelf", 0));
}

TEST_CASE("words, ratings and defaults of a row") {
  const MaterialTable table = bismar::read_materials_text(
      "id,class,isotropic,structural use,basis,corrosion in fresh water,Corrosion in brine\n"
      "a,steel,YES,on request,minimum,good,\n"
      "b,wood,,no,indicative,,poor\n"
      "c,composite,in plane,,,fair,\n"
      "d,composite,,,,,\n",
      "m.csv");
  CHECK(table.info(0).use == StructuralUse::on_request);
  CHECK(table.info(0).basis == Basis::minimum);
  CHECK(table.info(0).corrosion.at("fresh water") == Rating::good);
  CHECK(table.info(0).corrosion.count("brine") == 0);
  CHECK_FALSE(table.info(1).isotropic);
  CHECK(table.info(1).use == StructuralUse::no);
  CHECK(table.info(1).corrosion.at("brine") == Rating::poor);
  CHECK(table.info(2).isotropic);
  CHECK(table.info(2).in_plane_only);
  CHECK_FALSE(table.info(3).isotropic);
}

TEST_CASE("seen and estimated columns mark single values, with their keys") {
  const std::string header =
      "id,class,evidence,source,seen columns,estimated columns,density [kg/m3],yield strength "
      "[MPa],"
      "tensile strength [MPa],hardness,endurance limit [MPa],price [EUR/kg],endurance limit basis,"
      "price basis,basis\n";
  const MaterialTable table = bismar::read_materials_text(
      header +
          "a,steel,from memory,EN 0,\"S1: yield strength min, density; S2: tensile strength max; "
          "S3: yield strength, thickness limit\",endurance limit,7850,235..300,360..510,,160,1..2,"
          "0.45 x tensile,indicative,minimum\n",
      "m.csv");
  const auto of = [&](Property property) { return table.provenance(property, 0); };
  CHECK(of(Property::density).evidence == Evidence::seen);
  CHECK(of(Property::density).keys == "S1");
  CHECK(of(Property::yield_strength).evidence == Evidence::seen);
  CHECK(of(Property::yield_strength).keys == "S1 (low end), S3");
  CHECK(of(Property::tensile_strength).evidence == Evidence::from_memory);
  CHECK(of(Property::tensile_strength).keys == "S2 (high end)");
  CHECK(of(Property::endurance_limit).evidence == Evidence::estimated);
  CHECK(of(Property::endurance_limit).source == "0.45 x tensile");
  CHECK(of(Property::price).basis == Basis::indicative);
  CHECK(of(Property::price).source == "EN 0");
  CHECK(of(Property::density).basis == Basis::minimum);
  CHECK(
      faults_of(header + "a,steel,,,yield strength,,7850,,,,,,,,\n") ==
      Texts{"m.csv:2:5: \"seen columns\": \"yield strength\" names no source: write \"key: column, "
            "column\"."});
  CHECK(
      faults_of(header + "a,steel,,,S1: yeild strength,densty,7850,,,,,,,,\n") ==
      Texts{
          "m.csv:2:5: \"seen columns\": \"yeild strength\" is not the name of a property. Did you "
          "mean \"yield strength\"?",
          "m.csv:2:6: \"estimated columns\": \"densty\" is not the name of a property. Did you "
          "mean "
          "\"density\"?"});
  CHECK(
      faults_of(header + "a,steel,,,S1: density,density,7850,,,,,,,,\n") ==
      Texts{
          "m.csv:2:6: \"estimated columns\": \"density\" is listed as seen too: a value is one or "
          "the other."});
}

TEST_CASE("a table in another currency keeps it, with a rate it becomes the job's") {
  const std::string text = "id,class,price [USD/lb],scrap value [USD/kg]\na,steel,2,0.5\n";
  CHECK(bismar::read_materials_text(text, "m.csv").currency() == "USD");
  bismar::CurrencyRates rates("EUR");
  bismar::TableFormat format;
  format.rates = &rates;
  CHECK(faults_of(text, format).size() == 2);
  rates.set("USD", 0.5);
  const MaterialTable table = bismar::read_materials_text(text, "m.csv", format);
  CHECK(table.currency() == "EUR");
  CHECK(table.value(Property::price, 0).value().low == Approx(1.0 / 0.45359237).epsilon(1e-14));
  CHECK(table.extra("scrap value", 0) == Range{0.25, 0.25});
}

TEST_CASE("a table is built in memory from rows") {
  MaterialTableBuilder builder("mine", "CHF");
  builder.add(row_of("a", 0.016, 235e6));
  MaterialTableBuilder::Row second = row_of("a", 0.040, 225e6);
  second.extras["damping [%]"] = {0.01, 0.02};
  builder.add(second);
  const MaterialTable table = builder.build();
  CHECK(table.currency() == "CHF");
  CHECK(table.name() == "mine");
  CHECK(table.steps(0).size() == 2);
  CHECK_FALSE(table.extra("damping", 0));
  CHECK(table.extra("damping", 1) == Range{0.01, 0.02});
  CHECK(table.provenance(Property::yield_strength, 0).column == "yield strength");
  CHECK(table.provenance(Property::yield_strength, 0).row == 0);
  const auto again = build_faults(builder);
  REQUIRE(again.size() == 1);
  CHECK(again[0].code == Code::empty);
}

TEST_CASE("a table is built in memory from spans, NaN is missing") {
  const std::array<MaterialInfo, 2> infos = {steel("a"), steel("b")};
  const std::array<Property, 2> names = {Property::density, Property::yield_strength};
  const std::array<double, 2> density = {7850.0, 7800.0};
  const std::array<double, 2> yield = {std::numeric_limits<double>::quiet_NaN(), 400e6};
  const std::array<std::span<const double>, 2> columns = {density, yield};
  MaterialTableBuilder builder("spans");
  builder.add_columns(infos, names, columns);
  const MaterialTable table = builder.build();
  REQUIRE(table.size() == 2);
  CHECK(table.value(Property::density, 1) == Range{7800.0, 7800.0});
  CHECK_FALSE(table.value(Property::yield_strength, 0));
  CHECK(table.value(Property::yield_strength, 1) == Range{400e6, 400e6});
  CHECK_FALSE(table.value(Property::price, 0));

  const std::array<double, 1> shorter = {1.0};
  const std::array<std::span<const double>, 2> ragged = {density, shorter};
  const std::array<Property, 2> twice = {Property::density, Property::density};
  CHECK_THROWS_AS(builder.add_columns(infos, names, ragged), bismar::Error);
  CHECK_THROWS_AS(builder.add_columns(infos, twice, columns), bismar::Error);
  CHECK_THROWS_AS(builder.add_columns(infos, std::span(names).first(1), columns), bismar::Error);
  CHECK(build_faults(builder)[0].code == Code::empty);  // nothing was added by halves
}

TEST_CASE("faults of tables in memory name the material, and have their codes") {
  MaterialTableBuilder builder("mine", "crowns");
  const double inf = std::numeric_limits<double>::infinity();
  MaterialTableBuilder::Row row = row_of("a", std::nullopt, 235e6);
  row.values[Property::density] = {inf, inf};
  row.values[Property::elongation] = {0.3, 0.2};
  row.values[Property::poisson_ratio] = {0.6, 0.6};
  row.extras["damping [%]"] = {0.2, 0.1};
  row.extras["colour"] = {inf, inf};
  builder.add(row);
  builder.add(row_of("", 0.01, 1e6));
  MaterialTableBuilder::Row classless = row_of("c", 0.01, 1e6);
  classless.info.material_class.clear();
  builder.add(classless);
  std::vector<std::pair<Code, std::string>> found;
  for (const bismar::Fault& fault : build_faults(builder))
    found.emplace_back(fault.code, fault.where);
  using Found = std::pair<Code, std::string>;
  CHECK(found == std::vector<Found>{{Code::unknown_name, "mine"},
                                    {Code::not_finite, "mine: material \"a\""},
                                    {Code::out_of_range, "mine: material \"a\""},
                                    {Code::conflict, "mine: material \"a\""},
                                    {Code::not_finite, "mine: material \"a\""},
                                    {Code::conflict, "mine: material \"a\""},
                                    {Code::missing, "mine: material \"\""},
                                    {Code::missing, "mine: material \"c\""}});
}

TEST_CASE("random tables give a table or faults, and every step has its values") {
  std::mt19937 random(3);
  const Texts cells = {"a",
                       "steel",
                       "1",
                       "235",
                       "1..2",
                       "",
                       "-3",
                       "yes",
                       "x;y",
                       "S1: density",
                       "16",
                       "1e300",
                       "0",
                       "wood",
                       "good"};
  const Texts headers = {"id",
                         "class",
                         "name",
                         "density [kg/m3]",
                         "yield strength [MPa]",
                         "basis",
                         "thickness limit [mm]",
                         "thickness above [mm]",
                         "isotropic",
                         "seen columns",
                         "elongation [%]",
                         "other",
                         "x [mm]",
                         "price [EUR/kg]"};
  int built = 0;
  for (int round = 0; round < 3000; ++round) {
    Texts chosen = headers;
    std::shuffle(chosen.begin(), chosen.end(), random);
    chosen.resize(3 + random() % 6);
    chosen[0] = "id";
    chosen[1] = "class";
    std::string text;
    for (std::size_t i = 0; i < chosen.size(); ++i) text += (i == 0 ? "" : ",") + chosen[i];
    for (int row = 0; row < 2; ++row) {
      text += '\n';
      for (std::size_t i = 0; i < chosen.size(); ++i) {
        text += (i == 0 ? "" : ",") + (random() % 2 == 0 ? cells[random() % cells.size()] : "");
      }
    }
    try {
      const MaterialTable table = bismar::read_materials_text(text, "m.csv");
      ++built;
      for (std::size_t m = 0; m < table.size(); ++m) {
        for (const bismar::ThicknessStep& step : table.steps(m)) {
          REQUIRE(step.above < step.up_to);
          REQUIRE(table.material_of(step.row) == m);
        }
      }
    } catch (const bismar::Error& error) {
      REQUIRE_FALSE(error.faults().empty());
    }
  }
  CHECK(built > 20);
}
