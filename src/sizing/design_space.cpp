#include "src/sizing/design_space.hpp"

#include "src/sink/placing.hpp"
#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <limits>

namespace finwright::sizing {

using job::Job;
using job::Range;

namespace {

// Where neither the job nor the process bounds a dimension, the search stops here. [m]
constexpr double widest = 0.6, longest = 1.0, highest = 0.25, thickest_fin = 0.02,
                 thickest_base = 0.05, lowest_fin = 1e-3;
constexpr int most_fins = 400;
// Beyond what fans give, and where the laws for incompressible flow begin to err. [m/s]
constexpr double fastest_channel = 30.0;
// The width limit itself is a constraint; rooms reach a little beyond it so as not to state it
// twice. [-]
constexpr double beyond_width = 1.1;

Room room(double lower, std::string lower_reason, double upper, std::string upper_reason,
          double step) {
    return {lower, upper, std::move(lower_reason), std::move(upper_reason), step};
}

/// Narrows a room by what the job states for the dimension.
void narrow(Room& r, const Range& stated) {
    if (stated.from && *stated.from > r.lower) {
        r.lower = *stated.from;
        r.lower_reason = "job";
    }
    if (stated.to && *stated.to < r.upper) {
        r.upper = *stated.to;
        r.upper_reason = "job";
    }
}

void cap(Room& r, const std::optional<double>& bound, const char* reason) {
    if (!bound || *bound >= r.upper) return;
    r.upper = *bound;
    r.upper_reason = reason;
}

struct Widest {
    double value;
    std::string reason;
};

Widest widest_of(const Job& job) {
    Widest w{widest, "search range"};
    if (job.limits.space.width && *job.limits.space.width < w.value)
        w = {*job.limits.space.width, "space"};
    if (job.sink.width.to && *job.sink.width.to < w.value) w = {*job.sink.width.to, "job"};
    return w;
}

std::array<Room, dimension_count> rooms_of(const Job& job, int fins) {
    const job::Sink& sink = job.sink;
    const job::Process& process = sink.process;
    const Widest width = widest_of(job);
    const sink::SmallestBase pads = sink::smallest_base(job.parts);
    const double thinnest = process.smallest_thickness;
    const double narrowest = process.smallest_gap;

    std::array<Room, dimension_count> rooms;
    Room& height = rooms[std::size_t(Dimension::height)];
    height = room(lowest_fin, "search range", highest, "search range", sink.steps.fin_height);
    cap(height, process.largest_height, "process");
    cap(height, job.limits.space.height, "space");
    narrow(height, sink.fin_height);

    Room& thickness = rooms[std::size_t(Dimension::thickness)];
    thickness = room(thinnest, "process", thickest_fin, "search range", sink.steps.fin_thickness);
    cap(thickness, beyond_width * (width.value - double(fins - 1) * narrowest) / double(fins),
        "search range");
    narrow(thickness, sink.fin_thickness);

    Room& gap = rooms[std::size_t(Dimension::gap)];
    gap = room(narrowest, "process",
               beyond_width * (width.value - double(fins) * thinnest) / double(fins - 1),
               "search range", sink.steps.gap);
    narrow(gap, sink.gap);

    Room& base = rooms[std::size_t(Dimension::base)];
    base = room(process.smallest_base, "process", thickest_base, "search range",
                sink.steps.base_thickness);
    cap(base, job.limits.space.height, "space");
    narrow(base, sink.base_thickness);

    Room& length = rooms[std::size_t(Dimension::length)];
    length = room(std::max({pads.length, 5e-3, 2.0 * sink.details.fin_free}), "pads", longest,
                  "search range", sink.steps.length);
    cap(length, job.limits.space.length, "space");
    narrow(length, sink.length);
    return rooms;
}

WidthRule width_rule(const job::Sink& sink) {
    if (!sink.width.fixed()) return WidthRule::follows;
    return sink.gap.fixed() && !sink.fin_thickness.fixed() ? WidthRule::sets_thickness
                                                           : WidthRule::sets_gap;
}

void add_width_limits(DesignSpace& space, const Job& job) {
    const sink::SmallestBase pads = sink::smallest_base(job.parts);
    if (space.width_rule == WidthRule::sets_gap) {
        const Room& gap = space.rooms[std::size_t(Dimension::gap)];
        space.limits.push_back({LimitKind::gap_at_least, gap.lower, "gap", gap.lower_reason});
        return;
    }
    if (space.width_rule == WidthRule::sets_thickness) {
        const Room& thickness = space.rooms[std::size_t(Dimension::thickness)];
        space.limits.push_back({LimitKind::thickness_at_least, thickness.lower, "fin thickness",
                                thickness.lower_reason});
        return;
    }
    const Widest width = widest_of(job);
    space.limits.push_back({LimitKind::width_at_most, width.value, "width", width.reason});
    const double from = job.sink.width.from.value_or(0.0);
    if (pads.width > from)
        space.limits.push_back({LimitKind::width_at_least, pads.width, "width", "pads"});
    else if (from > 0.0)
        space.limits.push_back({LimitKind::width_at_least, from, "width", "job"});
}

void add_shape_limits(DesignSpace& space, const Job& job) {
    const job::Process& process = job.sink.process;
    const auto add = [&](LimitKind kind, double bound, const char* name, const std::string& why) {
        space.limits.push_back({kind, bound, name, why});
    };
    if (job.limits.space.height)
        add(LimitKind::overall_height, *job.limits.space.height, "overall height", "space");
    add(LimitKind::height_to_gap, process.largest_height_to_gap, "fin height / gap", process.name);
    if (process.largest_height_to_thickness)
        add(LimitKind::height_to_thickness, *process.largest_height_to_thickness,
            "fin height / thickness", process.name);
    if (process.smallest_base_to_thickness > 0.0)
        add(LimitKind::base_to_thickness, process.smallest_base_to_thickness,
            "base thickness / fin thickness", process.name);
    if (process.largest_circle)
        add(LimitKind::circle, *process.largest_circle, "circumscribing circle", process.name);
}

void add_duty_limits(DesignSpace& space, const Job& job) {
    if (job.limits.mass) space.limits.push_back({LimitKind::mass, *job.limits.mass, "mass", "job"});
    if (job.limits.pressure_drop)
        space.limits.push_back(
            {LimitKind::pressure_drop, *job.limits.pressure_drop, "pressure drop", "job"});
    if (std::holds_alternative<job::DuctedAir>(job.air.state))
        space.limits.push_back({LimitKind::channel_velocity, fastest_channel,
                                "air velocity between the fins", "search range"});
    const auto allowed = allowed_pad_rises(job);
    for (std::size_t i = 0; i < allowed.size(); ++i) {
        if (!allowed[i]) continue;
        const bool by_target = job.limits.sink_resistance &&
                               *allowed[i] == *job.limits.sink_resistance * job.total_power();
        space.limits.push_back({LimitKind::pad_rise, *allowed[i],
                                fmt::format("pad rise of {}", job.parts[i].name),
                                by_target ? "target" : "junction", i});
    }
}

} // namespace

std::vector<std::optional<double>> allowed_pad_rises(const Job& job) {
    std::vector<std::optional<double>> allowed;
    for (const job::Part& part : job.parts) {
        double rise = std::numeric_limits<double>::infinity();
        if (part.junction_limit)
            rise = *part.junction_limit - job.limits.margin - sink::inlet_temperature(job) -
                   part.power * (part.junction_to_case + part.interface);
        if (job.limits.sink_resistance)
            rise = std::min(rise, *job.limits.sink_resistance * job.total_power());
        allowed.push_back(std::isfinite(rise) ? std::optional(rise) : std::nullopt);
    }
    return allowed;
}

FinCounts fin_counts(const Job& job) {
    const double width = widest_of(job).value - 2.0 * job.sink.details.flange;
    const double thinnest =
        std::max(job.sink.process.smallest_thickness, job.sink.fin_thickness.from.value_or(0.0));
    const double narrowest =
        std::max(job.sink.process.smallest_gap, job.sink.gap.from.value_or(0.0));
    const int fit = int(std::floor((width + narrowest) / (thinnest + narrowest) + 1e-9));
    const int from = std::max(2, int(job.sink.fins.from.value_or(2.0)));
    const int to = std::min({fit, int(job.sink.fins.to.value_or(most_fins)), most_fins});
    return {from, to};
}

std::optional<DesignSpace> design_space(const Job& job, int fins) {
    DesignSpace space;
    space.fins = fins;
    space.rooms = rooms_of(job, fins);
    space.draft_tangent = std::tan(job.sink.fin_draft);
    space.width_rule = width_rule(job.sink);
    space.details = job.sink.details;
    space.width =
        job.sink.width.fixed() ? *job.sink.width.from - 2.0 * job.sink.details.flange : 0.0;
    for (const Room& r : space.rooms)
        if (r.lower > r.upper) return std::nullopt;
    add_width_limits(space, job);
    add_shape_limits(space, job);
    add_duty_limits(space, job);
    return space;
}

} // namespace finwright::sizing
