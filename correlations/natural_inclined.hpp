#pragma once
// Natural convection on arrays and faces that do not stand upright. Where no published law is at
// hand the formula is this project's estimate, and its passport says so.
//
// The tilt of a base is measured from vertical: 0 upright, +90 deg fins up, -90 deg fins down.
// Along a tilted face or channel gravity acts with g cos(tilt), away from it with g sin(tilt); each
// has its own law, and the greater wins, joined smoothly (power 8: at most 9 % above either, where
// both are equal).

#include "correlations/natural_face.hpp"
#include "correlations/numbers/smooth.hpp"
#include <algorithm>
#include <cmath>

namespace finwright::correlations {

/// Fins up on a horizontal base, mean on all wetted area, on the gap [-]. Jones & Smith 1970 (from
/// memory, two forms agree to 3 %): Nu = 6.7e-4 Ra (1 - exp(-(7460/Ra)^0.44))^1.7, Ra = g beta dT
/// S^3/(nu alpha); about +-25 %; holds for lengths near 0.25 m.
template <class T>
T nusselt_horizontal_array(const T& ra) {
    using std::exp, std::expm1, std::log;
    const T open = -expm1(-exp(0.44 * log(7460.0 / ra)));
    return 6.7e-4 * ra * exp(1.7 * log(open));
}

/// How much better shorter arrays breathe, through their ends [-]: the greater of 1 and
/// (0.254 m/L)^0.475, L not below 0.09 m. This project's fit to three reference solutions (array
/// lengths 100, 150 and 254 mm: within 10 %); beyond 0.254 m the published law stands as it is, and
/// below what was solved the gain no longer grows.
template <class T>
T horizontal_length_factor(const T& length) {
    using std::exp, std::log;
    const T gain = exp(0.475 * log(0.254 / greater_of(length, T(0.09))));
    return greater_of(gain, T(1.0));
}

/// Fins down, over fins up [-]: what plates of the textbook have, 0.27/0.54. An estimate.
inline constexpr double facing_down_share = 0.5;

/// Fins level on an upright base: the channels are blocked, and air only stirs in their mouths.
/// Share of the wetted area (two fin faces of height H, base strip S) that works with the film of a
/// plate over the whole width [-]: (S + 2 S(1 - exp(-H/S)))/(S + 2 H). An estimate: shallow ribs
/// keep all of their area, deep ones count as one gap deep.
template <class T>
T level_fins_share(const T& gap, const T& height) {
    using std::expm1;
    return (gap - 2.0 * gap * expm1(-height / gap)) / (gap + 2.0 * height);
}

/// A single hot face at a tilt (+90 deg faces up), as film coefficient over conductivity [1/m].
/// `grashof_unit` is g beta dT/(nu alpha) [1/m3], `rise` the face's extent along the slope and
/// `across` its other side [m]. Vertical law with g cos(tilt), facing-up or -down law with g
/// sin(tilt), as Raithby & Hollands 1998 advise: the greater of the two.
template <class T>
T inclined_face(const T& grashof_unit, const T& prandtl, const T& rise, const T& across,
                double tilt) {
    using std::abs;
    const double along = std::max(0.0, std::cos(tilt)), away = std::abs(std::sin(tilt));
    const T upright =
        nusselt_vertical_laminar(T(along * grashof_unit * rise * rise * rise), prandtl) / rise;
    if (away == 0.0) return upright;
    const T size = rise * across / (2.0 * (rise + across));
    const T ra = away * grashof_unit * size * size * size;
    const T flat =
        (tilt > 0.0 ? nusselt_facing_up(ra, prandtl) : nusselt_facing_down(ra, prandtl)) / size;
    return greater_of(upright, flat);
}

/// Laminar plane plume above a line source, rise of its middle over the air [K]: N x^(-3/5), N^5 =
/// q^4/(64 g beta rho^2 mu^2 cp^4 I^4), q heat per length [W/m], x height [m], I = 1.245 at Pr 0.7.
/// Gebhart, Pera & Schorr 1970 (from memory).
template <class T>
T plume_rise(const T& heat_per_length, const T& height, double expansion, double density,
             double viscosity, double specific_heat) {
    using std::exp, std::log;
    constexpr double gravity = 9.80665, integral = 1.245;
    const double flow = density * viscosity * specific_heat * specific_heat * integral * integral;
    return exp(0.2 * log(heat_per_length * heat_per_length * heat_per_length * heat_per_length /
                         (64.0 * gravity * expansion * flow * flow)) -
               0.6 * log(height));
}

/// Mean velocity that a drift at speed u drives through a channel open at both ends [m/s]: its
/// dynamic head against developed laminar friction and the velocity profile's own head,
/// rho u^2/2 = 0.75 rho v^2 + 12 mu L v/S^2. An estimate.
template <class T>
T drift_in_channel(double drift, const T& kinematic_viscosity, const T& gap, const T& length) {
    using std::sqrt;
    const T friction = 12.0 * kinematic_viscosity * length / (gap * gap);
    return 2.0 * 0.5 * drift * drift / (friction + sqrt(friction * friction + 1.5 * drift * drift));
}

/// Forced flow against natural [-]: the textbook's |f^3 - n^3|^(1/3), kept from vanishing where the
/// two are equal: ((f^3 - n^3)^2 + 0.09 f^3 n^3)^(1/6). The floor, two thirds of either, is an
/// estimate.
template <class T>
T mixed_against(const T& forced, const T& natural) {
    using std::cbrt, std::sqrt;
    const T f = forced * forced * forced, n = natural * natural * natural;
    return cbrt(sqrt((f - n) * (f - n) + 0.09 * f * n));
}

} // namespace finwright::correlations
