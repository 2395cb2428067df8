#include "palier/alloy/arm_model.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>
#include <sstream>
#include <string>
#include <utility>

#include "palier/base/error.hpp"

namespace palier::alloy {
namespace {

/// Solute of each cell of the solid, and of the liquid behind them; per composition of the alloy and half arm.
using Content = std::vector<double>;

double sum(const Content& content) {
  double total = 0;
  for (const double part : content) total += part;
  return total;
}

/// The balances of one implicit step. Unknowns: composition of each cell, then of the solid at the front.
class StepBalance {
 public:
  StepBalance(const Arm& arm, std::size_t cells)
      : arm_(arm), width_(1.0 / static_cast<double>(cells)), rows_(cells + 1), faces_(cells + 1) {}

  /// Contents at fraction solid fs, where d(content)/d(fs) there is rate * content - before.
  Content solve(double fs, double rate, const Content& before) {
    set_rows(fs, rate, before);
    eliminate();
    // From what passes the faces, not from the compositions: rounding then cannot make or lose solute, however fast it
    // diffuses.
    Content content = before;
    for (std::size_t i = 1; i < rows_.size(); ++i) {
      const double passes = faces_[i].from_behind * rows_[i].right + faces_[i].from_before * rows_[i - 1].right;
      content[i - 1] += passes;
      content[i] -= passes;
    }
    for (double& part : content) part /= rate;
    return content;
  }
  /// Composition of the liquid, of the step solved last.
  double liquid() const { return rows_.back().right / arm_.partition_coefficient; }

 private:
  struct Row {
    double lower, diagonal, upper, right;
  };
  /// Solute that passes inward per composition behind the face and before it.
  struct Face {
    double from_behind, from_before;
  };

  void set_rows(double fs, double rate, const Content& before) {
    const std::size_t cells = rows_.size() - 1;
    const double P = arm_.growth == ArmGrowth::parabolic ? 2 * arm_.diffusion_number : arm_.diffusion_number / fs;
    for (std::size_t i = 0; i < cells; ++i) rows_[i] = {0, rate * fs * width_, 0, before[i]};
    rows_[cells] = {0, rate * (1 - fs) / arm_.partition_coefficient, 0, before[cells]};
    for (std::size_t i = 1; i <= cells; ++i) {
      const double y = static_cast<double>(i) * width_, conduction = P / width_;
      // At the front the composition is an unknown itself, half a cell away.
      faces_[i] =
          i == cells ? Face{2 * conduction + 1, -2 * conduction} : Face{conduction + 0.5 * y, 0.5 * y - conduction};
      rows_[i - 1].diagonal -= faces_[i].from_before;
      rows_[i - 1].upper -= faces_[i].from_behind;
      rows_[i].lower += faces_[i].from_before;
      rows_[i].diagonal += faces_[i].from_behind;
    }
  }

  /// Solution into `right`. No pivoting: the cells are narrow enough that the diagonal dominates.
  void eliminate() {
    for (std::size_t i = 1; i < rows_.size(); ++i) {
      const double factor = rows_[i].lower / rows_[i - 1].diagonal;
      rows_[i].diagonal -= factor * rows_[i - 1].upper;
      rows_[i].right -= factor * rows_[i - 1].right;
    }
    rows_.back().right /= rows_.back().diagonal;
    for (std::size_t i = rows_.size() - 1; i-- > 0;)
      rows_[i].right = (rows_[i].right - rows_[i].upper * rows_[i + 1].right) / rows_[i].diagonal;
  }

  Arm arm_;
  double width_;
  std::vector<Row> rows_;
  std::vector<Face> faces_;  ///< face i before cell i; none at 0, the middle of the arm
};

void check(const Arm& arm, const ArmGrid& grid) {
  const double k = arm.partition_coefficient, a = arm.diffusion_number;
  if (!(k > 0 && k < 1))
    throw base::InputError("partition coefficient: found " + std::to_string(k) + "; expected a number between 0 and 1");
  // Beyond, rounding of the exchange between cells would show; the lever rule is far closer than that long before.
  constexpr double kLargest = 1e6;
  if (!(a > 0 && a <= kLargest)) {
    std::ostringstream problem;
    problem << "diffusion number of the arm model: found " << a << "; expected a number above 0, where Scheil's rule "
            << "is the limit, and up to " << kLargest << ", where it is the lever rule";
    throw base::InputError(problem.str());
  }
  if (grid.steps < 4)
    throw base::InputError("steps of the arm model: found " + std::to_string(grid.steps) + "; expected 4 or more");
  // Wider cells would let the central differences swing: P / width >= y / 2 must hold up to the front.
  const double fewest = std::ceil(arm.growth == ArmGrowth::parabolic ? 0.25 / a : 0.5 / a);
  if (grid.cells < 2 || grid.cells < fewest) {
    std::ostringstream problem;
    problem << "cells of the arm model: found " << grid.cells << "; expected at least " << std::max(fewest, 2.0)
            << " at diffusion number " << a;
    throw base::InputError(problem.str());
  }
}

/// Cubic through four points, at x.
double cubic(const std::array<double, 4>& at, const std::array<double, 4>& value, double x) {
  double result = 0;
  for (std::size_t i = 0; i < 4; ++i) {
    double weight = 1;
    for (std::size_t j = 0; j < 4; ++j)
      if (j != i) weight *= (x - at[j]) / (at[i] - at[j]);
    result += weight * value[i];
  }
  return result;
}

}  // namespace

FrozenArm freeze_arm(const Arm& arm, const ArmGrid& grid) {
  check(arm, grid);
  const auto cells = static_cast<std::size_t>(grid.cells);
  const double step = 1.0 / grid.steps;
  StepBalance balance(arm, cells);
  Content before(cells + 1), earlier(cells + 1), now(cells + 1, 0.0);
  now.back() = 1;
  std::vector<double> fraction{0.0}, liquid{1.0};
  double imbalance = 0;
  for (int n = 1; n <= grid.steps; ++n) {
    const bool first = n == 1;  // no step before it to lean on: first order, once
    for (std::size_t i = 0; i <= cells; ++i) before[i] = first ? now[i] / step : (2 * now[i] - 0.5 * earlier[i]) / step;
    std::swap(earlier, now);
    const double fs = n == grid.steps ? 1.0 : n * step;
    now = balance.solve(fs, (first ? 1.0 : 1.5) / step, before);
    fraction.push_back(fs);
    liquid.push_back(balance.liquid());
    imbalance = std::max(imbalance, std::abs(sum(now) - 1));
  }
  return {std::move(fraction), std::move(liquid), imbalance};
}

double FrozenArm::fraction_left(double liquid) const {
  if (!(liquid >= 1))
    throw base::InputError("liquid over alloy composition: found " + std::to_string(liquid) + "; expected 1 or more");
  if (liquid >= liquid_.back()) return 0.0;
  const auto above = std::upper_bound(liquid_.begin(), liquid_.end(), liquid) - liquid_.begin();
  const auto size = static_cast<std::ptrdiff_t>(liquid_.size());
  const auto first = static_cast<std::size_t>(std::clamp<std::ptrdiff_t>(above - 2, 0, size - 4));
  std::array<double, 4> at{}, solid{};
  for (std::size_t i = 0; i < 4; ++i) {
    at[i] = std::log(liquid_[first + i]);
    solid[i] = fraction_solid_[first + i];
  }
  return 1 - cubic(at, solid, std::log(liquid));
}

}  // namespace palier::alloy
