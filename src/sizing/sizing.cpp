#include "src/sizing/sizing.hpp"

#include "optimizer/enumerate.hpp"
#include "src/sink/placing.hpp"
#include "src/sizing/rounding.hpp"
#include "src/sizing/search_problem.hpp"
#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <limits>
#include <numeric>

namespace finwright::sizing {

using optimizer::Candidate;
using optimizer::MixedOutcome;
using optimizer::Outcome;
using optimizer::Verdict;
using sink::Geometry;
using sink::Rating;

namespace {

constexpr std::size_t alternatives_shown = 5;
constexpr double binds = 1e-4; // d ln(aim) / d ln(bound) below this is not worth a line [-]

/// A limit counts as kept to a hundred-thousandth: a millikelvin in a hundred. Rounded designs
/// are held to their limits more strictly still (SearchProblem::feasible).
optimizer::Settings search_settings() {
    optimizer::Settings settings;
    settings.constraint_tolerance = 1e-5;
    settings.recentres = 12;
    settings.hopeless_margin = 0.2; // of ln(aim): a fifth heavier
    return settings;
}

std::vector<int> middle_out(FinCounts counts) {
    std::vector<int> order(std::size_t(counts.to - counts.from + 1));
    std::iota(order.begin(), order.end(), counts.from);
    const int middle = (counts.from + counts.to) / 2;
    std::stable_sort(order.begin(), order.end(),
                     [&](int a, int b) { return std::abs(a - middle) < std::abs(b - middle); });
    return order;
}

/// The whole search over fin counts for one pursuit.
class Search {
public:
    Search(const job::Job& job, const sink::Duty& duty, Pursuit pursuit,
           const SearchOptions& options)
        : job_(job), duty_(duty), pursuit_(pursuit), counts_(fin_counts(job)) {
        if (counts_.from > counts_.to) return;
        spreading_ = first_spreading();
        const optimizer::IntegerRange fins{"fins", counts_.from, counts_.to};
        mixed_ = optimizer::enumerate(
            std::span(&fins, 1),
            [this](std::span<const int> n) -> std::unique_ptr<optimizer::Problem> {
                return problem(n[0]);
            },
            search_settings(), options.threads);
    }

    /// Candidates that keep every limit, best first.
    std::vector<const Candidate*> feasible() const {
        std::vector<const Candidate*> list;
        for (const Candidate& c : mixed_.candidates)
            if (c.outcome.verdict == Verdict::optimal || c.outcome.verdict == Verdict::feasible)
                list.push_back(&c);
        std::stable_sort(list.begin(), list.end(), [](const Candidate* a, const Candidate* b) {
            return a->outcome.objective < b->outcome.objective;
        });
        return list;
    }

    /// The candidate that breaks its limits least.
    const Candidate* least_violated() const {
        const auto& all = mixed_.candidates;
        const auto least =
            std::min_element(all.begin(), all.end(), [](const auto& a, const auto& b) {
                return a.outcome.worst_violation < b.outcome.worst_violation;
            });
        return least == all.end() ? nullptr : &*least;
    }

    /// A candidate the search left rough, given the full treatment.
    Candidate refined(const Candidate& c) const {
        if (c.refined) return c;
        const auto p = problem(c.integers[0]);
        return {c.integers, optimizer::minimise(*p, search_settings()), true};
    }

    /// The problem of a candidate, its spreading centred where the search ended.
    std::unique_ptr<SearchProblem> settled(const Candidate& c) const {
        auto p = problem(c.integers[0]);
        p->recentre(c.outcome.x);
        return p;
    }

    int tried() const { return int(mixed_.candidates.size()); }
    int evaluations() const {
        return std::accumulate(
            mixed_.candidates.begin(), mixed_.candidates.end(), 0,
            [](int sum, const Candidate& c) { return sum + c.outcome.evaluations; });
    }

private:
    std::unique_ptr<SearchProblem> problem(int fins) const {
        auto space = design_space(job_, fins);
        if (!space) return nullptr;
        return std::make_unique<SearchProblem>(std::move(*space), duty_, pursuit_, spreading_);
    }

    /// The spreading model where a middle fin count has its optimum; every fin count starts from
    /// it.
    SpreadingModel first_spreading() const {
        for (int fins : middle_out(counts_)) {
            auto p = problem(fins);
            if (!p) continue;
            p->recentre(p->starts().front());
            optimizer::minimise(*p, search_settings());
            return p->spreading();
        }
        return {};
    }

    const job::Job& job_;
    const sink::Duty& duty_;
    Pursuit pursuit_;
    FinCounts counts_;
    SpreadingModel spreading_;
    MixedOutcome mixed_;
};

/// The aim of a design as the search sees it, every part on air of one temperature [SI].
struct Aimed {
    job::Aim aim;

    double of(const Geometry<double>& g, const sink::Duty& duty) const {
        switch (aim) {
        case job::Aim::mass:
            return g.metal() * duty.material.density;
        case job::Aim::volume:
            return g.envelope();
        case job::Aim::height:
            return g.overall_height();
        case job::Aim::footprint:
            return g.footprint();
        case job::Aim::pressure_drop:
            return sink::balance(g, duty).pressure_drop;
        case job::Aim::resistance:
            break;
        }
        const auto rises = sink::pad_rises(g, duty, sink::balance(g, duty));
        return *std::max_element(rises.begin(), rises.end()) / duty.power();
    }
};

Measure measure_of(LimitKind kind) {
    switch (kind) {
    case LimitKind::height_to_gap:
    case LimitKind::height_to_thickness:
    case LimitKind::base_to_thickness:
        return Measure::ratio;
    case LimitKind::mass:
        return Measure::mass;
    case LimitKind::pressure_drop:
        return Measure::pressure;
    case LimitKind::channel_velocity:
        return Measure::velocity;
    case LimitKind::pad_rise:
    case LimitKind::worst_pad:
        return Measure::rise;
    default:
        return Measure::length;
    }
}

Sense sense_of(LimitKind kind) {
    switch (kind) {
    case LimitKind::width_at_least:
    case LimitKind::gap_at_least:
    case LimitKind::thickness_at_least:
    case LimitKind::base_to_thickness:
        return Sense::at_least;
    default:
        return Sense::at_most;
    }
}

/// Limits with a multiplier, dearest first. `scale` turns d ln(aim) into units of the aim.
std::vector<BindingLimit> binding_limits(const SearchProblem& problem, const Outcome& outcome,
                                         double scale) {
    std::vector<BindingLimit> list;
    const auto add = [&](BindingLimit limit, double elasticity) {
        if (elasticity < binds) return;
        limit.worth = elasticity * scale / limit.bound;
        list.push_back(std::move(limit));
    };
    const auto& limits = problem.space().limits;
    for (std::size_t i = 0; i < limits.size(); ++i) {
        if (limits[i].kind == LimitKind::worst_pad) continue;
        add({limits[i].name, limits[i].reason, sense_of(limits[i].kind), measure_of(limits[i].kind),
             limits[i].bound},
            outcome.multipliers[i]);
    }
    const auto& free = problem.free_dimensions();
    for (std::size_t i = 0; i < free.size(); ++i) {
        const Room& room = problem.space().rooms[std::size_t(free[i])];
        const std::string& name = problem.variables()[i].name;
        add({name, room.upper_reason, Sense::at_most, Measure::length, room.upper},
            outcome.upper_multipliers[i] * room.upper);
        add({name, room.lower_reason, Sense::at_least, Measure::length, room.lower},
            outcome.lower_multipliers[i] * room.lower);
    }
    std::stable_sort(list.begin(), list.end(), [](const BindingLimit& a, const BindingLimit& b) {
        return a.worth * a.bound > b.worth * b.bound;
    });
    return list;
}

/// Rounds fin counts in the order of their unrounded aim until no unrounded one can beat the list.
struct RoundedDesign {
    Design design;
    Candidate candidate;
    double objective;
};

std::vector<RoundedDesign> rounded_designs(const Search& search, const job::Job& job,
                                           const sink::Duty& duty) {
    std::vector<RoundedDesign> designs;
    const auto worst_kept = [&] {
        return designs.size() <= alternatives_shown ? std::numeric_limits<double>::infinity()
                                                    : designs[alternatives_shown].objective;
    };
    const Aimed aim{job.sink.aim};
    for (const Candidate* rough : search.feasible()) {
        if (rough->outcome.objective >= worst_kept()) break;
        const Candidate c = search.refined(*rough);
        if (!c.outcome.keeps_limits()) continue;
        const auto problem = search.settled(c);
        const auto rounded = round_design(*problem, c.outcome.x, worst_kept());
        if (!rounded) continue;
        const Geometry<double> optimum = problem->geometry(c.outcome.x);
        designs.push_back(
            {{optimum, aim.of(optimum, duty), rounded->geometry, aim.of(rounded->geometry, duty)},
             c,
             rounded->objective});
        std::stable_sort(designs.begin(), designs.end(),
                         [](const auto& a, const auto& b) { return a.objective < b.objective; });
    }
    return designs;
}

/// Total power at which the hottest part of this sink just keeps what it is allowed, parts in
/// proportion.
double power_possible(const Geometry<double>& g, const job::Job& job) {
    const auto too_hot = [&](double share) {
        job::Job eased = job;
        for (job::Part& part : eased.parts)
            part.power *= share;
        const Rating rating = sink::rate(g, sink::duty_of(eased));
        const auto allowed = allowed_pad_rises(eased);
        for (std::size_t i = 0; i < allowed.size(); ++i) {
            const double rise = rating.parts[i].pad_temperature - rating.air_temperature;
            if (allowed[i] && rise > *allowed[i]) return true;
        }
        return false;
    };
    double low = 0.0, high = 1.0;
    for (int i = 0; i < 40; ++i) {
        const double middle = 0.5 * (low + high);
        (too_hot(middle) ? high : low) = middle;
    }
    return low * job.total_power();
}

Refusal no_room(const job::Job& job) {
    Refusal refusal;
    refusal.reason = fmt::format(
        "No fin count fits: the space, the dimensions stated under sink and what {} can make leave "
        "no geometry at all. Give more width, height or length, or choose another process.",
        job.sink.process.name);
    return refusal;
}

/// Limits that have nothing to do with heat shut every design out: names those the nearest one
/// breaks.
Refusal shut_out(const Search& search, const job::Job& job) {
    const Candidate* nearest = search.least_violated();
    if (!nearest) return no_room(job);
    const auto problem = search.settled(*nearest);
    std::string names;
    for (const Limit* limit : problem->broken(nearest->outcome.x))
        names += fmt::format("{}{} ({})", names.empty() ? "" : ", ", limit->name, limit->reason);
    Refusal refusal;
    refusal.reason = fmt::format("Whatever the temperatures, no design keeps all the other limits "
                                 "together. The one that comes "
                                 "nearest ({} fins) still breaks: {}. Ease one of them.",
                                 nearest->integers[0], names.empty() ? "a limit by a hair" : names);
    return refusal;
}

/// Designs exist, but none on the shop's steps near them.
Refusal no_lattice_point(const Candidate* nearest) {
    Refusal refusal;
    refusal.reason =
        fmt::format("Designs that keep every limit exist (with {} fins, for one), but none whose "
                    "dimensions are multiples of "
                    "the shop's steps. Ease a limit a little, or state finer steps under shop.",
                    nearest->integers[0]);
    return refusal;
}

/// The design that comes nearest to the thermal limits while keeping all others.
Refusal refusal_of(const job::Job& job, const sink::Duty& duty, const SearchOptions& options) {
    const Search search(job, duty, Pursuit::excess, options);
    const auto nearest = search.feasible();
    if (nearest.empty()) return shut_out(search, job);
    const auto problem = search.settled(*nearest.front());
    const Outcome& outcome = nearest.front()->outcome;
    const Geometry<double> g = problem->geometry(outcome.x);
    Refusal refusal;
    refusal.closest = sink::rate(g, duty);
    const auto allowed = allowed_pad_rises(job);
    double allowed_rise = 1.0;
    for (std::size_t i = 0; i < allowed.size(); ++i) {
        if (!allowed[i]) continue;
        const double over = refusal.closest->parts[i].pad_temperature -
                            refusal.closest->air_temperature - *allowed[i];
        if (over > refusal.shortfall) {
            refusal.shortfall = over;
            refusal.part = job.parts[i].name;
            allowed_rise = *allowed[i];
        }
    }
    refusal.reason = fmt::format("No sink within these limits ({} fin counts searched) keeps every "
                                 "part within what it is allowed.",
                                 search.tried());
    refusal.possible_power = power_possible(g, job);
    refusal.binding = binding_limits(*problem, outcome, allowed_rise + refusal.shortfall);
    return refusal;
}

} // namespace

double aim_value(job::Aim aim, const Rating& rating) {
    switch (aim) {
    case job::Aim::mass:
        return rating.mass;
    case job::Aim::volume:
        return rating.geometry.envelope();
    case job::Aim::height:
        return rating.geometry.overall_height();
    case job::Aim::footprint:
        return rating.geometry.footprint();
    case job::Aim::resistance:
        return rating.sink_resistance();
    case job::Aim::pressure_drop:
        return rating.pressure_drop;
    }
    return 0.0;
}

std::optional<Geometry<double>> search(const job::Job& job, const SearchOptions& options) {
    const sink::Duty duty = sink::duty_of(job);
    const Search search(job, duty, pursuit_of(job.sink.aim), options);
    const auto feasible = search.feasible();
    if (feasible.empty()) return std::nullopt;
    return search.settled(*feasible.front())->geometry(feasible.front()->outcome.x);
}

Sizing size_on_even_air(const job::Job& job, const SearchOptions& options) {
    const sink::Duty duty = sink::duty_of(job);
    const Search search(job, duty, pursuit_of(job.sink.aim), options);
    const auto designs = rounded_designs(search, job, duty);
    if (designs.empty() && !search.feasible().empty())
        return no_lattice_point(search.feasible().front());
    if (designs.empty()) return refusal_of(job, duty, options);

    Answer answer;
    answer.design = designs.front().design;
    answer.rating = sink::rate(answer.design.rounded, duty);
    const auto problem = search.settled(designs.front().candidate);
    answer.binding =
        binding_limits(*problem, designs.front().candidate.outcome, answer.design.optimum_aim);
    for (std::size_t i = 1; i < designs.size() && i <= alternatives_shown; ++i)
        answer.alternatives.push_back(designs[i].design);
    const Candidate& least = *search.feasible().front();
    answer.least_aim =
        Aimed{job.sink.aim}.of(search.settled(least)->geometry(least.outcome.x), duty);
    answer.fin_counts_tried = search.tried();
    answer.evaluations = search.evaluations();
    return answer;
}

} // namespace finwright::sizing
