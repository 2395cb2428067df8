#include "palier/base/error.hpp"

#include <catch2/catch.hpp>
#include <stdexcept>
#include <string>
#include <type_traits>

using palier::base::InputError;
using palier::base::Place;

namespace {

std::string text(const InputError& error) { return error.what(); }

}  // namespace

TEST_CASE("an input error says file, line, column, key, problem and hint", "[base][errors]") {
  const InputError error({"plate.yaml", 12, 5}, "walls.both[2].thickness", "found -3 mm; expected above 0",
                         "nearest: 3 mm");
  CHECK(text(error) == "plate.yaml:12:5: walls.both[2].thickness: found -3 mm; expected above 0; nearest: 3 mm");
  CHECK(error.place().file == "plate.yaml");
  CHECK(error.place().line == 12);
  CHECK(error.place().column == 5);
  CHECK(error.key() == "walls.both[2].thickness");
  CHECK(error.hint() == "nearest: 3 mm");
}

TEST_CASE("an input error leaves out what is unknown", "[base][errors]") {
  CHECK(text(InputError("no more")) == "no more");
  CHECK(text(InputError(Place{}, "", "no more")) == "no more");
  CHECK(text(InputError(Place{}, "alloy", "no more")) == "alloy: no more");
  CHECK(text(InputError({"a.yaml", 0, 0}, "alloy", "no more")) == "a.yaml: alloy: no more");
  CHECK(text(InputError({"a.yaml", 4, 0}, "", "no more")) == "a.yaml:4: no more");
  CHECK(text(InputError({"", 4, 2}, "alloy", "no more", "less")) == "alloy: no more; less");
  CHECK(InputError("no more").key().empty());
  CHECK(InputError("no more").hint().empty());
}

TEST_CASE("the kinds of failure are told apart", "[base][errors]") {
  using palier::base::FileTrouble;
  using palier::base::NoSolution;
  CHECK(std::is_base_of_v<std::runtime_error, NoSolution>);
  CHECK_FALSE(std::is_base_of_v<InputError, NoSolution>);
  CHECK_FALSE(std::is_base_of_v<InputError, FileTrouble>);
  CHECK_FALSE(std::is_base_of_v<NoSolution, FileTrouble>);
  CHECK(std::string(FileTrouble("disk full").what()) == "disk full");
}
