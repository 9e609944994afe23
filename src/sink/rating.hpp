#pragma once
// How one sink does on one duty: every temperature from junction to air, where the heat goes, what
// the air loses, and which laws say so.

#include "correlations/numbers/dual.hpp"
#include "correlations/spreading.hpp"
#include "src/sink/balance.hpp"
#include "src/sink/base_map.hpp"
#include "src/sink/law_use.hpp"
#include "src/sink/moving_air.hpp"
#include "src/sink/still_air.hpp"
#include <optional>
#include <stdexcept>
#include <string>
#include <variant>
#include <vector>

namespace finwright::sink {

/// One part on the sink. Absolute temperatures in K.
struct PartRating {
    std::string name;
    double power = 0.0;           ///< [W]
    double pad_temperature = 0.0; ///< mean of the base surface under the pad [K]
    double case_temperature = 0.0;
    double junction_temperature = 0.0;
    std::optional<double> junction_allowed; ///< limit less margin [K]

    /// Kelvin left below what is allowed; negative when too hot; empty without a limit.
    std::optional<double> headroom() const {
        if (!junction_allowed) return std::nullopt;
        return *junction_allowed - junction_temperature;
    }
};

/// How parts with a power table and the sink act on each other (power_balance.hpp).
struct Feedback {
    struct Runaway {
        std::string part;
        double junction = 0.0; ///< from which on it gets away [K]
        double loop_gain = 0.0;
    };

    double loop_gain = 0.0; ///< 1 is runaway [-]
    std::optional<double>
        air_left; ///< how much warmer the inlet air may be before they run away [K]
    /// The rating then is the moment in which the climb was left, a junction at the hottest there
    /// is.
    std::optional<Runaway> runaway;
};

struct Rating {
    Geometry<double> geometry;
    double power = 0.0;           ///< [W]
    double air_temperature = 0.0; ///< inlet [K]
    double mass = 0.0;            ///< [kg]
    double base_rise = 0.0;       ///< mean of the base over inlet air [K]
    double hottest_pad_rise = 0.0;
    double pressure_drop = 0.0; ///< [Pa]
    double conductance = 0.0;   ///< as in Balance [W/K]
    HeatPaths<double> heat;     ///< [W]
    double sun = 0.0;           ///< taken up besides the parts' power [W]
    std::variant<StillAirView<double>, MovingAirView<double>> view;
    std::vector<PartRating> parts;
    std::vector<LawUse> laws;
    std::optional<Feedback> feedback; ///< where a part's power follows its junction

    bool runs_away() const { return feedback && feedback->runaway; }
    /// Hottest pad's rise over inlet air per watt of total power [K/W].
    double sink_resistance() const { return hottest_pad_rise / power; }
    /// Mean base rise per watt [K/W].
    double base_resistance() const { return base_rise / power; }
    /// Mean temperature of all the air behind the sink; none in still air and in a free stream [K].
    std::optional<double> outlet_temperature() const;
};

/// Rise of the base under each pad over the inlet air, spreading included [K].
std::vector<double> pad_rises(const Geometry<double>& g, const Duty& duty,
                              const Balance<double>& balance);

/// The same with a stated set of the base's modes, and with its slopes.
std::vector<double> pad_rises(const Geometry<double>& g, const Duty& duty,
                              const Balance<double>& balance, const correlations::ModeSet& modes);
std::vector<correlations::Dual<5>> pad_rises(const Geometry<correlations::Dual<5>>& g,
                                             const Duty& duty,
                                             const Balance<correlations::Dual<5>>& balance,
                                             const correlations::ModeSet& modes);

/// The base's modes up to so many half waves over the smallest pad, and those a pad's mean rise
/// needs.
correlations::ModeSet modes_up_to(double half_waves, const Geometry<double>& g, const Duty& duty);
correlations::ModeSet modes_for_means(const Geometry<double>& g, const Duty& duty);

/// The base of a rated sink: in still air one film that holds the rating's mean rise, the sun
/// falling on the fins evenly; in moving air a stream that takes up what the rating says.
BaseMap base_map(const Geometry<double>& g, const Duty& duty, const Rating& rating);

/// A wall or surroundings that take more than the parts give: the base would be colder than its
/// air, where these laws do not hold.
struct ColderThanAir : std::runtime_error {
    ColderThanAir()
        : std::runtime_error("the wall or the surroundings take more heat than the parts give: the "
                             "base would be colder than its air, which is not covered here. Check "
                             "the wall's conductance and both temperatures") {}
};

/// The whole rating, with the powers that tables and sink agree on. Throws ColderThanAir, and
/// std::domain_error for impossible geometry.
Rating rate(const Geometry<double>& g, const Duty& duty);

/// The parts at the powers of their rating, tables settled.
std::vector<job::Part> at_rated_powers(std::vector<job::Part> parts, const Rating& rating);

} // namespace finwright::sink
