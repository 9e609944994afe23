#include "src/sizing/search_problem.hpp"

#include "src/sink/moving_air.hpp"
#include "src/sink/placing.hpp"
#include "src/sink/rating.hpp"
#include <algorithm>
#include <cmath>

namespace finwright::sizing {

using optimizer::Evaluation;
using optimizer::Scale;
using optimizer::Variable;
using sink::Geometry;

namespace {

constexpr double tie_break = 1e-4; // weight of ln(metal) beside the aim
// Change of a pad's rise by re-centring, over the whole rise, that no longer matters [-]
constexpr double stands_still = 5e-6;
constexpr double rounding_slack =
    2e-3; // what the centred spreading model may err near its centre [-]
constexpr double feasible_tolerance = 1e-9;
constexpr double broken_tolerance = 1e-4;                 // what is worth naming [-]
constexpr double least_ratio = 1e-4, largest_ratio = 1e4; // worst pad over its reference [-]

const char* dimension_name(Dimension d) {
    switch (d) {
    case Dimension::height:
        return "fin height";
    case Dimension::thickness:
        return "fin thickness";
    case Dimension::gap:
        return "gap";
    case Dimension::base:
        return "base thickness";
    case Dimension::length:
        return "length";
    }
    return "";
}

/// The dimension a fixed width decides, which is then no variable.
std::optional<Dimension> decided_by_width(WidthRule rule) {
    switch (rule) {
    case WidthRule::follows:
        return std::nullopt;
    case WidthRule::sets_gap:
        return Dimension::gap;
    case WidthRule::sets_thickness:
        return Dimension::thickness;
    }
    return std::nullopt;
}

/// What a limit measures, once the sink is in balance. `worst` is the worst-pad variable.
template <class T>
struct Measured {
    const Geometry<T>& g;
    const sink::Duty& duty;
    const sink::Balance<T>& balance;
    std::vector<T> pad_rises;
    T worst;
};

/// ln(quantity/bound), turned so that the limit holds when it is <= 0.
template <class T>
T constraint(const Limit& limit, const Measured<T>& m) {
    using std::hypot;
    using std::log;
    const Geometry<T>& g = m.g;
    const auto at_most = [&](const T& quantity) { return T(log(T(quantity / limit.bound))); };
    const auto at_least = [&](const T& quantity) { return T(log(T(limit.bound / quantity))); };
    switch (limit.kind) {
    case LimitKind::width_at_most:
        return at_most(g.width());
    case LimitKind::width_at_least:
        return at_least(g.width());
    case LimitKind::gap_at_least:
        return at_least(g.gap);
    case LimitKind::thickness_at_least:
        return at_least(g.tip_thickness());
    case LimitKind::overall_height:
        return at_most(g.overall_height());
    case LimitKind::height_to_gap:
        return at_most(g.height / g.gap);
    case LimitKind::height_to_thickness:
        return at_most(g.height / g.tip_thickness());
    case LimitKind::base_to_thickness:
        return at_least(g.base / g.thickness);
    case LimitKind::circle:
        return at_most(hypot(g.width(), g.overall_height()));
    case LimitKind::mass:
        return at_most(m.duty.material.density * g.metal());
    case LimitKind::pressure_drop:
        return at_most(m.balance.pressure_drop);
    case LimitKind::channel_velocity:
        return at_most(sink::channel_velocity(g, m.duty.surroundings));
    case LimitKind::pad_rise:
        return at_most(m.pad_rises[limit.part]);
    case LimitKind::worst_pad:
        return at_most(m.pad_rises[limit.part] / m.worst);
    }
    return T(0.0);
}

template <class T>
T aim(Pursuit pursuit, const Measured<T>& m) {
    const Geometry<T>& g = m.g;
    switch (pursuit) {
    case Pursuit::mass:
        return g.metal();
    case Pursuit::volume:
        return g.envelope();
    case Pursuit::height:
        return g.overall_height();
    case Pursuit::footprint:
        return g.footprint();
    case Pursuit::pressure_drop:
        return m.balance.pressure_drop;
    case Pursuit::resistance:
    case Pursuit::excess:
        return m.worst;
    }
    return T(0.0);
}

template <class T>
T objective(Pursuit pursuit, const Measured<T>& m) {
    using std::log;
    const T main = log(aim(pursuit, m));
    return pursuit == Pursuit::mass ? main : T(main + tie_break * log(m.g.metal()));
}

bool needs_balance(LimitKind kind) {
    return kind == LimitKind::pressure_drop || kind == LimitKind::pad_rise ||
           kind == LimitKind::worst_pad;
}

bool needs_balance(Pursuit pursuit) {
    return pursuit == Pursuit::pressure_drop || pursuit == Pursuit::resistance ||
           pursuit == Pursuit::excess;
}

/// Keeps a dimension that follows from a fixed width positive, far below what its limit allows.
template <class T>
T floored(const T& value, const T& smallest) {
    using std::max;
    return max(value, T(0.05 * smallest));
}

void pursue_worst_pad(DesignSpace& space, const sink::Duty& duty, Pursuit pursuit) {
    std::vector<Limit> pads;
    if (pursuit == Pursuit::resistance) {
        for (std::size_t i = 0; i < duty.parts.size(); ++i)
            pads.push_back({LimitKind::worst_pad, duty.power(), "hottest pad", "aim", i});
    } else {
        for (Limit& limit : space.limits)
            if (limit.kind == LimitKind::pad_rise) {
                pads.push_back(limit);
                pads.back().kind = LimitKind::worst_pad;
            }
        std::erase_if(space.limits, [](const Limit& l) { return l.kind == LimitKind::pad_rise; });
    }
    space.limits.insert(space.limits.end(), pads.begin(), pads.end());
}

} // namespace

Pursuit pursuit_of(job::Aim aim) {
    switch (aim) {
    case job::Aim::mass:
        return Pursuit::mass;
    case job::Aim::volume:
        return Pursuit::volume;
    case job::Aim::height:
        return Pursuit::height;
    case job::Aim::footprint:
        return Pursuit::footprint;
    case job::Aim::resistance:
        return Pursuit::resistance;
    case job::Aim::pressure_drop:
        return Pursuit::pressure_drop;
    }
    return Pursuit::mass;
}

SearchProblem::SearchProblem(DesignSpace space, const sink::Duty& duty, Pursuit pursuit,
                             const SpreadingModel& spreading)
    : space_(std::move(space)), duty_(duty), pursuit_(pursuit), spreading_(spreading) {
    const auto decided = decided_by_width(space_.width_rule);
    for (std::size_t k = 0; k < dimension_count; ++k) {
        const Room& r = space_.rooms[k];
        if (r.fixed() || Dimension(k) == decided) continue;
        free_.push_back(Dimension(k));
        variables_.push_back({dimension_name(Dimension(k)), r.lower, r.upper, Scale::logarithmic});
    }
    if (pursues_worst_pad()) {
        pursue_worst_pad(space_, duty_, pursuit_);
        variables_.push_back({"worst pad", least_ratio, largest_ratio, Scale::logarithmic});
    }
}

bool SearchProblem::pursues_worst_pad() const {
    return pursuit_ == Pursuit::resistance || pursuit_ == Pursuit::excess;
}

template <class T, class Seed>
Geometry<T> SearchProblem::build(Seed&& seed) const {
    std::array<T, dimension_count> d;
    for (std::size_t k = 0; k < dimension_count; ++k)
        d[k] = T(space_.rooms[k].lower);
    for (std::size_t i = 0; i < free_.size(); ++i)
        d[std::size_t(free_[i])] = seed(i);
    const T root = d[1] + 2.0 * space_.draft_tangent * d[0];
    Geometry<T> g{space_.fins, d[0], root, d[2], d[3], d[4], space_.draft_tangent, space_.details};
    if (space_.width_rule == WidthRule::sets_gap)
        g.gap = floored(sink::gap_for_width(g.fins, T(space_.width), g.thickness), d[2]);
    if (space_.width_rule == WidthRule::sets_thickness)
        g.thickness = 2.0 * space_.draft_tangent * d[0] +
                      floored((space_.width - double(g.fins - 1) * g.gap) / double(g.fins) -
                                  2.0 * space_.draft_tangent * d[0],
                              d[1]);
    return g;
}

Geometry<double> SearchProblem::geometry(std::span<const double> x) const {
    return build<double>([&](std::size_t i) { return x[i]; });
}

Geometry<Dual5> SearchProblem::seeded(std::span<const double> x) const {
    return build<Dual5>([&](std::size_t i) { return Dual5::variable(x[i], i); });
}

void SearchProblem::evaluate(std::span<const double> x, Evaluation& out) {
    const Geometry<Dual5> g = seeded(x);
    const std::size_t n = variables_.size(), dims = free_.size();
    const sink::Balance<Dual5> balance = sink::balance(g, duty_, last_rise_);
    last_rise_ = balance.driving_rise.value;
    Measured<Dual5> m{g, duty_, balance, spreading_.pad_rises(g, duty_, balance), Dual5(1.0)};
    if (pursues_worst_pad()) m.worst = Dual5(x[dims]);

    const auto store = [&](const Dual5& value, double* slopes) {
        std::copy_n(value.slope.begin(), dims, slopes);
        if (n > dims) slopes[dims] = 0.0;
        return value.value;
    };
    out.objective = store(objective(pursuit_, m), out.gradient.data());
    if (n > dims) out.gradient[dims] = 1.0 / x[dims];
    for (std::size_t c = 0; c < space_.limits.size(); ++c) {
        double* row = out.jacobian.data() + c * n;
        out.constraints[c] = store(constraint(space_.limits[c], m), row);
        if (space_.limits[c].kind == LimitKind::worst_pad) row[dims] = -1.0 / x[dims];
    }
}

void SearchProblem::judge(std::span<const double> x, double& value, std::span<double> constraints) {
    const Geometry<double> g = geometry(x);
    const sink::Balance<double> balance = sink::balance(g, duty_);
    Measured<double> m{g, duty_, balance, sink::pad_rises(g, duty_, balance), 1.0};
    if (pursues_worst_pad()) m.worst = x[free_.size()];
    value = objective(pursuit_, m);
    for (std::size_t c = 0; c < space_.limits.size(); ++c)
        constraints[c] = constraint(space_.limits[c], m);
}

bool SearchProblem::recentre(std::span<const double> x) {
    const Geometry<double> g = geometry(x);
    const auto balance = sink::balance(g, duty_);
    SpreadingModel moved;
    moved.centre(g, duty_);
    bool material = !spreading_.centred();
    if (!material) {
        const auto before = spreading_.pad_rises(g, duty_, balance);
        const auto after = moved.pad_rises(g, duty_, balance);
        for (std::size_t i = 0; i < after.size(); ++i)
            material = material || std::abs(after[i] - before[i]) > stands_still * after[i];
    }
    spreading_ = std::move(moved);
    return material;
}

double SearchProblem::quick_objective(std::span<const double> dimensions) const {
    const Geometry<double> g = geometry(dimensions);
    if (!needs_balance(pursuit_)) {
        const sink::Balance<double> unused;
        return objective(pursuit_, Measured<double>{g, duty_, unused, {}, 1.0});
    }
    const sink::Balance<double> balance = sink::balance(g, duty_);
    const auto rises = spreading_.pad_rises(g, duty_, balance);
    const double worst = *std::max_element(rises.begin(), rises.end()) / duty_.power();
    return objective(pursuit_, Measured<double>{g, duty_, balance, rises, worst});
}

bool SearchProblem::quickly_feasible(std::span<const double> dimensions) const {
    const Geometry<double> g = geometry(dimensions);
    const sink::Balance<double> unused;
    for (const Limit& limit : space_.limits)
        if (!needs_balance(limit.kind) &&
            constraint(limit, Measured<double>{g, duty_, unused, {}, 1.0}) > feasible_tolerance)
            return false;
    const sink::Balance<double> balance = sink::balance(g, duty_);
    const Measured<double> m{g, duty_, balance, spreading_.pad_rises(g, duty_, balance), 1.0};
    return std::none_of(space_.limits.begin(), space_.limits.end(), [&](const Limit& limit) {
        return limit.kind != LimitKind::worst_pad && constraint(limit, m) > rounding_slack;
    });
}

bool SearchProblem::feasible(std::span<const double> dimensions) const {
    const Geometry<double> g = geometry(dimensions);
    if (sink::overlap_on(duty_.parts, g.width(), g.length)) return false;
    const sink::Balance<double> balance = sink::balance(g, duty_);
    const Measured<double> m{g, duty_, balance, sink::pad_rises(g, duty_, balance), 1.0};
    return std::none_of(space_.limits.begin(), space_.limits.end(), [&](const Limit& limit) {
        return limit.kind != LimitKind::worst_pad && constraint(limit, m) > feasible_tolerance;
    });
}

std::vector<const Limit*> SearchProblem::broken(std::span<const double> dimensions) const {
    const Geometry<double> g = geometry(dimensions);
    const sink::Balance<double> balance = sink::balance(g, duty_);
    const Measured<double> m{g, duty_, balance, sink::pad_rises(g, duty_, balance), 1.0};
    std::vector<const Limit*> list;
    for (const Limit& limit : space_.limits)
        if (limit.kind != LimitKind::worst_pad && constraint(limit, m) > broken_tolerance)
            list.push_back(&limit);
    return list;
}

std::vector<std::vector<double>> SearchProblem::starts() const {
    std::vector<double> middle, open, brief;
    for (const Variable& v : variables_) {
        middle.push_back(std::sqrt(v.lower * v.upper));
        open.push_back(v.name == dimension_name(Dimension::gap) ? v.upper : middle.back());
        brief.push_back(v.name == dimension_name(Dimension::length) ? v.lower : middle.back());
    }
    return {middle, open, brief};
}

} // namespace finwright::sizing
