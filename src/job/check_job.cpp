#include "src/job/check_job.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace finwright::job {

namespace {

/// Where a key of a top-level group stands, or the group, or the file.
Place place_in(const Document& d, std::string_view group, std::string_view key) {
    for (const TreeNode::Entry& entry : d.root.entries) {
        if (entry.key != group) continue;
        for (const TreeNode::Entry& inner : entry.value.entries)
            if (inner.key == key) return inner.value.place;
        return entry.place;
    }
    return {};
}

void check_goals(const Job& job, const Document& d) {
    const bool any_junction = std::any_of(job.parts.begin(), job.parts.end(), [](const Part& p) {
        return p.junction_limit.has_value();
    });
    if (!any_junction && !job.limits.sink_resistance && job.sink.aim != Aim::resistance)
        d.fail(place_in(d, "limits", ""), "nothing says how cool the parts must stay",
               "give a part its junction_limit, or limits its sink_resistance");
    const bool still = std::holds_alternative<StillAir>(job.air.state);
    if (still && job.limits.pressure_drop)
        d.fail(place_in(d, "limits", "pressure_drop"), "still air has no pressure drop to limit",
               "write air state: ducted, or leave the line out");
    if (still && job.sink.aim == Aim::pressure_drop)
        d.fail(place_in(d, "sink", "aim"), "still air has no pressure drop to make small",
               "choose another aim");
}

void check_budgets(const Job& job, const Document& d) {
    for (const Part& part : job.parts) {
        if (!part.junction_limit) continue;
        const double over_air = *part.junction_limit - job.limits.margin - job.air.temperature;
        if (over_air <= 0.0)
            d.fail(
                part.place,
                fmt::format("'{}': the junction limit less the margin lies {:.1f} K below the air",
                            part.name, -over_air),
                "no sink cools below its air: raise the limit, lower the margin, or bring cooler "
                "air");
        const double path = part.power * (part.junction_to_case + part.interface);
        if (path >= over_air)
            d.fail(part.place,
                   fmt::format("'{}' spends its whole budget before the sink: {:.1f} K from "
                               "junction to base, {:.1f} K allowed, "
                               "{:.1f} K short even on a perfect sink",
                               part.name, path, over_air, path - over_air),
                   fmt::format("fewer watts (below {:.3g} W), a better interface ({:.1f} K are "
                               "lost in it), a lower margin, or "
                               "a part with a lower junction-to-case resistance",
                               over_air / (part.junction_to_case + part.interface),
                               part.power * part.interface));
    }
}

struct Stated {
    const char* key;
    const Range& range;
};

void below(const Document& d, const Stated& s, double bound, const std::string& what,
           const char* suggestion) {
    if (s.range.from && *s.range.from > bound * (1.0 + 1e-9))
        d.fail(s.range.place,
               fmt::format("{} of {:.4g} mm or more does not go with {} of {:.4g} mm", s.key,
                           *s.range.from * 1e3, what, bound * 1e3),
               suggestion);
}

void above(const Document& d, const Stated& s, double bound, const std::string& what,
           const char* suggestion) {
    if (s.range.to && *s.range.to < bound * (1.0 - 1e-9))
        d.fail(s.range.place,
               fmt::format("{} of {:.4g} mm or less does not go with {} of {:.4g} mm", s.key,
                           *s.range.to * 1e3, what, bound * 1e3),
               suggestion);
}

void check_dimensions(const Job& job, const Document& d) {
    const Sink& s = job.sink;
    const Process& p = s.process;
    const char* overrule = "change it, choose another process, or overrule the process under shop";
    const char* room = "change it, or give more space";
    if (job.limits.space.width)
        below(d, {"width", s.width}, *job.limits.space.width, "a space width", room);
    if (job.limits.space.length)
        below(d, {"length", s.length}, *job.limits.space.length, "a space length", room);
    if (job.limits.space.height) {
        const double base = std::max(p.smallest_base, s.base_thickness.from.value_or(0.0));
        if (base >= *job.limits.space.height)
            d.fail(place_in(d, "limits", "space"),
                   fmt::format("a base of {:.4g} mm fills the whole height", base * 1e3), room);
        below(d, {"fin_height", s.fin_height}, *job.limits.space.height - base,
              fmt::format("{} base under it and room", "the"), room);
    }
    above(d, {"fin_thickness", s.fin_thickness}, p.smallest_thickness,
          p.name + "'s smallest thickness", overrule);
    above(d, {"gap", s.gap}, p.smallest_gap, p.name + "'s smallest gap", overrule);
    above(d, {"base_thickness", s.base_thickness}, p.smallest_base, p.name + "'s smallest base",
          overrule);
    if (p.largest_height)
        below(d, {"fin_height", s.fin_height}, *p.largest_height, p.name + "'s largest height",
              overrule);
}

void check_width_sum(const Job& job, const Document& d) {
    const Sink& s = job.sink;
    if (!s.fins.fixed() || !s.fin_thickness.fixed() || !s.gap.fixed() || !s.width.fixed()) return;
    const double n = *s.fins.from;
    const double root =
        *s.fin_thickness.from +
        2.0 * std::tan(s.fin_draft) * (s.fin_height.fixed() ? *s.fin_height.from : 0.0);
    const double sum = n * root + (n - 1.0) * *s.gap.from;
    if (std::abs(sum - *s.width.from) > 5e-6)
        d.fail(s.width.place,
               fmt::format("width {:.4g} mm is not what fins and gaps add up to: {:.4g} mm",
                           *s.width.from * 1e3, sum * 1e3),
               "leave one of fins, fin_thickness, gap and width out: it follows from the others");
}

/// The widest the base can get, for pads that state their place.
std::optional<double> widest(const Range& range, const std::optional<double>& space) {
    if (range.to && space) return std::min(*range.to, *space);
    return range.to ? range.to : space;
}

void check_edge(const Document& d, const Part& part, const std::optional<Coordinate>& at,
                double pad, const std::optional<double>& side, const char* key, const char* which) {
    if (side && pad > *side * (1.0 + 1e-9))
        d.fail(part.place,
               fmt::format("the pad of '{}' is {:.4g} mm {}, more than the {} of {:.4g} mm",
                           part.name, pad * 1e3, key, which, *side * 1e3),
               "check the pad, or give more space");
    if (!at || at->share_of_side) return;
    if (at->value < 0.5 * pad * (1.0 - 1e-9))
        d.fail(part.place, fmt::format("the pad of '{}' hangs over the edge {}", part.name, key),
               fmt::format("its centre must be at least {:.4g} mm from the edge", 0.5 * pad * 1e3));
    if (side && at->value + 0.5 * pad > *side * (1.0 + 1e-9))
        d.fail(part.place,
               fmt::format(
                   "the pad of '{}' hangs over the far edge {}: it ends at {:.4g} mm of {:.4g} mm",
                   part.name, key, (at->value + 0.5 * pad) * 1e3, *side * 1e3),
               "move it, or give more space");
}

double metres(const Coordinate& c, double side) {
    return c.share_of_side ? c.value * side : c.value;
}

/// Overlap on the largest base there can be, where shares of a side stand furthest apart.
void check_overlap(const Document& d, const Job& job, double width, double length) {
    for (std::size_t i = 0; i < job.parts.size(); ++i)
        for (std::size_t j = 0; j < i; ++j) {
            const Part &a = job.parts[i], &b = job.parts[j];
            if (!a.across || !b.across) continue;
            const double apart_across =
                std::abs(metres(*a.across, width) - metres(*b.across, width)) -
                0.5 * (a.pad_across + b.pad_across);
            const double apart_along =
                std::abs(metres(*a.along, length) - metres(*b.along, length)) -
                0.5 * (a.pad_along + b.pad_along);
            if (std::max(apart_across, apart_along) < -1e-9)
                d.fail(a.place,
                       fmt::format("the pads of '{}' and '{}' (line {}) overlap by {:.3g} mm",
                                   a.name, b.name, b.place.line,
                                   -std::max(apart_across, apart_along) * 1e3),
                       "move one of them");
        }
}

void check_pads(const Job& job, const Document& d) {
    const auto width = widest(job.sink.width, job.limits.space.width);
    const auto length = widest(job.sink.length, job.limits.space.length);
    double row = 0.0;
    for (const Part& part : job.parts) {
        check_edge(d, part, part.across, part.pad_across, width, "across", "width");
        check_edge(d, part, part.along, part.pad_along, length, "along", "length");
        if (!part.across) row += part.pad_across;
    }
    if (width && row > *width * (1.0 + 1e-9))
        d.fail(job.parts.front().place,
               fmt::format(
                   "the pads without a place stand in a row of {:.4g} mm, wider than {:.4g} mm",
                   row * 1e3, *width * 1e3),
               "give the parts their places");
    check_overlap(d, job, width.value_or(1.0), length.value_or(1.0));
}

} // namespace

void check_job(const Job& job, const Document& document) {
    check_goals(job, document);
    check_budgets(job, document);
    check_dimensions(job, document);
    check_width_sum(job, document);
    check_pads(job, document);
}

} // namespace finwright::job
