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

// The cubics end to end, each clamped to its own stretch: no branch on the value.
template <class T>
T contraction_coefficient(const T& sigma) {
    T sum(table[0]);
    for (std::size_t i = 0; i + 1 < table.size(); ++i) {
        const double rise = table[i + 1] - table[i];
        const double from = spacing * slopes[i], to = spacing * slopes[i + 1];
        const T s = clamp(T(sigma / spacing - double(i)), 0.0, 1.0);
        sum += s * (from + s * (3.0 * rise - 2.0 * from - to + s * (from + to - 2.0 * rise)));
    }
    return sum;
}

template double contraction_coefficient(const double&);
template Dual<1> contraction_coefficient(const Dual<1>&);
template Dual<5> contraction_coefficient(const Dual<5>&);
template Dual<6> contraction_coefficient(const Dual<6>&);

} // namespace finwright::correlations
