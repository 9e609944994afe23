#include "optimizer/descent.hpp"

namespace finwright::optimizer {

namespace {

constexpr int restarts = 3;
// How far from its centre a model is trusted, scaled: at first, and by what it shrinks from round
// to round.
constexpr double first_reach = 0.5, reach_shrinks = 0.8;

} // namespace

Descent::Descent(Problem& problem, const Settings& settings, Effort& effort)
    : problem_(problem), settings_(settings), effort_(effort), solve_(problem, settings, effort) {}

Judged Descent::from(const std::vector<double>& start) {
    Judged best = settled(start, std::numeric_limits<double>::infinity());
    if (settings_.recentres <= 0 || !best.defined()) return best;
    double reach = first_reach;
    for (int round = 0; round < settings_.recentres && !effort_.spent(); ++round) {
        if (!best.defined() || !problem_.recentre(best.x)) return best;
        best = settled(best.x, reach); // the model moved: what was judged before is judged again
        reach *= reach_shrinks;
    }
    return exactly(problem_, std::move(best));
}

Judged Descent::settled(const std::vector<double>& start, double reach) {
    const auto run = [&](const std::vector<double>& x) {
        return solve_.run(Method::sequential_quadratic, x, reach);
    };
    const auto first = run(start);
    Judged best = by_model(problem_, first.empty() ? start : first, effort_);
    for (int again = 0; again < restarts && !effort_.spent() && !best.stationary(settings_);
         ++again) {
        const auto next = run(best.x);
        if (next.empty()) break;
        Judged j = by_model(problem_, next, effort_);
        const bool improved = better(j, best, settings_);
        const bool gained = improved || j.multipliers.residual < best.multipliers.residual;
        if (improved) best = std::move(j);
        if (!gained) break;
    }
    return best;
}

} // namespace finwright::optimizer
