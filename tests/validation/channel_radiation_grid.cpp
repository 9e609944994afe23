// Writes the grid of zoned solutions the channel radiation law is fitted to (some minutes):
//   channel_radiation_grid > tests/data/reference/channel_radiation.csv
#include "tests/correlations/zoned_channel.hpp"
#include <fmt/format.h>

int main() {
    const finwright::tests::Zones zones{16, 12, 3};
    fmt::print("# zoned solution, this project: grey isothermal channel of gap S, fin height H, "
               "length L, open in front and at both ends\n"
               "# zones {} x {} on each fin, {} x {} on the base, smaller towards the openings, "
               "halved once and extrapolated; q = heat/(sigma (Ts^4 - Te^4) S L)\n"
               "H_over_S,L_over_H,emissivity,q\n",
               zones.height, 2 * zones.half_length, 2 * zones.half_base, 2 * zones.half_length);
    for (double h : {0.2, 0.4, 0.7, 1.0, 1.5, 2.5, 4.0, 6.0, 9.0, 13.0, 18.0, 25.0})
        for (double l : {0.5, 1.0, 2.0, 3.5, 6.0, 10.0, 20.0, 40.0}) {
            const finwright::tests::ExtrapolatedChannel channel(1.0, h, l * h, zones);
            for (double e : {0.03, 0.06, 0.1, 0.2, 0.35, 0.5, 0.7, 0.8, 0.9, 0.98})
                fmt::print("{},{},{},{:.6g}\n", h, l, e, channel.conductance(e) / (l * h));
        }
}
