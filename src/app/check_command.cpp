#include <fmt/format.h>

#include <algorithm>
#include <cstdio>
#include <vector>

#include "palier/app/commands.hpp"
#include "palier/files/case_file.hpp"

namespace palier::app {
namespace {

void print(const std::vector<files::ResolvedValue>& values) {
  std::size_t key = 0, value = 0;
  for (const files::ResolvedValue& v : values) {
    key = std::max(key, v.key.size());
    value = std::max(value, std::min<std::size_t>(v.value.size(), 36));
  }
  for (const files::ResolvedValue& v : values) {
    std::string line = fmt::format("  {:<{}}  {:<{}}  {}", v.key, key, v.value, value, v.from);
    std::replace(line.begin(), line.end(), '\n', ' ');  // free text keeps to one line
    fmt::print("{}\n", line);
  }
}

}  // namespace

void check(const CheckOptions& options) {
  const files::CaseFile input = files::read_case(options.case_file, options.library);
  fmt::print("{}: accepted. Key, value, where it comes from:\n\n", input.path);
  print(input.resolved);
  const alloy::SolidificationPath& path = *input.section.path;
  fmt::print("\nFreezes from {:.2f} to {:.2f} degC ({} path)", path.liquidus() - 273.15,
             path.end_of_freezing() - 273.15, path.rule());
  for (const alloy::Arrest& a : path.arrests())
    fmt::print("; {:.1f} % at {:.2f} degC ({})", 100 * a.fraction, a.temperature - 273.15, a.reaction);
  fmt::print(".\n");
  if (input.section.path_after)
    fmt::print(
        "Back-diffusion takes the time that freezing takes: the run settles the path, starting from this one.\n");
  for (const files::MaterialFile& m : input.materials) {
    fmt::print("\n{} ({}):\n", m.name, m.path);
    print(m.values);
  }
}

}  // namespace palier::app
