#include "palier/files/atomic_weight.hpp"

#include <map>

namespace palier::files {

std::optional<double> atomic_weight(const std::string& symbol) {
  static const std::map<std::string, double> weights{
      {"H", 1.008},   {"Li", 6.94},   {"Be", 9.0122}, {"B", 10.81},   {"C", 12.011},  {"N", 14.007},  {"O", 15.999},
      {"Na", 22.990}, {"Mg", 24.305}, {"Al", 26.982}, {"Si", 28.085}, {"P", 30.974},  {"S", 32.06},   {"Ca", 40.078},
      {"Ti", 47.867}, {"V", 50.942},  {"Cr", 51.996}, {"Mn", 54.938}, {"Fe", 55.845}, {"Co", 58.933}, {"Ni", 58.693},
      {"Cu", 63.546}, {"Zn", 65.38},  {"Ga", 69.723}, {"Ge", 72.630}, {"As", 74.922}, {"Sr", 87.62},  {"Y", 88.906},
      {"Zr", 91.224}, {"Nb", 92.906}, {"Mo", 95.95},  {"Pd", 106.42}, {"Ag", 107.87}, {"Cd", 112.41}, {"In", 114.82},
      {"Sn", 118.71}, {"Sb", 121.76}, {"La", 138.91}, {"Ce", 140.12}, {"Hf", 178.49}, {"Ta", 180.95}, {"W", 183.84},
      {"Re", 186.21}, {"Pt", 195.08}, {"Au", 196.97}, {"Pb", 207.2},  {"Bi", 208.98}};
  const auto found = weights.find(symbol);
  return found == weights.end() ? std::nullopt : std::optional<double>(found->second);
}

double mass_percent(double at_percent, double solute_weight, double base_weight) {
  const double solute = at_percent * solute_weight;
  return 100.0 * solute / (solute + (100.0 - at_percent) * base_weight);
}

}  // namespace palier::files
