#include "correlations/fin.hpp"
#include "correlations/registry.hpp"

namespace finwright::correlations {

using In = std::span<const double>;

namespace {

const Symbol mh{"mh", "-", "m times fin height", 1e-3, 10.0};
const Quantity efficiency{"eta", "-", "mean rise over base rise"};

} // namespace

std::vector<Passport> fin_passports() {
    return {
        {"fin_efficiency",
         "straight fin of constant thickness (Harper & Brown)",
         "harper1922",
         "eta = tanh(mH)/(mH); a convective tip as H + t/2",
         efficiency,
         {mh},
         "the formula is continued",
         "0.25 % at h t/(2k) = 0.01, 1.5 % at 0.1",
         false,
         [](In x) { return fin_efficiency(x[0]); }},
        {"fin_parameter",
         "m of a straight fin (Harper & Brown)",
         "harper1922",
         "m = ((h1 + h2)(1 + t/L)/(k t))^0.5",
         {"m", "1/m", "fin parameter"},
         {{"h_sum", "W/(m2 K)", "film coefficients of both faces, added", 0.0, 1e4},
          {"k", "W/(m K)", "conductivity", 1.0, 500.0},
          {"t", "m", "thickness", 1e-4, 2e-2},
          {"length", "m", "along the flow", 1e-3, 2.0}},
         "the formula is continued",
         "none: a definition",
         false,
         [](In x) { return straight_fin_parameter(x[0], x[1], x[2], x[3]); }},
        {"fin_convective_tip",
         "fin of constant section, convective tip (Incropera)",
         "incropera2007",
         "q/theta = M (tanh mH + h/(mk))/(1 + h/(mk) tanh mH), M = (h P k A)^0.5",
         {"q/theta", "W/K", "heat per kelvin of base rise"},
         {{"h", "W/(m2 K)", "film coefficient", 0.01, 1e4},
          {"k", "W/(m K)", "conductivity", 1.0, 500.0},
          {"perimeter", "m", "of the section", 1e-4, 4.0},
          {"section", "m2", "area of the section", 1e-8, 0.1},
          {"height", "m", "fin height", 1e-3, 1.0}},
         "the formula is continued",
         "as fin_efficiency",
         false,
         [](In x) { return fin_conductance_convective_tip(x[0], x[1], x[2], x[3], x[4]); }},
        {"fin_trapezoidal",
         "tapered straight fin, Bessel form (Gardner; Kraus, Aziz & Welty)",
         "kraus2001",
         "u = 2 (h x/(k tan p))^0.5; q/theta = k tb (beta/xb)^0.5 [I1(ub)K1(ue) - "
         "K1(ub)I1(ue)]/[I0(ub)K1(ue) + K0(ub)I1(ue)]",
         efficiency,
         {{"h", "W/(m2 K)", "film coefficient of each face", 0.1, 1e4},
          {"k", "W/(m K)", "conductivity", 1.0, 500.0},
          {"root", "m", "thickness at the root", 1e-4, 2e-2},
          {"tip", "m", "thickness at the tip", 1e-5, 2e-2},
          {"height", "m", "fin height", 1e-3, 1.0}},
         "root and tip must differ",
         "exact for one-dimensional conduction",
         false,
         [](In x) { return trapezoidal_fin_efficiency(x[0], x[1], x[2], x[3], x[4]); }},
        {"fin_triangular",
         "triangular fin (Gardner)",
         "gardner1945",
         "eta = I1(2mH)/(mH I0(2mH)), m on the root thickness",
         efficiency,
         {mh},
         "the formula is continued",
         "exact for one-dimensional conduction",
         false,
         [](In x) { return triangular_fin_efficiency(x[0]); }},
        {"fin_parabolic",
         "concave parabolic fin (Gardner)",
         "gardner1945",
         "eta = 2/(1 + (1 + 4 (mH)^2)^0.5)",
         efficiency,
         {mh},
         "the formula is continued",
         "exact for one-dimensional conduction",
         false,
         [](In x) { return parabolic_fin_efficiency(x[0]); }},
    };
}

} // namespace finwright::correlations
