#include "palier/freeze/section.hpp"

namespace palier::freeze {

double Section::depth() const {
  if (shape == heat::Shape::plate) return inside ? thickness : thickness / 2;
  return (thickness - bore) / 2;
}

}  // namespace palier::freeze
