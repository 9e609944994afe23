#pragma once
// A strict reading of a YAML file into a plain tree: scalars stay text, every node knows its place.
// Refused with place and reason: duplicate keys, anchors, aliases, tags, more than one document,
// deep or huge trees, files over 1 MB, folders, bytes that are no UTF-8 text, tabs in the
// indentation, quotes left open at the end of a line.

#include "src/job/input_error.hpp"
#include "src/job/units.hpp"
#include <filesystem>
#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace finwright::job {

struct TreeNode {
    enum class Kind { scalar, sequence, mapping };
    struct Entry;

    Kind kind = Kind::scalar;
    Place place;
    std::string text;            ///< of a scalar
    bool given = true;           ///< false for an empty value ("key:")
    std::vector<TreeNode> items; ///< of a sequence
    std::vector<Entry> entries;  ///< of a mapping, in order
};

struct TreeNode::Entry {
    std::string key;
    Place place;
    TreeNode value;
};

/// A file's text and tree.
struct Document {
    std::string file;
    std::string text;
    TreeNode root;

    [[noreturn]] void fail(Place place, const std::string& reason, const std::string& suggestion,
                           Place against = {}) const {
        throw InputError(file, text, place, reason, suggestion, against);
    }
};

std::string read_text_file(const std::filesystem::path& path);
Document parse_document(std::string file, std::string text);

/// One mapping of a document, read key by key; only() refuses every other key.
class Mapping {
public:
    Mapping(const Document& document, const TreeNode& node, std::string what);

    bool has(std::string_view key) const { return find(key) != nullptr; }
    Place place_of(std::string_view key) const;
    Place place() const { return node_.place; }

    const TreeNode& required(std::string_view key);
    const TreeNode* optional(std::string_view key);

    std::string text(std::string_view key);
    std::optional<std::string> optional_text(std::string_view key);
    double number(std::string_view key, const QuantityKind& kind);
    std::optional<double> optional_number(std::string_view key, const QuantityKind& kind);

    /// Refuses every key not in the list, with the nearest one that is.
    void only(const std::vector<std::string>& keys) const;

    [[noreturn]] void fail(std::string_view key, const std::string& reason,
                           const std::string& suggestion, Place against = {}) const;

private:
    const TreeNode::Entry* find(std::string_view key) const;

    const Document& document_;
    const TreeNode& node_;
    std::string what_;
};

/// A scalar node as a quantity.
double quantity_of(const Document& document, const TreeNode& node, const std::string& what,
                   const QuantityKind& kind);

} // namespace finwright::job
