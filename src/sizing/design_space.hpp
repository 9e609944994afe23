#pragma once
// What a design may be: which dimensions the search may move between which bounds, and every limit
// it must keep. Written for one fin count at a time; limits are data, so that the answer can name
// the ones that bind.

#include "src/job/job.hpp"
#include "src/sink/duty.hpp"
#include <array>
#include <optional>
#include <string>
#include <vector>

namespace finwright::sizing {

/// The dimensions a search can move, in the order derivatives are carried. The thickness is the
/// fin's at its tip, where it is thinnest; with a draft the root follows from it.
enum class Dimension { height, thickness, gap, base, length };
inline constexpr std::size_t dimension_count = 5;

/// One dimension's room, with the reason for each end.
struct Room {
    double lower = 0.0; ///< [m]
    double upper = 0.0; ///< [m]
    std::string lower_reason;
    std::string upper_reason;
    double step = 0.0; ///< the shop's increment [m]
    bool fixed() const { return lower == upper; }
};

enum class LimitKind {
    width_at_most,
    width_at_least,
    gap_at_least,
    thickness_at_least,
    overall_height,
    height_to_gap,
    height_to_thickness,
    base_to_thickness,
    circle,
    mass,
    pressure_drop,
    channel_velocity,
    pad_rise,
    worst_pad ///< pad rise held below the worst-pad variable times its bound
};

/// One inequality of the design: a quantity held at or below (or above) its bound, in SI.
struct Limit {
    LimitKind kind;
    double bound;
    std::string name; ///< for the reader: "fin height / gap"
    std::string
        reason; ///< where the bound comes from: "extruded-easy", "space", "junction of bridge"
    std::size_t part = 0; ///< for pad_rise
};

/// What the width leaves: a free gap, or a gap or thickness that follows from a fixed width.
enum class WidthRule { follows, sets_gap, sets_thickness };

struct DesignSpace {
    int fins = 2;
    std::array<Room, dimension_count> rooms;
    WidthRule width_rule = WidthRule::follows;
    double width = 0.0; ///< the fixed width, where there is one [m]
    job::FinDetails details;
    double draft_tangent = 0.0;
    std::vector<Limit> limits;
};

/// First and last fin count worth trying. Throws NoRoom when none fits.
struct FinCounts {
    int from, to;
};
FinCounts fin_counts(const job::Job& job);

/// The space at one fin count; empty when some dimension has no room left.
std::optional<DesignSpace> design_space(const job::Job& job, int fins);

/// Rise each pad is allowed over the inlet air [K]; empty where neither a junction limit nor a
/// target says.
std::vector<std::optional<double>> allowed_pad_rises(const job::Job& job);

} // namespace finwright::sizing
