#include "correlations/air.hpp"
#include "correlations/atmosphere.hpp"
#include "correlations/registry.hpp"

namespace finwright::correlations {

using In = std::span<const double>;

std::vector<Passport> air_passports() {
    const Symbol temperature{"T", "K", "temperature", 200.0, 600.0};
    return {
        {"air_viscosity",
         "viscosity of dry air, dilute gas (Lemmon & Jacobsen)",
         "lemmon2004",
         "mu = 0.0266958 sqrt(28.9586 T)/(0.36^2 Omega) uPa s, Omega = exp(sum b_i ln(T/103.3)^i)",
         {"mu", "Pa s", "dynamic viscosity"},
         {temperature},
         "the formula is continued",
         "1 %; residual terms at one atmosphere below 0.3 %",
         false,
         [](In x) { return air_viscosity(x[0]); }},
        {"air_conductivity",
         "thermal conductivity of dry air, dilute gas (Lemmon & Jacobsen)",
         "lemmon2004",
         "k = 1.308 mu + 1.405 (132.6312/T)^-1.1 - 1.036 (132.6312/T)^-0.3 mW/(m K), mu in uPa s",
         {"k", "W/(m K)", "thermal conductivity"},
         {temperature},
         "the formula is continued",
         "2 %; residual terms at one atmosphere below 0.3 %",
         false,
         [](In x) { return air_conductivity(x[0]); }},
        {"air_specific_heat",
         "specific heat of dry air (Irvine & Liley)",
         "irvine1984",
         "cp = 1.03409 - 0.284887e-3 T + 0.7816818e-6 T^2 - 0.4970786e-9 T^3 + 0.1077024e-12 T^4 "
         "kJ/(kg K)",
         {"cp", "J/(kg K)", "specific heat at constant pressure"},
         {{"T", "K", "temperature", 250.0, 1050.0}},
         "the formula is continued",
         "0.25 % against the reference equation of state",
         false,
         [](In x) { return air_specific_heat(x[0]); }},
        {"air_density",
         "density of dry air as a perfect gas (ISO 2533)",
         "iso2533",
         "rho = p/(287.05287 T)",
         {"rho", "kg/m3", "density"},
         {temperature, {"p", "Pa", "pressure", 1e3, 2e5}},
         "the formula is continued",
         "0.1 % near one atmosphere; humidity ignored, below 3 % at 40 degC saturated",
         false,
         [](In x) { return air_density(x[0], x[1]); }},
        {"atmosphere_pressure",
         "pressure at an altitude in the standard atmosphere (ISO 2533)",
         "iso2533",
         "p = 101325 ((288.15 - 0.0065 H)/288.15)^5.25588",
         {"p", "Pa", "static pressure"},
         {{"H", "m", "geopotential altitude", -2000.0, 11000.0}},
         "refused by the job reader",
         "weather moves the pressure by some 3 %",
         false,
         [](In x) { return pressure_at_altitude(x[0]); }},
    };
}

} // namespace finwright::correlations
