#include "src/job/check_job.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>

namespace finwright::job {

namespace {

constexpr double most_cleared = 0.5; // of the length [-]

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

/// Where a key of this part stands, or the part.
Place place_in(const Document& d, const Part& part, std::string_view key) {
    for (const TreeNode::Entry& entry : d.root.entries)
        if (entry.key == "parts")
            for (const TreeNode& item : entry.value.items)
                if (item.place.line == part.place.line && item.place.column == part.place.column)
                    for (const TreeNode::Entry& inner : item.entries)
                        if (inner.key == key) return inner.value.place;
    return part.place;
}

void check_target(const Job& job, const Document& d) {
    const bool any_junction = std::any_of(job.parts.begin(), job.parts.end(), [](const Part& p) {
        return p.junction_limit.has_value();
    });
    if (!any_junction && !job.limits.sink_resistance && job.sink.aim != Aim::resistance)
        d.fail(place_in(d, "limits", ""), "nothing says how cool the parts must stay",
               "give a part its junction_limit, or limits its sink_resistance");
}

void check_pressure(const Job& job, const Document& d) {
    const bool still = std::holds_alternative<StillAir>(job.air.state);
    if (still && job.limits.pressure_drop)
        d.fail(place_in(d, "limits", "pressure_drop"), "still air has no pressure drop to limit",
               "write air state: ducted, or leave the line out", place_in(d, "air", "state"));
    if (still && job.sink.aim == Aim::pressure_drop)
        d.fail(place_in(d, "sink", "aim"), "still air has no pressure drop to make small",
               "choose another aim", place_in(d, "air", "state"));
    const auto* stream = std::get_if<StreamAir>(&job.air.state);
    if (stream && !stream->clearance && job.limits.pressure_drop)
        d.fail(place_in(d, "limits", "pressure_drop"),
               "a free stream loses no pressure to a sink: it goes around it",
               "leave the line out, or state the duct by a clearance", place_in(d, "air", "state"));
    if (stream && !stream->clearance && job.sink.aim == Aim::pressure_drop)
        d.fail(place_in(d, "sink", "aim"), "a free stream has no pressure drop to make small",
               "choose another aim", place_in(d, "air", "state"));
}

/// The search reads a table at the junction allowed.
void check_tables(const Job& job, const Document& d) {
    for (const Part& part : job.parts)
        if (part.power_table && !part.junction_limit)
            d.fail(place_in(d, part, "power"),
                   fmt::format("'{}' has a power table but no junction limit to read it at",
                               part.name),
                   "add junction_limit: 150 degC; finwright rate needs none");
}

void check_budgets(const Job& job, const Document& d) {
    for (const Part& part : job.parts) {
        if (!part.junction_limit) continue;
        const double over_air = *part.junction_limit - job.limits.margin - job.air.temperature;
        if (over_air <= 0.0)
            d.fail(
                place_in(d, part, "junction_limit"),
                fmt::format("'{}': the junction limit less the margin lies {:.1f} K below the air",
                            part.name, -over_air),
                "no sink cools below its air: raise the limit, lower the margin, or bring cooler "
                "air",
                place_in(d, "air", "temperature"));
        const double path = part.power * (part.junction_to_case + part.interface);
        if (path >= over_air)
            d.fail(place_in(d, part, "power"),
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
               fmt::format("{} of {:.4g} mm{} does not go with {} of {:.4g} mm", s.key,
                           *s.range.from * 1e3, s.range.fixed() ? "" : " or more", what,
                           bound * 1e3),
               suggestion);
}

void above(const Document& d, const Stated& s, double bound, const std::string& what,
           const char* suggestion) {
    if (s.range.to && *s.range.to < bound * (1.0 - 1e-9))
        d.fail(s.range.place,
               fmt::format("{} of {:.4g} mm{} does not go with {} of {:.4g} mm", s.key,
                           *s.range.to * 1e3, s.range.fixed() ? "" : " or less", what, bound * 1e3),
               suggestion);
}

/// The least proportion two stated ranges leave against what the process allows.
void at_most(const Document& d, const Stated& over, const Stated& under, double bound,
             const std::string& process) {
    if (!over.range.from || !under.range.to) return;
    const double least = *over.range.from / *under.range.to;
    if (least > bound * (1.0 + 1e-9))
        d.fail(over.range.place,
               fmt::format("{} / {} is at least {:.3g}, and {} reaches {:.3g}", over.key, under.key,
                           least, process, bound),
               "change one of the two, choose another process, or overrule the process under shop",
               under.range.place);
}

void check_proportions(const Job& job, const Document& d) {
    const Sink& s = job.sink;
    const Process& p = s.process;
    at_most(d, {"fin_height", s.fin_height}, {"gap", s.gap}, p.largest_height_to_gap, p.name);
    if (p.largest_height_to_thickness && s.fin_draft == 0.0)
        at_most(d, {"fin_height", s.fin_height}, {"fin_thickness", s.fin_thickness},
                *p.largest_height_to_thickness, p.name);
    if (p.smallest_base_to_thickness > 0.0)
        at_most(d, {"fin_thickness", s.fin_thickness}, {"base_thickness", s.base_thickness},
                1.0 / p.smallest_base_to_thickness, p.name);
    if (p.largest_circle)
        below(d, {"width", s.width}, *p.largest_circle, p.name + "'s largest circumscribing circle",
              "change it, choose another process, or overrule the process under shop");
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
                   fmt::format("a base of {:.4g} mm fills the whole height", base * 1e3), room,
                   s.base_thickness.place);
        below(d, {"fin_height", s.fin_height}, *job.limits.space.height - base,
              "a height above the base", room);
    }
    above(d, {"fin_thickness", s.fin_thickness}, p.smallest_thickness,
          p.name + "'s smallest thickness", overrule);
    above(d, {"gap", s.gap}, p.smallest_gap, p.name + "'s smallest gap", overrule);
    above(d, {"base_thickness", s.base_thickness}, p.smallest_base, p.name + "'s smallest base",
          overrule);
    if (p.largest_height)
        below(d, {"fin_height", s.fin_height}, *p.largest_height, p.name + "'s largest height",
              overrule);
    check_proportions(job, d);
}

void check_width_sum(const Job& job, const Document& d) {
    const Sink& s = job.sink;
    if (!s.fins.fixed() || !s.fin_thickness.fixed() || !s.gap.fixed() || !s.width.fixed()) return;
    if (s.fin_draft > 0.0 && !s.fin_height.fixed()) return;
    if (*s.fins.from == 0.0) return;
    const double n = *s.fins.from;
    const double taper = s.fin_draft > 0.0 ? 2.0 * std::tan(s.fin_draft) * *s.fin_height.from : 0.0;
    const double root = *s.fin_thickness.from + taper;
    const double sum = n * root + (n - 1.0) * *s.gap.from + 2.0 * s.details.flange;
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

double metres(const Coordinate& c, double side) {
    return c.share_of_side ? c.value * side : c.value;
}

void check_edge(const Document& d, const Part& part, const std::optional<Coordinate>& at,
                double pad, const std::optional<double>& side, const char* key, const char* which) {
    if (side && pad > *side * (1.0 + 1e-9))
        d.fail(place_in(d, part, "pad"),
               fmt::format("the pad of '{}' is {:.4g} mm {}, more than the {} of {:.4g} mm",
                           part.name, pad * 1e3, key, which, *side * 1e3),
               "check the pad, or give more space");
    if (!at || (at->share_of_side && !side)) return;
    const double centre = metres(*at, side.value_or(0.0));
    if (centre < 0.5 * pad * (1.0 - 1e-9))
        d.fail(place_in(d, part, "place"),
               fmt::format("the pad of '{}' hangs over the edge {}", part.name, key),
               fmt::format("its centre must be at least {:.4g} mm from the edge", 0.5 * pad * 1e3));
    if (side && centre + 0.5 * pad > *side * (1.0 + 1e-9))
        d.fail(place_in(d, part, "place"),
               fmt::format(
                   "the pad of '{}' hangs over the far edge {}: it ends at {:.4g} mm of {:.4g} mm",
                   part.name, key, (centre + 0.5 * pad) * 1e3, *side * 1e3),
               "move it, or give more space");
}

/// Clear space between two pads along one side, negative where they overlap there. On the largest
/// side there can be, where shares stand furthest apart; empty where a share against a length
/// leaves it open. [m]
std::optional<double> clear_space(const Coordinate& a, double pad_a, const Coordinate& b,
                                  double pad_b, const Range& stated, double side) {
    if (a.share_of_side != b.share_of_side && !stated.fixed()) return std::nullopt;
    return std::abs(metres(a, side) - metres(b, side)) - 0.5 * (pad_a + pad_b);
}

void check_overlap(const Document& d, const Job& job, double width, double length) {
    for (std::size_t i = 0; i < job.parts.size(); ++i)
        for (std::size_t j = 0; j < i; ++j) {
            const Part &a = job.parts[i], &b = job.parts[j];
            if (!a.across || !b.across) continue;
            const auto across = clear_space(*a.across, a.pad_across, *b.across, b.pad_across,
                                            job.sink.width, width);
            const auto along =
                clear_space(*a.along, a.pad_along, *b.along, b.pad_along, job.sink.length, length);
            if (!across || !along || std::max(*across, *along) >= -1e-9) continue;
            d.fail(place_in(d, a, "place"),
                   fmt::format("the pads of '{}' and '{}' (line {}) overlap by {:.3g} mm", a.name,
                               b.name, b.place.line, -std::max(*across, *along) * 1e3),
                   "move one of them", place_in(d, b, "place"));
        }
}

void check_pads(const Job& job, const Document& d, const Space& space) {
    const auto width = widest(job.sink.width, space.width);
    const auto length = widest(job.sink.length, space.length);
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

void check_sized_job(const Job& job, const Document& document) {
    if (job.sink.fins.fixed() && *job.sink.fins.from == 0.0)
        document.fail(
            job.sink.fins.place, "a plate without fins leaves nothing to search",
            "rate it with finwright rate, or leave the key out: size says whether a plate "
            "would do");
    if (job.limits.space.width && 2.0 * job.sink.details.flange >= *job.limits.space.width)
        document.fail(place_in(document, "sink", "flange"), "the flanges fill the whole width",
                      "make them narrower, or give more space",
                      place_in(document, "limits", "space"));
    if (job.limits.space.length &&
        job.sink.details.fin_free > most_cleared * *job.limits.space.length)
        document.fail(place_in(document, "sink", "fin_free_length"),
                      "more than half of the length is cleared of fins",
                      "clear less of it, or give more space",
                      place_in(document, "limits", "space"));
    check_target(job, document);
    check_pressure(job, document);
    check_tables(job, document);
    check_budgets(job, document);
    check_dimensions(job, document);
    check_width_sum(job, document);
    check_pads(job, document, job.limits.space);
}

void check_rated_job(const Job& job, const Document& document) {
    const bool plate = job.sink.fins.fixed() && *job.sink.fins.from == 0.0;
    if (plate && !std::holds_alternative<StillAir>(job.air.state))
        document.fail(job.sink.fins.place, "a plate without fins is rated in still air only",
                      "write air state: still, with a drift if there is one",
                      place_in(document, "air", "state"));
    if (job.sink.length.fixed() && job.sink.details.fin_free > most_cleared * *job.sink.length.from)
        document.fail(place_in(document, "sink", "fin_free_length"),
                      "more than half of the length is cleared of fins", "clear less of it",
                      job.sink.length.place);
    const auto* driven = std::get_if<FanAir>(&job.air.state);
    if (driven && driven->fans.size() > 1)
        document.fail(place_in(document, "air", "fans"), "a rating is made with one fan",
                      "leave the one the sink is rated with; finwright size chooses among several");
    check_pressure(job, document);
    check_width_sum(job, document);
    check_pads(job, document, {});
}

} // namespace finwright::job
