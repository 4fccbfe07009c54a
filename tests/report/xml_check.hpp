// SPDX-License-Identifier: MIT
// A small checker of XML: well-formed or not, and where not.
#pragma once

#include <cctype>
#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

namespace xml {

struct Attribute {
  std::string name;
  std::string value;
};

struct Element {
  std::string name;
  std::vector<Attribute> attributes;
  std::vector<std::size_t> parents;  ///< Indices, outermost first.
  std::string text;                  ///< All character data inside, entities resolved.

  [[nodiscard]] std::optional<std::string> attribute(std::string_view wanted) const {
    for (const Attribute& a : attributes) {
      if (a.name == wanted) return a.value;
    }
    return std::nullopt;
  }
};

struct Document {
  std::vector<Element> elements;  ///< In the order of their start tags.
  std::string fault;              ///< Empty: well-formed.
};

/// Elements, attributes, the five entities, decimal references, one declaration; no comments, CDATA
/// or document types, which our writer does not use: they are faults here.
class Parser {
 public:
  explicit Parser(std::string_view text) : text_(text) {}

  Document run() {
    if (starts("<?xml ")) {
      const std::size_t end = text_.find("?>");
      if (end == std::string_view::npos) return fail("declaration not closed");
      at_ = end + 2;
    }
    bool seen_root = false;
    while (at_ < text_.size()) {
      if (text_[at_] != '<') {
        if (!character_data()) return std::move(out_);
        continue;
      }
      if (starts("</")) {
        if (!end_tag()) return std::move(out_);
      } else {
        if (open_.empty() && seen_root) return fail("a second root");
        seen_root = true;
        if (!start_tag()) return std::move(out_);
      }
    }
    if (!open_.empty()) return fail("an element is not closed");
    if (!seen_root) return fail("no root");
    return std::move(out_);
  }

 private:
  [[nodiscard]] bool starts(std::string_view what) const {
    return text_.substr(at_, what.size()) == what;
  }
  Document fail(const std::string& why) {
    set_fault(why);
    return std::move(out_);
  }
  bool set_fault(const std::string& why) {
    out_.fault = why + " at byte " + std::to_string(at_);
    return false;
  }

  std::string name() {
    const std::size_t from = at_;
    while (at_ < text_.size() && (std::isalnum(static_cast<unsigned char>(text_[at_])) != 0 ||
                                  text_[at_] == '-' || text_[at_] == ':')) {
      ++at_;
    }
    return std::string(text_.substr(from, at_ - from));
  }

  bool entity(std::string& into) {
    const std::size_t end = text_.find(';', at_);
    if (end == std::string_view::npos) return set_fault("a bare &");
    const std::string_view word = text_.substr(at_ + 1, end - at_ - 1);
    if (word == "amp") {
      into += '&';
    } else if (word == "lt") {
      into += '<';
    } else if (word == "gt") {
      into += '>';
    } else if (word == "quot") {
      into += '"';
    } else if (word == "#39") {
      into += '\'';
    } else {
      return set_fault("an unknown entity");
    }
    at_ = end + 1;
    return true;
  }

  bool character_data() {
    std::string data;
    while (at_ < text_.size() && text_[at_] != '<') {
      const auto byte = static_cast<unsigned char>(text_[at_]);
      if (byte == '&') {
        if (!entity(data)) return false;
        continue;
      }
      if (byte < 0x20 && byte != '\n' && byte != '\t' && byte != '\r') {
        return set_fault("a control character");
      }
      data += text_[at_++];
    }
    if (open_.empty()) {
      if (data.find_first_not_of(" \n\t\r") != std::string::npos) return set_fault("text outside");
      return true;
    }
    for (const std::size_t i : open_) out_.elements[i].text += data;
    return true;
  }

  bool start_tag() {
    ++at_;
    Element element;
    element.name = name();
    if (element.name.empty()) return set_fault("no element name");
    for (;;) {
      const bool blank = at_ < text_.size() && text_[at_] == ' ';
      while (at_ < text_.size() && text_[at_] == ' ') ++at_;
      if (starts("/>") || starts(">")) break;
      if (!blank) return set_fault("no blank before an attribute");
      Attribute a;
      a.name = name();
      if (a.name.empty() || !starts("=\"")) return set_fault("a malformed attribute");
      at_ += 2;
      while (at_ < text_.size() && text_[at_] != '"') {
        if (text_[at_] == '<') return set_fault("< in an attribute");
        if (text_[at_] == '&') {
          if (!entity(a.value)) return false;
        } else {
          a.value += text_[at_++];
        }
      }
      if (at_ >= text_.size()) return set_fault("an attribute is not closed");
      ++at_;
      if (element.attribute(a.name)) return set_fault("an attribute twice");
      element.attributes.push_back(std::move(a));
    }
    element.parents = open_;
    out_.elements.push_back(std::move(element));
    if (starts("/>")) {
      at_ += 2;
    } else {
      ++at_;
      open_.push_back(out_.elements.size() - 1);
    }
    return true;
  }

  bool end_tag() {
    at_ += 2;
    const std::string closed = name();
    if (open_.empty() || out_.elements[open_.back()].name != closed) {
      return set_fault("a tag closes what is not open");
    }
    if (!starts(">")) return set_fault("a malformed end tag");
    ++at_;
    open_.pop_back();
    return true;
  }

  std::string_view text_;
  std::size_t at_ = 0;
  std::vector<std::size_t> open_;
  Document out_;
};

inline Document parse(std::string_view text) { return Parser(text).run(); }

}  // namespace xml
