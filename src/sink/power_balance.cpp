#include "src/sink/power_balance.hpp"

#include "src/job/job.hpp"
#include <Eigen/Dense>
#include <algorithm>
#include <cmath>
#include <limits>

namespace finwright::sink {

namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

constexpr std::size_t spare_steps = 100; // beside a few for every piece
constexpr double difference = 1e-5;      // of a power, for the slopes of J [-]
constexpr double last_step = 1e-6;       // Newton's error after it is beyond the last digit [K]
constexpr double served = 0.1;           // what a step leaves of the residual while J' serves [-]
constexpr double beyond_gain = 1e-3;
constexpr double air_resolution = 0.05; // [K]

/// The loop gain, and the shape in which the junctions grow fastest.
struct Growth {
    double gain;
    VectorXd shape;
};

Growth growth_of(const MatrixXd& feedback) {
    const Eigen::EigenSolver<MatrixXd> modes(feedback);
    Index largest = 0;
    const double gain = modes.eigenvalues().real().maxCoeff(&largest);
    return {gain, modes.eigenvectors().col(largest).real()};
}

class Climb {
public:
    Climb(const std::vector<job::PowerTable>& tables, double coldest, const Junctions& junctions)
        : tables_(tables), junctions_(junctions), count_(Index(tables.size())),
          junction_(VectorXd::Constant(count_, coldest)) {
        for (const job::PowerTable& table : tables_)
            piece_.push_back(table.piece_at(coldest));
    }

    PowerBalance run() {
        refresh();
        for (std::size_t step = most_steps(); step > 0 && !settled_ && !ended_; --step)
            climb();
        return result();
    }

    const MatrixXd& slopes() const { return slopes_; }

private:
    /// Where a step comes to the end of a part's piece.
    struct End {
        Index part = -1;
        double junction = 0.0; ///< [K]
        double share = 1.0;    ///< of the step
        std::size_t next = 0;  ///< piece
    };

    std::size_t most_steps() const {
        std::size_t steps = spare_steps;
        for (const job::PowerTable& table : tables_)
            steps += 4 * table.pieces().size();
        return steps;
    }

    const job::PowerTable::Piece& piece(Index i) const {
        return tables_[std::size_t(i)].pieces()[piece_[std::size_t(i)]];
    }

    VectorXd powers() const {
        VectorXd p(count_);
        for (Index i = 0; i < count_; ++i)
            p[i] = piece(i).power_at(junction_[i]);
        return p;
    }

    VectorXd junctions_at(const VectorXd& powers) const {
        const auto t = junctions_(std::vector<double>(powers.begin(), powers.end()));
        return Eigen::Map<const VectorXd>(t.data(), count_);
    }

    /// J' where the climb stands.
    void refresh() {
        const VectorXd p = powers(), base = junctions_at(p);
        slopes_.resize(count_, count_);
        for (Index j = 0; j < count_; ++j) {
            VectorXd more = p;
            more[j] *= 1.0 + difference;
            slopes_.col(j) = (junctions_at(more) - base) / (more[j] - p[j]);
        }
        fresh_ = true;
    }

    MatrixXd feedback() const {
        MatrixXd f = slopes_;
        for (Index i = 0; i < count_; ++i)
            f.col(i) *= piece(i).slope;
        return f;
    }

    void climb() {
        const VectorXd left = junctions_at(powers()) - junction_;
        const double residual = left.cwiseAbs().maxCoeff();
        if (!fresh_ && residual > expected_) refresh();
        const Growth growth = growth_of(feedback());
        watch(growth);
        MatrixXd system = -feedback();
        system.diagonal().array() += growth.gain < 1.0 ? 1.0 : growth.gain + beyond_gain;
        const VectorXd step = system.partialPivLu().solve(left);
        const End end = first_end(step);
        junction_ += end.share * step;
        expected_ = growth.gain < 1.0 ? (1.0 - end.share + served) * residual
                                      : std::numeric_limits<double>::infinity();
        if (end.part >= 0)
            pass(end);
        else
            finish(growth.gain < 1.0 && step.cwiseAbs().maxCoeff() < last_step);
    }

    /// A last step counts with slopes taken where it was made.
    void finish(bool last) {
        settled_ = last && fresh_;
        fresh_ = false;
        if (last && !settled_) refresh();
    }

    /// Keeps where the gain came to 1, while it stays there.
    void watch(const Growth& growth) {
        gain_ = growth.gain;
        if (growth.gain < 1.0) away_.reset();
        if (growth.gain < 1.0 || away_) return;
        away_ = at(fastest(growth.shape));
    }

    Index fastest(const VectorXd& shape) const {
        Index part = 0;
        double most = -1.0;
        for (Index i = 0; i < count_; ++i)
            if (const double power = std::abs(piece(i).slope * shape[i]); power > most) {
                most = power;
                part = i;
            }
        return part;
    }

    Runaway at(Index part) const { return {std::size_t(part), junction_[part], gain_}; }

    End end_of(Index i, double step) const {
        const std::size_t p = piece_[std::size_t(i)];
        if (step > 0.0) return {i, std::min(piece(i).to, job::hottest_junction), 1.0, p + 1};
        return {i, piece(i).from, 1.0, p - 1};
    }

    /// The first end a step comes to, on a piece or at the hottest junction.
    End first_end(const VectorXd& step) const {
        End first;
        for (Index i = 0; i < count_; ++i) {
            if (step[i] == 0.0) continue;
            End end = end_of(i, step[i]);
            end.share = std::max((end.junction - junction_[i]) / step[i], 0.0);
            if (end.share < first.share) first = end;
        }
        return first;
    }

    void pass(const End& end) {
        fresh_ = false;
        junction_[end.part] = end.junction;
        ended_ = end.junction >= job::hottest_junction;
        if (!ended_) piece_[std::size_t(end.part)] = end.next;
        if (ended_ && !away_) away_ = at(end.part);
    }

    PowerBalance result() {
        PowerBalance balance;
        const VectorXd p = powers();
        balance.powers.assign(p.begin(), p.end());
        balance.junctions.assign(junction_.begin(), junction_.end());
        balance.loop_gain = gain_;
        if (settled_) return balance;
        Index hottest = 0;
        junction_.maxCoeff(&hottest);
        balance.runaway = away_.value_or(at(hottest));
        return balance;
    }

    const std::vector<job::PowerTable>& tables_;
    const Junctions& junctions_;
    Index count_;
    VectorXd junction_;
    std::vector<std::size_t> piece_;
    MatrixXd slopes_;
    bool fresh_ = false;    ///< slopes taken where the climb stands
    double expected_ = 0.0; ///< residual while the slopes serve [K]
    double gain_ = 0.0;
    std::optional<Runaway> away_;
    bool settled_ = false;
    bool ended_ = false; ///< past the hottest junction
};

/// The sink as straight as it is at a settled state, in air that much warmer.
Junctions straight(const PowerBalance& at, const MatrixXd& slopes, double warmer) {
    return [&at, &slopes, warmer](const std::vector<double>& powers) {
        std::vector<double> t = at.junctions;
        for (std::size_t i = 0; i < t.size(); ++i) {
            t[i] += warmer;
            for (std::size_t j = 0; j < t.size(); ++j)
                t[i] += slopes(Index(i), Index(j)) * (powers[j] - at.powers[j]);
        }
        return t;
    };
}

std::optional<double> air_left(const std::vector<job::PowerTable>& tables, double coldest,
                               const PowerBalance& at, const MatrixXd& slopes) {
    const auto runaway = [&](double warmer) {
        const Junctions lifted = straight(at, slopes, warmer);
        return Climb(tables, coldest + warmer, lifted).run().runaway;
    };
    const auto hottest = *std::max_element(at.junctions.begin(), at.junctions.end());
    double low = 0.0, high = std::max(job::hottest_junction - hottest, air_resolution);
    auto found = runaway(high);
    if (!found) return std::nullopt;
    while (high - low > air_resolution) {
        const double middle = 0.5 * (low + high);
        const auto away = runaway(middle);
        (away ? high : low) = middle;
        if (away) found = away;
    }
    return found->loop_gain >= 1.0 ? std::optional(low) : std::nullopt;
}

} // namespace

PowerBalance balance_powers(const std::vector<job::PowerTable>& tables, double coldest,
                            const Junctions& junctions) {
    Climb climb(tables, coldest, junctions);
    PowerBalance balance = climb.run();
    if (!balance.runaway) balance.air_left = air_left(tables, coldest, balance, climb.slopes());
    return balance;
}

} // namespace finwright::sink
