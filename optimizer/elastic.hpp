#pragma once
// The elastic form of a problem: min s subject to c_i(x) <= s, with s as one more variable.

#include "optimizer/problem.hpp"

namespace finwright::optimizer {

class Elastic final : public Problem {
public:
    /// Searched from these points of the inner problem. s ranges to twice the largest violation
    /// there, and as far below zero.
    Elastic(Problem& inner, const std::vector<std::vector<double>>& starts);

    const std::vector<Variable>& variables() const override { return variables_; }
    std::size_t constraint_count() const override { return inner_.constraint_count(); }
    void evaluate(std::span<const double> x, Evaluation& out) override;
    void judge(std::span<const double> x, double& objective,
               std::span<double> constraints) override;
    bool recentre(std::span<const double> x) override;
    std::vector<std::vector<double>> starts() const override { return starts_; }

private:
    Problem& inner_;
    std::vector<Variable> variables_;
    std::vector<std::vector<double>> starts_;
    Evaluation at_;
};

} // namespace finwright::optimizer
