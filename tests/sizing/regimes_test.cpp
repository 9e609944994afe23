// Sizing in every regime: whatever is answered keeps every limit when rated anew, and nothing
// fails.
#include "src/sizing/broken_limits.hpp"
#include "src/sizing/sizing.hpp"
#include "tests/near.hpp"
#include "tests/sizing/random_jobs.hpp"

using namespace finwright;
using tests::near;

namespace {

/// Sizes random jobs and rates each answer anew; how many had one.
int answered(job::Job (tests::RandomJobs::*make)(), unsigned seed, int count) {
    tests::RandomJobs random(seed);
    int answers = 0;
    for (int n = 0; n < count; ++n) {
        const job::Job job = (random.*make)();
        CAPTURE(n);
        const sizing::Sizing sizing = sizing::size(job);
        const auto* answer = std::get_if<sizing::Answer>(&sizing);
        if (!answer) {
            CHECK_FALSE(std::get<sizing::Refusal>(sizing).reason.empty());
            continue;
        }
        ++answers;
        const job::Job asked = sizing::as_answered(job, *answer);
        const auto rating = sink::rate(answer->design.rounded, sink::duty_of(asked));
        for (const auto& part : rating.parts)
            CHECK(*part.headroom() > -1e-6);
        CHECK(sizing::broken_limits(asked, rating).empty());
        CHECK(rating.mass == near(answer->rating.mass, 1e-12));
    }
    return answers;
}

} // namespace

TEST_CASE("still air in every mounting: 40 random jobs") {
    CHECK(answered(&tests::RandomJobs::mounted, 301, 40) >= 15);
}

TEST_CASE("streams and fans: 40 random jobs") {
    CHECK(answered(&tests::RandomJobs::driven, 302, 40) >= 15);
}
