#pragma once
// Nonlinear least squares for the fits this project makes.

#include <Eigen/Dense>

namespace finwright::tests {

/// The coefficients that make the residuals' sum of squares least: Levenberg-Marquardt (Marquardt
/// 1963) from a start, slopes by differences.
template <class Residuals>
Eigen::VectorXd least_squares(Eigen::VectorXd c, const Residuals& residuals) {
    Eigen::VectorXd r = residuals(c);
    double damping = 1e-2;
    for (int step = 0; step < 500 && damping < 1e12; ++step) {
        Eigen::MatrixXd slopes(r.size(), c.size());
        for (Eigen::Index j = 0; j < c.size(); ++j) {
            Eigen::VectorXd moved = c;
            moved[j] += 1e-6;
            slopes.col(j) = (residuals(moved) - r) / 1e-6;
        }
        Eigen::MatrixXd normal = slopes.transpose() * slopes;
        normal.diagonal() *= 1.0 + damping;
        const Eigen::VectorXd next = c - normal.ldlt().solve(slopes.transpose() * r);
        const Eigen::VectorXd there = residuals(next);
        if (there.allFinite() && there.squaredNorm() < r.squaredNorm()) {
            c = next;
            r = there;
            damping /= 3.0;
        } else {
            damping *= 4.0;
        }
    }
    return c;
}

} // namespace finwright::tests
