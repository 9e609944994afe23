#include "src/sink/conductance_band.hpp"

#include <algorithm>

namespace finwright::sink {

ConductanceBand::ConductanceBand(int rows, int half_width)
    : rows_(rows), half_width_(half_width),
      entries_(std::size_t(rows) * std::size_t(2 * half_width + 1)), pivots_(std::size_t(rows)) {}

/// The row's diagonal once everything before it is eliminated: its sum less the entries behind it.
double ConductanceBand::pivot_of(int row) {
    const double* entry = &at(row, row);
    double pivot = entry[0];
    for (int c = 1; c <= half_width_; ++c)
        pivot -= entry[c];
    return pivot;
}

void ConductanceBand::eliminate(int column, std::vector<double>& right) {
    const double* from = &at(column, column);
    const double pivot = pivots_[std::size_t(column)] = pivot_of(column);
    const int last = std::min(column + half_width_, rows_ - 1);
    for (int row = column + 1; row <= last; ++row) {
        double* to = &at(row, column);
        const double factor = to[0] / pivot;
        if (factor == 0.0) continue;
        const double sum = at(row, row) - factor * from[0];
        for (int c = 1; c <= half_width_; ++c)
            to[c] -= factor * from[c];
        at(row, row) = sum;
        right[std::size_t(row)] -= factor * right[std::size_t(column)];
    }
}

std::vector<double> ConductanceBand::solve(std::vector<double> right) && {
    for (int column = 0; column < rows_; ++column)
        eliminate(column, right);
    for (int row = rows_ - 1; row >= 0; --row) {
        const double* entry = &at(row, row);
        const int last = std::min(half_width_, rows_ - 1 - row);
        double& value = right[std::size_t(row)];
        for (int c = 1; c <= last; ++c)
            value -= entry[c] * right[std::size_t(row) + std::size_t(c)];
        value /= pivots_[std::size_t(row)];
    }
    return right;
}

} // namespace finwright::sink
