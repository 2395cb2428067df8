// What the comparisons of palier with exact solutions have in common.
#pragma once

#include <algorithm>
#include <catch2/catch.hpp>
#include <cmath>
#include <string>
#include <vector>

#include "exact/cases/cases.hpp"
#include "exact/cases/readings.hpp"

namespace palier::exact {

/// Each known end of freezing is found within the numerical error that the run claims, or within the 0.1 % that were
/// asked for. Starts of an alloy are read off cells the liquidus passes through without being looked into: they are
/// held to half a percent, and the census tells how often the claim covers them. A case without a solution fails by
/// itself, the others are still looked at.
inline void check_times(const std::vector<ExactCase>& cases) {
  for (const ExactCase& exact : cases) {
    CAPTURE(exact.name);
    std::vector<Verdict> verdicts;
    CHECK_NOTHROW(verdicts = judge(exact));
    for (const Verdict& v : verdicts) {
      CAPTURE(v.name, v.known, v.found, v.claimed);
      const bool start = v.name.find("start") != std::string::npos;
      CHECK(v.error() <= std::max(v.claimed, (start ? 5e-3 : 1e-3) * v.known) + v.uncertainty);
    }
  }
}

/// The order seen from the coarsest to the finest of grids each twice as fine as the one before stays within bounds. A
/// single pair would not do: where the error changes its sign between two grids, any order can come out.
inline void check_order(const std::vector<double>& errors, double least, double most) {
  const double order = std::log2(errors.front() / errors.back()) / static_cast<double>(errors.size() - 1);
  CAPTURE(errors, order);
  CHECK(order > least);
  CHECK(order < most);
}

}  // namespace palier::exact
