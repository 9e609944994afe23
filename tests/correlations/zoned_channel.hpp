#pragma once
// The grey channel between two fins solved in zones: what the closed laws are held against.
//
// Two fin faces (gap apart, height x length) and the base strip between them, all at one
// temperature, grey and diffuse, open in front and at both ends. Unit sigma (Ts^4 - Te^4): every
// zone's radiosity is J_i = eps + (1 - eps) sum_j F_ij J_j, the heat is eps/(1 - eps) sum
// A (1 - J). Exchange areas of zones are exact, by differences of the two kernels' closed
// integrals, so the solution is Galerkin's with constants on the zones: it lies above the true one
// and falls towards it as zones get smaller. Both mirror symmetries are used: one fin, half its
// length, half the base.

#include <Eigen/Dense>
#include <algorithm>
#include <cmath>
#include <numbers>
#include <vector>

namespace finwright::tests {

struct Strip {
    double from, to;
    double width() const { return to - from; }
};

/// Double integral of f''(s - t) over s in a and t in b.
template <class F>
double between(const Strip& a, const Strip& b, F&& f) {
    return f(a.to - b.from) - f(a.to - b.to) - f(a.from - b.from) + f(a.from - b.to);
}

/// n strips over a side, widths growing with the distance from its open end (at 0) plus the gap.
inline std::vector<Strip> strips(int n, double side, double gap) {
    std::vector<Strip> list;
    const auto edge = [&](int i) {
        return 0.5 * gap * std::expm1(std::log1p(side / (0.5 * gap)) * i / n);
    };
    for (int i = 0; i < n; ++i)
        list.push_back({edge(i), edge(i + 1)});
    return list;
}

/// The strip's mirror image in the middle of the side.
inline Strip mirrored(const Strip& s, double side) {
    return {side - s.to, side - s.from};
}

struct Zones {
    int height, half_length, half_base;
    Zones halved() const { return {2 * height, 2 * half_length, 2 * half_base}; }
};

class ZonedChannel {
public:
    ZonedChannel(double gap, double height, double length, const Zones& zones)
        : gap_(gap), length_(length), depths_(strips(zones.height, height, gap)),
          places_(strips(zones.half_length, 0.5 * length, gap)),
          widths_(strips(zones.half_base, 0.5 * gap, gap)) {
        const auto fin = Eigen::Index(depths_.size() * places_.size()),
                   base = Eigen::Index(widths_.size() * places_.size());
        area_.resize(fin + base);
        exchange_ = Eigen::MatrixXd::Zero(fin + base, fin + base);
        Eigen::Index row = 0;
        for (const Strip& depth : depths_)
            for (const Strip& place : places_)
                fill_fin_zone(row++, depth, place, height);
        for (const Strip& width : widths_)
            for (const Strip& place : places_)
                area_[row++] = width.width() * place.width();
        exchange_.bottomLeftCorner(base, fin) =
            exchange_.topRightCorner(fin, base).transpose().eval();
    }

    /// What all walls see of the surroundings [m2].
    double opening() const { return 4.0 * (area_.sum() - exchange_.sum()); }

    /// Heat over sigma (Ts^4 - Te^4) [m2]; emissivity below 1.
    double conductance(double emissivity) const {
        const double reflected = 1.0 - emissivity;
        Eigen::MatrixXd balance = -reflected * exchange_;
        balance.diagonal() += area_;
        const Eigen::VectorXd radiosity = balance.llt().solve(emissivity * area_);
        return 4.0 * emissivity / reflected * (area_.sum() - area_.dot(radiosity));
    }

private:
    /// Sum of an exchange over a place along the length and its mirror image.
    template <class F>
    double both_halves(const Strip& place, F&& exchange) const {
        return exchange(place) + exchange(mirrored(place, length_));
    }

    /// One zone of the left fin to all mirror images of every zone.
    void fill_fin_zone(Eigen::Index row, const Strip& depth, const Strip& place, double height) {
        area_[row] = depth.width() * place.width();
        Eigen::Index column = 0;
        for (const Strip& d : depths_)
            for (const Strip& p : places_)
                exchange_(row, column++) = both_halves(
                    p, [&](const Strip& along) { return opposite(depth, place, d, along); });
        const Strip above_base = mirrored(depth, height);
        for (const Strip& w : widths_)
            for (const Strip& p : places_)
                exchange_(row, column++) = both_halves(p, [&](const Strip& along) {
                    return corner(above_base, place, w, along) +
                           corner(above_base, place, mirrored(w, gap_), along);
                });
    }

    /// Exchange area of two zones of opposite fins: kernel c^2/(pi r^4), c the gap.
    double opposite(const Strip& z1, const Strip& y1, const Strip& z2, const Strip& y2) const {
        const double c2 = gap_ * gap_;
        return between(z1, z2, [&](double u) {
            return between(y1, y2, [&](double v) {
                const double a = std::sqrt(u * u + c2), b = std::sqrt(v * v + c2);
                return (v * a * std::atan(v / a) + u * b * std::atan(u / b) -
                        0.5 * c2 * std::log(c2 + u * u + v * v)) /
                       (2.0 * std::numbers::pi);
            });
        });
    }

    /// Exchange area of a fin zone z above the base and a base zone x from the fin: kernel
    /// x z/(pi r^4).
    static double corner(const Strip& z, const Strip& y1, const Strip& x, const Strip& y2) {
        const auto line = [&](double xe, double ze) {
            const double p2 = xe * xe + ze * ze, p = std::sqrt(p2);
            return between(y1, y2, [&](double u) {
                const double r2 = std::max(p2 + u * u, 1e-300); // 0 ln 0 = 0
                return 0.5 * (u * u - p2) * std::log(r2) + 2.0 * p * u * std::atan2(u, p);
            });
        };
        return -(line(x.to, z.to) - line(x.from, z.to) - line(x.to, z.from) +
                 line(x.from, z.from)) /
               (4.0 * std::numbers::pi);
    }

    double gap_, length_;
    std::vector<Strip> depths_, places_, widths_; ///< from the front, from an end, from a fin
    Eigen::VectorXd area_;
    Eigen::MatrixXd exchange_; ///< exchange areas between classes of mirror images
};

/// The solution freed of most of its mesh error, which falls with the square of the zones' width:
/// solved once more with every zone halved each way, and the change continued (Richardson 1911).
class ExtrapolatedChannel {
public:
    ExtrapolatedChannel(double gap, double height, double length, const Zones& zones)
        : coarse_(gap, height, length, zones), fine_(gap, height, length, zones.halved()) {}

    double conductance(double emissivity) const {
        const double fine = fine_.conductance(emissivity);
        return fine + (fine - coarse_.conductance(emissivity)) / 3.0;
    }

private:
    ZonedChannel coarse_, fine_;
};

} // namespace finwright::tests
