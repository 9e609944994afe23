// Tapered fins against the exact Bessel solution: check values FN-20a and FN-21a, "Bessel form
// derived here; boundary value solution agrees 1e-12" (computed from Gardner 1945's equation).
#include "src/sink/fin_conduction.hpp"
#include "tests/near.hpp"

using namespace finwright;
using tests::near;

namespace {

/// Efficiency with an adiabatic tip: the conductance of both faces, no tip correction.
double tapered(double h, double k, double root, double tip, double height) {
    const double m_height_squared = 2.0 * h * height * height / (k * root);
    return sink::efficiency(m_height_squared, sink::taper_factor(tip / root));
}

} // namespace

TEST_CASE("taper factor: efficiency within 0.1 % of the exact solution") {
    CHECK(tapered(50.0, 200.0, 0.003, 0.001, 0.04) == near(0.90339467, 1e-3)); // FN-20a
    CHECK(tapered(20.0, 200.0, 0.002, 0.001, 0.05) == near(0.91369143, 1e-3)); // FN-21a
}

TEST_CASE("a straight fin has taper factor one") {
    CHECK(sink::taper_factor(1.0) == near(1.0, 1e-12));
}

TEST_CASE("the quadrature matches the closed integral at strong taper") {
    // 3 int s^2/(tau + (1-tau)s) ds in closed form, a = 1 - tau
    for (double tau : {0.2, 0.5, 0.8}) {
        const double a = 1.0 - tau, r = tau / a;
        const double closed = 3.0 / a * (0.5 - r + r * r * std::log(1.0 / r + 1.0));
        CHECK(sink::taper_factor(tau) == near(closed, 2e-4));
    }
}
