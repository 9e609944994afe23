#pragma once
// One fin count of a sizing job as an optimisation problem over the dimensions left free.
//
// Variables are the free dimensions, searched in logarithms; constraints are ln(quantity/bound) <=
// 0; the aim is ln(mass), ln(volume), ... plus a ten-thousandth of ln(metal), so that among designs
// equal in the aim the lightest is taken. Temperatures come from the heat balance, with exact
// derivatives.

#include "optimizer/problem.hpp"
#include "src/sink/balance.hpp"
#include "src/sink/duty.hpp"
#include "src/sizing/design_space.hpp"
#include "src/sizing/spreading_model.hpp"
#include <memory>

namespace finwright::sizing {

/// What is made small: an aim of the job, or the hottest pad's excess over what is allowed (to tell
/// how far an impossible job is from a possible one).
enum class Pursuit { mass, volume, height, footprint, resistance, pressure_drop, excess };
Pursuit pursuit_of(job::Aim aim);

class SearchProblem final : public optimizer::Problem {
public:
    SearchProblem(DesignSpace space, const sink::Duty& duty, Pursuit pursuit,
                  const SpreadingModel& spreading);

    const std::vector<optimizer::Variable>& variables() const override { return variables_; }
    std::size_t constraint_count() const override { return space_.limits.size(); }
    void evaluate(std::span<const double> x, optimizer::Evaluation& out) override;
    void judge(std::span<const double> x, double& objective,
               std::span<double> constraints) override;
    bool recentre(std::span<const double> x) override;
    std::vector<std::vector<double>> starts() const override;

    const DesignSpace& space() const { return space_; }
    const SpreadingModel& spreading() const { return spreading_; }

    /// The sink at a point of the search.
    sink::Geometry<double> geometry(std::span<const double> x) const;

    /// The dimensions that are variables, in their order.
    const std::vector<Dimension>& free_dimensions() const { return free_; }

    /// ln(aim) at a point of the free dimensions, with the centred spreading model.
    double quick_objective(std::span<const double> dimensions) const;
    /// Whether every limit holds, or is missed by less than the centred spreading model may err.
    bool quickly_feasible(std::span<const double> dimensions) const;
    /// The limits this point breaks, other than the worst pad's.
    std::vector<const Limit*> broken(std::span<const double> dimensions) const;
    /// Whether every limit holds by the exact model.
    bool feasible(std::span<const double> dimensions) const;

private:
    template <class T, class Seed>
    sink::Geometry<T> build(Seed&& seed) const;
    sink::Geometry<Dual5> seeded(std::span<const double> x) const;
    bool pursues_worst_pad() const;

    DesignSpace space_;
    const sink::Duty& duty_;
    Pursuit pursuit_;
    SpreadingModel spreading_;
    double last_rise_ = sink::first_guess; ///< where the next heat balance is looked for first [K]
    std::vector<optimizer::Variable> variables_;
    std::vector<Dimension>
        free_; ///< the dimension each variable moves; the worst pad comes after them
};

} // namespace finwright::sizing
