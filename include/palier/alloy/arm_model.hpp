// Numerical model of one dendrite arm: the reference for the closed forms of back-diffusion.
#pragma once

#include <utility>
#include <vector>

namespace palier::alloy {

/// How the front moves from the middle of the arm (time 0) to the middle of the liquid (local solidification time).
enum class ArmGrowth {
  parabolic,  ///< fs = sqrt(t / t_f), as Brody and Flemings take it
  linear      ///< fs = t / t_f
};

/// Half an arm, a plate: the solid grows over half the arm spacing into well-mixed liquid.
struct Arm {
  double partition_coefficient = 0;  ///< solid/liquid at the front, 0 < k < 1
  double diffusion_number = 0;       ///< 4 D t_f / spacing^2, above 0, up to 1e6
  ArmGrowth growth = ArmGrowth::parabolic;
};

/// Resolution of the model; errors fall with the square of both.
struct ArmGrid {
  int cells = 200;   ///< across the solid, at any time
  int steps = 2000;  ///< in fraction solid, uniform
};

/// An arm from its first to its last solid. Compositions are counted in that of the alloy: the problem is linear.
class FrozenArm {
 public:
  FrozenArm(std::vector<double> fraction_solid, std::vector<double> liquid, double imbalance)
      : fraction_solid_(std::move(fraction_solid)), liquid_(std::move(liquid)), imbalance_(imbalance) {}

  const std::vector<double>& fraction_solid() const { return fraction_solid_; }  ///< 0 to 1 by steps
  const std::vector<double>& liquid() const { return liquid_; }  ///< composition of the liquid, at the same steps
  /// Largest error of the solute balance of any step, relative to the solute of the alloy.
  double imbalance() const { return imbalance_; }
  /// Liquid that is left when it has reached a composition, as that of an invariant; 0 where all froze before.
  /// @param liquid composition of the liquid over that of the alloy. Throws InputError below 1.
  double fraction_left(double liquid) const;

 private:
  std::vector<double> fraction_solid_, liquid_;
  double imbalance_;
};

/// Marches an arm from liquid to solid. Finite volumes on coordinates that grow with the solid, so that the front
/// stays at their end; implicit steps (backward differences of second order) of the solute in each cell and in the
/// liquid, so that what leaves one enters the next.
///
/// With y = x / fs from 0 to 1 and P = 2 a (parabolic) or a / fs (linear), a the diffusion number:
///   d(fs C)/dfs = d(P dC/dy + y C)/dy,   d((1 - fs) C_liquid)/dfs = -(P dC/dy + C) at the front, C = k C_liquid.
/// Throws InputError where k or the diffusion number is out of range, and where the cells are too wide for it (the
/// layer in which solute diffuses back would fall between them).
FrozenArm freeze_arm(const Arm& arm, const ArmGrid& grid = {});

}  // namespace palier::alloy
