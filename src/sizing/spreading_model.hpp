#pragma once
// The spreading of each pad's heat, cheap enough for the inner loop of a search.
//
// The series over all pads costs a hundred times the rest of a rating. So it is evaluated at a
// centre, with its derivatives, and continued from there as a monomial of the dimensions (linearly
// where it is not positive): equal to the series in value and slope at the centre, so that a search
// which re-centres until it stands still solves the exact problem (first-order consistent models:
// Alexandrov & Lewis 2001).

#include "correlations/numbers/dual.hpp"
#include "src/sink/duty.hpp"
#include "src/sink/geometry.hpp"
#include <array>
#include <vector>

namespace finwright::sizing {

using Dual5 = correlations::Dual<5>;

class SpreadingModel {
public:
    /// Takes the series' value and slopes at this geometry.
    void centre(const sink::Geometry<double>& g, const sink::Duty& duty);

    /// Rise of the base under a pad over the mean of the base [K].
    template <class T> T rise(std::size_t pad, const sink::Geometry<T>& g) const;

    std::size_t pads() const { return pads_.size(); }

private:
    struct PadModel {
        double rise = 0.0; ///< at the centre [K]
        std::array<double, 5>
            exponents{}; ///< d ln rise / d ln dimension, or d rise / d ln dimension
        bool monomial = true;
    };
    std::array<double, 5> log_centre_{};
    std::vector<PadModel> pads_;
};

} // namespace finwright::sizing
