#include "src/job/nearest_word.hpp"

#include <algorithm>
#include <cctype>
#include <numeric>

namespace finwright::job {

namespace {

char plain(char c) {
    if (c == '_' || c == ' ') return '-';
    return char(std::tolower(static_cast<unsigned char>(c)));
}

std::size_t edits(std::string_view a, std::string_view b) {
    std::vector<std::size_t> row(b.size() + 1);
    std::iota(row.begin(), row.end(), 0);
    for (std::size_t i = 1; i <= a.size(); ++i) {
        std::size_t diagonal = row[0];
        row[0] = i;
        for (std::size_t j = 1; j <= b.size(); ++j) {
            const std::size_t replaced = diagonal + (plain(a[i - 1]) == plain(b[j - 1]) ? 0 : 1);
            diagonal = row[j];
            row[j] = std::min({row[j] + 1, row[j - 1] + 1, replaced});
        }
    }
    return row[b.size()];
}

/// One- and two-letter words say little: only capitals, or one letter of two, may be wrong.
std::size_t allowed_edits(std::size_t a, std::size_t b) {
    const std::size_t longer = std::max(a, b);
    if (longer <= 2) return a == b ? longer - 1 : 0;
    return (longer + 1) / 3;
}

} // namespace

std::string nearest_word(std::string_view typed, const std::vector<std::string>& words) {
    std::string best;
    std::size_t least = std::string_view::npos;
    for (const std::string& word : words) {
        const std::size_t distance = edits(typed, word);
        if (distance > allowed_edits(typed.size(), word.size())) continue;
        if (distance < least) {
            least = distance;
            best = word;
        }
    }
    return best;
}

} // namespace finwright::job
