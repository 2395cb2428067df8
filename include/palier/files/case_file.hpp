// Reads a case file and the materials it names into a section, and remembers where every value came from.
#pragma once

#include <string>
#include <vector>

#include "palier/freeze/section.hpp"

namespace palier::files {

/// One value of the resolved case, for `palier check` and the result file.
struct ResolvedValue {
  std::string key;    ///< path of the key, e.g. `walls.both[1].thickness`
  std::string value;  ///< in the units a person reads, e.g. `120 mm`
  std::string from;   ///< "case", "default" or, for a value of a material, its source
};

/// A material file as used.
struct MaterialFile {
  std::string name;
  std::string path;
  std::string text;                   ///< the file's bytes
  std::vector<ResolvedValue> values;  ///< every value with its source
};

struct CaseFile {
  std::string path;
  std::string text;  ///< the file's bytes
  freeze::Section section;
  std::vector<ResolvedValue> resolved;  ///< in the order of the reference page; defaults included
  std::vector<MaterialFile> materials;  ///< each once, in order of first use
};

/// Reads a case. Materials are looked up by name beside the case file, then in `<library>/alloys`, `<library>/molds`.
/// @param path    of the case file
/// @param library folder of the shipped cases
/// Throws base::InputError with the place of what is wrong, base::FileTrouble where a file cannot be read.
CaseFile read_case(const std::string& path, const std::string& library);

/// The reference page of all keys of case, alloy and mold files (Markdown), made from the reader's own tables.
std::string key_reference();

}  // namespace palier::files
