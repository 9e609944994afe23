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

constexpr std::size_t largest_file = 1024 * 1024;
constexpr std::size_t deepest = 12;
constexpr std::size_t most_nodes = 20000;

/// Builds the tree from yaml-cpp's events, which show what its node interface hides.
class TreeBuilder final : public YAML::EventHandler {
public:
    explicit TreeBuilder(const Document& document) : document_(document) {}

    TreeNode take() { return std::move(root_); }
    bool found() const { return found_; }

    void OnDocumentStart(const YAML::Mark&) override {}
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

    void open(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
              TreeNode::Kind kind) {
        refuse_anchor(mark, anchor);
        refuse_tag(mark, tag);
        if (stack_.size() >= deepest)
            document_.fail(place(mark), fmt::format("nested more than {} deep", deepest), "");
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
            document_.fail(node.place, fmt::format("more than {} entries", most_nodes), "");
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
                    "keep one of them");
        parent.pending = TreeNode::Entry{key.text, key.place, {}};
    }

    const Document& document_;
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
    Document document{std::move(file), std::move(text), {}};
    if (const auto zero = document.text.find('\0'); zero != std::string::npos)
        throw InputError(document.file, {}, {}, "the file is not text: it holds a zero byte", "");
    std::istringstream stream(document.text);
    TreeBuilder builder(document);
    try {
        YAML::Parser parser(stream);
        if (!parser.HandleNextDocument(builder) || !builder.found())
            document.fail({}, "the file is empty", "start from one of the files in configs/jobs");
        document.root = builder.take();
        TreeBuilder second(document);
        if (parser.HandleNextDocument(second))
            document.fail({}, "the file holds more than one document ('---')",
                          "keep one job a file");
    } catch (const YAML::Exception& error) {
        const bool known = !error.mark.is_null();
        document.fail(known ? Place{error.mark.line + 1, error.mark.column + 1} : Place{},
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
                       "");
    if (node.text.empty()) document_.fail(node.place, fmt::format("{} is empty", key), "");
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

void Mapping::fail(std::string_view key, const std::string& reason,
                   const std::string& suggestion) const {
    document_.fail(place_of(key), reason, suggestion);
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
