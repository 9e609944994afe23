#pragma once
// The standard atmosphere, for the pressure at an altitude. Air temperature stays the user's input.

#include <cmath>

namespace finwright::correlations {

/// Pressure [Pa] at a geopotential altitude in m, -2000..11000. ISO 2533:1975, troposphere:
/// T = 288.15 - 0.0065 H, p = 101325 (T/288.15)^5.25588.
template <class T>
T pressure_at_altitude(const T& metres) {
    using std::pow;
    return 101325.0 * pow((288.15 - 0.0065 * metres) / 288.15, 5.25588);
}

} // namespace finwright::correlations
