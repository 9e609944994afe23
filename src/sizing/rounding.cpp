#include "src/sizing/rounding.hpp"

#include <algorithm>
#include <cmath>
#include <numeric>

namespace finwright::sizing {

namespace {

constexpr int reach = 2;         // steps to either side of the two lattice neighbours
constexpr double on_step = 1e-9; // how far from a multiple a bound may lie and still be one [steps]

/// Multiples of the step around x within the room; x itself where the room is narrower than a step.
std::vector<double> lattice(const Room& room, double x) {
    const long first = long(std::ceil(room.lower / room.step - on_step));
    const long last = long(std::floor(room.upper / room.step + on_step));
    if (first > last) return {x};
    const long below = long(std::floor(x / room.step + on_step));
    std::vector<double> values;
    for (long i = std::max(first, below - reach); i <= std::min(last, below + 1 + reach); ++i)
        values.push_back(double(i) * room.step);
    return values;
}

/// Every combination of one value per axis.
std::vector<std::vector<double>> combinations(const std::vector<std::vector<double>>& axes) {
    std::vector<std::vector<double>> points{{}};
    for (const auto& axis : axes) {
        std::vector<std::vector<double>> longer;
        longer.reserve(points.size() * axis.size());
        for (const auto& point : points)
            for (double value : axis) {
                longer.push_back(point);
                longer.back().push_back(value);
            }
        points = std::move(longer);
    }
    return points;
}

} // namespace

std::optional<Rounded> round_design(SearchProblem& problem, std::span<const double> x,
                                    double below) {
    const auto& free = problem.free_dimensions();
    std::vector<std::vector<double>> axes;
    for (std::size_t i = 0; i < free.size(); ++i)
        axes.push_back(lattice(problem.space().rooms[std::size_t(free[i])], x[i]));
    std::vector<std::vector<double>> points = combinations(axes);

    std::vector<double> aims(points.size());
    for (std::size_t i = 0; i < points.size(); ++i)
        aims[i] = problem.quick_objective(points[i]);
    std::vector<std::size_t> order(points.size());
    std::iota(order.begin(), order.end(), 0);
    std::stable_sort(order.begin(), order.end(),
                     [&](std::size_t a, std::size_t b) { return aims[a] < aims[b]; });

    for (std::size_t i : order) {
        if (aims[i] >= below) break;
        if (problem.quickly_feasible(points[i]) && problem.feasible(points[i]))
            return Rounded{problem.geometry(points[i]), aims[i]};
    }
    return std::nullopt;
}

} // namespace finwright::sizing
