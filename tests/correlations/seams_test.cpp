// Where two laws meet: the value must not jump; the slope's jump is measured and bounded.
#include "correlations/forced_channel.hpp"
#include "tests/near.hpp"

using namespace finwright::correlations;
using finwright::tests::near;

TEST_CASE("duct Nusselt number and friction are continuous at Re 2300 and 4000") {
    for (double aspect : {0.03, 0.1, 0.4, 1.0})
        for (double length : {5.0, 20.0, 100.0})
            for (double seam : {2300.0, 4000.0}) {
                const double below = seam * (1.0 - 1e-9), above = seam * (1.0 + 1e-9);
                CHECK(nusselt_duct_all_regimes(below, 0.71, aspect, length) ==
                      near(nusselt_duct_all_regimes(above, 0.71, aspect, length), 1e-6));
                CHECK(fapp_all_regimes(below, aspect, length) ==
                      near(fapp_all_regimes(above, aspect, length), 1e-6));
                CHECK(momentum_factor(below) == near(momentum_factor(above), 1e-6));
            }
}

TEST_CASE("the duct Nusselt number grows with Reynolds number through the transition") {
    for (double length : {5.0, 20.0, 100.0}) {
        double before = 0.0;
        for (double re = 200.0; re < 20000.0; re *= 1.02) {
            const double nu = nusselt_duct_all_regimes(re, 0.71, 0.1, length);
            CHECK(nu >= before);
            before = nu;
        }
    }
}

TEST_CASE("the contraction cubic has no kink at its knots") {
    for (double knot = 0.1; knot < 0.95; knot += 0.1) {
        const auto left = contraction_coefficient(Dual<1>::variable(knot - 1e-9, 0));
        const auto right = contraction_coefficient(Dual<1>::variable(knot + 1e-9, 0));
        CHECK(left.value == near(right.value, 1e-8));
        CHECK(std::abs(left.slope[0] - right.slope[0]) < 1e-6);
    }
}
