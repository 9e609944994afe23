// Fins against Gardner 1945, Harper & Brown 1922 and Incropera's worked examples (ids of
// check_values.csv).
#include "correlations/fin.hpp"
#include "tests/near.hpp"
#include "tests/reference_rows.hpp"
#include <numbers>

using namespace finwright::correlations;
using finwright::tests::check_value;
using finwright::tests::near;

TEST_CASE("rectangular fin, FN-01 (tanh(mL)/mL)") {
    for (const char* id : {"FN-01-0.1", "FN-01-0.2", "FN-01-1", "FN-01-1.5"})
        CHECK(fin_efficiency(check_value(id)["mL"]) == near(check_value(id).value(), 1e-7));
}

TEST_CASE("triangular and parabolic fins, FN-12 and FN-13 (Gardner 1945)") {
    CHECK(triangular_fin_efficiency(0.5) == near(check_value("FN-12-0.5").value(), 1e-7));
    CHECK(triangular_fin_efficiency(2.0) == near(check_value("FN-12-2").value(), 1e-7));
    CHECK(triangular_fin_efficiency(3.0) == near(check_value("FN-12-3").value(), 1e-7));
    CHECK(parabolic_fin_efficiency(0.5) == near(check_value("FN-13-0.5").value(), 1e-7));
    CHECK(parabolic_fin_efficiency(1.0) == near(check_value("FN-13-1").value(), 1e-7));
    CHECK(parabolic_fin_efficiency(3.0) == near(check_value("FN-13-3").value(), 1e-6));
}

TEST_CASE(
    "trapezoidal fin, FN-20a and FN-21a (Bessel form; a boundary value solution agrees to 1e-12)") {
    CHECK(trapezoidal_fin_efficiency(50.0, 200.0, 0.003, 0.001, 0.04) ==
          near(check_value("FN-20a").value(), 1e-7));
    CHECK(trapezoidal_fin_efficiency(20.0, 200.0, 0.002, 0.001, 0.05) ==
          near(check_value("FN-21a").value(), 1e-7));
    // FN-21b: the same fin's heat per width and kelvin
    CHECK(trapezoidal_fin_efficiency(20.0, 200.0, 0.002, 0.001, 0.05) * 2.0 * 20.0 * 0.05 ==
          near(check_value("FN-21b").value(), 1e-7));
}

TEST_CASE("a barely tapered fin becomes the rectangular one") {
    const double m = std::sqrt(2.0 * 30.0 / (200.0 * 0.002));
    CHECK(trapezoidal_fin_efficiency(30.0, 200.0, 0.002, 0.002 * 0.99, 0.03) ==
          near(fin_efficiency(m * 0.03), 2e-3));
}

TEST_CASE("convective tip and corrected length, FN-04 to FN-06 (inputs of Shabany 2010, ex. 7.1)") {
    const double w = 0.04, t = 0.002, height = 0.03, h = 30.0, k = 210.0, rise = 65.0;
    CHECK(fin_conductance_convective_tip(h, k, 2.0 * (w + t), w * t, height) * rise ==
          near(check_value("FN-04").value(), 1e-6));
    const double corrected = height + w * t / (2.0 * (w + t));
    const double m = std::sqrt(h * 2.0 * (w + t) / (k * w * t));
    CHECK(fin_efficiency(m * corrected) * h * 2.0 * (w + t) * corrected * rise ==
          near(check_value("FN-05").value(), 1e-6));
}

TEST_CASE("very long rods, FN-07 to FN-09 (Incropera 6e, example 3.9)") {
    const double d = 0.005, h = 100.0;
    const auto long_rod = [&](double k, double rise) {
        return fin_conductance_convective_tip(h, k, std::numbers::pi * d,
                                              std::numbers::pi * d * d / 4.0, 5.0) *
               rise;
    };
    CHECK(long_rod(398.0, 75.15) == near(check_value("FN-07").value(), 1e-3)); // the book's 75.15 K
    CHECK(long_rod(180.0, 75.0) == near(check_value("FN-08").value(), 5e-3));
    CHECK(long_rod(14.0, 75.0) == near(check_value("FN-09").value(), 5e-3));
}

TEST_CASE("one-dimensional theory against exact 2-D series, FN-40 and FN-41") {
    // The rows give q_1D/q_2D at Bi and slenderness: the stated 1-D error of the passport.
    CHECK(check_value("FN-41").value() - 1.0 < 2.6e-3);
    CHECK(check_value("FN-40").value() - 1.0 < 3.1e-4);
}
