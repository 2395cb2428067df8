// Reading an input file's bytes from disk.
#include <fmt/format.h>

#include <cerrno>
#include <cstring>
#include <filesystem>
#include <fstream>
#include <system_error>

#include "palier/files/nearest.hpp"
#include "palier/files/source_tree.hpp"

namespace palier::files {
namespace {

namespace fs = std::filesystem;

std::string near_files(const fs::path& path) {
  const fs::path folder = path.has_parent_path() ? path.parent_path() : fs::path(".");
  std::error_code ignored;  // a folder that cannot be listed has no near names; the error is about the file
  std::vector<std::string> names;
  for (fs::directory_iterator entry(folder, ignored), end; !ignored && entry != end; entry.increment(ignored))
    names.push_back(entry->path().filename().string());
  return did_you_mean(path.filename().string(), names);
}

std::string read_bytes(const fs::path& path, const std::string& what) {
  std::ifstream stream(path, std::ios::binary);
  if (!stream)
    throw base::FileTrouble(fmt::format("{}: cannot read the {}: {}", path.string(), what, std::strerror(errno)));
  // One block past the limit is enough for the check of the size to refuse the file.
  std::string text, block(65'536, '\0');
  while (stream && text.size() <= SourceLimits::bytes) {
    stream.read(block.data(), static_cast<std::streamsize>(block.size()));
    text.append(block, 0, static_cast<std::size_t>(stream.gcount()));
  }
  if (stream.bad()) throw base::FileTrouble(fmt::format("{}: reading the {} failed", path.string(), what));
  return text;
}

}  // namespace

SourceFile read_source_file(const std::string& path, const std::string& what) {
  if (path.empty()) throw base::InputError("found an empty file name; expected a " + what);
  if (path.find('\0') != std::string::npos) throw base::InputError("found a NUL in the name of the " + what);
  std::error_code error;
  const fs::file_status status = fs::status(path, error);
  if (status.type() == fs::file_type::not_found)
    throw base::InputError({path, 0, 0}, "", "found no such file; expected a " + what, near_files(path));
  if (error) throw base::FileTrouble(fmt::format("{}: cannot read the {}: {}", path, what, error.message()));
  if (fs::is_directory(status)) throw base::InputError({path, 0, 0}, "", "found a folder; expected a " + what);
  if (!fs::is_regular_file(status))
    throw base::InputError({path, 0, 0}, "", "found a pipe or device; expected a " + what, "save it as a file");
  SourceFile file;
  file.path = path;
  file.text = read_bytes(path, what);
  file.root = parse_source(file.text, path);
  return file;
}

}  // namespace palier::files
