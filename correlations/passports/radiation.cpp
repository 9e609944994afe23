#include "correlations/radiation.hpp"
#include "correlations/channel_radiation.hpp"
#include "correlations/registry.hpp"

namespace finwright::correlations {

using In = std::span<const double>;

namespace {

Symbol side(const char* symbol, const char* meaning) {
    return {symbol, "m", meaning, 1e-4, 10.0};
}
const Symbol emissivity{"eps", "-", "total hemispherical emissivity", 0.01, 1.0};
const Quantity factor{"F", "-", "view factor"};

} // namespace

std::vector<Passport> radiation_passports() {
    return {
        {"view_aligned",
         "view factor, aligned parallel rectangles (Howell C-11)",
         "howell",
         "closed form in X = a/c, Y = b/c",
         factor,
         {side("a", "side"), side("b", "side"), side("c", "distance")},
         "exact",
         "exact",
         false,
         [](In x) { return aligned_rectangles(x[0], x[1], x[2]); }},
        {"view_perpendicular",
         "view factor, perpendicular rectangles, common edge (Howell C-14)",
         "howell",
         "closed form in H = z/x, W = y/x",
         factor,
         {side("z", "depth of the face seen"), side("y", "depth of the seeing face"),
          side("x", "common edge")},
         "exact",
         "exact",
         false,
         [](In x) { return perpendicular_rectangles(x[0], x[1], x[2]); }},
        {"channel_opening",
         "what a channel sees through front and ends (exact view factors)",
         "howell",
         "A F = S L (1 - 4 F_front,end) + 2 S H (1 - F_end,end)",
         {"A F", "m2", "view of the surroundings"},
         {{"S", "m", "gap", 1e-3, 0.1},
          {"H", "m", "fin height", 2e-3, 0.3},
          {"L", "m", "length", 1e-2, 2.0}},
         "exact for one zone",
         "one zone: 3 % for eps >= 0.8, 6 to 14 % high for bare deep channels",
         false,
         [](In x) { return channel_opening(x[0], x[1], x[2]); }},
        {"channel_radiation",
         "grey one-zone channel (network of two surfaces)",
         "incropera2007",
         "G = 1/[(1 - eps)/(eps A) + 1/(A F)]",
         {"G", "m2", "heat over sigma (Ts^4 - Te^4)"},
         {emissivity,
          {"A", "m2", "wetted area", 1e-6, 10.0},
          {"A_F", "m2", "channel_opening", 1e-6, 10.0}},
         "the formula is continued",
         "high where walls are bare and deep: in usual channels 3 % at eps 0.8, 6 to 14 % at 0.1; "
         "70 % at H/S 25, eps 0.03",
         false,
         [](In x) { return channel_radiation_conductance(x[0], x[1], x[2]); }},
        {"channel_radiation_zoned",
         "grey channel, walls dimmer near the openings (this project's fit)",
         "finwright2026radiation",
         "G = 1/[(1 - eps)/(eps A) + (1 + (1 - eps) Y)/(A F)], Y = v ((eps + m)/(1 + m))^-0.6246, "
         "v = (1 - pi/4)/(1 + x), m = 0.4369 x, x = (7.5091/w)^1.3811, "
         "w = (A/(A F) - 1)(1 + 4.0601 t (1 - t)), t = 2 H/(L + 2 H), A = (2 H + S) L, A F of "
         "channel_opening",
         {"G", "m2", "heat over sigma (Ts^4 - Te^4)"},
         {{"eps", "-", "total hemispherical emissivity", 0.03, 1.0},
          {"S", "m", "gap; H/S 0.2 to 25", 1e-3, 0.1},
          {"H", "m", "fin height; L/H 0.5 to 40", 2e-3, 0.3},
          {"L", "m", "length", 1e-2, 2.0}},
         "the formula is continued: its limits are black walls, one zone when shallow, an endless "
         "slot",
         "fitted in this project to 960 zoned solutions: median 0.1 %, nine of ten 0.6 %, worst "
         "1.5 "
         "%; depths left out of the fit: worst 1.6 % (docs/validation.md)",
         false,
         [](In x) { return channel_radiation_zoned(x[0], x[1], x[2], x[3]); }},
        {"radiated",
         "flux between black surfaces (Stefan-Boltzmann)",
         "incropera2007",
         "q = sigma (Ts^4 - Te^4)",
         {"q", "W/m2", "flux"},
         {{"Ts", "K", "surface", 0.0, 3000.0}, {"Te", "K", "surroundings", 0.0, 3000.0}},
         "exact",
         "exact",
         false,
         [](In x) { return radiated(x[0], x[1]); }},
        {"radiation_coefficient",
         "radiation as a film coefficient (Stefan-Boltzmann)",
         "incropera2007",
         "h = eps sigma (Ts + Te)(Ts^2 + Te^2)",
         {"h", "W/(m2 K)", "film coefficient of radiation"},
         {emissivity,
          {"Ts", "K", "surface", 1.0, 3000.0},
          {"Te", "K", "surroundings", 1.0, 3000.0}},
         "exact",
         "exact; the emissivity is the user's",
         false,
         [](In x) { return radiation_coefficient(x[0], x[1], x[2]); }},
    };
}

} // namespace finwright::correlations
