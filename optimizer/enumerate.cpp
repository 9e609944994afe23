#include "optimizer/enumerate.hpp"

#include <algorithm>
#include <atomic>
#include <exception>
#include <limits>
#include <mutex>
#include <thread>

namespace finwright::optimizer {

namespace {

// Combinations are solved in blocks of this many, each from its neighbour's end; blocks start cold
// and are what threads share out, so that the result does not depend on their number.
constexpr std::size_t block = 8;
constexpr std::size_t rough_starts = 2;  // of the problem's own, in the first pass
constexpr double finalist_share = 0.3;   // of the contenders' margin
constexpr double nearly_feasible = 0.05; // a violation the first model may be to blame for

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
    starts.resize(std::min(starts.size(), rough_starts));
    return starts;
}

/// Enough to tell which combinations deserve the full treatment.
Settings rough(Settings settings) {
    settings.recentres = 0;
    settings.repairs = 0;
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
                   int threads) {
    Settings once = rough(settings);
    const std::size_t blocks = (problems.size() + block - 1) / block;
    in_parallel(blocks, threads, [&](std::size_t b) {
        Restarted cold(*problems[b * block], starts_after(*problems[b * block], {}));
        candidates[b * block].outcome = minimise(cold, once);
    });
    once.hopeless_above = best_objective(candidates) + settings.hopeless_margin;
    in_parallel(blocks, threads, [&](std::size_t b) {
        const std::size_t end = std::min(problems.size(), (b + 1) * block);
        for (std::size_t i = b * block + 1; i < end; ++i) {
            Restarted warm(*problems[i], starts_after(*problems[i], candidates[i - 1].outcome));
            candidates[i].outcome = minimise(warm, once);
        }
    });
}

/// Where a combination ended, and where its neighbours did if they ended lower: it may have missed
/// their valley.
std::vector<std::vector<double>> starts_for(const std::vector<Candidate>& candidates,
                                            std::size_t i) {
    const Outcome& own = candidates[i].outcome;
    std::vector<std::vector<double>> starts{own.x};
    for (std::size_t j : {i - 1, i + 1}) {
        if (j >= candidates.size()) continue;
        const Outcome& neighbour = candidates[j].outcome;
        const bool lower = !own.keeps_limits() || neighbour.objective < own.objective;
        if (neighbour.keeps_limits() && lower && neighbour.x.size() == own.x.size())
            starts.push_back(neighbour.x);
    }
    return starts;
}

/// The full treatment for the listed combinations.
void refine(std::vector<Candidate>& candidates,
            const std::vector<std::unique_ptr<Problem>>& problems,
            const std::vector<std::size_t>& list, const Settings& settings, int threads) {
    std::vector<std::vector<std::vector<double>>> starts;
    for (std::size_t i : list)
        starts.push_back(starts_for(candidates, i));
    in_parallel(list.size(), threads, [&](std::size_t k) {
        Candidate& c = candidates[list[k]];
        Restarted resumed(*problems[list[k]], starts[k]);
        const int before = c.outcome.evaluations;
        c.outcome = minimise(resumed, settings);
        c.outcome.evaluations += before;
        c.refined = true;
    });
}

/// Those within a hair of the best, once more from the problem's last own start: another valley may
/// lie a little lower.
void try_finalists(std::vector<Candidate>& candidates,
                   const std::vector<std::unique_ptr<Problem>>& problems, const Settings& settings,
                   int threads) {
    const double limit = best_objective(candidates) + finalist_share * settings.contender_margin;
    std::vector<std::size_t> list;
    for (std::size_t i = 0; i < candidates.size(); ++i)
        if (candidates[i].outcome.keeps_limits() && candidates[i].outcome.objective <= limit)
            list.push_back(i);
    in_parallel(list.size(), threads, [&](std::size_t k) {
        Candidate& c = candidates[list[k]];
        Restarted other(*problems[list[k]], {problems[list[k]]->starts().back()});
        Outcome outcome = minimise(other, settings);
        outcome.evaluations += c.outcome.evaluations;
        if (outcome.keeps_limits() && outcome.objective < c.outcome.objective)
            c.outcome = std::move(outcome);
        else
            c.outcome.evaluations = outcome.evaluations;
    });
}

} // namespace

MixedOutcome enumerate(std::span<const IntegerRange> ranges, const Factory& factory,
                       const Settings& settings, int threads) {
    MixedOutcome mixed;
    std::vector<std::unique_ptr<Problem>> problems;
    for (auto& integers : combinations(ranges))
        if (auto problem = factory(integers)) {
            problems.push_back(std::move(problem));
            mixed.candidates.push_back({std::move(integers), {}, false});
        }

    solve_roughly(mixed.candidates, problems, settings, threads);

    for (auto list = contenders(mixed.candidates, settings); !list.empty();
         list = contenders(mixed.candidates, settings))
        refine(mixed.candidates, problems, list, settings, threads);
    try_finalists(mixed.candidates, problems, settings, threads);

    for (std::size_t i = 0; i < mixed.candidates.size(); ++i) {
        const Outcome& o = mixed.candidates[i].outcome;
        if (!o.keeps_limits()) continue;
        if (!mixed.best || o.objective < mixed.candidates[*mixed.best].outcome.objective)
            mixed.best = i;
    }
    if (mixed.best)
        mixed.verdict = mixed.candidates[*mixed.best].outcome.verdict;
    else if (std::any_of(mixed.candidates.begin(), mixed.candidates.end(), [](const Candidate& c) {
                 return c.outcome.verdict == Verdict::limit_reached;
             }))
        mixed.verdict = Verdict::limit_reached;
    return mixed;
}

} // namespace finwright::optimizer
