// Flux through contacts and films: the laws in closed form, and derivatives against finite differences.
#include "palier/heat/face_flow.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <functional>

using namespace palier;
using namespace palier::heat;

namespace {

constexpr double kStefanBoltzmann = 5.670374419e-8;  // [W/m2/K4] CODATA 2018

/// A cell whose temperature and resistance change with its unknown [J/m3], curved so that a wrong slope shows.
Terminal metal_cell(double unknown) {
  const double x = unknown * 1e-9;
  return {800 + 150 * x + 40 * x * x, (150 + 80 * x) * 1e-9, 1e-5 * (1 + 0.3 * x * x), 1e-5 * 0.6 * x * 1e-9};
}
Terminal mold_cell(double unknown) {
  const double x = unknown * 1e-9;
  return {300 + 200 * x, 200e-9, 4e-4 / (1 + 0.2 * x), -4e-4 * 0.2e-9 / std::pow(1 + 0.2 * x, 2)};
}
ContactState state_of(double metal_unknown) {
  const double x = metal_unknown * 1e-9;
  return {25, 0.9 - 0.5 * x, -0.5e-9};
}

Contact contact_over(Contact::Over over, base::Table conductance) { return {over, std::move(conductance)}; }

double central_difference(const std::function<double(double)>& f, double x) {
  const double step = 1e4;
  return (f(x + step) - f(x - step)) / (2 * step);
}

void check_contact_derivatives(const Contact& contact) {
  for (const double a : {0.1e9, 0.6e9, 1.3e9})
    for (const double b : {0.05e9, 0.9e9, 4e9}) {  // the last: the mold is the hotter side
      const FaceFlow flow = contact_flow(contact, metal_cell(a), mold_cell(b), state_of(a));
      const double by_first = central_difference(
          [&](double u) { return contact_flow(contact, metal_cell(u), mold_cell(b), state_of(u)).flux; }, a);
      const double by_second = central_difference(
          [&](double u) { return contact_flow(contact, metal_cell(a), mold_cell(u), state_of(a)).flux; }, b);
      CAPTURE(a, b);
      CHECK(flow.by_first == Approx(by_first).epsilon(1e-6));
      CHECK(flow.by_second == Approx(by_second).epsilon(1e-6));
    }
}

const base::Table closing{{0.0, 0.4, 1.0}, {3000, 1500, 400}};   // over fraction solid
const base::Table rising{{500.0, 800, 1100}, {300, 900, 2500}};  // over surface temperature
const base::Table falling_in_time{{0.0, 10, 40, 100}, {2000, 1200, 500, 400}};

}  // namespace

TEST_CASE("Contacts: resistances in series", "[heat][contact]") {
  const Terminal a{900, 0, 2e-4, 0}, b{400, 0, 5e-4, 0};
  const auto flux = [&](const Contact& c, const ContactState& s) { return contact_flow(c, a, b, s).flux; };
  CHECK(flux({}, {}) == Approx(500 / 7e-4).epsilon(1e-14));
  CHECK(flux(contact_over(Contact::Over::constant, base::Table(1000)), {}) == Approx(500 / 17e-4).epsilon(1e-14));
  CHECK(flux(contact_over(Contact::Over::time, falling_in_time), {25, 0, 0}) ==
        Approx(500 / (7e-4 + 1 / 850.0)).epsilon(1e-14));
  CHECK(flux(contact_over(Contact::Over::surface_fraction_solid, closing), {0, 0.7, 0}) ==
        Approx(500 / (7e-4 + 1 / 950.0)).epsilon(1e-14));
  const FaceFlow flow = contact_flow(contact_over(Contact::Over::constant, base::Table(1000)), a, b, {});
  CHECK(flow.surface == Approx(900 - flow.flux * 2e-4).epsilon(1e-14));
}

TEST_CASE("Contact over surface temperature: conductance and surface agree with the flux", "[heat][contact]") {
  const Contact contact = contact_over(Contact::Over::surface_temperature, rising);
  for (const double other : {300.0, 650.0, 1000.0}) {  // the last: heat flows into the metal
    const Terminal a{900, 0, 2e-4, 0}, b{other, 0, 5e-4, 0};
    const FaceFlow flow = contact_flow(contact, a, b, {});
    CAPTURE(other, flow.flux, flow.surface);
    CHECK(flow.surface == Approx(900 - flow.flux * 2e-4).epsilon(1e-13));
    CHECK(flow.flux * (7e-4 + 1 / rising(flow.surface)) == Approx(900 - other).epsilon(1e-12));
  }
}

TEST_CASE("Contacts: derivatives against finite differences", "[heat][contact]") {
  SECTION("perfect") { check_contact_derivatives({}); }
  SECTION("constant") { check_contact_derivatives(contact_over(Contact::Over::constant, base::Table(700))); }
  SECTION("over time") { check_contact_derivatives(contact_over(Contact::Over::time, falling_in_time)); }
  SECTION("over surface temperature") {
    check_contact_derivatives(contact_over(Contact::Over::surface_temperature, rising));
  }
  SECTION("over surface fraction solid") {
    check_contact_derivatives(contact_over(Contact::Over::surface_fraction_solid, closing));
  }
}

TEST_CASE("Contacts: constant tables are the constant, a huge conductance is perfect", "[heat][contact]") {
  const Terminal a = metal_cell(0.6e9), b = mold_cell(0.9e9);
  const FaceFlow constant = contact_flow(contact_over(Contact::Over::constant, base::Table(700)), a, b, {});
  for (const auto over :
       {Contact::Over::time, Contact::Over::surface_temperature, Contact::Over::surface_fraction_solid}) {
    const FaceFlow same = contact_flow(contact_over(over, base::Table({0.0, 2000}, {700, 700})), a, b, state_of(0.6e9));
    CHECK(same.flux == Approx(constant.flux).epsilon(1e-12));
    CHECK(same.by_first == Approx(constant.by_first).epsilon(1e-12));
    CHECK(same.by_second == Approx(constant.by_second).epsilon(1e-12));
    CHECK(same.surface == Approx(constant.surface).epsilon(1e-12));
  }
  const FaceFlow perfect = contact_flow({}, a, b, {});
  const FaceFlow huge = contact_flow(contact_over(Contact::Over::constant, base::Table(1e12)), a, b, {});
  CHECK(huge.flux == Approx(perfect.flux).epsilon(1e-8));
}

TEST_CASE("Film: linear law and radiation", "[heat][film]") {
  Boundary film;
  film.kind = Boundary::Kind::film;
  film.temperature = 300;
  SECTION("film alone: resistances in series") {
    film.film_coefficient = 50;
    const FaceFlow flow = film_flow(film, {900, 0, 1e-3, 0});
    CHECK(flow.flux == Approx(600 / (1e-3 + 1 / 50.0)).epsilon(1e-13));
    CHECK(flow.surface == Approx(900 - flow.flux * 1e-3).epsilon(1e-13));
  }
  SECTION("radiation of a face without resistance: Stefan and Boltzmann's law") {
    film.emissivity = 0.8;
    const FaceFlow flow = film_flow(film, {900, 0, 0, 0});
    CHECK(flow.flux == Approx(0.8 * kStefanBoltzmann * (std::pow(900, 4) - std::pow(300, 4))).epsilon(1e-13));
    CHECK(flow.surface == Approx(900).epsilon(1e-14));
  }
  SECTION("both, behind a resistance, hotter and colder than the surroundings") {
    film.film_coefficient = 20;
    film.emissivity = 0.9;
    for (const double T : {250.0, 300.0, 900.0, 1900.0}) {
      const FaceFlow flow = film_flow(film, {T, 0, 5e-3, 0});
      const double out =
          20 * (flow.surface - 300) + 0.9 * kStefanBoltzmann * (std::pow(flow.surface, 4) - std::pow(300, 4));
      CAPTURE(T, flow.surface);
      CHECK(flow.flux == Approx(out).epsilon(1e-12).margin(1e-9));
      CHECK(flow.surface == Approx(T - flow.flux * 5e-3).epsilon(1e-12));
    }
  }
  SECTION("derivative against finite differences") {
    film.film_coefficient = 20;
    film.emissivity = 0.9;
    for (const double u : {0.1e9, 0.9e9, 4e9}) {
      const double known = central_difference([&](double x) { return film_flow(film, mold_cell(x)).flux; }, u);
      CAPTURE(u);
      CHECK(film_flow(film, mold_cell(u)).by_first == Approx(known).epsilon(1e-6));
    }
  }
}
