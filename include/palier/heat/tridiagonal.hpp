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
    for (std::size_t i = 0, j = n - 1; i < mid; ++i, --j) {
      Real inverse_i = 1.0 / (i > 0 ? Real(diagonal[i] - lower[i] * ratio_[i - 1]) : diagonal[i]);
      right[i] = (i > 0 ? Real(right[i] - lower[i] * right[i - 1]) : right[i]) * inverse_i;
      ratio_[i] = upper[i] * inverse_i;
      if (j > mid) {
        Real inverse_j = 1.0 / (j + 1 < n ? Real(diagonal[j] - upper[j] * ratio_[j + 1]) : diagonal[j]);
        right[j] = (j + 1 < n ? Real(right[j] - upper[j] * right[j + 1]) : right[j]) * inverse_j;
        ratio_[j] = lower[j] * inverse_j;
      }
    }
    Real diagonal_mid = diagonal[mid];
    Real right_mid = right[mid];
    if (mid > 0) {
      diagonal_mid = diagonal_mid - lower[mid] * ratio_[mid - 1];
      right_mid = right_mid - lower[mid] * right[mid - 1];
    }
    if (mid + 1 < n) {
      diagonal_mid = diagonal_mid - upper[mid] * ratio_[mid + 1];
      right_mid = right_mid - upper[mid] * right[mid + 1];
    }
    right[mid] = right_mid / diagonal_mid;
    for (std::size_t i = mid, j = mid; i > 0 || j + 1 < n;) {
      if (i > 0) {
        --i;
        right[i] = right[i] - ratio_[i] * right[i + 1];
      }
      if (j + 1 < n) {
        ++j;
        right[j] = right[j] - ratio_[j] * right[j - 1];
      }
    }
  }

 private:
  std::vector<Real> ratio_;
};

}  // namespace palier::heat
