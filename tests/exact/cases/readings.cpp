#include "exact/cases/readings.hpp"

#include <algorithm>
#include <cmath>
#include <stdexcept>

namespace palier::exact {
namespace {

double relative_error(const freeze::Result& result, double freeze::Reading::*what,
                      const std::function<double(double)>& known, double from, double to) {
  double sum = 0;
  int count = 0;
  for (const freeze::Reading& reading : result.by_depth) {
    if (reading.depth < from || reading.depth > to) continue;
    const double error = reading.*what / known(reading.depth) - 1;
    if (std::isnan(error)) throw std::runtime_error("a depth was not reached in this run");
    sum += error * error;
    ++count;
  }
  if (count == 0) throw std::runtime_error("no cell lies within the depths asked for");
  return std::sqrt(sum / count);
}

/// Differences of the last row, cell by cell.
std::vector<double> differences(const freeze::Result& result, const std::function<double(double)>& known) {
  const freeze::History& h = result.history;
  const std::size_t cells = h.radius.size(), row = (h.time.size() - 1) * cells;
  std::vector<double> out;
  for (std::size_t i = 0; i < cells; ++i) out.push_back(h.temperature.at(row + i) - known(h.radius[i]));
  return out;
}

}  // namespace

double end_error(const freeze::Result& result, const std::function<double(double)>& known_end, double from, double to) {
  return relative_error(result, &freeze::Reading::end, known_end, from, to);
}

double start_error(const freeze::Result& result, const std::function<double(double)>& known_start, double from,
                   double to) {
  return relative_error(result, &freeze::Reading::start, known_start, from, to);
}

double temperature_error(const freeze::Result& result, const std::function<double(double)>& known) {
  double sum = 0;
  const std::vector<double> all = differences(result, known);
  for (const double d : all) sum += d * d;
  return std::sqrt(sum / static_cast<double>(all.size()));
}

double largest_temperature_error(const freeze::Result& result, const std::function<double(double)>& known) {
  double largest = 0;
  for (const double d : differences(result, known)) largest = std::max(largest, std::abs(d));
  return largest;
}

}  // namespace palier::exact
