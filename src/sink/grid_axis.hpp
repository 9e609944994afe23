#pragma once
// Cells along one side of the base: fine where the temperature is steep, and with grid lines at the
// pads' edges, where the flux jumps, so that a solution converges smoothly as they are made
// smaller.

#include <vector>

namespace finwright::sink {

/// A part of a side [m].
struct Stretch {
    double from, to;

    double size() const { return to - from; }
    double middle() const { return 0.5 * (from + to); }
};

/// Where an axis has to be fine, such as the edge of a pad.
struct Focus {
    double place; ///< [m]
    double size;  ///< of what makes it steep there, such as the pad's side [m]
};

/// No cell is wider than side/over_side, nor than (size + 2 distance)/at_focus for any focus: a
/// pad has 1/at_focus of its side at its edges and twice that in its middle.
struct AxisCells {
    int over_side;
    int at_focus;
};

class GridAxis {
public:
    /// A line on every focus; but one nearer to another than a tenth of the widest cell is left
    /// out.
    GridAxis(double side, const std::vector<Focus>& foci, AxisCells cells);

    int cells() const { return int(lines_.size()) - 1; }
    const std::vector<double>& lines() const { return lines_; } ///< from 0 to the side [m]
    Stretch cell(int i) const { return {lines_[std::size_t(i)], lines_[std::size_t(i) + 1]}; }
    double width(int i) const { return cell(i).size(); }
    double centre(int i) const { return cell(i).middle(); }
    /// From one cell's centre to the next one's [m].
    double step(int i) const { return centre(i + 1) - centre(i); }

    /// Share of a stretch that lies in each cell; they add up to 1 if it lies on the side.
    std::vector<double> shares(const Stretch& stretch) const;

private:
    void fill(const Stretch& between, double widest, const std::vector<Focus>& foci, int at_focus);

    std::vector<double> lines_;
};

} // namespace finwright::sink
