#include "src/sheets/powers_text.hpp"

#include "src/sheets/numbers_text.hpp"
#include <fmt/format.h>

namespace finwright::sheets {

using sink::Feedback;
using sink::Rating;

namespace {

std::string hottest() {
    return celsius(job::hottest_junction, 0);
}

std::string powers_and_junctions(const job::Job& job, const Rating& rating) {
    std::string list;
    for (std::size_t i = 0; i < job.parts.size(); ++i)
        if (job.parts[i].power_table)
            list += fmt::format("{}{} W ({} at {} °C)", list.empty() ? "" : ", ",
                                significant(rating.parts[i].power, 3), rating.parts[i].name,
                                celsius(rating.parts[i].junction_temperature));
    return list;
}

std::string distance(const Feedback& feedback) {
    if (feedback.air_left)
        return fmt::format("The inlet air may be {} K warmer before they do, the sink's "
                           "resistances taken as they are.",
                           significant(*feedback.air_left, 2));
    return fmt::format("By these tables they stay stable below {} °C, however warm the air.",
                       hottest());
}

std::string getting_away(const Feedback::Runaway& away) {
    if (away.loop_gain >= 1.0)
        return fmt::format("From {} °C at the junction on, {} adds more heat with every kelvin "
                           "than the sink takes up (loop gain {}; below 1 is stable).",
                           celsius(away.junction), away.part, significant(away.loop_gain, 3));
    return fmt::format("{} climbs past {} °C without settling (loop gain {} there).", away.part,
                       celsius(away.junction, 0), significant(away.loop_gain, 3));
}

} // namespace

std::string sizing_powers(const job::Job& job) {
    std::string list;
    for (const job::Part& part : job.parts)
        if (part.power_table)
            list += fmt::format("{}{} {} W", list.empty() ? "" : ", ", part.name,
                                significant(part.power, 3));
    if (list.empty()) return {};
    return "Sized for the most each power table says up to the junction allowed: " + list +
           ". For a rising table that is exact where the part's limit binds, and on the safe side "
           "elsewhere.";
}

std::string settled_powers(const job::Job& job, const Rating& rating) {
    if (!rating.feedback) return {};
    const Feedback& feedback = *rating.feedback;
    if (feedback.runaway)
        return fmt::format(
            "THERMAL RUNAWAY: no powers and junctions agree below {} °C. {} The figures below are "
            "those of the moment in which the climb was left; they are no rating. Fewer watts, "
            "less resistance between junction and air, or cooler air.",
            hottest(), getting_away(*feedback.runaway));
    return fmt::format(
        "Powers by table settle at {}. Loop gain {}: a disturbance is multiplied by {}, "
        "and at 1 the junctions run away. {}",
        powers_and_junctions(job, rating), fixed(feedback.loop_gain, 3),
        fixed(1.0 / (1.0 - feedback.loop_gain), 2), distance(feedback));
}

} // namespace finwright::sheets
