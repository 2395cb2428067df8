// A folder of its own for a test that needs files, removed at the end.
#pragma once

#include <unistd.h>

#include <atomic>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <string>

namespace palier::test {

inline std::string fixtures() { return std::string(PALIER_SOURCE_DIR) + "/tests/files/fixtures"; }
inline std::string library() { return fixtures() + "/library"; }

inline std::string slurp(const std::filesystem::path& path) {
  std::ifstream stream(path, std::ios::binary);
  return {std::istreambuf_iterator<char>(stream), std::istreambuf_iterator<char>()};
}

class Scratch {
 public:
  Scratch() {
    static std::atomic<int> count{0};
    folder_ = std::filesystem::temp_directory_path() /
              ("palier-test-" + std::to_string(getpid()) + "-" + std::to_string(count++));
    std::filesystem::create_directories(folder_);
  }
  ~Scratch() {
    std::error_code ignored;  // a folder left behind must not hide the test's own failure
    std::filesystem::remove_all(folder_, ignored);
  }
  Scratch(const Scratch&) = delete;
  Scratch& operator=(const Scratch&) = delete;

  std::string path(const std::string& name) const { return (folder_ / name).string(); }
  std::string write(const std::string& name, const std::string& text) const {
    std::filesystem::create_directories((folder_ / name).parent_path());
    std::ofstream(folder_ / name, std::ios::binary) << text;
    return path(name);
  }
  /// A message with the names of this folder and of the fixtures taken out.
  std::string without_folders(std::string message) const {
    for (const std::string& folder : {folder_.string() + "/", fixtures() + "/"})
      for (std::size_t at = message.find(folder); at != std::string::npos; at = message.find(folder))
        message.erase(at, folder.size());
    return message;
  }

 private:
  std::filesystem::path folder_;
};

/// A text with its first `from` replaced. Throws std::logic_error where it is not there: an edit that edits nothing.
inline std::string edited(std::string text, const std::string& from, const std::string& to) {
  const std::size_t at = text.find(from);
  if (at == std::string::npos) throw std::logic_error("nothing to edit: " + from);
  return text.replace(at, from.size(), to);
}

}  // namespace palier::test
