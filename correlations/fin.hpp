#pragma once
// Conduction along fins.

#include "correlations/numbers/dual.hpp"
#include <cmath>

namespace finwright::correlations {

/// Efficiency of a straight fin of constant thickness, adiabatic tip [-]: tanh(mH)/(mH). Harper &
/// Brown 1922. 1-D error 0.25 % at h t/(2k) = 0.01.
template <class T>
T fin_efficiency(const T& mh) {
    using std::tanh;
    return tanh(mh) / mh;
}

/// m of a straight fin [1/m]: sqrt((h1 + h2)(1 + t/L)/(k t)), one film coefficient per face.
template <class T>
T straight_fin_parameter(const T& film_of_both_faces, const T& conductivity, const T& thickness,
                         const T& length) {
    using std::sqrt;
    return sqrt(film_of_both_faces * (1.0 + thickness / length) / (conductivity * thickness));
}

/// Heat of a fin of constant section with a convective tip, per kelvin of base rise [W/K]:
/// M (sinh mH + h/(mk) cosh mH)/(cosh mH + h/(mk) sinh mH), M = (h P k A)^0.5, m = (h P/(k A))^0.5.
/// Incropera 2007, eq. 3.72.
template <class T>
T fin_conductance_convective_tip(const T& film, const T& conductivity, const T& perimeter,
                                 const T& section, const T& height) {
    using std::sqrt, std::tanh;
    const T m = sqrt(film * perimeter / (conductivity * section));
    const T tip = film / (m * conductivity);
    const T t = tanh(m * height);
    return m * conductivity * section * (t + tip) / (1.0 + tip * t);
}

/// Efficiency of a fin whose thickness falls linearly from root to tip, adiabatic tip [-].
/// Trapezoidal profile in modified Bessel functions (Gardner 1945; Kraus, Aziz & Welty 2001); film
/// on both faces equal, slant length taken as the height. Root and tip may not be equal; below 0.1
/// % taper use fin_efficiency.
double trapezoidal_fin_efficiency(double film, double conductivity, double root, double tip,
                                  double height);

/// Efficiency of a triangular fin [-]: I1(2mH)/(mH I0(2mH)), m on the root thickness. Gardner 1945.
double triangular_fin_efficiency(double mh);

/// Efficiency of a concave parabolic fin [-]: 2/(1 + sqrt(1 + 4 (mH)^2)). Gardner 1945.
template <class T>
T parabolic_fin_efficiency(const T& mh) {
    using std::sqrt;
    return 2.0 / (1.0 + sqrt(1.0 + 4.0 * mh * mh));
}

} // namespace finwright::correlations
