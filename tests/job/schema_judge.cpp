// SPDX-License-Identifier: MIT
#include "schema_judge.hpp"

// The validator's headers are not ours to mend.
#pragma GCC diagnostic push
#pragma GCC diagnostic ignored "-Wall"
#pragma GCC diagnostic ignored "-Wextra"
#pragma GCC diagnostic ignored "-Wconversion"
#pragma GCC diagnostic ignored "-Wsign-conversion"
#pragma GCC diagnostic ignored "-Wshadow"
#pragma GCC diagnostic ignored "-Wold-style-cast"
#pragma GCC diagnostic ignored "-Wnon-virtual-dtor"
#pragma GCC diagnostic ignored "-Woverloaded-virtual"
#pragma GCC diagnostic ignored "-Wsuggest-override"
#include <valijson/adapters/nlohmann_json_adapter.hpp>
#include <valijson/schema.hpp>
#include <valijson/schema_parser.hpp>
#include <valijson/validator.hpp>
#pragma GCC diagnostic pop

namespace job_test {

struct SchemaJudge::Compiled {
  valijson::Schema schema;
};

SchemaJudge::SchemaJudge(const nlohmann::json& schema) : compiled_(std::make_unique<Compiled>()) {
  valijson::SchemaParser parser(valijson::SchemaParser::kDraft7);
  const valijson::adapters::NlohmannJsonAdapter adapter(schema);
  parser.populateSchema(adapter, compiled_->schema);
}

SchemaJudge::~SchemaJudge() = default;

bool SchemaJudge::accepts(const nlohmann::json& document) const {
  valijson::Validator validator(valijson::Validator::kStrongTypes);
  const valijson::adapters::NlohmannJsonAdapter adapter(document);
  return validator.validate(compiled_->schema, adapter, nullptr);
}

}  // namespace job_test
