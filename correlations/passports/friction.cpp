#include "correlations/friction.hpp"
#include "correlations/registry.hpp"

namespace finwright::correlations {

using In = std::span<const double>;

namespace {

const Symbol aspect{"aspect", "-", "short side / long side", 0.0, 1.0};
const Symbol sigma{"sigma", "-", "free area / frontal area", 0.0, 1.0};
const Symbol x_plus{"x_plus", "-", "L/(Dh Re)", 1e-4, 10.0};
const Quantity f_re{"f Re", "-", "Fanning friction factor times Re, on Dh"};
const Quantity head_loss{"K", "-", "pressure lost over rho V^2/2 in the channel"};

} // namespace

std::vector<Passport> friction_passports() {
    return {
        {"fre_rectangular",
         "rectangular duct, developed laminar friction (Shah & London)",
         "shah1978",
         "f Re = 24(1 - 1.3553a + 1.9467a^2 - 1.7012a^3 + 0.9564a^4 - 0.2537a^5)",
         f_re,
         {aspect},
         "the formula is continued",
         "0.05 %",
         false,
         [](In x) { return fre_rectangular(x[0]); }},
        {"fapp_plates",
         "parallel plates, developing, apparent friction (Shah & London)",
         "shah1978",
         "f Re = 3.44/x+^0.5 + (24 + 0.674/(4x+) - 3.44/x+^0.5)/(1 + 2.9e-5 x+^-2)",
         f_re,
         {x_plus},
         "the formula is continued",
         "2 %",
         true,
         [](In x) { return fapp_re_plates(x[0]); }},
        {"fapp_duct",
         "any duct, developing, apparent friction (Muzychka & Yovanovich)",
         "muzychka2009",
         "f Re = ((3.44/x+^0.5)^2 + (fRe)^2)^0.5",
         f_re,
         {x_plus, {"fre", "-", "developed value on the same length", 10.0, 24.0}},
         "the formula is continued",
         "+1 to +6 %",
         false,
         [](In x) { return fapp_re_duct(x[0], x[1]); }},
        {"petukhov",
         "smooth tube, turbulent, Darcy friction factor (Petukhov)",
         "petukhov1970",
         "f = (0.79 ln Re - 1.64)^-2",
         {"f", "-", "Darcy friction factor"},
         {{"re", "-", "on the hydraulic diameter", 3e3, 5e6}},
         "not used below Re 4000",
         "2 %",
         false,
         [](In x) { return petukhov_darcy(x[0]); }},
        {"fapp_all_regimes",
         "rectangular duct, apparent friction in any regime (Muzychka & Yovanovich, Petukhov)",
         "muzychka2009",
         "laminar up to Re 2300, turbulent from 4000, linear in Re between",
         {"f", "-", "apparent Fanning friction factor"},
         {{"re", "-", "on the hydraulic diameter", 1.0, 1e6},
          aspect,
          {"l_dh", "-", "length / hydraulic diameter", 1.0, 1e4}},
         "the formula is continued",
         "+1 to +6 % laminar; more between Re 2300 and 4000",
         false,
         [](In x) { return fapp_all_regimes(x[0], x[1], x[2]); }},
        {"contraction",
         "jet contraction at a sharp entry (Kays & London)",
         "kays1984",
         "monotone cubic through .611 .612 .616 .622 .631 .644 .662 .687 .722 .781 1",
         {"Cc", "-", "jet area / free area"},
         {sigma},
         "held at the end values",
         "2 %",
         true,
         [](In x) { return contraction_coefficient(x[0]); }},
        {"entry_loss",
         "sharp entry, to go with apparent friction (Kays)",
         "kays1950",
         "Kc = (1/Cc - 1)^2",
         head_loss,
         {sigma},
         "held at the end values",
         "10 % of itself",
         true,
         [](In x) { return entry_loss(x[0]); }},
        {"entry_loss_developed",
         "sharp entry, to go with developed friction (Kays)",
         "kays1950",
         "Kc = 1/Cc^2 - 2/Cc + 2 Kd - 1",
         head_loss,
         {sigma, {"kd", "-", "momentum factor of the developed profile", 1.0, 1.4}},
         "held at the end values",
         "10 % of itself",
         true,
         [](In x) { return entry_loss_developed(x[0], x[1]); }},
        {"exit_loss",
         "sudden exit (Kays)",
         "kays1950",
         "Ke = 1 - 2 Kd sigma + sigma^2",
         head_loss,
         {sigma, {"kd", "-", "momentum factor of the profile at the exit", 1.0, 1.4}},
         "the formula is continued",
         "10 % of itself",
         false,
         [](In x) { return exit_loss(x[0], x[1]); }},
    };
}

} // namespace finwright::correlations
