#include "palier/alloy/gibbs_energy.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

#include "palier/base/error.hpp"

namespace palier::alloy {
namespace {

EnergyTerms sum(const EnergyTerms& p, const EnergyTerms& q) {
  return {p.a + q.a, p.b + q.b, p.c + q.c, p.d + q.d, p.e + q.e, p.f + q.f, p.g + q.g, p.h + q.h};
}

EnergyTerms product(double s, const EnergyTerms& p) {
  return {s * p.a, s * p.b, s * p.c, s * p.d, s * p.e, s * p.f, s * p.g, s * p.h};
}

/// T^7
double seventh_power(double T) {
  const double cube = T * T * T;
  return cube * cube * T;
}

}  // namespace

double EnergyTerms::value(double T) const {
  const double seventh = seventh_power(T);
  return a + T * (b + c * std::log(T) + T * (d + T * e)) + f / T + g * seventh + h / (seventh * T * T);
}

double EnergyTerms::slope(double T) const {
  const double seventh = seventh_power(T);
  return b + c * (1 + std::log(T)) + T * (2 * d + T * 3 * e) - f / (T * T) + 7 * g * seventh / T -
         9 * h / (seventh * T * T * T);
}

UnaryEnergy::UnaryEnergy(const EnergyTerms& terms)
    : low_(0), pieces_{{std::numeric_limits<double>::infinity(), terms}} {}

UnaryEnergy::UnaryEnergy(double low, std::vector<Piece> pieces) : low_(low), pieces_(std::move(pieces)) {
  double last = low_;
  for (const Piece& piece : pieces_) {
    if (!(piece.high > last)) throw base::InputError("the pieces of a Gibbs energy must follow by rising temperature");
    last = piece.high;
  }
  if (!(low_ >= 0) || pieces_.empty()) throw base::InputError("a Gibbs energy needs a piece above 0 K");
}

const EnergyTerms& UnaryEnergy::terms(double T) const {
  for (const Piece& piece : pieces_)
    if (T <= piece.high && T >= low_ && T > 0) return piece.terms;
  throw base::InputError("Gibbs energy asked for at " + std::to_string(T) + " K; it is given from " +
                         std::to_string(low_) + " to " + std::to_string(high()) + " K");
}

double UnaryEnergy::value(double T) const { return terms(T).value(T); }

double UnaryEnergy::slope(double T) const { return terms(T).slope(T); }

double UnaryEnergy::enthalpy(double T) const { return value(T) - T * slope(T); }

UnaryEnergy operator+(const UnaryEnergy& a, const UnaryEnergy& b) {
  const double low = std::max(a.low_, b.low_), high = std::min(a.high(), b.high());
  std::vector<UnaryEnergy::Piece> pieces;
  auto i = a.pieces_.begin(), j = b.pieces_.begin();
  for (double end = low; end < high;) {
    end = std::min(i->high, j->high);
    if (end > low) pieces.push_back({end, sum(i->terms, j->terms)});
    if (i->high == end) ++i;
    if (j != b.pieces_.end() && j->high == end) ++j;
  }
  return {low, std::move(pieces)};
}

UnaryEnergy operator*(double factor, const UnaryEnergy& energy) {
  UnaryEnergy scaled = energy;
  for (UnaryEnergy::Piece& piece : scaled.pieces_) piece.terms = product(factor, piece.terms);
  return scaled;
}

IsothermalEnergy::IsothermalEnergy(double first, double second, double first_x, double second_x, double ideal,
                                   std::vector<double> interaction)
    : first_(first),
      second_(second),
      first_x_(first_x),
      second_x_(second_x),
      ideal_((second_x - first_x) * ideal),
      interaction_(std::move(interaction)) {
  for (double& L : interaction_) L *= second_x - first_x;
}

IsothermalEnergy::Excess IsothermalEnergy::excess(double y, double one_minus_y) const {
  // Horner's rule for sum L_v s^v and its derivatives in s.
  const double s = one_minus_y - y, both = y * one_minus_y;
  double p = 0, p1 = 0, p2 = 0;
  for (std::size_t v = interaction_.size(); v-- > 0;) {
    p2 = p2 * s + 2 * p1;
    p1 = p1 * s + p;
    p = p * s + interaction_[v];
  }
  return {both * p, s * p - 2 * both * p1, -2 * p - 4 * s * p1 + 4 * both * p2};
}

double IsothermalEnergy::x(double z) const { return first_x_ + (second_x_ - first_x_) / (1 + std::exp(-z)); }

double IsothermalEnergy::x_slope(double z) const {
  return (second_x_ - first_x_) / ((1 + std::exp(-z)) * (1 + std::exp(z)));
}

MolarEnergy IsothermalEnergy::at(double x) const {
  const double range = second_x_ - first_x_;
  if (fixed_composition() ? x != first_x_ : !(x > first_x_ && x < second_x_))
    throw base::InputError("Gibbs energy asked for at a mole fraction of " + std::to_string(x) +
                           "; the phase exists between " + std::to_string(first_x_) + " and " +
                           std::to_string(second_x_));
  if (fixed_composition()) return {first_, 0, std::numeric_limits<double>::infinity()};
  const double y = (x - first_x_) / range, rest = (second_x_ - x) / range;
  const Excess e = excess(y, rest);
  return {rest * first_ + y * second_ + ideal_ * (y * std::log(y) + rest * std::log(rest)) + e.value,
          (second_ - first_ + ideal_ * std::log(y / rest) + e.slope) / range,
          (ideal_ / (y * rest) + e.curvature) / (range * range)};
}

Tangent IsothermalEnergy::tangent(double z) const {
  const double y = 1 / (1 + std::exp(-z)), rest = 1 / (1 + std::exp(z));
  const Excess e = excess(y, rest);
  const double bend = ideal_ + y * rest * e.curvature;
  return {first_ - ideal_ * std::log1p(std::exp(z)) + e.value - y * e.slope,
          second_ - ideal_ * std::log1p(std::exp(-z)) + e.value + rest * e.slope, -y * bend, rest * bend};
}

double IsothermalEnergy::value(double y, double mixing) const {
  return (1 - y) * first_ + y * second_ + ideal_ * mixing + excess(y, 1 - y).value;
}

SolutionPhase::SolutionPhase(std::string name, UnaryEnergy first, UnaryEnergy second,
                             std::vector<EnergyTerms> interaction)
    : SolutionPhase(std::move(name), std::move(first), std::move(second), 0, 1, std::move(interaction)) {}

SolutionPhase::SolutionPhase(std::string name, UnaryEnergy first, UnaryEnergy second, double first_x, double second_x,
                             std::vector<EnergyTerms> interaction)
    : name_(std::move(name)),
      first_(std::move(first)),
      second_(std::move(second)),
      first_x_(first_x),
      second_x_(second_x),
      interaction_(std::move(interaction)) {
  if (!(first_x_ >= 0 && first_x_ < second_x_ && second_x_ <= 1))
    throw base::InputError("solution " + name_ + ": its end members must have rising mole fractions from 0 to 1");
}

IsothermalEnergy SolutionPhase::at(double T) const {
  std::vector<double> L;
  L.reserve(interaction_.size());
  for (const EnergyTerms& terms : interaction_) L.push_back(terms.value(T));
  return {first_.value(T), second_.value(T), first_x_, second_x_, kGasConstant * T, std::move(L)};
}

IsothermalEnergy SolutionPhase::slope_at(double T) const {
  std::vector<double> L;
  L.reserve(interaction_.size());
  for (const EnergyTerms& terms : interaction_) L.push_back(terms.slope(T));
  return {first_.slope(T), second_.slope(T), first_x_, second_x_, kGasConstant, std::move(L)};
}

CompoundPhase::CompoundPhase(std::string name, double x, UnaryEnergy energy)
    : name_(std::move(name)), x_(x), energy_(std::move(energy)) {
  if (!(x_ >= 0 && x_ <= 1)) throw base::InputError("compound " + name_ + ": its mole fraction must lie in 0..1");
}

CompoundPhase CompoundPhase::formed_from(std::string name, double x, const UnaryEnergy& first,
                                         const UnaryEnergy& second, const UnaryEnergy& formation) {
  return {std::move(name), x, (1 - x) * first + x * second + formation};
}

IsothermalEnergy CompoundPhase::at(double T) const {
  return {energy_.value(T), energy_.value(T), x_, x_, kGasConstant * T, {}};
}

IsothermalEnergy CompoundPhase::slope_at(double T) const {
  return {energy_.slope(T), energy_.slope(T), x_, x_, kGasConstant, {}};
}

}  // namespace palier::alloy
