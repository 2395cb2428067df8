#include "common_tangent.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>

namespace palier::alloy {
namespace {

constexpr int kMostUnknowns = 6;  // both potentials, temperature, three compositions
using Matrix = Eigen::Matrix<double, Eigen::Dynamic, Eigen::Dynamic, 0, kMostUnknowns, kMostUnknowns>;
using Vector = Eigen::Matrix<double, Eigen::Dynamic, 1, 0, kMostUnknowns, 1>;

IsothermalEnergy energy_slope_at(const SolidPhase& phase, double T) {
  return std::visit([T](const auto& p) { return p.slope_at(T); }, phase);
}

/// Equations of the common tangent, which runs from mu_1 at x = 0 to mu_2 at x = 1:
/// it passes over both end members of each phase where the phase's own tangent does. All divided by R T.
/// Unknowns: mu_1, mu_2, T where it is free, z of each phase that has one.
class TangentEquations {
 public:
  TangentEquations(const Phases& phases, const CommonTangent& at, Condition condition)
      : free_temperature_(condition != Condition::two_phases), scale_(1 / (kGasConstant * at.temperature)) {
    Eigen::Index unknowns = free_temperature_ ? 3 : 2;
    for (const Contact& c : at.contacts) {
      energy_.push_back(energy_at(phases[c.phase], at.temperature));
      slope_.push_back(energy_slope_at(phases[c.phase], at.temperature));
      column_.push_back(energy_.back().fixed_composition() ? -1 : unknowns++);
    }
    jacobian = Matrix::Zero(unknowns, unknowns);
    residual = Vector::Zero(unknowns);
    temperature_slope = Vector::Zero(unknowns);
    for (std::size_t i = 0; i < at.contacts.size(); ++i) add_phase(i, at.contacts[i].z);
    if (condition == Condition::congruent) add_equal_composition(at);
  }

  /// Column of a phase's z; -1 where the phase has none.
  Eigen::Index column(std::size_t contact) const { return column_[contact]; }
  const IsothermalEnergy& energy(std::size_t contact) const { return energy_[contact]; }

  Matrix jacobian;
  Vector residual;           ///< at mu_1 = mu_2 = 0, in which the equations are linear
  Vector temperature_slope;  ///< of the residual

 private:
  void add_phase(std::size_t i, double z) {
    const IsothermalEnergy &G = energy_[i], &S = slope_[i];
    if (G.fixed_composition()) {
      add_row(G.first(), S.first(), 0, i, G.first_x());
      return;
    }
    const Tangent g = G.tangent(z), s = S.tangent(z);
    add_row(g.first, s.first, g.first_slope, i, G.first_x());
    add_row(g.second, s.second, g.second_slope, i, G.second_x());
  }

  void add_row(double G, double G_of_T, double G_of_z, std::size_t i, double x) {
    residual(row_) = G * scale_;
    temperature_slope(row_) = G_of_T * scale_;
    jacobian(row_, 0) = -(1 - x);
    jacobian(row_, 1) = -x;
    if (free_temperature_) jacobian(row_, 2) = temperature_slope(row_);
    if (column_[i] >= 0) jacobian(row_, column_[i]) = G_of_z * scale_;
    ++row_;
  }

  void add_equal_composition(const CommonTangent& at) {
    double sign = 1;
    for (std::size_t i = 0; i < 2; ++i, sign = -1) {
      const bool fixed = energy_[i].fixed_composition();
      residual(row_) += sign * (fixed ? energy_[i].first_x() : energy_[i].x(at.contacts[i].z));
      if (!fixed) jacobian(row_, column_[i]) = sign * energy_[i].x_slope(at.contacts[i].z);
    }
  }

  bool free_temperature_;
  double scale_;
  Eigen::Index row_ = 0;
  std::vector<IsothermalEnergy> energy_, slope_;
  std::vector<Eigen::Index> column_;
};

/// Compositions at the end, and how they move with temperature.
void finish(const Phases& phases, CommonTangent& tangent, Condition condition) {
  const TangentEquations equations(phases, tangent, condition);
  Vector z_slope;
  if (condition == Condition::two_phases)
    z_slope = equations.jacobian.partialPivLu().solve(-equations.temperature_slope);
  for (std::size_t i = 0; i < tangent.contacts.size(); ++i) {
    Contact& c = tangent.contacts[i];
    const IsothermalEnergy& G = equations.energy(i);
    c.x = G.fixed_composition() ? G.first_x() : G.x(c.z);
    const bool moves = condition == Condition::two_phases && !G.fixed_composition();
    c.x_slope = moves ? G.x_slope(c.z) * z_slope(equations.column(i)) : 0;
  }
}

/// One phase twice is an equilibrium only across a gap.
bool trivial(const CommonTangent& t) {
  constexpr double kClosest = 1e-6;
  for (std::size_t i = 1; i < t.contacts.size(); ++i)
    if (t.contacts[i].phase == t.contacts[i - 1].phase && std::abs(t.contacts[i].x - t.contacts[i - 1].x) < kClosest)
      return true;
  return false;
}

}  // namespace

Phases phases_of(const BinarySystem& system) {
  Phases phases{system.liquid};
  phases.insert(phases.end(), system.solids.begin(), system.solids.end());
  return phases;
}

IsothermalEnergy energy_at(const SolidPhase& phase, double T) {
  return std::visit([T](const auto& p) { return p.at(T); }, phase);
}

const std::string& name_of(const SolidPhase& phase) {
  return std::visit([](const auto& p) -> const std::string& { return p.name(); }, phase);
}

std::optional<CommonTangent> touch(const Phases& phases, CommonTangent guess, Condition condition) {
  constexpr int kIterations = 80;
  constexpr double kLongestZ = 1.5, kLongestT = 10, kFarthestT = 40;  // [1], [K], [K]
  constexpr double kCloseX = 1e-12, kCloseT = 1e-9;
  CommonTangent at = std::move(guess);
  const double T0 = at.temperature;
  for (int iteration = 0; iteration < kIterations; ++iteration) {
    const TangentEquations equations(phases, at, condition);
    const Vector step = equations.jacobian.partialPivLu().solve(-equations.residual);
    if (!step.allFinite()) return std::nullopt;
    const bool free_temperature = condition != Condition::two_phases;
    const double T_step = free_temperature ? step(2) : 0;
    double damping = std::min(1.0, kLongestT / std::max(std::abs(T_step), kLongestT));
    for (std::size_t i = 0; i < at.contacts.size(); ++i)
      if (const auto column = equations.column(i); column >= 0)
        damping = std::min(damping, kLongestZ / std::max(std::abs(step(column)), kLongestZ));
    bool close = damping == 1 && std::abs(T_step) < kCloseT;
    for (std::size_t i = 0; i < at.contacts.size(); ++i)
      if (const auto column = equations.column(i); column >= 0) {
        close = close && std::abs(step(column)) * equations.energy(i).x_slope(at.contacts[i].z) < kCloseX;
        at.contacts[i].z += damping * step(column);
      }
    at.temperature += damping * T_step;
    if (std::abs(at.temperature - T0) > kFarthestT) return std::nullopt;
    if (!close) continue;
    finish(phases, at, condition);
    if (trivial(at)) return std::nullopt;
    return at;
  }
  return std::nullopt;
}

}  // namespace palier::alloy
