#include "palier/files/nearest.hpp"

#include <algorithm>
#include <cctype>
#include <utility>

namespace palier::files {
namespace {

constexpr std::size_t longest_compared = 80;

std::string lower(std::string_view text) {
  std::string result(text.substr(0, longest_compared));
  for (char& c : result) c = static_cast<char>(std::tolower(static_cast<unsigned char>(c)));
  return result;
}

}  // namespace

std::size_t edit_distance(std::string_view a, std::string_view b) {
  const std::size_t width = b.size() + 1;
  std::vector<std::size_t> before(width), last(width), row(width);
  for (std::size_t j = 0; j < width; ++j) last[j] = j;
  for (std::size_t i = 1; i <= a.size(); ++i) {
    row[0] = i;
    for (std::size_t j = 1; j < width; ++j) {
      const std::size_t other = a[i - 1] == b[j - 1] ? 0 : 1;
      row[j] = std::min({last[j] + 1, row[j - 1] + 1, last[j - 1] + other});
      const bool swapped = i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1];
      if (swapped) row[j] = std::min(row[j], before[j - 2] + 1);
    }
    std::swap(before, last);
    std::swap(last, row);
  }
  return last[b.size()];
}

std::vector<std::string> nearest_names(std::string_view name, const std::vector<std::string>& known,
                                       std::size_t at_most) {
  const std::string wanted = lower(name);
  std::vector<std::pair<std::size_t, std::string>> found;
  for (const std::string& candidate : known) {
    const std::string other = lower(candidate);
    const std::size_t allowed = std::max<std::size_t>(1, std::max(wanted.size(), other.size()) / 3);
    const std::size_t distance = edit_distance(wanted, other);
    if (distance <= allowed && distance < std::max(wanted.size(), other.size()))
      found.emplace_back(distance, candidate);
  }
  std::stable_sort(found.begin(), found.end(), [](const auto& a, const auto& b) { return a.first < b.first; });
  std::vector<std::string> names;
  for (std::size_t i = 0; i < std::min(at_most, found.size()); ++i) names.push_back(found[i].second);
  return names;
}

std::string one_of(const std::vector<std::string>& names, std::string_view quote) {
  std::string text;
  for (std::size_t i = 0; i < names.size(); ++i) {
    if (i > 0) text += i + 1 == names.size() ? " or " : ", ";
    text.append(quote).append(names[i]).append(quote);
  }
  return text;
}

std::string did_you_mean(std::string_view name, const std::vector<std::string>& known, std::size_t at_most) {
  const auto near = nearest_names(name, known, at_most);
  return near.empty() ? std::string() : "did you mean " + one_of(near, "'") + "?";
}

}  // namespace palier::files
