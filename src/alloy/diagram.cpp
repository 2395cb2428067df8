#include "palier/alloy/diagram.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "palier/base/error.hpp"

namespace palier::alloy {
namespace {

/// The base metal's side of a binary: a falling liquidus and one partition coefficient.
class BinarySide final : public PhaseDiagram {
 public:
  explicit BinarySide(BinaryLines lines) : lines_(std::move(lines)) {
    const std::vector<double>&c = lines_.liquidus.x(), &T = lines_.liquidus.y();
    if (!(lines_.melting_point > 0)) throw base::InputError("melting point must be above 0 K");
    if (!(lines_.partition_coefficient > 0 && lines_.partition_coefficient < 1))
      throw base::InputError("partition coefficient must lie between 0 and 1 for a falling liquidus");
    if (c.size() < 2 || c.front() != 0 || std::abs(T.front() - lines_.melting_point) > 1e-6)
      throw base::InputError("the liquidus must start at the pure metal's melting point");
    for (std::size_t i = 1; i < c.size(); ++i)
      if (!(T[i] < T[i - 1])) throw base::InputError("the liquidus must fall with composition");
    largest_ = c.back();
    if (lines_.eutectic_temperature) {
      if (!(*lines_.eutectic_temperature < lines_.melting_point))
        throw base::InputError("the eutectic temperature must lie below the melting point");
      if (*lines_.eutectic_temperature < T.back() - 1e-6)
        throw base::InputError("the liquidus ends above the eutectic temperature");
      largest_ = composition_on_liquidus(*lines_.eutectic_temperature);
    }
  }

  double liquidus(double composition) const override {
    if (!(composition > 0 && composition <= largest_ * (1 + 1e-12)))
      throw base::InputError("composition " + std::to_string(composition) +
                             " mass % is outside the diagram; expected 0 to " + std::to_string(largest_) + " mass %");
    // largest_ is an inverse of the line: there, rounding may put the line a last bit below the eutectic.
    return std::max(lines_.liquidus(composition), lines_.eutectic_temperature.value_or(0.0));
  }
  TieLine tie_line(double T) const override {
    const double liquid = composition_on_liquidus(T);
    return {liquid, lines_.partition_coefficient * liquid};
  }
  double melting_point() const override { return lines_.melting_point; }
  std::optional<Invariant> invariant() const override {
    if (!lines_.eutectic_temperature) return std::nullopt;
    return Invariant{"eutectic", *lines_.eutectic_temperature, largest_};
  }
  double largest_composition() const override { return largest_; }
  std::optional<double> constant_partition() const override { return lines_.partition_coefficient; }

 private:
  /// Inverse of the liquidus, continued straight beyond its last point (the end of freezing of a lever path may lie
  /// below it by rounding).
  double composition_on_liquidus(double T) const {
    const std::vector<double>&c = lines_.liquidus.x(), &t = lines_.liquidus.y();
    std::size_t i = 1;
    while (i + 1 < t.size() && T < t[i]) ++i;
    return c[i - 1] + (T - t[i - 1]) * (c[i] - c[i - 1]) / (t[i] - t[i - 1]);
  }

  BinaryLines lines_;
  double largest_ = 0;
};

}  // namespace

BinaryLines BinaryLines::straight(double melting_point, double slope, double k, std::optional<double> eutectic) {
  if (!(slope < 0)) throw base::InputError("the liquidus slope must be negative");
  // Without a eutectic the line is drawn as far as mass % goes, or to half the melting point.
  const double lowest = eutectic ? *eutectic : std::max(melting_point / 2, melting_point + 100 * slope);
  if (!(lowest < melting_point)) throw base::InputError("the eutectic temperature must lie below the melting point");
  BinaryLines lines;
  lines.melting_point = melting_point;
  lines.liquidus = base::Table({0.0, (lowest - melting_point) / slope}, {melting_point, lowest});
  lines.partition_coefficient = k;
  lines.eutectic_temperature = eutectic;
  return lines;
}

std::shared_ptr<const PhaseDiagram> make_diagram(BinaryLines lines) {
  return std::make_shared<BinarySide>(std::move(lines));
}

}  // namespace palier::alloy
