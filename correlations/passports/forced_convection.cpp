#include "correlations/forced_channel.hpp"
#include "correlations/registry.hpp"

namespace finwright::correlations {

using In = std::span<const double>;

namespace {

const Symbol prandtl{"pr", "-", "Prandtl number", 0.5, 100.0};
const Symbol aspect{"aspect", "-", "short side / long side", 0.01, 1.0};
const Symbol length_ratio{"l_dh", "-", "length / hydraulic diameter", 1.0, 1e4};
const Quantity nusselt_dh{"Nu", "-", "h Dh/k, log-mean difference"};

Symbol reynolds(double lowest, double highest) {
    return {"re", "-", "on the hydraulic diameter", lowest, highest};
}

} // namespace

std::vector<Passport> forced_convection_passports() {
    return {
        {"inlet_plates",
         "plates, developing, on inlet air (Teertstra, Yovanovich & Culham)",
         "teertstra2000",
         "Nu = {(Re* Pr/2)^-3 + [0.664 Re*^0.5 Pr^(1/3) (1 + 3.65/Re*^0.5)^0.5]^-3}^(-1/3)",
         {"Nu", "-", "h S/k on inlet air"},
         {{"re_star", "-", "(V S/nu)(S/L)", 0.26, 175.0}, prandtl},
         "the formula is continued",
         "4 % on plates; 2 to 11 % high on all wetted area of a three-sided channel",
         true,
         [](In x) { return nusselt_inlet_plates(x[0], x[1]); }},
        {"developing_gap",
         "parallel gap, developing (VDI Heat Atlas)",
         "vdi2010",
         "Nu = (7.541^3 + (1.841 G^(1/3))^3 + ((2/(1 + 22 Pr))^(1/6) G^0.5)^3)^(1/3)",
         {"Nu", "-", "h 2S/k, log-mean difference"},
         {{"graetz", "-", "Re Pr Dh/L, Dh = 2 S", 0.1, 1e4}, prandtl},
         "the formula is continued",
         "+2 to +5 % against numerical solutions",
         false,
         [](In x) { return nusselt_developing_gap(x[0], x[1]); }},
        {"duct_developed",
         "rectangular duct, developed, uniform wall temperature (Shah & London)",
         "shah1978",
         "Nu = 7.541(1 - 2.610a + 4.970a^2 - 5.119a^3 + 2.702a^4 - 0.548a^5)",
         nusselt_dh,
         {aspect},
         "the formula is continued",
         "0.1 %",
         false,
         [](In x) { return duct_nusselt_developed(x[0]); }},
        {"duct_developed_flux",
         "rectangular duct, developed, uniform flux H1 (Shah & London)",
         "shah1978",
         "Nu = 8.235(1 - 2.0421a + 3.0853a^2 - 2.4765a^3 + 1.0578a^4 - 0.1861a^5)",
         nusselt_dh,
         {aspect},
         "the formula is continued",
         "0.03 %",
         false,
         [](In x) { return duct_nusselt_developed_flux(x[0]); }},
        {"duct_developing",
         "rectangular duct, both profiles developing (Muzychka & Yovanovich)",
         "muzychka2004",
         "Nu on sqrt(A) = {[2 f(Pr)/z^0.5]^m + [(0.6135 (fRe/z)^(1/3))^5 + (3.24 fRe/(8 pi^0.5 "
         "e^0.1))^5]^(m/5)}^(1/m), turned to Dh",
         nusselt_dh,
         {reynolds(1.0, 2300.0), prandtl, aspect, length_ratio},
         "the formula is continued",
         "12 %; 6 to 7 % low for three-sided fin channels (docs/validation.md)",
         true,
         [](In x) { return nusselt_rectangular_duct(x[0], x[1], x[2], x[3]); }},
        {"gnielinski",
         "turbulent duct with entry (Gnielinski)",
         "gnielinski1976",
         "Nu = (f/8)(Re - 1000)Pr/(1 + 12.7 (f/8)^0.5 (Pr^(2/3) - 1)) [1 + (Dh/L)^(2/3)]",
         nusselt_dh,
         {reynolds(2300.0, 1e6), prandtl, {"dh_l", "-", "hydraulic diameter / length", 0.0, 1.0}},
         "not used below Re 4000",
         "10 %",
         false,
         [](In x) { return gnielinski(x[0], x[1], x[2]); }},
        {"duct_all_regimes",
         "rectangular duct, laminar to turbulent (Muzychka & Yovanovich, Gnielinski)",
         "gnielinski2013",
         "laminar up to Re 2300, turbulent from 4000, linear in Re between the two end values",
         nusselt_dh,
         {reynolds(1.0, 1e6), prandtl, aspect, length_ratio},
         "the formula is continued",
         "12 %; more between Re 2300 and 4000",
         true,
         [](In x) { return nusselt_duct_all_regimes(x[0], x[1], x[2], x[3]); }},
        {"log_mean_to_inlet",
         "from log-mean to inlet air, plates (definition)",
         "teertstra2000",
         "Nu_in = (Re* Pr/2)(1 - exp(-Nu_lm/(Re* Pr/2)))",
         {"Nu", "-", "h S/k on inlet air"},
         {{"nu_lm", "-", "h S/k on the log mean", 0.0, no_bound},
          {"re_star", "-", "(V S/nu)(S/L)", 0.0, no_bound},
          prandtl},
         "exact",
         "none: a definition",
         false,
         [](In x) { return inlet_based_from_log_mean(x[0], x[1], x[2]); }},
        {"flat_plate",
         "flat plate, laminar (Pohlhausen)",
         "pohlhausen1921",
         "Nu = 0.664 Re^0.5 Pr^(1/3)",
         {"Nu", "-", "mean on the length"},
         {{"re", "-", "on the length", 1e3, 5e5}, {"pr", "-", "Prandtl number", 0.6, 100.0}},
         "the formula is continued",
         "2 %",
         false,
         [](In x) { return nusselt_flat_plate(x[0], x[1]); }},
        {"air_split",
         "air between fins with room beside them (this project)",
         "finwright2026",
         "m = r/(1 + r), r^2 = e/(1 - e) x/(1 - x); e by areas, x by one static pressure at the "
         "exit",
         {"m", "-", "mean share of the air between the fins"},
         {{"e", "-", "share entering", 1e-3, 0.999}, {"x", "-", "share leaving", 1e-3, 0.999}},
         "the formula is continued",
         "6 % against eleven reference solutions (docs/validation.md)",
         false,
         [](In x) {
             const double r = std::sqrt(x[0] / (1.0 - x[0]) * x[1] / (1.0 - x[1]));
             return r / (1.0 + r);
         }},
    };
}

} // namespace finwright::correlations
