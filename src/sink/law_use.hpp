#pragma once
// Which laws a rating rests on, with the values they were given and whether those lie in range.

#include <string>
#include <vector>

namespace finwright::sink {

/// One law as one rating used it. `inputs` stand in the order of the passport's symbols.
struct LawUse {
    std::string passport; ///< name in the registry
    std::string role;     ///< what it was used for
    std::vector<double> inputs;

    /// One sentence per input outside the passport's range; empty when all lie inside.
    std::vector<std::string> ranges_left() const;
};

} // namespace finwright::sink
