#pragma once
// Fits channel_radiation_zoned to the stored zoned solutions, and says how well it does on channels
// it has not seen.

#include "correlations/channel_radiation.hpp"
#include "tests/reference_rows.hpp"
#include "tests/validation/least_squares.hpp"
#include <cmath>
#include <map>
#include <vector>

namespace finwright::tests {

/// One row of channel_radiation.csv, gap 1 m: conductances over gap and length [-].
struct RadiationSolution {
    double height, length, emissivity, zoned;

    explicit RadiationSolution(const Row& row)
        : height(number(row, "H_over_S")), length(number(row, "L_over_H") * height),
          emissivity(number(row, "emissivity")), zoned(number(row, "q")) {}

    double by(const correlations::ChannelRadiationFit& fit) const {
        return correlations::channel_radiation_zoned(emissivity, 1.0, height, length, fit) / length;
    }
    double by_one_zone() const {
        return correlations::channel_radiation_conductance(
                   emissivity, (2.0 * height + 1.0) * length,
                   correlations::channel_opening(1.0, height, length)) /
               length;
    }
};

inline std::vector<RadiationSolution> radiation_solutions() {
    std::vector<RadiationSolution> list;
    for (const Row& row : rows_of("channel_radiation.csv"))
        list.emplace_back(row);
    return list;
}

/// Least squares of ln(law/solution).
inline correlations::ChannelRadiationFit fitted(const std::vector<RadiationSolution>& rows) {
    const auto unpacked = [](const Eigen::VectorXd& c) {
        return correlations::ChannelRadiationFit{c[0], c[1], c[2], c[3], c[4]};
    };
    const Eigen::Vector<double, 5> start{5.0, 1.0, 1.0, 1.0, 0.5};
    return unpacked(least_squares(start, [&](const Eigen::VectorXd& c) {
        Eigen::VectorXd r(Eigen::Index(rows.size()));
        for (std::size_t i = 0; i < rows.size(); ++i)
            r[Eigen::Index(i)] = std::log(rows[i].by(unpacked(c)) / rows[i].zoned);
        return r;
    }));
}

/// Law over solution on every row, each predicted by a fit that has not seen any channel of that
/// depth H/S.
inline std::vector<double> cross_validated(const std::vector<RadiationSolution>& rows) {
    std::map<double, correlations::ChannelRadiationFit> without_depth;
    for (const auto& left_out : rows) {
        if (without_depth.contains(left_out.height)) continue;
        std::vector<RadiationSolution> seen;
        for (const auto& row : rows)
            if (row.height != left_out.height) seen.push_back(row);
        without_depth[left_out.height] = fitted(seen);
    }
    std::vector<double> ratio;
    for (const auto& row : rows)
        ratio.push_back(row.by(without_depth.at(row.height)) / row.zoned);
    return ratio;
}

} // namespace finwright::tests
