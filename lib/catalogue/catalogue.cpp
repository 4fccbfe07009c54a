// SPDX-License-Identifier: MIT
#include <bismar/catalogue/catalogue.hpp>

#include <algorithm>
#include <filesystem>
#include <functional>
#include <iterator>
#include <set>
#include <system_error>
#include <utility>

#include <bismar/error.hpp>

#include "catalogue/text.hpp"
#include "data_locations.hpp"

namespace bismar {

namespace {

namespace fs = std::filesystem;

template <class Entry>
const Entry* find_by_id(const std::vector<Entry>& entries, std::string_view id) {
  const auto found = std::find_if(
      entries.begin(), entries.end(), [&](const Entry& entry) { return entry.id == id; });
  return found == entries.end() ? nullptr : &*found;
}

/// What the materials have, against which the words of the other tables are held.
struct Known {
  using Words = std::set<std::string, std::less<>>;
  Words classes, groups, standards, forms, ids;

  explicit Known(const MaterialTable& materials) {
    for (std::size_t i = 0; i < materials.size(); ++i) {
      const MaterialInfo& info = materials.info(i);
      classes.insert(info.material_class);
      groups.insert(info.group);
      standards.insert(info.standard);
      forms.insert(info.forms.begin(), info.forms.end());
      ids.insert(info.id);
    }
  }
};

/// Collects one sentence a word, however many rows name it.
class UnusedNames {
 public:
  void check(const std::vector<std::string>& words,
             const Known::Words& known,
             std::string_view what,
             const std::string& by) {
    for (const std::string& word : words) {
      if (known.contains(word) || !said_.emplace(by, std::string(what) + word).second) {
        continue;
      }
      sentences_.push_back(by + " names the " + std::string(what) + " " + catalogue::quoted(word) +
                           ", which no material has.");
    }
  }
  std::vector<std::string> take() { return std::move(sentences_); }

 private:
  std::set<std::pair<std::string, std::string>> said_;
  std::vector<std::string> sentences_;
};

bool names_the_same(const StockItem& a, const StockItem& b) {
  return a.classes == b.classes && a.groups == b.groups && a.standards == b.standards &&
         a.forms == b.forms && a.material_ids == b.material_ids;
}

/// Files of sizes in the order of their names, so that the catalogue does not depend on the order
/// in which a file system lists them.
std::vector<fs::path> stock_files(const fs::path& folder, FaultList& faults) {
  std::vector<fs::path> files;
  std::error_code failure;
  for (fs::directory_iterator entry(folder, failure), end; !failure && entry != end;
       entry.increment(failure)) {
    if (entry->path().extension() == ".csv") {
      files.push_back(entry->path());
    }
  }
  if (failure) {
    faults.add(Code::table_unreadable,
               folder.string(),
               "the folder of stock lists cannot be read: " + failure.message() + ".");
  } else if (files.empty()) {
    faults.add(Code::empty,
               folder.string(),
               "the folder of stock lists holds no .csv file: add at least one list of sizes.");
  }
  std::sort(files.begin(), files.end());
  return files;
}

/// Reads one table; its faults join the others.
template <class Table, class Read>
void read_into(Table& table, FaultList& faults, Read&& read) {
  try {
    table = std::forward<Read>(read)();
  } catch (const Error& error) {
    faults.append(error);
  }
}

}  // namespace

const StockList* Catalogue::find_stock(std::string_view id) const { return find_by_id(stock, id); }
const Route* Catalogue::find_route(std::string_view id) const { return find_by_id(routes, id); }
const Finish* Catalogue::find_finish(std::string_view id) const { return find_by_id(finishes, id); }
const Operation* Catalogue::find_operation(std::string_view id) const {
  return find_by_id(operations, id);
}

std::vector<std::string> unused_names(const Catalogue& catalogue) {
  const Known known(catalogue.materials);
  UnusedNames unused;
  for (const StockList& list : catalogue.stock) {
    const std::string by = "The stock list \"" + list.id + "\"";
    const StockItem* last = nullptr;
    for (const StockItem& item : list.items) {
      // Most rows name the same as the row before.
      if (last == nullptr || !names_the_same(*last, item)) {
        unused.check(item.classes, known.classes, "material class", by);
        unused.check(item.groups, known.groups, "material group", by);
        unused.check(item.standards, known.standards, "material standard", by);
        unused.check(item.forms, known.forms, "material form", by);
        unused.check(item.material_ids, known.ids, "material", by);
      }
      last = &item;
    }
  }
  for (const Route& route : catalogue.routes) {
    const std::string by = "The route \"" + route.id + "\"";
    unused.check(route.classes, known.classes, "material class", by);
    unused.check(route.takes, known.forms, "material form", by);
  }
  for (const Finish& finish : catalogue.finishes) {
    unused.check(
        finish.classes, known.classes, "material class", "The finish \"" + finish.id + "\"");
  }
  for (const Operation& operation : catalogue.operations) {
    unused.check(operation.classes,
                 known.classes,
                 "material class",
                 "The operation \"" + operation.id + "\"");
  }
  return unused.take();
}

Catalogue read_catalogue(const std::string& folder) {
  const fs::path root(folder);
  FaultList faults;
  std::error_code failure;
  if (!fs::is_directory(root, failure)) {
    faults.add(Code::table_unreadable,
               folder,
               "there is no such folder of tables: name one with materials.csv, routes.csv, "
               "finishes.csv, operations.csv, weld-zones.csv and the folder stock.");
    faults.throw_if_any();
  }

  Catalogue catalogue;
  read_into(catalogue.materials, faults, [&] {
    return read_materials((root / "materials.csv").string());
  });
  for (const fs::path& file : stock_files(root / "stock", faults)) {
    StockList list;
    read_into(list, faults, [&] { return read_stock(file.string()); });
    catalogue.stock.push_back(std::move(list));
  }
  read_into(catalogue.routes, faults, [&] { return read_routes((root / "routes.csv").string()); });
  read_into(
      catalogue.finishes, faults, [&] { return read_finishes((root / "finishes.csv").string()); });
  read_into(catalogue.operations, faults, [&] {
    return read_operations((root / "operations.csv").string());
  });
  read_into(catalogue.weld_zones, faults, [&] {
    return read_weld_zones((root / "weld-zones.csv").string());
  });
  faults.throw_if_any();

  catalogue.currency = catalogue.materials.currency();
  catalogue.warnings = catalogue.materials.warnings();
  std::ranges::move(unused_names(catalogue), std::back_inserter(catalogue.warnings));
  return catalogue;
}

Catalogue starter_catalogue() {
  const std::vector<std::string> folders = detail::data_locations();
  std::string looked_in;
  for (const std::string& folder : folders) {
    std::error_code failure;
    if (fs::is_regular_file(fs::path(folder) / "materials.csv", failure)) {
      return read_catalogue(folder);
    }
    looked_in += (looked_in.empty() ? "" : ", ") + folder;
  }
  throw Error(Fault{.code = Code::table_unreadable,
                    .where = "starter tables",
                    .found = looked_in,
                    .allowed = "a folder with materials.csv",
                    .message = "the starter tables are in none of these folders: " + looked_in +
                               ". Install the library with its data, or read a folder of your "
                               "own with read_catalogue."});
}

}  // namespace bismar
