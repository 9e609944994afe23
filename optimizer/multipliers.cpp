#include "optimizer/multipliers.hpp"

#include "optimizer/non_negative_least_squares.hpp"
#include "optimizer/scaling.hpp"
#include <algorithm>
#include <cmath>
#include <numeric>

namespace finwright::optimizer {

namespace {

constexpr double active =
    1e-6; // a constraint or scaled bound this close to its limit counts as active
constexpr double least_scale = 1e-8; // of the objective, where it and its gradient vanish together

enum class Kind { constraint, lower, upper };
struct Active {
    Kind kind;
    std::size_t index;
};

std::vector<Active> active_limits(const std::vector<Variable>& variables, std::span<const double> x,
                                  const Evaluation& at) {
    std::vector<Active> list;
    for (std::size_t i = 0; i < at.constraints.size(); ++i)
        if (at.constraints[i] > -active) list.push_back({Kind::constraint, i});
    for (std::size_t j = 0; j < variables.size(); ++j) {
        const Variable& v = variables[j];
        const double u = to_scaled(v, x[j]);
        if (u - to_scaled(v, v.lower) < active) list.push_back({Kind::lower, j});
        if (to_scaled(v, v.upper) - u < active) list.push_back({Kind::upper, j});
    }
    return list;
}

/// Normals of the active limits in scaled variables, one after the other.
std::vector<double> outward_normals(const std::vector<Active>& list,
                                    const std::vector<double>& scale, const Evaluation& at) {
    const std::size_t n = scale.size();
    std::vector<double> normals(list.size() * n, 0.0);
    for (std::size_t k = 0; k < list.size(); ++k) {
        const std::size_t i = list[k].index;
        if (list[k].kind == Kind::lower) normals[k * n + i] = -1.0;
        if (list[k].kind == Kind::upper) normals[k * n + i] = 1.0;
        if (list[k].kind == Kind::constraint)
            for (std::size_t j = 0; j < n; ++j)
                normals[k * n + j] = at.jacobian[i * n + j] * scale[j];
    }
    return normals;
}

double norm(const std::vector<double>& v) {
    return std::sqrt(std::inner_product(v.begin(), v.end(), v.begin(), 0.0));
}

/// A bound's multiplier in the variable's own unit; none where the variable cannot move.
double per_unit(double multiplier, double scale) {
    return scale > 0.0 ? multiplier / scale : 0.0;
}

} // namespace

Multipliers multipliers_at(const std::vector<Variable>& variables, std::span<const double> x,
                           const Evaluation& at) {
    const std::size_t n = variables.size();
    Multipliers out;
    out.constraints.assign(at.constraints.size(), 0.0);
    out.lower.assign(n, 0.0);
    out.upper.assign(n, 0.0);
    if (n == 0) return out;

    std::vector<double> scale(n), left(n);
    for (std::size_t j = 0; j < n; ++j) {
        scale[j] = stretch(variables[j], x[j]);
        left[j] = -at.gradient[j] * scale[j];
    }
    const double size = std::max({norm(left), std::abs(at.objective), least_scale});

    const auto list = active_limits(variables, x, at);
    const auto normals = outward_normals(list, scale, at);
    const auto y = non_negative_least_squares(normals, left);
    for (std::size_t k = 0; k < list.size(); ++k) {
        const std::size_t i = list[k].index;
        if (list[k].kind == Kind::constraint) out.constraints[i] = y[k];
        if (list[k].kind == Kind::lower) out.lower[i] = per_unit(y[k], scale[i]);
        if (list[k].kind == Kind::upper) out.upper[i] = per_unit(y[k], scale[i]);
        for (std::size_t j = 0; j < n; ++j)
            left[j] -= y[k] * normals[k * n + j];
    }
    out.residual = norm(left) / size;
    return out;
}

} // namespace finwright::optimizer
