#pragma once
// Resistances between a part and its sink. 1 degC in2/W = 6.4516e-4 m2 K/W (25.4 mm squared).

namespace finwright::correlations {

inline constexpr double square_inch = 6.4516e-4; ///< exact [m2]

/// Resistance of a layer times its area [m2 K/W]: thickness/k + both contacts.
template <class T>
T layer_area_resistance(const T& thickness, const T& conductivity, const T& contacts) {
    return thickness / conductivity + contacts;
}

/// Resistance over an area [K/W].
template <class T>
T resistance_over_area(const T& area_resistance, const T& area) {
    return area_resistance / area;
}

/// Junction-to-case resistance behind a rating at 25 degC case temperature [K/W]: (Tj,max -
/// 298.15)/P. Common practice in data sheets, no source. Temperature in K.
template <class T>
T rated_junction_to_case(const T& junction_limit, const T& rated_power) {
    return (junction_limit - 298.15) / rated_power;
}

} // namespace finwright::correlations
