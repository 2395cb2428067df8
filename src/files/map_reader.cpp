#include "palier/files/map_reader.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <charconv>
#include <stdexcept>
#include <system_error>
#include <utility>

#include "palier/files/nearest.hpp"

namespace palier::files {
namespace {

/// "'thickness' belongs under section", or the nearest key of this table, or of any other.
std::string unknown_key_hint(const FileKeys& file, const KeyTable& table, const std::string& key) {
  std::vector<std::string> homes, elsewhere;
  for (const KeyTable& other : file.tables) {
    if (&other == &table) continue;
    if (other.find(key) != nullptr) homes.push_back(other.where.empty() ? "the top level" : other.where);
    for (const std::string& name : other.names()) elsewhere.push_back(name);
  }
  std::string here = did_you_mean(key, table.names());
  if (!homes.empty()) return fmt::format("'{}' belongs under {}", key, one_of(homes));
  if (!here.empty()) return here;
  const auto near = nearest_names(key, elsewhere, 1);
  if (near.empty()) return "known keys: " + fmt::format("{}", fmt::join(table.names(), ", "));
  return fmt::format("did you mean '{}'? But {}", near.front(), unknown_key_hint(file, table, near.front()));
}

std::string expected_value(const KeySpec& spec) {
  const bool quantity = spec.form == ValueForm::quantity || spec.form == ValueForm::sourced;
  if (quantity && spec.presence != "this or points")
    return fmt::format("{} such as {}", words_of(spec.kind).name, words_of(spec.kind).examples);
  return spec.form == ValueForm::choice ? one_of(spec.choices) : spec.meaning;
}

std::string clipped(const std::string& text) {
  static constexpr std::size_t longest = 60;
  std::string line = text.substr(0, text.find('\n'));
  std::size_t end = std::min(line.size(), longest);
  while (end < line.size() && end > 0 && (static_cast<unsigned char>(line[end]) & 0xC0U) == 0x80U) --end;
  const bool cut = end < text.size();
  return line.substr(0, end) + (cut ? "..." : "");
}

}  // namespace

void refuse(const Reading& reading, const SourceNode& node, const std::string& key, const std::string& problem,
            const std::string& hint) {
  throw base::InputError({reading.file, node.line, node.column}, key, problem, hint);
}

std::string found(const SourceNode& node) {
  switch (node.kind) {
    case SourceNode::Kind::nothing:
      return "found no value";
    case SourceNode::Kind::text:
      return fmt::format("found '{}'", clipped(node.text));
    case SourceNode::Kind::list:
      return "found a list";
    default:
      return "found a mapping";
  }
}

void check_version(const Reading& reading, const SourceNode& root) {
  if (root.find(reading.keys.version) != nullptr) return;
  for (const FileKeys* other : {&case_keys(), &alloy_keys(), &mold_keys()})
    if (root.find(other->version) != nullptr)
      refuse(reading, root, "",
             fmt::format("found a{} {}; expected a{} {}", other == &alloy_keys() ? "n" : "", other->name,
                         &reading.keys == &alloy_keys() ? "n" : "", reading.keys.name));
  std::vector<std::string> names;
  for (const SourceKey& key : root.keys) names.push_back(key.text);
  const bool misspelt = !nearest_names(reading.keys.version, names, 1).empty();
  // A misspelt version is an unknown key, which the reader of the mapping reports with the right name.
  if (!misspelt)
    refuse(reading, root, reading.keys.version, "found no version of the format",
           fmt::format("begin the file with '{}: 1'", reading.keys.version));
}

MapReader::MapReader(Reading& reading, const SourceNode& node, std::string path, const KeyTable& table)
    : reading_(reading), node_(node), path_(std::move(path)), table_(table) {
  if (node.kind != SourceNode::Kind::map)
    refuse(reading, node, path_,
           fmt::format("{}; expected a mapping with keys such as {}", found(node), table.keys.front().key));
  check_keys();
}

void MapReader::check_keys() const {
  for (const SourceKey& key : node_.keys) {
    if (table_.find(key.text) != nullptr) continue;
    throw base::InputError({reading_.file, key.line, key.column}, path(clipped(key.text)), "found an unknown key",
                           unknown_key_hint(reading_.keys, table_, key.text));
  }
}

std::string MapReader::path(const std::string& key) const { return path_.empty() ? key : path_ + "." + key; }

const KeySpec& MapReader::spec(const std::string& key) const {
  const KeySpec* found_spec = table_.find(key);
  if (found_spec == nullptr) throw std::logic_error("the table of keys lacks " + path(key));
  return *found_spec;
}

const SourceNode& MapReader::required(const std::string& key) const {
  const SourceNode* value = node_.find(key);
  if (value == nullptr)
    refuse(reading_, node_, path(key), fmt::format("found no key '{}'; expected {}", key, expected_value(spec(key))));
  if (value->kind == SourceNode::Kind::nothing)
    refuse(reading_, *value, path(key), "found no value; expected " + expected_value(spec(key)));
  return *value;
}

double MapReader::quantity(const std::string& key) const {
  const SourceNode& value = required(key);
  const double result = read_quantity(reading_, value, path(key), spec(key)).value;
  note(key, value.text);
  return result;
}

std::optional<double> MapReader::quantity_if(const std::string& key) const {
  return has(key) ? std::optional<double>(quantity(key)) : std::nullopt;
}

int MapReader::integer(const std::string& key) const {
  const SourceNode& value = required(key);
  const KeySpec& limits = spec(key);
  int result = 0;
  const char* end = value.text.data() + value.text.size();
  const auto [stop, error] = std::from_chars(value.text.data(), end, result);
  const bool zero_first = value.text.size() > 1 && value.text[0] == '0';
  if (value.kind != SourceNode::Kind::text || value.quoted || error != std::errc() || stop != end || zero_first)
    fail(key, fmt::format("{}; expected a whole number such as {}", found(value), limits.low),
         value.quoted ? "write it without quotes" : "");
  check_limits(reading_, value, path(key), limits, result);
  note(key, value.text);
  return result;
}

std::optional<int> MapReader::integer_if(const std::string& key) const {
  return has(key) ? std::optional<int>(integer(key)) : std::nullopt;
}

std::string MapReader::text(const std::string& key) const {
  const SourceNode& value = required(key);
  if (value.kind != SourceNode::Kind::text || value.text.find_first_not_of(" \t\r\n") == std::string::npos)
    fail(key, fmt::format("{}; expected a text: {}", found(value), spec(key).meaning));
  note(key, value.text);
  return value.text;
}

std::string MapReader::choice(const std::string& key) const {
  const SourceNode& value = required(key);
  const auto& choices = spec(key).choices;
  if (value.kind != SourceNode::Kind::text || std::find(choices.begin(), choices.end(), value.text) == choices.end())
    fail(key, fmt::format("{}; expected {}", found(value), one_of(choices)),
         value.kind == SourceNode::Kind::text ? did_you_mean(value.text, choices) : "");
  note(key, value.text);
  return value.text;
}

std::vector<double> MapReader::quantities(const std::string& key) const {
  const SourceNode& list = required(key);
  const KeySpec& column = spec(key);
  if (list.kind != SourceNode::Kind::list)
    fail(key, fmt::format("{}; expected a list such as [{}, {}]", found(list), column.low, column.high));
  std::vector<double> result;
  std::vector<std::string> written;
  for (const SourceNode& item : list.items) {
    result.push_back(read_quantity(reading_, item, fmt::format("{}[{}]", path(key), result.size()), column).value);
    written.push_back(item.text);
  }
  note(key, fmt::format("{}", fmt::join(written, ", ")));
  return result;
}

std::vector<std::string> MapReader::texts(const std::string& key) const {
  const SourceNode& list = required(key);
  if (list.kind != SourceNode::Kind::list) fail(key, found(list) + "; expected a list of texts");
  std::vector<std::string> result;
  for (const SourceNode& item : list.items) {
    if (item.kind != SourceNode::Kind::text)
      refuse(reading_, item, fmt::format("{}[{}]", path(key), result.size()), found(item) + "; expected a text");
    result.push_back(item.text);
  }
  note(key, fmt::format("{}", fmt::join(result, ", ")));
  return result;
}

void MapReader::flag(const std::string& key) const {
  const SourceNode& value = required(key);
  if (value.kind != SourceNode::Kind::text || value.quoted || value.text != "true")
    fail(key, fmt::format("{}; expected true", found(value)), "leave the key out where it does not apply");
  note(key, "true");
}

MapReader MapReader::map(const std::string& key, const std::string& table) const {
  return MapReader(reading_, required(key), path(key), reading_.keys.table(table));
}

std::vector<MapReader> MapReader::maps(const std::string& key, const std::string& table) const {
  const SourceNode& list = required(key);
  if (list.kind != SourceNode::Kind::list || list.items.empty())
    fail(key, fmt::format("{}; expected a list of entries, each with a '-'",
                          list.kind == SourceNode::Kind::list ? "found an empty list" : found(list)));
  std::vector<MapReader> result;
  for (const SourceNode& item : list.items)
    result.emplace_back(reading_, item, fmt::format("{}[{}]", path(key), result.size()), reading_.keys.table(table));
  return result;
}

void MapReader::note(const std::string& key, const std::string& value) const { note(key, value, reading_.from); }

void MapReader::note(const std::string& key, const std::string& value, const std::string& from) const {
  reading_.resolved.push_back({path(key), value, from});
}

void MapReader::fail(const std::string& key, const std::string& problem, const std::string& hint) const {
  const SourceNode* value = node_.find(key);
  refuse(reading_, value == nullptr ? node_ : *value, path(key), problem, hint);
}

}  // namespace palier::files
