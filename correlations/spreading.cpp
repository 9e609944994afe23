#include "correlations/spreading.hpp"

#include <algorithm>
#include <functional>

namespace finwright::correlations {

namespace {

constexpr double pi = std::numbers::pi;
constexpr double half_waves_over_pad = 8.0;
constexpr int most_modes = 240;

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

/// G(z)/(k z): rise per flux of one mode [m2 K/W].
template <class T> T mode_resistance(const T& z, const Slab<T>& slab) {
    using std::tanh;
    const T t = tanh(z * slab.thickness);
    const T kz = slab.conductivity * z;
    const T r = kz / slab.film;
    return (t + r) / ((1.0 + r * t) * kz);
}

struct Modes {
    int across, along;
};

int modes_for(double pad, double side) {
    return std::clamp(int(std::ceil(half_waves_over_pad * side / pad)), 4, most_modes);
}

template <class T> Modes modes_of(const Slab<T>& slab, const std::vector<Pad<T>>& pads) {
    Modes modes{4, 4};
    for (const Pad<T>& pad : pads) {
        modes.across =
            std::max(modes.across, modes_for(value_of(pad.across), value_of(slab.width)));
        modes.along = std::max(modes.along, modes_for(value_of(pad.along), value_of(slab.length)));
    }
    return modes;
}

/// Calls visit(m, n, weight * resistance) for every mode, the uniform one first.
template <class T, class Resistance, class Visit>
void for_each_mode(const Slab<T>& slab, const Modes& modes, Resistance&& resistance,
                   Visit&& visit) {
    using std::sqrt;
    const T across = pi / slab.width, along = pi / slab.length;
    for (int m = 0; m <= modes.across; ++m) {
        const T across_squared = double(m) * double(m) * across * across;
        for (int n = 0; n <= modes.along; ++n) {
            const double weight = (m > 0 ? 2.0 : 1.0) * (n > 0 ? 2.0 : 1.0);
            if (m + n == 0)
                visit(m, n, T(slab.thickness / slab.conductivity + 1.0 / slab.film));
            else
                visit(m, n,
                      T(weight * resistance(T(sqrt(across_squared +
                                                   double(n) * double(n) * along * along)))));
        }
    }
}

} // namespace

template <class T>
std::vector<T> influence_matrix(const Slab<T>& slab, const std::vector<Pad<T>>& pads) {
    const std::size_t count = pads.size();
    const Modes modes = modes_of(slab, pads);
    std::vector<std::vector<T>> across, along;
    for (const Pad<T>& pad : pads) {
        across.push_back(mode_means(pad.x, pad.across, slab.width, modes.across));
        along.push_back(mode_means(pad.y, pad.along, slab.length, modes.along));
    }
    std::vector<T> influence(count * count, T(0.0));
    std::vector<T> mean(count, T(0.0));
    for_each_mode(
        slab, modes, [&](const T& z) { return mode_resistance(z, slab); },
        [&](int m, int n, const T& resistance) {
            for (std::size_t i = 0; i < count; ++i)
                mean[i] = across[i][std::size_t(m)] * along[i][std::size_t(n)];
            for (std::size_t i = 0; i < count; ++i) {
                const T scaled = resistance * mean[i];
                for (std::size_t j = 0; j <= i; ++j)
                    influence[i * count + j] += scaled * mean[j];
            }
        });
    const T area = slab.width * slab.length;
    for (std::size_t i = 0; i < count; ++i)
        for (std::size_t j = 0; j <= i; ++j)
            influence[j * count + i] = influence[i * count + j] = influence[i * count + j] / area;
    return influence;
}

template std::vector<double> influence_matrix(const Slab<double>&, const std::vector<Pad<double>>&);
template std::vector<Dual<5>> influence_matrix(const Slab<Dual<5>>&,
                                               const std::vector<Pad<Dual<5>>>&);

double surface_rise(const Slab<double>& slab, const std::vector<Pad<double>>& pads,
                    const std::vector<double>& powers, double x, double y) {
    const Modes modes{most_modes, most_modes};
    double rise = 0.0;
    for (std::size_t i = 0; i < pads.size(); ++i) {
        const Pad<double>& pad = pads[i];
        const auto across = mode_means(pad.x, pad.across, slab.width, modes.across);
        const auto along = mode_means(pad.y, pad.along, slab.length, modes.along);
        for_each_mode(
            slab, modes, [&](double z) { return mode_resistance(z, slab); },
            [&](int m, int n, double resistance) {
                rise += powers[i] * resistance * across[std::size_t(m)] * along[std::size_t(n)] *
                        std::cos(m * pi * x / slab.width) * std::cos(n * pi * y / slab.length);
            });
    }
    return rise / (slab.width * slab.length);
}

double mean_rise_two_layers(const Slab<double>& base, const Layer& top, const Pad<double>& pad) {
    const Modes modes{most_modes, most_modes};
    const auto across = mode_means(pad.x, pad.across, base.width, modes.across);
    const auto along = mode_means(pad.y, pad.along, base.length, modes.along);
    const auto stacked = [&](double z) {
        const double below = mode_resistance(z, base);
        const double t = std::tanh(z * top.thickness), kz = top.conductivity * z;
        return (t + kz * below) / (kz * (1.0 + kz * below * t));
    };
    double rise = top.thickness / top.conductivity;
    for_each_mode(base, modes, stacked, [&](int m, int n, double resistance) {
        const double mean = across[std::size_t(m)] * along[std::size_t(n)];
        rise += resistance * mean * mean;
    });
    return rise / (base.width * base.length);
}

} // namespace finwright::correlations
