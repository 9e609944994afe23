#include "src/sheets/plain_units.hpp"

#include "src/sheets/numbers_text.hpp"
#include <fmt/format.h>

namespace finwright::sheets {

using job::Aim;
using sizing::BindingLimit;
using sizing::Measure;
using sizing::Sense;

namespace {

/// How a measure is shown: SI times `factor`, and the step by which easing is priced.
struct Shown {
    const char* unit;
    double factor;
    double step;
    int decimals;
};

Shown shown(Measure measure) {
    switch (measure) {
    case Measure::length:
        return {" mm", 1e3, 1e-3, 1};
    case Measure::ratio:
        return {"", 1.0, 1.0, 1};
    case Measure::mass:
        return {" g", 1e3, 10e-3, 0};
    case Measure::pressure:
        return {" Pa", 1.0, 1.0, 1};
    case Measure::velocity:
        return {" m/s", 1.0, 1.0, 1};
    case Measure::rise:
        return {" K", 1.0, 1.0, 1};
    }
    return {"", 1.0, 1.0, 1};
}

/// By how much a limit is eased in the text: the measure's step, or a tenth of it where that is a
/// large part of the limit itself.
double easing(const BindingLimit& limit) {
    const double step = shown(limit.measure).step;
    return step > 0.2 * limit.bound ? 0.1 * step : step;
}

std::string eased_by(const BindingLimit& limit) {
    const Shown s = shown(limit.measure);
    return fmt::format("{}{} {}", significant(easing(limit) * s.factor, 2), s.unit,
                       limit.sense == Sense::at_most ? "more" : "less");
}

std::string aim_change(Aim aim, double value) {
    switch (aim) {
    case Aim::mass:
        return significant(value * 1e3, 2) + " g";
    case Aim::volume:
        return significant(value * 1e6, 2) + " cm³";
    case Aim::height:
        return significant(value * 1e3, 2) + " mm";
    case Aim::footprint:
        return significant(value * 1e4, 2) + " cm²";
    case Aim::resistance:
        return significant(value, 2) + " °C/W";
    case Aim::pressure_drop:
        return significant(value, 2) + " Pa";
    }
    return {};
}

} // namespace

std::string aim_name(Aim aim) {
    switch (aim) {
    case Aim::mass:
        return "mass";
    case Aim::volume:
        return "volume";
    case Aim::height:
        return "overall height";
    case Aim::footprint:
        return "footprint";
    case Aim::resistance:
        return "sink resistance";
    case Aim::pressure_drop:
        return "pressure drop";
    }
    return {};
}

std::string aim_text(Aim aim, double value) {
    switch (aim) {
    case Aim::mass:
        return grams(value) + " g";
    case Aim::volume:
        return significant(value * 1e6, 4) + " cm³";
    case Aim::height:
        return millimetres(value) + " mm";
    case Aim::footprint:
        return significant(value * 1e4, 4) + " cm²";
    case Aim::resistance:
        return significant(value, 3) + " °C/W";
    case Aim::pressure_drop:
        return significant(value, 3) + " Pa";
    }
    return {};
}

std::string bound_text(const BindingLimit& limit) {
    const Shown s = shown(limit.measure);
    return fmt::format("{} {}{} ({})", limit.sense == Sense::at_most ? "at most" : "at least",
                       fixed(limit.bound * s.factor, s.decimals), s.unit, limit.reason);
}

std::string price_text(const BindingLimit& limit, Aim aim) {
    return fmt::format("{} saves {}", eased_by(limit),
                       aim_change(aim, limit.worth * easing(limit)));
}

std::string price_in_kelvin(const BindingLimit& limit) {
    return fmt::format("{} gains {} K", eased_by(limit),
                       significant(limit.worth * easing(limit), 2));
}

} // namespace finwright::sheets
