#include "correlations/fin.hpp"

#include <boost/math/special_functions/bessel.hpp>

namespace finwright::correlations {

namespace {

using boost::math::cyl_bessel_i;
using boost::math::cyl_bessel_k;

} // namespace

double trapezoidal_fin_efficiency(double film, double conductivity, double root, double tip,
                                  double height) {
    const double slope = (root - tip) / (2.0 * height);
    const double beta = film / (conductivity * slope);
    const double x_root = root / (2.0 * slope), x_tip = tip / (2.0 * slope);
    const double u_root = 2.0 * std::sqrt(beta * x_root), u_tip = 2.0 * std::sqrt(beta * x_tip);
    const double i1_tip = cyl_bessel_i(1, u_tip), k1_tip = cyl_bessel_k(1, u_tip);
    const double flux = cyl_bessel_i(1, u_root) * k1_tip - cyl_bessel_k(1, u_root) * i1_tip;
    const double rise = cyl_bessel_i(0, u_root) * k1_tip + cyl_bessel_k(0, u_root) * i1_tip;
    const double heat = conductivity * root * std::sqrt(beta / x_root) * flux / rise;
    return heat / (2.0 * film * height);
}

double triangular_fin_efficiency(double mh) {
    return cyl_bessel_i(1, 2.0 * mh) / (mh * cyl_bessel_i(0, 2.0 * mh));
}

} // namespace finwright::correlations
