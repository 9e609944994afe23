#pragma once
// A part's power by the temperature of its junction: straight lines between points. Below the first
// point the power stays what it is there. Above the last a rising line goes on rising and a falling
// one stays level, both on the hot side.

#include <cstddef>
#include <vector>

namespace finwright::job {

class PowerTable {
public:
    struct Point {
        double temperature; ///< [K]
        double power;       ///< [W]
    };

    /// One straight stretch; the first and the last have no end outwards.
    struct Piece {
        double from, to; ///< [K]
        Point point;     ///< one on its line
        double slope;    ///< [W/K]

        double power_at(double temperature) const {
            return point.power + slope * (temperature - point.temperature);
        }
    };

    /// At least two points, their temperatures rising, their powers above zero.
    explicit PowerTable(std::vector<Point> points);

    const std::vector<Point>& points() const { return points_; }
    const std::vector<Piece>& pieces() const { return pieces_; }
    /// The piece a temperature lies on, the upper one where two meet [-].
    std::size_t piece_at(double temperature) const;

    double power_at(double temperature) const; ///< [W]
    /// The most between two temperatures [W].
    double most_power(double from, double to) const;

private:
    std::vector<Point> points_;
    std::vector<Piece> pieces_;
};

} // namespace finwright::job
