#include "optimizer/enumerate.hpp"

#include <algorithm>
#include <atomic>
#include <chrono>
#include <cmath>
#include <cstdlib>
#include <exception>
#include <limits>
#include <mutex>
#include <thread>

namespace finwright::optimizer {

namespace {

// Combinations are solved in blocks of this many, each from its neighbour's end; blocks start cold
// and are what threads share out, so that the result does not depend on their number.
constexpr std::size_t block = 8;
constexpr double nearly_feasible = 0.05; // a violation the first model may be to blame for
constexpr double rough_residual = 0.01;  // stationary enough for a violation far from zero

std::vector<std::vector<int>> combinations(std::span<const IntegerRange> ranges) {
    std::vector<std::vector<int>> all{{}};
    for (const IntegerRange& range : ranges) {
        std::vector<std::vector<int>> longer;
        for (const auto& head : all)
            for (int value = range.from; value <= range.to; ++value) {
                longer.push_back(head);
                longer.back().push_back(value);
            }
        all = std::move(longer);
    }
    return all;
}

/// The time all solves share.
class Deadline {
public:
    explicit Deadline(const Settings& settings) : time_(settings.time) {}

    Settings left_of(Settings settings) const {
        if (time_) settings.time = *time_ - (Clock::now() - begun_);
        return settings;
    }

private:
    using Clock = std::chrono::steady_clock;
    std::optional<std::chrono::duration<double>> time_;
    Clock::time_point begun_ = Clock::now();
};

/// Runs work(i) for i < count on `threads` threads; the first exception comes back to the caller.
template <class Work>
void in_parallel(std::size_t count, int threads, Work&& work) {
    std::atomic<std::size_t> next{0};
    std::exception_ptr failure;
    std::mutex failing;
    const auto loop = [&] {
        for (std::size_t i = next++; i < count; i = next++) {
            try {
                work(i);
            } catch (...) {
                const std::scoped_lock lock(failing);
                if (!failure) failure = std::current_exception();
                next = count;
            }
        }
    };
    {
        std::vector<std::jthread> pool;
        for (int t = 1; t < threads; ++t)
            pool.emplace_back(loop);
        loop();
    }
    if (failure) std::rethrow_exception(failure);
}

/// A problem with other starting points.
class Restarted final : public Problem {
public:
    Restarted(Problem& inner, std::vector<std::vector<double>> starts)
        : inner_(inner), starts_(std::move(starts)) {}
    const std::vector<Variable>& variables() const override { return inner_.variables(); }
    std::size_t constraint_count() const override { return inner_.constraint_count(); }
    void evaluate(std::span<const double> x, Evaluation& out) override { inner_.evaluate(x, out); }
    void judge(std::span<const double> x, double& f, std::span<double> c) override {
        inner_.judge(x, f, c);
    }
    bool recentre(std::span<const double> x) override { return inner_.recentre(x); }
    std::vector<std::vector<double>> starts() const override { return starts_; }

private:
    Problem& inner_;
    std::vector<std::vector<double>> starts_;
};

/// Where a neighbour ended, in place of the problem's own first start.
std::vector<std::vector<double>> starts_after(const Problem& problem, const Outcome& neighbour) {
    auto starts = problem.starts();
    if (neighbour.keeps_limits() && neighbour.x.size() == problem.variables().size())
        starts.front() = neighbour.x;
    return starts;
}

/// Enough to tell which combinations deserve the full treatment.
Settings rough(Settings settings) {
    settings.recentres = 0;
    settings.repair = false;
    settings.residual_tolerance = std::numeric_limits<double>::infinity();
    settings.objective_tolerance = std::max(settings.objective_tolerance, 1e-5);
    settings.step_tolerance = std::max(settings.step_tolerance, 1e-4);
    settings.constraint_tolerance = std::max(settings.constraint_tolerance, 1e-4);
    return settings;
}

double best_objective(const std::vector<Candidate>& candidates) {
    double best = std::numeric_limits<double>::infinity();
    for (const Candidate& c : candidates)
        if (c.outcome.keeps_limits()) best = std::min(best, c.outcome.objective);
    return best;
}

/// What may still be best: close to the best by its first solve, or next to a refined one that is
/// close. The second rule walks along the integers as far as refined values stay close, however far
/// off first ones are.
std::vector<std::size_t> contenders(const std::vector<Candidate>& candidates, const Settings& s) {
    const double limit = best_objective(candidates) + s.contender_margin;
    const auto close = [&](const Candidate& c) {
        const Outcome& o = c.outcome;
        return (o.keeps_limits() || o.worst_violation < nearly_feasible) && o.objective <= limit;
    };
    const auto refined_and_close = [&](std::size_t i) {
        return i < candidates.size() && candidates[i].refined && close(candidates[i]);
    };
    std::vector<std::size_t> list;
    for (std::size_t i = 0; i < candidates.size(); ++i)
        if (!candidates[i].refined &&
            (close(candidates[i]) || refined_and_close(i - 1) || refined_and_close(i + 1)))
            list.push_back(i);
    return list;
}

/// Every combination once: first the head of each block, cold; then the rest of each block, each
/// from its neighbour's end, and no longer than it takes to see that it is hopeless beside the best
/// head.
void solve_roughly(std::vector<Candidate>& candidates,
                   const std::vector<std::unique_ptr<Problem>>& problems, const Settings& settings,
                   const Deadline& deadline, int threads) {
    Settings once = rough(settings);
    const std::size_t blocks = (problems.size() + block - 1) / block;
    in_parallel(blocks, threads, [&](std::size_t b) {
        candidates[b * block].outcome = minimise(*problems[b * block], deadline.left_of(once));
    });
    once.hopeless_above = best_objective(candidates) + settings.hopeless_margin;
    in_parallel(blocks, threads, [&](std::size_t b) {
        const std::size_t end = std::min(problems.size(), (b + 1) * block);
        for (std::size_t i = b * block + 1; i < end; ++i) {
            Restarted warm(*problems[i], starts_after(*problems[i], candidates[i - 1].outcome));
            candidates[i].outcome = minimise(warm, deadline.left_of(once));
        }
    });
}

Outcome minimise_from(const std::vector<double>& x, Problem& problem, const Settings& settings) {
    Restarted moved(problem, {x});
    return minimise(moved, settings);
}

/// Contenders in full, until the best is one of them.
void refine(std::vector<Candidate>& candidates,
            const std::vector<std::unique_ptr<Problem>>& problems, const Settings& settings,
            const Deadline& deadline, int threads) {
    for (auto list = contenders(candidates, settings); !list.empty();
         list = contenders(candidates, settings)) {
        in_parallel(list.size(), threads, [&](std::size_t k) {
            Candidate& c = candidates[list[k]];
            const int before = c.outcome.evaluations;
            c.outcome = minimise_from(c.outcome.x, *problems[list[k]], deadline.left_of(settings));
            c.outcome.evaluations += before;
            c.refined = true;
        });
    }
}

/// Seeks the least violation of a combination whose rough solve ended infeasible, without moving
/// the model's centre; from there the objective, if that is worth it.
void doubt(Candidate& c, Problem& problem, const Settings& settings) {
    Settings seeking = settings;
    seeking.residual_tolerance = rough_residual;
    Restarted moved(problem, {c.outcome.x});
    const Outcome least = least_violation(moved, seeking);
    const int before = c.outcome.evaluations + least.evaluations;
    if (least.worst_violation < nearly_feasible) {
        c.outcome = minimise_from(least.x, problem, settings);
        c.outcome.evaluations += before;
    } else {
        c.outcome.verdict = least.verdict;
        c.outcome.evaluations = before;
    }
}

/// A rough solve is no ground for calling a combination infeasible.
void doubt_all(std::vector<Candidate>& candidates,
               const std::vector<std::unique_ptr<Problem>>& problems, const Settings& settings,
               const Deadline& deadline, int threads) {
    const Settings once = rough(settings);
    in_parallel(candidates.size(), threads, [&](std::size_t i) {
        Candidate& c = candidates[i];
        if (!c.refined && problems[i]->constraint_count() > 0 && !problems[i]->variables().empty())
            doubt(c, *problems[i], deadline.left_of(once));
    });
}

std::optional<std::size_t> best_of(const std::vector<Candidate>& candidates) {
    std::optional<std::size_t> best;
    for (std::size_t i = 0; i < candidates.size(); ++i) {
        const Outcome& o = candidates[i].outcome;
        if (o.keeps_limits() && (!best || o.objective < candidates[*best].outcome.objective))
            best = i;
    }
    return best;
}

bool adjacent(const Candidate& a, const Candidate& b) {
    int distance = 0;
    for (std::size_t k = 0; k < a.integers.size(); ++k)
        distance += std::abs(a.integers[k] - b.integers[k]);
    return distance == 1;
}

std::vector<std::size_t> neighbours(const std::vector<Candidate>& candidates, std::size_t of) {
    std::vector<std::size_t> list;
    for (std::size_t i = 0; i < candidates.size(); ++i)
        if (adjacent(candidates[i], candidates[of])) list.push_back(i);
    return list;
}

/// The neighbours of the best from where it ended: the rough solve may have led them elsewhere.
/// True when one of them is the best now.
bool step_on(std::vector<Candidate>& candidates,
             const std::vector<std::unique_ptr<Problem>>& problems, const Settings& settings,
             const Deadline& deadline, int threads) {
    const auto best = best_of(candidates);
    if (!best) return false;
    const auto x = candidates[*best].outcome.x;
    const auto list = neighbours(candidates, *best);
    in_parallel(list.size(), threads, [&](std::size_t k) {
        Candidate& c = candidates[list[k]];
        if (problems[list[k]]->variables().size() != x.size()) return;
        Outcome outcome = minimise_from(x, *problems[list[k]], deadline.left_of(settings));
        const int before = c.outcome.evaluations;
        if (outcome.keeps_limits() &&
            (!c.outcome.keeps_limits() || outcome.objective < c.outcome.objective)) {
            c.outcome = std::move(outcome);
            c.outcome.evaluations += before;
            c.refined = true;
        } else {
            c.outcome.evaluations += outcome.evaluations;
        }
    });
    return best_of(candidates) != best;
}

/// The best again from its own starts and from where its neighbours ended: a rough solve saw one
/// valley of it only. True when that made it better.
bool look_elsewhere(std::vector<Candidate>& candidates,
                    const std::vector<std::unique_ptr<Problem>>& problems, const Settings& settings,
                    const Deadline& deadline) {
    const auto best = best_of(candidates);
    if (!best) return false;
    Candidate& c = candidates[*best];
    auto starts = problems[*best]->starts();
    for (std::size_t i : neighbours(candidates, *best))
        if (candidates[i].outcome.keeps_limits() &&
            candidates[i].outcome.x.size() == c.outcome.x.size())
            starts.push_back(candidates[i].outcome.x);
    Restarted again(*problems[*best], std::move(starts));
    Outcome outcome = minimise(again, deadline.left_of(settings));
    const bool better = outcome.keeps_limits() &&
                        outcome.objective < c.outcome.objective - settings.objective_tolerance;
    outcome.evaluations += c.outcome.evaluations;
    if (better)
        c.outcome = std::move(outcome);
    else
        c.outcome.evaluations = outcome.evaluations;
    return better;
}

/// Contenders in full, then from the best along the integers as long as it gets better.
void refine_and_walk(std::vector<Candidate>& candidates,
                     const std::vector<std::unique_ptr<Problem>>& problems,
                     const Settings& settings, const Deadline& deadline, int threads) {
    do
        refine(candidates, problems, settings, deadline, threads);
    while (look_elsewhere(candidates, problems, settings, deadline) ||
           step_on(candidates, problems, settings, deadline, threads));
}

bool cut_short(const Candidate& c) {
    return c.outcome.stop == Stop::time || c.outcome.stop == Stop::asked;
}

Verdict verdict_of(const MixedOutcome& mixed) {
    const auto& all = mixed.candidates;
    const bool whole = std::none_of(all.begin(), all.end(), cut_short);
    if (mixed.best) return whole ? all[*mixed.best].outcome.verdict : Verdict::feasible;
    const bool settled = std::all_of(all.begin(), all.end(), [](const Candidate& c) {
        return c.outcome.verdict == Verdict::infeasible;
    });
    return settled ? Verdict::infeasible : Verdict::limit_reached;
}

} // namespace

MixedOutcome enumerate(std::span<const IntegerRange> ranges, const Factory& factory,
                       const Settings& settings, int threads) {
    const Deadline deadline(settings);
    MixedOutcome mixed;
    std::vector<std::unique_ptr<Problem>> problems;
    for (auto& integers : combinations(ranges))
        if (auto problem = factory(integers)) {
            problems.push_back(std::move(problem));
            mixed.candidates.push_back({std::move(integers), {}, false});
        }
    solve_roughly(mixed.candidates, problems, settings, deadline, threads);
    refine_and_walk(mixed.candidates, problems, settings, deadline, threads);
    if (!best_of(mixed.candidates)) {
        doubt_all(mixed.candidates, problems, settings, deadline, threads);
        refine_and_walk(mixed.candidates, problems, settings, deadline, threads);
    }
    mixed.best = best_of(mixed.candidates);
    mixed.verdict = verdict_of(mixed);
    return mixed;
}

} // namespace finwright::optimizer
