#include "src/sink/rating.hpp"

#include "src/sink/placing.hpp"
#include <algorithm>

namespace finwright::sink {

using correlations::Dual;

namespace {

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

std::vector<LawUse> still_air_laws(const StillAirView<double>& v, const Geometry<double>& g,
                                   ChannelLaw law) {
    const double gap = g.mean_gap();
    std::vector<LawUse> uses{
        {"air_conductivity", "air in the film", {v.film_temperature}},
    };
    switch (law) {
    case ChannelLaw::fin_channel:
        uses.push_back({"fin_channel", "channels", {v.elenbaas, v.plate, gap, g.height, g.length}});
        break;
    case ChannelLaw::u_channel:
        uses.push_back({"u_channel", "channels", {v.rayleigh_radius, gap, g.height}});
        break;
    case ChannelLaw::parallel_plates:
        uses.push_back({"parallel_plates", "channels", {v.elenbaas}});
        break;
    case ChannelLaw::elenbaas:
        uses.push_back({"elenbaas", "channels", {v.elenbaas}});
        break;
    }
    uses.push_back(
        {"vertical_laminar", "outer faces, tips, edges, rim", {v.rayleigh_length, v.prandtl}});
    uses.push_back({"channel_opening", "radiation of the channels", {gap, g.height, g.length}});
    return uses;
}

std::vector<LawUse> ducted_air_laws(const DuctedAirView<double>& v, const Geometry<double>& g) {
    const double length_ratio = g.length / v.hydraulic_diameter;
    return {{"air_conductivity", "air in the film", {v.film_temperature}},
            {"duct_all_regimes", "channels", {v.reynolds, v.prandtl, v.aspect, length_ratio}},
            {"fapp_all_regimes", "friction", {v.reynolds, v.aspect, length_ratio}},
            {"entry_loss", "entry", {v.free_area_ratio}}};
}

/// Rates the flow side: what the films see, what the air loses, which laws say so.
void rate_air(Rating& rating, const Duty& duty, double driving_rise) {
    const Geometry<double>& g = rating.geometry;
    if (const auto* still = std::get_if<StillAir>(&duty.surroundings.air)) {
        const StillAirSink<double> model(g, duty.surroundings, duty.material, still->channel_law);
        const auto view = model.view(driving_rise);
        rating.laws = still_air_laws(view, g, still->channel_law);
        rating.view = view;
        return;
    }
    const DuctedSink<double> model(g, duty.surroundings, duty.material);
    const auto view = model.view(driving_rise);
    rating.laws = ducted_air_laws(view, g);
    rating.view = view;
}

void rate_parts(Rating& rating, const Duty& duty) {
    const std::vector<double> rises = pad_rises(rating.geometry, duty, rating.base_rise);
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

/// Heat per base area and kelvin that holds the base at this mean rise [W/(m2 K)].
template <class T>
T base_film(const Geometry<T>& g, const Duty& duty, const T& base_rise) {
    return duty.power() / (base_rise * g.footprint());
}

std::vector<double> powers_of(const Duty& duty) {
    std::vector<double> powers;
    for (const job::Part& part : duty.parts)
        powers.push_back(part.power);
    return powers;
}

} // namespace

double Rating::outlet_temperature() const {
    const auto* duct = std::get_if<DuctedAirView<double>>(&view);
    return duct ? air_temperature + power / duct->capacity_flow : air_temperature;
}

correlations::ModeSet modes_up_to(double half_waves, const Geometry<double>& g, const Duty& duty) {
    const auto pads = pads_on_base(duty.parts, g.width(), g.length);
    return correlations::ModeSet::up_to(half_waves, slab_of(g, duty, 1.0), pads);
}

correlations::ModeSet modes_for_means(const Geometry<double>& g, const Duty& duty) {
    const auto pads = pads_on_base(duty.parts, g.width(), g.length);
    return correlations::ModeSet::for_means(slab_of(g, duty, 1.0), pads);
}

std::vector<double> pad_rises(const Geometry<double>& g, const Duty& duty, double base_rise,
                              const correlations::ModeSet& modes) {
    const auto slab = slab_of(g, duty, base_film(g, duty, base_rise));
    const auto pads = pads_on_base(duty.parts, slab.width, slab.length);
    return correlations::pad_mean_rises(slab, pads, powers_of(duty), modes);
}

std::vector<double> pad_rises(const Geometry<double>& g, const Duty& duty, double base_rise) {
    return pad_rises(g, duty, base_rise, modes_for_means(g, duty));
}

std::vector<Dual<5>> pad_rises(const Geometry<Dual<5>>& g, const Duty& duty,
                               const Dual<5>& base_rise, const correlations::ModeSet& modes) {
    const Dual<5> width = g.width(), film = base_film(g, duty, base_rise);
    const auto slab = slab_of(g, duty, film);
    const auto pads = pads_on_base(duty.parts, Dual<1>::variable(slab.width, 0),
                                   Dual<1>::variable(slab.length, 0));
    std::vector<Dual<5>> rises;
    for (const Dual<4>& rise :
         correlations::pad_mean_rises_with_slopes(slab, pads, powers_of(duty), modes)) {
        Dual<5> total(rise.value);
        for (std::size_t k = 0; k < 5; ++k)
            total.slope[k] = rise.slope[0] * width.slope[k] + rise.slope[1] * g.length.slope[k] +
                             rise.slope[2] * g.base.slope[k] + rise.slope[3] * film.slope[k];
        rises.push_back(total);
    }
    return rises;
}

Rating rate(const Geometry<double>& g, const Duty& duty) {
    const Balance<double> settled = balance(g, duty);
    Rating rating;
    rating.geometry = g;
    rating.power = duty.power();
    rating.air_temperature = duty.surroundings.air_temperature;
    rating.mass = g.metal() * duty.material.density;
    rating.base_rise = settled.base_rise;
    rating.pressure_drop = settled.pressure_drop;
    rating.heat = shed(g, duty, settled.driving_rise);
    rate_air(rating, duty, settled.driving_rise);
    rate_parts(rating, duty);
    return rating;
}

} // namespace finwright::sink
