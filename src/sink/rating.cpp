#include "src/sink/rating.hpp"

#include "correlations/spreading.hpp"
#include "src/sink/placing.hpp"
#include <algorithm>
#include <numeric>

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
    std::vector<LawUse> uses{{"air_conductivity", "air in the film", {v.film_temperature}},
                             {"air_viscosity", "air in the film", {v.film_temperature}}};
    switch (law) {
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
    uses.push_back({"vertical_laminar", "outer faces, tips, edges, rim",
                    {v.rayleigh_length, v.prandtl}});
    uses.push_back({"channel_opening", "radiation of the channels", {gap, g.height, g.length}});
    return uses;
}

} // namespace

} // namespace finwright::sink
