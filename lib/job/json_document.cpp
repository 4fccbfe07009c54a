// SPDX-License-Identifier: MIT
#include "json_document.hpp"

#include <bismar/quantity/parse.hpp>

#include <nlohmann/json.hpp>

#include <algorithm>
#include <set>
#include <utility>

namespace bismar::detail {

namespace {

constexpr std::string_view byte_order_mark = "\xEF\xBB\xBF";

bool is_blank(char c) { return c == ' ' || c == '\t' || c == '\n' || c == '\r'; }

/// nlohmann's messages name their own exception first and the place second: both stand elsewhere.
std::string reason_of(std::string message) {
  for (const std::string_view mark : {"syntax error ", "parse error: "}) {
    const std::size_t at = message.find(mark);
    if (at != std::string::npos) {
      message.erase(0, at);
      break;
    }
  }
  return message;
}

}  // namespace

const JsonValue* JsonValue::find(std::string_view key) const {
  for (const Member& member : members) {
    if (member.key == key) {
      return &member.value;
    }
  }
  return nullptr;
}

std::string_view phrase(JsonValue::Kind kind) {
  switch (kind) {
    case JsonValue::Kind::null:
      return "null";
    case JsonValue::Kind::boolean:
      return "true or false";
    case JsonValue::Kind::number:
      return "a number";
    case JsonValue::Kind::text:
      return "a text";
    case JsonValue::Kind::list:
      return "a list";
    case JsonValue::Kind::object:
      return "an object";
  }
  throw InternalError("JSON value of no kind");
}

std::string shown(const JsonValue& value) {
  switch (value.kind) {
    case JsonValue::Kind::null:
      return "null";
    case JsonValue::Kind::boolean:
      return value.boolean ? "true" : "false";
    case JsonValue::Kind::number:
      return value.text;
    case JsonValue::Kind::text: {
      constexpr std::size_t longest = 60;
      if (value.text.size() <= longest) {
        return '"' + value.text + '"';
      }
      std::size_t end = longest;
      while (end > 0 && (static_cast<unsigned char>(value.text[end]) & 0xC0U) == 0x80U) {
        --end;  // never cut a character in two
      }
      return '"' + value.text.substr(0, end) + "...\"";
    }
    case JsonValue::Kind::list:
    case JsonValue::Kind::object:
      return std::string(phrase(value.kind));
  }
  throw InternalError("JSON value of no kind");
}

std::string pointer_step(std::string_view key) {
  std::string step;
  for (const char c : key) {
    if (c == '~') {
      step += "~0";
    } else if (c == '/') {
      step += "~1";
    } else {
      step += c;
    }
  }
  return step;
}

/// Takes nlohmann's events and builds the values. The events carry no positions, but they come in
/// the order of the text, one for each token except ',' and ':': so a cursor that steps over
/// blanks, comments and those two stands on the token of every event.
class JsonBuilder final : public nlohmann::json_sax<nlohmann::json> {
 public:
  JsonBuilder(JsonDocument& document, FaultList& faults) : document_(document), faults_(faults) {
    if (document_.text_.starts_with(byte_order_mark)) {
      cursor_ = byte_order_mark.size();
    }
  }

  bool null() override {
    add(JsonValue::Kind::null, 4);
    return true;
  }
  bool boolean(bool value) override {
    add(JsonValue::Kind::boolean, value ? 4 : 5).boolean = value;
    return true;
  }
  bool number_integer(number_integer_t /*value*/) override { return add_number(); }
  bool number_unsigned(number_unsigned_t /*value*/) override { return add_number(); }
  bool number_float(number_float_t /*value*/, const string_t& /*text*/) override {
    return add_number();
  }
  bool string(string_t& value) override {
    add(JsonValue::Kind::text, string_length()).text = std::move(value);
    return true;
  }
  bool binary(binary_t& /*value*/) override { return false; }

  bool start_object(std::size_t /*elements*/) override {
    keys_.emplace_back();
    return open(JsonValue::Kind::object);
  }
  bool key(string_t& value) override {
    step_to_token();
    const std::size_t offset = cursor_;
    cursor_ += string_length();
    if (!keys_.back().insert(value).second) {
      Fault fault;
      fault.code = Code::duplicate;
      fault.where = document_.where(offset, container_pointer() + '/' + pointer_step(value));
      fault.found = value;
      fault.allowed = "each key once";
      fault.message = "the key \"" + value + "\" stands twice in this object. Keep one of them.";
      faults_.add(std::move(fault));
    }
    path_.back()->members.push_back({std::move(value), offset, {}});
    return true;
  }
  bool end_object() override {
    keys_.pop_back();
    return close();
  }
  bool start_array(std::size_t /*elements*/) override { return open(JsonValue::Kind::list); }
  bool end_array() override { return close(); }

  bool parse_error(std::size_t position,
                   const std::string& last_token,
                   const nlohmann::detail::exception& error) override {
    // The position counts bytes read, the last one included.
    std::size_t offset = std::min(position, document_.text_.size());
    offset = offset > 0 ? offset - 1 : 0;
    Fault fault;
    if (error.id == 406) {  // out_of_range: number overflow
      step_to_token();
      place();
      fault.code = Code::not_finite;
      fault.where = document_.where(cursor_, value_pointer());
      fault.found = last_token;
      fault.allowed = "a finite number";
      fault.message = "the number " + last_token + " is too large to compute with.";
    } else {
      fault.code = Code::json_malformed;
      fault.where = document_.where(offset, {});
      fault.found = last_token;
      fault.allowed = "JSON, with // and /* */ comments";
      fault.message = "this is not JSON: " + reason_of(error.what()) + '.';
    }
    faults_.add(std::move(fault));
    return false;
  }

 private:
  void step_to_token() {
    const std::string& text = document_.text_;
    while (cursor_ < text.size()) {
      const char c = text[cursor_];
      if (is_blank(c) || c == ',' || c == ':') {
        ++cursor_;
      } else if (c == '/' && cursor_ + 1 < text.size() && text[cursor_ + 1] == '/') {
        cursor_ = std::min(text.find_first_of("\r\n", cursor_), text.size());
      } else if (c == '/' && cursor_ + 1 < text.size() && text[cursor_ + 1] == '*') {
        const std::size_t end = text.find("*/", cursor_ + 2);
        cursor_ = end == std::string::npos ? text.size() : end + 2;
      } else {
        return;
      }
    }
  }

  /// Length of the string token under the cursor, quotes included.
  [[nodiscard]] std::size_t string_length() {
    step_to_token();
    const std::string& text = document_.text_;
    std::size_t end = cursor_ + 1;
    while (end < text.size() && text[end] != '"') {
      end += text[end] == '\\' ? std::size_t{2} : std::size_t{1};
    }
    return end + 1 - cursor_;
  }

  JsonValue& place() {
    if (path_.empty()) {
      return document_.root_;
    }
    JsonValue& parent = *path_.back();
    if (parent.is(JsonValue::Kind::object)) {
      return parent.members.back().value;
    }
    return parent.items.emplace_back();
  }

  JsonValue& add(JsonValue::Kind kind, std::size_t length) {
    step_to_token();
    JsonValue& value = place();
    value.kind = kind;
    value.offset = cursor_;
    cursor_ += length;
    return value;
  }

  bool add_number() {
    step_to_token();
    const std::string& text = document_.text_;
    const std::size_t end =
        std::min(text.find_first_not_of("+-.0123456789eE", cursor_), text.size());
    const std::string literal = text.substr(cursor_, end - cursor_);
    JsonValue& value = add(JsonValue::Kind::number, literal.size());
    try {
      value.number = parse_number(literal);
    } catch (const Error& error) {  // too close to zero for a double
      faults_.append(error, document_.where(value.offset, value_pointer()));
    }
    value.text = literal;
    return true;
  }

  bool open(JsonValue::Kind kind) {
    JsonValue& value = add(kind, 1);
    if (path_.size() == json_depth_limit) {
      Fault fault;
      fault.code = Code::json_malformed;
      fault.where = document_.where(value.offset, {});
      fault.found = "nesting deeper than " + std::to_string(json_depth_limit);
      fault.allowed = "at most " + std::to_string(json_depth_limit) + " levels";
      fault.message = "objects and lists are nested deeper than " +
                      std::to_string(json_depth_limit) + " levels, which no format here needs.";
      faults_.add(std::move(fault));
      return false;
    }
    path_.push_back(&value);
    return true;
  }

  bool close() {
    step_to_token();
    ++cursor_;
    path_.pop_back();
    return true;
  }

  /// Pointer to the object or list that is being read.
  [[nodiscard]] std::string container_pointer() const {
    return path_.empty() ? std::string() : pointer(path_.size() - 1);
  }
  /// Pointer to the value that was added last.
  [[nodiscard]] std::string value_pointer() const { return pointer(path_.size()); }

  [[nodiscard]] std::string pointer(std::size_t steps) const {
    std::string text;
    for (std::size_t i = 0; i < steps; ++i) {
      text += path_[i]->is(JsonValue::Kind::object)
                  ? '/' + pointer_step(path_[i]->members.back().key)
                  : '/' + std::to_string(path_[i]->items.size() - 1);
    }
    return text;
  }

  JsonDocument& document_;
  FaultList& faults_;
  std::size_t cursor_ = 0;
  // Open objects and lists. A parent does not grow while a child of it is open, so they stay valid.
  std::vector<JsonValue*> path_;
  std::vector<std::set<std::string>> keys_;
};

bool JsonDocument::parse(std::string text, std::string name, FaultList& faults) {
  text_ = std::move(text);
  name_ = std::move(name);
  root_ = {};
  line_starts_ = {0};
  for (std::size_t i = 0; i < text_.size(); ++i) {
    if (text_[i] == '\n' || (text_[i] == '\r' && (i + 1 == text_.size() || text_[i + 1] != '\n'))) {
      line_starts_.push_back(i + 1);
    }
  }
  if (text_.starts_with("\xFF\xFE") || text_.starts_with("\xFE\xFF")) {
    faults.add(Code::json_malformed, where(0, {}), "the file is UTF-16. Save it as UTF-8.");
    return false;
  }
  JsonBuilder builder(*this, faults);
  return nlohmann::json::sax_parse(
      text_, &builder, nlohmann::json::input_format_t::json, true, true);
}

std::string JsonDocument::where(std::size_t offset, std::string_view pointer) const {
  const auto after = std::upper_bound(line_starts_.begin(), line_starts_.end(), offset);
  const std::size_t line = static_cast<std::size_t>(after - line_starts_.begin());
  const std::size_t start = line_starts_[line - 1];
  std::size_t column = 1;
  for (std::size_t i = start; i < offset && i < text_.size(); ++i) {
    if ((static_cast<unsigned char>(text_[i]) & 0xC0U) != 0x80U) {
      ++column;
    }
  }
  if (start == 0 && offset > 0 && text_.starts_with(byte_order_mark)) {
    --column;  // editors do not count it
  }
  std::string place = name_ + ':' + std::to_string(line) + ':' + std::to_string(column);
  if (!pointer.empty()) {
    place += ' ';
    place += pointer;
  }
  return place;
}

namespace {

void write(const JsonValue& value, std::string& out) {
  switch (value.kind) {
    case JsonValue::Kind::null:
      out += "null";
      return;
    case JsonValue::Kind::boolean:
      out += value.boolean ? "true" : "false";
      return;
    case JsonValue::Kind::number:
      out += value.text;
      return;
    case JsonValue::Kind::text:
      out += nlohmann::json(value.text).dump();
      return;
    case JsonValue::Kind::list:
      out += '[';
      for (const JsonValue& item : value.items) {
        out += &item == value.items.data() ? "" : ",";
        write(item, out);
      }
      out += ']';
      return;
    case JsonValue::Kind::object:
      out += '{';
      for (const JsonValue::Member& member : value.members) {
        out += &member == value.members.data() ? "" : ",";
        out += nlohmann::json(member.key).dump() + ':';
        write(member.value, out);
      }
      out += '}';
      return;
  }
}

}  // namespace

std::string to_compact_text(const JsonValue& value) {
  std::string out;
  write(value, out);
  return out;
}

}  // namespace bismar::detail
