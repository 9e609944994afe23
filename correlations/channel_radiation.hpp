#pragma once
// The grey channel between two fins, where walls near the openings are dimmer than walls deep
// inside.

#include "correlations/radiation.hpp"
#include <cmath>
#include <numbers>

namespace finwright::correlations {

/// Coefficients of channel_radiation_zoned, fitted by this project to 960 zoned solutions
/// (tests/data/reference/channel_radiation.csv) by least squares of the logarithm; tests/validation
/// fits them again.
struct ChannelRadiationFit {
    double depth = 7.5091;    ///< k: closedness w at half the deep channel's loss ...
    double rise = 1.3811;     ///< n: ... and the exponent of that rise
    double corner = 4.0601;   ///< d: closedness added where front and ends are seen alike
    double trapped = 0.4369;  ///< c: m is the emissivity below which depth limits the loss
    double exponent = 0.6246; ///< p: of the loss's growth as walls get barer
};

/// Radiation conductance of a grey channel at one wall temperature, zoned [m2]: heat = this times
/// sigma (Ts^4 - Te^4). Two equal fins, gap S, height H, length L, and the base between them; open
/// in front and at both ends. One zone takes the radiosity as uniform and comes out high when
/// walls are bare and deep; here its opening G (channel_opening) is divided by 1 + (1 - eps) Y:
///   Y = v ((eps + m)/(1 + m))^-p, v = (1 - pi/4)/(1 + x), m = c x, x = (k/w)^n,
///   w = (A/G - 1)(1 + d t (1 - t)), t = 2 H/(L + 2 H), A = (2 H + S) L.
/// Limits kept: eps = 1 gives G exactly (black walls of one temperature need no zones); shallow
/// channels the one-zone law; deep, nearly black ones Y = 1 - pi/4, which is A/G times the mean
/// square of the view (1 - z/sqrt(S^2 + z^2))/2 that walls have of an endless slot's mouth. Fitted
/// over H/S 0.2 to 25, L/H 0.5 to 40, eps 0.03 to 0.98; error in the passport.
template <class T>
T channel_radiation_zoned(double emissivity, const T& gap, const T& height, const T& length,
                          const ChannelRadiationFit& fit = {}) {
    using std::pow;
    const T opening = channel_opening(gap, height, length);
    const T wetted = (2.0 * height + gap) * length;
    const T ends = 2.0 * height / (length + 2.0 * height);
    const T closed = (wetted / opening - 1.0) * (1.0 + fit.corner * ends * (1.0 - ends));
    const T deep = pow(closed / fit.depth, fit.rise); // 1/x: stays finite in shallow channels
    const T trapped = (emissivity * deep + fit.trapped) / (deep + fit.trapped);
    const T loss =
        (1.0 - 0.25 * std::numbers::pi) * deep / (1.0 + deep) * pow(trapped, -fit.exponent);
    return channel_radiation_conductance(emissivity, wetted,
                                         opening / (1.0 + (1.0 - emissivity) * loss));
}

} // namespace finwright::correlations
