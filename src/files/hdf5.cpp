#include "palier/files/hdf5.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <utility>

#include "palier/base/error.hpp"

namespace palier::files {
namespace {

herr_t note_innermost(unsigned depth, const H5E_error2_t* entry, void* cause) {
  if (depth == 0 && entry->desc != nullptr) *static_cast<std::string*>(cause) = entry->desc;
  return 0;
}

std::string innermost_cause() {
  std::string cause = "HDF5 tells no cause";
  H5Ewalk2(H5E_DEFAULT, H5E_WALK_UPWARD, note_innermost, &cause);
  H5Eclear2(H5E_DEFAULT);
  return cause;
}

}  // namespace

Handle::Handle(Handle&& other) noexcept : id_(std::exchange(other.id_, H5I_INVALID_HID)), close_(other.close_) {}

Handle& Handle::operator=(Handle&& other) noexcept {
  std::swap(id_, other.id_);
  std::swap(close_, other.close_);
  return *this;
}

Handle::~Handle() {
  if (id_ >= 0) close_(id_);
}

void prepare_hdf5() {
  H5dont_atexit();  // refused, to no harm, when the library is open already
  H5Eset_auto2(H5E_DEFAULT, nullptr, nullptr);
}

std::string hdf5_version() {
  unsigned major = 0;
  unsigned minor = 0;
  unsigned release = 0;
  require(H5get_libversion(&major, &minor, &release), "cannot ask HDF5 for its version");
  return fmt::format("{}.{}.{}", major, minor, release);
}

std::int64_t require(std::int64_t status, const std::string& doing) {
  if (status < 0) throw base::FileTrouble(fmt::format("{}: {}", doing, innermost_cause()));
  return status;
}

Handle own(hid_t id, Handle::Close close, const std::string& doing) { return {require(id, doing), close}; }

void put_text(hid_t object, const std::string& name, const std::string& text, const std::string& file) {
  const std::string doing = fmt::format("{}: cannot write the attribute {}", file, name);
  const Handle type = own(H5Tcopy(H5T_C_S1), H5Tclose, doing);
  // HDF5 has no text of length 0: an empty one is a single zero byte, which c_str() supplies.
  require(H5Tset_size(type, std::max<std::size_t>(text.size(), 1)), doing);
  require(H5Tset_strpad(type, H5T_STR_NULLTERM), doing);
  require(H5Tset_cset(type, H5T_CSET_UTF8), doing);
  const Handle space = own(H5Screate(H5S_SCALAR), H5Sclose, doing);
  const Handle attribute =
      own(H5Acreate2(object, name.c_str(), type, space, H5P_DEFAULT, H5P_DEFAULT), H5Aclose, doing);
  require(H5Awrite(attribute, type, text.c_str()), doing);
}

}  // namespace palier::files
