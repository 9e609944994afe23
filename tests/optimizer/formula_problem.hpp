#pragma once
// A problem written as formulas over a small derivative-carrying number, so that a test states only
// the published functions. (The optimizer's own floor knows nothing of such numbers.)

#include "optimizer/problem.hpp"
#include <cmath>
#include <functional>

namespace finwright::tests {

/// Value and gradient over up to ten variables.
struct Num {
    static constexpr std::size_t most = 10;
    double v = 0.0;
    double d[most] = {};

    Num() = default;
    Num(double value) : v(value) {} // NOLINT: constants enter as they are
};

inline Num chain(const Num& a, double value, double slope) {
    Num out(value);
    for (std::size_t i = 0; i < Num::most; ++i)
        out.d[i] = slope * a.d[i];
    return out;
}
inline Num operator+(const Num& a, const Num& b) {
    Num out(a.v + b.v);
    for (std::size_t i = 0; i < Num::most; ++i)
        out.d[i] = a.d[i] + b.d[i];
    return out;
}
inline Num operator*(const Num& a, const Num& b) {
    Num out(a.v * b.v);
    for (std::size_t i = 0; i < Num::most; ++i)
        out.d[i] = a.d[i] * b.v + a.v * b.d[i];
    return out;
}
inline Num operator-(const Num& a) {
    return chain(a, -a.v, -1.0);
}
inline Num operator-(const Num& a, const Num& b) {
    return a + (-b);
}
inline Num operator/(const Num& a, const Num& b) {
    return a * chain(b, 1.0 / b.v, -1.0 / (b.v * b.v));
}
inline Num pow(const Num& a, double p) {
    return chain(a, std::pow(a.v, p), p * std::pow(a.v, p - 1.0));
}
inline Num sqrt(const Num& a) {
    return pow(a, 0.5);
}
inline Num sin(const Num& a) {
    return chain(a, std::sin(a.v), std::cos(a.v));
}

using Formula = std::function<Num(std::span<const Num>)>;

class FormulaProblem final : public optimizer::Problem {
public:
    FormulaProblem(std::vector<optimizer::Variable> variables, Formula objective,
                   std::vector<Formula> constraints)
        : variables_(std::move(variables)), objective_(std::move(objective)),
          constraints_(std::move(constraints)) {}

    FormulaProblem& from(std::vector<std::vector<double>> starts) {
        starts_ = std::move(starts);
        return *this;
    }

    const std::vector<optimizer::Variable>& variables() const override { return variables_; }
    std::size_t constraint_count() const override { return constraints_.size(); }

    void evaluate(std::span<const double> x, optimizer::Evaluation& out) override {
        std::vector<Num> seeded(x.begin(), x.end());
        for (std::size_t i = 0; i < x.size(); ++i)
            seeded[i].d[i] = 1.0;
        const Num f = objective_(seeded);
        out.objective = f.v;
        for (std::size_t j = 0; j < x.size(); ++j)
            out.gradient[j] = f.d[j];
        for (std::size_t c = 0; c < constraints_.size(); ++c) {
            const Num g = constraints_[c](seeded);
            out.constraints[c] = g.v;
            for (std::size_t j = 0; j < x.size(); ++j)
                out.jacobian[c * x.size() + j] = g.d[j];
        }
    }

    std::vector<std::vector<double>> starts() const override {
        return starts_.empty() ? Problem::starts() : starts_;
    }

private:
    std::vector<optimizer::Variable> variables_;
    Formula objective_;
    std::vector<Formula> constraints_;
    std::vector<std::vector<double>> starts_;
};

/// n variables of one range.
inline std::vector<optimizer::Variable> box(std::size_t n, double lower, double upper,
                                            optimizer::Scale scale = optimizer::Scale::linear) {
    std::vector<optimizer::Variable> variables;
    for (std::size_t i = 0; i < n; ++i)
        variables.push_back({std::to_string(i + 1), lower, upper, scale});
    return variables;
}

} // namespace finwright::tests
