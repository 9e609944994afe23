#include "src/sink/still_air.hpp"

#include "correlations/air.hpp"
#include "correlations/natural_face.hpp"
#include "correlations/numbers/dual.hpp"
#include "correlations/radiation.hpp"
#include "src/sink/fin_conduction.hpp"

namespace finwright::sink {

namespace {
constexpr double gravity = 9.80665; // standard acceleration of free fall, ISO 80000-3 [m/s2]
} // namespace

template <class T>
StillAirSink<T>::StillAirSink(const Geometry<T>& geometry, const Surroundings& surroundings,
                              const Material& material, ChannelLaw law)
    : g_(geometry), fin_channel_(geometry.mean_gap(), geometry.height, geometry.length),
      surroundings_(surroundings), material_(material), law_(law) {
    const T gap = g_.mean_gap();
    wetted_ = (2.0 * g_.height + g_.gap) * g_.length;
    exchange_ = correlations::channel_radiation_conductance(
        material.emissivity, wetted_, correlations::channel_opening(gap, g_.height, g_.length));
    fin_shape_ = fin_shape(g_, material.conductivity);
    edges_ = 2.0 * g_.mean_thickness() * g_.height;
    tip_ = g_.tip_thickness() * g_.length;
    rim_ = 2.0 * (g_.length + g_.width()) * g_.base;
}

template <class T>
T StillAirSink<T>::channel_coefficient(const StillAirView<T>& v, const T& conductivity) const {
    const T gap = g_.mean_gap();
    switch (law_) {
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
StillAirView<T> StillAirSink<T>::view(const T& wall_rise) const {
    const double ambient = surroundings_.air_temperature;
    const T gap = g_.mean_gap();
    StillAirView<T> v;
    v.wall_rise = wall_rise;
    v.film_temperature = ambient + 0.5 * wall_rise;
    const auto air =
        correlations::air_at(correlations::clamp(v.film_temperature, coldest_film, hottest_film),
                             surroundings_.pressure);
    v.prandtl = air.prandtl();
    const T grashof_unit =
        gravity * air.expansion * wall_rise / (air.kinematic_viscosity() * air.diffusivity());
    const T radius = correlations::hydraulic_radius(gap, g_.height);
    const T gap2 = gap * gap, radius2 = radius * radius;
    v.elenbaas = grashof_unit * gap2 * gap2 / g_.length;
    v.rayleigh_radius = grashof_unit * radius2 * radius2 / g_.length;
    v.rayleigh_length = grashof_unit * g_.length * g_.length * g_.length;
    v.plate = correlations::nusselt_vertical_laminar(v.rayleigh_length, v.prandtl);
    v.channel_film = channel_coefficient(v, air.conductivity);
    v.outer_film = v.plate * air.conductivity / g_.length;
    const T black = correlations::radiation_coefficient(1.0, T(ambient + wall_rise), T(ambient));
    v.channel_radiation = black * exchange_ / wetted_;
    v.outer_radiation = material_.emissivity * black;
    conduct(v);
    return v;
}

template <class T>
void StillAirSink<T>::conduct(StillAirView<T>& v) const {
    const T face = g_.height * g_.length;
    const T inside = v.channel_film + v.channel_radiation;
    const T outside = v.outer_film + v.outer_radiation;
    const T ends = (tip_ + edges_) * outside;
    v.inner_efficiency = efficiency(T(2.0 * face * inside + ends), fin_shape_);
    v.outer_efficiency = efficiency(T(face * (inside + outside) + ends), fin_shape_);
    const T fin_share = 2.0 * g_.height / (2.0 * g_.height + g_.gap);
    v.base_rise = v.wall_rise / (1.0 - fin_share * (1.0 - v.inner_efficiency));
}

template <class T>
HeatPaths<T> StillAirSink<T>::heat(const StillAirView<T>& v) const {
    const T& base_rise = v.base_rise;
    const double n = g_.fins;
    const T face = g_.height * g_.length;
    // Effective areas: each fin face counts at its fin's mean rise, base strips and rim at the
    // base's.
    const T fins_mean = (n - 2.0) * v.inner_efficiency + 2.0 * v.outer_efficiency;
    const T inside = face * (2.0 * (n - 2.0) * v.inner_efficiency + 2.0 * v.outer_efficiency) +
                     (n - 1.0) * g_.gap * g_.length;
    const T outside = 2.0 * face * v.outer_efficiency;
    const T ends = (tip_ + edges_) * fins_mean;

    HeatPaths<T> q;
    q.channels = inside * v.channel_film * base_rise;
    q.outer_faces = outside * v.outer_film * base_rise;
    q.tips_edges = ends * v.outer_film * base_rise;
    q.rim = rim_ * v.outer_film * base_rise;
    q.radiation =
        (inside * v.channel_radiation + (outside + ends + rim_) * v.outer_radiation) * base_rise;
    return q;
}

template class StillAirSink<double>;
template class StillAirSink<correlations::Dual<6>>;

} // namespace finwright::sink
