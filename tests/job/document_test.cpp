// What the YAML library lets through and the strict reader does not.

#include "src/job/document.hpp"
#include <doctest/doctest.h>
#include <filesystem>
#include <fstream>

using namespace finwright::job;

namespace {

std::string refusal(const std::string& text) {
    try {
        parse_document("job.yaml", text);
    } catch (const InputError& error) {
        return error.what();
    }
    return "accepted";
}

bool says(const std::string& text, const char* part) {
    const std::string message = refusal(text);
    INFO(message);
    const bool found = message.find(part) != std::string::npos;
    CHECK(found);
    return found;
}

} // namespace

TEST_CASE("scalars stay text and know their place") {
    const Document d = parse_document("job.yaml", "a: 010\nb:\n  - yes\n  - 0x1F # hex\n");
    REQUIRE(d.root.entries.size() == 2);
    CHECK(d.root.entries[0].value.text == "010");
    CHECK(d.root.entries[0].value.place.line == 1);
    CHECK(d.root.entries[0].value.place.column == 4);
    REQUIRE(d.root.entries[1].value.items.size() == 2);
    CHECK(d.root.entries[1].value.items[0].text == "yes");
    CHECK(d.root.entries[1].value.items[1].text == "0x1F");
    CHECK(d.root.entries[1].value.items[1].place.line == 4);
    CHECK(d.root.entries[1].value.items[1].place.column == 5);
}

TEST_CASE("a duplicate key shows both lines") {
    CHECK(refusal("a: 1\nb: 2\na: 3\n") ==
          "job.yaml:3:1: 'a' stands here a second time; the first is in line 1\n"
          "    a: 3\n"
          "    ^\n"
          "job.yaml:1:1: it clashes with this line\n"
          "    a: 1\n"
          "    ^\n"
          "keep one of them");
}

TEST_CASE("anchors, aliases, tags and further documents are refused") {
    says("a: &x 1\n", "job.yaml:1:4: anchors (&name) are not accepted");
    says("a: {b: &x [1]}\n", "anchors (&name) are not accepted");
    says("a: !!int 1\n", "tags (tag:yaml.org,2002:int) are not accepted");
    says("a: !odd {b: 1}\n", "tags (!odd) are not accepted");
    says("a: 1\n---\nb: 2\n", "job.yaml:2:1: the file holds more than one document");
    says("a: 1\n...\nb: 2\n", "the file holds more than one document");
}

TEST_CASE("an alias bomb ends at its first anchor") {
    says("a: &a [x, x]\nb: &b [*a, *a]\nc: [*b, *b]\n", "job.yaml:1:4: anchors");
}

TEST_CASE("broken YAML is explained at its place") {
    says("a:\n\tb: 1\n", "job.yaml:2:1: a tab stands in the indentation");
    says("a: 'open\nb: 2\n", "job.yaml:1:4: the quote opened here is not closed in the same line");
    says("a: \"open \\\" b\nb: 2\n", "the quote opened here is not closed in the same line");
    says("a: [1, 2\nb: 3\n", "this is not readable YAML");
    says("a: 1\n b: 2\n", "this is not readable YAML");
    CHECK(refusal("a: 'it''s closed'\nb: \"so \\\" is this\"\n") == "accepted");
}

TEST_CASE("a file that is no text is refused at the byte") {
    says(std::string("a: 1\nb: \0x", 10), "job.yaml:2:4: the file holds a byte that is not UTF-8");
    says("a: \xff\n", "job.yaml:1:4: the file holds a byte that is not UTF-8");
    says("a: \xc0\xaf\n", "not UTF-8");     // overlong, RFC 3629 section 3
    says("a: \xed\xa0\x80\n", "not UTF-8"); // surrogate, RFC 3629 section 3
    says("a: \x1b[31m\n", "not UTF-8");
    CHECK(refusal("\xef\xbb\xbf"
                  "a: 1\r\nb: 2\r\n") == "accepted");
}

TEST_CASE("the caret counts characters, not bytes") {
    CHECK(refusal("µµ: &x 1\n") == "job.yaml:1:5: anchors (&name) are not accepted\n"
                                   "    µµ: &x 1\n"
                                   "        ^\n"
                                   "write the value where it is needed");
}

TEST_CASE("depth, size and emptiness have limits") {
    says(std::string(100000, '['), "nested more than 12 deep");
    std::string many = "a:\n";
    for (int i = 0; i < 21000; ++i)
        many += "  - 1\n";
    says(many, "more than 20000 entries");
    says("", "job.yaml:1:1: the file is empty");
    says("# nothing but a comment\n", "the file is empty");
}

TEST_CASE("an escape in a quoted text cannot reach the terminal") {
    const Document d = parse_document("job.yaml", "a: \"x\\e[31m\"\n");
    Mapping m(d, d.root, "the job file");
    CHECK_THROWS_WITH_AS(m.text("a"), doctest::Contains("plain text in one line"), InputError);
    const InputError error("job.yaml", "", {}, "a\x1b[31m", "");
    CHECK(std::string(error.what()) == "job.yaml: a [31m");
}

TEST_CASE("folders, missing and huge files") {
    const auto folder = std::filesystem::temp_directory_path() / "finwright_document_test";
    std::filesystem::create_directories(folder);
    CHECK_THROWS_WITH_AS(read_text_file(folder), doctest::Contains("is a folder"), InputError);
    CHECK_THROWS_WITH_AS(read_text_file(folder / "none.yaml"), doctest::Contains("no such file"),
                         InputError);
    const auto huge = folder / "huge.yaml";
    std::ofstream(huge) << std::string(1024 * 1024 + 1, '#');
    CHECK_THROWS_WITH_AS(read_text_file(huge), doctest::Contains("larger than 1 MB"), InputError);
    std::filesystem::remove_all(folder);
}
