#pragma once
// Forward-mode derivatives: a value and its N partial derivatives carried through a formula.
//
// Conventions: sqrt, pow and log at the edge of their domain give the derivative the limit gives
// (infinite where it is infinite, never NaN from 0 * inf at a seed of zero); min, max and clamp
// take the derivative of the side chosen, the first argument's on a tie; comparisons look at values
// only.

#include <algorithm>
#include <array>
#include <cmath>
#include <cstddef>

namespace finwright::correlations {

template <std::size_t N>
struct Dual {
    double value = 0.0;
    std::array<double, N> slope{};

    constexpr Dual() = default;
    constexpr Dual(double v) : value(v) {} // NOLINT: constants enter formulas as they are

    /// The i-th independent variable at value v: slope 1 in place i.
    static constexpr Dual variable(double v, std::size_t i) {
        Dual d(v);
        d.slope[i] = 1.0;
        return d;
    }

    constexpr Dual& operator+=(const Dual& b) {
        for (std::size_t i = 0; i < N; ++i)
            slope[i] += b.slope[i];
        value += b.value;
        return *this;
    }
    constexpr Dual& operator-=(const Dual& b) {
        for (std::size_t i = 0; i < N; ++i)
            slope[i] -= b.slope[i];
        value -= b.value;
        return *this;
    }
    constexpr Dual& operator*=(const Dual& b) {
        for (std::size_t i = 0; i < N; ++i)
            slope[i] = slope[i] * b.value + value * b.slope[i];
        value *= b.value;
        return *this;
    }
    constexpr Dual& operator/=(const Dual& b) {
        const double inverse = 1.0 / b.value;
        value *= inverse;
        for (std::size_t i = 0; i < N; ++i)
            slope[i] = (slope[i] - value * b.slope[i]) * inverse;
        return *this;
    }
    constexpr Dual& operator*=(double b) {
        for (auto& s : slope)
            s *= b;
        value *= b;
        return *this;
    }
    constexpr Dual& operator/=(double b) { return *this *= 1.0 / b; }

    friend constexpr Dual operator+(Dual a, const Dual& b) { return a += b; }
    friend constexpr Dual operator-(Dual a, const Dual& b) { return a -= b; }
    friend constexpr Dual operator*(Dual a, const Dual& b) { return a *= b; }
    friend constexpr Dual operator/(Dual a, const Dual& b) { return a /= b; }
    friend constexpr Dual operator+(Dual a, double b) {
        a.value += b;
        return a;
    }
    friend constexpr Dual operator+(double a, Dual b) { return b + a; }
    friend constexpr Dual operator-(Dual a, double b) { return a + (-b); }
    friend constexpr Dual operator-(double a, const Dual& b) { return -b + a; }
    friend constexpr Dual operator*(Dual a, double b) { return a *= b; }
    friend constexpr Dual operator*(double a, Dual b) { return b *= a; }
    friend constexpr Dual operator/(Dual a, double b) { return a /= b; }
    friend constexpr Dual operator/(double a, const Dual& b) {
        const double v = a / b.value;
        return chain(b, v, -v / b.value);
    }
    friend constexpr Dual operator-(Dual a) {
        a.value = -a.value;
        for (auto& s : a.slope)
            s = -s;
        return a;
    }
    friend constexpr Dual operator+(const Dual& a) { return a; }

    friend constexpr bool operator<(const Dual& a, const Dual& b) { return a.value < b.value; }
    friend constexpr bool operator>(const Dual& a, const Dual& b) { return a.value > b.value; }
    friend constexpr bool operator<=(const Dual& a, const Dual& b) { return a.value <= b.value; }
    friend constexpr bool operator>=(const Dual& a, const Dual& b) { return a.value >= b.value; }
    friend constexpr bool operator==(const Dual& a, const Dual& b) { return a.value == b.value; }

    /// f(a) with f' known: value v, slopes f' * slope; a zero slope stays zero even where f' is
    /// infinite.
    friend constexpr Dual chain(const Dual& a, double v, double derivative) {
        Dual out(v);
        for (std::size_t i = 0; i < N; ++i)
            out.slope[i] = a.slope[i] == 0.0 ? 0.0 : a.slope[i] * derivative;
        return out;
    }

    friend Dual sqrt(const Dual& a) {
        const double v = std::sqrt(a.value);
        return chain(a, v, 0.5 / v);
    }
    friend Dual cbrt(const Dual& a) {
        const double v = std::cbrt(a.value);
        return chain(a, v, 1.0 / (3.0 * v * v));
    }
    friend Dual exp(const Dual& a) {
        const double v = std::exp(a.value);
        return chain(a, v, v);
    }
    friend Dual expm1(const Dual& a) {
        const double v = std::expm1(a.value);
        return chain(a, v, v + 1.0);
    }
    friend Dual log(const Dual& a) { return chain(a, std::log(a.value), 1.0 / a.value); }
    friend Dual log1p(const Dual& a) {
        return chain(a, std::log1p(a.value), 1.0 / (1.0 + a.value));
    }
    friend Dual sin(const Dual& a) { return chain(a, std::sin(a.value), std::cos(a.value)); }
    friend Dual cos(const Dual& a) { return chain(a, std::cos(a.value), -std::sin(a.value)); }
    friend Dual tan(const Dual& a) {
        const double v = std::tan(a.value);
        return chain(a, v, 1.0 + v * v);
    }
    friend Dual atan(const Dual& a) {
        return chain(a, std::atan(a.value), 1.0 / (1.0 + a.value * a.value));
    }
    friend Dual tanh(const Dual& a) {
        const double v = std::tanh(a.value);
        return chain(a, v, 1.0 - v * v);
    }
    friend Dual pow(const Dual& a, double exponent) {
        const double v = std::pow(a.value, exponent);
        const double derivative =
            a.value == 0.0 ? exponent * std::pow(a.value, exponent - 1.0) : exponent * v / a.value;
        return chain(a, v, derivative);
    }
    friend Dual hypot(const Dual& a, const Dual& b) { return sqrt(a * a + b * b); }
    friend Dual abs(const Dual& a) { return a.value < 0.0 ? -a : a; }
    friend Dual min(const Dual& a, const Dual& b) { return b.value < a.value ? b : a; }
    friend Dual max(const Dual& a, const Dual& b) { return a.value < b.value ? b : a; }
};

/// The plain number inside, for printing and for deciding.
template <std::size_t N>
constexpr double value_of(const Dual<N>& a) {
    return a.value;
}
constexpr double value_of(double a) {
    return a;
}

/// Bounded to [lower, upper]; constant, so slope zero, outside.
template <class T>
T clamp(const T& a, double lower, double upper) {
    using std::max, std::min;
    return min(max(a, T(lower)), T(upper));
}

// The widths the project uses are compiled once: one variable, the five of the sink's geometry, and
// those five with the base rise.
extern template struct Dual<1>;
extern template struct Dual<5>;
extern template struct Dual<6>;

} // namespace finwright::correlations
