#include "published/reference_table.hpp"

#include <algorithm>
#include <fstream>
#include <sstream>
#include <stdexcept>

namespace palier::published {
namespace {

std::vector<std::string> entries(const std::string& line) {
  std::vector<std::string> out;
  std::istringstream in(line);
  for (std::string entry; std::getline(in, entry, ',');) out.push_back(entry);
  return out;
}

double number(const std::string& text) {
  std::size_t used = 0;
  const double value = std::stod(text, &used);
  if (used != text.size()) throw std::runtime_error("no number: " + text);
  return value;
}

}  // namespace

std::vector<double> ReferenceTable::column(const std::string& name, const std::string& first) const {
  const auto at = std::find(heading.begin(), heading.end(), name);
  if (at == heading.end()) throw std::runtime_error("no column " + name);
  const auto k = static_cast<std::size_t>(at - heading.begin());
  std::vector<double> out;
  for (const std::vector<std::string>& row : rows)
    if (first.empty() || row[0] == first) out.push_back(number(row[k]));
  if (out.empty()) throw std::runtime_error("no rows of " + first);
  return out;
}

ReferenceTable reference_table(const std::string& name) {
  const std::string path = PALIER_SOURCE_DIR "/tests/published/data/" + name;
  std::ifstream file(path);
  if (!file) throw std::runtime_error("cannot read " + path);
  ReferenceTable table;
  for (std::string line; std::getline(file, line);) {
    if (line.empty() || line[0] == '#') continue;
    std::vector<std::string> row = entries(line);
    if (table.heading.empty()) {
      table.heading = std::move(row);
      continue;
    }
    if (row.size() != table.heading.size()) throw std::runtime_error("a row of wrong length in " + path);
    table.rows.push_back(std::move(row));
  }
  return table;
}

}  // namespace palier::published
