#include "correlations/friction.hpp"

namespace finwright::correlations {

namespace {

constexpr std::array<double, 11> table{0.611, 0.612, 0.616, 0.622, 0.631, 0.644,
                                       0.662, 0.687, 0.722, 0.781, 1.0};
constexpr double spacing = 0.1;

/// Slopes of a monotone cubic (Fritsch & Butland 1984: harmonic means of neighbouring secants).
constexpr std::array<double, 11> monotone_slopes() {
    std::array<double, 11> slopes{};
    for (std::size_t i = 1; i + 1 < table.size(); ++i) {
        const double before = (table[i] - table[i - 1]) / spacing;
        const double after = (table[i + 1] - table[i]) / spacing;
        slopes[i] = 2.0 * before * after / (before + after);
    }
    slopes[0] = (table[1] - table[0]) / spacing;
    slopes[10] = (table[10] - table[9]) / spacing;
    return slopes;
}

constexpr auto slopes = monotone_slopes();

} // namespace

template <class T> T contraction_coefficient(const T& sigma) {
    const T bounded = clamp(sigma, 0.0, 1.0);
    const auto i = std::min<std::size_t>(std::size_t(value_of(bounded) / spacing), 9);
    const T s = bounded / spacing - double(i);
    const T s2 = s * s, s3 = s2 * s;
    return table[i] * (2.0 * s3 - 3.0 * s2 + 1.0) + spacing * slopes[i] * (s3 - 2.0 * s2 + s) +
           table[i + 1] * (3.0 * s2 - 2.0 * s3) + spacing * slopes[i + 1] * (s3 - s2);
}

template double contraction_coefficient(const double&);
template Dual<1> contraction_coefficient(const Dual<1>&);
template Dual<5> contraction_coefficient(const Dual<5>&);
template Dual<6> contraction_coefficient(const Dual<6>&);

} // namespace finwright::correlations
