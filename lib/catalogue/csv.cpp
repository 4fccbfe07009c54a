// SPDX-License-Identifier: MIT
#include <bismar/catalogue/csv.hpp>

#include <algorithm>
#include <cerrno>
#include <cstdio>
#include <filesystem>
#include <memory>
#include <system_error>
#include <unordered_map>
#include <utility>

#include "catalogue/text.hpp"

namespace bismar {

namespace {

bool is_usable_delimiter(char c) {
  return c > '\0' && c != '"' && c != '\r' && c != '\n';  // char may be signed: > 0 means ASCII
}

Fault bad_delimiter(char c) {
  Fault fault;
  fault.code = Code::invalid_argument;
  fault.where = "delimiter";
  fault.found = std::string(1, c);
  fault.allowed = "an ASCII character other than the quote, line ends and NUL";
  fault.message = "The delimiter must be " + fault.allowed + ".";
  return fault;
}

/// Length of the UTF-8 sequence that starts at `at`, 0 where there is none. Overlong forms,
/// surrogates and values past U+10FFFF are no UTF-8.
std::size_t utf8_length(std::string_view text, std::size_t at) {
  const auto byte = [&](std::size_t i) { return static_cast<unsigned char>(text[i]); };
  const auto follows = [&](std::size_t i, unsigned low = 0x80, unsigned high = 0xBF) {
    return i < text.size() && byte(i) >= low && byte(i) <= high;
  };
  const unsigned lead = byte(at);
  if (lead < 0x80) {
    return 1;
  }
  if (lead >= 0xC2 && lead <= 0xDF) {
    return follows(at + 1) ? 2 : 0;
  }
  if (lead >= 0xE0 && lead <= 0xEF) {
    const unsigned low = lead == 0xE0 ? 0xA0 : 0x80;
    const unsigned high = lead == 0xED ? 0x9F : 0xBF;
    return follows(at + 1, low, high) && follows(at + 2) ? 3 : 0;
  }
  if (lead >= 0xF0 && lead <= 0xF4) {
    const unsigned low = lead == 0xF0 ? 0x90 : 0x80;
    const unsigned high = lead == 0xF4 ? 0x8F : 0xBF;
    return follows(at + 1, low, high) && follows(at + 2) && follows(at + 3) ? 4 : 0;
  }
  return 0;
}

}  // namespace

/// One pass over the text. Faults in the form of a cell are reported once and the reading goes on
/// as well as it can, so that the next fault is found too.
class CsvParser {
 public:
  CsvParser(CsvDocument& document, char delimiter, FaultList& faults)
      : document_(document), text_(document.text_), delimiter_(delimiter), faults_(faults) {
    // Cells with doubled quotes are appended to the text: the reading ends where the file ends.
    end_ = text_.size();
  }

  void run() {
    if (!is_text()) {
      return;
    }
    if (std::string_view(text_).substr(0, 3) == "\xEF\xBB\xBF") {
      at_ = 3;
    }
    while (at_ < end_) {
      read_row();
    }
    if (document_.columns_ == 0 && !malformed_) {
      report(Code::empty,
             1,
             1,
             "the table is empty: it needs a header row and at least one data row.");
    } else if (document_.columns_ != 0 && document_.lines_.empty() && !malformed_) {
      report(Code::empty,
             document_.header_line_,
             1,
             "the table has a header but no data row: add at least one.");
    }
  }

 private:
  /// UTF-16 and binary files would give a fault for every cell: one is enough.
  bool is_text() {
    const std::string_view text = text_;
    if (text.substr(0, 2) == "\xFF\xFE" || text.substr(0, 2) == "\xFE\xFF") {
      report(Code::table_malformed, 1, 1, "the file is UTF-16 text: save it as \"CSV UTF-8\".");
      return false;
    }
    for (std::size_t i = 0; i < text.size();) {
      const bool is_ascii = text[i] > '\0' && static_cast<unsigned char>(text[i]) < 0x80U;
      const std::size_t length = is_ascii ? 1 : utf8_length(text, i);
      if (text[i] == '\0' || length == 0) {
        report_byte(i);
        return false;
      }
      i += length;
    }
    return true;
  }

  void report_byte(std::size_t at) {
    std::size_t line = 1;
    std::size_t line_start = 0;
    for (std::size_t i = 0; i < at; ++i) {
      if (!is_line_end(i)) {
        continue;
      }
      ++line;
      line_start = i + 1;
    }
    const std::string byte = std::to_string(at - line_start + 1);
    const char* what = text_[at] == '\0'
                           ? " of the line is a NUL: this is no CSV text."
                           : " of the line is not UTF-8: save the file as \"CSV UTF-8\".";
    report(Code::table_malformed, line, column_at(line_start, at), "byte " + byte + what);
  }

  [[nodiscard]] bool is_line_end(std::size_t i) const {
    return text_[i] == '\n' || (text_[i] == '\r' && (i + 1 >= end_ || text_[i + 1] != '\n'));
  }

  [[nodiscard]] std::size_t column_at(std::size_t from, std::size_t to) const {
    const auto begin = text_.begin();
    return 1 + static_cast<std::size_t>(std::count(begin + static_cast<std::ptrdiff_t>(from),
                                                   begin + static_cast<std::ptrdiff_t>(to),
                                                   delimiter_));
  }

  void read_row() {
    const std::size_t row_line = line_;
    row_.clear();
    bool holds_something = false;
    for (bool more = true; more;) {
      const bool quoted = at_ < end_ && text_[at_] == '"';
      const CsvDocument::Piece piece = quoted ? read_quoted() : read_plain();
      holds_something =
          holds_something || quoted || !catalogue::trim(document_.view(piece)).empty();
      row_.push_back(piece);
      more = at_ < end_ && text_[at_] == delimiter_;
      if (more) {
        ++at_;
      }
    }
    pass_line_end();
    if (!holds_something) {
      return;
    }
    if (document_.columns_ == 0) {
      take_header(row_line);
    } else {
      take_row(row_line);
    }
  }

  void pass_line_end() {
    if (at_ >= end_) {
      return;
    }
    if (text_[at_] == '\r' && at_ + 1 < end_ && text_[at_ + 1] == '\n') {
      ++at_;
    }
    ++at_;
    ++line_;
  }

  [[nodiscard]] bool at_cell_end() const {
    const char c = text_[at_];
    return c == delimiter_ || c == '\n' || c == '\r';
  }

  CsvDocument::Piece read_plain() {
    const std::size_t begin = at_;
    bool quote = false;
    for (; at_ < end_ && !at_cell_end(); ++at_) {
      quote = quote || text_[at_] == '"';
    }
    if (quote) {
      report(Code::table_malformed,
             line_,
             row_.size() + 1,
             "a quote inside an unquoted cell: put the whole cell in quotes and double the quotes "
             "inside it.");
    }
    return {begin, at_};
  }

  CsvDocument::Piece read_quoted() {
    const std::size_t opening_line = line_;
    const std::size_t begin = ++at_;
    bool doubled = false;
    while (at_ < end_) {
      if (text_[at_] != '"') {
        if (is_line_end(at_)) {
          ++line_;
        }
        ++at_;
      } else if (at_ + 1 < end_ && text_[at_ + 1] == '"') {
        doubled = true;
        at_ += 2;
      } else {
        const std::size_t close = at_++;
        pass_over_tail();
        return doubled ? without_doubled_quotes(begin, close) : CsvDocument::Piece{begin, close};
      }
    }
    report(Code::table_malformed,
           opening_line,
           row_.size() + 1,
           "the quote that opens this cell is never closed.");
    return {begin, end_};
  }

  /// Blanks behind a closing quote do no harm; anything else means that a quote was not doubled.
  void pass_over_tail() {
    bool text_behind = false;
    for (; at_ < end_ && !at_cell_end(); ++at_) {
      text_behind = text_behind || (text_[at_] != ' ' && text_[at_] != '\t');
    }
    if (text_behind) {
      report(Code::table_malformed,
             line_,
             row_.size() + 1,
             "text behind the closing quote of a cell: double every quote inside a quoted cell.");
    }
  }

  CsvDocument::Piece without_doubled_quotes(std::size_t begin, std::size_t close) {
    const std::size_t start = text_.size();
    for (std::size_t i = begin; i < close; ++i) {
      text_ += text_[i];
      if (text_[i] == '"') {
        ++i;
      }
    }
    return {start, text_.size()};
  }

  void take_header(std::size_t line) {
    document_.columns_ = row_.size();
    document_.header_line_ = line;
    document_.headers_ = row_;
    std::unordered_map<std::string, std::size_t> first;
    for (std::size_t i = 0; i < row_.size(); ++i) {
      const std::string key = catalogue::folded(document_.view(row_[i]));
      if (key.empty()) {
        continue;
      }
      const auto [known, is_new] = first.emplace(key, i);
      if (is_new) {
        continue;
      }
      report(Code::duplicate,
             line,
             i + 1,
             "the header " + catalogue::quoted(document_.view(row_[i])) +
                 " is already that of column " + std::to_string(known->second + 1) +
                 ": rename one of them.");
    }
  }

  void take_row(std::size_t line) {
    if (row_.size() == document_.columns_) {
      document_.cells_.insert(document_.cells_.end(), row_.begin(), row_.end());
      document_.lines_.push_back(line);
      return;
    }
    report(Code::table_malformed,
           line,
           std::min(row_.size(), document_.columns_) + 1,
           "the row has " + std::to_string(row_.size()) + " cells, the header has " +
               std::to_string(document_.columns_) +
               ": add or remove delimiters, or quote the cell that holds one.");
  }

  void report(Code code, std::size_t line, std::size_t column, std::string message) {
    malformed_ = malformed_ || code == Code::table_malformed;
    faults_.add(code,
                document_.name_ + ':' + std::to_string(line) + ':' + std::to_string(column),
                std::move(message));
  }

  CsvDocument& document_;
  std::string& text_;
  char delimiter_;
  FaultList& faults_;
  std::size_t end_ = 0;  // of the file's own text
  std::size_t at_ = 0;
  std::size_t line_ = 1;
  bool malformed_ = false;
  std::vector<CsvDocument::Piece> row_;
};

CsvDocument CsvDocument::parse(std::string text,
                               std::string name,
                               char delimiter,
                               FaultList& faults) {
  CsvDocument document;
  document.name_ = std::move(name);
  if (!is_usable_delimiter(delimiter)) {
    faults.add(bad_delimiter(delimiter));
    return document;
  }
  document.text_ = std::move(text);
  CsvParser(document, delimiter, faults).run();
  return document;
}

std::string CsvDocument::where(std::size_t row, std::size_t column) const {
  return name_ + ':' + std::to_string(lines_[row]) + ':' + std::to_string(column + 1);
}

std::string CsvDocument::where_header(std::size_t column) const {
  return name_ + ':' + std::to_string(header_line_) + ':' + std::to_string(column + 1);
}

CsvWriter::CsvWriter(char delimiter) : delimiter_(delimiter) {
  if (!is_usable_delimiter(delimiter)) {
    throw Error(bad_delimiter(delimiter));
  }
}

void CsvWriter::add_cell(std::string_view cell, bool first) {
  if (!first) {
    text_ += delimiter_;
  }
  const auto special = [&](char c) {
    return c == delimiter_ || c == '"' || c == '\n' || c == '\r';
  };
  // Outer blanks are quoted too: many programs drop them from an unquoted cell. So is a byte order
  // mark at the very start, which a reader would pass over.
  const bool quote = std::any_of(cell.begin(), cell.end(), special) ||
                     catalogue::trim(cell).size() != cell.size() ||
                     (text_.empty() && cell.substr(0, 3) == "\xEF\xBB\xBF");
  if (!quote) {
    text_ += cell;
    return;
  }
  text_ += '"';
  for (const char c : cell) {
    text_ += c;
    if (c == '"') {
      text_ += c;
    }
  }
  text_ += '"';
}

void CsvWriter::add_row(std::span<const std::string_view> cells) {
  // A row of empty cells alone would be no row for the reader.
  const bool all_empty =
      std::all_of(cells.begin(), cells.end(), [](std::string_view cell) { return cell.empty(); });
  for (std::size_t i = 0; i < cells.size(); ++i) {
    add_cell(cells[i], i == 0);
  }
  if (all_empty && !cells.empty()) {
    text_.insert(text_.size() - (cells.size() - 1), "\"\"");
  }
  text_ += '\n';
}

void CsvWriter::add_row(std::span<const std::string> cells) {
  const std::vector<std::string_view> views(cells.begin(), cells.end());
  add_row(std::span<const std::string_view>(views));
}

std::string CsvWriter::take() { return std::exchange(text_, std::string()); }

std::string read_table_file(const std::string& path) {
  const auto unreadable = [&](const std::string& reason) {
    Fault fault;
    fault.code = Code::table_unreadable;
    fault.where = path;
    fault.message = "the file cannot be read: " + reason + ".";
    return Error(std::move(fault));
  };
  std::error_code status_error;
  if (std::filesystem::is_directory(path, status_error)) {
    throw unreadable("it is a folder");
  }
  const auto close = [](std::FILE* file) { std::fclose(file); };
  const std::unique_ptr<std::FILE, decltype(close)> file(std::fopen(path.c_str(), "rb"), close);
  if (!file) {
    throw unreadable(std::generic_category().message(errno));
  }
  std::string text;
  const auto size = std::filesystem::file_size(path, status_error);
  if (!status_error) {
    text.reserve(static_cast<std::size_t>(size));
  }
  char block[65536];
  while (const std::size_t read = std::fread(block, 1, sizeof block, file.get())) {
    text.append(block, read);
  }
  if (std::ferror(file.get()) != 0) {
    throw unreadable("reading failed half way");
  }
  return text;
}

}  // namespace bismar
