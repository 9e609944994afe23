#include "src/sink/ducted_air.hpp"

#include "correlations/air.hpp"
#include "correlations/forced_channel.hpp"
#include "correlations/friction.hpp"
#include "correlations/numbers/dual.hpp"
#include "src/sink/fin_conduction.hpp"

namespace finwright::sink {

namespace {

template <class T>
T stated_flow(const Geometry<T>& g, const Surroundings& s) {
    if (const auto* flow = std::get_if<DuctFlow>(&s.air)) return T(flow->volume);
    return std::get<DuctVelocity>(s.air).approach * g.width() * g.height;
}

} // namespace

template <class T>
DuctedSink<T>::DuctedSink(const Geometry<T>& geometry, const Duty& duty)
    : g_(geometry), surroundings_(duty.surroundings), material_(duty.material),
      fin_shape_(fin_shape(geometry, duty.material.conductivity)),
      volume_flow_(stated_flow(geometry, surroundings_)),
      mass_flow_(
          volume_flow_ *
          correlations::air_at(surroundings_.air_temperature, surroundings_.pressure).density) {}

template <class T>
DuctedAirView<T> DuctedSink<T>::view(const T& base_rise) const {
    using std::max;
    using std::min;
    const T gap = g_.mean_gap();
    const T free_area = double(g_.fins - 1) * gap * g_.height;
    DuctedAirView<T> v;
    v.base_rise = base_rise;
    v.film_temperature = surroundings_.air_temperature + 0.5 * base_rise;
    const auto air =
        correlations::air_at(correlations::clamp(v.film_temperature, coldest_film, hottest_film),
                             surroundings_.pressure);
    v.volume_flow = volume_flow_;
    v.approach_velocity = volume_flow_ / (g_.width() * g_.height);
    v.channel_velocity = volume_flow_ / free_area;
    v.free_area_ratio = free_area / (g_.width() * g_.height);
    v.hydraulic_diameter = 2.0 * gap * g_.height / (gap + g_.height);
    v.aspect = min(gap, g_.height) / max(gap, g_.height);
    v.reynolds = mass_flow_ / free_area * v.hydraulic_diameter / air.viscosity;
    v.prandtl = air.prandtl();
    v.film = correlations::nusselt_duct_all_regimes(v.reynolds, v.prandtl, v.aspect,
                                                    T(g_.length / v.hydraulic_diameter)) *
             air.conductivity / v.hydraulic_diameter;
    const T face = g_.height * g_.length;
    v.inner_efficiency = efficiency(T(2.0 * face * v.film), fin_shape_);
    v.outer_efficiency = efficiency(T(face * v.film), fin_shape_);
    v.capacity_flow = mass_flow_ * air.specific_heat;
    const double n = g_.fins;
    const T effective_area =
        face * (2.0 * (n - 2.0) * v.inner_efficiency + 2.0 * v.outer_efficiency) +
        (n - 1.0) * g_.gap * g_.length;
    v.transfer_units = v.film * effective_area / v.capacity_flow;
    return v;
}

template <class T>
HeatPaths<T> DuctedSink<T>::heat(const DuctedAirView<T>& v) const {
    using std::expm1;
    HeatPaths<T> q;
    q.channels = -v.capacity_flow * expm1(-v.transfer_units) * v.base_rise;
    return q;
}

template <class T>
T DuctedSink<T>::pressure_drop(const DuctedAirView<T>& v) const {
    const T bulk_mean = surroundings_.air_temperature + 0.5 * heat(v).channels / v.capacity_flow;
    const auto air = correlations::air_at(
        correlations::clamp(bulk_mean, coldest_film, hottest_film), surroundings_.pressure);
    const T free_area = double(g_.fins - 1) * g_.mean_gap() * g_.height;
    const T mass_flux = mass_flow_ / free_area;
    const T head = 0.5 * mass_flux * mass_flux / air.density;
    const T length_ratio = g_.length / v.hydraulic_diameter;
    return head *
           (correlations::entry_loss(v.free_area_ratio) +
            4.0 * correlations::fapp_all_regimes(v.reynolds, v.aspect, length_ratio) *
                length_ratio +
            correlations::exit_loss(v.free_area_ratio, correlations::momentum_factor(v.reynolds)));
}

template <class T>
T channel_velocity(const Geometry<T>& g, const Surroundings& surroundings) {
    return stated_flow(g, surroundings) / (double(g.fins - 1) * g.mean_gap() * g.height);
}

template double channel_velocity(const Geometry<double>&, const Surroundings&);
template correlations::Dual<5> channel_velocity(const Geometry<correlations::Dual<5>>&,
                                                const Surroundings&);

template class DuctedSink<double>;
template class DuctedSink<correlations::Dual<6>>;

} // namespace finwright::sink
