// The keys of the input files: one table feeds the reader, its messages, `check` and the reference page.
#pragma once

#include <string>
#include <vector>

#include "palier/files/quantity.hpp"

namespace palier::files {

/// What stands behind a key.
enum class ValueForm {
  text,
  integer,
  choice,      ///< one of a few words
  flag,        ///< true
  quantity,    ///< a number with its unit
  quantities,  ///< a list of them
  contact,     ///< perfect, a conductance, or a table of it
  points,      ///< a list of pairs
  material,    ///< a name or a file
  sourced,     ///< {value, source} or {points, source}
  texts,       ///< a list of texts
  map,         ///< keys of its own
  maps,        ///< a list of mappings with keys of their own
  walls,       ///< a list of wall entries
};

/// One key. The texts appear as they are on the reference page.
struct KeySpec {
  std::string key;
  ValueForm form = ValueForm::text;
  QuantityKind kind = QuantityKind::ratio;  ///< of quantity, quantities, and sourced
  std::string low, high;                    ///< limits with their units, both included; empty: none
  std::vector<std::string> choices;
  std::string presence;  ///< "required", "optional", or "default: ..."
  std::string meaning;
};

/// The keys of one mapping.
struct KeyTable {
  std::string where;  ///< e.g. "section"; empty: top level
  std::string about;  ///< for the reference page
  std::vector<KeySpec> keys;

  const KeySpec* find(const std::string& key) const;
  std::vector<std::string> names() const;
};

/// All tables of one kind of file, in the order of the reference page.
struct FileKeys {
  std::string name;     ///< "case file"
  std::string version;  ///< key that states the format's version
  std::vector<KeyTable> tables;

  /// Throws std::logic_error where there is no such table.
  const KeyTable& table(const std::string& where) const;
};

const FileKeys& case_keys();
const FileKeys& alloy_keys();
const FileKeys& mold_keys();

}  // namespace palier::files
