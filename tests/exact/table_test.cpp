// Prints the comparison with exact solutions as a Markdown table, for docs/validation.md; hidden from an ordinary run.
#include <catch2/catch.hpp>
#include <cstdio>

#include "exact/cases/cases.hpp"

using namespace palier::exact;

TEST_CASE("Table of exact solutions", "[.table]") {
  std::printf("| case and reading | exact, s | found, s | off by | claimed ± |\n| --- | --- | --- | --- | --- |\n");
  for (const ExactCase& exact : all_cases())
    for (const Verdict& v : judge(exact))
      std::printf("| %s | %.6g | %.6g | %.3f %% | %.3f %% |\n", v.name.c_str(), v.known, v.found,
                  100 * v.error() / v.known, 100 * v.claimed / v.known);
  SUCCEED();
}
