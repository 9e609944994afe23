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
// tip. The base may reach beyond the fins on both sides (flanges) and be cleared of fins over part
// of its length. A plain plate has no fins: its gap is its whole width.

#include "src/job/job.hpp"
#include <numbers>

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
    job::FinDetails details{};

    T tip_thickness() const { return thickness - 2.0 * draft_tangent * height; }
    T mean_thickness() const { return thickness - draft_tangent * height; }
    T mean_gap() const { return gap + draft_tangent * height; }
    bool plate() const { return fins == 0; }
    T fin_length() const { return length - details.fin_free; }
    T pitch() const { return gap + thickness; }
    T field_width() const {
        return plate() ? gap : T(double(fins) * thickness + double(fins - 1) * gap);
    }
    T width() const { return field_width() + 2.0 * details.flange; }
    T overall_height() const { return plate() ? base : T(base + height); }
    T footprint() const { return width() * length; }
    T envelope() const { return footprint() * overall_height(); }

    /// Base that looks past the fins: flanges, and what is cleared of fins; all of a plate [m2].
    T bare() const {
        if (plate()) return footprint();
        return T(2.0 * details.flange * length + field_width() * details.fin_free);
    }
    /// Surface of one fin's tip [m2].
    T tip() const {
        return (details.round_tips ? 0.5 * std::numbers::pi : 1.0) * tip_thickness() * fin_length();
    }

    /// Metal in the cross-section through the fins [m2]; no root radii, no holes.
    T section() const {
        if (plate()) return width() * base;
        const T corners = (details.round_tips ? 1.0 - 0.25 * std::numbers::pi : 0.0) *
                          tip_thickness() * tip_thickness();
        return width() * base + double(fins) * (mean_thickness() * height - corners);
    }
    T metal() const {
        if (plate()) return section() * length;
        return width() * base * length + (section() - width() * base) * fin_length();
    }
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
