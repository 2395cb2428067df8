#include "palier/base/error.hpp"

#include <utility>

namespace palier::base {
namespace {

std::string sentence(const Place& place, const std::string& key, const std::string& problem, const std::string& hint) {
  std::string text;
  if (!place.file.empty()) {
    text += place.file + ":";
    if (place.line > 0) text += std::to_string(place.line) + ":";
    if (place.column > 0) text += std::to_string(place.column) + ":";
    text += " ";
  }
  if (!key.empty()) text += key + ": ";
  text += problem;
  if (!hint.empty()) text += "; " + hint;
  return text;
}

}  // namespace

InputError::InputError(const std::string& problem) : std::runtime_error(problem) {}

InputError::InputError(Place place, std::string key, const std::string& problem, std::string hint)
    : std::runtime_error(sentence(place, key, problem, hint)),
      place_(std::move(place)),
      key_(std::move(key)),
      hint_(std::move(hint)) {}

}  // namespace palier::base
