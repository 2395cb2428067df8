// A step takes no memory from the heap: counted by the global allocation function of this test program.
// Not where AddressSanitizer brings allocation functions of its own, beside which ours would not match.
#ifndef __SANITIZE_ADDRESS__
#include <atomic>
#include <catch2/catch.hpp>
#include <cstdlib>
#include <new>
#include <vector>

#include "heat/bodies.hpp"
#include "palier/heat/march.hpp"

namespace {

std::atomic<long>& allocations() {
  static std::atomic<long> count{0};
  return count;
}

}  // namespace

void* operator new(std::size_t size) {
  ++allocations();
  if (void* memory = std::malloc(size > 0 ? size : 1)) return memory;
  throw std::bad_alloc();
}
void operator delete(void* memory) noexcept { std::free(memory); }
void operator delete(void* memory, std::size_t) noexcept { std::free(memory); }

using namespace palier;
using namespace palier::heat;

TEST_CASE("A march allocates nothing in its steps, fronts moving", "[heat][allocation]") {
  Boundary film;
  film.kind = Boundary::Kind::film;
  film.film_coefficient = 4000;
  film.temperature = 300;
  const Body body = body_of({Shape::cylinder, 0, 0.030, 20, 12, 0}, pure_metal(), {}, {}, film);
  std::vector<double> enthalpy, scale;
  for (int i = 0; i < body.cells(); ++i) {
    const bool metal = body.layer_of(i) == body.metal();
    enthalpy.push_back(body.curve(body.layer_of(i)).enthalpy(metal ? 960 : 320));
    scale.push_back(metal ? 1.2e9 : 1.0e9);
  }
  March march(body, enthalpy, scale, 1e-5);
  bool front = false;
  const long before = allocations();
  for (int i = 0; i < 200; ++i) front = march.step(1e9).after().fronts[0].count > 0 || front;
  const long taken = allocations() - before;
  CHECK(taken == 0);
  CHECK(front);  // or the march has not shown what it should

  // The counter does count.
  const long start = allocations();
  const std::vector<double> some(10, 1.0);
  CHECK(some.size() == 10);
  CHECK(allocations() - start == 1);
}

#endif
