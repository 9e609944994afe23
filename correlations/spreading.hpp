#pragma once
// How heat put into small pads spreads through a flat base that is cooled on its other side.

#include "correlations/numbers/dual.hpp"
#include <cmath>
#include <numbers>
#include <vector>

namespace finwright::correlations {

/// The function both closed forms share [-]. One centred pad on discs of equal area: eps = a/b of
/// pad and base radius, tau = t/b, Bi = h b/k. Lee, Song, Au & Moran 1995 (coefficients from
/// memory): Phi = (tanh(lambda tau) + lambda/Bi)/(1 + (lambda/Bi) tanh(lambda tau)), lambda = pi +
/// 1/(sqrt(pi) eps).
template <class T>
T spreading_phi(const T& eps, const T& tau, const T& bi) {
    using std::tanh;
    const T lambda = std::numbers::pi + 1.0 / (std::sqrt(std::numbers::pi) * eps);
    const T t = tanh(lambda * tau), r = lambda / bi;
    return (t + r) / (1.0 + r * t);
}

/// Mean spreading resistance times sqrt(pi) k a [-]: 0.5 (1 - eps)^1.5 Phi. -6..+2 %.
template <class T>
T spreading_mean(const T& eps, const T& tau, const T& bi) {
    using std::sqrt;
    return 0.5 * (1.0 - eps) * sqrt(1.0 - eps) * spreading_phi(eps, tau, bi);
}

/// Largest (centre) spreading resistance times sqrt(pi) k a [-]: (1 - eps) Phi/sqrt(pi). -2..+4 %.
template <class T>
T spreading_largest(const T& eps, const T& tau, const T& bi) {
    return (1.0 - eps) * spreading_phi(eps, tau, bi) / std::sqrt(std::numbers::pi);
}

/// A base cooled with one film coefficient over its far side. SI.
struct Slab {
    double width;        ///< along x [m]
    double length;       ///< along y [m]
    double thickness;    ///< [m]
    double conductivity; ///< [W/(m K)]
    double film;         ///< heat per base area and kelvin on the far side [W/(m2 K)]
};

/// A rectangular pad of uniform flux on the base.
template <class T>
struct Pad {
    T x, y;          ///< centre from the corner [m]
    T across, along; ///< sides along x and y [m]
};

/// Which modes of the base count. A mode's share falls with the square of the half waves it makes
/// over the smallest pad, across and along: (m, n) is kept while max(1, m c/W) max(1, n d/L) <=
/// half_waves.
class ModeSet {
public:
    template <class T>
    static ModeSet up_to(double half_waves, const Slab& slab, const std::vector<Pad<T>>& pads);
    /// Eight half waves: what is cut off of a mean is about 1e-3 of its spreading part.
    template <class T>
    static ModeSet for_means(const Slab& slab, const std::vector<Pad<T>>& pads);

    int last_across() const;
    int last_along(int m) const;

private:
    static int last(double half_waves, double share);
    double share_across_ = 1.0, share_along_ = 1.0, half_waves_ = 0.0;
};

/// Mean rise of each pad for a power in every pad, the one-dimensional part (t/k + 1/h)/(W L)
/// included [K]. Double Fourier series of Muzychka, Culham & Yovanovich 2003 (from memory; agrees
/// with finite volumes to 1e-4): sum over modes of w G(z)/(k z) times the mode's means over the
/// pads, z^2 = (m pi/W)^2 + (n pi/L)^2, G = (tanh(z t) + k z/h)/(1 + (k z/h) tanh(z t)).
std::vector<double> pad_mean_rises(const Slab& slab, const std::vector<Pad<double>>& pads,
                                   const std::vector<double>& powers, const ModeSet& modes);

/// The same over the modes for means.
std::vector<double> pad_mean_rises(const Slab& slab, const std::vector<Pad<double>>& pads,
                                   const std::vector<double>& powers);

/// The same with its slopes by the slab's width, length, thickness and film, in this order. A pad's
/// x and side across may move with the width (their slope is by it), its y and side along with the
/// length.
std::vector<Dual<4>> pad_mean_rises_with_slopes(const Slab& slab,
                                                const std::vector<Pad<Dual<1>>>& pads,
                                                const std::vector<double>& powers,
                                                const ModeSet& modes);

/// Rise of the base's surface at (x, y) for a power in each pad [K].
double surface_rise(const Slab& slab, const std::vector<Pad<double>>& pads,
                    const std::vector<double>& powers, double x, double y);

/// Mean rise of one pad per watt when a thin layer of the same sides lies on the base [K/W]: the
/// recursion Z = (tanh(z t) + k z Z2)/(k z (1 + k z Z2 tanh(z t))) from the air side up (Yovanovich
/// and co-workers, from memory).
struct Layer {
    double thickness;    ///< [m]
    double conductivity; ///< [W/(m K)]
};
double mean_rise_two_layers(const Slab& base, const Layer& top, const Pad<double>& pad);

} // namespace finwright::correlations
