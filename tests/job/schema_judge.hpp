// SPDX-License-Identifier: MIT
#pragma once

#include <nlohmann/json.hpp>

#include <memory>
#include <string>

namespace job_test {

/// A JSON Schema validator of other hands. It takes long to compile, so it stands apart.
class SchemaJudge {
 public:
  explicit SchemaJudge(const nlohmann::json& schema);
  ~SchemaJudge();
  SchemaJudge(const SchemaJudge&) = delete;
  SchemaJudge& operator=(const SchemaJudge&) = delete;
  SchemaJudge(SchemaJudge&&) = delete;
  SchemaJudge& operator=(SchemaJudge&&) = delete;

  [[nodiscard]] bool accepts(const nlohmann::json& document) const;

 private:
  struct Compiled;
  std::unique_ptr<Compiled> compiled_;
};

}  // namespace job_test
