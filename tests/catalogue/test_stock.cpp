// SPDX-License-Identifier: MIT
#include <bismar/catalogue/stock.hpp>

#include <string>
#include <vector>

#include <bismar/error.hpp>

#include "catalogue/temporary_table.hpp"
#include "support/catch.hpp"

using bismar::Code;
using bismar::read_stock;
using test::has_fault;
using test::TemporaryTable;

namespace {

bismar::StockList read(const TemporaryTable& table, const bismar::TableFormat& format = {}) {
  return read_stock(table.path(), format);
}

std::vector<bismar::Fault> faults_in(const TemporaryTable& table) {
  return test::faults_of([&] { return read(table); });
}

bismar::MaterialInfo material(const char* material_class,
                              const char* group,
                              const char* standard,
                              std::vector<std::string> forms) {
  bismar::MaterialInfo info;
  info.id = "m";
  info.material_class = material_class;
  info.group = group;
  info.standard = standard;
  info.forms = std::move(forms);
  return info;
}

}  // namespace

TEST_CASE("a list of sizes is read in the units of its headers") {
  const TemporaryTable table("my-bars.csv",
                             "id,shape,diameter [in],material classes,stock lengths [ft],"
                             "availability,evidence,our price\n"
                             "b1,solid round,1,steel;aluminium,10;20,seen,our stockist,12\n"
                             "b2,solid round,2,steel,,,,13\n");
  const bismar::StockList list = read(table);
  CHECK(list.id == "my-bars");
  CHECK(list.title == "my-bars");
  CHECK_FALSE(list.sheet);
  CHECK(list.family == bismar::SectionFamily::solid_round);
  REQUIRE(list.items.size() == 2);
  const bismar::StockItem& item = list.items[0];
  CHECK(item.id == "b1");
  CHECK(item.designation == "b1");
  CHECK(item.section.height == 0.0254);
  CHECK(item.section.area == Approx(5.067075e-4).epsilon(1e-6));  // pi/4 (25.4 mm)^2, by hand
  CHECK(item.classes == std::vector<std::string>{"steel", "aluminium"});
  CHECK(item.groups.empty());
  CHECK(item.lengths == std::vector{3.048, 6.096});
  CHECK(item.availability == bismar::Availability::seen);
  CHECK(item.evidence == "our stockist");
  CHECK(item.table == table.path());
  CHECK(item.line == 2);
  CHECK(list.items[1].lengths.empty());
  CHECK(list.items[1].availability == bismar::Availability::usual);
}

TEST_CASE("a list with semicolons and decimal commas") {
  const TemporaryTable table(
      "tubes.csv",
      "id;shape;forming;diameter [mm];wall [mm];material classes;stock lengths [m]\n"
      "t1;round tube;hot finished;60,3;2,9;steel|stainless steel;6|6,4\n");
  const bismar::StockList list = read(table, {.delimiter = ';', .decimal = ','});
  CHECK(list.items[0].section.height == Approx(0.0603).epsilon(1e-15));
  CHECK(list.items[0].section.wall == Approx(0.0029).epsilon(1e-15));
  CHECK(list.items[0].section.forming == bismar::Forming::hot_finished);
  CHECK(list.items[0].classes == std::vector<std::string>{"steel", "stainless steel"});
  CHECK(list.items[0].lengths == std::vector{6.0, 6.4});
}

TEST_CASE("corners of a rectangular tube follow its forming where no radii are given") {
  const std::string header = "id,shape,forming,height [mm],width [mm],wall [mm],material classes\n";
  const auto area = [&](const std::string& row) {
    return read(TemporaryTable("t.csv", header + row)).items[0].section.area;
  };
  const double t = 5e-3;
  const double sharp = (0.1 * 0.06) - (0.09 * 0.05);
  const double corner = 4.0 - 3.14159265358979;  // of all four corners together, a radius of 1
  // EN 10210-2 ro = 1.5 t, ri = t; EN 10219-2 to 6 mm: ro = 2 t, ri = t; from memory.
  CHECK(area("a,rectangular tube,extruded,100,60,5,aluminium\n") == Approx(sharp).epsilon(1e-12));
  CHECK(area("a,rectangular tube,,100,60,5,aluminium\n") == Approx(sharp).epsilon(1e-12));
  CHECK(area("a,rectangular tube,hot finished,100,60,5,steel\n") ==
        Approx(sharp - corner * t * t * (2.25 - 1.0)).epsilon(1e-12));
  CHECK(area("a,rectangular tube,cold formed,100,60,5,steel\n") ==
        Approx(sharp - corner * t * t * (4.0 - 1.0)).epsilon(1e-12));
}

TEST_CASE("a list of sheet has thicknesses and no section") {
  const TemporaryTable table("sheet.csv",
                             "id,list,shape,thickness [mm],material classes,material forms,"
                             "stock lengths [m],stock widths [m]\n"
                             "s1,our sheet,sheet,1.5,steel,sheet,2;3,1;1.5\n");
  const bismar::StockList list = read(table);
  CHECK(list.sheet);
  CHECK(list.title == "our sheet");
  CHECK(list.items[0].thickness == Approx(1.5e-3).epsilon(1e-15));
  CHECK(list.items[0].widths == std::vector{1.0, 1.5});
}

TEST_CASE("every fault of a list is told with its row and column") {
  const TemporaryTable table(
      "bad.csv",
      "id,list,shape,forming,height [mm],width [mm],wall [mm],material classes,stock lengths [m],"
      "size standards of other classes,availability\n"
      "a,L,rectangular tube,hot finished,100,60,5,steel,6;12,aluminium:EN 1,seen\n"
      "a,L,rectangular tube,rolled,100,60,30,steel,12;6,,sometimes\n"
      "c,M,round tube,hot finished,100,,x,,6,steel,usual\n"
      "d,L,rectangular tube,hot finished,100,60,-5,steel,-6,steel:A;steel:B,\n");
  const auto faults = faults_in(table);
  CHECK(has_fault(faults, Code::conflict, table.at(2, 10), "not made of \"aluminium\""));
  CHECK(has_fault(faults, Code::duplicate, table.at(3, 1), "already that of line 2"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(3, 4), "hot finished"));
  CHECK(has_fault(faults, Code::out_of_range, table.at(3, 7), "wall"));
  CHECK(has_fault(faults, Code::conflict, table.at(3, 9), "ascend"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(3, 11), "doubtful"));
  CHECK(has_fault(faults, Code::conflict, table.at(4, 2), "two lists"));
  CHECK(has_fault(faults, Code::conflict, table.at(4, 3), "two lists"));
  CHECK(has_fault(faults, Code::missing, table.at(4, 6), "empty"));
  CHECK(has_fault(faults, Code::missing, table.at(4, 8), "empty"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(4, 10), "colon"));
  CHECK(has_fault(faults, Code::out_of_range, table.at(5, 7), "wall"));
  CHECK(has_fault(faults, Code::cell_invalid, table.at(5, 9), "above 0"));
  CHECK(has_fault(faults, Code::duplicate, table.at(5, 10), "twice"));
}

TEST_CASE("columns that are missing or misspelt are told") {
  SECTION("the dimensions that the shape needs") {
    const TemporaryTable table("x.csv",
                               "id,shape,height [mm],material classes\na,channel,100,steel\n");
    std::string all;
    for (const bismar::Fault& fault : faults_in(table)) {
      CHECK(fault.code == Code::column_missing);
      all += fault.message;
    }
    for (const char* name : {"width", "web", "flange", "root radius"}) {
      INFO(name << " in " << all);
      CHECK(all.find(name) != std::string::npos);
    }
  }
  SECTION("a slip of the pen in an optional column") {
    const TemporaryTable table(
        "x.csv",
        "id,shape,diameter [mm],material classes,stock length [m]\na,solid round,10,steel,6\n");
    CHECK(has_fault(faults_in(table), Code::unknown_name, table.at(1, 5), "\"stock lengths\""));
  }
  SECTION("a shape that is none") {
    const TemporaryTable table("x.csv",
                               "id,shape,diameter [mm],material classes\na,round solid,10,steel\n");
    CHECK(has_fault(
        faults_in(table), Code::cell_invalid, table.at(2, 2), "solid round, solid square"));
  }
  SECTION("no shape at all") {
    const TemporaryTable table("x.csv", "id,diameter [mm],material classes\na,10,steel\n");
    CHECK(faults_in(table).size() == 1);
    CHECK(faults_in(table)[0].code == Code::column_missing);
  }
  SECTION("one of two radii") {
    const TemporaryTable table(
        "x.csv",
        "id,shape,height [mm],width [mm],wall [mm],outer radius [mm],inner radius [mm],"
        "material classes\na,rectangular tube,60,40,3,4,,steel\n");
    CHECK(has_fault(faults_in(table), Code::missing, table.at(2, 6), "together"));
  }
  SECTION("a dimension without unit, and a table that is empty") {
    const TemporaryTable bare("x.csv",
                              "id,shape,diameter,material classes\na,solid round,10,steel\n");
    CHECK(has_fault(faults_in(bare), Code::unit_missing, bare.at(1, 3), "diameter"));
    const TemporaryTable none("x.csv", "id,shape,diameter [mm],material classes\n");
    CHECK(faults_in(none)[0].code == Code::empty);
    CHECK(test::faults_of([] { return read_stock("no-such-file.csv"); })[0].code ==
          Code::table_unreadable);
  }
}

TEST_CASE("an item is made of a material when class, group, standard, form and id agree") {
  bismar::StockItem item;
  item.classes = {"steel"};
  const auto s355 = material("steel", "structural steel", "EN 10025-2", {"plate", "bar"});
  CHECK(made_of(item, s355));
  CHECK_FALSE(made_of(item, material("aluminium", "structural steel", "EN 10025-2", {"bar"})));

  item.groups = {"carbon steel, normalised", "structural steel"};
  CHECK(made_of(item, s355));
  item.groups = {"carbon steel, normalised"};
  CHECK_FALSE(made_of(item, s355));
  item.groups.clear();

  item.standards = {"EN 10025-2"};
  CHECK(made_of(item, s355));
  item.standards = {"EN 10025"};  // no part of a word counts
  CHECK_FALSE(made_of(item, s355));
  item.standards.clear();

  item.forms = {"bar"};
  CHECK(made_of(item, s355));
  item.forms = {"tube"};
  CHECK_FALSE(made_of(item, s355));
  item.forms.clear();

  item.material_ids = {"m"};
  CHECK(made_of(item, s355));
  item.material_ids = {"n"};
  CHECK_FALSE(made_of(item, s355));
}

TEST_CASE("the standard of a size goes with the class of its material") {
  const TemporaryTable table(
      "b.csv",
      "id,shape,diameter [mm],material classes,size standard,"
      "size standards of other classes\n"
      "a,solid round,20,steel;aluminium;titanium,EN 10060,aluminium:EN 755-3;titanium:-\n");
  const bismar::StockItem item = read(table).items[0];
  CHECK(size_standard(item, "steel") == "EN 10060");
  CHECK(size_standard(item, "aluminium") == "EN 755-3");
  CHECK(size_standard(item, "titanium").empty());
}

TEST_CASE("the words of availability go both ways") {
  for (const auto a : {bismar::Availability::seen,
                       bismar::Availability::usual,
                       bismar::Availability::unconfirmed,
                       bismar::Availability::doubtful}) {
    CHECK(bismar::availability(name(a)) == a);
  }
  CHECK_FALSE(bismar::availability("often").has_value());
}
