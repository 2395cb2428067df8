// Valid files, damaged at random: whatever comes out is a value, a refused input or a file that cannot be read.
#include <catch2/catch.hpp>
#include <chrono>
#include <random>
#include <string>
#include <vector>

#include "files/scratch.hpp"
#include "palier/base/error.hpp"
#include "palier/files/case_file.hpp"

namespace {

// Portable draws: the distributions of the standard library differ between implementations.
class Damage {
 public:
  explicit Damage(unsigned seed) : engine_(seed) {}

  std::string operator()(std::string text) {
    const std::size_t count = 1 + below(3);
    for (std::size_t i = 0; i < count; ++i) text = once(std::move(text));
    return text;
  }
  std::size_t below(std::size_t bound) { return bound == 0 ? 0 : engine_() % bound; }

 private:
  std::string once(std::string text) {
    const std::size_t at = below(text.size());
    switch (below(7)) {
      case 0:
        return text.insert(at, 1, static_cast<char>(below(256)));
      case 1:
        return text.erase(at, 1 + below(8));
      case 2:
        return text.insert(at, piece());
      case 3:
        return text.replace(at, 1 + below(4), piece());
      case 4:
        return text.substr(0, at);
      default:
        return with_moved_line(text);
    }
  }
  std::string piece() {
    static const std::vector<std::string> pieces{"\n",
                                                 "\n  ",
                                                 "- ",
                                                 ": ",
                                                 "[",
                                                 "]",
                                                 "{",
                                                 "}",
                                                 ",",
                                                 "'",
                                                 "\"",
                                                 "#",
                                                 "|",
                                                 "&a ",
                                                 "*a",
                                                 "!t ",
                                                 "<<: ",
                                                 "? ",
                                                 "---\n",
                                                 "\t",
                                                 "~",
                                                 "-1",
                                                 "0",
                                                 "1e999",
                                                 "nan",
                                                 "1e-300",
                                                 " K",
                                                 " mm",
                                                 " W/m2/K",
                                                 " degC",
                                                 " at%",
                                                 "°",
                                                 "\xC3",
                                                 "..",
                                                 "null",
                                                 "points: ",
                                                 "value: ",
                                                 "source: ''",
                                                 "adiabatic: true",
                                                 "perfect",
                                                 "99999999999999999999",
                                                 "()",
                                                 "^",
                                                 "%"};
    return pieces[below(pieces.size())];
  }
  std::string with_moved_line(const std::string& text) {
    std::vector<std::string> lines;
    for (std::size_t start = 0; start < text.size();) {
      const std::size_t end = std::min(text.find('\n', start), text.size() - 1);
      lines.push_back(text.substr(start, end + 1 - start));
      start = end + 1;
    }
    if (lines.empty()) return text;
    const std::size_t from = below(lines.size());
    const std::string line = lines[from];
    if (below(2) == 0) lines.erase(lines.begin() + static_cast<std::ptrdiff_t>(from));
    lines.insert(lines.begin() + static_cast<std::ptrdiff_t>(below(lines.size() + 1)), line);
    std::string moved;
    for (const std::string& each : lines) moved += each;
    return moved;
  }

  std::mt19937 engine_;
};

}  // namespace

TEST_CASE("damaged files end in a refusal, not in a crash", "[files][mutation]") {
  const palier::test::Scratch scratch;
  std::filesystem::copy(palier::test::library(), scratch.path("library"), std::filesystem::copy_options::recursive);
  std::filesystem::copy(palier::test::fixtures() + "/cases", scratch.path("cases"),
                        std::filesystem::copy_options::recursive);
  const std::string plate = palier::test::edited(palier::test::slurp(palier::test::fixtures() + "/cases/plate.yaml"),
                                                 "pour: 720 degC", "superheat: 60 K");
  for (const std::string alloy : {"dilute", "steel"})
    scratch.write("cases/" + alloy + ".yaml",
                  palier::test::edited(plate, "alloy: test-binary", "alloy: test-" + alloy));
  const std::vector<std::string> cases{"plate", "hollow-cylinder", "sphere", "two-sides", "dilute", "steel"};
  const std::vector<std::string> materials{"library/alloys/test-binary",  "library/alloys/test-dilute",
                                           "library/alloys/test-steel",   "library/alloys/test-pure",
                                           "library/molds/test-sand-dry", "cases/die"};
  Damage damage(20240611);
  int accepted = 0, refused = 0;
  const auto deadline = std::chrono::steady_clock::now() + std::chrono::seconds(10);
  for (int i = 0; i < 1500 && std::chrono::steady_clock::now() < deadline; ++i) {
    const std::string case_path = scratch.path("cases/" + cases[damage.below(cases.size())] + ".yaml");
    const bool in_case = damage.below(3) != 0;
    const std::string damaged = in_case ? case_path : scratch.path(materials[damage.below(materials.size())] + ".yaml");
    const std::string valid = palier::test::slurp(damaged);
    const std::string text = damage(valid);
    std::ofstream(damaged, std::ios::binary) << text;
    const auto start = std::chrono::steady_clock::now();
    try {
      palier::files::read_case(case_path, scratch.path("library"));
      ++accepted;
    } catch (const palier::base::InputError&) {
      ++refused;
    } catch (const palier::base::FileTrouble&) {
      ++refused;
    } catch (const std::exception& error) {
      FAIL_CHECK("escaped: " << error.what() << "\nfrom " << damaged << ":\n" << text);
    }
    const std::chrono::duration<double> taken = std::chrono::steady_clock::now() - start;
    if (taken.count() > 2.0) FAIL_CHECK("took " << taken.count() << " s:\n" << text);
    std::ofstream(damaged, std::ios::binary) << valid;
  }
  // Damage in comments, titles and unused materials does no harm: both outcomes must occur, or the test tests nothing.
  CHECK(accepted > 100);
  CHECK(refused > 100);
}
