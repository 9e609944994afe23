#pragma once
// The derivatives a test problem states, against central differences of its values. A wrong
// derivative in the test is the usual reason for a search that seems to fail.

#include "optimizer/problem.hpp"
#include "tests/near.hpp"
#include <random>

namespace finwright::tests {

/// At points drawn between a quarter and three quarters of each range. Tolerance: 1e-5 of the
/// largest slope of the same function.
inline void check_derivatives(optimizer::Problem& problem, int points = 5) {
    const auto& variables = problem.variables();
    const std::size_t n = variables.size(), m = problem.constraint_count();
    std::mt19937 engine(7);
    std::uniform_real_distribution<double> share(0.25, 0.75);
    for (int k = 0; k < points; ++k) {
        std::vector<double> x;
        for (const auto& v : variables)
            x.push_back(v.lower + share(engine) * (v.upper - v.lower));
        optimizer::Evaluation at(n, m), up(n, m), down(n, m);
        problem.evaluate(x, at);
        const auto stated = [&](std::size_t f, std::size_t j) {
            return f == 0 ? at.gradient[j] : at.jacobian[(f - 1) * n + j];
        };
        const auto value = [](const optimizer::Evaluation& e, std::size_t f) {
            return f == 0 ? e.objective : e.constraints[f - 1];
        };
        std::vector<double> largest(m + 1, 0.0);
        for (std::size_t f = 0; f <= m; ++f)
            for (std::size_t j = 0; j < n; ++j)
                largest[f] = std::max(largest[f], std::abs(stated(f, j)));
        for (std::size_t j = 0; j < n; ++j) {
            auto y = x;
            const double h = 1e-5 * (variables[j].upper - variables[j].lower);
            y[j] = x[j] + h;
            problem.evaluate(y, up);
            y[j] = x[j] - h;
            problem.evaluate(y, down);
            for (std::size_t f = 0; f <= m; ++f) {
                CAPTURE(f);
                CAPTURE(j);
                const double difference = (value(up, f) - value(down, f)) / (2.0 * h);
                CHECK(std::abs(difference - stated(f, j)) <= 1e-5 * largest[f]);
            }
        }
    }
}

} // namespace finwright::tests
