#include "optimizer/minimise.hpp"

#include "optimizer/descent.hpp"
#include "optimizer/elastic.hpp"
#include "optimizer/restore.hpp"
#include "optimizer/scaling.hpp"
#include <algorithm>
#include <cmath>
#include <random>
#include <stdexcept>

namespace finwright::optimizer {

namespace {

using Points = std::vector<std::vector<double>>;

constexpr int least_violation_starts = 2; // besides those the search began from

void check(const Variable& v) {
    if (!std::isfinite(v.lower) || !std::isfinite(v.upper) || v.lower > v.upper)
        throw std::invalid_argument(v.name + ": its bounds are crossed or not finite");
    if (v.scale == Scale::logarithmic && v.lower <= 0.0)
        throw std::invalid_argument(v.name + ": on a logarithmic scale its bounds are positive");
}

void check(const std::vector<double>& start, const std::vector<Variable>& variables) {
    if (start.size() != variables.size())
        throw std::invalid_argument("a start has one number for each variable");
    for (std::size_t j = 0; j < start.size(); ++j)
        if (std::isnan(start[j]))
            throw std::invalid_argument(variables[j].name + ": a start has no number for it");
}

Points random_points(const std::vector<Variable>& variables, int count, std::uint64_t seed) {
    std::mt19937_64 engine(seed);
    std::uniform_real_distribution<double> share(0.0, 1.0);
    Points points;
    for (int k = 0; k < count; ++k) {
        points.emplace_back();
        for (const Variable& v : variables) {
            const double low = to_scaled(v, v.lower), high = to_scaled(v, v.upper);
            points.back().push_back(from_scaled(v, low + share(engine) * (high - low)));
        }
    }
    return points;
}

void append(Points& points, const Points& more) {
    points.insert(points.end(), more.begin(), more.end());
}

Points all_starts(const Problem& problem, int random, std::uint64_t seed) {
    const auto& variables = problem.variables();
    for (const Variable& v : variables)
        check(v);
    Points starts = problem.starts();
    for (auto& x : starts) {
        check(x, variables);
        for (std::size_t j = 0; j < x.size(); ++j)
            x[j] = std::clamp(x[j], variables[j].lower, variables[j].upper);
    }
    append(starts, random_points(variables, random, seed));
    if (starts.empty()) throw std::invalid_argument("a search needs a start");
    return starts;
}

/// Half-way, scaled, from a point to random ones: wide bounds have corners where nothing is
/// sensible.
Points scattered_about(const std::vector<double>& x, const Problem& problem,
                       const Settings& settings) {
    const auto& variables = problem.variables();
    Points points = random_points(variables, least_violation_starts, settings.seed);
    for (auto& point : points)
        for (std::size_t j = 0; j < x.size(); ++j)
            point[j] = from_scaled(variables[j], 0.5 * (to_scaled(variables[j], x[j]) +
                                                        to_scaled(variables[j], point[j])));
    return points;
}

/// From each start until time is up, or a feasible end lies above what is worth finding.
Judged best_of(const Points& starts, Problem& problem, const Settings& settings, double enough,
               Effort& effort) {
    Descent descent(problem, settings, effort);
    Judged best;
    for (const auto& start : starts) {
        Judged j = descent.from(start);
        if (best.x.empty() || better(j, best, settings)) best = std::move(j);
        if (effort.spent()) break;
        if (best.holds(settings) && best.objective > settings.hopeless_above) break;
        if (best.holds(settings) && best.objective < enough) break;
    }
    return best;
}

/// The least violated point found from these starts, as judge() has it, its objective the largest
/// constraint. Only the end of all is re-centred on.
Judged least_violated(const Points& starts, Problem& problem, const Settings& settings,
                      Effort& effort) {
    Elastic elastic(problem, starts);
    Settings plain = settings;
    plain.hopeless_above = std::numeric_limits<double>::infinity();
    plain.recentres = 0;
    Judged best = best_of(elastic.starts(), elastic, plain, 0.0, effort);
    plain.recentres = settings.recentres;
    if (settings.recentres > 0 && best.defined() && !effort.spent() && elastic.recentre(best.x))
        best = Descent(elastic, plain, effort).from(best.x);
    best.x.pop_back();
    best.multipliers.lower.pop_back();
    best.multipliers.upper.pop_back();
    best = exactly(problem, std::move(best));
    if (best.defined())
        best.objective = *std::max_element(best.constraints.begin(), best.constraints.end());
    return best;
}

/// Whether the point is feasible, or what the effort so far tells if it is not.
Verdict verdict_of(const Judged& j, bool least_violation_settled, const Settings& settings,
                   const Effort& effort) {
    if (j.stationary(settings)) return Verdict::optimal;
    if (j.holds(settings)) return Verdict::feasible;
    return least_violation_settled && !effort.spent() ? Verdict::infeasible
                                                      : Verdict::limit_reached;
}

Stop stop_of(Verdict verdict, const Effort& effort) {
    if (effort.asked_to_stop()) return Stop::asked;
    if (effort.out_of_time()) return Stop::time;
    return effort.a_solve_ran_out && verdict != Verdict::optimal ? Stop::evaluations
                                                                 : Stop::converged;
}

Outcome outcome_of(Judged j, Verdict verdict, const Effort& effort) {
    Outcome out;
    out.verdict = verdict;
    out.stop = stop_of(verdict, effort);
    out.worst_violation = j.violation;
    out.objective = j.objective;
    out.kkt_residual = j.multipliers.residual;
    out.x = std::move(j.x);
    out.constraints = std::move(j.constraints);
    out.multipliers = std::move(j.multipliers.constraints);
    out.lower_multipliers = std::move(j.multipliers.lower);
    out.upper_multipliers = std::move(j.multipliers.upper);
    out.evaluations = effort.evaluations;
    out.undefined = effort.undefined;
    return out;
}

/// One call of minimise(), stage by stage.
class Search {
public:
    Search(Problem& problem, const Settings& settings)
        : problem_(problem), settings_(settings), effort_(settings),
          starts_(all_starts(problem, settings.random_starts, settings.seed)) {}

    Outcome run() {
        constexpr double never = -std::numeric_limits<double>::infinity();
        best_ = exactly(problem_, best_of(starts_, problem_, settings_, never, effort_));
        if (settings_.repair) find_feasible();
        if (best_.holds(settings_) && !best_.stationary(settings_) && !effort_.spent())
            try_without_derivatives();
        if (settings_.repair && best_.holds(settings_)) keep_strictly();
        const Verdict verdict = verdict_of(best_, least_violation_settled_, settings_, effort_);
        return outcome_of(std::move(best_), verdict, effort_);
    }

private:
    void find_feasible() {
        if (best_.holds(settings_) || effort_.spent()) return;
        centre_on_best();
        continue_from(restored(problem_, best_, settings_, effort_));
        if (best_.holds(settings_) || effort_.spent() || best_.constraints.empty()) return;
        Points starts{best_.x};
        const Points more =
            all_starts(problem_, settings_.random_starts + least_violation_starts, settings_.seed);
        starts.insert(starts.end(), more.begin(), more.end());
        const Judged least = least_violated(starts, problem_, settings_, effort_);
        least_violation_settled_ = least.multipliers.residual <= settings_.residual_tolerance;
        if (least.holds(settings_))
            continue_from(exactly(problem_, by_model(problem_, least.x, effort_)));
        else if (better(least, best_, settings_))
            take(exactly(problem_, by_model(problem_, least.x, effort_)));
    }

    /// From a point that may be feasible, once more towards the objective.
    void continue_from(const Judged& at) {
        take(at);
        if (!at.holds(settings_) || effort_.spent()) return;
        Descent descent(problem_, settings_, effort_);
        take(exactly(problem_, descent.from(at.x)));
    }

    /// Another start may have moved the model away.
    void centre_on_best() {
        if (settings_.recentres > 0 && best_.defined()) problem_.recentre(best_.x);
    }

    /// Where a feasible point is not stationary by its derivatives.
    void try_without_derivatives() {
        centre_on_best();
        Solve solve(problem_, settings_, effort_);
        const auto x = solve.run(Method::linear_approximations, best_.x);
        if (!x.empty()) take(exactly(problem_, by_model(problem_, x, effort_)));
    }

    void keep_strictly() {
        if (best_.violation <= settings_.strict_tolerance || effort_.spent()) return;
        centre_on_best();
        Judged strict = restored(problem_, best_, settings_, effort_);
        if (strict.violation < best_.violation) best_ = std::move(strict);
    }

    void take(Judged j) {
        if (better(j, best_, settings_)) best_ = std::move(j);
    }

    Problem& problem_;
    const Settings& settings_;
    Effort effort_;
    Points starts_;
    Judged best_;
    bool least_violation_settled_ = false;
};

} // namespace

Outcome minimise(Problem& problem, const Settings& settings) {
    if (!problem.variables().empty()) return Search(problem, settings).run();
    Effort effort(settings);
    Judged only = exactly(problem, by_model(problem, {}, effort));
    const Verdict verdict = verdict_of(only, true, settings, effort);
    return outcome_of(std::move(only), verdict, effort);
}

Outcome least_violation(Problem& problem, const Settings& settings) {
    if (problem.constraint_count() == 0)
        throw std::invalid_argument("the least violation of a problem without constraints");
    Effort effort(settings);
    Points starts = all_starts(problem, settings.random_starts, settings.seed);
    append(starts, scattered_about(starts.front(), problem, settings));
    Judged least = least_violated(starts, problem, settings, effort);
    Verdict verdict = Verdict::feasible;
    if (!least.holds(settings))
        verdict = verdict_of(least, least.multipliers.residual <= settings.residual_tolerance,
                             settings, effort);
    return outcome_of(std::move(least), verdict, effort);
}

} // namespace finwright::optimizer
