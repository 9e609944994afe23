#pragma once
// A table in plain text: first column left, the rest right, two spaces between, indented by two.

#include <string>
#include <vector>

namespace finwright::sheets {

class TextTable {
public:
    void row(std::vector<std::string> cells) { rows_.push_back(std::move(cells)); }
    /// Columns that stand left instead of right; the first always does.
    void left(std::size_t column) { left_.push_back(column); }
    std::string text() const;

private:
    std::vector<std::vector<std::string>> rows_;
    std::vector<std::size_t> left_{0};
};

/// Columns a UTF-8 text takes on a terminal, each code point one.
std::size_t columns_of(const std::string& text);

/// Text broken at spaces into lines of at most `width` columns, later lines indented.
std::string wrapped(const std::string& text, std::size_t width, const std::string& first,
                    const std::string& later);

} // namespace finwright::sheets
