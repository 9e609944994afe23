#include "optimizer/restore.hpp"

#include "optimizer/non_negative_least_squares.hpp"
#include "optimizer/scaling.hpp"
#include <algorithm>
#include <cmath>

namespace finwright::optimizer {

namespace {

constexpr int steps = 5;
constexpr double no_answer = 1e-12;

/// min |d| subject to rows . d >= least, each row as long as d; empty when there is no such d.
std::vector<double> least_distance(std::size_t n, const std::vector<std::vector<double>>& rows,
                                   const std::vector<double>& least) {
    std::vector<double> columns;
    for (std::size_t k = 0; k < rows.size(); ++k) {
        columns.insert(columns.end(), rows[k].begin(), rows[k].end());
        columns.push_back(least[k]);
    }
    std::vector<double> rest(n + 1, 0.0);
    rest[n] = 1.0;
    const auto y = non_negative_least_squares(columns, rest);
    for (std::size_t k = 0; k < rows.size(); ++k)
        for (std::size_t j = 0; j <= n; ++j)
            rest[j] -= y[k] * columns[k * (n + 1) + j];
    if (rest[n] < no_answer) return {};
    std::vector<double> d(n);
    for (std::size_t j = 0; j < n; ++j)
        d[j] = -rest[j] / rest[n];
    return d;
}

/// The least scaled step after which every constraint would hold with `margin`, were it linear.
std::vector<double> least_step(const std::vector<Variable>& variables, const Judged& from,
                               const Evaluation& at, double margin) {
    const std::size_t n = variables.size();
    const double unit = from.violation + margin; // steps are measured in this
    std::vector<std::vector<double>> rows;
    std::vector<double> least;
    for (std::size_t i = 0; i < from.constraints.size(); ++i) {
        rows.emplace_back(n);
        for (std::size_t j = 0; j < n; ++j)
            rows.back()[j] = -at.jacobian[i * n + j] * stretch(variables[j], from.x[j]);
        least.push_back((from.constraints[i] + margin) / unit);
    }
    for (std::size_t j = 0; j < n; ++j) {
        const Variable& v = variables[j];
        const double u = to_scaled(v, from.x[j]);
        rows.emplace_back(n, 0.0);
        rows.back()[j] = 1.0;
        least.push_back((to_scaled(v, v.lower) - u) / unit);
        rows.emplace_back(n, 0.0);
        rows.back()[j] = -1.0;
        least.push_back((u - to_scaled(v, v.upper)) / unit);
    }
    auto d = least_distance(n, rows, least);
    for (double& part : d)
        part *= unit;
    return d;
}

bool finite_slopes(const Evaluation& at) {
    const auto finite = [](double v) { return std::isfinite(v); };
    return std::all_of(at.jacobian.begin(), at.jacobian.end(), finite);
}

} // namespace

Judged restored(Problem& problem, Judged from, const Settings& settings, Effort& effort) {
    const auto& variables = problem.variables();
    const double margin = 0.5 * settings.strict_tolerance;
    Evaluation at(variables.size(), problem.constraint_count());
    bool moved = false;
    for (int k = 0; k < steps && from.violation > settings.strict_tolerance && !effort.spent();
         ++k) {
        if (!from.defined() || !evaluate(problem, from.x, at, effort)) break;
        if (!finite_slopes(at)) break;
        const auto d = least_step(variables, from, at, margin);
        if (d.empty()) break;
        Judged next = from;
        for (std::size_t j = 0; j < d.size(); ++j)
            next.x[j] = from_scaled(variables[j], to_scaled(variables[j], from.x[j]) + d[j]);
        next = exactly(problem, std::move(next));
        if (!(next.violation < from.violation)) break;
        from = std::move(next);
        moved = true;
    }
    if (moved) from.multipliers = by_model(problem, from.x, effort).multipliers;
    return from;
}

} // namespace finwright::optimizer
