#include "src/sink/moving_air.hpp"

#include "correlations/air.hpp"
#include "correlations/forced_channel.hpp"
#include "correlations/friction.hpp"
#include "correlations/numbers/dual.hpp"
#include "correlations/numbers/smooth.hpp"
#include "src/sink/fin_conduction.hpp"
#include <algorithm>
#include <stdexcept>

namespace finwright::sink {

using correlations::value_of;

namespace {

constexpr int newton_steps = 60;
constexpr double newton_tolerance = 1e-12;
constexpr double longest_step = 0.7; // of the logarithm of a flow
constexpr double settled = 1e-9;
constexpr double slopes_serve = 0.2;  // what a step must leave at most of the imbalance [-]
constexpr double probe = 1e-6;        // for slopes by differences, of the same
constexpr double most_entering = 3.0; // over the mean along the channel [-]
constexpr int scan_points = 60;       // for the crossing of highest flow on a curve with a dip

std::optional<job::Clearance> clearance_of(const Surroundings& s) {
    if (const auto* stream = std::get_if<Stream>(&s.air)) return stream->clearance;
    if (const auto* driven = std::get_if<FanDriven>(&s.air)) return driven->clearance;
    return std::nullopt;
}

bool walls_around(const Surroundings& s) {
    const auto* stream = std::get_if<Stream>(&s.air);
    return !stream || stream->clearance;
}

/// Flow as a duct that closes around the fins states it; 0 where the sink decides it.
template <class T>
T duct_flow(const Geometry<T>& g, const Surroundings& s) {
    if (const auto* flow = std::get_if<DuctFlow>(&s.air)) return T(flow->volume);
    if (const auto* velocity = std::get_if<DuctVelocity>(&s.air))
        return velocity->approach * g.field_width() * g.height;
    return T(0.0);
}

template <class T>
T free_between(const Geometry<T>& g) {
    return double(g.fins - 1) * g.mean_gap() * g.height;
}

/// Heat taken up over capacity flow at the entry and base rise [-], for air that passes heat
/// transfer units NTU while the share b of it leaves evenly along the way, as warm as it then is:
/// NTU (1 - (1 - b)^(NTU/b + 1))/(NTU + b); 1 - exp(-NTU) where none leaves.
template <class T>
T taken_up(const T& transfer_units, const T& leaving) {
    using std::expm1, std::log1p;
    if (std::abs(value_of(leaving)) < 1e-9) return -expm1(-transfer_units);
    const T remaining = log1p(-leaving);
    return -transfer_units * expm1(T((transfer_units / leaving + 1.0) * remaining)) /
           (transfer_units + leaving);
}

double logarithm_ratio(double a, double b) {
    return std::log(a / b);
}
template <std::size_t N>
correlations::Dual<N> logarithm_ratio(const correlations::Dual<N>& a,
                                      const correlations::Dual<N>& b) {
    return log(a / b);
}

} // namespace

template <class T>
MovingAirSink<T>::MovingAirSink(const Geometry<T>& geometry, const Duty& duty)
    : g_(geometry), surroundings_(duty.surroundings), material_(duty.material),
      power_(duty.power()), inlet_density_(correlations::air_density(surroundings_.air_temperature,
                                                                     surroundings_.pressure)),
      fin_shape_(fin_shape(geometry, duty.material.conductivity)),
      channels_area_(free_between(geometry)) {
    const T face = g_.field_width() * g_.height;
    duct_area_ = face;
    bypass_area_ = bypass_diameter_ = T(0.0);
    free_ = !walls_around(surroundings_);
    if (const auto clearance = clearance_of(surroundings_)) {
        duct_area_ = (g_.field_width() + 2.0 * clearance->beside) * (g_.height + clearance->above);
        bypass_area_ = duct_area_ - face;
        // The duct's walls and the outer fin faces; between the tips there is air, not wall.
        const T wetted = g_.field_width() + 4.0 * clearance->beside +
                         2.0 * (g_.height + clearance->above) + 2.0 * g_.height;
        bypass_diameter_ = 4.0 * bypass_area_ / wetted;
    }
    if (const auto* driven = std::get_if<FanDriven>(&surroundings_.air))
        fan_.emplace(driven->fan, inlet_density_);
    closed_ = !free_ && value_of(bypass_area_) == 0.0;
    decided_ = closed_ && !fan_;
    if (decided_) return;
    if constexpr (std::is_same_v<T, double>)
        last_ = {first_flow(), {}}, last_.slopes = slopes(last_.flow, T(0.0));
    else
        plain_ = std::make_shared<MovingAirSink<double>>(plain(geometry), duty);
}

template <class T>
auto MovingAirSink<T>::stated_flow() const -> Flow {
    const T flow = duct_flow(g_, surroundings_);
    return {flow, T(0.0), flow};
}

template <class T>
MovingAirView<T> MovingAirSink<T>::view(const T& base_rise) const {
    MovingAirView<T> v = passing(decided_ ? stated_flow() : solved(base_rise), base_rise);
    convect(v);
    return v;
}

/// Half-way between entry and exit. All air enters with one velocity; what is between the fins over
/// what is beside them goes over from its share of the area to its share at the exit (geometric
/// mean, so that either may dwindle to nothing).
template <class T>
auto MovingAirSink<T>::mean_flow(const Flow& exit) const -> Flow {
    using std::sqrt;
    if (closed_) return exit;
    if (free_)
        return {sqrt(exit.channel * exit.total * (channels_area_ / duct_area_)), T(0.0),
                exit.total};
    const T ratio = sqrt(channels_area_ / bypass_area_ * (exit.channel / exit.beside));
    return {exit.total * ratio / (1.0 + ratio), exit.total / (1.0 + ratio), exit.total};
}

/// What enters the channels so that its mean with what leaves is as worked out [m3/s].
template <class T>
T MovingAirSink<T>::entering_flow(const MovingAirView<T>& v) const {
    if (closed_) return v.channel_flow;
    return correlations::lesser_of(T(v.channel_flow * v.channel_flow / v.exit_flow),
                                   T(most_entering * v.channel_flow));
}

/// What the flow alone decides: velocities, Reynolds numbers and pressures. The density between the
/// fins is that of their air half-way to taking up all of the power.
template <class T>
MovingAirView<T> MovingAirSink<T>::passing(const Flow& flow, const T& base_rise) const {
    using std::max, std::min;
    const T gap = g_.mean_gap();
    MovingAirView<T> v;
    v.base_rise = base_rise;
    v.film_temperature = surroundings_.air_temperature + 0.5 * base_rise;
    const T held = correlations::clamp(v.film_temperature, coldest_film, hottest_film);
    const T viscosity = correlations::air_viscosity(held);
    const Flow mean = mean_flow(flow);
    v.volume_flow = flow.total;
    v.channel_flow = mean.channel;
    v.exit_flow = flow.channel;
    v.entering_flow = entering_flow(v);
    v.approach_velocity = flow.total / duct_area_;
    v.channel_velocity = v.channel_flow / channels_area_;
    v.free_area_ratio = channels_area_ / (g_.field_width() * g_.height);
    v.hydraulic_diameter = 2.0 * gap * g_.height / (gap + g_.height);
    v.aspect = min(gap, g_.height) / max(gap, g_.height);
    v.reynolds = inlet_density_ * v.channel_velocity * v.hydraulic_diameter / viscosity;
    if (free_) v.bypass_velocity = v.approach_velocity;
    if (!free_ && !closed_) {
        v.bypass_exit_flow = flow.beside;
        v.bypass_velocity = mean.beside / bypass_area_;
        v.bypass_reynolds = inlet_density_ * v.bypass_velocity * bypass_diameter_ / viscosity;
    }
    v.outer_reynolds = inlet_density_ * v.bypass_velocity * g_.fin_length() / viscosity;
    v.capacity_flow = inlet_density_ * v.entering_flow * correlations::air_specific_heat(held);
    lose_pressure(v);
    return v;
}

/// The rest of the view: films, efficiencies, heat taken up.
template <class T>
void MovingAirSink<T>::convect(MovingAirView<T>& v) const {
    const auto air =
        correlations::air_at(correlations::clamp(v.film_temperature, coldest_film, hottest_film),
                             surroundings_.pressure);
    v.prandtl = air.prandtl();
    v.film = correlations::nusselt_duct_all_regimes(v.reynolds, v.prandtl, v.aspect,
                                                    T(g_.fin_length() / v.hydraulic_diameter)) *
             air.conductivity / v.hydraulic_diameter;
    if (value_of(v.bypass_velocity) > 0.0)
        v.outer_film = correlations::nusselt_flat_plate(v.outer_reynolds, v.prandtl) *
                       air.conductivity / g_.fin_length();
    // Serrated faces: their area, taken into the films of channel (fins over all its walls) and
    // side.
    const double more = g_.details.area_factor - 1.0;
    v.film *= 1.0 + more * 2.0 * g_.height / (2.0 * g_.height + g_.gap);
    v.outer_film *= 1.0 + more;
    const T face = g_.height * g_.fin_length();
    const T ends = g_.tip() * v.outer_film;
    v.inner_efficiency = joined_efficiency(T(2.0 * face * v.film + ends), fin_shape_, g_);
    v.outer_efficiency =
        joined_efficiency(T(face * (v.film + v.outer_film) + ends), fin_shape_, g_);
    v.leaving_share = 1.0 - v.exit_flow / v.entering_flow;
    const double n = g_.fins;
    const T effective_area =
        face * (2.0 * (n - 2.0) * v.inner_efficiency + 2.0 * v.outer_efficiency) +
        (n - 1.0) * g_.gap * g_.fin_length();
    v.transfer_units = v.film * effective_area / v.capacity_flow;
}

template <class T>
T MovingAirSink<T>::bypass_loss(const MovingAirView<T>& v) const {
    const T mean = v.bypass_velocity * v.bypass_velocity;
    if (free_) return 0.5 * inlet_density_ * mean;
    const T exit = v.bypass_exit_flow / bypass_area_;
    const T length_ratio = g_.fin_length() / bypass_diameter_;
    const T friction = 4.0 *
                       correlations::fapp_all_regimes(v.bypass_reynolds, T(0.0), length_ratio) *
                       length_ratio;
    return 0.5 * inlet_density_ * (exit * exit + friction * mean);
}

template <class T>
void MovingAirSink<T>::lose_pressure(MovingAirView<T>& v) const {
    const T bulk_mean = surroundings_.air_temperature + 0.5 * power_ / v.capacity_flow;
    const T bulk_density = correlations::air_density(
        correlations::clamp(bulk_mean, coldest_film, hottest_film), surroundings_.pressure);
    const T length_ratio = g_.fin_length() / v.hydraulic_diameter;
    const T friction =
        4.0 * correlations::fapp_all_regimes(v.reynolds, v.aspect, length_ratio) * length_ratio;
    const T through = inlet_density_ * v.channel_velocity; // mass per area and time, as all below
    const T leaving = inlet_density_ * v.exit_flow / channels_area_;
    const T entering = inlet_density_ * v.entering_flow / channels_area_;
    const T entry = correlations::entry_loss(v.free_area_ratio);
    v.channel_loss =
        0.5 / bulk_density *
        (entry * entering * entering + friction * through * through + leaving * leaving);
    if (!closed_) v.bypass_loss = bypass_loss(v);
    if (free_) return; // behind it the stream is what it was before
    const T approach = inlet_density_ * v.approach_velocity;
    // What the momentum of both streams leaves of pressure once they have mixed.
    T momentum = correlations::momentum_factor(v.reynolds) * leaving * leaving *
                 (channels_area_ / duct_area_) / bulk_density;
    if (!closed_) {
        const T beside = inlet_density_ * v.bypass_exit_flow / bypass_area_;
        momentum += beside * beside * (bypass_area_ / duct_area_) / inlet_density_;
    }
    v.pressure_drop = v.channel_loss + 0.5 * approach * approach / bulk_density - momentum;
}

/// Zero where both ways end at one static pressure and the drive gives what is lost.
template <class T>
auto MovingAirSink<T>::imbalance(const MovingAirView<T>& v) const -> Imbalance {
    const T paths = closed_ ? T(0.0) : logarithm_ratio(v.channel_loss, v.bypass_loss);
    if (fan_) return {paths, (fan_->pressure(v.volume_flow) - v.pressure_drop) / fan_->shut_off()};
    return {paths,
            logarithm_ratio(T(std::get<Stream>(surroundings_.air).velocity), v.approach_velocity)};
}

/// The flow after a step in the logarithms of channels over bypass (of the channels alone in a free
/// stream) and of all.
template <class T>
auto MovingAirSink<T>::moved(const Flow& flow, const Step& step) const -> Flow {
    using std::exp;
    const T total = flow.total * exp(step.total);
    if (closed_) return {total, T(0.0), total};
    if (free_) return {flow.channel * exp(step.split), T(0.0), total};
    const T ratio = flow.channel / flow.beside * exp(step.split);
    return {total * ratio / (1.0 + ratio), total / (1.0 + ratio), total};
}

template <class T>
auto MovingAirSink<T>::slopes(const Flow& flow, const T& base_rise) const -> Slopes {
    const auto after = [&](double split, double total) {
        return imbalance(passing(moved(flow, {T(split), T(total)}), base_rise));
    };
    const Imbalance here = after(0.0, 0.0), split = after(probe, 0.0), total = after(0.0, probe);
    const auto slope = [](const T& to, const T& from) { return value_of(T(to - from)) / probe; };
    return {slope(split.paths, here.paths), slope(total.paths, here.paths),
            slope(split.drive, here.drive), slope(total.drive, here.drive)};
}

/// Newton's step that takes this imbalance away.
template <class T>
auto MovingAirSink<T>::step(const Slopes& s, const Imbalance& r) const -> Step {
    if (closed_) return {T(0.0), -r.drive / s.drive_by_total};
    const double determinant =
        s.paths_by_split * s.drive_by_total - s.paths_by_total * s.drive_by_split;
    return {(s.paths_by_total * r.drive - s.drive_by_total * r.paths) / determinant,
            (s.drive_by_split * r.paths - s.paths_by_split * r.drive) / determinant};
}

/// Newton's method from where it last ended, with slopes that are kept while they serve; where a
/// regime begins and the curves kink, steps are halved until they gain.
template <>
auto MovingAirSink<double>::solved(const double& base_rise) const -> Flow {
    const auto off = [](const Imbalance& r) { return std::hypot(r.paths, r.drive); };
    Flow x = last_.flow;
    Imbalance r = imbalance(passing(x, base_rise));
    bool fresh = false;
    for (int k = 0; k < newton_steps && off(r) > newton_tolerance; ++k) {
        const Step d = step(last_.slopes, r);
        const double size = std::max(std::abs(d.split), std::abs(d.total));
        double share = std::isfinite(size) ? std::min(1.0, longest_step / size) : 0.0;
        Flow next = moved(x, {share * d.split, share * d.total});
        Imbalance then = imbalance(passing(next, base_rise));
        const bool gains = off(then) < slopes_serve * off(r);
        if (!gains && !fresh) {
            last_.slopes = slopes(x, base_rise);
            fresh = true;
            continue;
        }
        for (int halved = 0; halved < 8 && !(off(then) < off(r)); ++halved) {
            share *= 0.5;
            next = moved(x, {share * d.split, share * d.total});
            then = imbalance(passing(next, base_rise));
        }
        if (!(off(then) < off(r))) break;
        x = next;
        r = then;
        fresh = false;
    }
    if (off(r) > settled) throw std::domain_error("the air's flow does not settle");
    last_.flow = x;
    return x;
}

/// The flow itself by plain numbers; its slopes by one more step with all of them.
template <class T>
auto MovingAirSink<T>::solved(const T& base_rise) const -> Flow {
    const auto x = plain_->solved(value_of(base_rise));
    const auto s = plain_->slopes(x, value_of(base_rise));
    const Flow flow{T(x.channel), T(x.beside), T(x.total)};
    return moved(flow,
                 step({s.paths_by_split, s.paths_by_total, s.drive_by_split, s.drive_by_total},
                      imbalance(passing(flow, base_rise))));
}

/// A first guess at how a total flow divides.
template <class T>
auto MovingAirSink<T>::guessed(double total) const -> Flow {
    if (closed_) return {T(total), T(0.0), T(total)};
    if (free_) return {T(0.5 * total * value_of(channels_area_ / duct_area_)), T(0.0), T(total)};
    const double share = 0.5 * value_of(channels_area_ / (channels_area_ + bypass_area_));
    return {T(share * total), T((1.0 - share) * total), T(total)};
}

/// How a total flow divides in cold air.
template <class T>
auto MovingAirSink<T>::divided(double total) const -> Flow {
    Flow x = guessed(total);
    for (int k = 0; k < newton_steps && !closed_; ++k) {
        const double d =
            value_of(imbalance(passing(x, T(0.0))).paths) / slopes(x, T(0.0)).paths_by_split;
        x = moved(x, {T(-std::clamp(d, -longest_step, longest_step)), T(0.0)});
        if (std::abs(d) < settled) break;
    }
    return x;
}

/// Where the flow is first looked for: a curve with a dip may cross several times, and the stable
/// crossing of highest flow is meant.
template <class T>
auto MovingAirSink<T>::first_flow() const -> Flow {
    if (!fan_) return guessed(std::get<Stream>(surroundings_.air).velocity * value_of(duct_area_));
    const double most = fan_->free_delivery();
    if (fan_->falls()) return divided(0.5 * most);
    for (int k = scan_points - 1; k > 0; --k) {
        const Flow flow = divided(most * k / scan_points);
        if (value_of(imbalance(passing(flow, T(0.0))).drive) > 0.0) return flow;
    }
    return divided(most / scan_points);
}

template <class T>
HeatPaths<T> MovingAirSink<T>::heat(const MovingAirView<T>& v) const {
    HeatPaths<T> q;
    q.channels = v.capacity_flow * taken_up(v.transfer_units, v.leaving_share) * v.base_rise;
    const double n = g_.fins;
    const T fins_mean = (n - 2.0) * v.inner_efficiency + 2.0 * v.outer_efficiency;
    q.outer_faces =
        2.0 * g_.height * g_.fin_length() * v.outer_efficiency * v.outer_film * v.base_rise;
    q.tips_edges = g_.tip() * fins_mean * v.outer_film * v.base_rise;
    return q;
}

template <class T>
T channel_velocity(const Geometry<T>& g, const Surroundings& surroundings) {
    return duct_flow(g, surroundings) / free_between(g);
}

template double channel_velocity(const Geometry<double>&, const Surroundings&);
template correlations::Dual<5> channel_velocity(const Geometry<correlations::Dual<5>>&,
                                                const Surroundings&);

template class MovingAirSink<double>;
template class MovingAirSink<correlations::Dual<6>>;

} // namespace finwright::sink
