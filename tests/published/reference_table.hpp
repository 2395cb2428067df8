// A table of reference values beside the tests: CSV, `#` lines tell where the numbers come from.
#pragma once

#include <string>
#include <vector>

namespace palier::published {

struct ReferenceTable {
  std::vector<std::string> heading;
  std::vector<std::vector<std::string>> rows;

  /// Column of that heading as numbers, for the rows whose first entry is `first` (all rows if empty). Throws
  /// std::runtime_error where there is no such column or no such row, or an entry is no number.
  std::vector<double> column(const std::string& name, const std::string& first = {}) const;
};

/// Reads tests/published/data/`name`. Throws std::runtime_error where it cannot be read or a row has a wrong length.
ReferenceTable reference_table(const std::string& name);

}  // namespace palier::published
