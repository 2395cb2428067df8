#include "palier/base/table.hpp"

#include <algorithm>
#include <cmath>
#include <stdexcept>
#include <utility>

namespace palier::base {

Table::Table(double value) : x_{0.0}, y_{value}, cumulative_{0.0} {
  if (!std::isfinite(value)) throw std::invalid_argument("a table needs finite values");
}

Table::Table(std::vector<double> x, std::vector<double> y) : x_(std::move(x)), y_(std::move(y)) {
  if (x_.empty() || x_.size() != y_.size()) throw std::invalid_argument("a table needs as many values as points");
  for (std::size_t i = 0; i < x_.size(); ++i) {
    if (!std::isfinite(x_[i]) || !std::isfinite(y_[i])) throw std::invalid_argument("a table needs finite points");
    if (i > 0 && !(x_[i] > x_[i - 1])) throw std::invalid_argument("the points of a table must rise");
  }
  cumulative_.resize(x_.size(), 0.0);
  for (std::size_t i = 1; i < x_.size(); ++i)
    cumulative_[i] = cumulative_[i - 1] + 0.5 * (y_[i] + y_[i - 1]) * (x_[i] - x_[i - 1]);
}

double Table::operator()(double x) const {
  if (x <= x_.front()) return y_.front();
  if (x >= x_.back()) return y_.back();
  const auto i = static_cast<std::size_t>(std::upper_bound(x_.begin(), x_.end(), x) - x_.begin());
  return y_[i - 1] + (y_[i] - y_[i - 1]) * (x - x_[i - 1]) / (x_[i] - x_[i - 1]);
}

double Table::slope(double x) const {
  if (x < x_.front() || x >= x_.back()) return 0.0;
  const auto i = static_cast<std::size_t>(std::upper_bound(x_.begin(), x_.end(), x) - x_.begin());
  return (y_[i] - y_[i - 1]) / (x_[i] - x_[i - 1]);
}

double Table::integral_from_first(double x) const {
  if (x <= x_.front()) return y_.front() * (x - x_.front());
  if (x >= x_.back()) return cumulative_.back() + y_.back() * (x - x_.back());
  const auto i = static_cast<std::size_t>(std::upper_bound(x_.begin(), x_.end(), x) - x_.begin());
  return cumulative_[i - 1] + 0.5 * (y_[i - 1] + (*this)(x)) * (x - x_[i - 1]);
}

double Table::integral(double a, double b) const { return integral_from_first(b) - integral_from_first(a); }

double Table::smallest() const { return *std::min_element(y_.begin(), y_.end()); }
double Table::largest() const { return *std::max_element(y_.begin(), y_.end()); }

}  // namespace palier::base
