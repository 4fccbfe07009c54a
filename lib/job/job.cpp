// SPDX-License-Identifier: MIT
#include <bismar/job/job.hpp>

#include "job_reader.hpp"

#include <bismar/catalogue/csv.hpp>
#include <bismar/numeric/floating_point_guard.hpp>
#include <bismar/quantity/parse.hpp>
#include <bismar/sizing/front.hpp>

#include <filesystem>
#include <set>
#include <string>
#include <utility>

namespace bismar {

namespace {

using detail::Checker;
using detail::JsonDocument;
using detail::JsonValue;

/// The currency and its rates come first, because every amount is read with them.
/// @return whether money can be read.
bool read_currency(const JsonValue& root, Job& job, Checker& checker) {
  if (const JsonValue* currency = root.find("currency");
      currency != nullptr && currency->is(JsonValue::Kind::text)) {
    checker.place(*currency, "/currency");
    if (!is_currency_code(currency->text)) {
      checker.add(Code::unknown_name,
                  *currency,
                  currency->text,
                  "a currency code of ISO 4217",
                  '"' + currency->text +
                      "\" is no currency code. Write three capital letters (ISO 4217), such as "
                      "\"EUR\".");
      return false;
    }
    job.currency = currency->text;
  }
  job.rates = CurrencyRates(job.currency);
  const JsonValue* rates = root.find("rates");
  if (rates == nullptr || !rates->is(JsonValue::Kind::object)) {
    return true;
  }
  const CurrencyRates own_currency_only(job.currency);
  for (const JsonValue::Member& member : rates->members) {
    checker.place(member.value, "/rates/" + detail::pointer_step(member.key));
    if (!member.value.is(JsonValue::Kind::text) || !is_currency_code(member.key) ||
        job.rates.rate(member.key).has_value()) {
      if (member.key == job.currency) {
        checker.add(Code::conflict,
                    member.value,
                    member.key,
                    "other currencies",
                    member.key + " is the job's own currency. Leave this rate out.");
      }
      continue;
    }
    try {
      job.rates.set(member.key,
                    parse_quantity(member.value.text, QuantityKind::money, &own_currency_only));
    } catch (const Error& error) {
      checker.append(error, member.value);
      job.rates.set(member.key, 1.0);  // so that amounts in it are not faults on top of this one
    }
  }
  return true;
}

/// "file:line:column /pointer" of a value, or of the nearest one around it that the job wrote down.
std::string place_of(const Job& job, const std::string& pointer) {
  for (std::string around = pointer;; around.resize(around.rfind('/'))) {
    const auto found = job.places.find(around);
    if (found != job.places.end()) {
      return found->second + ' ' + pointer;
    }
    if (around.empty()) {
      return pointer;
    }
  }
}

}  // namespace

Job load_job_text(std::string_view text, const std::string& name, const std::string& folder) {
  const FloatingPointGuard guard;
  FaultList faults;
  JsonDocument document;
  const bool is_json = document.parse(std::string(text), name, faults);
  if (!is_json) {
    faults.throw_if_any();
  }
  const JsonValue& root = document.root();

  Job job;
  job.folder = folder;
  Checker checker(document, faults);
  if (const JsonValue* version = root.find("bismar"); version != nullptr &&
                                                      version->is(JsonValue::Kind::number) &&
                                                      version->number != job_format_version) {
    // Another version may mean other keys: naming them as faults would mislead.
    Fault fault;
    fault.code = Code::version_unsupported;
    fault.where = document.where(version->offset, "/bismar");
    fault.found = version->text;
    fault.allowed = std::to_string(job_format_version);
    fault.message = "this job has format version " + version->text +
                    "; this program reads version " + std::to_string(job_format_version) + '.';
    throw Error(std::move(fault));
  }
  if (read_currency(root, job, checker)) {
    checker.use(&job.rates);
  }
  checker.check(root, detail::job_format(), "");
  if (root.is(JsonValue::Kind::object)) {
    detail::JobReader reader(document, checker, job);
    reader.read_title(root);
    reader.read_catalogue(root.find("catalogue"));
    reader.read_settings(root.find("settings"));
    reader.read_exchange(root.find("exchange"));
    reader.read_parts(root.find("parts"));
  }
  faults.throw_if_any();
  job.text = detail::to_compact_text(root);
  job.places = checker.places();
  return job;
}

Job load_job(const std::string& path) {
  const std::filesystem::path file(path);
  return load_job_text(
      read_table_file(path), file.filename().string(), file.parent_path().string());
}

void validate(const Job& job) {
  FaultList faults;
  std::set<std::string> told;  // faults of the settings come with every part
  for (std::size_t i = 0; i < job.parts.size(); ++i) {
    try {
      validate(job.parts[i], job.catalogue, job.settings);
    } catch (const Error& error) {
      for (Fault fault : error.faults()) {
        const bool of_part = !fault.where.starts_with("/settings");
        fault.where = place_of(
            job, of_part ? "/parts/" + std::to_string(i) + fault.where : std::move(fault.where));
        if (told.insert(fault.text()).second) {
          faults.add(std::move(fault));
        }
      }
    }
  }
  faults.throw_if_any();
}

std::size_t find_part(const Job& job, std::string_view name) {
  std::vector<std::string_view> names;
  for (std::size_t i = 0; i < job.parts.size(); ++i) {
    if (job.parts[i].name == name) {
      return i;
    }
    names.push_back(job.parts[i].name);
  }
  Fault fault;
  fault.code = Code::unknown_name;
  fault.found = name;
  fault.allowed = detail::in_words(names);
  fault.message = "the job has no part \"" + std::string(name) + "\"." + did_you_mean(name, names) +
                  " Its parts: " + fault.allowed + '.';
  throw Error(std::move(fault));
}

}  // namespace bismar
