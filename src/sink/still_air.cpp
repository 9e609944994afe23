#include "src/sink/still_air.hpp"

#include "correlations/air.hpp"
#include "correlations/channel_radiation.hpp"
#include "correlations/forced_channel.hpp"
#include "correlations/natural_inclined.hpp"
#include "correlations/numbers/dual.hpp"
#include "correlations/numbers/smooth.hpp"
#include "correlations/radiation.hpp"
#include "src/sink/fin_conduction.hpp"
#include <algorithm>
#include <numbers>

namespace finwright::sink {

using correlations::greater_of;

namespace {

constexpr double gravity = 9.80665; // standard acceleration of free fall, ISO 80000-3 [m/s2]
constexpr double worst_opposing =
    0.98477; // forced over natural film where mixed_against is least [-]
constexpr double upside = 0.5 * std::numbers::pi;

/// Back of the base beside the pads, where the mounting leaves it open [m2]. Pads that leave
/// nothing free are the job's mistake, not a negative area.
template <class T>
T open_back(const Geometry<T>& g, const Duty& duty, const StillAir& state) {
    using std::max;
    if (!state.mounting.back_exposed) return T(0.0);
    double pads = 0.0;
    for (const job::Part& part : duty.parts)
        pads += part.pad_across * part.pad_along;
    return max(T(g.footprint() - pads), T(0.0));
}

} // namespace

template <class T>
struct StillAirSink<T>::AirFilm {
    T conductivity;        ///< [W/(m K)]
    T kinematic_viscosity; ///< [m2/s]
};

template <class T>
StillAirSink<T>::StillAirSink(const Geometry<T>& geometry, const Duty& duty)
    : g_(geometry),
      fin_channel_(geometry.plate()
                       ? correlations::FinChannel<T>()
                       : correlations::FinChannel<T>(geometry.mean_gap(), geometry.height,
                                                     geometry.fin_length())),
      surroundings_(duty.surroundings), material_(duty.material),
      state_(std::get<StillAir>(duty.surroundings.air)),
      radiating_(surroundings_.radiating_temperature.value_or(surroundings_.air_temperature)),
      along_(std::max(0.0, std::cos(state_.mounting.tilt))),
      away_(std::abs(std::sin(state_.mounting.tilt))) {
    rim_ = 2.0 * (g_.length + g_.width()) * g_.base;
    bare_ = g_.bare();
    back_ = open_back(g_, duty, state_);
    sun_ = sun_taken(g_, surroundings_);
    wetted_ = exchange_ = fin_shape_ = edges_ = tip_ = T(0.0);
    if (g_.plate()) return;
    const T gap = g_.mean_gap();
    wetted_ = (2.0 * g_.height + g_.gap) * g_.fin_length();
    exchange_ = correlations::channel_radiation_zoned(material_.emissivity, gap, g_.height,
                                                      g_.fin_length());
    fin_shape_ = fin_shape(g_, material_.conductivity);
    edges_ = 2.0 * g_.mean_thickness() * g_.height;
    tip_ = g_.tip();
}

template <class T>
T StillAirSink<T>::along_channel(const StillAirView<T>& v, const T& conductivity) const {
    const T gap = g_.mean_gap();
    switch (state_.channel_law) {
    case ChannelLaw::parallel_plates:
        return correlations::nusselt_parallel_plates(v.elenbaas) * conductivity / gap;
    case ChannelLaw::elenbaas:
        return correlations::nusselt_elenbaas(v.elenbaas) * conductivity / gap;
    case ChannelLaw::u_channel:
        return correlations::nusselt_u_channel(v.rayleigh_radius, gap, g_.height) * conductivity /
               correlations::hydraulic_radius(gap, g_.height);
    case ChannelLaw::fin_channel:
        break;
    }
    return fin_channel_.nusselt(v.elenbaas, v.plate) * conductivity / gap;
}

template <class T>
T StillAirSink<T>::channel_coefficient(const StillAirView<T>& v, const T& conductivity) const {
    const T gap = g_.mean_gap();
    const T along = state_.mounting.fins_level
                        ? T(correlations::level_fins_share(gap, g_.height) * conductivity *
                            front_coefficient(v, state_.mounting.tilt))
                        : along_channel(v, conductivity);
    if (away_ == 0.0) return along;
    const double share = state_.mounting.tilt > 0.0 ? 1.0 : correlations::facing_down_share;
    const T flat =
        share *
        correlations::nusselt_horizontal_array(T(away_ * v.grashof_unit * gap * gap * gap)) *
        correlations::horizontal_length_factor(g_.fin_length()) * conductivity / gap;
    return greater_of(along, flat);
}

/// The plane through the fins' tips, or the back of the base, over conductivity [1/m].
template <class T>
T StillAirSink<T>::front_coefficient(const StillAirView<T>& v, double tilt) const {
    const T width = g_.width();
    const bool level = state_.mounting.fins_level;
    return correlations::inclined_face(v.grashof_unit, v.prandtl, level ? width : g_.length,
                                       level ? g_.length : width, tilt);
}

/// First and last fin's outer faces, over conductivity [1/m]. Upright fins' stay upright at any
/// tilt, their height along gravity going over from L to H; level fins' face up and down, and turn
/// upright with the tilt.
template <class T>
T StillAirSink<T>::outer_coefficient(const StillAirView<T>& v) const {
    if (state_.mounting.fins_level) {
        const double lean = upside - std::abs(state_.mounting.tilt);
        const auto face = [&](double tilt) {
            return correlations::inclined_face(v.grashof_unit, v.prandtl, g_.height,
                                               g_.fin_length(), tilt);
        };
        return 0.5 * (face(lean) + face(-lean));
    }
    if (away_ == 0.0) return v.plate / g_.fin_length();
    const T rise = 1.0 / (along_ / g_.fin_length() + away_ / g_.height);
    return correlations::nusselt_vertical_laminar(T(v.grashof_unit * rise * rise * rise),
                                                  v.prandtl) /
           rise;
}

template <class T>
void StillAirSink<T>::convect(StillAirView<T>& v, const AirFilm& air) const {
    v.channel_film = channel_coefficient(v, air.conductivity);
    v.outer_film = outer_coefficient(v) * air.conductivity;
    const bool plain = away_ == 0.0 && !state_.mounting.fins_level;
    v.edge_film =
        plain ? v.outer_film : T(front_coefficient(v, state_.mounting.tilt) * air.conductivity);
    if (state_.mounting.back_exposed)
        v.back_film = front_coefficient(v, -state_.mounting.tilt) * air.conductivity;
}

/// Adds the drift's own film to each: along the fins on L and through the channels, across them on
/// W and past the channels' mouths only.
template <class T>
void StillAirSink<T>::drift(StillAirView<T>& v, const AirFilm& air) const {
    using Direction = job::Drift::Direction;
    const double speed = state_.drift->velocity;
    const Direction direction = state_.drift->direction;
    const auto mixed = [&](const T& forced, const T& natural) {
        if (direction != Direction::opposing) return correlations::mixed_assisting(forced, natural);
        // Slower air than stated may do worse: the stated speed is the most the drift reaches.
        return correlations::mixed_against(
            correlations::lesser_of(forced, T(worst_opposing * natural)), natural);
    };
    const bool across = direction == Direction::crossing;
    const T run = across ? g_.width() : g_.length;
    const T plate =
        correlations::nusselt_flat_plate(T(speed * run / air.kinematic_viscosity), v.prandtl) *
        air.conductivity / run;
    v.outer_film = mixed(plate, v.outer_film);
    v.edge_film = mixed(plate, v.edge_film);
    if (state_.mounting.back_exposed) v.back_film = mixed(plate, v.back_film);
    if (across || g_.plate()) return;
    const T gap = g_.mean_gap();
    const T inside =
        correlations::drift_in_channel(speed, air.kinematic_viscosity, gap, g_.fin_length());
    const T forced =
        correlations::nusselt_inlet_plates(
            T(inside * gap / air.kinematic_viscosity * gap / g_.fin_length()), v.prandtl) *
        air.conductivity / gap;
    v.kinematic_viscosity = air.kinematic_viscosity;
    v.natural_film = v.channel_film;
    v.forced_film = forced;
    v.channel_film = mixed(forced, v.channel_film);
}

/// The air in the film at a rise of the wall it touches.
template <class T>
auto StillAirSink<T>::film_at(StillAirView<T>& v, const T& rise) const -> AirFilm {
    v.wall_rise = rise;
    v.film_temperature = surroundings_.air_temperature + 0.5 * rise;
    const auto air =
        correlations::air_at(correlations::clamp(v.film_temperature, coldest_film, hottest_film),
                             surroundings_.pressure);
    v.prandtl = air.prandtl();
    v.grashof_unit =
        gravity * air.expansion * rise / (air.kinematic_viscosity() * air.diffusivity());
    return {air.conductivity, air.kinematic_viscosity()};
}

template <class T>
StillAirView<T> StillAirSink<T>::view(const T& wall_rise) const {
    if (g_.plate()) return plate_view(wall_rise);
    const T gap = g_.mean_gap();
    StillAirView<T> v;
    const AirFilm film = film_at(v, wall_rise);
    const T radius = correlations::hydraulic_radius(gap, g_.height);
    const T gap2 = gap * gap, radius2 = radius * radius;
    const T along = along_ * v.grashof_unit;
    const T run = g_.fin_length();
    v.elenbaas = along * gap2 * gap2 / run;
    v.rayleigh_radius = along * radius2 * radius2 / run;
    v.rayleigh_length = along * run * run * run;
    v.plate = correlations::nusselt_vertical_laminar(v.rayleigh_length, v.prandtl);
    convect(v, film);
    if (state_.drift) drift(v, film);
    const T black = correlations::radiation_coefficient(
        1.0, T(surroundings_.air_temperature + wall_rise), T(radiating_));
    v.channel_radiation = black * exchange_ / wetted_;
    v.outer_radiation = material_.emissivity * black;
    conduct(v);
    return v;
}

template <class T>
void StillAirSink<T>::conduct(StillAirView<T>& v) const {
    const T face = g_.height * g_.fin_length();
    const T inside = v.channel_film + v.channel_radiation;
    const T outside = v.outer_film + v.outer_radiation;
    const T ends = (tip_ + edges_) * (v.edge_film + v.outer_radiation);
    v.inner_efficiency = joined_efficiency(T(2.0 * face * inside + ends), fin_shape_, g_);
    v.outer_efficiency = joined_efficiency(T(face * (inside + outside) + ends), fin_shape_, g_);
    const T fin_share = 2.0 * g_.height / (2.0 * g_.height + g_.gap);
    v.base_rise = v.wall_rise / (1.0 - fin_share * (1.0 - v.inner_efficiency));
}

// Effective areas: each fin face counts at its fin's mean rise, base strips and rim at the base's.

template <class T>
T StillAirSink<T>::channel_area(const StillAirView<T>& v) const {
    if (g_.plate()) return T(0.0);
    const double n = g_.fins;
    return g_.height * g_.fin_length() *
               (2.0 * (n - 2.0) * v.inner_efficiency + 2.0 * v.outer_efficiency) +
           (n - 1.0) * g_.gap * g_.fin_length();
}

template <class T>
T StillAirSink<T>::outer_area(const StillAirView<T>& v) const {
    if (g_.plate()) return T(0.0);
    return 2.0 * g_.height * g_.fin_length() * v.outer_efficiency;
}

template <class T>
T StillAirSink<T>::ends_area(const StillAirView<T>& v) const {
    if (g_.plate()) return T(0.0);
    return (tip_ + edges_) *
           ((double(g_.fins) - 2.0) * v.inner_efficiency + 2.0 * v.outer_efficiency);
}

/// A plate without fins, stated by its own rise.
template <class T>
StillAirView<T> StillAirSink<T>::plate_view(const T& rise) const {
    StillAirView<T> v;
    const AirFilm film = film_at(v, rise);
    v.base_rise = rise;
    v.rayleigh_length = along_ * v.grashof_unit * g_.length * g_.length * g_.length;
    v.edge_film = front_coefficient(v, state_.mounting.tilt) * film.conductivity;
    v.outer_film = v.edge_film;
    if (state_.mounting.back_exposed)
        v.back_film = front_coefficient(v, -state_.mounting.tilt) * film.conductivity;
    if (state_.drift) drift(v, film);
    v.outer_radiation =
        material_.emissivity * correlations::radiation_coefficient(
                                   1.0, T(surroundings_.air_temperature + rise), T(radiating_));
    return v;
}

template <class T>
HeatPaths<T> StillAirSink<T>::heat(const StillAirView<T>& v) const {
    const T inside = channel_area(v), outside = outer_area(v), ends = ends_area(v);
    HeatPaths<T> q;
    q.channels = inside * v.channel_film * v.base_rise;
    q.outer_faces = outside * v.outer_film * v.base_rise;
    q.tips_edges = ends * v.edge_film * v.base_rise;
    q.rim = rim_ * v.edge_film * v.base_rise;
    q.bare = bare_ * v.edge_film * v.base_rise;
    if (state_.mounting.back_exposed) q.back = back_ * v.back_film * v.base_rise;
    q.radiation = (inside * v.channel_radiation +
                   (outside + ends + rim_ + bare_ + back_) * v.outer_radiation) *
                  v.base_rise;
    if (radiating_ != surroundings_.air_temperature) {
        StillAirView<T> whole = v; // every surface at full area: the air lies off what it sees
        whole.inner_efficiency = whole.outer_efficiency = T(1.0);
        q.fixed =
            (channel_area(whole) * v.channel_radiation +
             (outer_area(whole) + ends_area(whole) + rim_ + bare_ + back_) * v.outer_radiation) *
            (surroundings_.air_temperature - radiating_);
        q.radiation += q.fixed;
    }
    if (const auto& wall = state_.mounting.wall_conductance) {
        const T off(*wall *
                    (surroundings_.air_temperature - state_.mounting.wall_temperature.value()));
        q.wall = *wall * v.base_rise + off;
        q.fixed += off;
    }
    return q;
}

template <class T>
T sun_taken(const Geometry<T>& g, const Surroundings& surroundings) {
    const auto* still = std::get_if<StillAir>(&surroundings.air);
    if (!still || !still->sun) return T(0.0);
    const double alpha = still->sun->absorptivity;
    if (g.plate()) return still->sun->irradiance * alpha * g.footprint();
    const T cavity =
        1.0 / (1.0 + (1.0 / alpha - 1.0) * g.mean_gap() / (g.mean_gap() + 2.0 * g.height));
    const T mouths = double(g.fins - 1) * (g.gap + 2.0 * (g.mean_gap() - g.gap)) * g.fin_length();
    const T rest = g.footprint() - mouths;
    return still->sun->irradiance * (cavity * mouths + alpha * rest);
}

template double sun_taken(const Geometry<double>&, const Surroundings&);
template correlations::Dual<5> sun_taken(const Geometry<correlations::Dual<5>>&,
                                         const Surroundings&);
template correlations::Dual<6> sun_taken(const Geometry<correlations::Dual<6>>&,
                                         const Surroundings&);

template class StillAirSink<double>;
template class StillAirSink<correlations::Dual<6>>;

} // namespace finwright::sink
