#include "optimizer/solve.hpp"

#include "optimizer/judged.hpp"
#include "optimizer/scaling.hpp"
#include <algorithm>
#include <cmath>
#include <nlopt.hpp>
#include <utility>

namespace finwright::optimizer {

namespace {

// What NLopt sees where the model has no number.
constexpr double undefined_objective = 1e10, undefined_constraint = 1e3;

nlopt::algorithm algorithm_of(Method method) {
    return method == Method::sequential_quadratic ? nlopt::LD_SLSQP : nlopt::LN_COBYLA;
}

} // namespace

Solve::Solve(Problem& problem, const Settings& settings, Effort& effort)
    : problem_(problem), settings_(settings), effort_(effort),
      at_(problem.variables().size(), problem.constraint_count()), x_(problem.variables().size()) {}

std::vector<double> Solve::run(Method method, const std::vector<double>& start, double reach) {
    best_.clear();
    const auto& variables = problem_.variables();
    const std::size_t n = variables.size();
    std::vector<double> u(n), low(n), high(n);
    for (std::size_t j = 0; j < n; ++j) {
        const Variable& v = variables[j];
        u[j] = to_scaled(v, std::clamp(start[j], v.lower, v.upper));
        low[j] = std::max(to_scaled(v, v.lower), u[j] - reach);
        high[j] = std::min(to_scaled(v, v.upper), u[j] + reach);
    }
    nlopt::opt solver(algorithm_of(method), unsigned(n));
    solver.set_lower_bounds(low);
    solver.set_upper_bounds(high);
    solver.set_min_objective(&Solve::objective, this);
    if (problem_.constraint_count() > 0)
        solver.add_inequality_mconstraint(
            &Solve::constraints, this,
            std::vector<double>(problem_.constraint_count(), settings_.constraint_tolerance));
    solver.set_ftol_abs(settings_.objective_tolerance);
    solver.set_xtol_abs(settings_.step_tolerance);
    solver.set_maxeval(settings_.evaluations);
    solver_ = &solver;
    seen_ = false;
    double value = 0.0;
    try {
        if (solver.optimize(u, value) == nlopt::MAXEVAL_REACHED) effort_.a_solve_ran_out = true;
    } catch (const nlopt::roundoff_limited&) { // the record holds the useful point
    } catch (const nlopt::forced_stop&) {
    } catch (const std::runtime_error&) { // a generic solver failure: judged like any other end
    }
    if (failure_) std::rethrow_exception(std::exchange(failure_, nullptr));
    if (!effort_.spent()) look(u.data());
    return best_;
}

/// Evaluates at scaled u once, however often NLopt asks.
void Solve::look(const double* u) {
    const auto& variables = problem_.variables();
    const std::size_t n = variables.size();
    if (seen_ && std::equal(u, u + n, u_.begin())) return;
    u_.assign(u, u + n);
    seen_ = true;
    for (std::size_t j = 0; j < n; ++j)
        x_[j] = from_scaled(variables[j], u[j]);
    sound_ = evaluate(problem_, x_, at_, effort_);
    if (sound_) keep_if_better();
}

void Solve::keep_if_better() {
    const double violation = worst_violation(at_.constraints);
    const bool holds = violation <= settings_.constraint_tolerance;
    const bool held = !best_.empty() && best_violation_ <= settings_.constraint_tolerance;
    const bool better = best_.empty() || (holds && (!held || at_.objective < best_objective_)) ||
                        (!holds && !held && violation < best_violation_);
    if (!better) return;
    best_ = x_;
    best_violation_ = violation;
    best_objective_ = at_.objective;
}

template <class Fill>
void Solve::guarded(const double* u, Fill&& fill) {
    if (failure_) return;
    try {
        if (effort_.spent()) {
            solver_->force_stop();
            return;
        }
        look(u);
        if (sound_) fill();
    } catch (...) {
        failure_ = std::current_exception();
        solver_->force_stop();
    }
}

double Solve::slope(double derivative, std::size_t j) const {
    const double s = derivative * stretch(problem_.variables()[j], x_[j]);
    return std::isfinite(s) ? s : 0.0;
}

double Solve::objective(unsigned n, const double* u, double* gradient, void* data) {
    auto& self = *static_cast<Solve*>(data);
    double value = undefined_objective;
    if (gradient) std::fill_n(gradient, n, 0.0);
    self.guarded(u, [&] {
        value = self.at_.objective;
        if (gradient)
            for (std::size_t j = 0; j < n; ++j)
                gradient[j] = self.slope(self.at_.gradient[j], j);
    });
    return value;
}

void Solve::constraints(unsigned m, double* values, unsigned n, const double* u, double* gradient,
                        void* data) {
    auto& self = *static_cast<Solve*>(data);
    std::fill_n(values, m, undefined_constraint);
    if (gradient) std::fill_n(gradient, std::size_t(m) * n, 0.0);
    self.guarded(u, [&] {
        std::copy(self.at_.constraints.begin(), self.at_.constraints.end(), values);
        if (gradient)
            for (std::size_t i = 0; i < m; ++i)
                for (std::size_t j = 0; j < n; ++j)
                    gradient[i * n + j] = self.slope(self.at_.jacobian[i * n + j], j);
    });
}

} // namespace finwright::optimizer
