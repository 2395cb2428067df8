#include "palier/heat/front_passage.hpp"

#include <algorithm>
#include <cmath>
#include <optional>

namespace palier::heat {

using base::lane;
using base::lane_count;

namespace {

constexpr double kHandBack = -0.35;  // solid share at which a receding front goes back; far from 0, lest it flutter
constexpr double kAdoptFrom = 0.45;  // solid share from which a cell's front is followed: near one half the flows of a
                                     // cell with and without a front inside agree

}  // namespace

template <class Real>
void FrontPassage<Real>::move(Stage<Real>& stage, int l, const Front& f, double change, double time) {
  const LastArrest& arrest = field_.arrest(l);
  double& u = lane(stage.unknown[static_cast<std::size_t>(f.cell)], l);
  const double latent = arrest.hot - arrest.cold;
  u += change;
  if (u < arrest.cold) {
    u = arrest.cold;
    hand_over(stage, l, f, time);
  } else if ((arrest.hot - u) / latent < kHandBack) {
    u = arrest.hot - kHandBack * latent;
    hand_back(stage, l, f, time);
  }
}

/// The cell is solid: the front goes on into the next one, or ends where there is none, or meets the other front.
template <class Real>
void FrontPassage<Real>::hand_over(Stage<Real>& stage, int l, const Front& f, double time) {
  Fronts& fronts = stage.fronts[static_cast<std::size_t>(l)];
  const LastArrest& arrest = field_.arrest(l);
  const LayerCells metal = field_.body(l).metal_cells();
  double& u = lane(stage.unknown[static_cast<std::size_t>(f.cell)], l);
  u = arrest.cold + field_.excess_of(l, f, arrest.cold, time, stage.unknown, fronts).excess;
  fronts.remove(f.cell);
  const int next = f.cell - f.solid_side;
  if (next < metal.begin || next >= metal.end) return;
  double& next_unknown = lane(stage.unknown[static_cast<std::size_t>(next)], l);
  if (const Front* met = fronts.in_cell(next)) {
    const Front other = *met;
    next_unknown += field_.excess_of(l, other, next_unknown, time, stage.unknown, fronts).excess;
    fronts.remove(next);
    return;
  }
  pass_on_debt(stage, l, f.cell, next, f.solid_side);
  // A neighbor that is still too hot for a front has to cool as a cell of its own first.
  const Front ahead{next, f.solid_side};
  const double furthest_back = arrest.hot - 0.9 * kHandBack * (arrest.hot - arrest.cold);
  if (const std::optional<double> place =
          field_.unknown_for(l, ahead, next_unknown, arrest.cold, furthest_back, time, stage.unknown, fronts)) {
    next_unknown = *place;
    fronts.add(ahead);
  }
}

/// What the solid just behind a front gains per volume and time as the step begins.
template <class Real>
void FrontPassage<Real>::note_solid_gain(int l, int side, const State<Real>& from) {
  double& noted = solid_gain_[static_cast<std::size_t>(l)][side > 0 ? 1 : 0];
  noted = 0;
  const Front* front = from.fronts[static_cast<std::size_t>(l)].with_solid_side(side);
  if (!front) return;
  const LayerCells metal = field_.body(l).metal_cells();
  const int solid = front->cell + side;
  if (solid >= metal.begin && solid < metal.end)
    noted = (lane(from.flow[static_cast<std::size_t>(solid)], l) -
             lane(from.flow[static_cast<std::size_t>(solid + 1)], l)) /
            field_.body(l).volume()[static_cast<std::size_t>(solid)];
}

/// A cell that froze within the stage: the explicit part of the stage still took its latent heat for the whole length,
/// or not yet all of it. What it took too much or too little is the next cell's, so it is passed on through the base of
/// the stage; left where it is, it would come back as a flow between the two that the step must not believe in. The sum
/// stays.
template <class Real>
void FrontPassage<Real>::pass_on_debt(Stage<Real>& stage, int l, int cell, int next, int side) const {
  const auto c = static_cast<std::size_t>(cell), n = static_cast<std::size_t>(next);
  const std::vector<double>& volume = field_.body(l).volume();
  const double due =
      lane(stage.unknown[c], l) - lane(stage.weight, l) * solid_gain_[static_cast<std::size_t>(l)][side > 0 ? 1 : 0];
  lane(stage.base[n], l) += (lane(stage.base[c], l) - due) * volume[c] / volume[n];
  lane(stage.base[c], l) = due;
}

/// For all cells that froze before the stage under way begins.
template <class Real>
void FrontPassage<Real>::pass_on_debts(Stage<Real>& stage, int l, int side, const Fronts& before) const {
  const Front *then = before.with_solid_side(side),
              *now = stage.fronts[static_cast<std::size_t>(l)].with_solid_side(side);
  if (!then || !now) return;
  for (int cell = then->cell; (cell - now->cell) * side > 0; cell -= side)
    pass_on_debt(stage, l, cell, cell - side, side);
}

/// The front has melted its way out of the cell on the solid side.
template <class Real>
void FrontPassage<Real>::hand_back(Stage<Real>& stage, int l, const Front& f, double time) {
  Fronts& fronts = stage.fronts[static_cast<std::size_t>(l)];
  const LastArrest& arrest = field_.arrest(l);
  const LayerCells metal = field_.body(l).metal_cells();
  double& u = lane(stage.unknown[static_cast<std::size_t>(f.cell)], l);
  u = std::max(arrest.hot, u + field_.excess_of(l, f, u, time, stage.unknown, fronts).excess);
  fronts.remove(f.cell);
  const int back = f.cell + f.solid_side;
  if (back < metal.begin || back >= metal.end || fronts.in_cell(back)) return;
  fronts.add({back, f.solid_side});
  lane(stage.unknown[static_cast<std::size_t>(back)], l) = arrest.cold + 0.3 * (arrest.hot - arrest.cold);
}

template <class Real>
void FrontPassage<Real>::adopt(State<Real>& state, const Real& time) {
  for (int l = 0; l < lane_count<Real>; ++l) {
    const LastArrest& arrest = field_.arrest(l);
    if (!arrest.exists) continue;
    Fronts& fronts = state.fronts[static_cast<std::size_t>(l)];
    const LayerCells metal = field_.body(l).metal_cells();
    for (const int side : {+1, -1}) {
      if (fronts.with_solid_side(side)) continue;
      // The first cell from this side that is not solid; all behind it must be.
      int cell = side > 0 ? metal.end - 1 : metal.begin;
      while (cell >= metal.begin && cell < metal.end &&
             lane(state.unknown[static_cast<std::size_t>(cell)], l) < arrest.cold && !fronts.in_cell(cell))
        cell -= side;
      if (cell < metal.begin || cell >= metal.end || fronts.in_cell(cell)) continue;
      const double H = lane(state.unknown[static_cast<std::size_t>(cell)], l);
      const double share = (arrest.hot - H) / (arrest.hot - arrest.cold);
      // At a wall with a resistance of its own a front may be followed from its birth; the flow to a face of fixed
      // temperature has no bound there.
      const int end = side > 0 ? field_.body(l).cells() - 1 : 0;
      const Boundary& boundary = side > 0 ? field_.body(l).outer() : field_.body(l).inner();
      const bool fixed_face = cell == end && boundary.kind == Boundary::Kind::fixed_temperature;
      const bool at_wall = cell == (side > 0 ? metal.end - 1 : metal.begin) && !fixed_face;
      const int ahead = cell - side;
      const bool liquid_ahead = ahead < metal.begin || ahead >= metal.end ||
                                lane(state.unknown[static_cast<std::size_t>(ahead)], l) >= arrest.hot;
      const bool cooled = side * lane(state.flow[static_cast<std::size_t>(side > 0 ? cell + 1 : cell)], l) > 0;
      if ((share < kAdoptFrom && !at_wall) || share > 1 || !liquid_ahead || !cooled) continue;
      const Front front{cell, side};
      const std::optional<double> guess =
          field_.unknown_for(l, front, H, arrest.cold, arrest.hot, lane(time, l), state.unknown, fronts);
      if (!guess) continue;
      lane(state.unknown[static_cast<std::size_t>(cell)], l) = *guess;
      fronts.add(front);
      state.marks[static_cast<std::size_t>(l)].front_radius[side > 0 ? 1 : 0] =
          place(field_.body(l), arrest, front, *guess).radius;
    }
  }
}

template class FrontPassage<double>;
template class FrontPassage<base::Lanes<4>>;

}  // namespace palier::heat
