// Ownership, errors and text attributes over the C interface of HDF5.
#pragma once

#include <hdf5.h>

#include <cstdint>
#include <string>

namespace palier::files {

/// Owns an HDF5 identifier and closes it.
class Handle {
 public:
  using Close = herr_t (*)(hid_t);
  Handle(hid_t id, Close close) : id_(id), close_(close) {}
  Handle(Handle&& other) noexcept;
  Handle& operator=(Handle&& other) noexcept;
  Handle(const Handle&) = delete;
  Handle& operator=(const Handle&) = delete;
  ~Handle();
  operator hid_t() const { return id_; }

 private:
  hid_t id_;
  Close close_;
};

/// To be called before any other call of HDF5. Takes the library's exit handler away, which crashes the process when a
/// file could not be closed, and keeps the library from printing on the calling thread.
void prepare_hdf5();

/// Version of the library in use, e.g. `1.10.8`.
std::string hdf5_version();

/// Passes a status or identifier through.
/// @param doing what was tried on which file, e.g. `out.h5: cannot create the variable time`
/// Throws base::FileTrouble with `doing` and the innermost cause HDF5 tells, where the status is negative.
std::int64_t require(std::int64_t status, const std::string& doing);

/// Owns `id` after require().
Handle own(hid_t id, Handle::Close close, const std::string& doing);

/// Adds a text attribute in the form netCDF-4 writes, which every reader knows: fixed length, UTF-8, scalar.
/// @param file for messages. Throws as require().
void put_text(hid_t object, const std::string& name, const std::string& text, const std::string& file);

}  // namespace palier::files
