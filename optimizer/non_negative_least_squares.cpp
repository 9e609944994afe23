#include "optimizer/non_negative_least_squares.hpp"

#include <Eigen/Dense>
#include <algorithm>

namespace finwright::optimizer {

namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

constexpr double no_gain = 1e-13; // of the product of the norms

/// The columns that are not held at zero, and the least squares over them alone.
class Passive {
public:
    explicit Passive(const Eigen::Map<const MatrixXd>& a)
        : a_(a), in_(std::size_t(a.cols()), false) {}

    bool contains(Index j) const { return in_[std::size_t(j)]; }
    bool empty() const { return columns_.empty(); }

    void add(Index j) {
        columns_.push_back(j);
        in_[std::size_t(j)] = true;
    }

    /// From y towards the unconstrained least squares, as far as no part of y turns negative. True
    /// when all the way.
    bool step(VectorXd& y, const VectorXd& b) {
        MatrixXd sub(a_.rows(), Index(columns_.size()));
        for (std::size_t k = 0; k < columns_.size(); ++k)
            sub.col(Index(k)) = a_.col(columns_[k]);
        const VectorXd goal = sub.completeOrthogonalDecomposition().solve(b);
        double share = 1.0;
        std::size_t blocking = columns_.size();
        for (std::size_t k = 0; k < columns_.size(); ++k) {
            const double now = y(columns_[k]), then = goal(Index(k));
            if (then > 0.0) continue;
            const double allowed = now > 0.0 ? now / (now - then) : 0.0;
            if (allowed <= share) {
                share = allowed;
                blocking = k;
            }
        }
        for (std::size_t k = 0; k < columns_.size(); ++k)
            y(columns_[k]) += share * (goal(Index(k)) - y(columns_[k]));
        if (blocking == columns_.size()) return true;
        y(columns_[blocking]) = 0.0;
        std::erase_if(columns_, [&](Index j) {
            if (y(j) > 0.0) return false;
            y(j) = 0.0;
            in_[std::size_t(j)] = false;
            return true;
        });
        return false;
    }

private:
    Eigen::Map<const MatrixXd> a_;
    std::vector<Index> columns_;
    std::vector<bool> in_;
};

/// The column outside that promises most, or -1.
Index most_promising(const Passive& passive, const VectorXd& gain, const VectorXd& noise) {
    Index best = -1;
    for (Index j = 0; j < gain.size(); ++j)
        if (!passive.contains(j) && gain(j) > noise(j) && (best < 0 || gain(j) > gain(best)))
            best = j;
    return best;
}

} // namespace

std::vector<double> non_negative_least_squares(std::span<const double> a_columns,
                                               std::span<const double> b_values) {
    const Index rows = Index(b_values.size()), columns = Index(a_columns.size()) / rows;
    const Eigen::Map<const MatrixXd> a(a_columns.data(), rows, columns);
    const VectorXd b = Eigen::Map<const VectorXd>(b_values.data(), rows);
    const VectorXd noise = no_gain * b.norm() * a.colwise().norm().transpose();
    VectorXd y = VectorXd::Zero(columns);
    Passive passive(a);
    for (Index round = 0; round < 3 * columns + 10; ++round) {
        const Index j = most_promising(passive, a.transpose() * (b - a * y), noise);
        if (j < 0) break;
        passive.add(j);
        while (!passive.empty() && !passive.step(y, b)) {
        }
    }
    return {y.data(), y.data() + y.size()};
}

} // namespace finwright::optimizer
