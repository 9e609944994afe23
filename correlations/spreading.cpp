#include "correlations/spreading.hpp"

#include <algorithm>

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

/// One mode's rise per flux and how it changes.
struct ModeResistance {
    double value; ///< G(z)/(k z) [m2 K/W]
    double by_z, by_thickness, by_film;
};

ModeResistance mode_resistance(double z, double thickness, double k, double film) {
    const double t = std::tanh(z * thickness);
    const double kz = k * z, r = kz / film;
    const double d = 1.0 + r * t;
    const double sech2 = 1.0 - t * t;
    const double scale = 1.0 / (d * d * kz);
    const double value = (t + r) / (d * kz);
    const double by_tanh = (1.0 - r * r) * scale, by_ratio = sech2 * scale;
    return {value, by_tanh * thickness * sech2 + by_ratio * k / film - value / z,
            by_tanh * z * sech2, -by_ratio * r / film};
}

double resistance_of(double z_squared, const Slab<double>& slab) {
    const double z = std::sqrt(z_squared);
    const double t = std::tanh(z * slab.thickness);
    const double kz = slab.conductivity * z, r = kz / slab.film;
    return (t + r) / ((1.0 + r * t) * kz);
}

template <std::size_t N>
Dual<N> resistance_of(const Dual<N>& z_squared, const Slab<Dual<N>>& slab) {
    const double z = std::sqrt(z_squared.value);
    const ModeResistance mode =
        mode_resistance(z, slab.thickness.value, slab.conductivity, slab.film.value);
    Dual<N> out(mode.value);
    const double by_z_squared = 0.5 * mode.by_z / z;
    for (std::size_t i = 0; i < N; ++i)
        out.slope[i] = by_z_squared * z_squared.slope[i] +
                       mode.by_thickness * slab.thickness.slope[i] +
                       mode.by_film * slab.film.slope[i];
    return out;
}

/// Calls visit(m, n, weight, z^2) for every mode but the uniform one.
template <class T, class Visit>
void for_each_mode(const Slab<T>& slab, const ModeSet& modes, Visit&& visit) {
    const T across = pi / slab.width, along = pi / slab.length;
    const T across2 = across * across, along2 = along * along;
    for (int m = 0, last_m = modes.last_across(); m <= last_m; ++m) {
        const T from_m = double(m) * double(m) * across2;
        const int last_n = modes.last_along(m);
        for (int n = m == 0 ? 1 : 0; n <= last_n; ++n)
            visit(m, n, m > 0 && n > 0 ? 4.0 : 2.0, T(from_m + double(n) * double(n) * along2));
    }
}

template <class T>
struct PadModes {
    std::vector<T> across, along;
};

template <class T>
std::vector<PadModes<T>> pad_modes(const Slab<T>& slab, const std::vector<Pad<T>>& pads,
                                   const ModeSet& modes) {
    std::vector<PadModes<T>> list;
    for (const Pad<T>& pad : pads)
        list.push_back({mode_means(pad.x, pad.across, slab.width, modes.last_across()),
                        mode_means(pad.y, pad.along, slab.length, modes.last_along(0))});
    return list;
}

template <class T>
T uniform_resistance(const Slab<T>& slab) {
    return slab.thickness / slab.conductivity + 1.0 / slab.film;
}

} // namespace

template <class T>
ModeSet ModeSet::up_to(double half_waves, const Slab<T>& slab, const std::vector<Pad<T>>& pads) {
    ModeSet modes;
    modes.half_waves_ = half_waves;
    for (const Pad<T>& pad : pads) {
        modes.share_across_ =
            std::min(modes.share_across_, value_of(pad.across) / value_of(slab.width));
        modes.share_along_ =
            std::min(modes.share_along_, value_of(pad.along) / value_of(slab.length));
    }
    return modes;
}

template ModeSet ModeSet::up_to(double, const Slab<double>&, const std::vector<Pad<double>>&);
template ModeSet ModeSet::up_to(double, const Slab<Dual<5>>&, const std::vector<Pad<Dual<5>>>&);

int ModeSet::last(double half_waves, double share) {
    return std::clamp(int(std::ceil(half_waves / share)), fewest_modes, most_modes);
}

int ModeSet::last_across() const {
    return last(half_waves_, share_across_);
}

int ModeSet::last_along(int m) const {
    return last(half_waves_ / std::max(1.0, m * share_across_), share_along_);
}

template <class T>
std::vector<T> pad_mean_rises(const Slab<T>& slab, const std::vector<Pad<T>>& pads,
                              const std::vector<double>& powers) {
    return pad_mean_rises(slab, pads, powers, ModeSet::up_to(half_waves_for_means, slab, pads));
}

template <class T>
std::vector<T> pad_mean_rises(const Slab<T>& slab, const std::vector<Pad<T>>& pads,
                              const std::vector<double>& powers, const ModeSet& modes) {
    const std::size_t count = pads.size();
    const auto means = pad_modes(slab, pads, modes);
    double total = 0.0;
    for (double power : powers)
        total += power;

    std::vector<T> rises(count, total * uniform_resistance(slab));
    std::vector<T> row(count, T(0.0)), loaded(count, T(0.0));
    int row_of = -1;
    const auto close_row = [&] {
        for (std::size_t i = 0; i < count && row_of >= 0; ++i)
            rises[i] += means[i].across[std::size_t(row_of)] * row[i];
    };
    for_each_mode(slab, modes, [&](int m, int n, double weight, const T& z_squared) {
        if (m != row_of) {
            close_row();
            row_of = m;
            for (std::size_t i = 0; i < count; ++i) {
                row[i] = T(0.0);
                loaded[i] = powers[i] * means[i].across[std::size_t(m)];
            }
        }
        T flux(0.0);
        for (std::size_t i = 0; i < count; ++i)
            flux += loaded[i] * means[i].along[std::size_t(n)];
        const T rise = weight * resistance_of(z_squared, slab) * flux;
        for (std::size_t i = 0; i < count; ++i)
            row[i] += rise * means[i].along[std::size_t(n)];
    });
    close_row();
    const T area = slab.width * slab.length;
    for (T& rise : rises)
        rise /= area;
    return rises;
}

template std::vector<double> pad_mean_rises(const Slab<double>&, const std::vector<Pad<double>>&,
                                            const std::vector<double>&);
template std::vector<double> pad_mean_rises(const Slab<double>&, const std::vector<Pad<double>>&,
                                            const std::vector<double>&, const ModeSet&);
template std::vector<Dual<5>> pad_mean_rises(const Slab<Dual<5>>&, const std::vector<Pad<Dual<5>>>&,
                                             const std::vector<double>&);
template std::vector<Dual<5>> pad_mean_rises(const Slab<Dual<5>>&, const std::vector<Pad<Dual<5>>>&,
                                             const std::vector<double>&, const ModeSet&);

double surface_rise(const Slab<double>& slab, const std::vector<Pad<double>>& pads,
                    const std::vector<double>& powers, double x, double y) {
    const ModeSet modes = ModeSet::up_to(half_waves_at_a_point, slab, pads);
    const auto means = pad_modes(slab, pads, modes);
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

double mean_rise_two_layers(const Slab<double>& base, const Layer& top, const Pad<double>& pad) {
    const ModeSet modes = ModeSet::up_to(half_waves_at_a_point, base, std::vector{pad});
    const auto means = pad_modes(base, {pad}, modes).front();
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
