#pragma once
// What a mistyped word was probably meant to be.

#include <string>
#include <string_view>
#include <vector>

namespace finwright::job {

/// The word of the list fewest edits away, capitals, '_' and '-' aside, if
/// that is at most about a third of the longer; empty otherwise.
std::string nearest_word(std::string_view typed, const std::vector<std::string>& words);

} // namespace finwright::job
