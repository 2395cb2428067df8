#include "palier/files/netcdf_file.hpp"

#include <fmt/format.h>
#include <hdf5_hl.h>

#include <algorithm>
#include <cctype>
#include <functional>
#include <limits>
#include <numeric>
#include <stdexcept>

namespace palier::files {
namespace {

constexpr unsigned in_order = H5P_CRT_ORDER_TRACKED | H5P_CRT_ORDER_INDEXED;
constexpr std::size_t memory_step = 1 << 20;       // [bytes] by which the file in memory grows
constexpr hsize_t values_per_chunk = 1 << 16;      // keeps a chunk within HDF5's default cache of 1 MiB
constexpr std::size_t worth_compressing = 1 << 9;  // values; below this a chunk's index costs more than it saves
constexpr unsigned deflate_level = 4;

Handle list(hid_t kind, const std::string& doing) { return own(H5Pcreate(kind), H5Pclose, doing); }

Handle create_in_memory(const std::string& doing) {
  prepare_hdf5();
  const Handle access = list(H5P_FILE_ACCESS, doing);
  require(H5Pset_fapl_core(access, memory_step, false), doing);
  require(H5Pset_libver_bounds(access, H5F_LIBVER_EARLIEST, H5F_LIBVER_LATEST), doing);
  const Handle creation = list(H5P_FILE_CREATE, doing);
  require(H5Pset_link_creation_order(creation, in_order), doing);
  require(H5Pset_attr_creation_order(creation, in_order), doing);
  require(H5Pset_obj_track_times(creation, false), doing);
  return own(H5Fcreate("result in memory", H5F_ACC_TRUNC, creation, access), H5Fclose, doing);
}

/// One word for flag_meanings: CF separates them by blanks and allows letters, digits and `_-.+@`.
std::string one_word(std::string text) {
  for (char& c : text) {
    if (std::isalnum(static_cast<unsigned char>(c)) == 0 && std::string("_-.+@").find(c) == std::string::npos) c = '_';
  }
  return text;
}

void put_array(hid_t object, const std::string& name, hid_t stored, hid_t given, const void* data, hsize_t count,
               const std::string& doing) {
  const Handle space = own(H5Screate_simple(1, &count, nullptr), H5Sclose, doing);
  const Handle attribute =
      own(H5Acreate2(object, name.c_str(), stored, space, H5P_DEFAULT, H5P_DEFAULT), H5Aclose, doing);
  require(H5Awrite(attribute, given, data), doing);
}

/// Whole leading rows, as many as a chunk takes.
std::vector<hsize_t> chunk_of(std::vector<hsize_t> extent) {
  const hsize_t row = std::accumulate(extent.begin() + 1, extent.end(), hsize_t{1}, std::multiplies<>());
  extent.front() = std::clamp<hsize_t>(values_per_chunk / row, 1, extent.front());
  return extent;
}

}  // namespace

NetcdfFile::NetcdfFile(const std::string& name)
    : name_(name), file_(create_in_memory(name + ": cannot set up the file in memory")) {}

std::string NetcdfFile::doing(const std::string& what) const { return fmt::format("{}: cannot {}", name_, what); }

std::vector<hsize_t> NetcdfFile::extent(const Variable& variable, std::size_t count) {
  if (variable.dimensions == std::vector{variable.name}) size_[variable.name] = count;
  std::vector<hsize_t> extent;
  for (const std::string& dimension : variable.dimensions) {
    const auto found = size_.find(dimension);
    if (found == size_.end()) throw std::logic_error(variable.name + " wants the unknown dimension " + dimension);
    extent.push_back(found->second);
  }
  const hsize_t wanted = std::accumulate(extent.begin(), extent.end(), hsize_t{1}, std::multiplies<>());
  if (count == 0 || wanted != count) {
    throw std::logic_error(fmt::format("{}: {} values where the dimensions ask for {}", variable.name, count, wanted));
  }
  return extent;
}

Handle NetcdfFile::create(const Variable& variable, const Values& values) {
  const std::string task = doing("write the variable " + variable.name);
  const std::vector<hsize_t> size = extent(variable, values.count);
  const Handle space =
      own(size.empty() ? H5Screate(H5S_SCALAR) : H5Screate_simple(static_cast<int>(size.size()), size.data(), nullptr),
          H5Sclose, task);
  const Handle creation = list(H5P_DATASET_CREATE, task);
  require(H5Pset_obj_track_times(creation, false), task);
  require(H5Pset_attr_creation_order(creation, in_order), task);
  if (values.count >= worth_compressing) {
    require(H5Pset_chunk(creation, static_cast<int>(size.size()), chunk_of(size).data()), task);
    require(H5Pset_shuffle(creation), task);
    require(H5Pset_deflate(creation, deflate_level), task);
  }
  const double none = std::numeric_limits<double>::quiet_NaN();
  if (variable.gaps) require(H5Pset_fill_value(creation, H5T_NATIVE_DOUBLE, &none), task);
  Handle dataset =
      own(H5Dcreate2(file_, variable.name.c_str(), values.stored, space, H5P_DEFAULT, creation, H5P_DEFAULT), H5Dclose,
          task);
  require(H5Dwrite(dataset, values.given, H5S_ALL, H5S_ALL, H5P_DEFAULT, values.data), task);
  attach(dataset, variable);
  if (variable.gaps) put_array(dataset, "_FillValue", H5T_IEEE_F64LE, H5T_NATIVE_DOUBLE, &none, 1, task);
  put_text(dataset, "units", variable.units, name_);
  put_text(dataset, "long_name", variable.long_name, name_);
  for (const auto& [name, text] : variable.more) put_text(dataset, name, text, name_);
  return dataset;
}

void NetcdfFile::attach(hid_t dataset, const Variable& variable) {
  const std::string task = doing("attach the dimensions of " + variable.name);
  if (variable.dimensions == std::vector{variable.name}) {
    require(H5DSset_scale(dataset, variable.name.c_str()), task);
    return;
  }
  for (unsigned i = 0; i < variable.dimensions.size(); ++i) {
    const Handle scale = own(H5Dopen2(file_, variable.dimensions[i].c_str(), H5P_DEFAULT), H5Dclose, task);
    require(H5DSattach_scale(dataset, scale, i), task);
  }
}

void NetcdfFile::dimension(const std::string& name, std::size_t size) {
  const std::string task = doing("write the dimension " + name);
  const hsize_t extent = size;
  const Handle space = own(H5Screate_simple(1, &extent, nullptr), H5Sclose, task);
  const Handle creation = list(H5P_DATASET_CREATE, task);
  require(H5Pset_obj_track_times(creation, false), task);
  require(H5Pset_attr_creation_order(creation, in_order), task);
  const Handle dataset =
      own(H5Dcreate2(file_, name.c_str(), H5T_IEEE_F32BE, space, H5P_DEFAULT, creation, H5P_DEFAULT), H5Dclose, task);
  // The text by which netCDF-4 marks a dimension that has no variable (netCDF file format specification, NetCDF-4).
  const std::string mark = fmt::format("This is a netCDF dimension but not a netCDF variable. {:9d}", size);
  require(H5DSset_scale(dataset, mark.c_str()), task);
  size_[name] = extent;
}

void NetcdfFile::write(const Variable& variable, const std::vector<double>& values) {
  create(variable, {H5T_IEEE_F64LE, H5T_NATIVE_DOUBLE, values.data(), values.size()});
}

void NetcdfFile::write(const Variable& variable, double scalar) {
  create(variable, {H5T_IEEE_F64LE, H5T_NATIVE_DOUBLE, &scalar, 1});
}

void NetcdfFile::write(const Variable& variable, std::int32_t scalar) {
  create(variable, {H5T_STD_I32LE, H5T_NATIVE_INT32, &scalar, 1});
}

void NetcdfFile::write_flags(const Variable& variable, const std::vector<int>& values,
                             const std::vector<std::string>& names) {
  if (names.size() > std::numeric_limits<std::int8_t>::max()) {
    throw std::logic_error(fmt::format("{}: {} names do not fit a byte", variable.name, names.size()));
  }
  std::vector<std::int8_t> flags;
  for (const int value : values) {
    if (value < 0 || value >= static_cast<int>(names.size())) {
      throw std::logic_error(fmt::format("{}: there is no name for {}", variable.name, value));
    }
    flags.push_back(static_cast<std::int8_t>(value));
  }
  std::vector<std::int8_t> numbers(names.size());
  std::iota(numbers.begin(), numbers.end(), std::int8_t{0});
  std::string words;
  std::string lines;
  for (const std::string& name : names) {
    words += (words.empty() ? "" : " ") + one_word(name);
    lines += (lines.empty() ? "" : "\n") + name;
  }
  const Handle dataset = create(variable, {H5T_STD_I8LE, H5T_NATIVE_INT8, flags.data(), flags.size()});
  put_array(dataset, "flag_values", H5T_STD_I8LE, H5T_NATIVE_INT8, numbers.data(), numbers.size(),
            doing("name the values of " + variable.name));
  put_text(dataset, "flag_meanings", words, name_);
  put_text(dataset, "names", lines, name_);
}

void NetcdfFile::text(const std::string& name, const std::string& text) {
  const Handle root = own(H5Gopen2(file_, "/", H5P_DEFAULT), H5Gclose, doing("open the root group"));
  put_text(root, name, text, name_);
}

void NetcdfFile::text(const std::string& group, const std::string& name, const std::string& text) {
  const std::string task = doing("write the group " + group);
  if (require(H5Lexists(file_, group.c_str(), H5P_DEFAULT), task) == 0) {
    const Handle creation = list(H5P_GROUP_CREATE, task);
    require(H5Pset_link_creation_order(creation, in_order), task);
    require(H5Pset_attr_creation_order(creation, in_order), task);
    require(H5Pset_obj_track_times(creation, false), task);
    own(H5Gcreate2(file_, group.c_str(), H5P_DEFAULT, creation, H5P_DEFAULT), H5Gclose, task);
  }
  const Handle place = own(H5Gopen2(file_, group.c_str(), H5P_DEFAULT), H5Gclose, task);
  put_text(place, name, text, name_);
}

std::vector<std::byte> NetcdfFile::bytes() {
  const std::string task = doing("finish the file in memory");
  require(H5Fflush(file_, H5F_SCOPE_GLOBAL), task);
  std::vector<std::byte> image(static_cast<std::size_t>(require(H5Fget_file_image(file_, nullptr, 0), task)));
  require(H5Fget_file_image(file_, image.data(), image.size()), task);
  return image;
}

}  // namespace palier::files
