#pragma once
// What one call of the optimizer may spend and has spent, shared by all its solves.

#include "optimizer/outcome.hpp"
#include "optimizer/settings.hpp"

namespace finwright::optimizer {

class Effort {
public:
    explicit Effort(const Settings& settings) : settings_(settings) {}

    bool out_of_time() const {
        return settings_.time && std::chrono::steady_clock::now() - begun_ > *settings_.time;
    }
    bool asked_to_stop() const { return settings_.stop.stop_requested(); }
    bool spent() const { return asked_to_stop() || out_of_time(); }

    int evaluations = 0, undefined = 0;
    bool a_solve_ran_out = false; ///< of the evaluations a solve is allowed

private:
    const Settings& settings_;
    std::chrono::steady_clock::time_point begun_ = std::chrono::steady_clock::now();
};

} // namespace finwright::optimizer
