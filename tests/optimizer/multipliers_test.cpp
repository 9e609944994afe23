// Multipliers against what easing a limit really buys, and the residual away from a minimum.
#include "optimizer/minimise.hpp"
#include "optimizer/multipliers.hpp"
#include "tests/near.hpp"
#include "tests/optimizer/formula_problem.hpp"

using namespace finwright::optimizer;
using finwright::tests::FormulaProblem;
using finwright::tests::near;
using finwright::tests::Num;
using X = std::span<const Num>;

namespace {

/// A problem of our own with one active nonlinear limit, eased by `first`, and a lower bound.
Outcome solved(double first, double lower) {
    FormulaProblem problem(
        {{"a", lower, 9.0, Scale::logarithmic}, {"b", 0.1, 9.0, Scale::logarithmic}},
        [](X x) { return x[0] * x[0] + 3.0 * x[1]; },
        {[=](X x) { return 4.0 - x[0] * x[1] - first; }});
    return minimise(problem, Settings{});
}

} // namespace

TEST_CASE("a constraint's multiplier is what easing it buys") {
    const Outcome base = solved(0.0, 0.1), eased = solved(1e-3, 0.1);
    CHECK((base.objective - eased.objective) / 1e-3 == near(base.multipliers[0], 1e-3));
}

TEST_CASE("a bound's multiplier is what easing it buys, in the variable's own unit") {
    const Outcome base = solved(0.0, 3.0), eased = solved(0.0, 2.999);
    CHECK(base.x[0] == near(3.0, 1e-9));
    CHECK((base.objective - eased.objective) / 1e-3 == near(base.lower_multipliers[0], 2e-3));
    CHECK(base.upper_multipliers[0] == 0.0);
}

TEST_CASE("idle limits have no multiplier, and the residual vanishes at the minimum") {
    const Outcome o = solved(0.0, 0.1);
    CHECK(o.kkt_residual < 1e-3);
    CHECK(o.lower_multipliers == std::vector<double>{0.0, 0.0});
}

TEST_CASE("away from a minimum the residual shows it") {
    Evaluation at(2, 1);
    at.gradient = {1.0, -2.0};
    at.constraints = {-1.0}; // idle
    at.jacobian = {1.0, 1.0};
    const std::vector<Variable> variables{{"a", 0.0, 1.0}, {"b", 0.0, 1.0}};
    CHECK(multipliers_at(variables, std::vector<double>{0.5, 0.5}, at).residual ==
          near(1.0, 1e-12));
}
