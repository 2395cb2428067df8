#include "freezing_stages.hpp"

#include <algorithm>
#include <boost/math/tools/roots.hpp>
#include <cmath>
#include <functional>
#include <limits>
#include <utility>

#include "palier/base/error.hpp"

namespace palier::alloy {
namespace {

constexpr int kPoints = 16;        // on the way of a stage whose end is known
constexpr double kStep = 0.75;     // ratio of fraction liquid between points where it is not
constexpr double kLeast = 1e-300;  // fraction liquid below which nothing is followed
constexpr int kHalvings = 24;      // to prove that the temperature falls
constexpr double kUlp = std::numeric_limits<double>::epsilon();

const char* name_of(Mixing mixing) {
  switch (mixing) {
    case Mixing::lever:
      return "lever";
    case Mixing::scheil:
      return "scheil";
    case Mixing::partial:
      return "partial";
  }
  throw base::InputError("unknown rule of mixing");
}

/// True if the temperature is proven to fall all the way from f = high to f = low. Each term of the gradient is
/// monotone in f, so the sum of the lesser ends is a bound from below.
bool falls(const Stage& stage, double low, double high, int halvings) {
  double bound = 0;
  for (const SoluteLine& line : stage.lines)
    bound += std::min(line.slope * line.at(low).gradient, line.slope * line.at(high).gradient);
  if (bound > 0) return true;
  const double middle = 0.5 * (low + high);
  if (halvings == 0 || !(stage.at(low).gradient > 0 && stage.at(middle).gradient > 0)) return false;
  return falls(stage, low, middle, halvings - 1) && falls(stage, middle, high, halvings - 1);
}

/// Fraction liquid at which a stage is at T, between low and high.
double crossing(const Stage& stage, double T, double low, double high) {
  std::uintmax_t iterations = 200;
  const auto bracket = boost::math::tools::toms748_solve([&](double f) { return stage.temperature(f) - T; }, low, high,
                                                         boost::math::tools::eps_tolerance<double>(52), iterations);
  return 0.5 * (bracket.first + bracket.second);
}

}  // namespace

SoluteLine SoluteLine::mixed(double slope, double k, double offset, double C0) {
  // C0 = f C + (1 - f) (k C + offset), written about the content at which solid and liquid would be alike.
  const double alike = k == 1 ? 0.0 : offset / (1 - k);
  return {slope, k, offset, alike, C0 - alike, k, 1 - k, 0};
}

SoluteLine SoluteLine::frozen(double slope, double k, double offset, double C, double f) {
  const double alike = k == 1 ? 0.0 : offset / (1 - k);
  return {slope, k, offset, alike, (C - alike) * std::pow(f, 1 - k), 1, 0, k - 1};
}

SoluteLine::Point SoluteLine::at(double f) const {
  if (power != 0) {
    const double part = amount * std::pow(f, power);
    return {shift + part, power * part / f};
  }
  const double per = 1 / (constant + linear * f);
  return {shift + amount * per, -amount * linear * per * per};
}

Stage::Point Stage::at(double f) const {
  Point sum{base, 0};
  for (const SoluteLine& line : lines) {
    const SoluteLine::Point p = line.at(f);
    sum.temperature += line.slope * p.liquid;
    sum.gradient += line.slope * p.gradient;
  }
  return sum;
}

bool Stage::level() const {
  return std::all_of(lines.begin(), lines.end(), [](const SoluteLine& l) { return l.slope == 0 || l.level(); });
}

bool Stage::endless() const {
  return std::any_of(lines.begin(), lines.end(), [](const SoluteLine& l) { return l.power != 0 && l.amount != 0; });
}

FreezingStages::FreezingStages(Mixing mixing, const std::vector<Stage>& stages, const LastLiquid& end)
    : rule_(name_of(mixing)) {
  liquidus_ = stages.front().temperature(stages.front().begin);
  if (end.temperature && !(*end.temperature > 0 && *end.temperature < liquidus_))
    throw base::InputError("the last liquid must freeze above 0 K and below the liquidus, " +
                           std::to_string(liquidus_) + " K; found " + std::to_string(*end.temperature) + " K");
  if (end.largest_fraction && !(*end.largest_fraction > 0 && *end.largest_fraction < 1))
    throw base::InputError("the largest fraction solid must lie between 0 and 1");
  bool ended = false;
  for (Stage stage : stages) {
    if (ended) break;
    ended = cut(stage, end);
    if (!(stage.begin > stage.end)) continue;
    Piece piece{std::move(stage), 0, 0, {}, {}};
    if (piece.stage.level()) {
      if (piece.stage.reaction.empty())
        throw base::InputError("no element lowers the freezing temperature: this is a pure metal");
      piece.hot = piece.cold = piece.stage.temperature(piece.stage.begin);
      add_arrest(piece.hot, piece.stage.begin - piece.stage.end, piece.stage.reaction);
    } else {
      ended = follow(piece, end) || ended;
    }
    pieces_.push_back(std::move(piece));
  }
  const Piece& last = pieces_.back();
  if (!(last.cold > 0)) throw base::InputError("the liquid lasts to below 0 K: give the end of freezing");
  double solute = 0;
  for (const double C : last_liquid().liquid) solute += C;
  if (solute > 100)
    throw base::InputError("the last liquid would hold " + std::to_string(solute) +
                           " mass % of solute: end freezing at a higher temperature or a lower fraction solid");
  last_liquid_ = last.stage.end;
  if (last_liquid_ > 0) add_arrest(last.cold, last_liquid_, "last liquid");
}

/// Ends a stage at the largest fraction solid. True if freezing ends there.
bool FreezingStages::cut(Stage& stage, const LastLiquid& end) const {
  if (!stage.endless()) return false;
  if (stage.end <= 0 && !end.temperature && !end.largest_fraction)
    throw base::InputError("by the " + rule_ +
                           " rule the last liquid never freezes: give the temperature at which it "
                           "does, such as a eutectic, or a largest fraction solid");
  const double least = end.largest_fraction ? 1 - *end.largest_fraction : 0.0;
  if (least <= stage.end) return false;
  stage.end = std::min(least, stage.begin);
  return true;
}

/// Lays points along a stage down to its end or the temperature of the last liquid, and makes sure that it falls.
/// True if freezing ends there by temperature.
bool FreezingStages::follow(Piece& piece, const LastLiquid& end) const {
  Stage& s = piece.stage;
  const double coldest = end.temperature.value_or(-std::numeric_limits<double>::infinity());
  const bool endless = s.endless();
  const double spacing = (s.begin - s.end) / kPoints;
  piece.f = {s.begin};
  piece.T = {pieces_.empty() ? liquidus_ : pieces_.back().cold};
  bool ended = false;
  for (int i = 1; !ended && piece.f.back() > s.end; ++i) {
    const double before = piece.f.back();
    double f = std::max(s.end, endless ? kStep * before : (i < kPoints ? s.begin - i * spacing : s.end));
    const double T = s.temperature(f);
    if (endless && f > s.end && (f < kLeast || T == s.temperature(before)))
      throw base::InputError("the liquid is used up before it gets as cold as " + std::to_string(coldest) +
                             " K: give a largest fraction solid instead");
    ended = T <= coldest;
    if (ended) s.end = f = crossing(s, coldest, f, before);
    if (!falls(s, f, before, kHalvings))
      throw base::InputError("the freezing temperature does not fall strictly as the fraction solid rises, near " +
                             std::to_string(1 - f) + ": the elements' slopes and partition coefficients disagree");
    piece.f.push_back(f);
    piece.T.push_back(ended ? coldest : T);
  }
  piece.hot = piece.T.front();
  piece.cold = piece.T.back();
  return ended;
}

/// Liquid left where another arrest has begun freezes in that one.
void FreezingStages::add_arrest(double T, double share, const std::string& reaction) {
  if (!arrests_.empty() && arrests_.back().temperature == T)
    arrests_.back().fraction += share;
  else
    arrests_.push_back({T, share, reaction});
}

const FreezingStages::Piece& FreezingStages::piece_at(double T) const {
  for (const Piece& p : pieces_)
    if (T >= p.cold) return p;
  return pieces_.back();
}

double FreezingStages::solve(const Piece& p, double T) {
  if (p.f.empty() || T >= p.hot) return p.stage.begin;
  if (T <= p.cold) return p.stage.end;
  const auto next = std::upper_bound(p.T.begin(), p.T.end(), T, std::greater<>());
  const auto i = static_cast<std::size_t>(next - p.T.begin());
  double high = p.f[i - 1], low = p.f[i];
  double f = low + (high - low) * (T - p.T[i]) / (p.T[i - 1] - p.T[i]);
  constexpr int kMost = 100;
  for (int iteration = 0; iteration < kMost; ++iteration) {
    const Stage::Point here = p.stage.at(f);
    const double excess = here.temperature - T;
    if (std::abs(excess) <= kUlp * T) break;
    (excess > 0 ? high : low) = f;
    // In ln f the powers are nearer to straight lines.
    double better = p.stage.endless() ? f * std::exp(-excess / (here.gradient * f)) : f - excess / here.gradient;
    if (!(better > low && better < high)) better = 0.5 * (low + high);
    const double step = std::abs(better - f);
    f = better;
    if (step <= 2 * kUlp * f) break;
  }
  return f;
}

double FreezingStages::fraction_liquid(double T) const { return solve(piece_at(T), T); }

Compositions FreezingStages::compositions(double T) const {
  const Piece& piece = piece_at(T);
  const double f = solve(piece, T);
  Compositions c;
  for (const SoluteLine& line : piece.stage.lines) {
    c.liquid.push_back(line.liquid(f));
    c.solid.push_back(line.solid(f));
  }
  return c;
}

Compositions FreezingStages::last_liquid() const {
  const Stage& stage = pieces_.back().stage;
  Compositions c;
  for (const SoluteLine& line : stage.lines) {
    c.liquid.push_back(line.liquid(stage.end));
    c.solid.push_back(line.solid(stage.end));
  }
  return c;
}

}  // namespace palier::alloy
