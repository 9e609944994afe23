#include "src/sizing/stated_sink.hpp"

#include "src/job/input_error.hpp"
#include <cmath>
#include <fmt/format.h>

namespace finwright::sizing {

using job::Job;
using job::Range;

namespace {

double stated(const Job& job, const Range& range, const char* key) {
    if (range.fixed()) return *range.from;
    throw job::InputError(job.file, job.text, range.place,
                          fmt::format("a rating needs every dimension, and {} is still open", key),
                          fmt::format("fix it under sink, for example {}: {}", key,
                                      std::string_view(key) == "fins" ? "12" : "40 mm"));
}

} // namespace

sink::Geometry<double> stated_sink(const Job& job) {
    const job::Sink& sink = job.sink;
    sink::Geometry<double> g;
    g.fins = int(std::lround(stated(job, sink.fins, "fins")));
    g.height = stated(job, sink.fin_height, "fin_height");
    g.draft_tangent = std::tan(sink.fin_draft);
    g.base = stated(job, sink.base_thickness, "base_thickness");
    g.length = stated(job, sink.length, "length");
    const double taper = 2.0 * g.draft_tangent * g.height;
    if (sink.width.fixed() && sink.gap.fixed() && !sink.fin_thickness.fixed()) {
        g.gap = *sink.gap.from;
        g.thickness = (*sink.width.from - double(g.fins - 1) * g.gap) / double(g.fins);
        return g;
    }
    g.thickness = stated(job, sink.fin_thickness, "fin_thickness") + taper;
    g.gap = sink.width.fixed() ? sink::gap_for_width(g.fins, *sink.width.from, g.thickness)
                               : stated(job, sink.gap, "gap");
    return g;
}

} // namespace finwright::sizing
