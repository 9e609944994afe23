#include "optimizer/minimise.hpp"

#include "optimizer/multipliers.hpp"
#include "optimizer/scaling.hpp"
#include <algorithm>
#include <cmath>
#include <exception>
#include <limits>
#include <nlopt.hpp>
#include <random>

namespace finwright::optimizer {

namespace {

using Clock = std::chrono::steady_clock;
using Point = std::vector<double>;

constexpr double not_a_number_objective = 1e10; // what NLopt sees where the model has no number
constexpr double not_a_number_constraint = 1e3;
constexpr double within = 0.25; // share of the tolerance a solve may use; the rest is the model's
constexpr int restarts = 3;
constexpr double anywhere = 1e30;
// How far from its centre a model is trusted, scaled: at first, and by what it shrinks from round
// to round.
constexpr double first_reach = 0.5, reach_shrinks = 0.8;

/// The budget one call of minimise() has, shared by all its solves.
struct Budget {
    const Settings& settings;
    Clock::time_point begun = Clock::now();

    bool out_of_time() const { return settings.time && Clock::now() - begun > *settings.time; }
    bool asked_to_stop() const { return settings.stop.stop_requested(); }
    bool spent() const { return out_of_time() || asked_to_stop(); }
};

double largest(std::span<const double> constraints) {
    double worst = 0.0;
    for (double c : constraints)
        worst = std::isfinite(c) ? std::max(worst, c) : not_a_number_constraint;
    return worst;
}

/// One NLopt run in scaled variables, with every evaluation watched.
class Solve {
public:
    Solve(Problem& problem, const Settings& settings, const Budget& budget)
        : problem_(problem), settings_(settings), budget_(budget),
          tolerance_(within * settings.constraint_tolerance),
          at_(problem.variables().size(), problem.constraint_count()),
          x_(problem.variables().size()) {}

    /// The best point seen: feasible with the least objective, or else the least violated.
    /// Variables stay within `reach` of the start, scaled.
    Point run(nlopt::algorithm algorithm, const Point& start, double reach = anywhere) {
        best_.clear();
        const auto& variables = problem_.variables();
        const std::size_t n = variables.size();
        Point u(n), low(n), high(n);
        for (std::size_t j = 0; j < n; ++j) {
            low[j] = to_scaled(variables[j], variables[j].lower);
            high[j] = to_scaled(variables[j], variables[j].upper);
            u[j] = std::clamp(to_scaled(variables[j], start[j]), low[j], high[j]);
            low[j] = std::max(low[j], u[j] - reach);
            high[j] = std::min(high[j], u[j] + reach);
        }
        nlopt::opt solver(algorithm, unsigned(n));
        solver.set_lower_bounds(low);
        solver.set_upper_bounds(high);
        solver.set_min_objective(&Solve::objective, this);
        if (problem_.constraint_count() > 0)
            solver.add_inequality_mconstraint(&Solve::constraints, this,
                                              Point(problem_.constraint_count(), tolerance_));
        solver.set_ftol_abs(settings_.objective_tolerance);
        solver.set_xtol_abs(settings_.step_tolerance);
        solver.set_maxeval(settings_.evaluations);
        solver_ = &solver;
        seen_ = false;
        double value = 0.0;
        try {
            ran_out_ = solver.optimize(u, value) == nlopt::MAXEVAL_REACHED;
        } catch (const nlopt::roundoff_limited&) {
            ran_out_ = false; // the record below holds the useful point
        } catch (const nlopt::forced_stop&) {
            ran_out_ = false;
        } catch (const std::runtime_error&) {
            ran_out_ = false; // a generic solver failure: judged like any other end
        }
        if (failure_) std::rethrow_exception(failure_);
        if (!budget_.spent()) look(u.data());
        return best_;
    }

    int evaluations() const { return evaluations_; }
    bool ran_out() const { return ran_out_; }

private:
    /// Evaluates at scaled u once, however often NLopt asks.
    void look(const double* u) {
        const auto& variables = problem_.variables();
        const std::size_t n = variables.size();
        if (seen_ && std::equal(u, u + n, u_.begin())) return;
        u_.assign(u, u + n);
        seen_ = true;
        for (std::size_t j = 0; j < n; ++j)
            x_[j] = from_scaled(variables[j], u[j]);
        ++evaluations_;
        problem_.evaluate(x_, at_);
        sound_ = std::isfinite(at_.objective) &&
                 std::all_of(at_.constraints.begin(), at_.constraints.end(),
                             [](double c) { return std::isfinite(c); });
        if (sound_) keep_if_better();
    }

    void keep_if_better() {
        const double violation = largest(at_.constraints);
        const bool holds = violation <= tolerance_;
        const bool held = !best_.empty() && best_violation_ <= tolerance_;
        const bool better = best_.empty() ||
                            (holds && (!held || at_.objective < best_objective_)) ||
                            (!holds && !held && violation < best_violation_);
        if (!better) return;
        best_ = x_;
        best_violation_ = violation;
        best_objective_ = at_.objective;
    }

    template <class Fill>
    void guarded(const double* u, Fill&& fill) {
        if (failure_) return;
        try {
            if (budget_.spent()) {
                solver_->force_stop();
                return;
            }
            look(u);
            fill();
        } catch (...) {
            failure_ = std::current_exception();
            solver_->force_stop();
        }
    }

    double slope(double derivative, std::size_t j) const {
        const double s = derivative * stretch(problem_.variables()[j], x_[j]);
        return std::isfinite(s) ? s : 0.0;
    }

    static double objective(unsigned n, const double* u, double* gradient, void* data) {
        auto& self = *static_cast<Solve*>(data);
        double value = not_a_number_objective;
        if (gradient) std::fill_n(gradient, n, 0.0);
        self.guarded(u, [&] {
            if (!self.sound_) return;
            value = self.at_.objective;
            if (gradient)
                for (std::size_t j = 0; j < n; ++j)
                    gradient[j] = self.slope(self.at_.gradient[j], j);
        });
        return value;
    }

    static void constraints(unsigned m, double* values, unsigned n, const double* u,
                            double* gradient, void* data) {
        auto& self = *static_cast<Solve*>(data);
        std::fill_n(values, m, not_a_number_constraint);
        if (gradient) std::fill_n(gradient, std::size_t(m) * n, 0.0);
        self.guarded(u, [&] {
            if (!self.sound_) return;
            std::copy(self.at_.constraints.begin(), self.at_.constraints.end(), values);
            if (gradient)
                for (std::size_t i = 0; i < m; ++i)
                    for (std::size_t j = 0; j < n; ++j)
                        gradient[i * n + j] = self.slope(self.at_.jacobian[i * n + j], j);
        });
    }

    Problem& problem_;
    const Settings& settings_;
    const Budget& budget_;
    const double tolerance_;
    Evaluation at_;
    Point x_, u_, best_;
    double best_violation_ = 0.0, best_objective_ = 0.0;
    bool seen_ = false, sound_ = false, ran_out_ = false;
    int evaluations_ = 0;
    std::exception_ptr failure_;
    nlopt::opt* solver_ = nullptr;
};

/// A point with what judge() and the derivatives say of it.
struct Judged {
    Point x;
    double objective = std::numeric_limits<double>::infinity();
    Point constraints;
    double violation = std::numeric_limits<double>::infinity();
    Multipliers multipliers;

    bool holds(const Settings& s) const { return violation <= s.constraint_tolerance; }
};

/// By the model as it is centred: what the solver itself works on.
Judged by_model(Problem& problem, const Point& x) {
    Evaluation at(problem.variables().size(), problem.constraint_count());
    problem.evaluate(x, at);
    Judged j;
    j.x = x;
    j.objective = at.objective;
    j.violation = std::isfinite(at.objective) ? largest(at.constraints) : not_a_number_constraint;
    j.multipliers = multipliers_at(problem.variables(), x, at);
    j.constraints = std::move(at.constraints);
    return j;
}

/// As exactly as the problem can be judged.
Judged exactly(Problem& problem, Judged j) {
    problem.judge(j.x, j.objective, j.constraints);
    j.violation = std::isfinite(j.objective) ? largest(j.constraints) : not_a_number_constraint;
    return j;
}

bool better(const Judged& a, const Judged& b, const Settings& s) {
    if (a.holds(s) != b.holds(s)) return a.holds(s);
    return a.holds(s) ? a.objective < b.objective : a.violation < b.violation;
}

/// From one start: solve, restart while not stationary, and move the model's centre until it stands
/// still.
class Descent {
public:
    Descent(Problem& problem, const Settings& settings, const Budget& budget)
        : problem_(problem), settings_(settings), solve_(problem, settings, budget),
          budget_(budget) {}

    Judged from(const Point& start) {
        Judged best = settled(start, anywhere);
        double reach = first_reach;
        for (int round = 0; round < settings_.recentres && !budget_.spent(); ++round) {
            if (!problem_.recentre(best.x)) break;
            best =
                settled(best.x, reach); // the model moved: what was judged before is judged again
            reach *= reach_shrinks;
        }
        return best;
    }

    const Solve& solve() const { return solve_; }

private:
    Judged settled(const Point& start, double reach) {
        Point x = solve_.run(nlopt::LD_SLSQP, start, reach);
        if (x.empty()) x = start;
        Judged best = by_model(problem_, x);
        for (int again = 0; again < restarts && !budget_.spent() && !stationary(best); ++again) {
            const Point next = solve_.run(nlopt::LD_SLSQP, best.x, reach);
            if (next.empty()) break;
            Judged j = by_model(problem_, next);
            const bool gained =
                better(j, best, settings_) || j.multipliers.residual < best.multipliers.residual;
            if (better(j, best, settings_)) best = std::move(j);
            if (!gained) break;
        }
        return best;
    }

    bool stationary(const Judged& j) const {
        return j.holds(settings_) && j.multipliers.residual <= settings_.residual_tolerance;
    }

    Problem& problem_;
    const Settings& settings_;
    Solve solve_;
    const Budget& budget_;
};

std::vector<Point> all_starts(const Problem& problem, const Settings& settings) {
    std::vector<Point> starts = problem.starts();
    std::mt19937_64 engine(settings.seed);
    std::uniform_real_distribution<double> share(0.0, 1.0);
    for (int r = 0; r < settings.random_starts; ++r) {
        Point x;
        for (const Variable& v : problem.variables()) {
            const double low = to_scaled(v, v.lower), high = to_scaled(v, v.upper);
            x.push_back(from_scaled(v, low + share(engine) * (high - low)));
        }
        starts.push_back(std::move(x));
    }
    return starts;
}

/// min s subject to c_i(x) <= s: the largest constraint as small as it can be.
class Elastic final : public Problem {
public:
    explicit Elastic(Problem& inner)
        : inner_(inner), variables_(inner.variables()),
          at_(inner.variables().size(), inner.constraint_count()) {
        variables_.push_back({"largest constraint", -1e3, 1e3, Scale::linear});
    }

    const std::vector<Variable>& variables() const override { return variables_; }
    std::size_t constraint_count() const override { return inner_.constraint_count(); }

    void evaluate(std::span<const double> x, Evaluation& out) override {
        const std::size_t n = x.size() - 1;
        inner_.evaluate(x.first(n), at_);
        out.objective = x[n];
        std::fill(out.gradient.begin(), out.gradient.end(), 0.0);
        out.gradient[n] = 1.0;
        for (std::size_t i = 0; i < at_.constraints.size(); ++i) {
            out.constraints[i] = at_.constraints[i] - x[n];
            for (std::size_t j = 0; j < n; ++j)
                out.jacobian[i * (n + 1) + j] = at_.jacobian[i * n + j];
            out.jacobian[i * (n + 1) + n] = -1.0;
        }
    }

    void judge(std::span<const double> x, double& objective,
               std::span<double> constraints) override {
        double unused = 0.0;
        inner_.judge(x.first(x.size() - 1), unused, constraints);
        objective = x.back();
        for (double& c : constraints)
            c -= x.back();
    }

    bool recentre(std::span<const double> x) override {
        return inner_.recentre(x.first(x.size() - 1));
    }

    std::vector<Point> starts() const override {
        std::vector<Point> list = inner_.starts();
        for (Point& x : list)
            x.push_back(largest_constraint(x));
        return list;
    }

    double largest_constraint(std::span<const double> x) const {
        double unused = 0.0;
        Point constraints(inner_.constraint_count());
        inner_.judge(x, unused, constraints);
        return std::clamp(*std::max_element(constraints.begin(), constraints.end()), -1e3, 1e3);
    }

private:
    Problem& inner_;
    std::vector<Variable> variables_;
    mutable Evaluation at_;
};

Judged best_of_starts(Problem& problem, Descent& descent, const Budget& budget,
                      const Settings& settings) {
    Judged best;
    for (const Point& start : all_starts(problem, settings)) {
        Judged j = descent.from(start);
        if (best.x.empty() || better(j, best, settings)) best = std::move(j);
        if (budget.spent()) break;
        if (best.holds(settings) && best.objective > settings.hopeless_above) break;
    }
    return best;
}

Stop stop_of(const Budget& budget, const Solve& solve) {
    if (budget.asked_to_stop()) return Stop::asked;
    if (budget.out_of_time()) return Stop::time;
    return solve.ran_out() ? Stop::evaluations : Stop::converged;
}

Verdict verdict_of(const Judged& j, const Budget& budget) {
    const Settings& s = budget.settings;
    if (!j.holds(s)) return budget.spent() ? Verdict::limit_reached : Verdict::infeasible;
    return j.multipliers.residual <= s.residual_tolerance ? Verdict::optimal : Verdict::feasible;
}

Outcome outcome_of(Judged j, const Budget& budget, const Solve& solve) {
    Outcome out;
    out.verdict = verdict_of(j, budget);
    out.stop = stop_of(budget, solve);
    out.worst_violation = j.violation;
    out.objective = j.objective;
    out.kkt_residual = j.multipliers.residual;
    out.x = std::move(j.x);
    out.constraints = std::move(j.constraints);
    out.multipliers = std::move(j.multipliers.constraints);
    out.lower_multipliers = std::move(j.multipliers.lower);
    out.upper_multipliers = std::move(j.multipliers.upper);
    out.evaluations = solve.evaluations();
    return out;
}

/// From a point that keeps the limits least badly, once more towards the objective.
Judged repaired(Problem& problem, Descent& descent, Judged best, const Settings& settings) {
    const Outcome least = least_violation(problem, settings);
    if (least.x.empty()) return best;
    const Point x(least.x.begin(), least.x.end());
    Judged at = by_model(problem, x);
    if (better(at, best, settings)) best = at;
    if (!at.holds(settings)) return best;
    Judged again = descent.from(x);
    return better(again, best, settings) ? again : best;
}

/// A derivative-free last attempt where a feasible point is not stationary by its derivatives.
Judged without_derivatives(Problem& problem, Solve& solve, Judged best, const Settings& settings) {
    const Point x = solve.run(nlopt::LN_COBYLA, best.x);
    if (x.empty()) return best;
    Judged j = by_model(problem, x);
    return better(j, best, settings) ? j : best;
}

} // namespace

Outcome minimise(Problem& problem, const Settings& settings) {
    const Budget budget{settings};
    if (problem.variables().empty()) {
        Solve unused(problem, settings, budget);
        return outcome_of(exactly(problem, by_model(problem, {})), budget, unused);
    }
    Descent descent(problem, settings, budget);
    Judged best = best_of_starts(problem, descent, budget, settings);
    if (!best.holds(settings) && settings.repairs > 0 && !budget.spent())
        best = repaired(problem, descent, std::move(best), settings);
    if (best.holds(settings) && best.multipliers.residual > settings.residual_tolerance &&
        !budget.spent()) {
        Solve fallback(problem, settings, budget);
        best = without_derivatives(problem, fallback, std::move(best), settings);
    }
    return outcome_of(exactly(problem, std::move(best)), budget, descent.solve());
}

Outcome least_violation(Problem& problem, const Settings& settings) {
    Elastic elastic(problem);
    const Budget budget{settings};
    Descent descent(elastic, settings, budget);
    Judged best = best_of_starts(elastic, descent, budget, settings);
    Outcome out = outcome_of(std::move(best), budget, descent.solve());
    out.x.pop_back();
    out.lower_multipliers.pop_back();
    out.upper_multipliers.pop_back();
    problem.judge(out.x, out.objective, out.constraints);
    out.objective = *std::max_element(out.constraints.begin(), out.constraints.end());
    out.worst_violation = std::max(0.0, out.objective);
    if (out.verdict != Verdict::limit_reached)
        out.verdict = out.objective <= settings.constraint_tolerance ? Verdict::feasible
                                                                     : Verdict::infeasible;
    return out;
}

} // namespace finwright::optimizer
