#pragma once
// The part itself: N straight fins on a flat base, and what follows from its dimensions alone.
//
//        t_tip
//        |--|      S_tip
//        /  \    /  \    /  \        ^
//       |    |  |    |  |    |       | fin height H
//     __|    |__|    |__|    |__     v
//    |__________________________|    base thickness tb
//    <-------- width W -------->     the first and last fin stand on the edges of the base
//
// Thickness and gap are taken at the root; a draft makes fins thinner and gaps wider towards the
// tip.

#include <string>

namespace finwright::sink {

template <class T>
struct Geometry {
    int fins = 2;
    T height;                   ///< H, off the base [m]
    T thickness;                ///< t, at the root [m]
    T gap;                      ///< S, at the root [m]
    T base;                     ///< tb [m]
    T length;                   ///< L, along the flow [m]
    double draft_tangent = 0.0; ///< slope of each fin face against the fin's middle plane [-]

    T tip_thickness() const { return thickness - 2.0 * draft_tangent * height; }
    T mean_thickness() const { return thickness - draft_tangent * height; }
    T mean_gap() const { return gap + draft_tangent * height; }
    T pitch() const { return gap + thickness; }
    T width() const { return double(fins) * thickness + double(fins - 1) * gap; }
    T overall_height() const { return base + height; }
    T footprint() const { return width() * length; }
    T envelope() const { return footprint() * overall_height(); }

    /// Metal in the cross-section [m2]; sharp corners, no holes.
    T section() const { return width() * base + double(fins) * mean_thickness() * height; }
    T metal() const { return section() * length; }
};

/// Width that N fins and their gaps take, solved for the gap [m].
template <class T>
T gap_for_width(int fins, const T& width, const T& thickness) {
    return (width - double(fins) * thickness) / double(fins - 1);
}

/// The same part with its dimensions as plain numbers.
template <class T>
Geometry<double> plain(const Geometry<T>& g);

} // namespace finwright::sink
