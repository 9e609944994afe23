#include "src/job/power_table.hpp"

#include <algorithm>
#include <limits>

namespace finwright::job {

PowerTable::PowerTable(std::vector<Point> points) : points_(std::move(points)) {
    constexpr double endless = std::numeric_limits<double>::infinity();
    pieces_.push_back({-endless, points_.front().temperature, points_.front(), 0.0});
    for (std::size_t i = 1; i < points_.size(); ++i) {
        const Point &a = points_[i - 1], &b = points_[i];
        const double slope = (b.power - a.power) / (b.temperature - a.temperature);
        pieces_.push_back({a.temperature, b.temperature, a, slope});
    }
    pieces_.push_back(
        {points_.back().temperature, endless, points_.back(), std::max(pieces_.back().slope, 0.0)});
}

std::size_t PowerTable::piece_at(double temperature) const {
    const auto above = std::find_if(pieces_.begin(), pieces_.end(),
                                    [&](const Piece& piece) { return temperature < piece.to; });
    return std::min(std::size_t(above - pieces_.begin()), pieces_.size() - 1);
}

double PowerTable::power_at(double temperature) const {
    return pieces_[piece_at(temperature)].power_at(temperature);
}

double PowerTable::most_power(double from, double to) const {
    double most = std::max(power_at(from), power_at(to));
    for (const Point& point : points_)
        if (point.temperature > from && point.temperature < to) most = std::max(most, point.power);
    return most;
}

} // namespace finwright::job
