#include "src/sheets/page.hpp"

#include "correlations/registry.hpp"
#include "src/sheets/cautions.hpp"
#include "src/sheets/numbers_text.hpp"
#include "src/sheets/plain_units.hpp"
#include "src/sheets/powers_text.hpp"
#include "src/sheets/text_table.hpp"
#include "src/sizing/broken_limits.hpp"
#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <numbers>

namespace finwright::sheets {

using job::Job;
using sink::Geometry;
using sink::Rating;
using sizing::Answer;
using sizing::BindingLimit;
using sizing::Refusal;

namespace {

constexpr std::size_t page_width = 100;
constexpr double least_share_worth_saying = 0.01; // of the power [-]
constexpr std::size_t parts_beside =
    5; ///< columns of the budget before it wraps into another block

std::string heading(const std::string& text) {
    return "\n" + text + "\n";
}

std::string paragraph(const std::string& text) {
    if (text.empty()) return {};
    return wrapped(text, page_width, "  ", "  ");
}

const char* direction_name(job::Drift::Direction direction) {
    switch (direction) {
    case job::Drift::Direction::assisting:
        return "up the fins";
    case job::Drift::Direction::opposing:
        return "down the fins";
    case job::Drift::Direction::crossing:
        return "across the fins";
    }
    return "";
}

/// How the sink stands and what acts on it: "still, base and fins upright".
std::string still_air_words(const job::Air& air) {
    const job::Mounting& m = air.mounting;
    const double degrees = m.tilt * 180.0 / std::numbers::pi;
    std::string text = "still, ";
    if (std::abs(m.tilt) < 1e-9)
        text += m.fins_level ? "base upright, fins level" : "base and fins upright";
    else
        text += fmt::format("base tilted {:+.0f}° (90° is fins up){}", degrees,
                            m.fins_level ? ", fins level" : "");
    if (m.back_exposed) text += ", back exposed";
    if (m.wall_conductance)
        text += fmt::format(", on a wall at {} °C with {} W/K", celsius(*m.wall_temperature),
                            significant(*m.wall_conductance, 3));
    if (const auto& drift = std::get<job::StillAir>(air.state).drift)
        text += fmt::format(", drift {} m/s {}", significant(drift->velocity, 2),
                            direction_name(drift->direction));
    if (air.around.radiating_temperature)
        text += fmt::format(", radiating to {} °C", celsius(*air.around.radiating_temperature));
    if (const auto& sun = air.around.sun)
        text += fmt::format(", sun {} W/m² (absorptivity {})", fixed(sun->irradiance, 0),
                            significant(sun->absorptivity, 2));
    return text;
}

std::string clearance_words(const std::optional<job::Clearance>& clearance) {
    if (!clearance) return "";
    return fmt::format(", {} mm free above the fins and {} mm on each side",
                       millimetres(clearance->above), millimetres(clearance->beside));
}

std::string fan_words(const job::Fan& fan) {
    std::string text = fan.count == 1 ? fan.name
                                      : fmt::format("{} x {} in {}", fan.count, fan.name,
                                                    fan.in_series ? "series" : "parallel");
    if (fan.speed != 1.0) text += fmt::format(" at {} % speed", percent(fan.speed));
    return text;
}

std::string moving_air_words(const job::Air& air) {
    if (const auto* duct = std::get_if<job::DuctedAir>(&air.state)) {
        if (duct->velocity)
            return fmt::format("ducted, {} m/s before the fins", significant(*duct->velocity, 3));
        return fmt::format("ducted, {} m³/h", significant(duct->flow.value() * 3600.0, 3));
    }
    if (const auto* stream = std::get_if<job::StreamAir>(&air.state))
        return fmt::format("{} of {} m/s", stream->clearance ? "stream" : "free stream",
                           significant(stream->velocity, 3)) +
               clearance_words(stream->clearance);
    const auto& driven = std::get<job::FanAir>(air.state);
    std::string names;
    for (const job::Fan& fan : driven.fans)
        names += (names.empty() ? "" : " or ") + fan_words(fan);
    return "driven by " + names + clearance_words(driven.clearance);
}

std::string warmed_by(const Job& job) {
    if (!job.air.around.sink_below) return "";
    return fmt::format(" ({} °C warmed by the sink below)", celsius(job.air.temperature));
}

std::string air_line(const Job& job) {
    std::string text = fmt::format(
        "air {} °C{} at {} m ({} kPa)", celsius(sink::inlet_temperature(job)), warmed_by(job),
        fixed(job.air.altitude, 0), fixed(sink::duty_of(job).surroundings.pressure / 1e3, 1));
    if (std::holds_alternative<job::StillAir>(job.air.state)) {
        text += ", " + still_air_words(job.air);
    } else {
        text += ", " + moving_air_words(job.air);
    }
    return text;
}

std::string title_lines(const Job& job) {
    return fmt::format("{}   [{}]\n", job.title, job.file) +
           wrapped(fmt::format("{}{} W in {} part{}; {}", job.has_power_table() ? "up to " : "",
                               significant(job.total_power(), 4), job.parts.size(),
                               job.parts.size() == 1 ? "" : "s", air_line(job)),
                   page_width, "  ", "    ") +
           paragraph(fmt::format("{} of {}, {} (emissivity {})", job.sink.process.name,
                                 job.sink.alloy.name, job.sink.finish.name,
                                 significant(job.sink.finish.emissivity, 2)));
}

std::string budget_block(const Rating& rating, std::size_t from, std::size_t to) {
    TextTable table;
    const auto row = [&](const std::string& name, const std::string& unit, auto&& cell) {
        std::vector<std::string> cells{name, unit};
        for (std::size_t i = from; i < to; ++i)
            cells.push_back(cell(i));
        table.row(cells);
    };
    const auto& parts = rating.parts;
    const double air = rating.air_temperature;
    table.left(1);
    row("", "", [&](std::size_t i) { return parts[i].name; });
    row("power", "W", [&](std::size_t i) { return significant(parts[i].power, 3); });
    row("junction", "°C", [&](std::size_t i) { return celsius(parts[i].junction_temperature); });
    row("  junction to case", "K", [&](std::size_t i) {
        return fixed(parts[i].junction_temperature - parts[i].case_temperature, 1);
    });
    row("case", "°C", [&](std::size_t i) { return celsius(parts[i].case_temperature); });
    row("  interface", "K", [&](std::size_t i) {
        return fixed(parts[i].case_temperature - parts[i].pad_temperature, 1);
    });
    row("base under the pad", "°C",
        [&](std::size_t i) { return celsius(parts[i].pad_temperature); });
    row("  pad over mean base", "K",
        [&](std::size_t i) { return fixed(parts[i].pad_temperature - air - rating.base_rise, 1); });
    row("base, mean", "°C", [&](std::size_t) { return celsius(air + rating.base_rise); });
    row("  base to air", "K", [&](std::size_t) { return fixed(rating.base_rise, 1); });
    row("inlet air", "°C", [&](std::size_t) { return celsius(air); });
    row("junction allowed", "°C", [&](std::size_t i) {
        return parts[i].junction_allowed ? celsius(*parts[i].junction_allowed) : std::string("-");
    });
    row("  left", "K", [&](std::size_t i) {
        return parts[i].headroom() ? fixed(*parts[i].headroom(), 1) : std::string("-");
    });
    return table.text();
}

std::string budget(const Job& job, const Rating& rating) {
    std::string out =
        heading(fmt::format("From junction to air (junction allowed = limit less {} K margin)",
                            significant(job.limits.margin, 3)));
    for (std::size_t from = 0; from < rating.parts.size(); from += parts_beside)
        out += budget_block(rating, from, std::min(from + parts_beside, rating.parts.size()));
    return out;
}

/// A plate without fins.
std::string plate_table(const Job& job, const Geometry<double>& g) {
    const job::Steps& steps = job.sink.steps;
    TextTable table;
    table.left(3);
    table.row({"plate thickness", dimension(g.base, steps.base_thickness), "mm", "tb"});
    table.row({"width", dimension(g.width(), steps.length), "mm", "W"});
    table.row({"length", dimension(g.length, steps.length), "mm", "L"});
    return heading("Dimensions: a plain plate") + table.text();
}

/// What the drawing adds to the plain shape.
void detail_rows(TextTable& table, const job::FinDetails& details) {
    if (details.round_tips) table.row({"fin tips", "full radius", "", ""});
    if (details.flange > 0.0)
        table.row({"flange of the base, each side", millimetres(details.flange, 2), "mm", ""});
    if (details.joint > 0.0)
        table.row(
            {"joint of a fin in its groove", significant(details.joint * 1e4, 3), "K cm²/W", ""});
    if (details.area_factor != 1.0)
        table.row({"area factor of serrated faces", significant(details.area_factor, 3), "", ""});
    if (details.fin_free > 0.0)
        table.row({"of the length, free of fins", millimetres(details.fin_free, 1), "mm", ""});
}

std::string dimension_table(const Job& job, const Geometry<double>& g) {
    if (g.plate()) return plate_table(job, g);
    const job::Steps& steps = job.sink.steps;
    TextTable table;
    table.left(3);
    const auto mm = [](double v, double step) { return dimension(v, step); };
    table.row({"fins", fmt::format("{}", g.fins), "", "N"});
    table.row({"fin height off the base", mm(g.height, steps.fin_height), "mm", "H"});
    if (g.draft_tangent > 0.0) {
        table.row({"fin thickness at the tip", mm(g.tip_thickness(), steps.fin_thickness), "mm",
                   "t tip"});
        table.row({"fin thickness at the root", millimetres(g.thickness, 2), "mm", "t root"});
    } else {
        table.row({"fin thickness", mm(g.thickness, steps.fin_thickness), "mm", "t"});
    }
    table.row({g.draft_tangent > 0.0 ? "gap at the root" : "gap", mm(g.gap, steps.gap), "mm", "S"});
    table.row({"base thickness", mm(g.base, steps.base_thickness), "mm", "tb"});
    table.row({"width across the fins", mm(g.width(), std::min(steps.gap, steps.fin_thickness)),
               "mm", "W"});
    table.row({"length along the fins", mm(g.length, steps.length), "mm", "L"});
    detail_rows(table, g.details);
    table.row({"(pitch)", fmt::format("({})", millimetres(g.pitch(), 3)), "mm",
               fmt::format("{} x pitch = {} mm", g.fins - 1,
                           millimetres(double(g.fins - 1) * g.pitch(), 2))});
    table.row(
        {"(overall height)", fmt::format("({})", millimetres(g.overall_height(), 2)), "mm", ""});
    table.row({"(fin height / gap)", fmt::format("({})", fixed(g.height / g.gap, 2)), "", ""});
    table.row({"(fin height / thickness)",
               fmt::format("({})", fixed(g.height / g.tip_thickness(), 2)), "", ""});
    table.row({"(circumscribing circle)",
               fmt::format("({})", millimetres(std::hypot(g.width(), g.overall_height()), 1)), "mm",
               ""});
    table.row({"(mass per metre)",
               fmt::format("({})", significant(g.section() * job.sink.alloy.density, 3)), "kg/m",
               ""});
    return heading("Dimensions (derived values in brackets)") + table.text();
}

/// Where a fan runs: power by the air it moves, noise by the similarity law.
std::string fan_lines(const job::Fan& fan, const sink::MovingAirView<double>& v) {
    const double air_power = v.pressure_drop * v.volume_flow;
    std::string text =
        fmt::format("{} runs at {} m³/h against {} Pa: {} mW of air power", fan_words(fan),
                    significant(v.volume_flow * 3600.0, 3), significant(v.pressure_drop, 3),
                    significant(air_power * 1e3, 3));
    if (fan.efficiency)
        text += fmt::format(", about {} W electric at {} %",
                            significant(air_power / *fan.efficiency, 2), percent(*fan.efficiency));
    const double louder = sink::relative_sound(fan);
    if (std::abs(louder) >= 0.05)
        text += fmt::format("; {:+.1f} dB sound power against one fan at its curve's speed "
                            "(relative, by the similarity law)",
                            louder);
    return paragraph(text + ".");
}

/// How the air gets through, and what drives it.
std::string air_path(const Job& job, const Rating& rating, const sink::MovingAirView<double>& v) {
    std::string page;
    if (std::holds_alternative<job::DuctedAir>(job.air.state))
        page += paragraph(fmt::format(
            "The duct is taken to close around the fins: {} x {} mm. Air that can pass beside them "
            "is lost to them and not counted here.",
            millimetres(rating.geometry.width()), millimetres(rating.geometry.height)));
    if (v.bypass_exit_flow > 0.0)
        page += paragraph(fmt::format(
            "Of the air {} % enters between the fins and {} % leaves there; the rest "
            "passes beside them.",
            percent(v.entering_flow / v.volume_flow), percent(v.exit_flow / v.volume_flow)));
    if (const auto* driven = std::get_if<job::FanAir>(&job.air.state))
        page += fan_lines(driven->fans.front(), v);
    return page;
}

std::string key_line(const Rating& rating, const Job& job) {
    std::string text = fmt::format(
        "{} g; {} °C/W at {} K rise of the hottest pad over inlet air (mean base {} °C/W)",
        grams(rating.mass), significant(rating.sink_resistance(), 3),
        fixed(rating.hottest_pad_rise, 1), significant(rating.base_resistance(), 3));
    const auto* moving = std::get_if<sink::MovingAirView<double>>(&rating.view);
    if (!moving) return paragraph(text);
    if (const auto outlet = rating.outlet_temperature())
        text += fmt::format("; {} Pa, {} m/s between the fins, {} m³/h, air leaves at {} °C",
                            significant(rating.pressure_drop, 3),
                            significant(moving->channel_velocity, 3),
                            significant(moving->volume_flow * 3600.0, 3), celsius(*outlet));
    else
        text += fmt::format("; {} m/s between the fins, {} m³/h enter there and {} leave at their "
                            "end",
                            significant(moving->channel_velocity, 3),
                            significant(moving->entering_flow * 3600.0, 3),
                            significant(moving->exit_flow * 3600.0, 3));
    return paragraph(text) + air_path(job, rating, *moving);
}

std::string heat_split(const Rating& rating) {
    TextTable table;
    const double total = rating.heat.total();
    const auto row = [&](const char* name, double watts) {
        if (watts != 0.0)
            table.row({name, significant(watts, 3), "W", percent(watts / total) + " %"});
    };
    row("channels between the fins", rating.heat.channels);
    row("outer faces", rating.heat.outer_faces);
    row("fin tips and end faces", rating.heat.tips_edges);
    row("rim of the base", rating.heat.rim);
    row(rating.geometry.plate() ? "front of the plate" : "base beside the fins", rating.heat.bare);
    row("back of the base", rating.heat.back);
    row("radiation, all surfaces", rating.heat.radiation);
    row("wall behind", rating.heat.wall);
    std::string out = heading("The heat leaves by") + table.text();
    if (rating.sun > 0.0)
        out += paragraph(fmt::format("of which {} W come from the sun, taken up by the fins' side",
                                     significant(rating.sun, 3)));
    if (rating.geometry.plate()) return out;
    if (const auto* still = std::get_if<sink::StillAirView<double>>(&rating.view))
        out += paragraph(fmt::format(
            "film {} W/(m² K) in the channels, {} outside; fin efficiency {}; radiation {} per "
            "wetted channel area",
            significant(still->channel_film, 3), significant(still->outer_film, 3),
            fixed(still->inner_efficiency, 3), significant(still->channel_radiation, 3)));
    if (const auto* duct = std::get_if<sink::MovingAirView<double>>(&rating.view))
        out += paragraph(
            fmt::format("film {} W/(m² K); fin efficiency {}; Re {} on the hydraulic diameter",
                        significant(duct->film, 3), fixed(duct->inner_efficiency, 3),
                        significant(duct->reynolds, 3)));
    return out;
}

std::string binding_table(const Job& job, const std::vector<BindingLimit>& binding) {
    if (binding.empty()) return {};
    TextTable table;
    table.left(1);
    table.left(2);
    for (const BindingLimit& limit : binding)
        table.row({limit.name, bound_text(limit), price_text(limit, job.sink.aim)});
    return heading(
               "Limits that bind, and what easing each would buy (first order, before rounding)") +
           table.text();
}

std::string alternatives_table(const Job& job, const Answer& answer) {
    if (answer.alternatives.empty()) return {};
    TextTable table;
    table.row(
        {"fins", "H", "t", "S", "tb", "W", "L mm", aim_name(job.sink.aim), "against the answer"});
    const auto row = [&](const sizing::Design& d) {
        const auto& g = d.rounded;
        const job::Steps& s = job.sink.steps;
        const double more = d.rounded_aim / answer.design.rounded_aim - 1.0;
        table.row({fmt::format("{}", g.fins),
                   millimetres(g.height, decimals_for_step(s.fin_height)),
                   millimetres(g.tip_thickness(), decimals_for_step(s.fin_thickness)),
                   millimetres(g.gap, 2), millimetres(g.base, decimals_for_step(s.base_thickness)),
                   millimetres(g.width(), 1), millimetres(g.length, decimals_for_step(s.length)),
                   aim_text(job.sink.aim, d.rounded_aim),
                   &d == &answer.design ? "the answer" : fmt::format("{:+.1f} %", more * 100.0)});
    };
    row(answer.design);
    for (const auto& d : answer.alternatives)
        row(d);
    return heading("Nearest alternatives, each optimised and rounded") + table.text();
}

bool upright(const job::Mounting& m) {
    return m.tilt == 0.0 && !m.fins_level;
}

/// The same sink by each channel law, for still air: what the choice of law is worth.
std::string by_each_channel_law(const Job& job, const Rating& rating) {
    const auto* still = std::get_if<job::StillAir>(&job.air.state);
    if (!still || !upright(job.air.mounting) || rating.geometry.plate()) return {};
    using job::ChannelLaw;
    constexpr std::pair<ChannelLaw, const char*> laws[] = {
        {ChannelLaw::fin_channel, "fin_channel"},
        {ChannelLaw::u_channel, "u_channel"},
        {ChannelLaw::parallel_plates, "parallel_plates"},
        {ChannelLaw::elenbaas, "elenbaas"}};
    sink::Duty duty = sink::duty_of(job);
    std::string text;
    for (const auto& [law, name] : laws) {
        std::get<sink::StillAir>(duty.surroundings.air).channel_law = law;
        const Rating rated = sink::rate(rating.geometry, duty);
        text +=
            fmt::format("{}{} {}{}", text.empty() ? "" : ", ", name,
                        rated.runs_away() ? "runs away" : fixed(rated.hottest_pad_rise, 1) + " K",
                        law == still->channel_law ? " (used)" : "");
    }
    return paragraph("Hottest pad's rise by each channel law: " + text +
                     ". Choose with air: channel_law.");
}

std::string laws_used(const Job& job, const Rating& rating) {
    std::string lines, warnings, estimates;
    for (const sink::LawUse& use : rating.laws) {
        const auto* passport = correlations::find_passport(use.passport);
        lines += wrapped(fmt::format("{}: {} [{}], {}", use.role, passport->title,
                                     passport->estimate ? "estimate" : passport->source_key,
                                     passport->stated_error),
                         page_width, "  ", "      ");
        if (passport->estimate)
            estimates += wrapped(fmt::format("{}: {}; stated error {}", use.role, passport->title,
                                             passport->stated_error),
                                 page_width, "  ! ", "    ");
        for (const std::string& left : use.ranges_left())
            warnings += wrapped(left, page_width, "  ! ", "    ");
    }
    std::string out = heading("Laws used (finwright laws NAME for each passport)") + lines +
                      by_each_channel_law(job, rating);
    if (!estimates.empty()) out += heading("ESTIMATES: no published law was at hand") + estimates;
    if (!warnings.empty()) out += heading("Outside a law's range") + warnings;
    return out;
}

/// Which part comes nearest to what it is allowed, and which limits the stated sink breaks.
std::string standing(const Job& job, const Rating& rating) {
    std::string text = paragraph(settled_powers(job, rating));
    const sink::PartRating* nearest = nullptr;
    for (const auto& part : rating.parts)
        if (part.headroom() && (!nearest || *part.headroom() < *nearest->headroom()))
            nearest = &part;
    if (nearest && !rating.runs_away()) {
        const double left = *nearest->headroom();
        text +=
            paragraph(fmt::format("{} is nearest to what it is allowed: {} K {}.", nearest->name,
                                  fixed(std::abs(left), 1), left < 0.0 ? "TOO HOT" : "left"));
    }
    for (const std::string& breach : sizing::broken_limits(job, rating))
        text += wrapped(breach, page_width, "  LIMIT BROKEN: ", "    ");
    return text;
}

std::string caution_list(const Job& job, const Rating& rating) {
    std::string out = heading("Cautions");
    for (const std::string& text : cautions(job, rating))
        out += wrapped(text, page_width, "  - ", "    ");
    return out;
}

std::vector<std::string> levers(const Job& job, const Refusal& refusal) {
    std::vector<std::string> list;
    if (refusal.possible_power > least_share_worth_saying * job.total_power())
        list.push_back(fmt::format(
            "Fewer watts: this sink serves {} W instead of {} W, all parts in proportion.",
            significant(refusal.possible_power, 3), significant(job.total_power(), 3)));
    for (std::size_t i = 0; i < job.parts.size(); ++i) {
        const job::Part& part = job.parts[i];
        if (part.name == refusal.part && part.interface > 0.0 && refusal.closest &&
            refusal.closest->parts[i].headroom().value_or(0.0) < 0.0)
            list.push_back(
                fmt::format("A better interface: {} loses {} K in it; halving it gains {} K.",
                            part.name, fixed(part.interface * part.power, 1),
                            fixed(0.5 * part.interface * part.power, 1)));
    }
    for (const BindingLimit& limit : refusal.binding)
        if (limit.reason != "search range")
            list.push_back(fmt::format("Ease a limit: {} {}: {}.", limit.name, bound_text(limit),
                                       price_in_kelvin(limit)));
    if (std::holds_alternative<job::StillAir>(job.air.state))
        list.push_back("Moving air: state it as ducted with a velocity or a flow and size again.");
    else
        list.push_back("More air: a higher velocity or flow, within the pressure the fan has.");
    return list;
}

std::string interface_forms(const job::Part& part) {
    if (part.interface == 0.0) return "none";
    const double area_resistance = part.interface * part.contact_area.value_or(part.pad_area());
    return fmt::format("{} K/W = {} K cm²/W = {} °C in²/W over {}", significant(part.interface, 3),
                       significant(area_resistance * 1e4, 3),
                       significant(area_resistance / 6.4516e-4, 3),
                       part.contact_area ? fmt::format("a contact of {} mm²",
                                                       significant(*part.contact_area * 1e6, 3))
                                         : "the pad");
}

/// R_jc and the 25 degC case rating behind it, or the one it amounts to, in brackets.
std::string rating_text(const job::Part& part) {
    constexpr double rating_case = 298.15; // [K]
    if (part.rating)
        return fmt::format("{} W to {} °C", significant(part.rating->power, 3),
                           celsius(part.rating->junction_max, 0));
    if (!part.junction_limit || part.junction_to_case == 0.0) return "-";
    return fmt::format(
        "({} W)", significant((*part.junction_limit - rating_case) / part.junction_to_case, 3));
}

std::string insulation_text(const job::Part& part) {
    if (!part.insulated) return "-";
    return *part.insulated ? "insulated" : "live";
}

std::string understood_tables(const Job& job) {
    if (!job.has_power_table()) return {};
    std::string out;
    for (const job::Part& part : job.parts) {
        if (!part.power_table) continue;
        std::string points;
        for (const auto& point : part.power_table->points())
            points += fmt::format("{}{} W at {} °C", points.empty() ? "" : ", ",
                                  significant(point.power, 3), celsius(point.temperature, 0));
        out += wrapped(
            fmt::format("{}: {}; taken as {} W", part.name, points, significant(part.power, 3)),
            page_width, "  ", "      ");
    }
    return heading("Power by junction temperature (taken at the most up to the junction allowed)") +
           out;
}

std::string understood_parts(const Job& job) {
    TextTable table;
    for (const std::size_t column : {5, 6, 7})
        table.left(column);
    table.row({"part", "W", "limit °C", "junction-case K/W", "at 25 °C case", "pad mm", "interface",
               "tab"});
    for (const job::Part& part : job.parts)
        table.row(
            {part.name, significant(part.power, 3),
             part.junction_limit ? celsius(*part.junction_limit, 0) : "-",
             significant(part.junction_to_case, 3), rating_text(part),
             fmt::format("{} x {}", millimetres(part.pad_across), millimetres(part.pad_along)),
             interface_forms(part), insulation_text(part)});
    std::string out = heading("Parts") + table.text() + understood_tables(job);
    const auto allowed = sizing::allowed_pad_rises(job);
    TextTable budget;
    for (std::size_t i = 0; i < job.parts.size(); ++i)
        if (allowed[i]) budget.row({job.parts[i].name, fixed(*allowed[i], 1), "K"});
    return out + heading("Rise each pad may have over the inlet air") + budget.text();
}

std::string range_text(const job::Range& range, double factor, int decimals) {
    if (range.fixed()) return fixed(*range.from * factor, decimals);
    if (!range.from && !range.to) return "free";
    return fmt::format("{} to {}", range.from ? fixed(*range.from * factor, decimals) : "free",
                       range.to ? fixed(*range.to * factor, decimals) : "free");
}

std::string understood_space(const Job& job) {
    TextTable table;
    const auto row = [&](const char* name, const job::Range& range) {
        table.row({name, range_text(range, 1e3, 2), "mm"});
    };
    table.row({"fins", range_text(job.sink.fins, 1.0, 0), ""});
    row("fin height", job.sink.fin_height);
    row("fin thickness", job.sink.fin_thickness);
    row("gap", job.sink.gap);
    row("base thickness", job.sink.base_thickness);
    row("width", job.sink.width);
    row("length", job.sink.length);
    const auto side = [](const std::optional<double>& v) {
        return v ? millimetres(*v) : std::string("free");
    };
    const job::Space& space = job.limits.space;
    table.row({"space",
               fmt::format("{} wide, {} high, {} long", side(space.width), side(space.height),
                           side(space.length)),
               "mm"});
    return heading("Dimensions left to the search") + table.text();
}

std::string rounding_line(const Answer& answer, const Job& job) {
    const double price = answer.design.rounded_aim / answer.least_aim - 1.0;
    return paragraph(fmt::format(
        "Least {} over {} fin count{}; rounding to the shop's steps costs {} % ({} before).",
        aim_name(job.sink.aim), answer.fin_counts_tried, answer.fin_counts_tried == 1 ? "" : "s",
        fixed(price * 100.0, 1), aim_text(job.sink.aim, answer.least_aim)));
}

/// Whether fins are needed at all.
std::string plate_line(const Answer& answer) {
    if (!answer.plate) return {};
    const auto& plate = *answer.plate;
    return paragraph(fmt::format(
        "Are fins needed? A plain plate filling the space ({} x {} x {} mm, {} g) would {}.",
        millimetres(plate.geometry.width(), 0), millimetres(plate.geometry.length, 0),
        millimetres(plate.geometry.base, 1), grams(plate.mass),
        plate.excess > 0.0
            ? fmt::format("leave the hottest part {} K too hot", fixed(plate.excess, 1))
            : fmt::format("do, with {} K left", fixed(-plate.excess, 1))));
}

std::string fan_choice(const Answer& answer, const Job& job) {
    if (answer.fans.empty()) return {};
    std::string others;
    for (std::size_t i = 0; i < answer.fans.size(); ++i) {
        if (i == answer.fan) continue;
        const auto& fan = answer.fans[i];
        others += fmt::format("{}{}: {}", others.empty() ? "" : ", ", fan.name,
                              fan.aim ? aim_text(job.sink.aim, *fan.aim) : "no design");
    }
    return paragraph(fmt::format("Of {} fans {} leads to the least {} ({}). The others: {}.",
                                 answer.fans.size(), answer.fans[answer.fan].name,
                                 aim_name(job.sink.aim),
                                 aim_text(job.sink.aim, answer.design.rounded_aim), others));
}

/// What parts downstream were granted for the air the others warm.
std::string warmed_line(const Answer& answer, const Job& job) {
    std::string parts;
    for (std::size_t i = 0; i < answer.warmed.size(); ++i)
        if (std::abs(answer.warmed[i]) >= 0.05)
            parts += fmt::format("{}{} {:+.1f} K", parts.empty() ? "" : ", ", job.parts[i].name,
                                 answer.warmed[i]);
    if (parts.empty()) return {};
    return paragraph("Against air of one temperature, the air as the parts warm it shifts their "
                     "bases by: " +
                     parts + ". The limits of the search allow for it.");
}

} // namespace

std::string size_page(const Job& job, const Answer& answer) {
    return title_lines(job) + heading("The sink") + key_line(answer.rating, job) +
           plate_line(answer) + rounding_line(answer, job) + fan_choice(answer, job) +
           warmed_line(answer, job) + paragraph(sizing_powers(job)) +
           paragraph(settled_powers(job, answer.rating)) +
           dimension_table(job, answer.rating.geometry) + budget(job, answer.rating) +
           heat_split(answer.rating) + binding_table(job, answer.binding) +
           alternatives_table(job, answer) + laws_used(job, answer.rating) +
           caution_list(job, answer.rating);
}

std::string rate_page(const Job& job, const Rating& rating) {
    return title_lines(job) + heading("The sink as stated") + key_line(rating, job) +
           standing(job, rating) + dimension_table(job, rating.geometry) + budget(job, rating) +
           heat_split(rating) + laws_used(job, rating) + caution_list(job, rating);
}

std::string refusal_page(const Job& job, const Refusal& refusal) {
    std::string out = title_lines(job) + heading("Not possible as stated") +
                      paragraph(refusal.reason) + paragraph(sizing_powers(job));
    if (!refusal.closest) return out;
    const Rating& closest = *refusal.closest;
    if (const auto target = job.limits.sink_resistance;
        target && closest.sink_resistance() > *target)
        out += paragraph(fmt::format("The nearest sink has {} °C/W, the target is {} °C/W.",
                                     significant(closest.sink_resistance(), 3),
                                     significant(*target, 3)));
    out += paragraph(fmt::format(
        "The pad of {} is {} K hotter than it may be on the sink that comes nearest:", refusal.part,
        fixed(refusal.shortfall, 1)));
    out += key_line(closest, job) + dimension_table(job, closest.geometry) + budget(job, closest);
    out += heading("What is left to try");
    for (const std::string& lever : levers(job, refusal))
        out += wrapped(lever, page_width, "  - ", "    ");
    return out;
}

std::string check_page(const Job& job) {
    return title_lines(job) + understood_parts(job) + understood_space(job);
}

} // namespace finwright::sheets
