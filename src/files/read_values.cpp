// Quantities and tables of points out of a tree, with their limits.
#include <fmt/format.h>

#include <algorithm>

#include "palier/files/map_reader.hpp"

namespace palier::files {
namespace {

constexpr std::size_t most_points = 20'000;
constexpr std::size_t most_points_shown = 8;

/// Limits are written in the table of keys as a person reads them; both bounds are included.
struct Limits {
  explicit Limits(const KeySpec& spec) {
    if (!spec.low.empty()) low = parse_quantity(spec.low, spec.kind).value;
    if (!spec.high.empty()) high = parse_quantity(spec.high, spec.kind).value;
  }
  std::optional<double> low, high;
};

void check_limits(const Reading& reading, const SourceNode& node, const std::string& path, const KeySpec& spec,
                  const Limits& limits, double value) {
  // Rounding in the conversion of units must not push a value at the bound beyond it.
  const auto slack = [](double bound) { return 1e-12 * std::max(1e-300, bound < 0 ? -bound : bound); };
  const bool below = limits.low && value < *limits.low - slack(*limits.low);
  const bool above = limits.high && value > *limits.high + slack(*limits.high);
  if (below || above)
    refuse(reading, node, path,
           found(node) + (spec.low == spec.high ? "; expected " + spec.low
                                                : fmt::format("; expected between {} and {}", spec.low, spec.high)));
}

Quantity read_within(const Reading& reading, const SourceNode& node, const std::string& path, const KeySpec& spec,
                     const Limits& limits) {
  const KindWords& words = words_of(spec.kind);
  if (node.kind != SourceNode::Kind::text)
    refuse(reading, node, path, fmt::format("{}; expected {} such as {}", found(node), words.name, words.examples));
  try {
    const Quantity quantity = parse_quantity(node.text, spec.kind);
    if (!quantity.atomic_percent) check_limits(reading, node, path, spec, limits, quantity.value);
    return quantity;
  } catch (const QuantityFault& fault) {
    refuse(reading, node, path, fault.what(), fault.hint());
  }
}

std::string written_pair(const SourceNode& pair) {
  return fmt::format("[{}, {}]", pair.items[0].text, pair.items[1].text);
}

std::string written(const std::vector<SourceNode>& pairs) {
  std::vector<std::string> shown;
  if (pairs.size() > most_points_shown)
    return fmt::format("{} points from {} to {}", pairs.size(), written_pair(pairs.front()),
                       written_pair(pairs.back()));
  std::transform(pairs.begin(), pairs.end(), std::back_inserter(shown), written_pair);
  return fmt::format("{}", fmt::join(shown, ", "));
}

std::string example(const PointColumns& columns) {
  const auto first = [](const KeySpec& spec) {
    const std::string& all = words_of(spec.kind).examples;
    return all.substr(0, std::min(all.find(','), all.find(" or ")));
  };
  return fmt::format("[{}, {}]", first(columns.x), first(columns.y));
}

}  // namespace

void check_limits(const Reading& reading, const SourceNode& node, const std::string& path, const KeySpec& spec,
                  double value) {
  check_limits(reading, node, path, spec, Limits(spec), value);
}

Quantity read_quantity(const Reading& reading, const SourceNode& node, const std::string& path, const KeySpec& spec) {
  return read_within(reading, node, path, spec, Limits(spec));
}

Points read_points(const Reading& reading, const SourceNode& node, const std::string& path,
                   const PointColumns& columns) {
  if (node.kind != SourceNode::Kind::list || node.items.size() < 2)
    refuse(reading, node, path,
           fmt::format("{}; expected at least two pairs such as [{}, ...]",
                       node.kind == SourceNode::Kind::list ? "found fewer than two points" : found(node),
                       example(columns)));
  if (node.items.size() > most_points)
    refuse(reading, node, path, fmt::format("found {} points; expected at most {}", node.items.size(), most_points));
  const Limits x_limits(columns.x), y_limits(columns.y);
  Points points;
  for (std::size_t i = 0; i < node.items.size(); ++i) {
    const SourceNode& pair = node.items[i];
    const std::string here = fmt::format("{}[{}]", path, i);
    if (pair.kind != SourceNode::Kind::list || pair.items.size() != 2)
      refuse(reading, pair, here,
             fmt::format(
                 "{}; expected a pair such as {}",
                 pair.kind == SourceNode::Kind::list ? fmt::format("found {} values", pair.items.size()) : found(pair),
                 example(columns)));
    const Quantity first = read_within(reading, pair.items[0], here + "[0]", columns.x, x_limits);
    if (first.atomic_percent)
      refuse(reading, pair.items[0], here + "[0]", found(pair.items[0]) + "; expected wt% in a table");
    const double x = first.value;
    const double y = read_within(reading, pair.items[1], here + "[1]", columns.y, y_limits).value;
    const bool in_order = points.x.empty() || (columns.falling ? x < points.x.back() : x > points.x.back());
    if (!in_order)
      refuse(reading, pair.items[0], here + "[0]",
             fmt::format("{} after '{}'; expected {} values", found(pair.items[0]), node.items[i - 1].items[0].text,
                         columns.falling ? "falling" : "rising"));
    points.x.push_back(x);
    points.y.push_back(y);
  }
  points.written = written(node.items);
  return points;
}

}  // namespace palier::files
