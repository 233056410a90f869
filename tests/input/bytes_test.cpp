// Files of any bytes: what is no text, or text of a strange make, is told or read, and never ends the program.
#include <filesystem>
#include <fstream>
#include <sstream>
#include <string>

#include "support/catch.hpp"
#include "vatwright/input/read.hpp"

using namespace vatwright;
namespace {

std::string right(const std::string& name) {
  std::ifstream file(std::string(VATWRIGHT_SOURCE_DIR) + "/tests/refused/" + name, std::ios::binary);
  std::ostringstream text;
  text << file.rdbuf();
  return text.str();
}

ReadResult read_inventory_of(std::string bytes) {
  return read_texts({"site.toml", std::move(bytes), ""}, FileText{"duty.toml", right("right-duty.toml"), ""});
}

/// The first line of what is told.
std::string told(const ReadResult& result) {
  const std::string text = to_text(result.diagnostics, false);
  return text.substr(0, text.find('\n'));
}

std::string times(int n, const std::string& part) {
  std::string text;
  for (int i = 0; i < n; ++i) text += part;
  return text;
}

}  // namespace

TEST_CASE("a byte order mark and line ends of other systems are read as if they were not there", "[input][bytes]") {
  const std::string plain = right("right-inventory.toml");
  std::string crlf;
  for (const char c : plain) crlf += c == '\n' ? std::string("\r\n") : std::string(1, c);
  for (const std::string& bytes : {plain, "\xEF\xBB\xBF" + plain, crlf}) {
    const ReadResult result = read_inventory_of(bytes);
    CHECK(told(result).empty());
    REQUIRE(result.problems.has_value());
    CHECK(result.problems->base.site.vessels.size() == 2);
  }
}

TEST_CASE("what is no text in UTF-8 is told with its place", "[input][bytes]") {
  CHECK(told(read_inventory_of(std::string("\xFF\xFE"
                                           "f\0o\0",
                                           6))) ==
        "site.toml:1:1: found the mark of UTF-16 text; expected a text file in UTF-8");
  CHECK(told(read_inventory_of("format = 1\nnote = \"caf\xE9\"\n")) ==
        "site.toml:2:12: found byte 0xE9, which is not UTF-8; expected a text file in UTF-8");
  CHECK(told(read_inventory_of(std::string("format = 1\n\0\x01\x02", 14))) ==
        "site.toml:2:1: found a zero byte: this is no text file; expected a text file in UTF-8");
  CHECK(told(read_inventory_of("\x89PNG\r\n\x1a\n")) ==
        "site.toml:1:1: found byte 0x89, which is not UTF-8; expected a text file in UTF-8");
}

TEST_CASE("an empty file lacks its tables", "[input][bytes]") {
  const std::string text = to_text(read_inventory_of("").diagnostics, false);
  CHECK(text.find("site.toml:1:1: inventory, format: missing") != text.npos);
  CHECK(text.find("site.toml:1:1: inventory, vessel: missing") != text.npos);
}

TEST_CASE("nesting beyond all use is told, not followed", "[input][bytes]") {
  // The parser's own cap is 256 levels; a dotted key of 150 000 parts ends programs that walk tables by recursion.
  CHECK_FALSE(read_inventory_of("x = " + times(300, "[") + times(300, "]") + "\n").problems.has_value());
  CHECK_FALSE(read_inventory_of("x = " + times(200, "{a=") + "1" + times(200, "}") + "\n").problems.has_value());
  CHECK(told(read_inventory_of("x = " + times(100, "[") + times(100, "]") + "\n")).find("nested more than 64 deep") !=
        std::string::npos);
  const std::string key = "a" + times(150000, ".a");
  for (const std::string& text :
       {key + " = 1\n", "[" + key + "]\n", "[[" + key + "]]\n", "x = { " + key + " = 1 }\n"}) {
    const std::string first = told(read_inventory_of(text));
    CAPTURE(first);
    CHECK(first.find("a key of more than 40 parts joined by dots") != std::string::npos);
  }
  CHECK_FALSE(read_inventory_of("[[[b]]]\n").problems.has_value());
}

TEST_CASE("a huge line is told in a few columns", "[input][bytes]") {
  const std::string text = to_text(read_inventory_of("note = " + std::string(2000000, 'x') + "\n").diagnostics, false);
  CHECK(text.size() < 2000);
  CHECK_FALSE(text.empty());
  const ReadResult much =
      read_inventory_of(right("right-inventory.toml") + "\nnote = \"" + std::string(2000000, 'x') + "\"\n");
  CHECK(to_text(much.diagnostics, false).size() < 2000);
}

TEST_CASE("files that are not there, or are no files, are told by their names", "[input][bytes]") {
  const std::string folder = std::string(VATWRIGHT_SOURCE_DIR) + "/tests/refused";
  const std::string duty = folder + "/right-duty.toml", inventory = folder + "/right-inventory.toml";
  CHECK(told(read_files(folder + "/nowhere.toml", duty)).find("nowhere.toml:1:1: no such file") != std::string::npos);
  CHECK(told(read_files(folder, duty)).find(":1:1: a folder, not a file") != std::string::npos);
  CHECK(told(read_files(inventory, inventory + "/x")).find("a part of the path is not a folder") != std::string::npos);
  CHECK_FALSE(read_files("", "").problems.has_value());
  CHECK(read_files(inventory, duty).problems.has_value());
  CHECK(read_files(inventory, std::nullopt).site.has_value());
}

TEST_CASE("every beginning of a right file is answered", "[input][bytes]") {
  const std::string whole = right("right-inventory.toml");
  for (std::size_t n = 0; n < whole.size(); n += 7) {
    const ReadResult result = read_inventory_of(whole.substr(0, n));
    CHECK(result.problems.has_value() != result.diagnostics.has_errors());
  }
}

TEST_CASE("the sum of a file is that of its bytes", "[input][bytes]") {
  // FIPS 180-4 examples, from memory: SHA-256 of "abc" and of nothing
  CHECK(read_texts({"a", "abc", ""}, FileText{"b", "", ""}).inventory_sha256 ==
        "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
  CHECK(read_texts({"a", "abc", ""}, FileText{"b", "", ""}).duty_sha256 ==
        "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855");
}
