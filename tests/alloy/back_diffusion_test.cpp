// Rules of back-diffusion against their closed forms, their limits and the solute balance; arm spacing.
#include "palier/alloy/back_diffusion.hpp"

#include <algorithm>
#include <boost/math/quadrature/gauss.hpp>
#include <catch2/catch.hpp>
#include <cmath>
#include <limits>
#include <string>

#include "alloy/sample_alloys.hpp"
#include "palier/alloy/ripening.hpp"
#include "palier/base/error.hpp"

using namespace palier;
using alloy::back_diffusion_parameter;
using alloy::back_diffusion_path;
using alloy::BackDiffusion;
using alloy::SolidificationPath;

namespace {

constexpr auto kBrodyFlemings = BackDiffusion::brody_flemings;
constexpr auto kClyneKurz = BackDiffusion::clyne_kurz;
constexpr auto kOhnaka = BackDiffusion::ohnaka;
constexpr auto kColumnar = BackDiffusion::ohnaka_columnar;
constexpr BackDiffusion kRules[] = {kBrodyFlemings, kClyneKurz, kOhnaka, kColumnar};

double eutectic_share(const SolidificationPath& path) {
  return path.arrests().empty() ? 0.0 : path.arrests().back().fraction;
}

double liquid_at(const SolidificationPath& path, double T) { return path.solute(T).value().liquid; }

/// Largest difference in fraction solid of two paths over the freezing range of the first.
double largest_difference(const SolidificationPath& a, const SolidificationPath& b) {
  double largest = 0;
  for (int i = 0; i <= 500; ++i) {
    const double T = std::max(a.liquidus() - a.freezing_range() * i / 500, a.end_of_freezing());
    largest = std::max(largest, std::abs(a.fraction_above(T) - b.fraction_above(T)));
  }
  return largest;
}

/// Integral of a function of temperature from the end of freezing to the liquidus, pieced for the steep end.
template <class Function>
double over_range(const SolidificationPath& path, const Function& f) {
  double sum = 0;
  for (int i = 0; i < 50; ++i)
    sum += boost::math::quadrature::gauss<double, 15>::integrate(
        f, path.end_of_freezing() + path.freezing_range() * i / 50,
        path.end_of_freezing() + path.freezing_range() * (i + 1) / 50);
  return sum;
}

}  // namespace

TEST_CASE("back-diffusion parameters", "[alloy][back-diffusion]") {
  // T.W. Clyne, W. Kurz, Metall. Trans. A 12 (1981) 965; computed from the closed form with 14 digits or more.
  struct Row {
    double diffusion_number, parameter;
  };
  for (const Row& row : {Row{0.01, 0.01}, Row{0.05, 0.049977299932061}, Row{0.1, 0.096626486507481},
                         Row{0.2, 0.15760991128823}, Row{0.5, 0.24839263779597}, Row{1, 0.32885522897224},
                         Row{2, 0.39753828903903}, Row{10, 0.47601110739005}, Row{100, 0.49751038548685}}) {
    INFO("diffusion number " << row.diffusion_number);
    CHECK(back_diffusion_parameter(kClyneKurz, row.diffusion_number) == Approx(row.parameter).epsilon(1e-12));
  }
  // I. Ohnaka, Trans. ISIJ 26 (1986) 1045, half of 2 a / (1 + 2 a) and of 4 a / (1 + 4 a), by hand.
  CHECK(back_diffusion_parameter(kOhnaka, 0.5) == Approx(0.25).epsilon(1e-15));
  CHECK(back_diffusion_parameter(kOhnaka, 2) == Approx(0.4).epsilon(1e-15));
  CHECK(back_diffusion_parameter(kColumnar, 0.25) == Approx(0.25).epsilon(1e-15));
  CHECK(back_diffusion_parameter(kColumnar, 1) == Approx(0.4).epsilon(1e-15));
  CHECK(back_diffusion_parameter(kBrodyFlemings, 0.3) == 0.3);
  for (const BackDiffusion rule : kRules) {
    CHECK(back_diffusion_parameter(rule, 0) == 0);
    CHECK(back_diffusion_parameter(rule, 1e-300) == Approx(0).margin(1e-15));
    if (rule == kBrodyFlemings) continue;
    double last = 0;
    for (int i = -12; i <= 24; ++i) {
      const double p = back_diffusion_parameter(rule, std::pow(10, 0.25 * i));
      CHECK((p > last && p < 0.5));
      last = p;
    }
    CHECK(back_diffusion_parameter(rule, 1e9) == Approx(0.5).margin(1e-8));
    // Its inverse has lost some digits.
    CHECK(back_diffusion_parameter(rule, std::numeric_limits<double>::max()) == Approx(0.5).margin(1e-14));
  }
}

TEST_CASE("eutectic shares with back-diffusion", "[alloy][back-diffusion]") {
  // Computed from the closed forms of the rules' papers with 14 digits.
  struct Row {
    std::string alloy;
    samples::Diagram diagram;
    double composition;
    BackDiffusion rule;
    double diffusion_number, share;
  };
  const auto al_cu = samples::al_cu(), al_si = samples::al_si(), sn_pb = samples::sn_pb(), pb_sn = samples::pb_sn();
  for (const Row& row : {Row{"Al-4.5Cu", al_cu, 4.5, kBrodyFlemings, 0.01, 0.088314280510193},
                         Row{"Al-4.5Cu", al_cu, 4.5, kBrodyFlemings, 0.1, 0.066647704064439},
                         Row{"Al-4.5Cu", al_cu, 4.5, kBrodyFlemings, 0.5, 0},
                         Row{"Al-4.5Cu", al_cu, 4.5, kClyneKurz, 0.01, 0.088314280510193},
                         Row{"Al-4.5Cu", al_cu, 4.5, kClyneKurz, 0.1, 0.067474920935612},
                         Row{"Al-4.5Cu", al_cu, 4.5, kClyneKurz, 0.5, 0.029048485611913},
                         Row{"Al-4.5Cu", al_cu, 4.5, kClyneKurz, 1, 0.0076284479908662},
                         Row{"Al-4.5Cu", al_cu, 4.5, kClyneKurz, 10, 0},
                         Row{"Al-4.5Cu", al_cu, 4.5, kOhnaka, 0.01, 0.088360585678871},
                         Row{"Al-4.5Cu", al_cu, 4.5, kOhnaka, 0.1, 0.070722946947568},
                         Row{"Al-4.5Cu", al_cu, 4.5, kOhnaka, 0.5, 0.028627886001917},
                         Row{"Al-4.5Cu", al_cu, 4.5, kOhnaka, 1, 0.0064140975343919},
                         Row{"Al-4.5Cu", al_cu, 4.5, kOhnaka, 10, 0},
                         Row{"Al-4.5Cu", al_cu, 4.5, kColumnar, 0.1, 0.056034094892173},
                         Row{"Al-4.5Cu", al_cu, 4.5, kColumnar, 1, 0},
                         Row{"Al-2Cu", al_cu, 2, kBrodyFlemings, 0.1, 0.0044354581878911},
                         Row{"Al-2Cu", al_cu, 2, kClyneKurz, 0.1, 0.005463097663451},
                         Row{"Al-2Cu", al_cu, 2, kOhnaka, 0.1, 0.0094945536707879},
                         Row{"Al-2Cu", al_cu, 2, kClyneKurz, 0.5, 0},
                         Row{"Al-7Si", al_si, 7, kBrodyFlemings, 0.5, 0.48858447488584},
                         Row{"Al-7Si", al_si, 7, kClyneKurz, 1, 0.49551497817328},
                         Row{"Al-7Si", al_si, 7, kOhnaka, 10, 0.48955661255936},
                         Row{"Al-7Si", al_si, 7, kColumnar, 0.5, 0.49533532311088},
                         Row{"Sn-10Pb", sn_pb, 10, kBrodyFlemings, 0.1, 0.23699590822515},
                         Row{"Sn-10Pb", sn_pb, 10, kClyneKurz, 0.5, 0.22976609401855},
                         Row{"Sn-10Pb", sn_pb, 10, kOhnaka, 1, 0.22558126092526},
                         Row{"Pb-10Sn", pb_sn, 10, kClyneKurz, 0.1, 0.03182874787988},
                         Row{"Pb-10Sn", pb_sn, 10, kColumnar, 0.1, 0.0098996454890584},
                         Row{"Pb-10Sn", pb_sn, 10, kOhnaka, 0.5, 0}}) {
    INFO(row.alloy << ", rule " << static_cast<int>(row.rule) << ", diffusion number " << row.diffusion_number);
    const auto path = back_diffusion_path(row.diagram, row.composition, row.rule, row.diffusion_number);
    CHECK(eutectic_share(path) == Approx(row.share).margin(1e-12));
    const double T = row.diagram->invariant()->temperature;
    CHECK((path.end_of_freezing() == T) == (row.share > 0));
    CHECK(path.fraction_above(path.end_of_freezing()) == Approx(1 - row.share).margin(1e-12));
    CHECK(path.fraction_below(path.end_of_freezing()) == Approx(1).margin(1e-15));
    CHECK(path.fraction_above(path.liquidus()) == Approx(0).margin(1e-12));
  }
}

TEST_CASE("with enough back-diffusion freezing ends above the eutectic", "[alloy][back-diffusion]") {
  // The rule's liquid at fraction solid 1, (2 p k)^(-(1-k)/(1-2pk)) times the alloy, p = 10/21: by hand to 12 digits.
  const auto path = back_diffusion_path(samples::al_cu(), 4.5, kOhnaka, 10);
  const double taken_up = 0.17 * 20 / 21, last = 4.5 * std::pow(taken_up, -0.83 / (1 - taken_up));
  CHECK(path.end_of_freezing() == Approx(660 + 273.15 - 112.0 / 33 * last).margin(1e-9));
  CHECK(path.arrests().empty());
  CHECK(path.fraction_above(path.end_of_freezing()) == 1);
  CHECK(path.fraction_above(path.end_of_freezing() + 1e-6) < 1);
  CHECK(path.fraction_above(path.end_of_freezing() + 1e-6) > 1 - 1e-7);
  // Later than under the lever rule, and the less so the more diffuses back.
  double before = 548 + 273.15;
  for (const double a : {3.0, 10.0, 100.0}) {
    const double end = back_diffusion_path(samples::al_cu(), 4.5, kClyneKurz, a).end_of_freezing();
    CHECK(end > before);
    before = end;
  }
  CHECK(before < alloy::lever_path(samples::al_cu(), 4.5).end_of_freezing());
}

TEST_CASE("where the eutectic vanishes, freezing goes over without a jump", "[alloy][back-diffusion]") {
  // The diffusion number at which the last liquid of Ohnaka's rule is just the eutectic one, by bisection.
  const auto al_cu = samples::al_cu();
  double low = 0.1, high = 10;
  for (int i = 0; i < 100; ++i) {
    const double a = 0.5 * (low + high), taken_up = 0.34 * a / (1 + 2 * a);
    (4.5 * std::pow(taken_up, -0.83 / (1 - taken_up)) > 33 ? low : high) = a;
  }
  for (const double off : {0.0, 1e-15, 1e-9, 1e-5}) {
    INFO("off by " << off);
    const auto some = back_diffusion_path(al_cu, 4.5, kOhnaka, low * (1 - off)),
               none = back_diffusion_path(al_cu, 4.5, kOhnaka, low * (1 + off));
    CHECK(eutectic_share(some) < off + 1e-14);
    CHECK(eutectic_share(none) < 1e-14);
    CHECK(some.end_of_freezing() == Approx(548 + 273.15).margin(1e-9));
    CHECK(none.end_of_freezing() == Approx(548 + 273.15).margin(100 * off + 1e-9));
  }
  CHECK(eutectic_share(back_diffusion_path(al_cu, 4.5, kOhnaka, low * (1 - 1e-5))) > 0);
  CHECK(back_diffusion_path(al_cu, 4.5, kOhnaka, low * (1 + 1e-5)).arrests().empty());
  CHECK(back_diffusion_path(al_cu, 4.5, kOhnaka, low * (1 + 1e-5)).end_of_freezing() > 548 + 273.15);
}

TEST_CASE("limits: Scheil's rule and the lever rule", "[alloy][back-diffusion][scheil][lever]") {
  for (const auto& diagram : {samples::al_cu(), samples::al_si(), samples::sn_pb(), samples::pb_sn()})
    for (const double c : {1.0, 4.5, 10.0}) {
      const auto scheil = alloy::scheil_path(diagram, c), lever = alloy::lever_path(diagram, c);
      for (const BackDiffusion rule : kRules) {
        INFO("alloy of " << c << " %, rule " << static_cast<int>(rule));
        const auto none = back_diffusion_path(diagram, c, rule, 0);
        CHECK(none.end_of_freezing() == scheil.end_of_freezing());
        CHECK(largest_difference(scheil, none) < 1e-12);
        CHECK(eutectic_share(none) == Approx(eutectic_share(scheil)).margin(1e-12));
        const auto much = back_diffusion_path(diagram, c, rule, rule == kBrodyFlemings ? 0.5 : 1e15);
        CHECK(much.end_of_freezing() == Approx(lever.end_of_freezing()).margin(1e-9));
        CHECK(largest_difference(lever, much) < 1e-10);
        CHECK(eutectic_share(much) == Approx(eutectic_share(lever)).margin(1e-12));
      }
    }
}

TEST_CASE("more back-diffusion, more solid at every temperature", "[alloy][back-diffusion]") {
  for (const BackDiffusion rule : kRules) {
    double share = 1;
    SolidificationPath last = alloy::scheil_path(samples::al_cu(), 4.5);
    for (const double a : {0.01, 0.05, 0.1, 0.2, 0.45, 1.0, 5.0}) {
      if (rule == kBrodyFlemings && a > 0.5) continue;
      const auto path = back_diffusion_path(samples::al_cu(), 4.5, rule, a);
      CHECK(eutectic_share(path) <= share);
      share = eutectic_share(path);
      for (int i = 1; i <= 20; ++i) {
        const double T = path.liquidus() - path.freezing_range() * i / 20.5;
        CHECK(path.fraction_above(T) > last.fraction_above(T));
      }
      last = path;
    }
  }
}

TEST_CASE("solute balance of the rules", "[alloy][back-diffusion]") {
  // What the rules say of the solid is its mean, (C_alloy - (1 - fs) C_liquid) / fs, and k C_liquid at its surface.
  const double k = 0.17, alloy = 4.5;
  for (const BackDiffusion rule : kRules)
    for (const double a : {0.0, 0.01, 0.1, 0.5, 2.0, 50.0}) {
      if (rule == kBrodyFlemings && a > 0.5) continue;
      INFO("rule " << static_cast<int>(rule) << ", diffusion number " << a);
      const auto path = back_diffusion_path(samples::al_cu(), alloy, rule, a);
      for (int i = 1; i < 100; ++i) {
        const double T = path.liquidus() - path.freezing_range() * i / 100, fs = path.fraction_above(T);
        const double mean = (alloy - (1 - fs) * liquid_at(path, T)) / fs;
        // Between the first solid and the surface: uniform at most. This is what fails for Brody-Flemings above 1/2.
        CHECK(mean > k * alloy);
        CHECK(mean <= k * liquid_at(path, T) * (1 + 1e-12));
      }
      // The solid as it formed and the eutectic hold less than the alloy, by what has diffused back: 2 p k fs dC. Only
      // without diffusion do they hold it all. (Integrals by parts, over temperature; dC/dT is the slope of the lines.)
      const double end = path.end_of_freezing(), slope = -33.0 / 112;
      const double formed = k * path.fraction_above(end) * liquid_at(path, end) +
                            k * slope * over_range(path, [&](double T) { return path.fraction_above(T); });
      const double diffused_back = -2 * back_diffusion_parameter(rule, a) * k * slope *
                                   over_range(path, [&](double T) { return path.fraction_above(T); });
      CHECK(formed + eutectic_share(path) * liquid_at(path, end) + diffused_back == Approx(alloy).margin(1e-9));
      CHECK((diffused_back > 1e-3) == (a > 0));
    }
}

TEST_CASE("a diagram without an eutectic", "[alloy][back-diffusion]") {
  const auto open = alloy::make_diagram(alloy::BinaryLines::straight(1000, -5, 0.5, std::nullopt));
  const auto path = back_diffusion_path(open, 10, kClyneKurz, 0.5);
  CHECK(path.arrests().empty());
  CHECK(path.fraction_below(path.end_of_freezing()) == 1);
  CHECK(path.end_of_freezing() < alloy::lever_path(open, 10).end_of_freezing());
  const std::string never = "does not end within the diagram";
  CHECK_THROWS_WITH(back_diffusion_path(open, 10, kClyneKurz, 0), Catch::Contains(never));
  CHECK_THROWS_WITH(back_diffusion_path(open, 10, kOhnaka, 1e-4), Catch::Contains(never));
}

TEST_CASE("the eutectic alloy freezes in one arrest", "[alloy][back-diffusion]") {
  const auto diagram = samples::al_si();
  const double c = diagram->invariant()->liquid;
  const auto path = back_diffusion_path(diagram, c, kClyneKurz, 0.2);
  CHECK(eutectic_share(path) == Approx(1).margin(1e-12));
  CHECK(path.liquidus() == Approx(path.end_of_freezing()).margin(1e-9));
}

TEST_CASE("back-diffusion: names, and what is refused", "[alloy][back-diffusion]") {
  const auto al_cu = samples::al_cu();
  CHECK(back_diffusion_path(al_cu, 4.5, kBrodyFlemings, 0.1).rule() == "brody-flemings");
  CHECK(back_diffusion_path(al_cu, 4.5, kClyneKurz, 0.1).rule() == "clyne-kurz");
  CHECK(back_diffusion_path(al_cu, 4.5, kOhnaka, 0.1).rule() == "ohnaka");
  CHECK(back_diffusion_path(al_cu, 4.5, kColumnar, 0.1).rule() == "ohnaka-columnar");
  CHECK_THROWS_WITH(
      back_diffusion_path(al_cu, 4.5, kBrodyFlemings, 0.51),
      "the rule of Brody and Flemings holds up to a diffusion number of 1/2, found 0.510000; above it more "
      "would diffuse back than the solid can hold");
  for (const double bad : {-1e-9, std::nan(""), std::numeric_limits<double>::infinity()})
    for (const BackDiffusion rule : kRules)
      CHECK_THROWS_AS(back_diffusion_path(al_cu, 4.5, rule, bad), base::InputError);
  CHECK_THROWS_AS(back_diffusion_path(al_cu, 0, kOhnaka, 0.1), base::InputError);
  CHECK_THROWS_AS(back_diffusion_path(al_cu, 34, kOhnaka, 0.1), base::InputError);
}

TEST_CASE("arm spacing by ripening", "[alloy][ripening]") {
  // Al-4.5Cu, 7.5e-6 m s^-0.39: T.F. Bower, H.D. Brody, M.C. Flemings, Trans. AIME 236 (1966) 624, from memory.
  const alloy::Ripening al_cu{7.5e-6, 0.39};
  CHECK(alloy::arm_spacing(al_cu, 10) == Approx(18.4103e-6).epsilon(5e-6));
  CHECK(alloy::arm_spacing(al_cu, 100) == Approx(45.192e-6).epsilon(5e-6));
  CHECK(alloy::arm_spacing(al_cu, 1000) == Approx(110.933e-6).epsilon(5e-6));
  // The cube-root law: eight times the time, twice the spacing.
  const alloy::Ripening cube_root{10e-6};
  CHECK(alloy::arm_spacing(cube_root, 80) == Approx(2 * alloy::arm_spacing(cube_root, 10)).epsilon(1e-14));
  // By hand: 100 K at 2 K/s; 4 * 1e-13 * 50 / (20e-6)^2.
  CHECK(alloy::local_solidification_time(100, 2) == 50);
  CHECK(alloy::diffusion_number(1e-13, 50, 20e-6) == Approx(0.05).epsilon(1e-14));
  CHECK(alloy::diffusion_number(0, 50, 20e-6) == 0);
  CHECK_THROWS_WITH(alloy::local_solidification_time(100, 0), Catch::Contains("cooling rate"));
  CHECK_THROWS_AS(alloy::local_solidification_time(0, 1), base::InputError);
  CHECK_THROWS_WITH(alloy::arm_spacing(cube_root, -1), Catch::Contains("local solidification time"));
  CHECK_THROWS_AS(alloy::arm_spacing({0}, 10), base::InputError);
  CHECK_THROWS_AS(alloy::arm_spacing({1e-5, 1.0}, 10), base::InputError);
  CHECK_THROWS_AS(alloy::diffusion_number(-1e-13, 50, 20e-6), base::InputError);
  CHECK_THROWS_AS(alloy::diffusion_number(1e-13, 50, 0), base::InputError);
}
