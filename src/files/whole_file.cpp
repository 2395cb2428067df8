#include "palier/files/whole_file.hpp"

#include <fcntl.h>
#include <fmt/format.h>
#include <sys/file.h>
#include <unistd.h>

#include <cerrno>
#include <cstdio>
#include <filesystem>
#include <system_error>

#include "palier/base/error.hpp"

namespace palier::files {
namespace {

namespace fs = std::filesystem;

[[noreturn]] void fail(const std::string& path, const std::string& cause) {
  throw base::FileTrouble(fmt::format("{}: cannot be written: {}", path, cause));
}

std::string told(int error) { return std::generic_category().message(error); }

/// The file that is to be replaced, links followed.
fs::path target_of(const std::string& path) {
  std::error_code error;
  const fs::file_status status = fs::status(path, error);
  if (fs::is_directory(status)) fail(path, "it is a folder");
  // Renaming over a device or pipe would take it away.
  if (fs::exists(status) && !fs::is_regular_file(status)) fail(path, "it is not a regular file");
  if (!fs::is_symlink(fs::symlink_status(path, error))) return path;
  fs::path followed = fs::weakly_canonical(path, error);
  if (error) fail(path, error.message());
  return followed;
}

/// The file aside. Removed when it goes out of scope, unless moved to its final name.
class Partial {
 public:
  Partial(std::string name, const fs::path& target)
      : name_(std::move(name)), target_(target), path_(target.string() + ".partial") {
    file_ = ::open(path_.c_str(), O_WRONLY | O_CREAT | O_CLOEXEC, 0666);
    if (file_ < 0) fail(name_, cause_of_open(errno));
    if (::flock(file_, LOCK_EX | LOCK_NB) != 0 && errno == EWOULDBLOCK) {  // else: a file system without locks
      ::close(file_);
      fail(name_, "another process is writing it");
    }
  }
  ~Partial() {
    if (!moved_) ::unlink(path_.c_str());
    ::close(file_);
  }
  Partial(const Partial&) = delete;
  Partial& operator=(const Partial&) = delete;

  void fill(std::span<const std::byte> bytes) {
    const auto size = static_cast<off_t>(bytes.size());
    while (!bytes.empty()) {
      const ssize_t written = ::write(file_, bytes.data(), bytes.size());
      if (written < 0 && errno == EINTR) continue;
      if (written < 0) fail(name_, told(errno));
      bytes = bytes.subspan(static_cast<std::size_t>(written));
    }
    if (::ftruncate(file_, size) != 0) fail(name_, told(errno));  // a killed run may have left a longer one
    if (::fsync(file_) != 0) fail(name_, told(errno));
  }

  void move_to_target() {
    if (std::rename(path_.c_str(), target_.c_str()) != 0) fail(name_, told(errno));
    moved_ = true;
  }

 private:
  std::string cause_of_open(int error) const {
    const fs::path folder = target_.parent_path();
    std::error_code unknown;
    if (error == ENOENT && !folder.empty() && !fs::exists(folder, unknown)) {
      return fmt::format("the folder {} does not exist", folder.string());
    }
    return told(error);
  }

  std::string name_;
  fs::path target_;
  std::string path_;
  int file_ = -1;
  bool moved_ = false;
};

}  // namespace

void write_whole(const std::string& path, std::span<const std::byte> bytes) {
  Partial partial(path, target_of(path));
  partial.fill(bytes);
  partial.move_to_target();
}

}  // namespace palier::files
