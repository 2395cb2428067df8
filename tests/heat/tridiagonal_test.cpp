// The tridiagonal solver against Eigen's dense LU.
#include "palier/heat/tridiagonal.hpp"

#include <Eigen/Dense>
#include <catch2/catch.hpp>
#include <random>

#include "palier/base/lanes.hpp"

using namespace palier;

namespace {

/// A random matrix dominated by its diagonal, and a right-hand side.
struct System {
  Eigen::MatrixXd matrix;
  Eigen::VectorXd right;
};

System random_system(Eigen::Index n, std::mt19937_64& random) {
  std::uniform_real_distribution<double> side(-1, 1), excess(0.05, 1);
  System s{Eigen::MatrixXd::Zero(n, n), Eigen::VectorXd(n)};
  for (Eigen::Index i = 0; i < n; ++i) {
    if (i > 0) s.matrix(i, i - 1) = side(random);
    if (i + 1 < n) s.matrix(i, i + 1) = side(random);
    s.matrix(i, i) = (side(random) < 0 ? -1 : 1) * (s.matrix.row(i).cwiseAbs().sum() + excess(random));
    s.right(i) = 10 * side(random);
  }
  return s;
}

/// Puts a system into one lane of the solver.
template <class Real>
void load(const System& s, int lane, heat::Tridiagonal<Real>& solver, std::vector<Real>& right) {
  for (Eigen::Index i = 0; i < s.right.size(); ++i) {
    const auto k = static_cast<std::size_t>(i);
    base::lane(solver.lower[k], lane) = i > 0 ? s.matrix(i, i - 1) : 0.0;
    base::lane(solver.diagonal[k], lane) = s.matrix(i, i);
    base::lane(solver.upper[k], lane) = i + 1 < s.right.size() ? s.matrix(i, i + 1) : 0.0;
    base::lane(right[k], lane) = s.right(i);
  }
}

template <class Real>
void compare_with_dense() {
  std::mt19937_64 random(20240501);
  for (Eigen::Index n = 1; n <= 50; ++n) {
    const auto size = static_cast<std::size_t>(n);
    heat::Tridiagonal<Real> solver(size);
    std::vector<Real> x(size, base::all_lanes<Real>(0));
    std::vector<System> systems;
    for (int l = 0; l < base::lane_count<Real>; ++l) {
      systems.push_back(random_system(n, random));
      load(systems.back(), l, solver, x);
    }
    solver.solve(x);
    for (int l = 0; l < base::lane_count<Real>; ++l) {
      const System& s = systems[static_cast<std::size_t>(l)];
      const Eigen::VectorXd known = s.matrix.partialPivLu().solve(s.right);
      Eigen::VectorXd found(n);
      for (Eigen::Index i = 0; i < n; ++i) found(i) = base::lane(x[static_cast<std::size_t>(i)], l);
      CAPTURE(n, l);
      CHECK((found - known).cwiseAbs().maxCoeff() <= 1e-12 * known.cwiseAbs().maxCoeff());
    }
  }
}

}  // namespace

TEST_CASE("Tridiagonal solver against dense LU, 1 to 50 unknowns", "[heat]") { compare_with_dense<double>(); }

TEST_CASE("Tridiagonal solver in four lanes against dense LU", "[heat]") { compare_with_dense<base::Lanes<4>>(); }
