// What the comparisons of palier with exact solutions have in common.
#pragma once

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <vector>

#include "exact/cases/cases.hpp"
#include "exact/cases/readings.hpp"

namespace palier::exact {

/// Each known time is found within the numerical error that the run claims, or within the 0.1 % that were asked for. A
/// case without a solution fails by itself, the others are still looked at.
inline void check_times(const std::vector<ExactCase>& cases) {
  for (const ExactCase& exact : cases) {
    CAPTURE(exact.name);
    std::vector<Verdict> verdicts;
    CHECK_NOTHROW(verdicts = judge(exact));
    for (const Verdict& v : verdicts) {
      CAPTURE(v.name, v.known, v.found, v.claimed);
      CHECK(v.error() <= std::max(v.claimed, 1e-3 * v.known) + v.uncertainty);
    }
  }
}

/// The order seen between errors on grids each twice as fine as the one before stays within bounds.
inline void check_order(const std::vector<double>& errors, double least, double most) {
  for (std::size_t i = 1; i < errors.size(); ++i) {
    const double order = std::log2(errors[i - 1] / errors[i]);
    CAPTURE(errors[i - 1], errors[i], order);
    CHECK(order > least);
    CHECK(order < most);
  }
}

}  // namespace palier::exact
