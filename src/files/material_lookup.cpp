// Finding the file of a material by its name.
#include <fmt/format.h>

#include <algorithm>
#include <cctype>
#include <filesystem>
#include <fstream>
#include <set>
#include <system_error>

#include "palier/files/material_file.hpp"
#include "palier/files/nearest.hpp"

namespace palier::files {
namespace {

namespace fs = std::filesystem;

constexpr std::size_t longest_name = 250;

struct KindOfMaterial {
  std::string what, folder, version_key;
};

const KindOfMaterial& words_of(MaterialKind kind) {
  static const KindOfMaterial alloy{"alloy", "alloys", "palier-alloy"}, mold{"mold material", "molds", "palier-mold"};
  return kind == MaterialKind::alloy ? alloy : mold;
}

/// Whether a file near the case is a material at all: its folder also holds cases.
bool begins_as(const fs::path& path, const std::string& version_key) {
  std::ifstream stream(path, std::ios::binary);
  std::string start(4096, '\0');
  stream.read(start.data(), static_cast<std::streamsize>(start.size()));
  start.resize(static_cast<std::size_t>(std::max<std::streamsize>(stream.gcount(), 0)));
  return start.find(version_key + ":") != std::string::npos;
}

std::vector<std::string> names_in(const fs::path& folder, const std::string& version_key) {
  std::set<std::string> names;
  std::error_code ignored;  // a folder that cannot be listed has no names to offer
  for (fs::directory_iterator entry(folder, ignored), end; !ignored && entry != end; entry.increment(ignored)) {
    std::error_code no_file;
    if (entry->path().extension() == ".yaml" && entry->is_regular_file(no_file) &&
        begins_as(entry->path(), version_key))
      names.insert(entry->path().stem().string());
  }
  return {names.begin(), names.end()};
}

bool ends_in_yaml(const std::string& name) {
  static const std::string ending = ".yaml";
  return name.size() > ending.size() && name.compare(name.size() - ending.size(), ending.size(), ending) == 0;
}

std::string unknown_name_hint(const std::string& name, std::vector<std::string> known) {
  const std::string file = material_file_name(name);
  std::string near = did_you_mean(file.substr(0, file.rfind('.')), known, 3);
  if (!near.empty()) return near;
  return known.empty() ? "no such file is there at all" : fmt::format("known: {}", fmt::join(known, ", "));
}

}  // namespace

std::string material_file_name(const std::string& name) {
  std::string result;
  for (const char c : name) {
    const bool kept = (static_cast<unsigned char>(c) < 128 && std::isalnum(static_cast<unsigned char>(c)) != 0) ||
                      c == '.' || c == '+' || c == '-';
    if (kept)
      result += c;
    else if (result.empty() || result.back() != '-')
      result += '-';
  }
  return result + ".yaml";
}

std::string find_alloy(const std::string& name, const MaterialFolders& folders) {
  const fs::path library = fs::path(folders.library) / words_of(MaterialKind::alloy).folder;
  std::error_code error;
  if (ends_in_yaml(name)) return name;  // reading it tells what is wrong with it
  const std::string file = material_file_name(name);
  for (const fs::path& path : {fs::path(folders.beside) / file, library / file})
    if (fs::exists(path, error)) return path.string();
  throw base::InputError(
      fmt::format("there is no file {} here or in {}; {}", file, library.string(),
                  unknown_name_hint(name, names_in(library, words_of(MaterialKind::alloy).version_key))));
}

std::string find_material(const Reading& reading, const SourceNode& in_case, const std::string& key, MaterialKind kind,
                          const MaterialFolders& folders) {
  const KindOfMaterial& words = words_of(kind);
  if (in_case.kind != SourceNode::Kind::text || in_case.text.empty() || in_case.text.size() > longest_name)
    refuse(reading, in_case, key,
           fmt::format("{}; expected the name of a{} {}, or a file ending in .yaml", found(in_case),
                       kind == MaterialKind::alloy ? "n" : "", words.what));
  const fs::path beside(folders.beside), library = fs::path(folders.library) / words.folder;
  std::error_code error;
  if (ends_in_yaml(in_case.text)) {
    const fs::path path = beside / in_case.text;
    if (!fs::exists(path, error))
      refuse(reading, in_case, key, fmt::format("found '{}', but there is no file {}", in_case.text, path.string()),
             "a file is looked up relative to the case");
    return path.string();
  }
  const std::string name = material_file_name(in_case.text);
  for (const fs::path& path : {beside / name, library / name}) {
    const bool is_case_itself = fs::equivalent(path, reading.file, error);
    if (fs::exists(path, error) && !is_case_itself) return path.string();
  }
  std::vector<std::string> known = names_in(beside, words.version_key);
  for (const std::string& other : names_in(library, words.version_key))
    if (std::find(known.begin(), known.end(), other) == known.end()) known.push_back(other);
  refuse(
      reading, in_case, key,
      fmt::format("found '{}', but there is no file {} beside the case or in {}", in_case.text, name, library.string()),
      unknown_name_hint(in_case.text, known));
}

}  // namespace palier::files
