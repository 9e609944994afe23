#include "src/sink/grid_axis.hpp"

#include <algorithm>
#include <cmath>

namespace finwright::sink {

namespace {

constexpr double nearest_line = 0.1; // of the widest cell
constexpr int samples = 400;         // of the wished width between two fixed lines

/// Ends of the side and foci in order, none too near to the one before.
std::vector<double> fixed_lines(double side, const std::vector<Focus>& foci, double apart) {
    std::vector<double> places;
    for (const Focus& focus : foci)
        places.push_back(focus.place);
    std::sort(places.begin(), places.end());
    std::vector<double> lines{0.0};
    for (double place : places)
        if (place - lines.back() > apart && side - place > apart) lines.push_back(place);
    lines.push_back(side);
    return lines;
}

} // namespace

GridAxis::GridAxis(double side, const std::vector<Focus>& foci, AxisCells cells) {
    const double widest = side / cells.over_side;
    const std::vector<double> fixed = fixed_lines(side, foci, nearest_line * widest);
    for (std::size_t i = 0; i + 1 < fixed.size(); ++i)
        fill({fixed[i], fixed[i + 1]}, widest, foci, cells.at_focus);
    lines_.push_back(side);
}

/// Adds lines from the first end on, short of the other, so that every cell holds the same part of
/// the integral of 1/(wished width).
void GridAxis::fill(const Stretch& between, double widest, const std::vector<Focus>& foci,
                    int at_focus) {
    const auto wished = [&](double place) {
        double width = widest;
        for (const Focus& focus : foci)
            width = std::min(width, (focus.size + 2.0 * std::abs(place - focus.place)) / at_focus);
        return width;
    };
    const double step = between.size() / samples;
    std::vector<double> before{0.0}; // cells before each sample's end
    for (int s = 0; s < samples; ++s)
        before.push_back(before.back() + step / wished(between.from + (s + 0.5) * step));
    const int count = std::max(1, int(std::ceil(before.back() - 1e-6)));
    std::size_t s = 0;
    for (int i = 0; i < count; ++i) {
        const double aim = before.back() * i / count;
        while (before[s + 1] <= aim)
            ++s;
        const double part = (aim - before[s]) / (before[s + 1] - before[s]);
        lines_.push_back(between.from + step * (double(s) + part));
    }
}

std::vector<double> GridAxis::shares(const Stretch& stretch) const {
    std::vector<double> shares;
    for (int i = 0; i < cells(); ++i) {
        const double inside =
            std::min(stretch.to, cell(i).to) - std::max(stretch.from, cell(i).from);
        shares.push_back(std::max(0.0, inside) / stretch.size());
    }
    return shares;
}

} // namespace finwright::sink
