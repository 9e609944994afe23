#pragma once
// The spreading of each pad's heat, cheap enough for the inner loop of a search.
//
// The full series costs ten times the rest of a rating. The search sums a few of its modes, and
// adds what the others give as a monomial of the dimensions, taken with its slopes at a centre:
// equal to the full series in value and slope there, so that a search which re-centres until it
// stands still solves the exact problem (first-order consistent models: Alexandrov & Lewis 2001).
// The modes stay the centre's while dimensions vary, so that nothing jumps.

#include "correlations/numbers/dual.hpp"
#include "correlations/spreading.hpp"
#include "src/sink/balance.hpp"
#include "src/sink/duty.hpp"
#include "src/sink/geometry.hpp"
#include <array>
#include <vector>

namespace finwright::sizing {

using Dual5 = correlations::Dual<5>;

class SpreadingModel {
public:
    /// Takes the full series' value and slopes at this geometry.
    void centre(const sink::Geometry<double>& g, const sink::Duty& duty);
    bool centred() const { return !tails_.empty(); }

    /// Rise of the base under each pad over the inlet air [K].
    template <class T>
    std::vector<T> pad_rises(const sink::Geometry<T>& g, const sink::Duty& duty,
                             const sink::Balance<T>& balance) const;

private:
    /// What the modes left out add to one pad: a monomial of the dimensions, or linear in their
    /// logarithms where it is too small beside its slopes for a monomial to be tame.
    struct Tail {
        double rise = 0.0;              ///< at the centre [K]
        std::array<double, 5> slopes{}; ///< d rise / d ln dimension [K]
        bool monomial = false;

        template <class T>
        T at(const std::array<T, 5>& away) const;
    };
    correlations::ModeSet modes_;
    std::array<double, 5> log_centre_{};
    std::vector<Tail> tails_;
};

} // namespace finwright::sizing
