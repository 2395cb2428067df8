// palier against the lumped casting: so conductive that it has one temperature.
#include "exact/cases/check.hpp"
#include "exact/cases/sections.hpp"
#include "palier/freeze/run.hpp"

using namespace palier::exact;

TEST_CASE("Lumped casting: superheat and end of freezing at default accuracy", "[exact][lumped]") {
  check_times(lumped_cases());
}
