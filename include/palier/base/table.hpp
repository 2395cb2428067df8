// A quantity that is constant or a table of points over something else (temperature, time, fraction).
#pragma once

#include <vector>

namespace palier::base {

/// Piecewise linear function through points; constant before the first and after the last point.
/// Units are the caller's, SI by convention.
class Table {
 public:
  /// The constant 0.
  Table() : Table(0.0) {}
  /// A constant.
  explicit Table(double value);
  /// @param x strictly increasing, finite, at least one; @param y finite, same size.
  /// Throws std::invalid_argument otherwise.
  Table(std::vector<double> x, std::vector<double> y);

  double operator()(double x) const;
  /// Slope at x; right of a point where the slope jumps; 0 outside the points.
  double slope(double x) const;
  /// Integral of y from a to b (negative where b < a).
  double integral(double a, double b) const;

  bool is_constant() const { return x_.size() < 2; }
  const std::vector<double>& x() const { return x_; }
  const std::vector<double>& y() const { return y_; }
  double smallest() const;
  double largest() const;

 private:
  double integral_from_first(double x) const;
  std::vector<double> x_, y_;
  std::vector<double> cumulative_;  ///< integral from x_[0] to x_[i]
};

}  // namespace palier::base
