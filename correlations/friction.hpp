#pragma once
// Pressure loss of channels. Every f here is the FANNING friction factor, wall shear over rho
// V^2/2, a quarter of Darcy's; Reynolds numbers on the hydraulic diameter Dh = 4 area/perimeter.

#include "correlations/numbers/dual.hpp"
#include <algorithm>
#include <array>
#include <cmath>

namespace finwright::correlations {

/// Fully developed laminar f Re of a rectangular duct [-], aspect = short/long side, 0..1.
/// Shah & London 1978, eq. 341: 24(1 - 1.3553a + 1.9467a^2 - 1.7012a^3 + 0.9564a^4 - 0.2537a^5);
/// 0.05 %.
template <class T>
T fre_rectangular(const T& aspect) {
    const T& a = aspect;
    return 24.0 * (1.0 + a * (-1.3553 + a * (1.9467 + a * (-1.7012 + a * (0.9564 - 0.2537 * a)))));
}

/// Apparent f Re between parallel plates, hydrodynamically developing [-]; x+ = L/(Dh Re), Dh = 2
/// S. Shah & London 1978: 3.44/x+^0.5 + (24 + 0.674/(4x+) - 3.44/x+^0.5)/(1 + 2.9e-5 x+^-2).
/// Coefficients from memory; numerical solutions agree within 2 %.
template <class T>
T fapp_re_plates(const T& x_plus) {
    using std::sqrt;
    const T entry = 3.44 / sqrt(x_plus);
    return entry + (24.0 + 0.674 / (4.0 * x_plus) - entry) / (1.0 + 2.9e-5 / (x_plus * x_plus));
}

/// Apparent f Re of a developing duct of any shape [-]; x+ = L/(Dh Re), fre = its developed value
/// on the same length. Muzychka & Yovanovich 2009: sqrt((3.44/x+^0.5)^2 + fre^2); +1..+6 %.
template <class T>
T fapp_re_duct(const T& x_plus, const T& fre) {
    using std::sqrt;
    return sqrt(3.44 * 3.44 / x_plus + fre * fre);
}

/// Darcy friction factor of a smooth tube, turbulent [-]. Petukhov 1970: (0.79 ln Re - 1.64)^-2;
/// 3e3..5e6.
template <class T>
T petukhov_darcy(const T& re) {
    using std::log;
    const T root = 0.79 * log(re) - 1.64;
    return 1.0 / (root * root);
}

/// Share of turbulence [-]: 0 below Re 2300, 1 above 4000, linear between (Gnielinski 2013).
template <class T>
T turbulent_share(const T& re) {
    return clamp(T((re - 2300.0) / 1700.0), 0.0, 1.0);
}

/// Apparent Fanning f of a rectangular duct in any regime [-]: Muzychka & Yovanovich 2009 up to Re
/// 2300, Petukhov 1970 from 4000, joined linearly in Re between the two ends; continuous, with
/// kinks at the ends.
template <class T>
T fapp_all_regimes(const T& re, const T& aspect, const T& length_over_dh) {
    using std::max, std::min;
    const T laminar_re = min(re, T(2300.0));
    const T turbulent_re = max(re, T(4000.0));
    const T laminar =
        fapp_re_duct(T(length_over_dh / laminar_re), fre_rectangular(aspect)) / laminar_re;
    const T share = turbulent_share(re);
    return (1.0 - share) * laminar + share * 0.25 * petukhov_darcy(turbulent_re);
}

/// Jet contraction at a sharp entry [-], sigma = free/frontal area. Monotone cubic through the
/// table .611 .612 .616 .622 .631 .644 .662 .687 .722 .781 1 at sigma 0, .1 .. 1 (from memory; it
/// reproduces the limits of Kays & London 1984).
template <class T>
T contraction_coefficient(const T& sigma);

/// Pressure lost at a sharp entry over channel dynamic pressure, when the friction factor already
/// holds the growth of the velocity profile [-]: (1/Cc - 1)^2. Kays 1950 with a flat profile.
template <class T>
T entry_loss(const T& sigma) {
    const T excess = 1.0 / contraction_coefficient(sigma) - 1.0;
    return excess * excess;
}

/// As above with a developed friction factor, so that the profile's growth counts here [-]:
/// 1/Cc^2 - 2/Cc + 2 Kd - 1. Kays 1950.
template <class T>
T entry_loss_developed(const T& sigma, const T& momentum) {
    const T inverse = 1.0 / contraction_coefficient(sigma);
    return inverse * inverse - 2.0 * inverse + 2.0 * momentum - 1.0;
}

/// Pressure lost at a sudden exit over channel dynamic pressure [-]: 1 - 2 Kd sigma + sigma^2;
/// negative where the jet recovers pressure. Kays 1950. `momentum` Kd is the profile's momentum
/// factor at the exit.
template <class T>
T exit_loss(const T& sigma, const T& momentum) {
    return 1.0 - 2.0 * momentum * sigma + sigma * sigma;
}

/// Momentum factor Kd of the profile at a channel's exit [-]: 1.2 developed laminar between plates,
/// taken as 1 turbulent, joined as the friction factor is.
template <class T>
T momentum_factor(const T& re) {
    return 1.2 - 0.2 * turbulent_share(re);
}

} // namespace finwright::correlations
