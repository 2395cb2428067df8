// Typed errors. Lower layers throw them with plain values; the command line turns them into exit statuses.
#pragma once

#include <stdexcept>
#include <string>

namespace palier::base {

/// Where in an input file something stands; line and column count from 1, 0 means unknown.
struct Place {
  std::string file;
  int line = 0;
  int column = 0;
};

/// An input that cannot be accepted (exit status 2).
///
/// what() reads `file:line:column: key: found ...; expected ... (nearest: ...)`, with the parts that apply.
class InputError : public std::runtime_error {
 public:
  explicit InputError(const std::string& problem);
  /// @param place   where the offending text stands
  /// @param key     path of the key, e.g. `walls.both[2].thickness`; may be empty
  /// @param problem what was found and what was expected, one line
  /// @param hint    what to write instead; may be empty
  InputError(Place place, std::string key, const std::string& problem, std::string hint = {});

  const Place& place() const { return place_; }
  const std::string& key() const { return key_; }
  const std::string& hint() const { return hint_; }

 private:
  Place place_;
  std::string key_;
  std::string hint_;
};

/// The problem is well posed as far as we can tell, but no solution was reached (exit status 3).
class NoSolution : public std::runtime_error {
  using std::runtime_error::runtime_error;
};

/// A file, device or cluster failed us (exit status 4).
class FileTrouble : public std::runtime_error {
  using std::runtime_error::runtime_error;
};

}  // namespace palier::base
