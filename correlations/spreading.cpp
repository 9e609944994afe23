#include "correlations/spreading.hpp"

#include <algorithm>
#include <numeric>

namespace finwright::correlations {

namespace {

constexpr double pi = std::numbers::pi;
constexpr double half_waves_for_means = 8.0, half_waves_at_a_point = 200.0;
constexpr int fewest_modes = 3, most_modes = 400;

/// Mean over a pad of cos(m pi x/side) for m = 0..last, by the recurrences of cos and sin.
template <class T>
std::vector<T> mode_means(const T& centre, const T& size, const T& side, int last) {
    using std::cos, std::sin;
    const T half = 0.5 * pi * size / side;
    const T phase = pi * centre / side;
    const T two_cos_phase = 2.0 * cos(phase), two_cos_half = 2.0 * cos(half);
    std::vector<T> means;
    means.reserve(std::size_t(last) + 1);
    means.push_back(T(1.0));
    T cos_before(1.0), cos_now = cos(phase), sin_before(0.0), sin_now = sin(half);
    for (int m = 1; m <= last; ++m) {
        means.push_back(cos_now * sin_now / (double(m) * half));
        const T cos_next = two_cos_phase * cos_now - cos_before;
        const T sin_next = two_cos_half * sin_now - sin_before;
        cos_before = cos_now;
        cos_now = cos_next;
        sin_before = sin_now;
        sin_now = sin_next;
    }
    return means;
}

/// tanh for x > 0, faster than the library's: the difference loses two digits at
/// x = 0.01, about the least that occurs.
double tanh_above_zero(double x) {
    return 1.0 - 2.0 / (std::exp(2.0 * x) + 1.0);
}

double resistance_of(double z_squared, const Slab& slab) {
    const double z = std::sqrt(z_squared);
    const double t = tanh_above_zero(z * slab.thickness);
    const double kz = slab.conductivity * z, r = kz / slab.film;
    return (t + r) / ((1.0 + r * t) * kz);
}

/// One mode's rise per flux G(z)/(k z) [m2 K/W] and how it changes.
struct ModeResistance {
    double value;
    double by_z_squared, by_thickness, by_film;
};

ModeResistance resistance_with_slopes(double z_squared, const Slab& slab) {
    const double z = std::sqrt(z_squared), inverse_z = 1.0 / z;
    const double t = tanh_above_zero(z * slab.thickness);
    const double r = slab.conductivity / slab.film * z;
    const double inverse_d = 1.0 / (1.0 + r * t);
    const double sech2 = 1.0 - t * t;
    const double over_d = inverse_d * inverse_z / slab.conductivity;
    const double value = (t + r) * over_d;
    const double by_tanh = (1.0 - r * r) * over_d * inverse_d * sech2;
    const double by_ratio = sech2 * over_d * inverse_d * r;
    return {value, 0.5 * (by_tanh * slab.thickness * z + by_ratio - value) * inverse_z * inverse_z,
            by_tanh * z, -by_ratio / slab.film};
}

/// Calls visit(m, n, weight, z^2) for every mode but the uniform one.
template <class Visit>
void for_each_mode(const Slab& slab, const ModeSet& modes, Visit&& visit) {
    const double across = pi / slab.width, along = pi / slab.length;
    for (int m = 0, last_m = modes.last_across(); m <= last_m; ++m) {
        const double from_m = m * m * across * across;
        const int last_n = modes.last_along(m);
        for (int n = m == 0 ? 1 : 0; n <= last_n; ++n)
            visit(m, n, m > 0 && n > 0 ? 4.0 : 2.0, from_m + n * n * along * along);
    }
}

template <class T>
struct PadModes {
    std::vector<T> across, along;
};

template <class T>
std::vector<PadModes<T>> pad_modes(const T& width, const T& length, const std::vector<Pad<T>>& pads,
                                   const ModeSet& modes) {
    std::vector<PadModes<T>> list;
    for (const Pad<T>& pad : pads)
        list.push_back({mode_means(pad.x, pad.across, width, modes.last_across()),
                        mode_means(pad.y, pad.along, length, modes.last_along(0))});
    return list;
}

double uniform_resistance(const Slab& slab) {
    return slab.thickness / slab.conductivity + 1.0 / slab.film;
}

/// One row of modes (all with the same m) seen from one pad: the sum over n, its slopes by width
/// and length that do not pass through the pad's own mean across, and those by thickness and film.
struct Row {
    double value = 0.0, by_width = 0.0, by_length = 0.0, by_thickness = 0.0, by_film = 0.0;
};

} // namespace

template <class T>
ModeSet ModeSet::up_to(double half_waves, const Slab& slab, const std::vector<Pad<T>>& pads) {
    ModeSet modes;
    modes.half_waves_ = half_waves;
    for (const Pad<T>& pad : pads) {
        modes.share_across_ = std::min(modes.share_across_, value_of(pad.across) / slab.width);
        modes.share_along_ = std::min(modes.share_along_, value_of(pad.along) / slab.length);
    }
    return modes;
}

template ModeSet ModeSet::up_to(double, const Slab&, const std::vector<Pad<double>>&);
template ModeSet ModeSet::up_to(double, const Slab&, const std::vector<Pad<Dual<1>>>&);

template <class T>
ModeSet ModeSet::for_means(const Slab& slab, const std::vector<Pad<T>>& pads) {
    return up_to(half_waves_for_means, slab, pads);
}

template ModeSet ModeSet::for_means(const Slab&, const std::vector<Pad<double>>&);
template ModeSet ModeSet::for_means(const Slab&, const std::vector<Pad<Dual<1>>>&);

int ModeSet::last(double half_waves, double share) {
    return std::clamp(int(std::ceil(half_waves / share)), fewest_modes, most_modes);
}

int ModeSet::last_across() const {
    return last(half_waves_, share_across_);
}

int ModeSet::last_along(int m) const {
    return last(half_waves_ / std::max(1.0, m * share_across_), share_along_);
}

std::vector<double> pad_mean_rises(const Slab& slab, const std::vector<Pad<double>>& pads,
                                   const std::vector<double>& powers, const ModeSet& modes) {
    const std::size_t count = pads.size();
    const auto means = pad_modes(slab.width, slab.length, pads, modes);
    std::vector<double> rises(count, std::accumulate(powers.begin(), powers.end(), 0.0) *
                                         uniform_resistance(slab));
    for_each_mode(slab, modes, [&](int m, int n, double weight, double z_squared) {
        double flux = 0.0;
        for (std::size_t i = 0; i < count; ++i)
            flux += powers[i] * means[i].across[std::size_t(m)] * means[i].along[std::size_t(n)];
        const double rise = weight * resistance_of(z_squared, slab) * flux;
        for (std::size_t i = 0; i < count; ++i)
            rises[i] += rise * means[i].across[std::size_t(m)] * means[i].along[std::size_t(n)];
    });
    for (double& rise : rises)
        rise /= slab.width * slab.length;
    return rises;
}

std::vector<double> pad_mean_rises(const Slab& slab, const std::vector<Pad<double>>& pads,
                                   const std::vector<double>& powers) {
    return pad_mean_rises(slab, pads, powers, ModeSet::for_means(slab, pads));
}

std::vector<Dual<4>> pad_mean_rises_with_slopes(const Slab& slab,
                                                const std::vector<Pad<Dual<1>>>& pads,
                                                const std::vector<double>& powers,
                                                const ModeSet& modes) {
    const std::size_t count = pads.size();
    const auto means =
        pad_modes(Dual<1>::variable(slab.width, 0), Dual<1>::variable(slab.length, 0), pads, modes);
    const double total = std::accumulate(powers.begin(), powers.end(), 0.0);
    Dual<4> uniform(total * uniform_resistance(slab));
    uniform.slope[2] = total / slab.conductivity;
    uniform.slope[3] = -total / (slab.film * slab.film);
    std::vector<Dual<4>> rises(count, uniform);

    // The slope of z^2 = (m pi/W)^2 + (n pi/L)^2 by W is -2 (m pi/W)^2/W, and so by L.
    const double along = pi / slab.length;
    std::vector<Row> rows(count);
    std::vector<Dual<1>> loaded(count);
    const auto open_row = [&](std::size_t m) {
        std::fill(rows.begin(), rows.end(), Row{});
        for (std::size_t i = 0; i < count; ++i)
            loaded[i] = powers[i] * means[i].across[m];
    };
    const auto close_row = [&](std::size_t m) {
        for (std::size_t i = 0; i < count; ++i) {
            const Dual<1>& across = means[i].across[m];
            const Row& row = rows[i];
            rises[i].value += across.value * row.value;
            rises[i].slope[0] += across.slope[0] * row.value + across.value * row.by_width;
            rises[i].slope[1] += across.value * row.by_length;
            rises[i].slope[2] += across.value * row.by_thickness;
            rises[i].slope[3] += across.value * row.by_film;
        }
    };
    int open = 0;
    open_row(0);
    for_each_mode(slab, modes, [&](int m, int n, double weight, double z_squared) {
        if (m != open) {
            close_row(std::size_t(open));
            open_row(std::size_t(m));
            open = m;
        }
        double flux = 0.0, flux_by_width = 0.0, flux_by_length = 0.0;
        for (std::size_t i = 0; i < count; ++i) {
            const Dual<1>& mean = means[i].along[std::size_t(n)];
            flux += loaded[i].value * mean.value;
            flux_by_width += loaded[i].slope[0] * mean.value;
            flux_by_length += loaded[i].value * mean.slope[0];
        }
        const ModeResistance r = resistance_with_slopes(z_squared, slab);
        const double from_n = n * n * along * along, from_m = z_squared - from_n;
        const double rise = weight * r.value * flux;
        const double by_z_squared = -2.0 * weight * r.by_z_squared * flux;
        const double by_width =
            weight * r.value * flux_by_width + by_z_squared * from_m / slab.width;
        const double by_length =
            weight * r.value * flux_by_length + by_z_squared * from_n / slab.length;
        const double by_thickness = weight * r.by_thickness * flux;
        const double by_film = weight * r.by_film * flux;
        for (std::size_t i = 0; i < count; ++i) {
            const Dual<1>& mean = means[i].along[std::size_t(n)];
            rows[i].value += rise * mean.value;
            rows[i].by_width += by_width * mean.value;
            rows[i].by_length += by_length * mean.value + rise * mean.slope[0];
            rows[i].by_thickness += by_thickness * mean.value;
            rows[i].by_film += by_film * mean.value;
        }
    });
    close_row(std::size_t(open));
    for (Dual<4>& rise : rises) {
        rise /= slab.width * slab.length;
        rise.slope[0] -= rise.value / slab.width;
        rise.slope[1] -= rise.value / slab.length;
    }
    return rises;
}

double surface_rise(const Slab& slab, const std::vector<Pad<double>>& pads,
                    const std::vector<double>& powers, double x, double y) {
    const ModeSet modes = ModeSet::up_to(half_waves_at_a_point, slab, pads);
    const auto means = pad_modes(slab.width, slab.length, pads, modes);
    double rise = 0.0;
    for (double power : powers)
        rise += power * uniform_resistance(slab);
    for_each_mode(slab, modes, [&](int m, int n, double weight, double z_squared) {
        double flux = 0.0;
        for (std::size_t i = 0; i < pads.size(); ++i)
            flux += powers[i] * means[i].across[std::size_t(m)] * means[i].along[std::size_t(n)];
        rise += weight * resistance_of(z_squared, slab) * flux * std::cos(m * pi * x / slab.width) *
                std::cos(n * pi * y / slab.length);
    });
    return rise / (slab.width * slab.length);
}

double mean_rise_two_layers(const Slab& base, const Layer& top, const Pad<double>& pad) {
    const ModeSet modes = ModeSet::up_to(half_waves_at_a_point, base, std::vector{pad});
    const auto means = pad_modes(base.width, base.length, {pad}, modes).front();
    double rise = top.thickness / top.conductivity + uniform_resistance(base);
    for_each_mode(base, modes, [&](int m, int n, double weight, double z_squared) {
        const double z = std::sqrt(z_squared), below = resistance_of(z_squared, base);
        const double t = std::tanh(z * top.thickness), kz = top.conductivity * z;
        const double mean = means.across[std::size_t(m)] * means.along[std::size_t(n)];
        rise += weight * (t + kz * below) / (kz * (1.0 + kz * below * t)) * mean * mean;
    });
    return rise / (base.width * base.length);
}

} // namespace finwright::correlations
