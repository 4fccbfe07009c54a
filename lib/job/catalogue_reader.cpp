// SPDX-License-Identifier: MIT
#include "data_locations.hpp"
#include "digest.hpp"
#include "job_reader.hpp"

#include <bismar/catalogue/csv.hpp>

#include <algorithm>
#include <filesystem>
#include <limits>
#include <optional>
#include <system_error>
#include <type_traits>
#include <utility>

namespace bismar::detail {

namespace {

namespace fs = std::filesystem;
using Kind = JsonValue::Kind;

constexpr std::string_view starter = "starter";

/// One entry of a list of tables: a file of the user's, or the starter's files of that kind.
struct Table {
  const JsonValue* value = nullptr;  ///< Null for the default.
  std::string file;                  ///< "starter" or as written.
  std::vector<std::string> paths;
  TableFormat format;
  bool replaces = false;
};

std::string starter_folder() {
  std::string looked_in;
  for (const std::string& folder : data_locations()) {
    std::error_code failure;
    if (fs::is_regular_file(fs::path(folder) / "materials.csv", failure)) {
      return folder;
    }
    looked_in += (looked_in.empty() ? "" : ", ") + folder;
  }
  Fault fault;
  fault.code = Code::table_unreadable;
  fault.found = looked_in;
  fault.allowed = "a folder with materials.csv";
  fault.message = "the starter tables are in none of these folders: " + looked_in +
                  ". Install the program with its data, or name tables of your own.";
  throw Error(std::move(fault));
}

/// In the order of their names, so that nothing depends on how a file system lists them.
std::vector<std::string> starter_files(const std::string& kind) {
  const fs::path folder = starter_folder();
  if (kind != "stock") {
    std::string file = kind + ".csv";
    std::replace(file.begin(), file.end(), '_', '-');  // "weld_zones" is weld-zones.csv
    return {(folder / file).string()};
  }
  std::vector<std::string> files;
  std::error_code failure;
  for (fs::directory_iterator entry(folder / "stock", failure), end; !failure && entry != end;
       entry.increment(failure)) {
    if (entry->path().extension() == ".csv") {
      files.push_back(entry->path().string());
    }
  }
  std::sort(files.begin(), files.end());
  return files;
}

MaterialTableBuilder::Row row_of(const MaterialTable& table,
                                 std::size_t material,
                                 const ThicknessStep& step,
                                 const std::vector<std::string>& extras,
                                 const std::string& file) {
  MaterialTableBuilder::Row row;
  row.info = table.info(material);
  row.above = step.above;
  if (step.up_to < std::numeric_limits<double>::infinity()) {
    row.up_to = step.up_to;
  }
  const Provenance whole = table.provenance(Property::density, step.row);
  row.source = whole.source.empty() ? file : whole.source;
  row.line = whole.row;
  for (const PropertyInfo& property : properties()) {
    if (const std::optional<Range> value = table.value(property.property, step.row)) {
      row.values.emplace(property.property, *value);
      row.evidence.emplace(property.property,
                           table.provenance(property.property, step.row).evidence);
    } else {  // an empty cell has the evidence of its row
      row.row_evidence = table.provenance(property.property, step.row).evidence;
    }
  }
  for (const std::string& name : extras) {
    if (const std::optional<Range> value = table.extra(name, step.row)) {
      row.extras.emplace(name, *value);
    }
  }
  return row;
}

/// Joins material tables; an id of a later table that `replaces` drops the earlier material.
MaterialTable merged(std::vector<MaterialTable> tables,
                     const std::vector<Table>& sources,
                     const std::string& currency) {
  if (tables.size() == 1) {
    return std::move(tables.front());
  }
  std::string name;
  for (const Table& source : sources) {
    name += (name.empty() ? "" : ", ") + source.file;
  }
  MaterialTableBuilder builder(name, currency);
  for (std::size_t t = 0; t < tables.size(); ++t) {
    const std::vector<std::string> extras = tables[t].extra_names();
    for (std::size_t m = 0; m < tables[t].size(); ++m) {
      bool replaced = false;
      for (std::size_t later = t + 1; later < tables.size(); ++later) {
        replaced = replaced || (sources[later].replaces &&
                                tables[later].find(tables[t].info(m).id).has_value());
      }
      if (replaced) {
        continue;
      }
      for (const ThicknessStep& step : tables[t].steps(m)) {
        builder.add(row_of(tables[t], m, step, extras, sources[t].file));
      }
    }
  }
  return builder.build();
}

class CatalogueReader {
 public:
  CatalogueReader(Checker& checker, Job& job) : checker_(checker), job_(job) {}

  void read(const JsonValue* value) {
    const JsonValue* lists = value != nullptr && value->is(Kind::object) ? value : nullptr;
    read_materials_of(tables(lists, "materials"));
    read_list("stock", lists, job_.catalogue.stock, read_stock);
    read_list("routes", lists, job_.catalogue.routes, read_routes);
    read_list("finishes", lists, job_.catalogue.finishes, read_finishes);
    read_list("operations", lists, job_.catalogue.operations, read_operations);
    read_list("weld_zones", lists, job_.catalogue.weld_zones, read_weld_zones);
    job_.catalogue.currency = job_.currency;
    job_.catalogue.warnings = unused_names(job_.catalogue);
  }

 private:
  [[nodiscard]] std::vector<Table> tables(const JsonValue* lists, const std::string& kind) {
    std::vector<Table> all;
    const JsonValue* list = lists != nullptr ? lists->find(kind) : nullptr;
    if (list == nullptr || !list->is(Kind::list)) {
      all.push_back(table_of(nullptr, std::string(starter), kind));
      return all;
    }
    for (const JsonValue& item : list->items) {
      if (!checker_.good(item)) {
        continue;
      }
      if (item.is(Kind::text)) {
        all.push_back(table_of(&item, item.text, kind));
      } else if (const JsonValue* file = item.find("file");
                 file != nullptr && file->is(Kind::text) && checker_.good(*file)) {
        Table table = table_of(&item, file->text, kind);
        read_format(item, table);
        all.push_back(std::move(table));
      }
    }
    return all;
  }

  Table table_of(const JsonValue* value, std::string file, const std::string& kind) {
    Table table;
    table.value = value;
    table.file = std::move(file);
    table.format.currency = job_.currency;
    table.format.rates = &job_.rates;
    if (table.file != starter) {
      table.paths = {(fs::path(job_.folder) / table.file).string()};
      return table;
    }
    try {
      table.format.currency = "EUR";
      table.paths = starter_files(kind);
    } catch (const Error& error) {
      if (!starter_is_lost_) {  // once, not for every kind of table
        add(error, value);
      }
      starter_is_lost_ = true;
    }
    return table;
  }

  void read_format(const JsonValue& value, Table& table) {
    const auto word = [&](std::string_view key) {
      const JsonValue* found = value.find(key);
      return found != nullptr && found->is(Kind::text) && checker_.good(*found) ? found->text
                                                                                : std::string();
    };
    if (const std::string delimiter = word("delimiter"); !delimiter.empty()) {
      table.format.delimiter = delimiter == "tab" ? '\t' : delimiter.front();
    }
    if (const std::string decimal = word("decimal"); !decimal.empty()) {
      table.format.decimal = decimal.front();
    }
    if (const std::string currency = word("currency"); !currency.empty()) {
      if (is_currency_code(currency)) {
        table.format.currency = currency;
      } else {
        checker_.add(Code::unknown_name,
                     *value.find("currency"),
                     currency,
                     "a currency code of ISO 4217",
                     '"' + currency +
                         "\" is no currency code. Write three capital letters (ISO "
                         "4217), such as \"EUR\".");
      }
    }
    if (const JsonValue* replaces = value.find("replaces"); replaces != nullptr) {
      table.replaces = replaces->boolean;
    }
    if (table.format.delimiter == table.format.decimal) {
      checker_.add(Code::conflict,
                   value,
                   std::string(1, table.format.decimal),
                   "two different characters",
                   "delimiter and decimal mark are the same. With a decimal comma write "
                   "\"delimiter\": \";\".");
    }
  }

  void add(const Error& error, const JsonValue* value) {
    if (value != nullptr) {
      checker_.append(error, *value);
    } else {
      checker_.append(error);
    }
  }

  /// Faults of a table carry its file, row and column; a file that cannot be read is a fault of the
  /// job's line that names it.
  template <class Read>
  auto read_one(const Table& table, const std::string& path, Read reader)
      -> std::optional<decltype(reader(path, table.format))> {
    try {
      return reader(path, table.format);
    } catch (const Error& error) {
      const bool unreadable = error.faults().front().code == Code::table_unreadable;
      if (unreadable && table.value != nullptr) {
        for (const Fault& fault : error.faults()) {
          checker_.add(fault.code,
                       *table.value,
                       table.file,
                       "a file that can be read",
                       path + ": " + fault.message);
        }
      } else {
        checker_.append(error);
      }
      return std::nullopt;
    }
  }

  void note_source(const std::string& kind, const Table& table) {
    Digest digest;
    for (const std::string& path : table.paths) {
      digest.add(fs::path(path).filename().string());
      digest.add(std::string_view("\0", 1));
      digest.add(read_table_file(path));
      digest.add(std::string_view("\0", 1));
    }
    job_.sources.push_back({kind, table.file, digest.text()});
  }

  void read_materials_of(const std::vector<Table>& all) {
    std::vector<MaterialTable> read;
    std::vector<Table> sources;
    bool complete = true;
    for (const Table& table : all) {
      for (const std::string& path : table.paths) {
        auto materials = read_one(table, path, read_materials);
        complete = complete && materials.has_value();
        if (materials.has_value()) {
          read.push_back(std::move(*materials));
          sources.push_back(table);
          note_source("materials", table);
        }
      }
    }
    if (read.empty()) {
      return;
    }
    if (complete) {
      report_repeated(read, sources);
    }
    try {
      job_.catalogue.materials = merged(std::move(read), sources, job_.currency);
    } catch (const Error& error) {
      checker_.append(error);
    }
  }

  /// Materials of one id in two files: said once each, with the file of the later one.
  void report_repeated(std::vector<MaterialTable>& read, const std::vector<Table>& sources) {
    for (std::size_t later = 1; later < read.size(); ++later) {
      if (sources[later].replaces || sources[later].value == nullptr) {
        continue;
      }
      for (std::size_t m = 0; m < read[later].size(); ++m) {
        const std::string& id = read[later].info(m).id;
        for (std::size_t earlier = 0; earlier < later; ++earlier) {
          if (read[earlier].find(id).has_value()) {
            add_repeated(*sources[later].value, "material", id, sources[later].file);
            read.resize(later);  // merging would only say it again
            return;
          }
        }
      }
    }
  }

  void add_repeated(const JsonValue& value,
                    std::string_view what,
                    const std::string& id,
                    const std::string& file) {
    checker_.add(Code::duplicate,
                 value,
                 id,
                 "ids of its own",
                 "the " + std::string(what) + " \"" + id + "\" of " + file +
                     " is in an earlier table too. Give it another id, or write {\"file\": \"" +
                     file + "\", \"replaces\": true} to put it in the place of the earlier one.");
  }

  template <class Entry>
  void take(std::vector<Entry>& target, Entry entry, const Table& table, const std::string& kind) {
    const auto same = std::find_if(
        target.begin(), target.end(), [&](const Entry& other) { return other.id == entry.id; });
    if (same == target.end()) {
      target.push_back(std::move(entry));
    } else if (table.replaces) {
      *same = std::move(entry);
    } else if (table.value != nullptr) {
      add_repeated(*table.value, "entry of " + kind, entry.id, table.file);
    }
  }

  template <class Entry, class Read>
  void read_list(const std::string& kind,
                 const JsonValue* lists,
                 std::vector<Entry>& target,
                 Read reader) {
    for (const Table& table : tables(lists, kind)) {
      bool all_read = !table.paths.empty();
      for (const std::string& path : table.paths) {
        auto entries = read_one(table, path, reader);
        if (!entries.has_value()) {
          all_read = false;
          continue;
        }
        if constexpr (std::is_same_v<Entry, StockList>) {
          take(target, std::move(*entries), table, kind);
        } else {
          for (Entry& entry : *entries) {
            take(target, std::move(entry), table, kind);
          }
        }
      }
      if (all_read) {
        note_source(kind, table);
      }
    }
  }

  Checker& checker_;
  Job& job_;
  bool starter_is_lost_ = false;
};

}  // namespace

void JobReader::read_catalogue(const JsonValue* value) {
  const std::size_t before = checker_.faults();
  CatalogueReader(checker_, job_).read(value);
  const bool well_formed = value == nullptr || checker_.good(*value);
  tables_read_ = checker_.faults() == before && well_formed;
}

}  // namespace bismar::detail
