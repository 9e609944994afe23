#include "optimizer/elastic.hpp"

#include "optimizer/judged.hpp"
#include <algorithm>

namespace finwright::optimizer {

namespace {

constexpr double least_range = 1.0, largest_range = 1e6;

double violation_at(Problem& problem, const std::vector<double>& x) {
    Judged j;
    j.x = x;
    j.constraints.resize(problem.constraint_count());
    return std::min(exactly(problem, std::move(j)).violation, largest_range);
}

} // namespace

Elastic::Elastic(Problem& inner, const std::vector<std::vector<double>>& starts)
    : inner_(inner), variables_(inner.variables()), starts_(starts),
      at_(inner.variables().size(), inner.constraint_count()) {
    double range = least_range;
    for (auto& x : starts_) {
        x.push_back(violation_at(inner, x));
        range = std::max(range, 2.0 * x.back());
    }
    variables_.push_back({"largest constraint", -range, range, Scale::linear});
}

void Elastic::evaluate(std::span<const double> x, Evaluation& out) {
    const std::size_t n = x.size() - 1;
    inner_.evaluate(x.first(n), at_);
    out.objective = x[n];
    std::fill(out.gradient.begin(), out.gradient.end(), 0.0);
    out.gradient[n] = 1.0;
    for (std::size_t i = 0; i < at_.constraints.size(); ++i) {
        out.constraints[i] = at_.constraints[i] - x[n];
        for (std::size_t j = 0; j < n; ++j)
            out.jacobian[i * (n + 1) + j] = at_.jacobian[i * n + j];
        out.jacobian[i * (n + 1) + n] = -1.0;
    }
}

void Elastic::judge(std::span<const double> x, double& objective, std::span<double> constraints) {
    double unused = 0.0;
    inner_.judge(x.first(x.size() - 1), unused, constraints);
    objective = x.back();
    for (double& c : constraints)
        c -= x.back();
}

bool Elastic::recentre(std::span<const double> x) {
    return inner_.recentre(x.first(x.size() - 1));
}

} // namespace finwright::optimizer
