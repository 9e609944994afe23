#pragma once
// Parts whose power follows their junction: the powers and junctions that agree.
//
// Model. The sink makes junctions of powers, T = J(P), and tables make powers of junctions,
// P = p(T). Switched on cold, the junctions climb until both agree: at the least root of
// T = J(p(T)) where all tables rise. The loop gain is the largest eigenvalue of J' p' [-]; for one
// part the resistance from its junction to the air times dP/dT. Below 1 a disturbance dies away,
// grown by 1/(1 - gain) while it lasts; at 1 or more it feeds itself: thermal runaway.
//
// Method. Newton's step, cut where the first part comes to the end of its table's piece, so that no
// kink is stepped over (Katzenelson 1965, from memory). Where the gain is 1 or more that step would
// turn back; with the identity scaled up by a little more than the gain it climbs on, from below
// never past a root on the piece. The slopes of J are differences, kept until a step falls short
// and taken afresh at the end. Powers and junctions agree to 1e-9. Every step ends a piece or
// shrinks what is left, and their number is bounded: what has not settled by then, or has climbed
// past the hottest junction there is, runs away.

#include "src/job/power_table.hpp"
#include <functional>
#include <optional>
#include <vector>

namespace finwright::sink {

/// Junctions at given powers [K], one of each for every table. More power never cools.
using Junctions = std::function<std::vector<double>(const std::vector<double>&)>;

/// No stable solution.
struct Runaway {
    std::size_t part = 0; ///< the one whose power grows most, among the tables
    /// Its junction where the gain reached 1 on the climb; where the climb ended if it never did
    /// [K].
    double junction = 0.0;
    double loop_gain = 0.0; ///< there [-]
};

struct PowerBalance {
    std::vector<double> powers;    ///< [W]
    std::vector<double> junctions; ///< [K]
    double loop_gain = 0.0;        ///< at these powers [-]
    /// How much warmer the inlet air may be before the parts run away, the sink's resistances as
    /// they are [K]; empty where they do not below the hottest junction there is, or do already.
    std::optional<double> air_left;
    std::optional<Runaway> runaway; ///< the state then is the one in which the climb ended
};

/// `coldest`: no junction is below it, and the climb begins there [K].
PowerBalance balance_powers(const std::vector<job::PowerTable>& tables, double coldest,
                            const Junctions& junctions);

} // namespace finwright::sink
