#pragma once
// The groups air, mounting and around of a job file.

#include "src/job/document.hpp"
#include "src/job/job.hpp"

namespace finwright::job {

/// mounting and around go with still air and may be missing. Throws InputError.
Air read_air(const Document& d, const TreeNode& air, const TreeNode* mounting,
             const TreeNode* around);

} // namespace finwright::job
