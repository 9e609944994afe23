// How good the search is: against a long multi-start on every fin count, and against a search that
// shares nothing with it but the model (differential evolution, Storn & Price 1997).
#include "optimizer/minimise.hpp"
#include "src/sizing/search_problem.hpp"
#include "src/sizing/sizing.hpp"
#include "tests/near.hpp"
#include "tests/sizing/random_jobs.hpp"
#include <algorithm>
#include <limits>

using namespace finwright;
using tests::RandomJobs;

namespace {

constexpr int jobs_per_regime = 100;
constexpr double within = 1e-3;

std::vector<job::Job> feasible_jobs(job::Job (RandomJobs::*make)(), unsigned seed, int wanted,
                                    std::vector<sizing::Answer>& answers) {
    RandomJobs random(seed);
    std::vector<job::Job> jobs;
    for (int tries = 0; int(jobs.size()) < wanted && tries < 50 * wanted; ++tries) {
        job::Job job = (random.*make)();
        auto sizing = sizing::size_on_even_air(job);
        if (auto* answer = std::get_if<sizing::Answer>(&sizing)) {
            answers.push_back(std::move(*answer));
            jobs.push_back(std::move(job));
        }
    }
    return jobs;
}

/// The lightest mass of any fin count by many random starts, each re-centred to a standstill.
double long_multi_start(const job::Job& job) {
    const sink::Duty duty = sink::duty_of(job);
    optimizer::Settings settings;
    settings.constraint_tolerance = 1e-6;
    settings.random_starts = 5;
    settings.recentres = 25;
    double best = std::numeric_limits<double>::infinity();
    const auto counts = sizing::fin_counts(job);
    for (int n = counts.from; n <= counts.to; ++n) {
        auto space = sizing::design_space(job, n);
        if (!space) continue;
        sizing::SearchProblem problem(*space, duty, sizing::Pursuit::mass, {});
        problem.recentre(problem.starts().front());
        const auto outcome = optimizer::minimise(problem, settings);
        if (outcome.keeps_limits())
            best = std::min(best, problem.geometry(outcome.x).metal() * job.sink.alloy.density);
    }
    return best;
}

/// With every part on the air it meets, as the user gets it.
bool answer_keeps_limits(const job::Job& job) {
    const auto sizing = sizing::size(job);
    if (!std::holds_alternative<sizing::Answer>(sizing)) return false;
    const auto& answer = std::get<sizing::Answer>(sizing);
    const auto rating = sink::rate(answer.design.rounded, sink::duty_of(job));
    for (const auto& part : rating.parts)
        CHECK(part.junction_temperature <= *part.junction_allowed + 1e-6);
    const auto& g = answer.design.rounded;
    const job::Process& p = job.sink.process;
    const double slack = 1.0 + 1e-9;
    CHECK(g.width() <= *job.limits.space.width * slack);
    CHECK(g.overall_height() <= *job.limits.space.height * slack);
    CHECK(g.length <= *job.limits.space.length * slack);
    CHECK(g.height / g.gap <= p.largest_height_to_gap * slack);
    if (p.largest_height_to_thickness)
        CHECK(g.height / g.tip_thickness() <= *p.largest_height_to_thickness * slack);
    CHECK(g.tip_thickness() * slack >= p.smallest_thickness);
    CHECK(g.gap * slack >= p.smallest_gap);
    CHECK(g.base * slack >= p.smallest_base);
    if (p.smallest_base_to_thickness > 0.0)
        CHECK(g.base * slack >= p.smallest_base_to_thickness * g.thickness);
    if (job.limits.pressure_drop) CHECK(rating.pressure_drop <= *job.limits.pressure_drop * slack);
    return true;
}

void check_regime(job::Job (RandomJobs::*make)(), unsigned seed) {
    std::vector<sizing::Answer> answers;
    const auto jobs = feasible_jobs(make, seed, jobs_per_regime, answers);
    REQUIRE(int(jobs.size()) == jobs_per_regime);
    int answered = 0;
    for (std::size_t i = 0; i < jobs.size(); ++i) {
        CAPTURE(i);
        answered += answer_keeps_limits(jobs[i]) ? 1 : 0;
        const double reference = long_multi_start(jobs[i]);
        CHECK(answers[i].least_aim <= reference * (1.0 + within));
    }
    // What the air warms may shut out a job that even air serves, but not many.
    CHECK(answered >= 98 * jobs_per_regime / 100);
}

/// Differential evolution (rand/1/bin) on ln(mass) with a penalty, at one fin count, by the exact
/// model.
double differential_evolution(const job::Job& job, int fins, int generations) {
    const sink::Duty duty = sink::duty_of(job);
    auto space = sizing::design_space(job, fins);
    if (!space) return std::numeric_limits<double>::infinity();
    sizing::SearchProblem problem(*space, duty, sizing::Pursuit::mass, {});
    const auto& variables = problem.variables();
    const std::size_t n = variables.size(), size = 10 * n;
    std::mt19937 engine(static_cast<unsigned>(fins));
    std::uniform_real_distribution<double> share(0.0, 1.0);
    std::vector<double> constraints(problem.constraint_count());
    const auto cost = [&](const std::vector<double>& u) {
        std::vector<double> x;
        for (double v : u)
            x.push_back(std::exp(v));
        double objective = 0.0;
        problem.judge(x, objective, constraints);
        double violation = 0.0;
        for (double c : constraints)
            violation += std::max(0.0, c);
        return violation > 0.0 ? 100.0 + violation : objective;
    };
    std::vector<std::vector<double>> members(size, std::vector<double>(n));
    std::vector<double> costs(size);
    for (std::size_t k = 0; k < size; ++k) {
        for (std::size_t j = 0; j < n; ++j)
            members[k][j] = std::log(variables[j].lower) +
                            share(engine) * std::log(variables[j].upper / variables[j].lower);
        costs[k] = cost(members[k]);
    }
    for (int generation = 0; generation < generations; ++generation)
        for (std::size_t k = 0; k < size; ++k) {
            const auto &a = members[engine() % size], &b = members[engine() % size],
                       &c = members[engine() % size];
            auto trial = members[k];
            const std::size_t sure = engine() % n;
            for (std::size_t j = 0; j < n; ++j)
                if (j == sure || share(engine) < 0.9)
                    trial[j] = std::clamp(a[j] + 0.6 * (b[j] - c[j]), std::log(variables[j].lower),
                                          std::log(variables[j].upper));
            const double trial_cost = cost(trial);
            if (trial_cost <= costs[k]) {
                members[k] = trial;
                costs[k] = trial_cost;
            }
        }
    const double least = *std::min_element(costs.begin(), costs.end());
    return least < 50.0 ? std::exp(least) * job.sink.alloy.density
                        : std::numeric_limits<double>::infinity();
}

void check_against_evolution(job::Job (RandomJobs::*make)(), unsigned seed) {
    std::vector<sizing::Answer> answers;
    const auto jobs = feasible_jobs(make, seed, 4, answers);
    for (std::size_t i = 0; i < jobs.size(); ++i) {
        CAPTURE(i);
        const int fins = answers[i].design.optimum.fins;
        for (int n = fins - 2; n <= fins + 2; ++n) {
            const double found = n >= 2 ? differential_evolution(jobs[i], n, 60)
                                        : std::numeric_limits<double>::infinity();
            CHECK(answers[i].least_aim <= found * (1.0 + within));
        }
    }
}

} // namespace

TEST_CASE(
    "still air: 100 random jobs within 0.1 % of a long multi-start, and feasible when recomputed") {
    check_regime(&RandomJobs::still, 101);
}

TEST_CASE("ducted air: 100 random jobs within 0.1 % of a long multi-start, and feasible when "
          "recomputed") {
    check_regime(&RandomJobs::ducted, 102);
}

TEST_CASE("differential evolution finds nothing lighter around the answer's fin count") {
    check_against_evolution(&RandomJobs::still, 103);
    check_against_evolution(&RandomJobs::ducted, 104);
}
