#pragma once
// From a job file to a Job: read strictly, completed from the catalogues, checked for
// contradictions.

#include "src/job/input_error.hpp"
#include "src/job/job.hpp"
#include <filesystem>
#include <string>

namespace finwright::job {

/// A job to find a sink for. Throws InputError.
Job read_job(const std::filesystem::path& path);
Job read_job_text(std::string text, std::string file_name);

/// A job whose sink is stated and only to be rated: it may break limits, space and shop.
Job read_rated_job(const std::filesystem::path& path);

} // namespace finwright::job
