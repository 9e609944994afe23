#include "optimizer/multipliers.hpp"

#include "optimizer/scaling.hpp"
#include <Eigen/Dense>
#include <algorithm>
#include <cmath>

namespace finwright::optimizer {

namespace {

constexpr double active =
    1e-6; // a constraint or scaled bound this close to its limit counts as active
constexpr double least_scale = 1e-8; // of the objective, where it and its gradient vanish together
constexpr double no_gain = 1e-12;

/// min |A y - b|, y >= 0 (Lawson & Hanson 1974, algorithm NNLS).
Eigen::VectorXd non_negative_least_squares(const Eigen::MatrixXd& a, const Eigen::VectorXd& b) {
    const Eigen::Index n = a.cols();
    Eigen::VectorXd y = Eigen::VectorXd::Zero(n);
    std::vector<Eigen::Index> passive;
    std::vector<bool> in(std::size_t(n), false);
    for (Eigen::Index round = 0; round < 3 * n + 10; ++round) {
        const Eigen::VectorXd gain = a.transpose() * (b - a * y);
        Eigen::Index best = -1;
        for (Eigen::Index j = 0; j < n; ++j)
            if (!in[std::size_t(j)] && gain(j) > no_gain && (best < 0 || gain(j) > gain(best)))
                best = j;
        if (best < 0) break;
        passive.push_back(best);
        in[std::size_t(best)] = true;
        for (;;) {
            Eigen::MatrixXd sub(a.rows(), Eigen::Index(passive.size()));
            for (std::size_t k = 0; k < passive.size(); ++k)
                sub.col(Eigen::Index(k)) = a.col(passive[k]);
            const Eigen::VectorXd s = sub.completeOrthogonalDecomposition().solve(b);
            double step = 1.0;
            for (std::size_t k = 0; k < passive.size(); ++k)
                if (s(Eigen::Index(k)) <= 0.0) {
                    const double now = y(passive[k]);
                    step = std::min(step, now / (now - s(Eigen::Index(k)) + 1e-300));
                }
            for (std::size_t k = 0; k < passive.size(); ++k)
                y(passive[k]) += step * (s(Eigen::Index(k)) - y(passive[k]));
            if (step >= 1.0) break;
            std::erase_if(passive, [&](Eigen::Index j) {
                if (y(j) > 1e-14) return false;
                y(j) = 0.0;
                in[std::size_t(j)] = false;
                return true;
            });
            if (passive.empty()) break;
        }
    }
    return y;
}

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

} // namespace

Multipliers multipliers_at(const std::vector<Variable>& variables, std::span<const double> x,
                           const Evaluation& at) {
    const std::size_t n = variables.size();
    std::vector<double> scale(n);
    for (std::size_t j = 0; j < n; ++j)
        scale[j] = stretch(variables[j], x[j]);
    Eigen::VectorXd descent(n);
    for (std::size_t j = 0; j < n; ++j)
        descent(Eigen::Index(j)) = -at.gradient[j] * scale[j];

    const auto list = active_limits(variables, x, at);
    Eigen::MatrixXd normals = Eigen::MatrixXd::Zero(Eigen::Index(n), Eigen::Index(list.size()));
    for (std::size_t k = 0; k < list.size(); ++k) {
        const auto column = Eigen::Index(k);
        switch (list[k].kind) {
        case Kind::constraint:
            for (std::size_t j = 0; j < n; ++j)
                normals(Eigen::Index(j), column) = at.jacobian[list[k].index * n + j] * scale[j];
            break;
        case Kind::lower:
            normals(Eigen::Index(list[k].index), column) = -1.0;
            break;
        case Kind::upper:
            normals(Eigen::Index(list[k].index), column) = 1.0;
            break;
        }
    }
    const Eigen::VectorXd y = non_negative_least_squares(normals, descent);

    Multipliers out;
    out.constraints.assign(at.constraints.size(), 0.0);
    out.lower.assign(n, 0.0);
    out.upper.assign(n, 0.0);
    for (std::size_t k = 0; k < list.size(); ++k) {
        const double value = y(Eigen::Index(k));
        const std::size_t i = list[k].index;
        switch (list[k].kind) {
        case Kind::constraint:
            out.constraints[i] = value;
            break;
        case Kind::lower:
            out.lower[i] = value / scale[i];
            break;
        case Kind::upper:
            out.upper[i] = value / scale[i];
            break;
        }
    }
    const double size = std::max({descent.norm(), std::abs(at.objective), least_scale});
    out.residual = (descent - normals * y).norm() / size;
    return out;
}

} // namespace finwright::optimizer
