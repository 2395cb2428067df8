// Builds, in memory, an HDF5 file that reads as netCDF-4.
#pragma once

#include <cstddef>
#include <cstdint>
#include <map>
#include <string>
#include <utility>
#include <vector>

#include "palier/files/hdf5.hpp"

namespace palier::files {

/// What a reader is told about a variable.
struct Variable {
  std::string name;
  std::vector<std::string> dimensions;  ///< none: a scalar; its own name alone: the coordinate of that dimension
  std::string units;                    ///< as UDUNITS-2 reads them; "1" for a plain number
  std::string long_name;
  std::vector<std::pair<std::string, std::string>> more = {};  ///< further text attributes
  bool gaps = false;                                           ///< NaN means "none"; told to readers by _FillValue
};

/// A netCDF-4 file under construction. Dimensions come before the variables on them. The same calls give the same
/// bytes: no times are stored. The file is held in memory, so that trouble with the disk stays out of HDF5, whose close
/// fails badly on a full one. Every function throws base::FileTrouble where HDF5 fails, std::logic_error where
/// dimensions and data do not match.
class NetcdfFile {
 public:
  /// @param name for messages
  explicit NetcdfFile(const std::string& name);

  /// A dimension without a coordinate.
  void dimension(const std::string& name, std::size_t size);
  /// Row-major values.
  void write(const Variable& variable, const std::vector<double>& values);
  void write(const Variable& variable, double scalar);
  void write(const Variable& variable, std::int32_t scalar);
  /// A variable whose values are numbers of names, after CF's flag_values and flag_meanings.
  /// @param names each becomes one word of flag_meanings; written out in full in the attribute `names`, one a line
  void write_flags(const Variable& variable, const std::vector<int>& values, const std::vector<std::string>& names);

  /// A text attribute of the whole file.
  void text(const std::string& name, const std::string& text);
  /// A text attribute of a group, e.g. `/provenance`, which is made on first use.
  void text(const std::string& group, const std::string& name, const std::string& text);

  /// The finished file.
  std::vector<std::byte> bytes();

 private:
  struct Values {
    hid_t stored;  ///< type in the file
    hid_t given;   ///< type in memory
    const void* data;
    std::size_t count;
  };
  Handle create(const Variable& variable, const Values& values);
  void attach(hid_t dataset, const Variable& variable);
  std::vector<hsize_t> extent(const Variable& variable, std::size_t count);
  std::string doing(const std::string& what) const;

  std::string name_;
  Handle file_;
  std::map<std::string, hsize_t> size_;  ///< of each dimension
};

}  // namespace palier::files
