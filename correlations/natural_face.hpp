#pragma once
// Natural convection on single isothermal faces, and how it joins forced flow. Film properties.

#include <cmath>

namespace finwright::correlations {

/// Vertical plate, laminar, mean on its height [-]. Churchill & Chu 1975, eq. 9:
/// Nu = 0.68 + 0.670 Ra^0.25/[1 + (0.492/Pr)^(9/16)]^(4/9); Ra to 1e9.
template <class T>
T nusselt_vertical_laminar(const T& ra, const T& pr) {
    using std::exp, std::log, std::sqrt;
    const T prandtl = 1.0 + exp((9.0 / 16.0) * log(0.492 / pr));
    return 0.68 + 0.670 * sqrt(sqrt(ra)) * exp((-4.0 / 9.0) * log(prandtl));
}

/// Vertical plate, all Ra to 1e12, mean on its height [-]. Churchill & Chu 1975, eq. 8:
/// Nu = {0.825 + 0.387 Ra^(1/6)/[1 + (0.492/Pr)^(9/16)]^(8/27)}^2.
template <class T>
T nusselt_vertical(const T& ra, const T& pr) {
    using std::cbrt, std::pow, std::sqrt;
    const T root =
        0.825 + 0.387 * sqrt(cbrt(ra)) / pow(1.0 + pow(0.492 / pr, 9.0 / 16.0), 8.0 / 27.0);
    return root * root;
}

/// Hot face up, on Lc = area/perimeter [-]. Raithby & Hollands 1998: C = 0.671/[1 +
/// (0.492/Pr)^(9/16)]^(4/9), NuT = 0.835 C Ra^0.25, Nul = 1.4/ln(1 + 1.4/NuT), Nut = 0.14
/// Ra^(1/3)(1 + 0.0107 Pr)/(1 + 0.01 Pr), Nu = (Nul^10 + Nut^10)^0.1; Ra 1..1e10.
template <class T>
T nusselt_facing_up(const T& ra, const T& pr) {
    using std::cbrt, std::log1p, std::pow, std::sqrt;
    const T c = 0.671 / pow(1.0 + pow(0.492 / pr, 9.0 / 16.0), 4.0 / 9.0);
    const T thin = 0.835 * c * sqrt(sqrt(ra));
    const T laminar = 1.4 / log1p(1.4 / thin);
    const T turbulent = 0.14 * cbrt(ra) * (1.0 + 0.0107 * pr) / (1.0 + 0.01 * pr);
    return pow(pow(laminar, 10.0) + pow(turbulent, 10.0), 0.1);
}

/// Hot face up, laminar, on area/perimeter [-]: 0.54 Ra^0.25; Ra 1e4..1e7. McAdams 1954 as given by
/// Cengel & Ghajar 2015, table 9-1.
template <class T>
T nusselt_facing_up_laminar_textbook(const T& ra) {
    using std::sqrt;
    return 0.54 * sqrt(sqrt(ra));
}

/// Hot face up, turbulent, on area/perimeter [-]: 0.15 Ra^(1/3); Ra 1e7..1e11. McAdams 1954 as
/// given by Cengel & Ghajar 2015, table 9-1. The two are 7 % apart where they meet, at Ra 1e7.
template <class T>
T nusselt_facing_up_turbulent_textbook(const T& ra) {
    using std::cbrt;
    return 0.15 * cbrt(ra);
}

/// Hot face down, on area/perimeter, the textbook law [-]: 0.27 Ra^0.25, 1e5..1e10. McAdams 1954 as
/// given by Cengel & Ghajar 2015, table 9-1.
template <class T>
T nusselt_facing_down_textbook(const T& ra) {
    using std::sqrt;
    return 0.27 * sqrt(sqrt(ra));
}

/// Hot face down, on area/perimeter [-]. Raithby & Hollands 1998: NuT = 0.527 Ra^0.2/[1 +
/// (1.9/Pr)^0.9]^(2/9), Nu = 2.5/ln(1 + 2.5/NuT); Ra 1e3..1e10.
template <class T>
T nusselt_facing_down(const T& ra, const T& pr) {
    using std::log1p, std::pow;
    const T thin = 0.527 * pow(ra, 0.2) / pow(1.0 + pow(1.9 / pr, 0.9), 2.0 / 9.0);
    return 2.5 / log1p(2.5 / thin);
}

/// Forced and natural flow in the same sense [-]: Nu^3 = Nu_f^3 + Nu_n^3. Churchill 1977.
template <class T>
T mixed_assisting(const T& forced, const T& natural) {
    using std::cbrt;
    return cbrt(forced * forced * forced + natural * natural * natural);
}

/// Forced and natural flow against each other [-]: Nu^3 = |Nu_f^3 - Nu_n^3|. Churchill 1977. Falls
/// to zero where the two are equal, which real flows do not.
template <class T>
T mixed_opposing(const T& forced, const T& natural) {
    using std::abs, std::cbrt;
    return cbrt(abs(forced * forced * forced - natural * natural * natural));
}

} // namespace finwright::correlations
