// SPDX-License-Identifier: MIT
#include <bismar/error.hpp>
#include <bismar/version.hpp>

#include "support/catch.hpp"

#include <algorithm>
#include <cstddef>
#include <deque>
#include <map>
#include <string>
#include <string_view>
#include <type_traits>
#include <vector>

namespace {

bismar::Fault fault_at(std::string where, std::string message) {
  bismar::Fault fault;
  fault.code = bismar::Code::out_of_range;
  fault.where = std::move(where);
  fault.message = std::move(message);
  return fault;
}

std::optional<std::string> nearest(std::string_view typed, std::vector<std::string_view> words) {
  return bismar::nearest_word(typed, words);
}

/// Every text over the letters a, b and c with at most `longest` of them.
std::vector<std::string> texts_of_abc(std::size_t longest) {
  std::vector<std::string> texts{""};
  for (std::size_t i = 0; i < texts.size(); ++i) {
    if (texts[i].size() < longest) {
      for (const char letter : {'a', 'b', 'c'}) {
        texts.push_back(texts[i] + letter);
      }
    }
  }
  return texts;
}

/// What one insertion, deletion, substitution or swap of neighbours makes of a text over a, b, c.
std::vector<std::string> one_edit_away(const std::string& text) {
  std::vector<std::string> edited;
  for (std::size_t i = 0; i <= text.size(); ++i) {
    for (const char letter : {'a', 'b', 'c'}) {
      edited.push_back(text.substr(0, i) + letter + text.substr(i));
      if (i < text.size()) {
        edited.push_back(text.substr(0, i) + letter + text.substr(i + 1));
      }
    }
    if (i < text.size()) {
      edited.push_back(text.substr(0, i) + text.substr(i + 1));
    }
    if (i + 1 < text.size()) {
      std::string swapped = text;
      std::swap(swapped[i], swapped[i + 1]);
      edited.push_back(swapped);
    }
  }
  return edited;
}

/// The least number of edits from `start` to every text within `longest` letters, by breadth-first
/// search: the definition of the distance, without any dynamic programme.
std::map<std::string, std::size_t> edits_from(const std::string& start, std::size_t longest) {
  std::map<std::string, std::size_t> edits{{start, 0}};
  std::deque<std::string> waiting{start};
  while (!waiting.empty()) {
    const std::string text = waiting.front();
    waiting.pop_front();
    for (const std::string& next : one_edit_away(text)) {
      if (next.size() <= longest && edits.emplace(next, edits.at(text) + 1).second) {
        waiting.push_back(next);
      }
    }
  }
  return edits;
}

}  // namespace

TEST_CASE("A fault's text is its place and its message") {
  CHECK(fault_at("", "No rows.").text() == "No rows.");
  CHECK(fault_at("materials.csv:3:7", "No rows.").text() == "materials.csv:3:7: No rows.");
}

TEST_CASE("An error carries every fault in order and shows one a line") {
  const bismar::Error error({fault_at("/a", "First."), fault_at("/b", "Second.")});
  REQUIRE(error.faults().size() == 2);
  CHECK(error.faults()[0].where == "/a");
  CHECK(error.faults()[1].where == "/b");
  CHECK(std::string(error.what()) == "/a: First.\n/b: Second.");
}

TEST_CASE("An error of one fault shows that fault") {
  const bismar::Error error(fault_at("/a", "Only."));
  REQUIRE(error.faults().size() == 1);
  CHECK(error.faults()[0].code == bismar::Code::out_of_range);
  CHECK(std::string(error.what()) == "/a: Only.");
}

TEST_CASE("An error keeps its faults when it is copied, assigned and moved") {
  const bismar::Error original(fault_at("/a", "Only."));
  bismar::Error copy(original);
  bismar::Error other(fault_at("/b", "Other."));
  other = copy;
  CHECK(std::string(other.what()) == "/a: Only.");
  const bismar::Error moved(std::move(copy));
  CHECK(moved.faults().size() == 1);
  CHECK(std::string(moved.what()) == "/a: Only.");
  CHECK(std::is_nothrow_move_constructible_v<bismar::Error>);
}

TEST_CASE("An error without a fault is a defect of the library") {
  CHECK_THROWS_AS(bismar::Error(std::vector<bismar::Fault>{}), bismar::InternalError);
}

TEST_CASE("Wrong data and our own defects are caught apart") {
  CHECK(std::is_base_of_v<std::exception, bismar::Error>);
  CHECK_FALSE(std::is_base_of_v<bismar::Error, bismar::InternalError>);
  CHECK_FALSE(std::is_base_of_v<std::logic_error, bismar::Error>);
  CHECK(std::string(bismar::InternalError("sum differs").what()) == "sum differs");
}

TEST_CASE("A fault list throws all of its faults at once, and nothing while it is empty") {
  bismar::FaultList list;
  CHECK(list.empty());
  CHECK_NOTHROW(list.throw_if_any());

  list.add(bismar::Code::missing, "/length", "Give a length.");
  list.add(fault_at("/mass", "Give a mass above 0 kg."));
  CHECK(list.size() == 2);
  try {
    list.throw_if_any();
    FAIL("nothing was thrown");
  } catch (const bismar::Error& error) {
    REQUIRE(error.faults().size() == 2);
    CHECK(error.faults()[0].code == bismar::Code::missing);
    CHECK(std::string(error.what()) == "/length: Give a length.\n/mass: Give a mass above 0 kg.");
  }
}

TEST_CASE("A fault list takes over another error's faults under a prefix") {
  bismar::FaultList list;
  list.append(bismar::Error({fault_at("/length", "Too long."), fault_at("", "No rows.")}), "/part");
  list.append(bismar::Error(fault_at("/mass", "Too heavy.")));
  REQUIRE(list.size() == 3);
  CHECK(list.faults()[0].where == "/part/length");
  CHECK(list.faults()[1].where == "/part");
  CHECK(list.faults()[2].where == "/mass");
}

TEST_CASE("The nearest word is found as it is written in the list") {
  CHECK(nearest("deflexion", {"yield", "deflection", "twist"}) == "deflection");
  CHECK(nearest("MASS", {"cost", "mass"}) == "mass");
  CHECK(nearest("youngs modulus", {"Young's modulus", "shear modulus"}) == "Young's modulus");
}

TEST_CASE("Of equally near words the earlier one is taken") {
  CHECK(nearest("bat", {"cat", "rat"}) == "cat");
  CHECK(nearest("bat", {"rat", "cat"}) == "rat");
}

TEST_CASE("A word further away than a third of the typed length plus one is not offered") {
  CHECK(nearest("xy", {"ab"}) == std::nullopt);      // 2 edits, 1 allowed
  CHECK(nearest("abcxyz", {"abc"}) == "abc");        // 3 edits, 3 allowed
  CHECK(nearest("abwxyz", {"ab"}) == std::nullopt);  // 4 edits, 3 allowed
  CHECK(nearest("mass", {}) == std::nullopt);
}

TEST_CASE("Known edit distances are met") {
  // kitten to sitting takes three substitutions or insertions: the usual textbook example of the
  // Levenshtein distance (from memory). Six letters allow three edits, five letters two.
  CHECK(nearest("kitten", {"sitting"}) == "sitting");
  CHECK(nearest("itten", {"sitting"}) == std::nullopt);
  // A swap of neighbours is one edit: Damerau, Communications of the ACM 7 (1964) 171-176.
  CHECK(nearest("mi", {"im"}) == "im");
  // Swap, then insert between the pair: 2 edits, where a distance that edits no place twice has 3.
  CHECK(nearest("abc", {"ca"}) == "ca");
}

TEST_CASE("The distance agrees with a search over all edits for every short pair of texts") {
  const std::size_t longest = 4;
  const std::vector<std::string> texts = texts_of_abc(longest);
  std::size_t near = 0;
  std::size_t far = 0;
  for (const std::string& typed : texts) {
    const auto edits = edits_from(typed, longest + 1);
    for (const std::string& word : texts) {
      const bool expected = edits.at(word) <= typed.size() / 3 + 1;
      if (nearest(typed, {word}).has_value() != expected) {
        FAIL_CHECK("\"" << typed << "\" and \"" << word << "\" are " << edits.at(word)
                        << " edits apart");
      }
      ++(expected ? near : far);
    }
  }
  CHECK(near + far == texts.size() * texts.size());
  CHECK(near > 1000);
  CHECK(far > 1000);
}

TEST_CASE("The question after a typo names the nearest word, and is absent without one") {
  const std::vector<std::string_view> words{"mass", "cost"};
  CHECK(bismar::did_you_mean("mas", words) == " Did you mean \"mass\"?");
  CHECK(bismar::did_you_mean("colour", words).empty());
}

TEST_CASE("The linked library has the version of its headers") {
  CHECK(bismar::version() == BISMAR_VERSION);
  CHECK(bismar::version() == std::to_string(BISMAR_VERSION_MAJOR) + "." +
                                 std::to_string(BISMAR_VERSION_MINOR) + "." +
                                 std::to_string(BISMAR_VERSION_PATCH));
}
