// Forced flow: Shah & London limits, other libraries' documented values (LB rows), Kays & London's
// anchor, and this project's reference ducts.
#include "correlations/forced_channel.hpp"
#include "tests/near.hpp"
#include "tests/reference_rows.hpp"

using namespace finwright::correlations;
using finwright::tests::check_value;
using finwright::tests::near;
using finwright::tests::number;
using finwright::tests::rows_of;

TEST_CASE("developed ducts: square and slit (Shah & London 1978; LB-11)") {
    CHECK(duct_nusselt_developed_flux(1.0) == near(check_value("LB-11").value(), 1e-5));
    CHECK(duct_nusselt_developed(1.0) ==
          near(2.976, 2e-3)); // Shah & London 1978, table 42, from memory
    CHECK(duct_nusselt_developed(0.0) == near(7.541, 1e-9));
    CHECK(fre_rectangular(1.0) == near(14.227, 1e-3)); // Shah & London 1978, table 42, from memory
    CHECK(fre_rectangular(0.0) == near(24.0, 1e-12));
}

TEST_CASE("turbulent: LB-16 (Gnielinski 1976 with a stated friction factor), LB-19 (flat plate)") {
    CHECK(gnielinski_developed(1e5, 1.2, 0.0185) == near(check_value("LB-16").value(), 1e-9));
    CHECK(nusselt_flat_plate(1e5, 0.7) == near(check_value("LB-19").value(), 1e-4));
}

TEST_CASE("the developing gap tends to the developed slit and to the flat plate") {
    CHECK(nusselt_developing_gap(1e-3, 0.71) == near(7.541, 1e-4));
    // Very short: the flat plate's 0.664 Re^0.5 Pr^(1/3) on Dh; the published law lies within 5 %
    // of it at Pr 0.71.
    const double re = 1000.0, dh_over_l = 1e4;
    const double plate = 0.664 * std::sqrt(re * dh_over_l) * std::cbrt(0.71);
    CHECK(nusselt_developing_gap(re * 0.71 * dh_over_l, 0.71) == near(plate, 0.12));
}

TEST_CASE("plates on inlet air: the two laws agree within 8 % over their range") {
    for (double re_star : {1.0, 5.0, 20.0, 80.0}) {
        // Re* = (V S/nu)(S/L); on Dh = 2 S: Re Dh/L = 4 Re*.
        const double log_mean = 0.5 * nusselt_developing_gap(4.0 * re_star * 0.71, 0.71);
        CHECK(inlet_based_from_log_mean(log_mean, re_star, 0.71) ==
              near(nusselt_inlet_plates(re_star, 0.71), 0.08));
    }
}

TEST_CASE("the combined-entry duct tends to the developed duct within its stated 12 %") {
    for (double aspect : {0.05, 0.1, 0.25, 0.5, 1.0})
        CHECK(nusselt_rectangular_duct(500.0, 0.71, aspect, 1e5) ==
              near(duct_nusselt_developed(aspect), 0.12));
}

TEST_CASE("apparent friction: developed limits, and the two laws agree within 8 %") {
    CHECK(fapp_re_plates(100.0) == near(24.0, 2e-3));
    CHECK(fapp_re_duct(100.0, 24.0) == near(24.0, 1e-3));
    for (double x_plus : {1e-3, 1e-2, 1e-1})
        CHECK(fapp_re_duct(x_plus, 24.0) == near(fapp_re_plates(x_plus), 0.08));
}

TEST_CASE("contraction and losses: table values, limits, and Kays & London's Ke 0.3542 at sigma "
          "0.4, Re 4000") {
    CHECK(contraction_coefficient(0.0) == near(0.611, 1e-12));
    CHECK(contraction_coefficient(0.4) == near(0.631, 1e-12));
    CHECK(contraction_coefficient(1.0) == near(1.0, 1e-12));
    for (double s = 0.0; s < 1.0; s += 0.01)
        CHECK(contraction_coefficient(s + 0.01) >= contraction_coefficient(s));
    CHECK(entry_loss(1.0) == near(0.0, 1e-12));
    CHECK(entry_loss_developed(1.0, 1.2) ==
          near(0.4, 1e-12)); // Kays & London 1984: 2 Kd - 2 at sigma 1
    CHECK(exit_loss(0.0, 1.2) == near(1.0, 1e-12));
    CHECK(exit_loss(0.4, momentum_factor(4000.0)) == near(0.3542, 0.02));
}

TEST_CASE(
    "reference ducts of this project without clearance: heat within 8 %, pressure within 12 %") {
    int cases = 0;
    for (const auto& row : rows_of("forced_cfd.csv")) {
        if (number(row, "clearance_mm") > 0.0) continue;
        ++cases;
        const double s = number(row, "S_mm") / 1e3, h = number(row, "H_mm") / 1e3,
                     l = number(row, "L_mm") / 1e3;
        const double v = number(row, "V_approach_m_s"), nu = number(row, "nu_m2_s"),
                     k = number(row, "k_W_mK");
        const double rho = number(row, "rho_kg_m3"), alpha = number(row, "alpha_m2_s"),
                     pr = number(row, "Pr");
        const double dh = 2.0 * s * h / (s + h), aspect = s / h, re = v * dh / nu;
        const double wetted = (2.0 * h + s) * l;
        const double capacity = rho * v * s * h * k / (rho * alpha); // m cp
        const double film = nusselt_duct_all_regimes(re, pr, aspect, l / dh) * k / dh;
        const double on_inlet = -capacity * std::expm1(-film * wetted / capacity) / wetted;
        CHECK(on_inlet == near(number(row, "h_on_inlet_air_W_m2K"), 0.08));
        // Walls of no thickness: sigma 1; the profile gives 2 (Kd - 1) heads back behind the fins.
        const double head = 0.5 * rho * v * v;
        const double drop = head * (4.0 * fapp_all_regimes(re, aspect, l / dh) * l / dh +
                                    exit_loss(1.0, momentum_factor(re)));
        CHECK(drop == near(number(row, "dp_static_inlet_to_outlet_Pa"), 0.12));
    }
    CHECK(cases == 3);
}

// Bejan & Sciubba 1992, recomputed exactly: at fixed pressure drop the best spacing of thin plates
// is D/L = 3.035 Be^-0.25 and carries q = 0.477 (rho dp/Pr)^0.5 cp dT per frontal area, Pr 0.72.
TEST_CASE("best spacing at fixed pressure drop agrees with Bejan & Sciubba 1992 within the laws' "
          "errors") {
    const double pr = 0.72, nu = 1.6e-5, rho = 1.15, cp = 1007.0, l = 0.1, dp = 10.0;
    const double alpha = nu / pr, mu = nu * rho;
    const double be = dp * l * l / (mu * alpha);
    const auto velocity = [&](double s) {
        double v = 1.0; // fixed point on dp = rho v^2/2 4 f L/(2S)
        for (int i = 0; i < 200; ++i) {
            const double re = v * 2.0 * s / nu;
            const double f = fapp_re_plates(l / (2.0 * s * re)) / re;
            v = 0.5 * (v + std::sqrt(dp / (0.5 * rho * 4.0 * f * l / (2.0 * s))));
        }
        return v;
    };
    double best = 0.0, best_gap = 0.0;
    for (double s = 0.5e-3; s < 10e-3; s *= 1.002) {
        const double v = velocity(s);
        const double re_star = v * s / nu * s / l;
        const double share = 2.0 * nusselt_inlet_plates(re_star, pr) / (re_star * pr); // of m cp dT
        const double q = v * std::min(share, 1.0);
        if (q > best) {
            best = q;
            best_gap = s;
        }
    }
    CHECK(best_gap / l * std::pow(be, 0.25) == near(3.035, 0.06));
    CHECK(best * rho * cp / (std::sqrt(rho * dp / pr) * cp) == near(0.477, 0.06));
}
