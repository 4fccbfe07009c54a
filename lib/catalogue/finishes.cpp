// SPDX-License-Identifier: MIT
#include <bismar/catalogue/routes.hpp>

#include <array>
#include <optional>
#include <utility>

#include <bismar/catalogue/csv.hpp>
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/error.hpp>

#include "catalogue/checked_cells.hpp"

namespace bismar {

namespace {

constexpr std::array<std::string_view, 2> basis_words = {"square metre", "kilogram"};
/// In the order of Rating.
constexpr std::array<std::string_view, 3> rating_words = {"poor", "fair", "good"};
constexpr std::string_view no_finish = "none";

class FinishReader {
 public:
  explicit FinishReader(TableReader& table)
      : table_(table),
        ids_(table.text_column("id", needed)),
        corrosion_(table.text_columns_with_prefix("corrosion after:")) {
    table.finish_columns();
  }

  std::vector<Finish> read(const std::string& path) {
    std::vector<Finish> finishes;
    finishes.reserve(table_.rows());
    for (std::size_t row = 0; row < table_.rows(); ++row) {
      finishes.push_back(finish(row, path));
    }
    return finishes;
  }

 private:
  Finish finish(std::size_t row, const std::string& path) {
    using namespace catalogue;
    Finish finish;
    finish.id = ids_.read(table_, row);
    finish.title = table_.text(row, title_);
    if (finish.title.empty()) {
      finish.title = finish.id;
    }
    finish.standard = table_.text(row, standard_);
    finish.classes = table_.required_list(row, classes_);
    finish.process_words = table_.list(row, process_words_);
    if (const auto word = table_.word(row, basis_, basis_words)) {
      finish.per_area = *word == 0;
    }
    finish.cost_per_area = range_in(table_, row, cost_per_area_, not_negative);
    finish.cost_per_mass = range_in(table_, row, cost_per_mass_, not_negative);
    check_cost(row, finish);
    finish.minimum_lot = value_in(table_, row, minimum_lot_, not_negative).value_or(0.0);
    finish.thickness = range_in(table_, row, thickness_, not_negative);
    finish.added_mass = range_in(table_, row, added_mass_, not_negative);
    finish.service_temperature_max = table_.value(row, max_temperature_);
    finish.fatigue_factor = value_in(table_, row, fatigue_factor_, positive);
    for (const TableReader::PrefixedColumn& medium : corrosion_) {
      if (const auto word = table_.word(row, medium.column, rating_words)) {
        finish.corrosion_after.emplace(medium.rest, static_cast<Rating>(*word));
      }
    }
    finish.limits = table_.text(row, limits_);
    finish.notes = table_.text(row, notes_);
    finish.status = table_.text(row, status_);
    finish.evidence = table_.text(row, evidence_);
    finish.table = path;
    finish.line = table_.line(row);
    return finish;
  }

  void check_cost(std::size_t row, const Finish& finish) {
    const catalogue::NumberColumn& own = finish.per_area ? cost_per_area_ : cost_per_mass_;
    if (own.is_present() && !table_.text(row, {own.index()}).empty()) {
      return;  // there, or faulty
    }
    if (finish.id == no_finish || !basis_.is_present()) {
      return;
    }
    table_.add_fault(row,
                     own.index().value_or(*basis_.index),
                     Code::missing,
                     finish.per_area
                         ? "a finish costed by the square metre needs its cost per area."
                         : "a finish costed by the kilogram needs its cost per mass.");
  }

  using Kind = QuantityKind;
  static constexpr Presence needed = Presence::required;
  TableReader& table_;
  catalogue::Ids ids_;
  catalogue::Column title_ = table_.text_column("title");
  catalogue::Column standard_ = table_.text_column("standard");
  catalogue::Column classes_ = table_.text_column("material classes", needed);
  catalogue::Column process_words_ = table_.text_column("process words");
  catalogue::Column basis_ = table_.text_column("cost basis", needed);
  catalogue::Column limits_ = table_.text_column("limits");
  catalogue::Column notes_ = table_.text_column("notes");
  catalogue::Column status_ = table_.text_column("status");
  catalogue::Column evidence_ = table_.text_column("evidence");
  catalogue::NumberColumn cost_per_area_ =
      table_.number_column("cost per area", Kind::price_per_area);
  catalogue::NumberColumn cost_per_mass_ =
      table_.number_column("cost per mass", Kind::price_per_mass);
  catalogue::NumberColumn minimum_lot_ = table_.number_column("minimum lot", Kind::money);
  catalogue::NumberColumn thickness_ = table_.number_column("thickness", Kind::length);
  catalogue::NumberColumn added_mass_ = table_.number_column("added mass", Kind::areal_mass);
  catalogue::NumberColumn max_temperature_ =
      table_.number_column("max service temperature", Kind::temperature);
  catalogue::NumberColumn fatigue_factor_ = table_.number_column("fatigue factor", Kind::ratio);
  std::vector<TableReader::PrefixedColumn> corrosion_;
};

}  // namespace

std::vector<Finish> read_finishes(const std::string& path, const TableFormat& format) {
  FaultList faults;
  TableReader table(read_table_file(path), path, format, faults);
  FinishReader reader(table);
  catalogue::refuse_misspelt_headers(table, faults);
  catalogue::refuse_other_currency(table, format, faults);
  std::vector<Finish> finishes = reader.read(path);
  faults.throw_if_any();
  return finishes;
}

}  // namespace bismar
