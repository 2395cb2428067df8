// The text of an input file as a tree that remembers where each piece stands.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "palier/base/error.hpp"

namespace palier::files {

struct SourceKey;

/// A piece of an input file. Never changed after it is read.
struct SourceNode {
  enum class Kind { nothing, text, list, map };
  Kind kind = Kind::nothing;
  std::string text;               ///< of a text
  bool quoted = false;            ///< text in quotes or a text block
  int line = 0;                   ///< from 1
  int column = 0;                 ///< from 1, in characters
  std::vector<SourceKey> keys;    ///< of a map, in the order of the file
  std::vector<SourceNode> items;  ///< of a list; of a map: the value of each key

  /// The value of a key; nullptr where the key is absent or this is no map.
  const SourceNode* find(std::string_view key) const;
};

/// A key of a map with its place.
struct SourceKey {
  std::string text;
  int line = 0;
  int column = 0;
};

/// An input file as read.
struct SourceFile {
  std::string path;
  std::string text;  ///< the file's bytes
  SourceNode root;   ///< a map
};

/// What an input file may be at most; shown in the messages and on the reference page.
struct SourceLimits {
  static constexpr std::size_t bytes = 8'000'000;
  static constexpr int depth = 40;
  static constexpr int nodes = 200'000;
  /// Characters with a meaning in YAML. yaml-cpp queues about 250 bytes for each of them, before the first event.
  static constexpr int indicators = 800'000;
};

/// Reads text as one YAML mapping. Refused: a second document, repeated keys, anchors, aliases, merges, tags, keys that
/// are not text, tabs as indentation, bytes that are no UTF-8 text, and whatever exceeds SourceLimits.
/// @param file name for the messages
/// Throws base::InputError with the place.
SourceNode parse_source(std::string_view text, const std::string& file);

/// Reads a file the user named.
/// @param what what it should be, for the message, e.g. "case file"
/// Throws base::InputError where it is missing, a folder or unacceptable; base::FileTrouble where reading fails.
SourceFile read_source_file(const std::string& path, const std::string& what);

}  // namespace palier::files
