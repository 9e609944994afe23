#include "correlations/natural_channel.hpp"
#include "src/job/read_job.hpp"
#include "src/sizing/sizing.hpp"
#include <cstdio>

int main(int, char** argv) {
    const auto job = finwright::job::read_job(argv[1]);
    const auto sizing = finwright::sizing::size(job);
    const auto& answer = std::get<finwright::sizing::Answer>(sizing);
    std::printf("Nu %.4f, %.0f g\n", finwright::correlations::nusselt_elenbaas(54.3),
                answer.rating.mass * 1e3);
    return 0;
}
