#include "src/sizing/stated_sink.hpp"

#include "src/job/input_error.hpp"
#include "src/sink/placing.hpp"
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

sink::Geometry<double> stated_dimensions(const Job& job) {
    const job::Sink& sink = job.sink;
    sink::Geometry<double> g;
    g.details = sink.details;
    g.fins = int(std::lround(stated(job, sink.fins, "fins")));
    if (g.plate()) {
        g.height = g.thickness = 0.0;
        g.details = {};
        g.gap = stated(job, sink.width, "width");
        g.base = stated(job, sink.base_thickness, "base_thickness");
        g.length = stated(job, sink.length, "length");
        return g;
    }
    g.height = stated(job, sink.fin_height, "fin_height");
    g.draft_tangent = std::tan(sink.fin_draft);
    g.base = stated(job, sink.base_thickness, "base_thickness");
    g.length = stated(job, sink.length, "length");
    const double taper = 2.0 * g.draft_tangent * g.height;
    if (sink.width.fixed() && sink.gap.fixed() && !sink.fin_thickness.fixed()) {
        g.gap = *sink.gap.from;
        g.thickness = (*sink.width.from - 2.0 * sink.details.flange - double(g.fins - 1) * g.gap) /
                      double(g.fins);
        return g;
    }
    g.thickness = stated(job, sink.fin_thickness, "fin_thickness") + taper;
    g.gap =
        sink.width.fixed()
            ? sink::gap_for_width(g.fins, *sink.width.from - 2.0 * sink.details.flange, g.thickness)
            : stated(job, sink.gap, "gap");
    return g;
}

void require_air(const Job& job, const sink::Geometry<double>& g) {
    if (g.plate()) return;
    const Range& width = job.sink.width;
    if (g.gap <= 0.0)
        throw job::InputError(job.file, job.text, width.place,
                              "the fins fill the whole width: no gap is left for air",
                              "take fins away, make them thinner, or widen the sink");
    if (g.tip_thickness() <= 0.0)
        throw job::InputError(job.file, job.text, job.sink.fin_thickness.place,
                              "the draft leaves nothing at the fin's tip",
                              "less draft, or lower or thicker fins");
}

void require_pads_on_base(const Job& job, const sink::Geometry<double>& g) {
    const sink::SmallestBase base = sink::smallest_base(job.parts);
    const bool wide = base.width <= g.width() * (1.0 + 1e-9);
    if (!wide || base.length > g.length * (1.0 + 1e-9))
        throw job::InputError(job.file, job.text, job.parts.front().place,
                              fmt::format("the pads overlap or hang over the edge: they need a "
                                          "base {} of {:.4g} mm, it has {:.4g} mm",
                                          wide ? "length" : "width",
                                          (wide ? base.length : base.width) * 1e3,
                                          (wide ? g.length : g.width()) * 1e3),
                              "move the pads, or make the base larger");
}

} // namespace

sink::Geometry<double> stated_sink(const Job& job) {
    const sink::Geometry<double> g = stated_dimensions(job);
    require_air(job, g);
    require_pads_on_base(job, g);
    return g;
}

} // namespace finwright::sizing
