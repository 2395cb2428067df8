// Heat flows through all faces of a body at one state, with exact derivatives: the right side of the heat equation.
#pragma once

#include <array>
#include <optional>
#include <vector>

#include "palier/base/lanes.hpp"
#include "palier/heat/body.hpp"
#include "palier/heat/face_flow.hpp"
#include "palier/heat/front.hpp"
#include "palier/heat/state.hpp"

namespace palier::heat {

/// Bodies of all lanes; they have the same number of cells in each layer.
template <class Real>
using Bodies = std::array<const Body*, base::lane_count<Real>>;

/// What a cell with a front holds beyond its latent enthalpy: its solid part is colder, its liquid part hotter than the
/// arrest. Both are taken as straight profiles from the front to the cell's face.
struct FrontExcess {
  double excess = 0;    ///< [J/m3]
  double by_self = 0;   ///< per unknown of the cell
  double by_left = 0;   ///< per unknown of the cell at the smaller radius
  double by_right = 0;  ///< per unknown of the cell at the larger radius
};

template <class Real>
class FlowField {
 public:
  explicit FlowField(const Bodies<Real>& bodies);

  /// Computes flows, derivatives and front terms; allocates nothing.
  /// @param time    [s]
  /// @param unknown of each cell: enthalpy, or latent enthalpy where a front lies in it
  void evaluate(const Real& time, const std::vector<Real>& unknown, const LaneFronts<Real>& fronts);

  /// Toward larger radius through each face [W], and by the unknowns of the cells at its smaller and larger radius.
  const std::vector<Real>& flow() const { return flow_; }
  const std::vector<Real>& by_inner() const { return by_inner_; }
  const std::vector<Real>& by_outer() const { return by_outer_; }
  /// Temperature of the metal's faces at its smaller and larger radius [K].
  double inner_surface(int lane) const { return surface_[static_cast<std::size_t>(lane)][0]; }
  double outer_surface(int lane) const { return surface_[static_cast<std::size_t>(lane)][1]; }
  /// Of the lane's front of that number, in the order of the fronts given to evaluate.
  const FrontExcess& excess(int lane, int front) const {
    return excess_[static_cast<std::size_t>(lane)][static_cast<std::size_t>(front)];
  }
  const LastArrest& arrest(int lane) const { return arrests_[static_cast<std::size_t>(lane)]; }
  const Body& body(int lane) const { return *bodies_[static_cast<std::size_t>(lane)]; }

  /// Excess that a front would have, with the neighbors as they are at the last evaluation. Slower; for hand-overs.
  FrontExcess excess_of(int lane, const Front& front, double unknown, double time, const std::vector<Real>& unknowns,
                        const Fronts& fronts);

  /// The unknown between two bounds with which a front in a cell makes up the cell's enthalpy; nothing where none does.
  std::optional<double> unknown_for(int lane, const Front& front, double enthalpy, double lowest, double highest,
                                    double time, const std::vector<Real>& unknowns, const Fronts& fronts);

 private:
  Terminal terminal(int lane, int cell, int side, const std::vector<Real>& unknown, const Fronts& fronts) const;
  void contact(int lane, int layer, double time, const std::vector<Real>& unknown, const Fronts& fronts);
  void boundary(int lane, int side, double time, const std::vector<Real>& unknown, const Fronts& fronts);
  void front_flows(int lane, const Front& front, const std::vector<Real>& unknown);
  FrontExcess front_excess(int lane, const Front& front, double unknown) const;

  Bodies<Real> bodies_;
  std::vector<LastArrest> arrests_;
  std::vector<Real> conductance_, theta_, theta_slope_, flow_, by_inner_, by_outer_;
  std::vector<Real> scratch_;  ///< unknowns around a front in excess_of
  std::array<std::array<double, 2>, base::lane_count<Real>> surface_{};
  std::array<std::array<FrontExcess, 2>, base::lane_count<Real>> excess_{};
};

}  // namespace palier::heat
