#include "src/job/document.hpp"

#include "src/job/nearest_word.hpp"
#include <algorithm>
#include <fmt/format.h>
#include <fstream>
#include <sstream>
#include <yaml-cpp/eventhandler.h>
#include <yaml-cpp/yaml.h>

namespace finwright::job {

namespace {

constexpr std::size_t largest_file = std::size_t(1024) * 1024;
constexpr std::size_t longest_line = 300;
constexpr std::size_t deepest = 12;
constexpr std::size_t most_nodes = 20000;

/// The lines of a text, for looking up places without counting again.
class Lines {
public:
    explicit Lines(std::string_view text) : text_(text) {
        for (std::size_t at = 0; at < text.size(); ++at)
            if (text[at] == '\n') begins_.push_back(at + 1);
    }

    /// The bytes from a place to the end of its line.
    std::string_view rest(Place place) const {
        const std::size_t line = std::size_t(place.line - 1);
        if (line >= begins_.size()) return {};
        const std::size_t begin =
            std::min(text_.size(), begins_[line] + std::size_t(place.column - 1));
        return text_.substr(begin, text_.find('\n', begin) - begin);
    }

private:
    std::string_view text_;
    std::vector<std::size_t> begins_{0};
};

Place place_at(std::string_view text, std::size_t byte) {
    const std::string_view before = text.substr(0, byte);
    const std::size_t last = before.rfind('\n');
    return {int(std::count(before.begin(), before.end(), '\n')) + 1,
            int(last == std::string_view::npos ? byte + 1 : byte - last)};
}

/// Length of the UTF-8 character that starts here (RFC 3629), 0 if none does.
std::size_t character_length(std::string_view text, std::size_t at) {
    const auto byte = [&](std::size_t i) {
        return i < text.size() ? static_cast<unsigned char>(text[i]) : 0u;
    };
    const unsigned first = byte(at);
    if (first < 0x80) return 1;
    const std::size_t length = first >= 0xf0 ? 4 : first >= 0xe0 ? 3 : 2;
    if (first < 0xc2 || first > 0xf4) return 0;
    for (std::size_t i = 1; i < length; ++i)
        if ((byte(at + i) & 0xc0) != 0x80) return 0;
    const unsigned second = byte(at + 1);
    const bool overlong = (first == 0xe0 && second < 0xa0) || (first == 0xf0 && second < 0x90);
    const bool surrogate = first == 0xed && second > 0x9f;
    const bool beyond = first == 0xf4 && second > 0x8f;
    return overlong || surrogate || beyond ? 0 : length;
}

bool is_control(char c) {
    return (static_cast<unsigned char>(c) < 0x20 && c != '\t' && c != '\n' && c != '\r') ||
           c == 0x7f;
}

/// What YAML readers stumble over without saying so.
void check_text(const Document& document) {
    const std::string& text = document.text;
    bool indentation = true;
    for (std::size_t at = 0; at < text.size();) {
        const std::size_t length = character_length(text, at);
        if (length == 0 || is_control(text[at]))
            document.fail(place_at(text, at), "the file holds a byte that is not UTF-8 text",
                          "save it as plain UTF-8 text");
        if (indentation && text[at] == '\t')
            document.fail(place_at(text, at), "a tab stands in the indentation",
                          "indent with spaces");
        indentation = text[at] == '\n' || (indentation && text[at] == ' ');
        at += length;
    }
}

/// Builds the tree from yaml-cpp's events, which show what its node interface hides.
class TreeBuilder final : public YAML::EventHandler {
public:
    explicit TreeBuilder(const Document& document) : document_(document), lines_(document.text) {}

    TreeNode take() { return std::move(root_); }
    bool found() const { return found_; }

    void OnDocumentStart(const YAML::Mark& mark) override {
        if (found_)
            document_.fail(place(mark), "the file holds more than one document ('---')",
                           "keep one job a file");
    }
    void OnDocumentEnd() override {}

    void OnNull(const YAML::Mark& mark, YAML::anchor_t anchor) override {
        refuse_anchor(mark, anchor);
        TreeNode node;
        node.place = place(mark);
        node.given = false;
        add(std::move(node));
    }

    void OnAlias(const YAML::Mark& mark, YAML::anchor_t) override {
        document_.fail(place(mark), "aliases (*name) are not accepted", "write the value out");
    }

    void OnScalar(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
                  const std::string& value) override {
        refuse_anchor(mark, anchor);
        refuse_tag(mark, tag);
        refuse_open_quote(place(mark));
        TreeNode node;
        node.place = place(mark);
        node.text = value;
        add(std::move(node));
    }

    void OnSequenceStart(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
                         YAML::EmitterStyle::value) override {
        open(mark, tag, anchor, TreeNode::Kind::sequence);
    }
    void OnSequenceEnd() override { close(); }

    void OnMapStart(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
                    YAML::EmitterStyle::value) override {
        open(mark, tag, anchor, TreeNode::Kind::mapping);
    }
    void OnMapEnd() override { close(); }

private:
    struct Open {
        TreeNode node;
        std::optional<TreeNode::Entry> pending; ///< a key waiting for its value
    };

    static Place place(const YAML::Mark& mark) { return {mark.line + 1, mark.column + 1}; }

    void refuse_anchor(const YAML::Mark& mark, YAML::anchor_t anchor) const {
        if (anchor != 0)
            document_.fail(place(mark), "anchors (&name) are not accepted",
                           "write the value where it is needed");
    }
    void refuse_tag(const YAML::Mark& mark, const std::string& tag) const {
        if (!tag.empty() && tag != "?" && tag != "!")
            document_.fail(place(mark), fmt::format("tags ({}) are not accepted", tag),
                           "leave the tag out");
    }

    /// A quote without its partner would swallow the lines below it.
    void refuse_open_quote(Place at) const {
        const std::string_view rest = lines_.rest(at);
        if (rest.empty() || (rest.front() != '"' && rest.front() != '\'')) return;
        const char quote = rest.front();
        for (std::size_t i = 1; i < rest.size(); ++i) {
            if (quote == '"' && rest[i] == '\\')
                ++i;
            else if (rest[i] == quote)
                return;
        }
        document_.fail(at, "the quote opened here is not closed in the same line",
                       "close it, or leave the quotes out");
    }

    void open(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
              TreeNode::Kind kind) {
        refuse_anchor(mark, anchor);
        refuse_tag(mark, tag);
        if (stack_.size() >= deepest)
            document_.fail(place(mark), fmt::format("nested more than {} deep", deepest),
                           "a job needs no more than five levels");
        TreeNode node;
        node.kind = kind;
        node.place = place(mark);
        stack_.push_back({std::move(node), std::nullopt});
    }

    void close() {
        TreeNode done = std::move(stack_.back().node);
        stack_.pop_back();
        add(std::move(done));
    }

    void add(TreeNode node) {
        if (++count_ > most_nodes)
            document_.fail(node.place, fmt::format("more than {} entries", most_nodes),
                           "a job file is a few dozen lines");
        if (stack_.empty()) {
            root_ = std::move(node);
            found_ = true;
            return;
        }
        Open& parent = stack_.back();
        if (parent.node.kind == TreeNode::Kind::sequence) {
            parent.node.items.push_back(std::move(node));
        } else if (!parent.pending) {
            begin_entry(parent, node);
        } else {
            parent.pending->value = std::move(node);
            parent.node.entries.push_back(std::move(*parent.pending));
            parent.pending.reset();
        }
    }

    void begin_entry(Open& parent, const TreeNode& key) const {
        if (key.kind != TreeNode::Kind::scalar)
            document_.fail(key.place, "a key must be plain text", "write for example power: 18 W");
        for (const TreeNode::Entry& entry : parent.node.entries)
            if (entry.key == key.text)
                document_.fail(
                    key.place,
                    fmt::format("'{}' stands here a second time; the first is in line {}", key.text,
                                entry.place.line),
                    "keep one of them", entry.place);
        parent.pending = TreeNode::Entry{key.text, key.place, {}};
    }

    const Document& document_;
    Lines lines_;
    TreeNode root_;
    bool found_ = false;
    std::vector<Open> stack_;
    std::size_t count_ = 0;
};

std::string kind_name(TreeNode::Kind kind) {
    switch (kind) {
    case TreeNode::Kind::scalar:
        return "a single value";
    case TreeNode::Kind::sequence:
        return "a list";
    case TreeNode::Kind::mapping:
        return "a group of keys";
    }
    return {};
}

std::string listed(const std::vector<std::string>& words) {
    std::string text;
    for (const std::string& word : words)
        text += (text.empty() ? "" : ", ") + word;
    return text;
}

} // namespace

std::string read_text_file(const std::filesystem::path& path) {
    std::error_code error;
    const std::string name = path.string();
    const auto status = std::filesystem::status(path, error);
    if (!std::filesystem::exists(status))
        throw InputError(name, {}, {}, "there is no such file", "check the path");
    if (std::filesystem::is_directory(status))
        throw InputError(name, {}, {}, "this is a folder, not a job file", "name the file in it");
    std::ifstream file(path, std::ios::binary);
    std::string text(largest_file + 1, '\0');
    file.read(text.data(), std::streamsize(text.size()));
    if (!file && !file.eof())
        throw InputError(name, {}, {}, "the file cannot be read", "check its permissions");
    text.resize(std::size_t(file.gcount()));
    if (text.size() > largest_file)
        throw InputError(name, {}, {}, "the file is larger than 1 MB",
                         "a job file is a few dozen lines");
    return text;
}

Document parse_document(std::string file, std::string text) {
    if (text.starts_with("\xef\xbb\xbf")) text.erase(0, 3);
    Document document{std::move(file), std::move(text), {}};
    check_text(document);
    std::istringstream stream(document.text);
    TreeBuilder builder(document);
    try {
        YAML::Parser parser(stream);
        if (!parser.HandleNextDocument(builder) || !builder.found())
            document.fail({1, 1}, "the file is empty",
                          "start from one of the files in configs/jobs");
        parser.HandleNextDocument(builder);
        document.root = builder.take();
    } catch (const YAML::Exception& error) {
        const bool known = !error.mark.is_null();
        document.fail(known ? Place{error.mark.line + 1, error.mark.column + 1} : Place{1, 1},
                      "this is not readable YAML: " + error.msg,
                      "check indentation (spaces, no tabs), colons and quotes around here");
    }
    return document;
}

Mapping::Mapping(const Document& document, const TreeNode& node, std::string what)
    : document_(document), node_(node), what_(std::move(what)) {
    if (node.kind != TreeNode::Kind::mapping)
        document.fail(
            node.place,
            fmt::format("{} must be a group of keys, not {}", what_, kind_name(node.kind)),
            "write key: value lines below it");
}

const TreeNode::Entry* Mapping::find(std::string_view key) const {
    for (const TreeNode::Entry& entry : node_.entries)
        if (entry.key == key) return &entry;
    return nullptr;
}

Place Mapping::place_of(std::string_view key) const {
    const TreeNode::Entry* entry = find(key);
    return entry ? entry->value.place : node_.place;
}

const TreeNode* Mapping::optional(std::string_view key) {
    const TreeNode::Entry* entry = find(key);
    if (!entry) return nullptr;
    if (!entry->value.given)
        document_.fail(entry->place, fmt::format("{} has no value", key),
                       "give it one or leave the key out");
    return &entry->value;
}

const TreeNode& Mapping::required(std::string_view key) {
    if (const TreeNode* node = optional(key)) return *node;
    document_.fail(node_.place, fmt::format("{} lacks '{}'", what_, key),
                   fmt::format("add a line {}: ...", key));
}

std::string Mapping::text(std::string_view key) {
    const TreeNode& node = required(key);
    if (node.kind != TreeNode::Kind::scalar)
        document_.fail(node.place,
                       fmt::format("{} must be a single value, not {}", key, kind_name(node.kind)),
                       fmt::format("write the value behind {}:", key));
    if (node.text.empty())
        document_.fail(node.place, fmt::format("{} is empty", key), "write some text");
    if (std::any_of(node.text.begin(), node.text.end(),
                    [](char c) { return is_control(c) || c == '\n' || c == '\r' || c == '\t'; }))
        document_.fail(node.place, fmt::format("{} must be plain text in one line", key),
                       "leave out line ends, tabs and control characters");
    if (node.text.size() > longest_line)
        document_.fail(node.place, fmt::format("{} is longer than {} bytes", key, longest_line),
                       "shorten it");
    return node.text;
}

std::optional<std::string> Mapping::optional_text(std::string_view key) {
    return has(key) ? std::optional(text(key)) : std::nullopt;
}

double Mapping::number(std::string_view key, const QuantityKind& kind) {
    return quantity_of(document_, required(key), std::string(key), kind);
}

std::optional<double> Mapping::optional_number(std::string_view key, const QuantityKind& kind) {
    return has(key) ? std::optional(number(key, kind)) : std::nullopt;
}

void Mapping::only(const std::vector<std::string>& keys) const {
    for (const TreeNode::Entry& entry : node_.entries) {
        if (std::find(keys.begin(), keys.end(), entry.key) != keys.end()) continue;
        const std::string meant = nearest_word(entry.key, keys);
        document_.fail(entry.place, fmt::format("{} has no key '{}'", what_, entry.key),
                       meant.empty() ? "its keys are: " + listed(keys)
                                     : fmt::format("did you mean '{}'?", meant));
    }
}

void Mapping::fail(std::string_view key, const std::string& reason, const std::string& suggestion,
                   Place against) const {
    document_.fail(place_of(key), reason, suggestion, against);
}

double quantity_of(const Document& document, const TreeNode& node, const std::string& what,
                   const QuantityKind& kind) {
    if (node.kind != TreeNode::Kind::scalar)
        document.fail(node.place,
                      fmt::format("{} must be a single value, not {}", what, kind_name(node.kind)),
                      fmt::format("write for example {}: {}", what, kind.example));
    try {
        return read_quantity(node.text, kind);
    } catch (const UnitError& error) {
        document.fail(node.place, fmt::format("{}: {}", what, error.what()), error.suggestion);
    }
}

} // namespace finwright::job
