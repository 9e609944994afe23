// Radiation of grey channels: the zoned solver against enclosures of other origin, the closed law
// against both.
#include "correlations/channel_radiation.hpp"
#include "correlations/numbers/dual.hpp"
#include "tests/correlations/zoned_channel.hpp"
#include "tests/near.hpp"
#include "tests/reference_rows.hpp"
#include <random>

using namespace finwright::correlations;
using namespace finwright::tests;

namespace {

/// A stored fine solution; the two-dimensional ones (RD-6) as a channel of great length.
struct FineRow {
    std::string id;
    double emissivity, gap, height, length, q;
};

std::vector<FineRow> fine_rows() {
    std::vector<FineRow> list;
    for (const Row& row : rows_of("check_values.csv")) {
        const std::string& id = row.at("id");
        if (!id.starts_with("RD-5") && !id.starts_with("RD-6")) continue;
        if (!id.ends_with("-f")) continue;
        const auto check = check_value(id);
        const bool plane = id.starts_with("RD-6");
        list.push_back({id, check["eps"], plane ? 1.0 : check["s"],
                        plane ? check["H/s"] : check["H"], plane ? 1e4 : check["L"],
                        check.value()});
    }
    return list;
}

constexpr Zones coarse{8, 6, 2};

} // namespace

TEST_CASE("zones see each other and the openings, and nothing else (Howell C-11, C-14)") {
    for (const double height : {0.2, 3.0, 25.0})
        for (const double length : {0.5, 5.0, 40.0})
            CHECK(ZonedChannel(1.0, height, height * length, coarse).opening() ==
                  near(channel_opening(1.0, height, height * length), 1e-10));
}

// Those rows' own last mesh change is 0.04 to 0.5 %, and such solutions come down as meshes refine.
TEST_CASE("the zoned solver against the fine rows RD-51 to RD-55 and RD-6 (computed)") {
    const auto rows = fine_rows();
    REQUIRE(rows.size() == 17);
    for (const FineRow& r : rows) {
        CAPTURE(r.id);
        const ExtrapolatedChannel channel(r.gap, r.height, r.length, coarse);
        CHECK(channel.conductance(r.emissivity) / (r.gap * r.length) == near(r.q, 6e-3));
    }
}

// None of them was fitted. The two-dimensional rows lie far beyond the fitted L/H of 40.
TEST_CASE("the law against the fine rows RD-51 to RD-55 and RD-6 (computed)") {
    for (const FineRow& r : fine_rows()) {
        CAPTURE(r.id);
        const bool endless = r.id.starts_with("RD-6");
        CHECK(channel_radiation_zoned(r.emissivity, r.gap, r.height, r.length) /
                  (r.gap * r.length) ==
              near(r.q, endless ? 0.022 : 0.007));
    }
}

TEST_CASE("the law against the grid it was fitted to: stated error, and below one zone") {
    std::vector<double> off;
    for (const Row& row : rows_of("channel_radiation.csv")) {
        const double h = number(row, "H_over_S"), l = number(row, "L_over_H") * h,
                     e = number(row, "emissivity"), q = number(row, "q");
        const double law = channel_radiation_zoned(e, 1.0, h, l) / l;
        off.push_back(relative_difference(law, q));
        const double one_zone =
            channel_radiation_conductance(e, (2.0 * h + 1.0) * l, channel_opening(1.0, h, l)) / l;
        CHECK(law < one_zone);
        CHECK(q < one_zone); // one zone is the coarsest of the meshes the solution falls from
    }
    REQUIRE(off.size() == 960);
    std::sort(off.begin(), off.end());
    CHECK(off[480] < 0.0015);
    CHECK(off[864] < 0.007);
    CHECK(off.back() < 0.016);
}

TEST_CASE("the law between the grid's points, against the zoned solver") {
    std::mt19937 engine(11);
    const auto within = [&](double low, double high) {
        return std::exp(std::uniform_real_distribution(std::log(low), std::log(high))(engine));
    };
    for (int i = 0; i < 20; ++i) {
        const double height = within(0.2, 25.0), length = height * within(0.5, 40.0);
        CAPTURE(height);
        CAPTURE(length);
        const ExtrapolatedChannel channel(1.0, height, length, coarse);
        for (const double e : {0.03, 0.15, 0.6, 0.95})
            CHECK(channel_radiation_zoned(e, 1.0, height, length) ==
                  near(channel.conductance(e), 0.02));
    }
}

TEST_CASE("limits: black walls, shallow channels, an endless deep slot nearly black") {
    for (const double height : {0.2, 3.0, 25.0})
        CHECK(channel_radiation_zoned(1.0, 1.0, height, 30.0) ==
              near(channel_opening(1.0, height, 30.0), 1e-15));
    const double shallow = 1e-3;
    CHECK(channel_radiation_zoned(0.3, 1.0, shallow, 10.0) ==
          near(channel_radiation_conductance(0.3, (2.0 * shallow + 1.0) * 10.0,
                                             channel_opening(1.0, shallow, 10.0)),
               1e-5));
    // Q = G (1 - (1 - eps) Y) there; the integral of the square of the mouth's view gives Y.
    const double eps = 0.999, opening = channel_opening(1.0, 1e3, 1e6);
    const double loss = (1.0 - channel_radiation_zoned(eps, 1.0, 1e3, 1e6) / opening) / (1.0 - eps);
    CHECK(loss == near(1.0 - 0.25 * std::numbers::pi, 5e-3));
}

TEST_CASE("by size and emissivity: between direct emission and black, growing with every side") {
    for (const double height : {0.2, 1.0, 4.0, 12.0, 25.0})
        for (const double slenderness : {0.5, 3.0, 40.0}) {
            CAPTURE(height);
            CAPTURE(slenderness);
            const double length = height * slenderness;
            const double opening = channel_opening(1.0, height, length);
            double before = 0.0, share_before = 1e9;
            for (double e = 0.03; e < 0.99; e += 0.01) {
                const auto law = channel_radiation_zoned(e, Dual<3>::variable(1.0, 0),
                                                         Dual<3>::variable(height, 1),
                                                         Dual<3>::variable(length, 2));
                CHECK(law.value > std::max(before, e * opening));
                CHECK(law.value / e < share_before); // rising, less than the emissivity: no jump
                before = law.value;
                share_before = law.value / e;
                for (const double slope : law.slope)
                    CHECK(slope > 0.0);
                // An area: of the second degree in the sides (Euler).
                CHECK(law.slope[0] + height * law.slope[1] + length * law.slope[2] ==
                      near(2.0 * law.value, 1e-9));
            }
            CHECK(before < opening);
        }
}
