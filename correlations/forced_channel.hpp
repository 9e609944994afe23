#pragma once
// Forced convection in channels. Nu on Dh and on the log-mean temperature difference unless said
// otherwise: then Q = m cp (Ts - Tin)(1 - exp(-NTU)). A law on INLET air already holds the air's
// heating and takes no NTU step.

#include "correlations/friction.hpp"
#include <algorithm>
#include <cmath>
#include <numbers>

namespace finwright::correlations {

/// Plates on INLET air, Nu = h S/k [-]; Re* = (V S/nu)(S/L). Teertstra, Yovanovich & Culham 2000:
/// {(Re* Pr/2)^-3 + [0.664 Re*^0.5 Pr^(1/3) (1 + 3.65/Re*^0.5)^0.5]^-3}^(-1/3). Coefficients from
/// memory; numerical solutions agree within 4 %.
template <class T>
T nusselt_inlet_plates(const T& re_star, const T& pr) {
    using std::cbrt, std::sqrt;
    const T root = sqrt(re_star);
    const T developed = 0.5 * re_star * pr;
    const T boundary = 0.664 * root * cbrt(pr) * sqrt(1.0 + 3.65 / root);
    const T a = 1.0 / (developed * developed * developed);
    const T b = 1.0 / (boundary * boundary * boundary);
    return 1.0 / cbrt(a + b);
}

/// From log mean to inlet air between plates, both on S [-]: half the capacity limit Re* Pr/2 as
/// ceiling.
template <class T>
T inlet_based_from_log_mean(const T& nu_log_mean, const T& re_star, const T& pr) {
    using std::expm1;
    const T capacity = 0.5 * re_star * pr;
    return -capacity * expm1(-nu_log_mean / capacity);
}

/// Parallel gap, profiles of velocity and temperature developing together, mean, Dh = 2 S [-];
/// G = Re Pr Dh/L. VDI Heat Atlas 2010, ch. G2: (7.541^3 + (1.841 G^(1/3))^3 + ((2/(1+22Pr))^(1/6)
/// G^0.5)^3)^(1/3).
template <class T>
T nusselt_developing_gap(const T& graetz, const T& pr) {
    using std::cbrt, std::sqrt;
    const T a = 1.841 * cbrt(graetz);
    const T b = sqrt(cbrt(2.0 / (1.0 + 22.0 * pr))) * sqrt(graetz);
    return cbrt(7.541 * 7.541 * 7.541 + a * a * a + b * b * b);
}

/// Fully developed rectangular duct, all four walls at one temperature [-]; aspect = short/long
/// side. Shah & London 1978, eq. 347: 7.541(1 - 2.610a + 4.970a^2 - 5.119a^3 + 2.702a^4 -
/// 0.548a^5).
template <class T>
T duct_nusselt_developed(const T& aspect) {
    const T& a = aspect;
    return 7.541 * (1.0 + a * (-2.610 + a * (4.970 + a * (-5.119 + a * (2.702 - 0.548 * a)))));
}

/// The same with uniform flux along and uniform temperature around (H1) [-].
/// Shah & London 1978, eq. 346: 8.235(1 - 2.0421a + 3.0853a^2 - 2.4765a^3 + 1.0578a^4 - 0.1861a^5).
template <class T>
T duct_nusselt_developed_flux(const T& aspect) {
    const T& a = aspect;
    return 8.235 * (1.0 + a * (-2.0421 + a * (3.0853 + a * (-2.4765 + a * (1.0578 - 0.1861 * a)))));
}

/// Rectangular duct at uniform wall temperature, mean over its length, both profiles developing
/// [-]. Muzychka & Yovanovich 2004, eqs. 40-42, on sqrt(area), here turned to Dh: Nu = {[2
/// f(Pr)/z^0.5]^m + [(1.5 x 0.409 (fRe/z)^(1/3))^5 + (3.24 fRe/(8 pi^0.5 e^0.1))^5]^(m/5)}^(1/m),
/// z = L/(sqrtA Re Pr), fRe = 12/{e^0.5 (1+e)[1 - 192 e/pi^5 tanh(pi/(2e))]},
/// f(Pr) = 0.564/[1 + (1.664 Pr^(1/6))^(9/2)]^(2/9), m = 2.27 + 1.65 Pr^(1/3); e = aspect.
/// 1.664 from memory (a secondary text prints 1.644). Within 12 % of the data in the paper.
template <class T>
T nusselt_rectangular_duct(const T& re, const T& pr, const T& aspect, const T& length_over_dh) {
    using std::cbrt, std::exp, std::log, std::sqrt, std::tanh;
    constexpr double pi = std::numbers::pi;
    constexpr double pi5 = pi * pi * pi * pi * pi;
    const T dh_over_root_area = 2.0 * sqrt(aspect) / (1.0 + aspect);
    const T z = length_over_dh * dh_over_root_area * dh_over_root_area / (re * pr);
    const T fre = 12.0 / (sqrt(aspect) * (1.0 + aspect) *
                          (1.0 - 192.0 / pi5 * aspect * tanh(0.5 * pi / aspect)));
    const T pr_third = cbrt(pr);
    const T profile = 0.564 * exp((-2.0 / 9.0) * log(1.0 + exp(4.5 * log(1.664 * sqrt(pr_third)))));
    const T m = 2.27 + 1.65 * pr_third;
    const T entry = 2.0 * profile / sqrt(z);
    const T thermal = 1.5 * 0.409 * cbrt(fre / z);
    const T developed = 3.24 * fre / (8.0 * std::sqrt(pi)) * exp(-0.1 * log(aspect));
    const T t2 = thermal * thermal, d2 = developed * developed;
    const T long_duct = log(t2 * t2 * thermal + d2 * d2 * developed) / 5.0;
    return dh_over_root_area * exp(log(exp(m * log(entry)) + exp(m * long_duct)) / m);
}

/// Turbulent developed flow in a duct for a given Darcy friction factor f [-]. Gnielinski 1976:
/// Nu = (f/8)(Re - 1000) Pr/(1 + 12.7 (f/8)^0.5 (Pr^(2/3) - 1)); Re 2300..1e6, 10 %.
template <class T>
T gnielinski_developed(const T& re, const T& pr, const T& darcy) {
    using std::cbrt, std::sqrt;
    const T eighth = darcy / 8.0;
    const T pr_third = cbrt(pr);
    return eighth * (re - 1000.0) * pr / (1.0 + 12.7 * sqrt(eighth) * (pr_third * pr_third - 1.0));
}

/// The same for a smooth duct (Petukhov's f) with its entry, factor 1 + (Dh/L)^(2/3) [-].
/// Gnielinski 1976.
template <class T>
T gnielinski(const T& re, const T& pr, const T& dh_over_length) {
    using std::cbrt;
    const T entry = cbrt(dh_over_length);
    return gnielinski_developed(re, pr, petukhov_darcy(re)) * (1.0 + entry * entry);
}

/// Rectangular duct in any regime, mean [-]: Muzychka & Yovanovich 2004 up to Re 2300, Gnielinski
/// 1976 from 4000, between them linear in Re from the one's value at 2300 to the other's at 4000
/// (Gnielinski 2013). Continuous, with kinks at both ends.
template <class T>
T nusselt_duct_all_regimes(const T& re, const T& pr, const T& aspect, const T& length_over_dh) {
    using std::max, std::min;
    const T laminar = nusselt_rectangular_duct(T(min(re, T(2300.0))), pr, aspect, length_over_dh);
    const T turbulent = gnielinski(T(max(re, T(4000.0))), pr, T(1.0 / length_over_dh));
    const T share = turbulent_share(re);
    return (1.0 - share) * laminar + share * turbulent;
}

/// Flat plate, laminar boundary layer, mean on its length [-]: 0.664 Re^0.5 Pr^(1/3); Re to 5e5, Pr
/// above 0.6. Pohlhausen 1921.
template <class T>
T nusselt_flat_plate(const T& re, const T& pr) {
    using std::cbrt, std::sqrt;
    return 0.664 * sqrt(re) * cbrt(pr);
}

} // namespace finwright::correlations
