#include "src/job/units.hpp"

#include "src/job/nearest_word.hpp"
#include <charconv>
#include <cmath>
#include <fmt/format.h>
#include <numbers>
#include <optional>

namespace finwright::job {

namespace {

struct Unit {
    std::string_view name;
    Exponents exponents;
    double factor;
    double offset = 0.0; ///< SI level of the unit's zero
};

constexpr double inch = 0.0254;           // exact, NIST SP 811 (2008) app. B
constexpr double foot = 0.3048;           // exact, NIST SP 811
constexpr double pound = 0.45359237;      // exact, NIST SP 811
constexpr double gravity = 9.80665;       // exact, ISO 80000-3
constexpr double inch_water = 249.08891;  // conventional, NIST SP 811 (1000 kg/m3 x g x 25.4 mm)
constexpr double inch_mercury = 3386.389; // conventional, NIST SP 811
constexpr double degree = std::numbers::pi / 180.0;
constexpr double rankine = 5.0 / 9.0; // exact, NIST SP 811
constexpr double ice_point = 273.15;  // exact, ISO 80000-5
constexpr double fahrenheit_zero = 459.67 * rankine;

constexpr Exponents L{1, 0, 0, 0, 0}, M{0, 1, 0, 0, 0}, T{0, 0, 1, 0, 0}, K{0, 0, 0, 1, 0},
    A{0, 0, 0, 0, 1}, W{2, 1, -3, 0, 0}, P{-1, 1, -2, 0, 0}, J{2, 1, -2, 0, 0}, V{3, 0, 0, 0, 0},
    F{3, 0, -1, 0, 0}, N{1, 1, -2, 0, 0}, U{1, 0, -1, 0, 0}, none{};

const std::vector<Unit>& table() {
    static const std::vector<Unit> units{
        {"m", L, 1.0},
        {"mm", L, 1e-3},
        {"cm", L, 1e-2},
        {"dm", L, 0.1},
        {"km", L, 1e3},
        {"um", L, 1e-6},
        {"µm", L, 1e-6}, // micro sign U+00B5
        {"μm", L, 1e-6}, // Greek mu U+03BC
        {"in", L, inch},
        {"inch", L, inch},
        {"mil", L, 1e-3 * inch},
        {"ft", L, foot},
        {"kg", M, 1.0},
        {"g", M, 1e-3},
        {"mg", M, 1e-6},
        {"lb", M, pound},
        {"oz", M, pound / 16.0},
        {"s", T, 1.0},
        {"min", T, 60.0},
        {"h", T, 3600.0},
        {"K", K, 1.0},
        {"degC", K, 1.0, ice_point},
        {"°C", K, 1.0, ice_point},
        {"degF", K, rankine, fahrenheit_zero},
        {"°F", K, rankine, fahrenheit_zero},
        {"W", W, 1.0},
        {"mW", W, 1e-3},
        {"kW", W, 1e3},
        {"J", J, 1.0},
        {"kJ", J, 1e3},
        {"N", N, 1.0},
        {"Pa", P, 1.0},
        {"hPa", P, 1e2},
        {"kPa", P, 1e3},
        {"mbar", P, 1e2},
        {"bar", P, 1e5},
        {"psi", P, pound * gravity / (inch * inch)},
        {"mmH2O", P, gravity},
        {"inH2O", P, inch_water},
        {"inHg", P, inch_mercury},
        {"L", V, 1e-3},
        {"l", V, 1e-3},
        {"cfm", F, foot * foot * foot / 60.0},
        {"lfm", U, foot / 60.0},
        {"deg", A, degree},
        {"rad", A, 1.0},
        {"%", none, 0.01},
    };
    return units;
}

const Unit* find(std::string_view name) {
    for (const Unit& unit : table())
        if (unit.name == name) return &unit;
    return nullptr;
}

/// A unit expression worked out: factor, exponents, and the one unit it consists of, if it is just
/// that.
struct Reading {
    double factor = 1.0;
    Exponents exponents{};
    const Unit* alone = nullptr;
};

constexpr std::size_t longest_text = 80;
constexpr int largest_exponent = 12;

void refuse_large(const Exponents& exponents) {
    for (const int e : exponents)
        if (std::abs(e) > largest_exponent)
            throw UnitError("the exponents of the unit add up to more than any quantity has",
                            "units look like mm, K/W, W/(m K), m3/h");
}

Reading power_of(const Reading& r, int exponent) {
    Reading out{std::pow(r.factor, exponent), r.exponents, exponent == 1 ? r.alone : nullptr};
    for (int& e : out.exponents)
        e *= exponent;
    refuse_large(out.exponents);
    return out;
}

Reading product(const Reading& a, const Reading& b) {
    Reading out{a.factor * b.factor, a.exponents, nullptr};
    for (std::size_t i = 0; i < out.exponents.size(); ++i)
        out.exponents[i] += b.exponents[i];
    refuse_large(out.exponents);
    return out;
}

bool is_name_char(char c) {
    return std::isalpha(static_cast<unsigned char>(c)) != 0 || c == '%' || (c & 0x80) != 0;
}
bool is_digit(char c) {
    return c >= '0' && c <= '9';
}

/// product  = quotient of factors joined by a space, '*', '·' or '/';  factor = name [exponent] |
/// '(' product ')'
class UnitParser {
public:
    explicit UnitParser(std::string_view text) : text_(text) {}

    Reading whole() {
        Reading r = expression();
        skip_spaces();
        if (at_ < text_.size())
            throw UnitError(fmt::format("'{}' is no unit", text_),
                            "units look like mm, K/W, W/(m K), m3/h");
        return r;
    }

private:
    void skip_spaces() {
        while (at_ < text_.size() && text_[at_] == ' ')
            ++at_;
    }
    bool take(std::string_view what) {
        if (text_.substr(at_, what.size()) != what) return false;
        at_ += what.size();
        return true;
    }

    Reading expression() {
        if (++depth_ > 8)
            throw UnitError("too many brackets in a unit", "write for example W/(m K)");
        Reading r = factor();
        bool divided = false;
        for (;;) {
            skip_spaces();
            if (at_ >= text_.size() || text_[at_] == ')') break;
            if (take("/")) {
                r = product(r, power_of(factor(), -1));
                divided = true;
                continue;
            }
            if (!take("*")) take("·");
            if (divided)
                throw UnitError(fmt::format("'{}' can be read in two ways", text_),
                                "bracket what stands below the line, for example W/(m K)");
            r = product(r, factor());
        }
        --depth_;
        return r;
    }

    Reading factor() {
        skip_spaces();
        if (take("(")) {
            Reading r = expression();
            skip_spaces();
            if (!take(")"))
                throw UnitError(fmt::format("'{}' lacks a closing bracket", text_),
                                "write for example W/(m K)");
            return power_of(r, exponent());
        }
        return named();
    }

    Reading named() {
        std::size_t end = at_;
        while (end < text_.size() && (is_name_char(text_[end]) || is_digit(text_[end])) &&
               !at_symbol(end))
            ++end;
        const std::string_view word = text_.substr(at_, end - at_);
        if (word.empty())
            throw UnitError(fmt::format("'{}' is no unit", text_),
                            "units look like mm, K/W, W/(m K), m3/h");
        if (const Unit* unit = find(word)) {
            at_ = end;
            return power_of({unit->factor, unit->exponents, unit}, exponent());
        }
        const std::size_t letters = std::min(word.find_first_of("0123456789"), word.size());
        const Unit* unit = find(word.substr(0, letters));
        if (!unit || letters + 1 != word.size()) throw unknown(word);
        at_ += letters;
        return power_of({unit->factor, unit->exponents, unit}, exponent());
    }

    /// Whether one of · ² ³ stands there, which end a name though no ASCII does.
    bool at_symbol(std::size_t at) const {
        const std::string_view two = text_.substr(at, 2);
        return two == "·" || two == "²" || two == "³";
    }

    /// 2, ^2, -1, ^-1, ², ³; 1 when nothing is there.
    int exponent() {
        if (take("²")) return 2;
        if (take("³")) return 3;
        const bool caret = take("^");
        const bool minus = take("-");
        if (at_ < text_.size() && is_digit(text_[at_])) {
            const int digit = text_[at_++] - '0';
            if (digit == 0 || (at_ < text_.size() && is_digit(text_[at_])))
                throw UnitError(fmt::format("'{}' has an odd exponent", text_),
                                "write for example m2 or in2");
            return minus ? -digit : digit;
        }
        if (caret || minus)
            throw UnitError(fmt::format("'{}' lacks an exponent", text_), "write for example m2");
        return 1;
    }

    static UnitError unknown(std::string_view word) {
        if (word == "C" || word == "F")
            return {fmt::format("the unit '{}' is not known", word),
                    fmt::format("write deg{} for degrees", word)};
        if (word == "mK")
            return {"'mK' can be read as metre kelvin or as millikelvin",
                    "write for example W/(m K)"};
        const std::string meant = nearest_word(word, unit_names());
        return {
            fmt::format("the unit '{}' is not known", word),
            meant.empty()
                ? "known units: mm, in, K/W, degC, W, m/s, ft/min, m3/h, cfm, Pa, inH2O, g, lb ..."
                : fmt::format("did you mean {}?", meant)};
    }

    std::string_view text_;
    std::size_t at_ = 0;
    int depth_ = 0;
};

std::string_view trimmed(std::string_view text) {
    while (!text.empty() && text.front() == ' ')
        text.remove_prefix(1);
    while (!text.empty() && text.back() == ' ')
        text.remove_suffix(1);
    return text;
}

struct Split {
    double number;
    std::string_view unit;
};

Split split(std::string_view text, const QuantityKind& kind) {
    const std::string_view whole = trimmed(text);
    if (whole.size() > longest_text)
        throw UnitError("the value is far longer than a number with a unit",
                        fmt::format("write for example {}", kind.example));
    std::string_view rest = whole;
    if (rest.starts_with('+')) rest.remove_prefix(1);
    double number = 0.0;
    const auto [end, error] = std::from_chars(rest.data(), rest.data() + rest.size(), number);
    const std::string example = fmt::format("write for example {}", kind.example);
    if (error == std::errc::result_out_of_range)
        throw UnitError(fmt::format("'{}' is out of any range", whole), example);
    if (error != std::errc{})
        throw UnitError(fmt::format("'{}' is not a number with a unit", whole), example);
    if (!std::isfinite(number)) throw UnitError(fmt::format("'{}' is not finite", whole), example);
    const std::string_view unit = trimmed(rest.substr(std::size_t(end - rest.data())));
    if (!unit.empty() && (is_digit(unit.front()) || unit.front() == ',' || unit.front() == '.'))
        throw UnitError(
            fmt::format("'{}' holds more than one number", whole),
            fmt::format("write it without separators and with a decimal point, such as {}",
                        kind.example));
    return {number, unit};
}

/// The kind whose dimension was read, for the message.
std::string kind_read(const Reading& r) {
    for (const QuantityKind* kind :
         {&quantity::length, &quantity::difference, &quantity::power, &quantity::resistance,
          &quantity::area_resistance, &quantity::conductivity, &quantity::velocity,
          &quantity::volume_flow, &quantity::pressure, &quantity::mass, &quantity::density,
          &quantity::specific_heat, &quantity::conductance, &quantity::irradiance, &quantity::angle,
          &quantity::pure})
        if (kind->exponents == r.exponents) return std::string(kind->name);
    return "no quantity used here";
}

} // namespace

bool is_share(std::string_view text) {
    return trimmed(text).ends_with('%');
}

std::vector<std::string> unit_names() {
    std::vector<std::string> names;
    for (const Unit& unit : table())
        names.emplace_back(unit.name);
    return names;
}

double read_quantity(std::string_view text, const QuantityKind& kind) {
    const Split parts = split(text, kind);
    if (parts.unit.empty()) {
        if (kind.exponents == Exponents{}) return parts.number;
        throw UnitError(
            fmt::format("{} has no unit", trimmed(text)),
            fmt::format("write {} with its unit, for example {}", kind.name, kind.example));
    }
    const Reading unit = UnitParser(parts.unit).whole();
    if (unit.exponents != kind.exponents)
        throw UnitError(
            fmt::format("{} is {}; expected {}", trimmed(text), kind_read(unit), kind.name),
            fmt::format("write {} such as {}", kind.name, kind.example));
    if (kind.level && unit.alone == nullptr)
        throw UnitError(fmt::format("{} is not a plain temperature", trimmed(text)),
                        "write it in degC, degF or K alone, for example " +
                            std::string(kind.example));
    const double value = parts.number * unit.factor + (kind.level ? unit.alone->offset : 0.0);
    if (kind.level && value <= 0.0)
        throw UnitError(fmt::format("{} is below absolute zero", trimmed(text)),
                        "check the sign and the unit: degC, degF or K");
    if (!std::isfinite(value))
        throw UnitError(fmt::format("'{}' is out of any range", trimmed(text)),
                        fmt::format("write for example {}", kind.example));
    return value;
}

} // namespace finwright::job
