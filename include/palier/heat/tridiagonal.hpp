// Tridiagonal solve by elimination from both ends toward the middle: half the latency of one sweep each way.
#pragma once

#include <cstddef>
#include <vector>

namespace palier::heat {

/// lower[i] x[i-1] + diagonal[i] x[i] + upper[i] x[i+1] = right[i]. No pivoting: the matrix must be dominated by its
/// diagonal, as one minus a multiple of a conduction operator is.
template <class Real>
class Tridiagonal {
 public:
  explicit Tridiagonal(std::size_t n) : lower(n), diagonal(n), upper(n), ratio_(n) {}

  std::vector<Real> lower, diagonal, upper;

  /// @param right right-hand side, overwritten by the solution; same size. Allocates nothing.
  void solve(std::vector<Real>& right) {
    const std::size_t n = right.size(), mid = n / 2;
    // Downward from 0 and upward from n-1 at once; the two chains are independent, so they overlap in the processor.
    // What one row hands to the next stays in registers: the ratio and the right side of the row eliminated last.
    const Real none = diagonal[0] * 0.0;
    Real down_ratio = none, down_right = none, up_ratio = none, up_right = none;
    const auto down = [&](std::size_t i) {
      const Real inverse = 1.0 / (diagonal[i] - lower[i] * down_ratio);
      down_right = (right[i] - lower[i] * down_right) * inverse;
      down_ratio = upper[i] * inverse;
      right[i] = down_right;
      ratio_[i] = down_ratio;
    };
    const auto up = [&](std::size_t j) {
      const Real inverse = 1.0 / (diagonal[j] - upper[j] * up_ratio);
      up_right = (right[j] - upper[j] * up_right) * inverse;
      up_ratio = lower[j] * inverse;
      right[j] = up_right;
      ratio_[j] = up_ratio;
    };
    const std::size_t above = n - 1 - mid;  // rows above the middle: as many as below it, or one fewer
    for (std::size_t i = 0; i < above; ++i) {
      down(i);
      up(n - 1 - i);
    }
    if (above < mid) down(mid - 1);
    right[mid] = (right[mid] - lower[mid] * down_right - upper[mid] * up_right) /
                 (diagonal[mid] - lower[mid] * down_ratio - upper[mid] * up_ratio);
    Real falling = right[mid], rising = right[mid];
    for (std::size_t k = 1; k <= above; ++k) {
      falling = right[mid - k] - ratio_[mid - k] * falling;
      right[mid - k] = falling;
      rising = right[mid + k] - ratio_[mid + k] * rising;
      right[mid + k] = rising;
    }
    if (above < mid) right[0] = right[0] - ratio_[0] * falling;
  }

 private:
  std::vector<Real> ratio_;
};

}  // namespace palier::heat
