#pragma once
// Fits nusselt_fin_channel to the stored three-dimensional solutions, and says how well it does on
// rows it has not seen.

#include "correlations/natural_channel.hpp"
#include "correlations/natural_face.hpp"
#include "tests/reference_rows.hpp"
#include "tests/validation/least_squares.hpp"
#include <cmath>
#include <vector>

namespace finwright::tests {

/// One row of natural_cfd.csv.
struct ChannelSolution {
    double gap, height, length, conductivity, elenbaas, plate, film;
    double weight; ///< less where the plume did not settle

    explicit ChannelSolution(const Row& row)
        : gap(number(row, "S_mm") / 1e3), height(number(row, "H_mm") / 1e3),
          length(number(row, "L_mm") / 1e3), conductivity(number(row, "k_W_mK")),
          elenbaas(number(row, "El")),
          plate(correlations::nusselt_vertical_laminar(elenbaas * std::pow(length / gap, 4.0),
                                                       number(row, "Pr"))),
          film(number(row, "h_wetted_W_m2K")), weight(row.at("steady") == "yes" ? 1.0 : 0.6) {}

    double by(const correlations::FinChannelFit& fit) const {
        return correlations::nusselt_fin_channel(elenbaas, plate, gap, height, length, fit) *
               conductivity / gap;
    }
};

inline std::vector<ChannelSolution> channel_solutions() {
    std::vector<ChannelSolution> list;
    for (const Row& row : rows_of("natural_cfd.csv"))
        list.emplace_back(row);
    return list;
}

inline correlations::FinChannelFit unpacked(const Eigen::VectorXd& c) {
    return {c[0], c[1], c[2], c[3], c[4], c[5]};
}

/// Least squares of ln(law/solution), from plain superposition.
inline correlations::FinChannelFit fitted(const std::vector<ChannelSolution>& rows) {
    const Eigen::Vector<double, 6> start{1.0, 0.0, 1.0, 0.0, 1.5, 0.0};
    return unpacked(least_squares(start, [&](const Eigen::VectorXd& c) {
        Eigen::VectorXd r(Eigen::Index(rows.size()));
        for (std::size_t i = 0; i < rows.size(); ++i)
            r[Eigen::Index(i)] = rows[i].weight * std::log(rows[i].by(unpacked(c)) / rows[i].film);
        return r;
    }));
}

/// Law over solution on every row, each predicted by a fit that has not seen it: ten folds, row i
/// in fold i mod 10.
inline std::vector<double> cross_validated(const std::vector<ChannelSolution>& rows) {
    std::vector<double> ratio(rows.size());
    for (std::size_t fold = 0; fold < 10; ++fold) {
        std::vector<ChannelSolution> seen;
        for (std::size_t i = 0; i < rows.size(); ++i)
            if (i % 10 != fold) seen.push_back(rows[i]);
        const auto fit = fitted(seen);
        for (std::size_t i = fold; i < rows.size(); i += 10)
            ratio[i] = rows[i].by(fit) / rows[i].film;
    }
    return ratio;
}

} // namespace finwright::tests
