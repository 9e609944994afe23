#include "optimizer/problem.hpp"

#include <algorithm>
#include <cmath>

namespace finwright::optimizer {

void Problem::judge(std::span<const double> x, double& objective, std::span<double> constraints) {
    Evaluation at(variables().size(), constraint_count());
    evaluate(x, at);
    objective = at.objective;
    std::copy(at.constraints.begin(), at.constraints.end(), constraints.begin());
}

bool Problem::recentre(std::span<const double>) {
    return false;
}

std::vector<std::vector<double>> Problem::starts() const {
    std::vector<double> middle;
    for (const Variable& v : variables())
        middle.push_back(v.scale == Scale::logarithmic ? std::sqrt(v.lower * v.upper)
                                                       : 0.5 * (v.lower + v.upper));
    return {middle};
}

} // namespace finwright::optimizer
