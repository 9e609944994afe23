#pragma once
// A bounded problem with inequality constraints:  min f(x)  subject to  c(x) <= 0,  lower <= x <=
// upper.

#include <cstddef>
#include <span>
#include <string>
#include <vector>

namespace finwright::optimizer {

/// How a variable is searched: as it is, or as its logarithm (positive variables of multiplicative
/// nature).
enum class Scale { linear, logarithmic };

struct Variable {
    std::string name;
    double lower = 0.0, upper = 0.0;
    Scale scale = Scale::linear;
};

/// Values and exact first derivatives with respect to the variables as they are, unscaled.
struct Evaluation {
    double objective = 0.0;
    std::vector<double> gradient;    ///< n
    std::vector<double> constraints; ///< m, hold when <= 0
    std::vector<double> jacobian;    ///< m x n, row by row

    Evaluation() = default;
    Evaluation(std::size_t variables, std::size_t constraint_count)
        : gradient(variables), constraints(constraint_count),
          jacobian(constraint_count * variables) {}
};

class Problem {
public:
    virtual ~Problem() = default;

    virtual const std::vector<Variable>& variables() const = 0;
    virtual std::size_t constraint_count() const = 0;

    /// Fills `out`, which has the right sizes. Where the model has no value it says so with a
    /// number that is not finite, or throws std::domain_error: the search walks around such points
    /// and counts them. Any other exception ends the search and arrives whole. The same holds for
    /// judge().
    virtual void evaluate(std::span<const double> x, Evaluation& out) = 0;

    /// Objective and constraints as exactly as the model knows them; verdicts rest on these.
    virtual void judge(std::span<const double> x, double& objective, std::span<double> constraints);

    /// For problems that replace an expensive part of evaluate() by a model which agrees with
    /// judge() in value and slope at a centre (first-order consistent: Alexandrov & Lewis 2001).
    /// Moves the centre to x; true when that changed the model materially, so that solving again
    /// from x is worthwhile.
    virtual bool recentre(std::span<const double> x);

    /// Points to start from; by default the middle of the bounds, geometric where the scale is
    /// logarithmic.
    virtual std::vector<std::vector<double>> starts() const;
};

} // namespace finwright::optimizer
