// SPDX-License-Identifier: MIT
// Reads a material table; what a row means is checked by MaterialTableBuilder.
#include <bismar/catalogue/materials.hpp>
#include <bismar/catalogue/table_reader.hpp>
#include <bismar/error.hpp>

#include <algorithm>
#include <array>
#include <cstdint>
#include <string>
#include <utility>
#include <vector>

#include "catalogue/text.hpp"

namespace bismar {

namespace {

using catalogue::folded;
using catalogue::quoted;

constexpr std::array<std::string_view, 3> basis_words = {"minimum", "typical", "indicative"};
constexpr std::array<std::string_view, 3> use_words = {"yes", "on request", "no"};
constexpr std::array<std::string_view, 3> rating_words = {"poor", "fair", "good"};
constexpr std::array<std::string_view, 3> isotropy_words = {"yes", "no", "in plane"};
constexpr std::array<std::string_view, 4> evidence_words = {
    "from memory", "seen", "estimated", "user"};

/// Which part of a value a source confirms.
enum class SeenPart : std::uint8_t { whole, low, high, within };

/// "alloy X, T6" -> "alloy-x-t6"
std::string slug(std::string_view text) {
  std::string result;
  for (const char c : folded(text)) {
    const bool is_separator = (c >= '\0' && c < '0' && c != '.') || (c > '9' && c < 'A');
    if (!is_separator) {
      result += c;
    } else if (!result.empty() && result.back() != '-') {
      result += '-';
    }
  }
  while (!result.empty() && result.back() == '-') {
    result.pop_back();
  }
  return result;
}

class MaterialReader {
 public:
  MaterialReader(std::string text, std::string name, const TableFormat& format)
      : table_(std::move(text), std::move(name), format, faults_) {}

  MaterialTable run() {
    find_columns();
    MaterialTableBuilder builder(table_.document().name(), table_.currency());
    for (std::size_t i = 0; i < columns_.size(); ++i) {
      if (const auto index = columns_[i].index()) {
        builder.set_header(properties()[i].property,
                           std::string(catalogue::trim(table_.document().header(*index))),
                           *index + 1);
      }
    }
    for (const std::string& note : table_.notes()) {
      builder.add_warning(note);
    }
    builder.reserve(table_.rows());
    for (std::size_t row = 0; row < table_.rows(); ++row) {
      builder.add(read_row(row));
    }
    // What the rows mean can be checked although some cells are faulty: they read as missing.
    if (faults_.empty()) {
      return builder.build();
    }
    if (table_.rows() > 0) {
      try {
        static_cast<void>(builder.build());
      } catch (const Error& error) {
        append_unreported(error);
      }
    }
    throw Error(std::vector<Fault>(faults_.faults().begin(), faults_.faults().end()));
  }

 private:
  using Column = TableReader::Column;
  using NumberColumn = TableReader::NumberColumn;
  struct TextColumn {
    std::string name;
    Column column;
  };
  struct ExtraColumn {
    std::string name;
    NumberColumn column;
  };

  void find_columns() {
    name_ = table_.text_column("name");
    id_ = table_.text_column("id", name_.is_present() ? Presence::optional : Presence::required);
    class_ = table_.text_column("class", Presence::required);
    standard_ = table_.text_column("standard");
    condition_ = table_.text_column("condition");
    group_ = table_.text_column("group");
    isotropic_ = table_.text_column("isotropic");
    use_ = table_.text_column("structural use");
    forms_ = table_.text_column("forms");
    processes_ = table_.text_column("processes");
    above_ = table_.number_column("thickness above", QuantityKind::length);
    limit_ = table_.number_column("thickness limit", QuantityKind::length);
    basis_ = table_.text_column("basis");
    source_ = table_.text_column("source");
    evidence_ = table_.text_column("evidence");
    seen_ = table_.text_column("seen columns");
    estimated_ = table_.text_column("estimated columns");
    notes_ = table_.text_column("notes");
    corrosion_ = table_.text_columns_with_prefix("corrosion in");
    columns_.reserve(property_count);
    for (const PropertyInfo& known : properties()) {
      columns_.push_back(table_.number_column(known.name, known.kind));
      property_names_.push_back(known.name);
    }
    for (const PropertyInfo& known : properties()) {
      const std::string name = std::string(known.name) + " basis";
      if (table_.has_column(name)) {
        texts_.push_back({name, table_.text_column(name)});
      }
    }
    table_.finish_columns();
    for (const TableReader::UnknownColumn& unknown : table_.unknown_columns()) {
      if (const auto numbers = table_.as_numbers(unknown)) {
        extras_.push_back(
            {unknown.unit ? unknown.name + " [" + *unknown.unit + ']' : unknown.name, *numbers});
      } else if (!unknown.unit) {
        texts_.push_back({unknown.name, Column{unknown.index}});
      }
    }
  }

  MaterialTableBuilder::Row read_row(std::size_t row) {
    MaterialTableBuilder::Row result;
    result.line = table_.line(row);
    result.info = read_info(row);
    result.source = std::string(table_.text(row, source_));
    result.row_evidence = read_word<Evidence>(row, evidence_, evidence_words, Evidence::user);
    result.above = table_.value(row, above_).value_or(0.0);
    result.up_to = table_.value(row, limit_);
    for (std::size_t i = 0; i < columns_.size(); ++i) {
      if (const auto range = table_.range(row, columns_[i])) {
        result.values.emplace_hint(result.values.end(), properties()[i].property, *range);
      }
    }
    for (const ExtraColumn& extra : extras_) {
      if (const auto range = table_.range(row, extra.column)) {
        result.extras[extra.name] = *range;
      }
    }
    for (const TextColumn& text : texts_) {
      const std::string_view cell = table_.text(row, text.column);
      if (!cell.empty()) {
        result.texts[text.name] = std::string(cell);
      }
    }
    read_seen(row, result);
    read_estimated(row, result);
    return result;
  }

  MaterialInfo read_info(std::size_t row) {
    MaterialInfo info;
    info.name =
        std::string(name_.is_present() ? table_.required_text(row, name_) : table_.text(row, id_));
    info.condition = std::string(table_.text(row, condition_));
    info.id = id_.is_present() ? std::string(table_.required_text(row, id_))
                               : slug(info.name + ' ' + info.condition);
    info.standard = std::string(table_.text(row, standard_));
    info.material_class = std::string(table_.required_text(row, class_));
    info.group = std::string(table_.text(row, group_));
    const bool has_grain = info.material_class == "wood" || info.material_class == "composite";
    const auto isotropy = table_.word(row, isotropic_, isotropy_words);
    info.isotropic = isotropy ? *isotropy != 1 : !has_grain;
    info.in_plane_only = isotropy && *isotropy == 2;
    info.use = read_word<StructuralUse>(row, use_, use_words, StructuralUse::yes);
    info.forms = table_.list(row, forms_);
    info.processes = table_.list(row, processes_);
    info.basis = read_word<Basis>(row, basis_, basis_words, Basis::typical);
    info.notes = std::string(table_.text(row, notes_));
    for (const TableReader::PrefixedColumn& medium : corrosion_) {
      if (const auto rating = table_.word(row, medium.column, rating_words)) {
        info.corrosion.emplace(medium.rest, static_cast<Rating>(*rating));
      }
    }
    return info;
  }

  /// The words stand in the order of the enumeration.
  template <typename Enum>
  Enum read_word(std::size_t row,
                 const Column& column,
                 std::span<const std::string_view> words,
                 Enum otherwise) {
    const auto found = table_.word(row, column, words);
    return found ? static_cast<Enum>(*found) : otherwise;
  }

  /// The property that a name in a list means; a fault when there is none.
  std::optional<Property> listed_property(std::size_t row,
                                          const Column& column,
                                          std::string_view name) {
    if (const auto found = property(name)) {
      return found;
    }
    table_.add_fault(
        row,
        *column.index,
        Code::cell_invalid,
        quoted(name) + " is not the name of a property." + did_you_mean(name, property_names_));
    return std::nullopt;
  }

  void read_seen(std::size_t row, MaterialTableBuilder::Row& result) {
    for (const std::string& item : table_.list(row, seen_)) {
      const std::size_t colon = item.find(':');
      if (colon == std::string::npos) {
        table_.add_fault(row,
                         *seen_.index,
                         Code::cell_invalid,
                         quoted(item) + " names no source: write \"key: column, column\".");
        continue;
      }
      const std::string key(catalogue::trim(std::string_view(item).substr(0, colon)));
      for (const std::string_view word :
           catalogue::split(std::string_view(item).substr(colon + 1), ',')) {
        if (folded(word) == "thickness limit") {
          continue;
        }
        const auto [name, part] = split_seen(word);
        const auto found = listed_property(row, seen_, name);
        if (found) {
          add_seen(result, *found, part, key);
        }
      }
    }
  }

  static std::pair<std::string_view, SeenPart> split_seen(std::string_view word) {
    static constexpr std::array<std::pair<std::string_view, SeenPart>, 3> endings = {
        {{" min", SeenPart::low}, {" max", SeenPart::high}, {" within", SeenPart::within}}};
    for (const auto& [ending, part] : endings) {
      if (word.size() > ending.size() && word.substr(word.size() - ending.size()) == ending) {
        return {catalogue::trim(word.substr(0, word.size() - ending.size())), part};
      }
    }
    return {word, SeenPart::whole};
  }

  static void add_seen(MaterialTableBuilder::Row& result,
                       Property seen,
                       SeenPart part,
                       const std::string& key) {
    static constexpr std::array<std::string_view, 4> remarks = {
        "", " (low end)", " (high end)", " (a value within)"};
    std::string& keys = result.keys[seen];
    if (!keys.empty()) {
      keys += ", ";
    }
    keys += key + std::string(remarks[static_cast<std::size_t>(part)]);
    const RangeEnd used = info(seen).default_end;
    const bool counts = part == SeenPart::whole ||
                        (part == SeenPart::low && used == RangeEnd::low) ||
                        (part == SeenPart::high && used == RangeEnd::high);
    if (counts) {
      result.evidence[seen] = Evidence::seen;
    }
  }

  void read_estimated(std::size_t row, MaterialTableBuilder::Row& result) {
    for (const std::string& name : table_.list(row, estimated_)) {
      const auto found = listed_property(row, estimated_, name);
      if (!found) {
        continue;
      }
      if (result.evidence.contains(*found)) {
        table_.add_fault(row,
                         *estimated_.index,
                         Code::conflict,
                         quoted(name) + " is listed as seen too: a value is one or the other.");
      }
      result.evidence[*found] = Evidence::estimated;
    }
  }

  /// A required cell that is empty was reported with its column already.
  void append_unreported(const Error& error) {
    for (const Fault& fault : error.faults()) {
      if (fault.code != Code::missing) {
        faults_.add(fault);
      }
    }
  }

  FaultList faults_;
  TableReader table_;
  Column id_, name_, class_, standard_, condition_, group_, isotropic_, use_, forms_, processes_;
  Column basis_, source_, evidence_, seen_, estimated_, notes_;
  NumberColumn above_, limit_;
  std::vector<TableReader::PrefixedColumn> corrosion_;
  std::vector<NumberColumn> columns_;  // in the order of properties()
  std::vector<std::string_view> property_names_;
  std::vector<ExtraColumn> extras_;
  std::vector<TextColumn> texts_;
};

}  // namespace

MaterialTable read_materials_text(std::string_view text,
                                  std::string_view table_name,
                                  const TableFormat& format) {
  return MaterialReader(std::string(text), std::string(table_name), format).run();
}

MaterialTable read_materials(const std::string& path, const TableFormat& format) {
  return MaterialReader(read_table_file(path), path, format).run();
}

}  // namespace bismar
