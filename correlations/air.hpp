#pragma once
// Dry air as a dilute gas. Residual terms are left out: below 0.3 % at one atmosphere. Humidity is
// ignored: below 2 % on a film coefficient up to 50 degC.

#include <cmath>

namespace finwright::correlations {

/// Dynamic viscosity of air [Pa s]. Lemmon & Jacobsen 2004, dilute-gas part; temperature in K,
/// 200..600. mu0 = 0.0266958 sqrt(M T)/(sigma^2 Omega), Omega = exp(sum b_i ln(T/103.3)^i),
/// M 28.9586, sigma 0.36 nm.
template <class T>
T air_viscosity(const T& temperature) {
    using std::exp, std::log, std::sqrt;
    constexpr double molar_mass = 28.9586, sigma = 0.36;
    const T lt = log(temperature / 103.3);
    const T collision =
        exp(0.431 + lt * (-0.4623 + lt * (0.08406 + lt * (0.005341 - 0.00331 * lt))));
    return 0.0266958e-6 / (sigma * sigma) * sqrt(molar_mass * temperature) / collision;
}

/// Thermal conductivity of air [W/(m K)]. Lemmon & Jacobsen 2004, dilute-gas part; K, 200..600.
/// k0 = 1.308 mu0 + 1.405 tau^-1.1 - 1.036 tau^-0.3 in mW/(m K) with mu0 in uPa s, tau =
/// 132.6312/T.
template <class T>
T air_conductivity(const T& temperature) {
    using std::exp, std::log;
    const T lt = log(temperature / 132.6312);
    return 1e-3 *
           (1.308e6 * air_viscosity(temperature) + 1.405 * exp(1.1 * lt) - 1.036 * exp(0.3 * lt));
}

/// Specific heat of air at constant pressure [J/(kg K)]; K, 250..1000. Polynomial of Irvine & Liley
/// 1984.
template <class T>
T air_specific_heat(const T& temperature) {
    const T& t = temperature;
    return 1e3 * (1.03409 + t * (-0.284887e-3 +
                                 t * (0.7816818e-6 + t * (-0.4970786e-9 + 0.1077024e-12 * t))));
}

/// Density of air as a perfect gas [kg/m3]. ISO 2533: R = 287.05287 J/(kg K).
template <class T>
T air_density(const T& temperature, double pressure) {
    return pressure / (287.05287 * temperature);
}

template <class T>
struct Air {
    T density;       ///< [kg/m3]
    T viscosity;     ///< dynamic [Pa s]
    T conductivity;  ///< [W/(m K)]
    T specific_heat; ///< [J/(kg K)]
    T expansion;     ///< 1/T, perfect gas [1/K]

    T kinematic_viscosity() const { return viscosity / density; }              ///< [m2/s]
    T diffusivity() const { return conductivity / (density * specific_heat); } ///< [m2/s]
    T prandtl() const { return viscosity * specific_heat / conductivity; }     ///< [-]
};

/// All of them at once: temperature in K, pressure in Pa.
template <class T>
Air<T> air_at(const T& temperature, double pressure) {
    using std::exp, std::log;
    Air<T> air;
    air.density = air_density(temperature, pressure);
    air.viscosity = air_viscosity(temperature);
    const T lt = log(temperature / 132.6312); // air_conductivity with the viscosity at hand
    air.conductivity =
        1e-3 * (1.308e6 * air.viscosity + 1.405 * exp(1.1 * lt) - 1.036 * exp(0.3 * lt));
    air.specific_heat = air_specific_heat(temperature);
    air.expansion = 1.0 / temperature;
    return air;
}

} // namespace finwright::correlations
