// Reads the values of one mapping of an input file against its table of keys.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "palier/files/case_file.hpp"
#include "palier/files/key_table.hpp"
#include "palier/files/source_tree.hpp"

namespace palier::files {

/// The file being read and where its values are noted down. Both must outlive the readers that use it.
struct Reading {
  std::string file;
  const FileKeys& keys;
  std::vector<ResolvedValue>& resolved;
  std::string from;  ///< where values without a source of their own come from: "case", or "file" for a material
};

/// Pairs of a table, in the units of the two columns.
struct Points {
  std::vector<double> x, y;
  std::string written;  ///< as a person wrote them, shortened where there are many
};

/// The two columns of a table of points and the direction of the first.
struct PointColumns {
  KeySpec x, y;
  bool falling = false;
};

/// Throws base::InputError with the place of a node.
[[noreturn]] void refuse(const Reading& reading, const SourceNode& node, const std::string& key,
                         const std::string& problem, const std::string& hint = {});

/// What a node is, for messages: "the text 'x'", "a list", ...
std::string found(const SourceNode& node);

/// Throws base::InputError where a value lies outside the limits of its key.
void check_limits(const Reading& reading, const SourceNode& node, const std::string& path, const KeySpec& spec,
                  double value);

/// One quantity with its limits checked, except a composition in at%, which is returned unconverted and unchecked.
Quantity read_quantity(const Reading& reading, const SourceNode& node, const std::string& path, const KeySpec& spec);

/// A list of pairs, the first column strictly rising (or falling). Throws base::InputError naming the pair.
Points read_points(const Reading& reading, const SourceNode& node, const std::string& path,
                   const PointColumns& columns);

/// Throws base::InputError unless the file states the version of its format, naming the kind of file it is instead.
void check_version(const Reading& reading, const SourceNode& root);

class MapReader {
 public:
  /// Refuses what is no mapping and every key the table does not know, naming the nearest or where it belongs.
  MapReader(Reading& reading, const SourceNode& node, std::string path, const KeyTable& table);

  Reading& reading() const { return reading_; }
  const SourceNode& node() const { return node_; }
  const std::string& path() const { return path_; }
  std::string path(const std::string& key) const;
  const KeySpec& spec(const std::string& key) const;
  bool has(const std::string& key) const { return node_.find(key) != nullptr; }
  /// Throws base::InputError where the key is absent.
  const SourceNode& required(const std::string& key) const;

  /// Each reads a required key, checks its limits and notes it as resolved.
  double quantity(const std::string& key) const;
  int integer(const std::string& key) const;
  std::string text(const std::string& key) const;
  std::string choice(const std::string& key) const;
  /// Nothing where the key is absent.
  std::optional<double> quantity_if(const std::string& key) const;
  std::optional<int> integer_if(const std::string& key) const;
  std::vector<double> quantities(const std::string& key) const;
  std::vector<std::string> texts(const std::string& key) const;
  /// `true`; anything else is refused.
  void flag(const std::string& key) const;
  MapReader map(const std::string& key, const std::string& table) const;
  /// A list of mappings, each with the keys of a table; at least one.
  std::vector<MapReader> maps(const std::string& key, const std::string& table) const;

  /// Notes a value as standing in this file.
  void note(const std::string& key, const std::string& value) const;
  /// Notes a value; @param from "default", a source, or how it was computed
  void note(const std::string& key, const std::string& value, const std::string& from) const;
  /// Throws base::InputError at the key's value.
  [[noreturn]] void fail(const std::string& key, const std::string& problem, const std::string& hint = {}) const;

 private:
  void check_keys() const;

  Reading& reading_;
  const SourceNode& node_;
  std::string path_;
  const KeyTable& table_;
};

}  // namespace palier::files
