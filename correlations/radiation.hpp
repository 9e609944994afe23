#pragma once
// Grey diffuse radiation from surfaces and from the channels between fins.

#include "correlations/view_factor.hpp"

namespace finwright::correlations {

inline constexpr double stefan_boltzmann = 5.670374419e-8; ///< SI, exact constants [W/(m2 K4)]

/// Radiated flux difference of black surfaces [W/m2]: sigma (Ts^4 - Te^4); K. Stefan-Boltzmann law.
template <class T>
T radiated(const T& surface, const T& surroundings) {
    const T s2 = surface * surface, e2 = surroundings * surroundings;
    return stefan_boltzmann * (s2 - e2) * (s2 + e2);
}

/// Radiation as a film coefficient on Ts - Te [W/(m2 K)]: eps sigma (Ts + Te)(Ts^2 + Te^2); K.
template <class T>
T radiation_coefficient(double emissivity, const T& surface, const T& surroundings) {
    return emissivity * stefan_boltzmann * (surface + surroundings) *
           (surface * surface + surroundings * surroundings);
}

/// What a U-shaped channel's walls see of the surroundings through its front and its two ends,
/// A_s F_s,env [m2]: S L (1 - 2 F_te) + 2 S H (1 - F_ee) - 2 S L F_te, F_te from the front opening
/// to an end, F_ee from end to end. Exact for black or isothermal one-zone walls (Incropera 2007,
/// table 13.2 factors).
template <class T>
T channel_opening(const T& gap, const T& height, const T& length) {
    const T front_to_end = perpendicular_rectangles(height, length, gap);
    const T end_to_end = aligned_rectangles(gap, height, length);
    return gap * length * (1.0 - 4.0 * front_to_end) + 2.0 * gap * height * (1.0 - end_to_end);
}

/// Radiation conductance of a grey one-zone channel [m2]: heat = this times sigma (Ts^4 - Te^4).
/// 1/[(1 - eps)/(eps A_s) + 1/(A_s F_s,env)]. High where walls are bare and deep: in usual channels
/// 3 % at eps 0.8, 6 to 14 % at 0.1; 70 % at H/S 25 and eps 0.03 (see channel_radiation_zoned).
template <class T>
T channel_radiation_conductance(double emissivity, const T& wetted_area, const T& opening) {
    return 1.0 / ((1.0 - emissivity) / (emissivity * wetted_area) + 1.0 / opening);
}

} // namespace finwright::correlations
