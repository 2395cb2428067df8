// Writes a run as HDF5 that is also valid netCDF-4 with CF attributes.
#pragma once

#include <string>

#include "palier/files/case_file.hpp"
#include "palier/freeze/result.hpp"

namespace palier::files {

/// How a result came about.
struct Provenance {
  std::string version;  ///< of palier
  std::string commit;   ///< git describe, or "unknown"
  std::string command_line;
};

/// Writes `path` aside (`path` + ".partial") and renames it when complete, so that a file under its final name is
/// whole. The same run gives the same bytes. Throws base::FileTrouble naming path and cause.
void write_result(const std::string& path, const CaseFile& input, const freeze::Result& result,
                  const Provenance& provenance);

}  // namespace palier::files
