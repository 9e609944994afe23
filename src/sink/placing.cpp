#include "src/sink/placing.hpp"

#include "correlations/numbers/dual.hpp"
#include <algorithm>
#include <limits>
#include <utility>

namespace finwright::sink {

namespace {

/// Share of the width at which each part without a place across stands.
std::vector<double> row_shares(const std::vector<job::Part>& parts) {
    double total = 0.0;
    for (const auto& part : parts)
        if (!part.across) total += part.pad_across;
    std::vector<double> shares(parts.size(), 0.5);
    double before = 0.0;
    for (std::size_t i = 0; i < parts.size(); ++i) {
        if (parts[i].across) continue;
        shares[i] = (before + 0.5 * parts[i].pad_across) / total;
        before += parts[i].pad_across;
    }
    return shares;
}

template <class T>
T on_side(const job::Coordinate& coordinate, const T& side) {
    return coordinate.share_of_side ? T(coordinate.value * side) : T(coordinate.value);
}

/// Side a pad needs so that it does not hang over either edge.
double side_needed(const job::Coordinate& coordinate, double pad) {
    if (!coordinate.share_of_side) return coordinate.value + 0.5 * pad;
    const double nearer_edge = std::min(coordinate.value, 1.0 - coordinate.value);
    return 0.5 * pad / nearer_edge;
}

/// Side at which two centres stand `apart` from each other; 0 if they always do, infinite if they
/// never can.
double side_for_distance(const job::Coordinate& a, const job::Coordinate& b, double apart) {
    constexpr double never = std::numeric_limits<double>::infinity();
    if (a.share_of_side != b.share_of_side) {
        const auto& [share, place] = a.share_of_side ? std::pair(a, b) : std::pair(b, a);
        return (place.value + apart) / share.value;
    }
    const double difference = std::abs(a.value - b.value);
    if (a.share_of_side) return difference > 0.0 ? apart / difference : never;
    return difference >= apart * (1.0 - 1e-9) ? 0.0 : never;
}

struct Centre {
    job::Coordinate across, along;
};

std::vector<Centre> centres_of(const std::vector<job::Part>& parts) {
    const std::vector<double> shares = row_shares(parts);
    std::vector<Centre> centres;
    for (std::size_t i = 0; i < parts.size(); ++i)
        centres.push_back({parts[i].across.value_or(job::Coordinate{shares[i], true}),
                           parts[i].along.value_or(job::Coordinate{})});
    return centres;
}

} // namespace

template <class T>
std::vector<correlations::Pad<T>> pads_on_base(const std::vector<job::Part>& parts, const T& width,
                                               const T& length) {
    const std::vector<Centre> centres = centres_of(parts);
    std::vector<correlations::Pad<T>> pads;
    pads.reserve(parts.size());
    for (std::size_t i = 0; i < parts.size(); ++i)
        pads.push_back({on_side(centres[i].across, width), on_side(centres[i].along, length),
                        T(parts[i].pad_across), T(parts[i].pad_along)});
    return pads;
}

template std::vector<correlations::Pad<double>> pads_on_base(const std::vector<job::Part>&,
                                                             const double&, const double&);
template std::vector<correlations::Pad<correlations::Dual<1>>>
pads_on_base(const std::vector<job::Part>&, const correlations::Dual<1>&,
             const correlations::Dual<1>&);

SmallestBase smallest_base(const std::vector<job::Part>& parts) {
    const std::vector<Centre> centres = centres_of(parts);
    SmallestBase base;
    for (std::size_t i = 0; i < parts.size(); ++i) {
        base.width = std::max(base.width, side_needed(centres[i].across, parts[i].pad_across));
        base.length = std::max(base.length, side_needed(centres[i].along, parts[i].pad_along));
        for (std::size_t j = 0; j < i; ++j) {
            const double width =
                side_for_distance(centres[i].across, centres[j].across,
                                  0.5 * (parts[i].pad_across + parts[j].pad_across));
            const double length =
                side_for_distance(centres[i].along, centres[j].along,
                                  0.5 * (parts[i].pad_along + parts[j].pad_along));
            if (width <= length)
                base.width = std::max(base.width, width);
            else
                base.length = std::max(base.length, length);
        }
    }
    return base;
}

std::optional<Overlap> overlap_on(const std::vector<job::Part>& parts, double width,
                                  double length) {
    const auto pads = pads_on_base(parts, width, length);
    const double contact = 1e-9 * std::max(width, length);
    for (std::size_t i = 0; i < pads.size(); ++i)
        for (std::size_t j = i + 1; j < pads.size(); ++j) {
            const double apart_x =
                std::abs(pads[i].x - pads[j].x) - 0.5 * (pads[i].across + pads[j].across);
            const double apart_y =
                std::abs(pads[i].y - pads[j].y) - 0.5 * (pads[i].along + pads[j].along);
            if (apart_x < -contact && apart_y < -contact) return Overlap{i, j};
        }
    return std::nullopt;
}

} // namespace finwright::sink
