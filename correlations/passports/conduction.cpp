#include "correlations/interface.hpp"
#include "correlations/registry.hpp"
#include "correlations/spreading.hpp"

namespace finwright::correlations {

using In = std::span<const double>;

namespace {

const std::vector<Symbol> disc{{"eps", "-", "pad radius / base radius, equal areas", 0.01, 0.99},
                               {"tau", "-", "base thickness / base radius", 1e-3, 10.0},
                               {"bi", "-", "h times base radius / k", 1e-4, 1e3}};

} // namespace

std::vector<Passport> conduction_passports() {
    return {
        {"spreading_mean",
         "spreading, closed form, pad mean (Lee, Song, Au & Moran)",
         "lee1995",
         "psi = 0.5 (1 - eps)^1.5 Phi, Phi = (tanh(lambda tau) + lambda/Bi)/(1 + (lambda/Bi) "
         "tanh(lambda tau)), lambda = pi + 1/(pi^0.5 eps)",
         {"psi", "-", "pi^0.5 k a times the spreading resistance"},
         disc,
         "the formula is continued",
         "-6 to +2 %",
         true,
         [](In x) { return spreading_mean(x[0], x[1], x[2]); }},
        {"spreading_largest",
         "spreading, closed form, pad centre (Lee, Song, Au & Moran)",
         "lee1995",
         "psi = (1 - eps) Phi/pi^0.5",
         {"psi", "-", "pi^0.5 k a times the spreading resistance"},
         disc,
         "the formula is continued",
         "-2 to +4 %",
         true,
         [](In x) { return spreading_largest(x[0], x[1], x[2]); }},
        {"spreading_series",
         "spreading of a rectangular pad, series (Muzychka, Culham & Yovanovich)",
         "muzychka2003",
         "double Fourier series over the base's modes, one-dimensional part included",
         {"R", "K/W", "pad mean over the far side's air"},
         {{"W", "m", "base across", 1e-3, 2.0},
          {"L", "m", "base along", 1e-3, 2.0},
          {"t", "m", "base thickness", 1e-4, 0.2},
          {"k", "W/(m K)", "conductivity", 1.0, 500.0},
          {"h", "W/(m2 K)", "film per base area, far side", 0.1, 1e6},
          {"x", "m", "pad centre across", 0.0, 2.0},
          {"y", "m", "pad centre along", 0.0, 2.0},
          {"cx", "m", "pad side across", 1e-4, 2.0},
          {"cy", "m", "pad side along", 1e-4, 2.0}},
         "the pad must lie on the base",
         "1e-4 against finite volumes; uniform film, uniform flux",
         true,
         [](In x) {
             const Slab slab{x[0], x[1], x[2], x[3], x[4]};
             return pad_mean_rises(slab, {Pad<double>{x[5], x[6], x[7], x[8]}}, {1.0})[0];
         }},
        {"layer",
         "area resistance of a layer (Fourier)",
         "incropera2007",
         "R\" = t/k + contacts",
         {"R\"", "m2 K/W", "resistance times area"},
         {{"t", "m", "thickness", 0.0, 0.1},
          {"k", "W/(m K)", "conductivity", 0.01, 500.0},
          {"contacts", "m2 K/W", "both contacts", 0.0, 1e-2}},
         "exact",
         "the material's data decide",
         false,
         [](In x) { return layer_area_resistance(x[0], x[1], x[2]); }},
        {"over_area",
         "resistance of an interface over its area (definition)",
         "incropera2007",
         "R = R\"/A; 1 degC in2/W = 6.4516e-4 m2 K/W",
         {"R", "K/W", "resistance"},
         {{"R_area", "m2 K/W", "resistance times area", 0.0, 1.0}, {"A", "m2", "area", 1e-8, 1.0}},
         "exact",
         "none: a definition",
         false,
         [](In x) { return resistance_over_area(x[0], x[1]); }},
        {"rated_junction_to_case",
         "junction to case behind a 25 degC rating (common practice)",
         "none",
         "R = (Tj,max - 298.15)/P",
         {"R", "K/W", "junction to case"},
         {{"Tj", "K", "highest junction temperature", 300.0, 600.0},
          {"P", "W", "rated power at 25 degC case", 0.1, 1e5}},
         "the formula is continued",
         "as good as the data sheet",
         false,
         [](In x) { return rated_junction_to_case(x[0], x[1]); }},
    };
}

} // namespace finwright::correlations
