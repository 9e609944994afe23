#include "correlations/radiation.hpp"
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
         "3 % for eps >= 0.8, 6 to 14 % high for bare deep channels",
         false,
         [](In x) { return channel_radiation_conductance(x[0], x[1], x[2]); }},
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
