#include "src/sink/base_map.hpp"

#include "src/sink/conductance_band.hpp"
#include <Eigen/Dense>
#include <algorithm>
#include <cmath>
#include <stdexcept>

namespace finwright::sink {

using correlations::Pad;
using Eigen::MatrixXd;
using Eigen::VectorXd;

namespace {

Stretch covered(double centre, double size) {
    return {centre - 0.5 * size, centre + 0.5 * size};
}

/// One side of the base with the pads' stretches of it.
struct Side {
    GridAxis axis;
    VectorXd widths; ///< of the cells [m]
    MatrixXd shares; ///< of each pad in each cell, one column a pad

    Side(double size, const std::vector<Stretch>& pads, AxisCells cells);
};

std::vector<Focus> edges_of(const std::vector<Stretch>& pads, double side) {
    std::vector<Focus> foci;
    for (const Stretch& pad : pads) {
        if (!(pad.size() > 0.0 && pad.from > -1e-9 * side && pad.to < (1.0 + 1e-9) * side))
            throw std::domain_error("a pad reaches beyond the base");
        foci.push_back({pad.from, pad.size()});
        foci.push_back({pad.to, pad.size()});
    }
    return foci;
}

Side::Side(double size, const std::vector<Stretch>& pads, AxisCells cells)
    : axis(size, edges_of(pads, size), cells), widths(axis.cells()),
      shares(axis.cells(), Eigen::Index(pads.size())) {
    for (int i = 0; i < axis.cells(); ++i)
        widths[i] = axis.width(i);
    for (std::size_t p = 0; p < pads.size(); ++p)
        shares.col(Eigen::Index(p)) =
            VectorXd::Map(axis.shares(pads[p]).data(), Eigen::Index(axis.cells()));
}

Side side_across(const BaseMap& map, const MapCells& cells) {
    std::vector<Stretch> pads;
    for (const Pad<double>& pad : map.pads)
        pads.push_back(covered(pad.x, pad.across));
    return {map.width, pads, {cells.across, cells.at_edge}};
}

Side side_along(const BaseMap& map, const MapCells& cells) {
    std::vector<Stretch> pads;
    for (const Pad<double>& pad : map.pads)
        pads.push_back(covered(pad.y, pad.along));
    return {map.length, pads, {cells.along, cells.at_edge}};
}

/// From the pads' face down, fine there.
GridAxis depth_of(const BaseMap& map, const MapCells& cells) {
    std::vector<Focus> foci;
    for (const Pad<double>& pad : map.pads)
        foci.push_back({0.0, std::min(pad.across, pad.along)});
    return {map.thickness, foci, {std::max(2, cells.layers), cells.at_face}};
}

/// Modes of conduction along an axis between insulated ends: K v = lambda M v, M the cells' widths.
struct Modes {
    MatrixXd shapes;  ///< V, one column a mode, V^T M V = 1
    VectorXd squares; ///< lambda, the wave numbers' squares [1/m2]
};

Modes modes_of(const Side& side) {
    const Eigen::Index n = side.widths.size();
    const VectorXd root = side.widths.cwiseSqrt();
    VectorXd diagonal = VectorXd::Zero(n), beside(n - 1);
    for (Eigen::Index i = 0; i + 1 < n; ++i) {
        const double link = 1.0 / side.axis.step(int(i));
        diagonal[i] += link / side.widths[i];
        diagonal[i + 1] += link / side.widths[i + 1];
        beside[i] = -link / (root[i] * root[i + 1]);
    }
    Eigen::SelfAdjointEigenSolver<MatrixXd> solver;
    solver.computeFromTridiagonal(diagonal, beside);
    Modes modes{root.cwiseInverse().asDiagonal() * solver.eigenvectors(), solver.eigenvalues()};
    // The uniform mode is known, and has to be exact: a weak film alone opposes it.
    modes.shapes.col(0).setConstant(1.0 / root.norm());
    modes.squares[0] = 0.0;
    return modes;
}

/// What the fins of one row of cells do.
struct AirCell {
    double conductance; ///< per base area, from the roots to the air entering [W/(m2 K)]
    double warming;     ///< of the air by one watt per width, 1/C' [K m/W]
};

AirCell air_behind(const UniformFilm& film, const BaseMap&, double) {
    return {film.conductance, 0.0};
}

AirCell air_behind(const WarmingAir& stream, const BaseMap& map, double dy) {
    const double flow = stream.capacity_flow / map.width;
    const double units = stream.transfer_units * dy / map.length;
    return {-flow * std::expm1(-units) / dy, 1.0 / flow};
}

/// The section through length and thickness, which every mode across has to itself.
class Section {
public:
    Section(const BaseMap& map, const GridAxis& along, const GridAxis& depth)
        : along_(along), depth_(depth), layers_(depth.cells()), conductivity_(map.conductivity) {
        const double half_layer = 0.5 * depth.width(layers_ - 1) / conductivity_;
        for (int j = 0; j < along.cells(); ++j) {
            air_.push_back(std::visit(
                [&](const auto& air) { return air_behind(air, map, along.width(j)); }, map.air));
            double& conductance = air_.back().conductance;
            conductance = 1.0 / (1.0 / conductance + half_layer);
        }
    }

    double warming() const { return air_.front().warming; }

    /// Along the section: rises of the pads' face, and heat into the fins per area.
    struct Faces {
        VectorXd rises, fluxes;
    };
    Faces solve(double wave_number_squared, const VectorXd& powers) const {
        ConductanceBand matrix(rows(), layers_ + 1);
        std::vector<double> right(std::size_t(rows()), 0.0);
        for (int j = 0; j < along_.cells(); ++j) {
            conduct(matrix, j, wave_number_squared);
            cool(matrix, j);
            right[std::size_t(metal(j, 0))] = powers[j];
        }
        const auto solution = std::move(matrix).solve(std::move(right));
        return {face_rises(solution, powers), fin_fluxes(solution)};
    }

private:
    /// Unknowns: for every cell along, the air entering it, then the layers from the fins up.
    int rows() const { return along_.cells() * (layers_ + 1); }
    int air(int j) const { return j * (layers_ + 1); }
    int metal(int j, int layer) const { return air(j) + layers_ - layer; }
    int root(int j) const { return metal(j, layers_ - 1); }

    static void link(ConductanceBand& matrix, int a, int b, double conductance) {
        matrix.tie(a, b, conductance);
        matrix.tie(b, a, conductance);
    }

    void conduct(ConductanceBand& matrix, int j, double wave_number_squared) const {
        for (int k = 0; k < layers_; ++k) {
            const double edge = conductivity_ * depth_.width(k),
                         face = conductivity_ * along_.width(j);
            matrix.ground(metal(j, k), wave_number_squared * edge * along_.width(j));
            if (k + 1 < layers_) link(matrix, metal(j, k), metal(j, k + 1), face / depth_.step(k));
            if (j + 1 < along_.cells())
                link(matrix, metal(j, k), metal(j + 1, k), edge / along_.step(j));
        }
    }

    /// Heat into the fins of cell j, and the air it hands on; air at the inlet has no rise.
    void cool(ConductanceBand& matrix, int j) const {
        const double conductance = air_[std::size_t(j)].conductance * along_.width(j);
        const double taken = conductance * air_[std::size_t(j)].warming;
        matrix.tie(root(j), air(j), conductance);
        if (j == 0) matrix.ground(air(j), 1.0);
        if (j + 1 == along_.cells()) return;
        matrix.tie(air(j + 1), air(j), 1.0 - taken);
        matrix.tie(air(j + 1), root(j), taken);
    }

    VectorXd face_rises(const std::vector<double>& solution, const VectorXd& powers) const {
        VectorXd rises(along_.cells());
        for (int j = 0; j < along_.cells(); ++j) {
            const double first = solution[std::size_t(metal(j, 0))];
            const double second = solution[std::size_t(metal(j, 1))];
            const double slope = powers[j] / (along_.width(j) * conductivity_);
            const double slope_below = (first - second) / depth_.step(0);
            rises[j] = first + depth_.width(0) * (2.0 * slope + slope_below) / 6.0;
        }
        return rises;
    }

    VectorXd fin_fluxes(const std::vector<double>& solution) const {
        VectorXd fluxes(along_.cells());
        for (int j = 0; j < along_.cells(); ++j)
            fluxes[j] = air_[std::size_t(j)].conductance *
                        (solution[std::size_t(root(j))] - solution[std::size_t(air(j))]);
        return fluxes;
    }

    const GridAxis& along_;
    const GridAxis& depth_;
    int layers_;
    double conductivity_;
    std::vector<AirCell> air_;
};

/// Over the base, one column a row of cells across.
struct Fields {
    MatrixXd rises, fluxes;
};

Fields solve(const Section& section, const Modes& modes, const MatrixXd& powers) {
    const MatrixXd mode_powers = modes.shapes.transpose() * powers;
    Fields by_mode{powers, powers};
    for (Eigen::Index m = 0; m < powers.rows(); ++m) {
        const auto faces = section.solve(modes.squares[m], mode_powers.row(m));
        by_mode.rises.row(m) = faces.rises;
        by_mode.fluxes.row(m) = faces.fluxes;
    }
    return {modes.shapes * by_mode.rises, modes.shapes * by_mode.fluxes};
}

double air_rise(const UniformFilm& film) {
    return film.air_rise;
}
double air_rise(const WarmingAir&) {
    return 0.0;
}

std::vector<double> listed(const MatrixXd& values) {
    return {values.data(), values.data() + values.size()};
}

} // namespace

BaseField base_field(const BaseMap& map, const MapCells& cells) {
    const Side x = side_across(map, cells), y = side_along(map, cells);
    const GridAxis depth = depth_of(map, cells);
    const Section section(map, y.axis, depth);
    const auto powers = VectorXd::Map(map.powers.data(), Eigen::Index(map.powers.size()));
    const MatrixXd cell_powers = x.shares * powers.asDiagonal() * y.shares.transpose();
    Fields fields = solve(section, modes_of(x), cell_powers);
    fields.rises.array() += std::visit([](const auto& air) { return air_rise(air); }, map.air);

    const VectorXd given_off = fields.fluxes * y.widths; // per width, by each strip
    const VectorXd means = (x.shares.transpose() * fields.rises * y.shares).diagonal();
    Eigen::Index i = 0, j = 0;
    const double hottest = fields.rises.maxCoeff(&i, &j);
    return {.across = x.axis,
            .along = y.axis,
            .rises = listed(fields.rises),
            .fluxes = listed(fields.fluxes),
            .outlet = listed(section.warming() * given_off),
            .pad_rises = listed(means),
            .hottest = {x.axis.centre(int(i)), y.axis.centre(int(j)), hottest},
            .heat = given_off.dot(x.widths)};
}

} // namespace finwright::sink
