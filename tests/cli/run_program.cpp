// SPDX-License-Identifier: MIT
#include "run_program.hpp"

#include "support/catch.hpp"

#include <fcntl.h>
#include <sys/wait.h>
#include <unistd.h>

#include <algorithm>
#include <atomic>
#include <fstream>
#include <sstream>

extern char** environ;

namespace cli_test {

namespace {

std::string text_of(const std::filesystem::path& path) {
  std::ifstream file(path, std::ios::binary);
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

std::string job_with_mass_cap(const std::string& cap) {
  return R"json({
  "bismar": 1,
  "parts": [
    {
      "name": "lever", "quantity": 500,
      "member": {
        "length": "300 mm",
        "shapes": [{ "round": { "diameter": "8 mm..60 mm" } }],
        "load_cases": [{ "support": "cantilever", "loads": [{ "force": "655 N", "at": "end" }],
                         "factors": { "yield": 1.5 } }]
      },
      "limits": { "deflection": "10 mm", "mass": ")json" +
         cap + R"json(", "classes": ["steel", "titanium"] }
    }
  ],
  "exchange": { "mass": "0.5 EUR/kg..500 EUR/kg" }
}
)json";
}

}  // namespace

const std::string quick_job = job_with_mass_cap("5 kg");
const std::string hopeless_job = job_with_mass_cap("1 g");

Ran run(const std::vector<std::string>& arguments,
        const std::string& folder,
        const std::vector<std::string>& environment) {
  const Folder answers;
  std::vector<std::string> words = {BISMAR_PROGRAM};
  words.insert(words.end(), arguments.begin(), arguments.end());
  std::vector<char*> argv;
  for (std::string& word : words) {
    argv.push_back(word.data());
  }
  argv.push_back(nullptr);
  std::vector<std::string> settings;
  for (char** entry = environ; *entry != nullptr; ++entry) {
    settings.emplace_back(*entry);
  }
  settings.insert(settings.begin(), environment.begin(), environment.end());
  std::vector<char*> envp;
  for (std::string& setting : settings) {
    envp.push_back(setting.data());
  }
  envp.push_back(nullptr);
  const std::string out = answers.file("out");
  const std::string err = answers.file("err");

  const pid_t child = ::fork();
  REQUIRE(child >= 0);
  if (child == 0) {
    const int out_file = ::open(out.c_str(), O_CREAT | O_WRONLY | O_TRUNC, 0600);
    const int err_file = ::open(err.c_str(), O_CREAT | O_WRONLY | O_TRUNC, 0600);
    if (out_file < 0 || err_file < 0 || ::dup2(out_file, STDOUT_FILENO) < 0 ||
        ::dup2(err_file, STDERR_FILENO) < 0 || ::chdir(folder.c_str()) != 0) {
      ::_exit(126);
    }
    ::execve(BISMAR_PROGRAM, argv.data(), envp.data());
    ::_exit(127);
  }
  int status = 0;
  REQUIRE(::waitpid(child, &status, 0) == child);
  Ran ran;
  ran.code = WIFEXITED(status) ? WEXITSTATUS(status) : -1;
  ran.out = text_of(out);
  ran.err = text_of(err);
  return ran;
}

Folder::Folder() {
  static std::atomic<int> counter = 0;
  path_ = std::filesystem::temp_directory_path() /
          ("bismar-cli-" + std::to_string(::getpid()) + "-" + std::to_string(counter++));
  std::filesystem::create_directories(path_);
}

Folder::~Folder() {
  std::error_code ignored;
  std::filesystem::remove_all(path_, ignored);
}

void Folder::write(const std::string& name, const std::string& text) const {
  std::ofstream stream(path_ / name, std::ios::binary);
  stream << text;
  REQUIRE(stream.good());
}

std::string Folder::read(const std::string& name) const {
  REQUIRE(std::filesystem::exists(path_ / name));
  return text_of(path_ / name);
}

std::vector<std::string> Folder::names() const {
  std::vector<std::string> all;
  for (const auto& entry : std::filesystem::directory_iterator(path_)) {
    all.push_back(entry.path().filename().string());
  }
  std::sort(all.begin(), all.end());
  return all;
}

}  // namespace cli_test
