// palier against a numerical benchmark of plate, cylinder and sphere freezing inward, and Plank's limit.
#include "exact/cases/check.hpp"
#include "exact/cases/sections.hpp"
#include "palier/freeze/run.hpp"

using namespace palier;
using namespace palier::exact;

TEST_CASE("Inward freezing: total time at default accuracy", "[exact][inward]") {
  check_times(inward_freezing_cases());
}

// Plank is the limit of vanishing sensible heat, with Ste between 0 and 1 times the Stefan number above it.
TEST_CASE("Inward freezing: Plank's time at a small Stefan number", "[exact][inward]") {
  const int shape = GENERATE(0, 1, 2);
  const double stefan = 1e-4;
  const InwardFreezing unit{shape, {1, 1, 1}, 1 / stefan, 1, 1.0, 1};
  const InwardFreezingTime row{shape, stefan, 1.0, unit.plank_time(), 1.0};
  const ExactCase exact = inward_freezing(row);
  const freeze::Result result = freeze::run(exact.section);
  const double plank = exact.times.front().time;
  CAPTURE(shape, result.solidification_time / plank - 1, result.solidification_time_error / plank);
  CHECK(std::abs(result.solidification_time - plank) <=
        stefan * plank + std::max(result.solidification_time_error, 1e-3 * plank));
}

TEST_CASE("Inward freezing: order in the cell width", "[exact][inward][order]") {
  const int shape = GENERATE(0, 1, 2);
  const double biot = GENERATE(1.0, std::numeric_limits<double>::infinity());
  for (const InwardFreezingTime& row : inward_freezing_times()) {
    if (row.shape != shape || row.biot != biot || row.stefan != 0.5) continue;
    ExactCase exact = inward_freezing(row);
    exact.section.accuracy = 1e-5;
    std::vector<double> errors;
    for (const int cells : {20, 40, 80}) {
      exact.section.cells = cells;
      errors.push_back(std::abs(freeze::run(exact.section).solidification_time / exact.times.front().time - 1));
    }
    CAPTURE(shape, biot);
    check_order(errors, 1.5, 2.5);
  }
}
