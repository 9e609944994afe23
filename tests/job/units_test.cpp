// Factors against NIST SP 811 (2008), Guide for the Use of the SI, appendix B.8, printed with seven
// digits; definitions marked exact there are checked to 1e-15.

#include "src/job/units.hpp"
#include "tests/near.hpp"
#include <cmath>
#include <string>

using namespace finwright::job;
using finwright::tests::near;

namespace {

constexpr double printed = 5e-7; // half a unit in the seventh digit, at most
constexpr double exact = 1e-15;

/// What read_quantity says when it refuses: reason and suggestion in one line.
std::string refusal(const char* text, const QuantityKind& kind) {
    try {
        read_quantity(text, kind);
    } catch (const UnitError& error) {
        return std::string(error.what()) + " / " + error.suggestion;
    }
    return "accepted";
}

} // namespace

TEST_CASE("lengths, NIST SP 811") {
    CHECK(read_quantity("1 in", quantity::length) == near(0.0254, exact));
    CHECK(read_quantity("1 inch", quantity::length) == near(0.0254, exact));
    CHECK(read_quantity("1 mil", quantity::length) == near(2.54e-5, exact));
    CHECK(read_quantity("1 ft", quantity::length) == near(0.3048, exact));
    CHECK(read_quantity("2.1 km", quantity::length) == near(2100.0, exact));
    CHECK(read_quantity("25 um", quantity::length) == near(25e-6, exact));
    CHECK(read_quantity("25 µm", quantity::length) == near(25e-6, exact));
    CHECK(read_quantity("25 μm", quantity::length) == near(25e-6, exact));
    CHECK(read_quantity("12.7mm", quantity::length) == near(0.0127, exact));
    CHECK(read_quantity("  +1.5e1 cm ", quantity::length) == near(0.15, exact));
}

TEST_CASE("masses, NIST SP 811") {
    CHECK(read_quantity("1 lb", quantity::mass) == near(0.45359237, exact));
    CHECK(read_quantity("1 oz", quantity::mass) == near(2.834952e-2, printed));
    CHECK(read_quantity("350 g", quantity::mass) == near(0.35, exact));
}

TEST_CASE("pressures, NIST SP 811") {
    CHECK(read_quantity("1 inH2O", quantity::pressure) == near(2.490889e2, printed));
    CHECK(read_quantity("1 inHg", quantity::pressure) == near(3.386389e3, printed));
    CHECK(read_quantity("1 mmH2O", quantity::pressure) == near(9.80665, exact));
    CHECK(read_quantity("1 psi", quantity::pressure) == near(6.894757e3, printed));
    CHECK(read_quantity("1 mbar", quantity::pressure) == near(100.0, exact));
    CHECK(read_quantity("1 hPa", quantity::pressure) == near(100.0, exact));
    CHECK(read_quantity("1 kPa", quantity::pressure) == near(1000.0, exact));
    CHECK(read_quantity("1 bar", quantity::pressure) == near(1e5, exact));
    CHECK(read_quantity("1 N/m2", quantity::pressure) == near(1.0, exact));
    CHECK(read_quantity("1 in", quantity::length) * 1000.0 * 9.80665 ==
          near(read_quantity("1 inH2O", quantity::pressure), printed));
}

TEST_CASE("air speeds and flows, NIST SP 811") {
    CHECK(read_quantity("1 ft/min", quantity::velocity) == near(5.08e-3, exact));
    CHECK(read_quantity("1 lfm", quantity::velocity) == near(5.08e-3, exact));
    CHECK(read_quantity("36 km/h", quantity::velocity) == near(10.0, 1e-14));
    CHECK(read_quantity("1 cfm", quantity::volume_flow) == near(4.719474e-4, printed));
    CHECK(read_quantity("1 ft3/min", quantity::volume_flow) == near(4.719474e-4, printed));
    CHECK(read_quantity("40 m3/h", quantity::volume_flow) == near(40.0 / 3600.0, exact));
    CHECK(read_quantity("1 L/s", quantity::volume_flow) == near(1e-3, exact));
    CHECK(read_quantity("60 L/min", quantity::volume_flow) == near(1e-3, exact));
}

TEST_CASE("temperature levels: ISO 80000-5 and NIST SP 811 B.8") {
    CHECK(read_quantity("25 degC", quantity::temperature) == near(298.15, exact));
    CHECK(read_quantity("25 °C", quantity::temperature) == near(298.15, exact));
    CHECK(read_quantity("70 degF", quantity::temperature) == near((70.0 + 459.67) / 1.8, 1e-14));
    CHECK(read_quantity("32 degF", quantity::temperature) == near(273.15, 1e-14));
    CHECK(read_quantity("-40 degF", quantity::temperature) ==
          near(read_quantity("-40 degC", quantity::temperature), 1e-14));
    CHECK(read_quantity("300 K", quantity::temperature) == near(300.0, exact));
}

TEST_CASE("temperature differences carry no zero point") {
    CHECK(read_quantity("25 K", quantity::difference) == near(25.0, exact));
    CHECK(read_quantity("25 degC", quantity::difference) == near(25.0, exact));
    CHECK(read_quantity("45 degF", quantity::difference) == near(25.0, 1e-14));
}

TEST_CASE("compound units") {
    CHECK(read_quantity("0.6 K/W", quantity::resistance) == near(0.6, exact));
    CHECK(read_quantity("0.6 degC/W", quantity::resistance) == near(0.6, exact));
    CHECK(read_quantity("1.8 degF/W", quantity::resistance) == near(1.0, 1e-14));
    CHECK(read_quantity("600 K/kW", quantity::resistance) == near(0.6, exact));
    CHECK(read_quantity("237 W/(m K)", quantity::conductivity) == near(237.0, exact));
    CHECK(read_quantity("237 W/m/K", quantity::conductivity) == near(237.0, exact));
    CHECK(read_quantity("237 W m-1 K-1", quantity::conductivity) == near(237.0, exact));
    CHECK(read_quantity("237 W m^-1 K^-1", quantity::conductivity) == near(237.0, exact));
    CHECK(read_quantity("237 W/(m*K)", quantity::conductivity) == near(237.0, exact));
    CHECK(read_quantity("237 W/(m·K)", quantity::conductivity) == near(237.0, exact));
    CHECK(read_quantity("2.7 g/cm3", quantity::density) == near(2700.0, 1e-14));
    CHECK(read_quantity("2700 kg/m³", quantity::density) == near(2700.0, exact));
    CHECK(read_quantity("900 J/(kg K)", quantity::specific_heat) == near(900.0, exact));
    CHECK(read_quantity("0.9 kJ/(kg K)", quantity::specific_heat) == near(900.0, exact));
}

TEST_CASE("area resistance: 1 degC in2/W = 6.4516 K cm2/W, from the exact inch of NIST SP 811") {
    const double one = read_quantity("1 degC in2/W", quantity::area_resistance);
    CHECK(one == near(6.4516e-4, 1e-14));
    CHECK(one == near(read_quantity("6.4516 K cm2/W", quantity::area_resistance), 1e-14));
    CHECK(one == near(read_quantity("6.4516 cm2 K/W", quantity::area_resistance), 1e-14));
    CHECK(one == near(read_quantity("1 in2 degC/W", quantity::area_resistance), 1e-14));
    CHECK(one == near(read_quantity("6.4516 cm²·K/W", quantity::area_resistance), 1e-14));
    CHECK(read_quantity("1.13 degC in2/W", quantity::area_resistance) ==
          near(1.13 * 6.4516e-4, 1e-14));
}

TEST_CASE("angles, shares and pure numbers") {
    CHECK(read_quantity("180 deg", quantity::angle) == near(std::acos(-1.0), exact));
    CHECK(read_quantity("0.5 rad", quantity::angle) == near(0.5, exact));
    CHECK(read_quantity("35 %", quantity::pure) == near(0.35, exact));
    CHECK(read_quantity("0.85", quantity::pure) == near(0.85, exact));
    CHECK(is_share("35 %"));
    CHECK_FALSE(is_share("35 mm"));
}

TEST_CASE("every unit of the table is read back as itself") {
    for (const std::string& name : unit_names()) {
        CAPTURE(name);
        const std::string refused = refusal(("1 " + name).c_str(), quantity::density);
        CHECK(refused.find("not known") == std::string::npos);
        CHECK(refused.find("expected a density") != std::string::npos);
    }
}

TEST_CASE("a wrong dimension says what was read and what was expected") {
    CHECK(refusal("3 m/s", quantity::length) ==
          "3 m/s is a velocity; expected a length / write a length such as 40 mm");
    CHECK(refusal("18 W", quantity::resistance) ==
          "18 W is a power; expected a thermal resistance / write a thermal resistance such as "
          "0.8 K/W");
    CHECK(refusal("0.6 K/W", quantity::area_resistance).find("is a thermal resistance;") !=
          std::string::npos);
    CHECK(refusal("3 m K", quantity::temperature).find("expected a temperature") !=
          std::string::npos);
}

TEST_CASE("a missing unit is never guessed") {
    CHECK(refusal("18", quantity::power) ==
          "18 has no unit / write a power with its unit, for example 18 W");
    CHECK(refusal("0", quantity::length).find("has no unit") != std::string::npos);
}

TEST_CASE("mistyped units") {
    CHECK(refusal("3 MM", quantity::length) == "the unit 'MM' is not known / did you mean mm?");
    CHECK(refusal("3 inH20", quantity::pressure).find("did you mean inH2O?") != std::string::npos);
    CHECK(refusal("25 C", quantity::temperature) ==
          "the unit 'C' is not known / write degC for degrees");
    CHECK(refusal("70 F", quantity::temperature).find("write degF") != std::string::npos);
    CHECK(refusal("3 furlong", quantity::length).find("known units:") != std::string::npos);
}

TEST_CASE("a unit that can be read in two ways is refused") {
    CHECK(refusal("237 W/m K", quantity::conductivity) ==
          "'W/m K' can be read in two ways / bracket what stands below the line, for example "
          "W/(m K)");
    CHECK(refusal("237 W/m*K", quantity::conductivity).find("two ways") != std::string::npos);
    // W/mK: per millikelvin to some readers, per metre kelvin to others.
    CHECK(refusal("237 W/mK", quantity::conductivity).find("write for example W/(m K)") !=
          std::string::npos);
}

TEST_CASE("numbers: one, finite, with a point") {
    for (const char* text :
         {"1,5 mm", "1 500 mm", "nan mm", "inf mm",   "1e999 mm", "mm",         "",
          "--3 mm", "0x10 mm",  ".inf",   "1_000 mm", "ten mm",   "3 mm mm2 (", "3 m2)",
          "3 /",    "3 m0",     "3 m10",  "3 m^",     "3 ()",     "3 mm/"}) {
        CAPTURE(text);
        CHECK(refusal(text, quantity::length) != "accepted");
    }
}

TEST_CASE("a level is a plain temperature above absolute zero") {
    CHECK(refusal("-300 degC", quantity::temperature).find("below absolute zero") !=
          std::string::npos);
    // A compound would lose the zero point without a word.
    CHECK(refusal("300 degC m/m", quantity::temperature).find("plain temperature") !=
          std::string::npos);
}

TEST_CASE("huge exponents and nests end in a refusal") {
    std::string chain = "1 ";
    for (int i = 0; i < 30; ++i)
        chain += "m ";
    CHECK(refusal(chain.c_str(), quantity::length).find("exponents") != std::string::npos);
    CHECK(refusal("1 ((((m9)9)9)9)9", quantity::length).find("exponents") != std::string::npos);
    CHECK(refusal("1 (((((((((((m)))))))))))", quantity::length).find("brackets") !=
          std::string::npos);
    CHECK(refusal((chain + chain).c_str(), quantity::length).find("longer") != std::string::npos);
}
