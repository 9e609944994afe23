#include "correlations/numbers/dual.hpp"

namespace finwright::correlations {

template struct Dual<1>;
template struct Dual<5>;
template struct Dual<6>;

} // namespace finwright::correlations
