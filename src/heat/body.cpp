#include "palier/heat/body.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

namespace palier::heat {

Body::Body(Shape shape, double inner_radius, std::vector<BodyLayer> layers, int metal, Boundary inner, Boundary outer)
    : m_(static_cast<int>(shape)),
      layers_(std::move(layers)),
      metal_(metal),
      inner_(std::move(inner)),
      outer_(std::move(outer)) {
  face_.push_back(inner_radius);
  for (std::size_t l = 0; l < layers_.size(); ++l) {
    const int begin = cells();
    for (const double w : layers_[l].widths) {
      center_.push_back(face_.back() + 0.5 * w);
      face_.push_back(face_.back() + w);
      layer_of_.push_back(static_cast<int>(l));
    }
    ranges_.push_back({begin, cells()});
  }
  for (const double r : face_) area_.push_back(std::pow(r, m_));
  for (std::size_t i = 0; i < center_.size(); ++i)
    volume_.push_back(volume_inside(face_[i + 1]) - volume_inside(face_[i]));
  conductance_.assign(face_.size(), 0.0);
  for (const LayerCells& r : ranges_)
    for (auto f = static_cast<std::size_t>(r.begin + 1); f < static_cast<std::size_t>(r.end); ++f)
      conductance_[f] = area_[f] / (center_[f] - center_[f - 1]);
  if (inner_.kind == Boundary::Kind::fixed_temperature)
    inner_potential_ = layers_.front().curve->potential_at(inner_.temperature);
  if (outer_.kind == Boundary::Kind::fixed_temperature)
    outer_potential_ = layers_.back().curve->potential_at(outer_.temperature);
}

double Body::half_width(int cell) const {
  const auto i = static_cast<std::size_t>(cell);
  return 0.5 * (face_[i + 1] - face_[i]);
}

double Body::shell_conductance(double r1, double r2) const {
  switch (m_) {
    case 0:
      return 1 / (r2 - r1);
    case 1:
      return r1 > 0 ? 1 / std::log(r2 / r1) : 0.0;
    default:
      return r1 > 0 ? 1 / (1 / r1 - 1 / r2) : 0.0;
  }
}

double Body::volume_inside(double r) const { return std::pow(r, m_ + 1) / (m_ + 1); }

double Body::radius_of_volume(double volume) const {
  const double power = std::max(0.0, volume * (m_ + 1));
  return m_ == 0 ? power : (m_ == 1 ? std::sqrt(power) : std::cbrt(power));
}

std::vector<double> graded_widths(double width, int cells, double ratio) {
  std::vector<double> widths(static_cast<std::size_t>(cells));
  double w = 1, sum = 0;
  for (double& x : widths) {
    x = w;
    sum += w;
    w *= ratio;
  }
  for (double& x : widths) x *= width / sum;
  return widths;
}

}  // namespace palier::heat
