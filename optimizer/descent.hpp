#pragma once
// From one start to a local minimum: solve, restart while not stationary, and move the model's
// centre until it stands still.

#include "optimizer/judged.hpp"
#include "optimizer/solve.hpp"

namespace finwright::optimizer {

class Descent {
public:
    Descent(Problem& problem, const Settings& settings, Effort& effort);

    /// Judged by the model, which is exact when it stood still, and exactly when it did not.
    Judged from(const std::vector<double>& start);

private:
    Judged settled(const std::vector<double>& start, double reach);

    Problem& problem_;
    const Settings& settings_;
    Effort& effort_;
    Solve solve_;
};

} // namespace finwright::optimizer
