#include "src/sink/rating.hpp"

#include "src/sink/placing.hpp"
#include <algorithm>

namespace finwright::sink {

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
void rate_air(Rating& rating, const Duty& duty) {
    const Geometry<double>& g = rating.geometry;
    if (const auto* still = std::get_if<StillAir>(&duty.surroundings.air)) {
        const StillAirSink<double> model(g, duty.surroundings, duty.material, still->channel_law);
        const auto view = model.view(rating.base_rise);
        rating.laws = still_air_laws(view, g, still->channel_law);
        rating.view = view;
        return;
    }
    const DuctedSink<double> model(g, duty.surroundings, duty.material);
    const auto view = model.view(rating.base_rise);
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
struct LoadedBase {
    correlations::Slab<T> slab;
    std::vector<correlations::Pad<T>> pads;
    std::vector<double> powers;

    LoadedBase(const Geometry<T>& g, const Duty& duty, const T& base_rise)
        : slab{g.width(), g.length, g.base, duty.material.conductivity,
               duty.power() / (base_rise * g.footprint())},
          pads(pads_on_base(duty.parts, slab.width, slab.length)) {
        for (const job::Part& part : duty.parts)
            powers.push_back(part.power);
    }
};

} // namespace

double Rating::outlet_temperature() const {
    const auto* duct = std::get_if<DuctedAirView<double>>(&view);
    return duct ? air_temperature + power / duct->capacity_flow : air_temperature;
}

template <class T>
std::vector<T> pad_rises(const Geometry<T>& g, const Duty& duty, const T& base_rise) {
    const LoadedBase<T> base(g, duty, base_rise);
    return correlations::pad_mean_rises(base.slab, base.pads, base.powers);
}

template <class T>
std::vector<T> pad_rises(const Geometry<T>& g, const Duty& duty, const T& base_rise,
                         const correlations::ModeSet& modes) {
    const LoadedBase<T> base(g, duty, base_rise);
    return correlations::pad_mean_rises(base.slab, base.pads, base.powers, modes);
}

correlations::ModeSet modes_up_to(double half_waves, const Geometry<double>& g, const Duty& duty) {
    const LoadedBase<double> base(g, duty, 1.0);
    return correlations::ModeSet::up_to(half_waves, base.slab, base.pads);
}

using D5 = correlations::Dual<5>;
template std::vector<double> pad_rises(const Geometry<double>&, const Duty&, const double&);
template std::vector<double> pad_rises(const Geometry<double>&, const Duty&, const double&,
                                       const correlations::ModeSet&);
template std::vector<D5> pad_rises(const Geometry<D5>&, const Duty&, const D5&);
template std::vector<D5> pad_rises(const Geometry<D5>&, const Duty&, const D5&,
                                   const correlations::ModeSet&);

Rating rate(const Geometry<double>& g, const Duty& duty) {
    const Balance<double> settled = balance(g, duty);
    Rating rating;
    rating.geometry = g;
    rating.power = duty.power();
    rating.air_temperature = duty.surroundings.air_temperature;
    rating.mass = g.metal() * duty.material.density;
    rating.base_rise = settled.base_rise;
    rating.pressure_drop = settled.pressure_drop;
    rating.heat = shed(g, duty, settled.base_rise);
    rate_air(rating, duty);
    rate_parts(rating, duty);
    return rating;
}

} // namespace finwright::sink
