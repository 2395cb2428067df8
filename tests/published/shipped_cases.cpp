#include "published/shipped_cases.hpp"

#include <algorithm>
#include <filesystem>
#include <regex>
#include <stdexcept>

#include "palier/files/case_file.hpp"

namespace palier::published {
namespace {

const std::filesystem::path library = PALIER_SOURCE_DIR "/cases";

std::vector<std::string> names_in(const std::string& folder, const std::regex& wanted) {
  const std::filesystem::path within(folder);
  std::vector<std::string> names;
  for (const auto& entry : std::filesystem::directory_iterator(library / within))
    if (std::regex_match(entry.path().filename().string(), wanted))
      names.push_back((within / entry.path().stem()).string());
  if (names.empty()) throw std::runtime_error("no cases in " + folder);
  std::sort(names.begin(), names.end());
  return names;
}

}  // namespace

std::vector<ShippedCase> shipped_cases() {
  std::vector<std::string> names = names_in("castings", std::regex(".*\\.yaml"));
  const std::vector<std::string> checks = names_in("checks", std::regex("p.\\.yaml"));
  names.insert(names.end(), checks.begin(), checks.end());
  std::vector<ShippedCase> cases;
  cases.reserve(names.size());
  for (const std::string& name : names) cases.push_back({name, shipped_section(name)});
  return cases;
}

freeze::Section shipped_section(const std::string& name) {
  return files::read_case((library / (name + ".yaml")).string(), library.string()).section;
}

}  // namespace palier::published
