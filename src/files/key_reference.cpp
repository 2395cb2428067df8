// The reference page of the input files, made from the reader's own tables.
#include <fmt/format.h>

#include "palier/files/case_file.hpp"
#include "palier/files/key_table.hpp"
#include "palier/files/nearest.hpp"
#include "palier/files/source_tree.hpp"

namespace palier::files {
namespace {

std::string value_words(const KeySpec& spec) {
  switch (spec.form) {
    case ValueForm::text:
      return "text";
    case ValueForm::integer:
      return "whole number";
    case ValueForm::choice: {
      return one_of(spec.choices, "`");
    }
    case ValueForm::flag:
      return "`true`";
    case ValueForm::quantity:
      // The kind of a material's value depends on the key above it.
      return spec.presence == "this or points"
                 ? "number with its unit"
                 : fmt::format("{}: {}", words_of(spec.kind).name, words_of(spec.kind).examples);
    case ValueForm::quantities:
      return fmt::format("list, each {}", words_of(spec.kind).name);
    case ValueForm::contact:
      return "`perfect`, a conductance, or a mapping, see below";
    case ValueForm::points:
      return "list of pairs";
    case ValueForm::material:
      return "name or file";
    case ValueForm::sourced:
      return fmt::format("{} with its source: {}", words_of(spec.kind).name, words_of(spec.kind).examples);
    case ValueForm::texts:
      return "list of texts";
    case ValueForm::map:
      return "mapping, see below";
    case ValueForm::maps:
      return "list of mappings, see below";
    default:
      return "list of wall entries";
  }
}

std::string limits(const KeySpec& spec) {
  if (spec.low.empty()) return "";
  return spec.low == spec.high ? spec.low : spec.low + " to " + spec.high;
}

std::string table_text(const KeyTable& table) {
  std::string text = fmt::format("### {}\n\n{}\n\n", table.where.empty() ? "Top level" : table.where, table.about);
  text += "| key | value | limits | presence | meaning |\n| --- | --- | --- | --- | --- |\n";
  for (const KeySpec& spec : table.keys)
    text += fmt::format("| `{}` | {} | {} | {} | {} |\n", spec.key, value_words(spec), limits(spec), spec.presence,
                        spec.meaning);
  return text + "\n";
}

std::string file_text(const FileKeys& file, const std::string& title, const std::string& about) {
  std::string text = "## " + title + "\n\n" + about + "\n\n";
  for (const KeyTable& table : file.tables) text += table_text(table);
  return text;
}

std::string rules() {
  return fmt::format(
      "Input files are YAML mappings in UTF-8: one document, every key once, spaces as indentation, no anchors, "
      "aliases, "
      "merges or tags. At most {} bytes, {} values and {} levels of nesting.\n\n"
      "A number is written with its unit, as in `40 mm`; a bare number where a unit is due is refused. Units are those "
      "of UDUNITS-2 with whole exponents: `W/m2/K`, `W m-2 K-1`, `W/(m2 K)`, `kJ/kg`, `degC`, `degF`, `in`, `min`, "
      "`h`. "
      "Beware that `W/m2 K` is `W/m2` times `K`. `wt%` (or `mass%`) is by mass, `at%` by atoms. A temperature such as "
      "`pour` is one of a thermometer, with the offset of its scale; a difference such as `superheat` is not: `20 "
      "degC` "
      "of superheat is `20 K`. BTU and calories are those of the International Table.\n\n"
      "Limits keep slips of the pen out; they are no advice. Both bounds are allowed.\n\n",
      SourceLimits::bytes, SourceLimits::nodes, SourceLimits::depth);
}

std::string lookup() {
  return "A case names a material by its name or by a file ending in `.yaml`, relative to the case. The file of a name "
         "is "
         "the name with every run of characters other than letters, digits, `.`, `+` and `-` replaced by one `-`, and "
         "`.yaml`: `silica sand, dry` is `silica-sand-dry.yaml`. It is looked up beside the case first, then in the "
         "library's `alloys` or `molds`.";
}

}  // namespace

std::string key_reference() {
  return "# Keys of the input files\n\n<!-- Made from the reader's own tables of keys; a test compares the two. "
         "-->\n\n" +
         rules() + file_text(case_keys(), "Case file", "One section of a casting with its walls.") +
         file_text(alloy_keys(), "Alloy file", lookup()) +
         file_text(mold_keys(), "Mold file",
                   "Found in the same way as alloys. Also for cores, chills, dies and sleeves.");
}

}  // namespace palier::files
