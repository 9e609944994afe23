#pragma once
// One NLopt run in scaled variables, with every evaluation watched: exceptions come out whole,
// NLopt never sees anything but finite numbers, and the best point seen is kept, whatever NLopt
// returns.

#include "optimizer/effort.hpp"
#include "optimizer/problem.hpp"
#include <exception>
#include <limits>

namespace nlopt {
class opt;
}

namespace finwright::optimizer {

enum class Method {
    sequential_quadratic, ///< SLSQP (Kraft 1994)
    linear_approximations ///< COBYLA (Powell 1994), without derivatives
};

class Solve {
public:
    Solve(Problem& problem, const Settings& settings, Effort& effort);

    /// The best point seen: feasible with the least objective, or else the least violated; empty
    /// when none had numbers. Variables stay within `reach` of the start, scaled.
    std::vector<double> run(Method method, const std::vector<double>& start,
                            double reach = std::numeric_limits<double>::infinity());

private:
    void look(const double* u);
    void keep_if_better();
    template <class Fill>
    void guarded(const double* u, Fill&& fill);
    double slope(double derivative, std::size_t j) const;

    static double objective(unsigned n, const double* u, double* gradient, void* data);
    static void constraints(unsigned m, double* values, unsigned n, const double* u,
                            double* gradient, void* data);

    Problem& problem_;
    const Settings& settings_;
    Effort& effort_;
    Evaluation at_;
    std::vector<double> x_, u_, best_;
    double best_violation_ = 0.0, best_objective_ = 0.0;
    bool seen_ = false, sound_ = false;
    std::exception_ptr failure_;
    nlopt::opt* solver_ = nullptr;
};

} // namespace finwright::optimizer
