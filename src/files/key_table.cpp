#include "palier/files/key_table.hpp"

#include <stdexcept>

namespace palier::files {

const KeySpec* KeyTable::find(const std::string& key) const {
  for (const KeySpec& spec : keys)
    if (spec.key == key) return &spec;
  return nullptr;
}

std::vector<std::string> KeyTable::names() const {
  std::vector<std::string> result;
  result.reserve(keys.size());
  for (const KeySpec& spec : keys) result.push_back(spec.key);
  return result;
}

const KeyTable& FileKeys::table(const std::string& where) const {
  for (const KeyTable& candidate : tables)
    if (candidate.where == where) return candidate;
  throw std::logic_error("no table of keys for " + where);
}

}  // namespace palier::files
