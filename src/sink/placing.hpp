#pragma once
// Where each part's pad sits on a base of given sides.

#include "correlations/spreading.hpp"
#include "src/job/job.hpp"
#include <vector>

namespace finwright::sink {

/// Pad centres and sides on a base of width x length [m]. A coordinate the job gives as a share
/// moves with the side. Parts without a place stand in one row across the width at mid length, each
/// in a stretch of the width in proportion to its pad, so that they fit whenever their pads add up
/// to less.
template <class T>
std::vector<correlations::Pad<T>> pads_on_base(const std::vector<job::Part>& parts, const T& width,
                                               const T& length);

/// Base sides from which on every pad lies whole and clear of the others [m]. Two pads that could
/// be parted by width or by length are parted by whichever asks for the shorter side.
struct SmallestBase {
    double width = 0.0;
    double length = 0.0;
};
SmallestBase smallest_base(const std::vector<job::Part>& parts);

/// Index pair of the first two pads that overlap on this base, empty if none do.
struct Overlap {
    std::size_t first, second;
};
std::optional<Overlap> overlap_on(const std::vector<job::Part>& parts, double width, double length);

} // namespace finwright::sink
