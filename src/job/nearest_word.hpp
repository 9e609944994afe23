#pragma once
// What a mistyped word was probably meant to be.

#include <string>
#include <string_view>
#include <vector>

namespace finwright::job {

/// The word of the list fewest edits away, if that is at most a third of its length; empty
/// otherwise.
std::string nearest_word(std::string_view typed, const std::vector<std::string>& words);

} // namespace finwright::job
