#include "src/sizing/sizing.hpp"

#include <algorithm>
#include <cmath>
#include <fmt/format.h>
#include <limits>

namespace finwright::sizing {

using job::Job;

namespace {

constexpr int rounds = 6;              // of search and map
constexpr double worth_a_search = 0.1; // [K]
constexpr double agreed = 1e-7;        // what a part may stand over what it is allowed [K]
constexpr double step_aside = 1e-3;    // what a round keeps free beyond the map's word [K]

Job with_fan(const Job& job, std::size_t fan) {
    Job one = job;
    if (auto* air = std::get_if<job::FanAir>(&one.air.state)) air->fans = {air->fans[fan]};
    return one;
}

/// The job with the parts' limits lowered by what warmed air adds.
Job lowered(const Job& job, const std::vector<double>& warmed) {
    Job asked = job;
    for (std::size_t i = 0; i < warmed.size(); ++i)
        if (asked.parts[i].junction_limit) *asked.parts[i].junction_limit -= warmed[i];
    if (asked.limits.sink_resistance)
        *asked.limits.sink_resistance -=
            *std::max_element(warmed.begin(), warmed.end()) / job.total_power();
    return asked;
}

/// Rise of each pad by the map over its rise on even air [K].
std::vector<double> warmed_parts(const sink::Geometry<double>& g, const sink::Duty& duty) {
    const sink::Rating rating = sink::rate(g, duty);
    std::vector<double> warmed = sink::pad_rises(g, duty, sink::balance(g, duty));
    for (std::size_t i = 0; i < warmed.size(); ++i)
        warmed[i] = rating.parts[i].pad_temperature - rating.air_temperature - warmed[i];
    return warmed;
}

/// How far the hottest part stands above what it is allowed; negative: what is left [K].
double excess(const Job& job, const sink::Rating& rating) {
    const auto allowed = allowed_pad_rises(job);
    double most = -std::numeric_limits<double>::infinity();
    for (std::size_t i = 0; i < allowed.size(); ++i)
        if (allowed[i])
            most = std::max(most,
                            rating.parts[i].pad_temperature - rating.air_temperature - *allowed[i]);
    return most;
}

double rounded_aim(const Sizing& sizing) {
    return std::get<Answer>(sizing).design.rounded_aim;
}

/// Nothing where wall or surroundings would hold so large a plate colder than its air.
std::optional<PlainPlate> plain_plate(const Job& job, double thickness) {
    const job::Space& space = job.limits.space;
    const auto allowed = allowed_pad_rises(job);
    const bool held = std::any_of(allowed.begin(), allowed.end(),
                                  [](const auto& rise) { return rise.has_value(); });
    if (!space.width || !space.length || !held) return std::nullopt;
    PlainPlate plate;
    plate.geometry = {0, 0.0, 0.0, *space.width, thickness, *space.length};
    try {
        const sink::Rating rating = sink::rate(plate.geometry, sink::duty_of(job));
        plate.mass = rating.mass;
        plate.excess = excess(job, rating);
    } catch (const sink::ColderThanAir&) {
        return std::nullopt;
    }
    return plate;
}

/// Whether the map says anything the search did not know [K].
bool matters(const std::vector<double>& warmed, const std::vector<double>& kept) {
    for (std::size_t i = 0; i < kept.size(); ++i)
        if (std::abs(warmed[i] - kept[i]) > worth_a_search) return true;
    return false;
}

/// Search and map in turn, until the parts downstream keep what they are allowed and those upstream
/// waste nothing. From the second round on what was kept free never shrinks, so that the rounds
/// end.
Sizing size_with_one_fan(const Job& job, const SearchOptions& options) {
    Sizing sizing = size_on_even_air(job, options);
    if (std::holds_alternative<job::StillAir>(job.air.state)) {
        if (auto* answer = std::get_if<Answer>(&sizing))
            answer->plate = plain_plate(job, answer->design.rounded.base);
        return sizing;
    }
    const sink::Duty duty = sink::duty_of(job);
    std::vector<double> kept(job.parts.size(), 0.0);
    std::optional<Sizing> best;
    for (int round = 0; round < rounds; ++round) {
        auto* answer = std::get_if<Answer>(&sizing);
        if (!answer) break;
        answer->rating = sink::rate(answer->design.rounded, duty);
        answer->design.rounded_aim = aim_value(job.sink.aim, answer->rating);
        answer->warmed = kept;
        const auto warmed = warmed_parts(answer->design.rounded, duty);
        const bool holds = excess(job, answer->rating) < agreed;
        if (holds && (!best || rounded_aim(sizing) < rounded_aim(*best))) best = sizing;
        if (holds && (round > 0 || !matters(warmed, kept))) break;
        for (std::size_t i = 0; i < kept.size(); ++i)
            kept[i] = round == 0 ? warmed[i] : std::max(kept[i], warmed[i]) + step_aside;
        sizing = size_on_even_air(lowered(job, kept), options);
    }
    if (best) return *best;
    if (std::holds_alternative<Refusal>(sizing)) return sizing;
    Refusal refusal;
    refusal.reason = "The search does not settle between the air the parts warm and the design "
                     "that serves them. Place the parts side by side, or give more air.";
    return refusal;
}

/// The air that arrives, warmed by a sink below, may leave nothing to work with.
std::optional<Refusal> too_warm_to_begin(const Job& job) {
    const auto allowed = allowed_pad_rises(job);
    for (std::size_t i = 0; i < allowed.size(); ++i)
        if (allowed[i] && *allowed[i] <= 0.0) {
            Refusal refusal;
            refusal.reason = fmt::format(
                "The air that reaches the fins has {:.1f} °C: {} could not be kept cool enough "
                "even by a perfect sink. Move the sink below further away or aside, lower its "
                "power, or "
                "bring cooler air.",
                sink::inlet_temperature(job) - 273.15, job.parts[i].name);
            return refusal;
        }
    return std::nullopt;
}

/// With the fan that serves best, if there are several.
Sizing size_with_best_fan(const Job& job, const SearchOptions& options) {
    const auto* air = std::get_if<job::FanAir>(&job.air.state);
    if (!air || air->fans.size() == 1) return size_with_one_fan(job, options);
    std::optional<Sizing> best;
    std::vector<FanChoice> fans;
    for (std::size_t i = 0; i < air->fans.size(); ++i) {
        Sizing sizing = size_with_one_fan(with_fan(job, i), options);
        auto* answer = std::get_if<Answer>(&sizing);
        fans.push_back({air->fans[i].name, std::nullopt});
        if (answer) {
            answer->fan = i;
            fans.back().aim = answer->design.rounded_aim;
        }
        const bool answered = best && std::holds_alternative<Answer>(*best);
        const bool better = answer && (!answered || rounded_aim(sizing) < rounded_aim(*best));
        if (!best || better) best = std::move(sizing);
    }
    if (auto* answer = std::get_if<Answer>(&*best)) answer->fans = std::move(fans);
    return std::move(*best);
}

/// Every part at the power it is sized for.
Job at_sizing_powers(Job job) {
    for (job::Part& part : job.parts)
        part.power_table.reset();
    return job;
}

} // namespace

Sizing size(const Job& job, const SearchOptions& options) {
    if (auto refusal = too_warm_to_begin(job)) return *refusal;
    if (!job.has_power_table()) return size_with_best_fan(job, options);
    Sizing sizing = size_with_best_fan(at_sizing_powers(job), options);
    if (auto* answer = std::get_if<Answer>(&sizing))
        answer->rating =
            sink::rate(answer->design.rounded, sink::duty_of(as_answered(job, *answer)));
    return sizing;
}

Job as_answered(const Job& job, const Answer& answer) {
    return with_fan(job, answer.fan);
}

} // namespace finwright::sizing
