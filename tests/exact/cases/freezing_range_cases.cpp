#include <algorithm>
#include <cmath>
#include <numbers>
#include <stdexcept>

#include "exact/cases/cases.hpp"
#include "exact/cases/sections.hpp"
#include "exact/solutions/data_sets.hpp"
#include "palier/freeze/setup.hpp"

namespace palier::exact {
namespace {

using What = KnownTime::What;

/// Start and end of freezing at depths that the end-of-freezing front reaches.
void know_arrivals(ExactCase& exact, const LinearFreezing& solution, const std::vector<double>& places, double begin,
                   bool pure) {
  for (std::size_t i = 0; i < places.size(); ++i) {
    exact.times.push_back({What::end_at_probe, static_cast<int>(i), solution.end_arrival(places[i]) - begin});
    if (!pure)
      exact.times.push_back({What::start_at_probe, static_cast<int>(i), solution.start_arrival(places[i]) - begin});
  }
}

/// Flux through the bore over the time of the run. Between its points the table is straight: with 2000 of them over a
/// flux that bends over times of the order of the run, wrong by 1e-7 of it.
base::Table bore_flux(const LinearFreezing& solution, heat::Shape shape, double radius, double begin, double until) {
  constexpr int points = 2000;
  const double area =
      shape == heat::Shape::sphere ? 4 * std::numbers::pi * radius * radius : 2 * std::numbers::pi * radius;
  std::vector<double> time, flux;
  for (int i = 0; i <= points; ++i) {
    time.push_back((until - begin) * i / points);
    flux.push_back(solution.heat_rate(radius, begin + time.back()) / area);
  }
  return {time, flux};
}

/// Shell from the bore outward, from the exact profile at `begin` on.
freeze::Section shell(const LinearAlloy& alloy, const LinearFreezing& solution, heat::Shape shape, double bore_radius,
                      double begin, double until) {
  freeze::Section s = section_of(alloy);
  const double front = solution.end_front(until);
  const double radius = solution.start_front(until) + reach(alloy.liquid, until);
  const int exponent = static_cast<int>(shape);
  s.shape = shape;
  s.thickness = 2 * radius;
  s.bore = 2 * bore_radius;
  resolve_frozen_part(s, front - bore_radius, std::pow(front / radius, 1 + exponent));
  s.start_profile = [solution, begin](double r) { return kelvin(solution.temperature(r, begin)); };
  s.pouring_temperature = kelvin(solution.temperature(radius, begin));
  s.inside.emplace();
  s.inside->outer.kind = heat::Boundary::Kind::heat_flux;
  s.inside->outer.heat_flux = bore_flux(solution, shape, bore_radius, begin, until);
  s.stop.after = until - begin;
  return s;
}

/// Face of the section's grid next to a radius.
double nearest_face(const freeze::Section& section, double radius) {
  const freeze::Setup setup = freeze::set_up(section, freeze::resolution_for(section), freeze::metal_curve(section));
  const std::vector<double>& face = setup.body->face();
  return *std::min_element(face.begin(), face.end(),
                           [radius](double a, double b) { return std::abs(a - radius) < std::abs(b - radius); });
}

}  // namespace

ExactCase linear_half_space(const std::string& name, const LinearAlloy& alloy, double wall, double start,
                            double until) {
  const auto solution = LinearFreezing::fixed_wall(alloy, wall, start);
  ExactCase exact{name, section_of(alloy), {}};
  freeze::Section& s = exact.section;
  const double front = solution.end_front(until);
  s.thickness = 2 * (solution.start_front(until) + reach(alloy.liquid, until));
  s.pouring_temperature = kelvin(start);
  s.outside.outer = held_at(wall);
  s.stop.after = until;
  resolve_half_space(s, front);
  s.probes = {0.31 * front, 0.53 * front, 0.77 * front, 0.93 * front};
  know_arrivals(exact, solution, s.probes, 0, alloy.pure());
  return exact;
}

ExactCase shell_around_sink(const std::string& name, const LinearAlloy& alloy, const LinearFreezing& solution,
                            heat::Shape shape, double bore_radius, double about, double until) {
  if (solution.end_front(about) < bore_radius)
    throw std::domain_error("the bore must have frozen before the run begins");
  // A cell starts with the temperature at its center, on one side of the arrest: the run begins as the front passes a
  // face, or up to half a cell of latent heat would be misplaced.
  const double face = nearest_face(shell(alloy, solution, shape, bore_radius, about, until), solution.end_front(about));
  const double begin = solution.end_arrival(face);
  ExactCase exact{name, shell(alloy, solution, shape, bore_radius, begin, until), {}};
  freeze::Section& s = exact.section;
  if (std::abs(nearest_face(s, face) - face) > 1e-6 * face) throw std::logic_error("the grid has moved with the start");
  const double radius = s.thickness / 2;
  // Places that neither front has reached when the run begins, and that both pass.
  const double first = 1.2 * solution.start_front(begin), last = 0.95 * solution.end_front(until);
  const std::vector<double> places{first, 0.5 * (first + last), last};
  for (const double r : places) s.probes.push_back(radius - r);
  know_arrivals(exact, solution, places, begin, alloy.pure());
  return exact;
}

std::vector<ExactCase> freezing_range_cases() {
  std::vector<ExactCase> cases;
  for (const double eutectic : {0.0, 0.1, 0.3}) {
    const LinearAlloy alloy = uniform_linear_alloy(eutectic);
    const std::string share = std::to_string(static_cast<int>(100 * eutectic)) + " % eutectic";
    cases.push_back(linear_half_space("Freezing range, plane, " + share, alloy, 100, 700, 10));
    cases.push_back(shell_around_sink("Freezing range, line sink, " + share, alloy,
                                      LinearFreezing::line_sink(alloy, 2e5, 700), heat::Shape::cylinder, 0.005, 5, 60));
    cases.push_back(shell_around_sink("Freezing range, point sink, " + share, alloy,
                                      LinearFreezing::point_sink(alloy, 6000, 700), heat::Shape::sphere, 0.025, 25,
                                      120));
  }
  cases.push_back(shell_around_sink("Freezing range, line sink, pure metal", pure_linear_alloy(),
                                    LinearFreezing::line_sink(pure_linear_alloy(), 3e5, 720), heat::Shape::cylinder,
                                    0.005, 5, 60));
  return cases;
}

}  // namespace palier::exact
