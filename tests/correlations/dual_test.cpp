// Derivative-carrying numbers: identities, central differences, and the conventions at special
// values.
#include "correlations/numbers/dual.hpp"
#include "tests/near.hpp"
#include <cmath>
#include <functional>

using namespace finwright::correlations;
using finwright::tests::near;
using D = Dual<1>;

namespace {

double slope_of(const std::function<D(D)>& f, double x) {
    return f(D::variable(x, 0)).slope[0];
}

} // namespace

TEST_CASE("every function's slope agrees with a central difference") {
    const std::vector<std::pair<const char*, std::function<D(D)>>> functions{
        {"sqrt", [](D x) { return sqrt(x); }},
        {"cbrt", [](D x) { return cbrt(x); }},
        {"exp", [](D x) { return exp(x); }},
        {"expm1", [](D x) { return expm1(x); }},
        {"log", [](D x) { return log(x); }},
        {"log1p", [](D x) { return log1p(x); }},
        {"sin", [](D x) { return sin(x); }},
        {"cos", [](D x) { return cos(x); }},
        {"tan", [](D x) { return tan(x); }},
        {"atan", [](D x) { return atan(x); }},
        {"tanh", [](D x) { return tanh(x); }},
        {"pow", [](D x) { return pow(x, 2.7); }},
        {"hypot", [](D x) { return hypot(x, x * x); }},
        {"quotient", [](D x) { return (1.0 + x) / (2.0 + x * x) - 3.0 / x; }},
    };
    for (const auto& entry : functions)
        for (double x : {0.3, 0.9, 1.4}) {
            const auto& f = entry.second;
            CAPTURE(entry.first);
            const double h = 1e-6;
            const double central = (f(D(x + h)).value - f(D(x - h)).value) / (2.0 * h);
            CHECK(slope_of(f, x) == near(central, 1e-8));
        }
}

TEST_CASE("identities") {
    const D x = D::variable(0.7, 0);
    const D one = sin(x) * sin(x) + cos(x) * cos(x);
    CHECK(one.value == near(1.0, 1e-15));
    CHECK(std::abs(one.slope[0]) < 1e-15);
    CHECK(exp(log(x)).slope[0] == near(1.0, 1e-15));
    CHECK((x / x).slope[0] == 0.0);
}

TEST_CASE("conventions at special values") {
    CHECK(sqrt(D(0.0)).slope[0] == 0.0);                     // a constant stays constant
    CHECK(std::isinf(sqrt(D::variable(0.0, 0)).slope[0]));   // a variable has the limit's slope
    CHECK(min(D::variable(1.0, 0), D(1.0)).slope[0] == 1.0); // a tie takes the first
    CHECK(max(D::variable(1.0, 0), D(1.0)).slope[0] == 1.0);
    CHECK(clamp(D::variable(2.0, 0), 0.0, 1.0).slope[0] == 0.0); // constant outside
    CHECK(abs(D::variable(-2.0, 0)).slope[0] == -1.0);
}
