#pragma once
// From a job to the sink that serves it best, or to the reason why none can.

#include "src/job/job.hpp"
#include "src/sink/rating.hpp"
#include "src/sizing/design_space.hpp"
#include <optional>
#include <string>
#include <variant>
#include <vector>

namespace finwright::sizing {

enum class Sense { at_most, at_least };
enum class Measure { length, ratio, mass, pressure, velocity, rise };

/// A limit the design rests on, and what easing it would buy.
struct BindingLimit {
    std::string name;
    std::string reason;
    Sense sense = Sense::at_most;
    Measure measure = Measure::length;
    double bound = 0.0; ///< SI
    /// What the aim falls by (SI: kg, m3, m, m2, K/W, Pa; kelvin in a refusal) per SI unit by which
    /// the limit is eased; first order, at the unrounded optimum of this fin count.
    double worth = 0.0;
};

/// One fin count, optimised and rounded.
struct Design {
    sink::Geometry<double> optimum; ///< before rounding
    double optimum_aim = 0.0;       ///< SI
    sink::Geometry<double> rounded;
    double rounded_aim = 0.0;
};

/// What one of several fans leads to.
struct FanChoice {
    std::string name;
    std::optional<double> aim; ///< of its rounded design, SI; empty where there is none
};

/// The space filled by a plate without fins, as thick as the answer's base.
struct PlainPlate {
    sink::Geometry<double> geometry;
    double mass = 0.0;   ///< [kg]
    double excess = 0.0; ///< of the hottest part over what it is allowed; negative: left [K]
};

struct Answer {
    Design design;
    sink::Rating rating; ///< of the rounded design
    std::vector<BindingLimit> binding;
    std::vector<Design> alternatives; ///< other fin counts, best first, at most five
    double least_aim = 0.0;           ///< before rounding, at the best fin count for that [SI]
    int fin_counts_tried = 0;
    int evaluations = 0;
    /// What air warmed by the others adds to each part, kept free of the rise the search allowed it
    /// [K]; empty in still air.
    std::vector<double> warmed;
    std::optional<PlainPlate> plate; ///< still air in a space of known sides
    std::size_t fan = 0;             ///< of the job's fans, the one this answer rests on
    std::vector<FanChoice> fans;     ///< all of them, where there are several
};

/// Why no design exists, and what is left to try.
struct Refusal {
    std::string reason;
    std::optional<sink::Rating> closest; ///< of the design that comes nearest
    double shortfall = 0.0;              ///< the hottest part is that much too hot [K]
    std::string part;                    ///< the part that falls short
    double possible_power = 0.0;         ///< total power the closest design could serve [W]
    std::vector<BindingLimit> binding;   ///< worth in kelvin of shortfall per SI unit
};

using Sizing = std::variant<Answer, Refusal>;

struct SearchOptions {
    int threads = 1;
};

/// With one fan after the other where the job leaves the choice, and downstream parts held to what
/// the base map says of them. Parts with a power table are searched for at their `power`, the most
/// the table says up to the junction allowed: exact where a rising table's limit binds, on the safe
/// side elsewhere. An answer is then rated with the powers that settle, a refusal is not.
Sizing size(const job::Job& job, const SearchOptions& options = {});

/// The same for the first fan, every part on air of one temperature.
Sizing size_on_even_air(const job::Job& job, const SearchOptions& options = {});

/// The job with the fan the answer rests on, and no other.
job::Job as_answered(const job::Job& job, const Answer& answer);

/// The search over all fin counts alone, before rounding: the optimum, if there is one.
std::optional<sink::Geometry<double>> search(const job::Job& job,
                                             const SearchOptions& options = {});

/// The value of a job's aim for a rated sink, SI.
double aim_value(job::Aim aim, const sink::Rating& rating);

} // namespace finwright::sizing
