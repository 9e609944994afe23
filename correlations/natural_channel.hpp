#pragma once
// Natural convection in vertical channels. El = g beta dT S^4/(nu alpha L), properties at film
// temperature, Nu = h S/k on the wetted area unless said otherwise.

#include <cmath>

namespace finwright::correlations {

/// Elenbaas number [-]: gap Rayleigh number times gap/length. g_beta_over_nu_alpha = g beta/(nu
/// alpha) [1/(m3 K)].
template <class T>
T elenbaas_number(const T& g_beta_over_nu_alpha, const T& rise, const T& gap, const T& length) {
    const T gap2 = gap * gap;
    return g_beta_over_nu_alpha * rise * gap2 * gap2 / length;
}

/// Hydraulic radius of a U-shaped channel [m]: 2 H S/(2 H + S), twice the section over the wetted
/// perimeter.
template <class T>
T hydraulic_radius(const T& gap, const T& height) {
    return 2.0 * height * gap / (2.0 * height + gap);
}

/// Isothermal parallel plates [-]. Elenbaas 1942: Nu = (El/24)(1 - exp(-35/El))^(3/4); El 0.1..1e5.
template <class T>
T nusselt_elenbaas(const T& el) {
    using std::expm1, std::sqrt;
    const T root = sqrt(-expm1(-35.0 / el));
    return el / 24.0 * root * sqrt(root);
}

/// Isothermal parallel plates [-]. Bar-Cohen & Rohsenow 1984: Nu = (576/El^2 + 2.873/El^0.5)^-0.5.
template <class T>
T nusselt_parallel_plates(const T& el) {
    using std::sqrt;
    return 1.0 / sqrt(576.0 / (el * el) + 2.873 / sqrt(el));
}

/// One plate isothermal, the other adiabatic [-]. Bar-Cohen & Rohsenow 1984: (144/El^2
/// + 2.873/El^0.5)^-0.5.
template <class T>
T nusselt_parallel_plates_one_side(const T& el) {
    using std::sqrt;
    return 1.0 / sqrt(144.0 / (el * el) + 2.873 / sqrt(el));
}

/// Uniform flux q on both plates, local at the channel's end [-], on wall minus inlet there.
/// Bar-Cohen & Rohsenow 1984: (48/El' + 2.51/El'^0.4)^-0.5, El' = g beta q S^5/(k nu alpha L).
template <class T>
T nusselt_uniform_flux_end(const T& el_flux) {
    using std::pow, std::sqrt;
    return 1.0 / sqrt(48.0 / el_flux + 2.51 * pow(el_flux, -0.4));
}

/// As above at mid height [-]. Bar-Cohen & Rohsenow 1984: (12/El' + 1.88/El'^0.4)^-0.5.
template <class T>
T nusselt_uniform_flux_middle(const T& el_flux) {
    using std::pow, std::sqrt;
    return 1.0 / sqrt(12.0 / el_flux + 1.88 * pow(el_flux, -0.4));
}

/// Gap that carries most heat per array volume, thin isothermal fins [m]. Bar-Cohen & Rohsenow
/// 1984: S = 2.714 L/Ra_L^0.25 (there El = 54.3, Nu = 1.307); Ra_L on the length.
template <class T>
T optimum_gap_thin_fins(const T& length, const T& rayleigh_length) {
    using std::sqrt;
    return 2.714 * length / sqrt(sqrt(rayleigh_length));
}

/// U-shaped channel of two fins and the base between them, open in front [-]: Nu = h r/k on the
/// wetted area, r the hydraulic radius, Ra = g beta dT r^3/(nu alpha) r/L. Van de Pol & Tierney
/// 1973: Nu = (Ra/Z)(1 - exp(-Z (0.5/Ra)^0.75)), a = S/H, Z = 24 (1 - 0.483 exp(-0.17/a))/{(1 +
/// a/2)[1 + (1 - exp(-0.83 a))(9.14 sqrt(a) exp(-465 S) - 0.61)]}^3, S in m. Coefficients from
/// memory; recovers the parallel-plate and single-plate limits.
template <class T>
T nusselt_u_channel(const T& rayleigh_radius, const T& gap, const T& height) {
    using std::exp, std::expm1, std::sqrt;
    const T a = gap / height;
    const T base = 1.0 - exp(-0.83 * a);
    const T psi = (1.0 + 0.5 * a) * (1.0 + base * (9.14 * sqrt(a) * exp(-465.0 * gap) - 0.61));
    const T z = 24.0 * (1.0 - 0.483 * exp(-0.17 / a)) / (psi * psi * psi);
    const T root = sqrt(0.5 / rayleigh_radius);
    return -rayleigh_radius / z * expm1(-z * root * sqrt(root));
}

/// Coefficients of nusselt_fin_channel, fitted by this project to 94 three-dimensional solutions
/// (tests/data/reference/natural_cfd.csv) by least squares of the logarithm; tests/validation fits
/// them again.
struct FinChannelFit {
    double opening = 1.5642;       ///< the front opening as a plate, over the single-plate law
    double opening_power = 0.0952; ///< of H/L in that
    double base_weight =
        0.5457; ///< the base strip's share of the fins' film when layers are separate
    double layer_excess = 0.0945;   ///< thick layers above the single-plate law
    double sharpness = 1.1926;      ///< exponent of the composite where a/(1 + a/8) = 1 ...
    double sharpness_fall = 0.2536; ///< ... and its fall with the logarithm of that
};

/// Channel of a row of vertical fins, open below, above and in front. Composite of this project
/// over published limits, Nu = h S/k on the wetted area, fins and base at one temperature [-]:
///   developed = El/(24 (1 + a/2)(1 + 0.315 a)), a = S/H: plates (Elenbaas 1942) carrying the base
///   strip, slowed
///               by the base as a half duct is (Shah & London 1978);
///   opening   = c (H/L)^p plate (S/L) a/(2 + a): however dense the fins, the front cools like a
///   plain plate; layers    = f plate (S/L)(2 H + w S)/(2 H + S), f = 1 + e/(1 + (plate S/(5
///   L))^2): separate layers, the
///               single-plate law where they are thin;
///   Nu = ((developed + opening)^-n + layers^-n)^(-1/n), n = n1 - n2 ln(a/(1 + a/8)).
/// `plate` is the vertical plate's Nusselt number on L (Churchill & Chu 1975). Fitted over
/// El 2.6..4500, a 0.08..1.7, L/S 3..61, air; cross-validated error in the passport. What the
/// geometry alone decides is worked out once.
template <class T>
class FinChannel {
public:
    FinChannel() = default;
    FinChannel(const T& gap, const T& height, const T& length, const FinChannelFit& fit = {})
        : layer_excess_(fit.layer_excess) {
        using std::exp, std::log;
        const T a = gap / height;
        slenderness_ = gap / length;
        developed_ = 1.0 / (24.0 * (1.0 + 0.5 * a) * (1.0 + 0.315 * a));
        opening_ = fit.opening * exp(fit.opening_power * log(height / length)) * a / (2.0 + a);
        layers_ = (2.0 * height + fit.base_weight * gap) / (2.0 * height + gap);
        sharpness_ = fit.sharpness - fit.sharpness_fall * log(a / (1.0 + 0.125 * a));
    }

    /// At the channel's Elenbaas number and the plate's Nusselt number [-].
    T nusselt(const T& el, const T& plate) const {
        using std::exp, std::log, std::log1p;
        const T thin = plate * slenderness_;
        const T dense = developed_ * el + opening_ * thin;
        const T layers = (1.0 + layer_excess_ / (1.0 + 0.04 * thin * thin)) * thin * layers_;
        const T ratio = exp(sharpness_ * log(layers / dense));
        return layers * exp(-log1p(ratio) / sharpness_);
    }

private:
    double layer_excess_ = 0.0;
    T slenderness_, developed_, opening_, layers_, sharpness_;
};

/// FinChannel for one use [-].
template <class T>
T nusselt_fin_channel(const T& el, const T& plate, const T& gap, const T& height, const T& length,
                      const FinChannelFit& fit = {}) {
    return FinChannel<T>(gap, height, length, fit).nusselt(el, plate);
}

} // namespace finwright::correlations
