#include "src/sizing/spreading_model.hpp"

#include "src/sink/rating.hpp"
#include <cmath>

namespace finwright::sizing {

namespace {

constexpr double coarse_half_waves = 0.8;
constexpr double tamest_exponent = 4.0; // of a tail as a monomial

template <class T>
std::array<T, 5> dimensions_of(const sink::Geometry<T>& g) {
    return {g.height, g.thickness, g.gap, g.base, g.length};
}

sink::Geometry<Dual5> independent(const sink::Geometry<double>& g) {
    return {g.fins,
            Dual5::variable(g.height, 0),
            Dual5::variable(g.thickness, 1),
            Dual5::variable(g.gap, 2),
            Dual5::variable(g.base, 3),
            Dual5::variable(g.length, 4),
            g.draft_tangent,
            g.details};
}

} // namespace

void SpreadingModel::centre(const sink::Geometry<double>& plain, const sink::Duty& duty) {
    const sink::Geometry<Dual5> g = independent(plain);
    const auto balance = sink::balance(g, duty);
    modes_ = sink::modes_up_to(coarse_half_waves, plain, duty);
    const std::vector<Dual5> full =
        sink::pad_rises(g, duty, balance, sink::modes_for_means(plain, duty));
    const std::vector<Dual5> coarse = sink::pad_rises(g, duty, balance, modes_);
    const auto values = dimensions_of(plain);
    for (std::size_t k = 0; k < 5; ++k)
        log_centre_[k] = std::log(values[k]);
    tails_.clear();
    for (std::size_t i = 0; i < full.size(); ++i) {
        const Dual5 rise = full[i] - coarse[i];
        Tail tail{rise.value, {}, true};
        for (std::size_t k = 0; k < 5; ++k) {
            tail.slopes[k] = rise.slope[k] * values[k];
            tail.monomial =
                tail.monomial && std::abs(tail.slopes[k]) < tamest_exponent * std::abs(tail.rise);
        }
        tails_.push_back(tail);
    }
}

template <class T>
T SpreadingModel::Tail::at(const std::array<T, 5>& away) const {
    using std::exp;
    T sum(0.0);
    for (std::size_t k = 0; k < 5; ++k)
        sum += slopes[k] * away[k];
    return monomial ? T(rise * exp(sum / rise)) : T(rise + sum);
}

template <class T>
std::vector<T> SpreadingModel::pad_rises(const sink::Geometry<T>& g, const sink::Duty& duty,
                                         const sink::Balance<T>& balance) const {
    using std::log;
    std::array<T, 5> away = dimensions_of(g);
    for (std::size_t k = 0; k < 5; ++k)
        away[k] = log(away[k]) - log_centre_[k];
    std::vector<T> rises = sink::pad_rises(g, duty, balance, modes_);
    for (std::size_t i = 0; i < rises.size(); ++i)
        rises[i] += tails_[i].at(away);
    return rises;
}

template std::vector<double> SpreadingModel::pad_rises(const sink::Geometry<double>&,
                                                       const sink::Duty&,
                                                       const sink::Balance<double>&) const;
template std::vector<Dual5> SpreadingModel::pad_rises(const sink::Geometry<Dual5>&,
                                                      const sink::Duty&,
                                                      const sink::Balance<Dual5>&) const;

} // namespace finwright::sizing
