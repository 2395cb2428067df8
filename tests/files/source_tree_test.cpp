#include "palier/files/source_tree.hpp"

#include <catch2/catch.hpp>
#include <chrono>
#include <filesystem>
#include <string>

#include "files/scratch.hpp"

using palier::base::InputError;
using palier::files::parse_source;
using palier::files::read_source_file;
using palier::files::SourceLimits;
using palier::files::SourceNode;

namespace {

std::string refusal(const std::string& text) {
  try {
    parse_source(text, "c.yaml");
  } catch (const InputError& error) {
    return error.what();
  }
  return "accepted";
}

std::string repeated(const std::string& unit, std::size_t bytes) {
  std::string text;
  while (text.size() < bytes) text += unit;
  return text;
}

}  // namespace

TEST_CASE("the tree keeps text, quotes and places", "[files][yaml]") {
  const SourceNode root =
      parse_source("a: 1\n# °\n\"b c\":\n  - x: 'z'\n  - °°: [1, \"2\"]\nn:\nt: |\n  hello\n", "c.yaml");
  REQUIRE(root.keys.size() == 4);
  CHECK(root.find("a")->text == "1");
  CHECK_FALSE(root.find("a")->quoted);
  const SourceNode& list = *root.find("b c");
  REQUIRE(list.items.size() == 2);
  const SourceNode& z = *list.items[0].find("x");
  CHECK((z.text == "z" && z.quoted && z.line == 4 && z.column == 8));
  // Columns count characters, not bytes.
  const SourceNode& pair = *list.items[1].find("°°");
  CHECK((pair.line == 5 && pair.column == 9));
  CHECK((pair.items[1].text == "2" && pair.items[1].column == 13));
  // An absent value stands where its key does, not where the next token happens to be.
  const SourceNode& nothing = *root.find("n");
  CHECK((nothing.kind == SourceNode::Kind::nothing && nothing.line == 6 && nothing.column == 1));
  CHECK(root.find("t")->text == "hello\n");
  CHECK(root.find("absent") == nullptr);
}

TEST_CASE("line ends of other systems and a byte order mark are fine", "[files][yaml]") {
  const SourceNode root = parse_source(
      "\xEF\xBB\xBF"
      "a: 1\r\nb:\r\n  c: 2\r\n",
      "c.yaml");
  CHECK(root.find("a")->text == "1");
  const SourceNode& c = *root.find("b")->find("c");
  CHECK((c.text == "2" && c.line == 3 && c.column == 6));
  CHECK(refusal("a: 1\r\nb: 2\r\na: 3\r\n") ==
        "c.yaml:3:1: found the key 'a' again; it stands first on line 1; keep one of the two");
}

TEST_CASE("what a case has no use for is refused at its place", "[files][yaml][errors]") {
  struct Row {
    std::string text, message;
  };
  const auto row = GENERATE(values<Row>({
      {"a: 1\n---\nb: 2\n",
       "c.yaml:2:1: found text after the end of the mapping; expected one YAML document; remove '---' and what "
       "follows, "
       "or indent it as the lines above"},
      {"a: 1\nb: 2\na: 3\n", "c.yaml:3:1: found the key 'a' again; it stands first on line 1; keep one of the two"},
      {"a: {x: 1, x: 2}\n", "c.yaml:1:11: found the key 'x' again; it stands first on line 1; keep one of the two"},
      {"a: &x 1\n",
       "c.yaml:1:4: found an anchor (&) or alias (*); expected the value itself; write the value out, or put text that "
       "begins with & or * in quotes"},
      {"a: *x\n", "c.yaml:1:4: found an alias (*); expected the value itself; put text that begins with * in quotes"},
      {"a: &a [*a]\n",
       "c.yaml:1:4: found an anchor (&) or alias (*); expected the value itself; write the value out, or put text that "
       "begins with & or * in quotes"},
      {"<<: {a: 1}\n", "c.yaml:1:1: found the merge key '<<'; expected a key of the file's own; write the values out"},
      {"a: !!str 1\n", "c.yaml:1:4: found a tag (!); expected a plain value; put text that begins with ! in quotes"},
      {"? [a, b]\n: 1\n", "c.yaml:1:3: found a list or mapping as a key; expected a text"},
      {"{a: 1}: 2\n", "c.yaml:1:1: found a list or mapping as a key; expected a text"},
      {": 1\n", "c.yaml:1:1: found an empty key; expected a text"},
      {"a:\n\tb: 1\n", "c.yaml:2:1: found a tab in the indentation; expected spaces; indent with spaces"},
      {"a:\n  \tb: 1\n", "c.yaml:2:3: found a tab in the indentation; expected spaces; indent with spaces"},
      {"a:1\nb: 2\n",
       "c.yaml:2:2: found a ':' where no key can stand; is a space missing after ':' on the line above?"},
      {"a: b: c\n", "c.yaml:1:5: found a ':' where no key can stand; put text that contains ': ' in quotes"},
      {"a: 1\n b: 2\n", "c.yaml:2:3: found a ':' where no key can stand; is this line indented as the keys above it?"},
      {"a: 1\n- b\n",
       "c.yaml:2:1: found a line whose indentation fits none of the lines above; indent it as its neighbors"},
      {"a: 1\nb: [1, 2\n", "c.yaml:2:4: found a '[' that is not closed; close it with ']'"},
      {"a: 1\nb: {x: 1\n", "c.yaml:2:4: found a '{' that is not closed; close it with '}'"},
      {"a: ]\n", "c.yaml:1:4: found a ']' or '}' that nothing opened; remove it"},
      {"a: \"x\n", "c.yaml:1:4: found a quote that is not closed; close it"},
      {"a: 'it''s\nb: 1\n", "c.yaml:1:4: found a quote that is not closed; close it"},
      {"a: @x\n", "c.yaml:1:4: found a character that cannot begin a value; put the text in quotes"},
      {"a: - b\n", "c.yaml:1:4: found a '-' where no list can begin; begin the list on a line of its own"},
      {"a: \"x\\0y\"\n", "c.yaml:1:4: found a control character in a text; expected a plain text"},
      {"",
       "c.yaml: found an empty file; expected keys with values; an input file begins with its version, such as "
       "'palier: 1'"},
      {" \n\n",
       "c.yaml: found an empty file; expected keys with values; an input file begins with its version, such "
       "as 'palier: 1'"},
      {"# nothing\n", "c.yaml: found no keys; expected a mapping of keys to values"},
      {"- a\n",
       "c.yaml:1:1: found a list; expected a mapping of keys to values; write 'key: value', with a space after the "
       "':'"},
      {"a:1\n",
       "c.yaml:1:1: found a text; expected a mapping of keys to values; write 'key: value', with a space after the "
       "':'"},
      {"a: caf\xE9\n",
       "c.yaml:1:7: found the byte 0xE9, which is not UTF-8; expected a UTF-8 text; save the file as UTF-8"},
      {"a: \xC0\x80\n",
       "c.yaml:1:4: found the byte 0xC0, which is not UTF-8; expected a UTF-8 text; save the file as UTF-8"},
      {"a: \xED\xA0\x80\n",
       "c.yaml:1:4: found the byte 0xED, which is not UTF-8; expected a UTF-8 text; save the file as UTF-8"},
      {std::string("a: 1\0\n", 6),
       "c.yaml:1:5: found the control byte 0x00; expected a text file; is this a binary file?"},
      {"\xFF\xFE"
       "a",
       "c.yaml:1:1: found the byte 0xFF, which is not UTF-8; expected a UTF-8 text; save the file as UTF-8"},
      {"\x89HDF\r\n\x1A\n",
       "c.yaml:1:1: found the byte 0x89, which is not UTF-8; expected a UTF-8 text; save the file as UTF-8"},
  }));
  CAPTURE(row.text);
  CHECK(refusal(row.text) == row.message);
}

TEST_CASE("nesting, number of values and size are bounded", "[files][yaml][limits]") {
  const auto nested = [](int depth) {
    return "a: " + std::string(static_cast<std::size_t>(depth), '[') +
           std::string(static_cast<std::size_t>(depth), ']');
  };
  CHECK(refusal(nested(SourceLimits::depth - 1)) == "accepted");
  CHECK(refusal(nested(SourceLimits::depth)) == "c.yaml:1:43: found more than 40 levels of nesting; expected fewer");
  CHECK_THAT(refusal("a: [" + repeated("1, ", 3 * SourceLimits::nodes) + "]"),
             Catch::Contains("found more than 200000 values; expected a smaller file"));
  CHECK_THAT(refusal(repeated("# comment\n", SourceLimits::bytes + 10)),
             Catch::Contains("found more than 8000000 bytes; expected a smaller file"));
}

TEST_CASE("crafted text ends soon with a refusal", "[files][yaml][limits]") {
  const auto unit =
      GENERATE(as<std::string>(), "[", "{", "- ", "? ", ": ", ",", "a: ", "[]", "[a,", "\"", "'", "|", ">", "!", "&a ",
               "*a ", "%", "- -\n", "?\n", "-\n", ":\n", "---\n", "[\n", "{a: ", "{? ", "{:", "@", "\"\"", "!<a> ",
               "|\n", "\"a\"\n", "\"\\", "...\n[", "a:\n ", "[[],", "a\n", "- \n ");
  const auto prefix = GENERATE(as<std::string>(), "", "a: ", "a:\n  ", "a: [");
  CAPTURE(unit, prefix);
  const std::string text = prefix + repeated(unit, 1'000'000);
  const auto start = std::chrono::steady_clock::now();
  CHECK(refusal(text) != "accepted");
  const std::chrono::duration<double> taken = std::chrono::steady_clock::now() - start;
  // Measured: below 0.5 s a text in a debug build. The bound leaves room for sanitizers on a busy machine.
  CHECK(taken.count() < 10.0);
}

TEST_CASE("a file that is no readable file is refused by name", "[files][errors]") {
  const palier::test::Scratch scratch;
  scratch.write("rim.yaml", "a: 1\n");
  const auto message = [&](const std::string& name) {
    try {
      read_source_file(scratch.path(name), "case file");
    } catch (const InputError& error) {
      return scratch.without_folders(error.what());
    }
    return std::string("accepted");
  };
  CHECK(message("rim.yaml") == "accepted");
  CHECK(message("rym.yaml") == "rym.yaml: found no such file; expected a case file; did you mean 'rim.yaml'?");
  CHECK(message("no/such/folder.yaml") == "no/such/folder.yaml: found no such file; expected a case file");
  std::filesystem::create_directory(scratch.path("folder"));
  CHECK(message("folder") == "folder: found a folder; expected a case file");
  CHECK_THROWS_WITH(read_source_file("/dev/zero", "case file"),
                    "/dev/zero: found a pipe or device; expected a case file; save it as a file");
  CHECK_THROWS_AS(read_source_file("", "case file"), InputError);
  CHECK_THROWS_AS(read_source_file(std::string(5000, 'x'), "case file"), palier::base::FileTrouble);
}
