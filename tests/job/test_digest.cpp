// SPDX-License-Identifier: MIT
#include "job/digest.hpp"

#include "support/catch.hpp"

using bismar::detail::Digest;

namespace {

std::string digest_of(std::string_view text) {
  Digest digest;
  digest.add(text);
  return digest.text();
}

}  // namespace

// Source: test vectors of the FNV authors' reference code (test_fnv.c, 64-bit FNV-1a); values from
// memory, recomputed independently with a few lines of Python when this test was written.
TEST_CASE("the digest gives the published FNV-1a values") {
  CHECK(digest_of("") == "fnv1a64:cbf29ce484222325");
  CHECK(digest_of("a") == "fnv1a64:af63dc4c8601ec8c");
  CHECK(digest_of("foobar") == "fnv1a64:85944171f73967e8");
}

TEST_CASE("a digest does not depend on how its text is cut") {
  Digest parts;
  parts.add("foo");
  parts.add("");
  parts.add("bar");
  CHECK(parts.text() == digest_of("foobar"));
}
