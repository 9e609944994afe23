#include "src/sheets/cautions.hpp"

#include "src/sheets/numbers_text.hpp"
#include <algorithm>
#include <fmt/format.h>
#include <functional>
#include <limits>
#include <optional>

namespace finwright::sheets {

using sink::Rating;

namespace {

constexpr double touch_long = 273.15 + 43.0,
                 touch_guard = 273.15 + 70.0; // quoted bands, bare metal [K]
constexpr double gap_that_clogs = 2e-3;       // unfiltered air [m]
constexpr double heavy = 0.4;                 // for leads to carry [kg]
constexpr double sharp = 1e-3;                // fin edge [m]
constexpr double beyond_reading =
    273.15 + 250.0;                    // a figure above it would say more than is known [K]
constexpr double worn_interface = 1.5; // end of life, common practice [-]
constexpr double clogged_flow = 0.7;   // filter loaded, common practice [-]

double least_headroom(const Rating& rating) {
    double least = std::numeric_limits<double>::infinity();
    for (const auto& part : rating.parts)
        if (part.headroom()) least = std::min(least, *part.headroom());
    return least;
}

std::string hottest_junction(const Rating& rating) {
    if (rating.runs_away()) return rating.feedback->runaway->part + " runs away";
    const auto hottest = std::max_element(
        rating.parts.begin(), rating.parts.end(), [](const auto& a, const auto& b) {
            return a.junction_temperature < b.junction_temperature;
        });
    if (hottest->junction_temperature > beyond_reading)
        return fmt::format("{} far beyond 250 °C", hottest->name);
    return fmt::format("{} at {} °C", hottest->name, celsius(hottest->junction_temperature, 0));
}

std::string touch(const Rating& rating) {
    const double surface = rating.air_temperature + rating.hottest_pad_rise;
    const std::string reach = fmt::format("The metal reaches {} °C in {} °C air. ",
                                          celsius(surface, 0), celsius(rating.air_temperature, 0));
    if (surface < touch_long) return {};
    return reach + (surface < touch_guard
                        ? "Bare-metal touch bands often quoted: 43 °C held long, 55 °C about 10 s, "
                          "65 °C about 1 s; anodise counts as bare metal. Check ISO 13732-1 and "
                          "the product's own standard."
                        : "That is a hot surface: guard or mark it. ISO 13732-1 gives thresholds, "
                          "the product's own standard the limits; anodise counts as bare metal.");
}

/// The sink rated again with every interface worn; none where no part has one.
std::optional<Rating> rated_worn(const job::Job& job, const Rating& rating) {
    sink::Duty duty = sink::duty_of(job);
    bool any = false;
    for (job::Part& part : duty.parts) {
        part.interface *= worn_interface;
        any = any || part.interface > 0.0;
    }
    return any ? std::optional(sink::rate(rating.geometry, duty)) : std::nullopt;
}

std::string worn(const job::Job& job, const Rating& rating) {
    const auto later = rated_worn(job, rating);
    if (!later) return {};
    double least = std::numeric_limits<double>::infinity();
    std::string name;
    for (std::size_t i = 0; i < later->parts.size(); ++i) {
        const auto headroom = later->parts[i].headroom();
        if (!headroom || job.parts[i].interface == 0.0 || *headroom >= least) continue;
        least = *headroom;
        name = job.parts[i].name;
    }
    const std::string start = fmt::format(
        "Grease pumps out and pads relax. With {} times its interface resistance ", worn_interface);
    if (later->runs_away()) return start + later->feedback->runaway->part + " runs away.";
    if (name.empty()) return {};
    return fmt::format("{}{} {} what is allowed by {} K.", start, name,
                       least < 0.0 ? "exceeds" : "stays below", fixed(std::abs(least), 1));
}

std::string names(const job::Job& job, const std::function<bool(const job::Part&)>& chosen) {
    std::string list;
    for (const job::Part& part : job.parts)
        if (chosen(part)) list += (list.empty() ? "" : ", ") + part.name;
    return list;
}

/// By what the job says of the tabs; nothing said is taken as live.
std::string live_tabs(const job::Job& job) {
    const std::string live = names(job, [](const auto& p) { return p.insulated == false; });
    const std::string open = names(job, [](const auto& p) { return !p.insulated; });
    const std::string rule =
        "check creepage and clearance for your voltage. A pad's thickness is not creepage, and "
        "anodise is not safety insulation; an unearthed sink is live or radiates.";
    if (live.empty() && open.empty())
        return "The tabs are stated to be insulated inside their parts. Leads may still be live: " +
               rule;
    if (live.empty()) return "Tabs and leads may be live: " + rule;
    return "Stated as live: the tab of " + live +
           ". An interface that does not insulate makes the sink live and joins all live tabs: " +
           rule;
}

void slow_down(sink::StillAir&) {}
void slow_down(sink::DuctVelocity& air) {
    air.approach *= clogged_flow;
}
void slow_down(sink::DuctFlow& air) {
    air.volume *= clogged_flow;
}
void slow_down(sink::Stream& air) {
    air.velocity *= clogged_flow;
}
void slow_down(sink::FanDriven& air) {
    air.fan.speed *= clogged_flow;
}

std::string fan_loss(const job::Job& job, const Rating& rating) {
    sink::Duty clogged = sink::duty_of(job);
    std::visit([](auto& air) { slow_down(air); }, clogged.surroundings.air);
    sink::Duty stopped = clogged;
    stopped.surroundings.air = sink::StillAir{};
    const Rating at_clogged = sink::rate(rating.geometry, clogged);
    const Rating at_stopped = sink::rate(rating.geometry, stopped);
    return fmt::format(
        "Fans fail and filters clog. At 70 % of the {}: {}{}. With the fan stopped, even free of "
        "its duct with fins vertical: {}. Interlock or derate if that is too hot.",
        std::holds_alternative<job::FanAir>(job.air.state) ? "fan's speed" : "flow",
        hottest_junction(at_clogged),
        least_headroom(at_clogged) < 0.0 ? ", above what is allowed" : "",
        hottest_junction(at_stopped));
}

std::string drift_dies(const job::Job& job, const Rating& rating) {
    const auto* still = std::get_if<job::StillAir>(&job.air.state);
    if (!still || !still->drift) return {};
    job::Job calm = job;
    std::get<job::StillAir>(calm.air.state).drift.reset();
    return fmt::format("A drift comes and goes. Without it: {}. Rely on it only where something "
                       "keeps it up.",
                       hottest_junction(sink::rate(rating.geometry, sink::duty_of(calm))));
}

/// Moving air so slow that the sink's own buoyancy, which is left out, would do more.
std::string slower_than_still(const job::Job& job, const Rating& rating) {
    if (std::holds_alternative<job::StillAir>(job.air.state)) return {};
    job::Job still = job;
    still.air.state = job::StillAir{};
    const Rating calm = sink::rate(rating.geometry, sink::duty_of(still));
    if (calm.base_rise >= rating.base_rise) return {};
    return fmt::format(
        "Air this slow counts for less than still air would ({} K rise of the hottest "
        "pad, fins upright): buoyancy and radiation are left out of moving air. "
        "Write state: still with a drift instead.",
        fixed(calm.hottest_pad_rise, 1));
}

std::string fan_curve_cautions(const job::Job& job, const Rating& rating) {
    const auto* driven = std::get_if<job::FanAir>(&job.air.state);
    if (!driven) return {};
    const job::Fan& fan = driven->fans.front();
    const auto& v = std::get<sink::MovingAirView<double>>(rating.view);
    const sink::FanCurve curve(fan, fan.density);
    std::string text;
    if (!curve.falls())
        text =
            "The fan's curve dips: there can be several operating points, and this is the one of "
            "highest flow. Starting from rest the fan may stay at a lower one (stall). ";
    if (v.volume_flow > curve.last_stated_flow())
        text +=
            "The fan runs beyond the last point of its curve, which was continued in a straight "
            "line: add points towards free delivery. ";
    if (fan.count > 1)
        text += "If one of several fans stops, air flows back through it: less is left than the "
                "others' share. ";
    return text;
}

std::string serrations(const Rating& rating) {
    if (rating.geometry.details.area_factor == 1.0) return {};
    return "Serrated faces count in moving air only: in still air the film is thicker than the "
           "serrations are deep, and nothing is credited for them.";
}

std::string stacked_parts(const job::Job& job) {
    if (!std::holds_alternative<job::StillAir>(job.air.state) || job.parts.size() < 2) return {};
    return "In still air all parts are rated on air of one temperature: of two above each other "
           "the upper one runs somewhat hotter than stated, the lower cooler.";
}

} // namespace

std::vector<std::string> cautions(const job::Job& job, const Rating& rating) {
    std::vector<std::string> list;
    const auto add = [&](std::string text) {
        if (!text.empty()) list.push_back(std::move(text));
    };
    const bool still = std::holds_alternative<job::StillAir>(job.air.state);
    add(touch(rating));
    if (!still) add(fan_loss(job, rating));
    add(slower_than_still(job, rating));
    add(fan_curve_cautions(job, rating));
    add(drift_dies(job, rating));
    add(stacked_parts(job));
    add(serrations(rating));
    add(worn(job, rating));
    add(live_tabs(job));
    if (still)
        add("Still air: leave free space above and below, and take the air entering the fins, not "
            "the "
            "room, as the ambient. °C/W falls as the rise grows, so it holds at the stated rise "
            "only.");
    if (rating.geometry.gap < gap_that_clogs) add("Gaps below 2 mm clog in unfiltered air.");
    if (rating.mass > heavy) add("Heavy for leads to carry: fix the sink to the chassis.");
    if (rating.geometry.tip_thickness() < sharp)
        add("Thin fin edges cut: deburr and handle with gloves.");
    add("The shop's own answer decides what can be made. These are estimates: build one, measure "
        "it, "
        "then release, under your local codes and licensed practice.");
    return list;
}

} // namespace finwright::sheets
