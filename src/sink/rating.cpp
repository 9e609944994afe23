#include "src/sink/rating.hpp"

#include "src/sink/placing.hpp"
#include "src/sink/power_balance.hpp"
#include <algorithm>
#include <cmath>

namespace finwright::sink {

using correlations::Dual;

namespace {

constexpr double level_to_the_eye = 1e-6; // cosine of a base that lies flat

PartRating rate_part(const job::Part& part, double pad_temperature, double margin) {
    PartRating r;
    r.name = part.name;
    r.power = part.power;
    r.pad_temperature = pad_temperature;
    r.case_temperature = pad_temperature + part.power * part.interface;
    r.junction_temperature = r.case_temperature + part.power * part.junction_to_case;
    if (part.junction_limit) r.junction_allowed = *part.junction_limit - margin;
    return r;
}

LawUse channel_law_use(const StillAirView<double>& v, const Geometry<double>& g, ChannelLaw law) {
    const double gap = g.mean_gap();
    switch (law) {
    case ChannelLaw::u_channel:
        return {"u_channel", "channels", {v.rayleigh_radius, gap, g.height}};
    case ChannelLaw::parallel_plates:
        return {"parallel_plates", "channels", {v.elenbaas}};
    case ChannelLaw::elenbaas:
        return {"elenbaas", "channels", {v.elenbaas}};
    case ChannelLaw::fin_channel:
        break;
    }
    return {"fin_channel", "channels", {v.elenbaas, v.plate, gap, g.height, g.fin_length()}};
}

std::vector<LawUse> channel_laws(const StillAirView<double>& v, const Geometry<double>& g,
                                 const StillAir& still) {
    const double tilt = still.mounting.tilt, gap = g.mean_gap();
    std::vector<LawUse> uses;
    if (still.mounting.fins_level)
        uses.push_back({"level_fins", "channels, blocked", {gap, g.height}});
    else if (std::cos(tilt) > level_to_the_eye)
        uses.push_back(channel_law_use(v, g, still.channel_law));
    if (std::sin(tilt) == 0.0) return uses;
    const double ra = v.grashof_unit * std::abs(std::sin(tilt)) * gap * gap * gap;
    uses.push_back({tilt > 0.0 ? "horizontal_array" : "array_facing_down", "channels", {ra}});
    uses.push_back({"horizontal_length", "channels, their length", {g.fin_length()}});
    if (std::cos(tilt) > level_to_the_eye)
        uses.push_back({"tilted_array", "channels, tilt", {tilt}});
    return uses;
}

std::vector<LawUse> still_air_laws(const StillAirView<double>& v, const Geometry<double>& g,
                                   const StillAir& still, double emissivity) {
    std::vector<LawUse> uses{{"air_conductivity", "air in the film", {v.film_temperature}}};
    if (g.plate()) {
        uses.push_back({"inclined_face",
                        "the plate's faces and rim",
                        {v.grashof_unit, v.prandtl, g.length, g.width(), still.mounting.tilt}});
        return uses;
    }
    for (LawUse& use : channel_laws(v, g, still))
        uses.push_back(std::move(use));
    if (std::sin(still.mounting.tilt) == 0.0 && !still.mounting.fins_level)
        uses.push_back(
            {"vertical_laminar", "outer faces, tips, edges, rim", {v.rayleigh_length, v.prandtl}});
    else
        uses.push_back({"inclined_face",
                        "outer faces, tips, edges, rim",
                        {v.grashof_unit, v.prandtl, g.length, g.width(), still.mounting.tilt}});
    if (still.drift && still.drift->direction != job::Drift::Direction::crossing) {
        uses.push_back(
            {"drift_in_channel",
             "drift through the channels",
             {still.drift->velocity, v.kinematic_viscosity, g.mean_gap(), g.fin_length()}});
        if (still.drift->direction == job::Drift::Direction::opposing)
            uses.push_back(
                {"mixed_against", "drift against rising air", {v.forced_film, v.natural_film}});
    }
    uses.push_back({"channel_radiation_zoned",
                    "radiation of the channels",
                    {emissivity, g.mean_gap(), g.height, g.fin_length()}});
    return uses;
}

std::vector<LawUse> moving_air_laws(const MovingAirView<double>& v, const Geometry<double>& g) {
    const double length_ratio = g.fin_length() / v.hydraulic_diameter;
    std::vector<LawUse> uses{
        {"air_conductivity", "air in the film", {v.film_temperature}},
        {"duct_all_regimes", "channels", {v.reynolds, v.prandtl, v.aspect, length_ratio}},
        {"fapp_all_regimes", "friction", {v.reynolds, v.aspect, length_ratio}},
        {"entry_loss", "entry", {v.free_area_ratio}}};
    if (v.bypass_velocity > 0.0) {
        uses.push_back({"flat_plate", "outer faces and tips", {v.outer_reynolds, v.prandtl}});
        uses.push_back({"air_split",
                        "share of the air between the fins",
                        {v.entering_flow / v.volume_flow, v.exit_flow / v.volume_flow}});
    }
    return uses;
}

/// Rates the flow side: what the films see, what the air loses, which laws say so.
void rate_air(Rating& rating, const Duty& duty, double driving_rise) {
    const Geometry<double>& g = rating.geometry;
    if (const auto* still = std::get_if<StillAir>(&duty.surroundings.air)) {
        const StillAirSink<double> model(g, duty);
        const auto view = model.view(driving_rise);
        rating.laws = still_air_laws(view, g, *still, duty.material.emissivity);
        rating.view = view;
        return;
    }
    const MovingAirSink<double> model(g, duty);
    const auto view = model.view(driving_rise);
    rating.laws = moving_air_laws(view, g);
    rating.view = view;
}

/// In still air by the series; in a stream by the map, whose pads meet the air that others warmed.
std::vector<double> rated_pad_rises(const Rating& rating, const Duty& duty) {
    if (duty.surroundings.still())
        return pad_rises(rating.geometry, duty,
                         {rating.base_rise, rating.pressure_drop, 0.0, rating.conductance});
    return base_field(base_map(rating.geometry, duty, rating)).pad_rises;
}

void rate_parts(Rating& rating, const Duty& duty) {
    const std::vector<double> rises = rated_pad_rises(rating, duty);
    for (std::size_t i = 0; i < duty.parts.size(); ++i)
        rating.parts.push_back(
            rate_part(duty.parts[i], rating.air_temperature + rises[i], duty.margin));
    rating.hottest_pad_rise = *std::max_element(rises.begin(), rises.end());
}

/// The base as the spreading series sees it.
template <class T>
correlations::Slab slab_of(const Geometry<T>& g, const Duty& duty, const T& film) {
    using correlations::value_of;
    return {value_of(g.width()), value_of(g.length), value_of(g.base), duty.material.conductivity,
            value_of(film)};
}

/// What wall, surroundings and sun shift the whole base by, over what the parts' power alone would
/// raise it [K].
template <class T>
T common_shift(const Duty& duty, const Balance<T>& balance) {
    return balance.base_rise - duty.power() / balance.conductance;
}

std::vector<double> powers_of(const Duty& duty) {
    std::vector<double> powers;
    for (const job::Part& part : duty.parts)
        powers.push_back(part.power);
    return powers;
}

/// Film to air shifted as the whole base is.
UniformFilm film_of(const Rating& rating, double footprint) {
    return {rating.conductance / footprint, rating.base_rise - rating.power / rating.conductance};
}

/// The channels' air. What outer faces and tips give to the air beside them counts as more of it.
WarmingAir warming(const MovingAirView<double>& v, const Rating& rating) {
    const double taken = rating.heat.channels / (v.capacity_flow * rating.base_rise);
    return {v.capacity_flow * rating.heat.total() / rating.heat.channels, -std::log1p(-taken)};
}

} // namespace

std::optional<double> Rating::outlet_temperature() const {
    const auto* moving = std::get_if<MovingAirView<double>>(&view);
    if (!moving || moving->free_stream()) return std::nullopt;
    const double whole = moving->capacity_flow * moving->volume_flow / moving->entering_flow;
    return air_temperature + power / whole;
}

correlations::ModeSet modes_up_to(double half_waves, const Geometry<double>& g, const Duty& duty) {
    const auto pads = pads_on_base(duty.parts, g.width(), g.length);
    return correlations::ModeSet::up_to(half_waves, slab_of(g, duty, 1.0), pads);
}

correlations::ModeSet modes_for_means(const Geometry<double>& g, const Duty& duty) {
    const auto pads = pads_on_base(duty.parts, g.width(), g.length);
    return correlations::ModeSet::for_means(slab_of(g, duty, 1.0), pads);
}

std::vector<double> pad_rises(const Geometry<double>& g, const Duty& duty,
                              const Balance<double>& balance, const correlations::ModeSet& modes) {
    const auto slab = slab_of(g, duty, balance.conductance / g.footprint());
    const auto pads = pads_on_base(duty.parts, slab.width, slab.length);
    auto rises = correlations::pad_mean_rises(slab, pads, powers_of(duty), modes);
    for (double& rise : rises)
        rise += common_shift(duty, balance);
    return rises;
}

std::vector<double> pad_rises(const Geometry<double>& g, const Duty& duty,
                              const Balance<double>& balance) {
    return pad_rises(g, duty, balance, modes_for_means(g, duty));
}

std::vector<Dual<5>> pad_rises(const Geometry<Dual<5>>& g, const Duty& duty,
                               const Balance<Dual<5>>& balance,
                               const correlations::ModeSet& modes) {
    const Dual<5> width = g.width(), film = balance.conductance / g.footprint();
    const auto slab = slab_of(g, duty, film);
    const auto pads = pads_on_base(duty.parts, Dual<1>::variable(slab.width, 0),
                                   Dual<1>::variable(slab.length, 0));
    const Dual<5> shift = common_shift(duty, balance);
    std::vector<Dual<5>> rises;
    for (const Dual<4>& rise :
         correlations::pad_mean_rises_with_slopes(slab, pads, powers_of(duty), modes)) {
        Dual<5> total(rise.value);
        for (std::size_t k = 0; k < 5; ++k)
            total.slope[k] = rise.slope[0] * width.slope[k] + rise.slope[1] * g.length.slope[k] +
                             rise.slope[2] * g.base.slope[k] + rise.slope[3] * film.slope[k];
        rises.push_back(total + shift);
    }
    return rises;
}

BaseMap base_map(const Geometry<double>& g, const Duty& duty, const Rating& rating) {
    BaseMap map{g.width(), g.length, g.base, duty.material.conductivity, {}, powers_of(duty), {}};
    map.pads = pads_on_base(duty.parts, map.width, map.length);
    if (const auto* moving = std::get_if<MovingAirView<double>>(&rating.view))
        map.air = warming(*moving, rating);
    else
        map.air = film_of(rating, g.footprint());
    return map;
}

namespace {

/// Every part at its `power`, whatever its table says.
Rating rate_at_powers(const Geometry<double>& g, const Duty& duty) {
    const Balance<double> settled = balance(g, duty);
    Rating rating;
    rating.geometry = g;
    rating.power = duty.power();
    rating.air_temperature = duty.surroundings.air_temperature;
    rating.mass = g.metal() * duty.material.density;
    rating.base_rise = settled.base_rise;
    rating.pressure_drop = settled.pressure_drop;
    rating.conductance = settled.conductance;
    rating.sun = sun_taken(g, duty.surroundings);
    rating.heat = shed(g, duty, settled.driving_rise);
    if (rating.heat.total() > (rating.power + rating.sun) * (1.0 + 1e-6)) throw ColderThanAir();
    rate_air(rating, duty, settled.driving_rise);
    rating.laws.insert(rating.laws.end(), duty.inlet_laws.begin(), duty.inlet_laws.end());
    rate_parts(rating, duty);
    return rating;
}

/// The parts whose power follows their junction.
struct TableParts {
    std::vector<std::size_t> indices;
    std::vector<job::PowerTable> tables;

    explicit TableParts(const std::vector<job::Part>& parts) {
        for (std::size_t i = 0; i < parts.size(); ++i)
            if (parts[i].power_table) {
                indices.push_back(i);
                tables.push_back(*parts[i].power_table);
            }
    }

    Duty at(Duty duty, const std::vector<double>& powers) const {
        for (std::size_t i = 0; i < indices.size(); ++i)
            duty.parts[indices[i]].power = powers[i];
        return duty;
    }

    std::vector<double> junctions(const Rating& rating) const {
        std::vector<double> junctions;
        for (const std::size_t i : indices)
            junctions.push_back(rating.parts[i].junction_temperature);
        return junctions;
    }
};

} // namespace

Rating rate(const Geometry<double>& g, const Duty& duty) {
    const TableParts parts(duty.parts);
    if (parts.indices.empty()) return rate_at_powers(g, duty);
    const PowerBalance settled = balance_powers(
        parts.tables, duty.surroundings.air_temperature, [&](const std::vector<double>& powers) {
            return parts.junctions(rate_at_powers(g, parts.at(duty, powers)));
        });
    Rating rating = rate_at_powers(g, parts.at(duty, settled.powers));
    rating.feedback = Feedback{settled.loop_gain, settled.air_left, std::nullopt};
    if (const auto& away = settled.runaway)
        rating.feedback->runaway = Feedback::Runaway{duty.parts[parts.indices[away->part]].name,
                                                     away->junction, away->loop_gain};
    return rating;
}

std::vector<job::Part> at_rated_powers(std::vector<job::Part> parts, const Rating& rating) {
    for (std::size_t i = 0; i < parts.size(); ++i) {
        parts[i].power = rating.parts[i].power;
        parts[i].power_table.reset();
    }
    return parts;
}

} // namespace finwright::sink
