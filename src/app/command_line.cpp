#include <fmt/format.h>

#include <CLI/CLI.hpp>
#include <algorithm>
#include <cstdio>
#include <exception>
#include <string>
#include <vector>

#include "library_folder.hpp"
#include "palier/app/commands.hpp"
#include "palier/base/error.hpp"
#include "palier/files/case_file.hpp"
#include "palier/files/nearest.hpp"
#include "version.hpp"

namespace palier::app {
namespace {

/// What is wrong with the first word of the command line; empty where it is an option or a command.
std::string wrong_command(const CLI::App& program, int argc, char** argv) {
  std::vector<std::string> names;
  for (const CLI::App* command : program.get_subcommands({})) names.push_back(command->get_name());
  if (argc < 2)
    return "no command given; expected one of: " + fmt::format("{}", fmt::join(names, ", ")) + "\nSee palier --help";
  if (argv[1][0] == '-') return {};
  const std::string word = argv[1];
  if (std::find(names.begin(), names.end(), word) != names.end()) return {};
  const std::string near = files::did_you_mean(word, names);
  return "unknown command '" + word + "'; expected one of: " + fmt::format("{}", fmt::join(names, ", ")) +
         (near.empty() ? "" : "; " + near);
}

int dispatch(int argc, char** argv) {
  CLI::App program(
      "How a casting section freezes: temperature and fraction solid through plate, cylinder or sphere with "
      "its mold.\nExample: palier run cases/castings/cover-rim-sand.yaml -o cover.h5",
      "palier");
  program.set_version_flag("--version", "palier " + version() + " (" + commit() + ")");
  program.require_subcommand(1);

  CheckOptions check_options;
  RunOptions run_options;
  bool reference = false;
  CLI::App* check_command =
      program.add_subcommand("check",
                             "Read a case, resolve it and show every value with its source; solve nothing.\n"
                             "Example: palier check cases/castings/cover-rim-sand.yaml");
  check_command->add_option("CASE", check_options.case_file, "Case file (YAML)");
  check_command->add_flag("--reference", reference, "Print the reference of all keys (Markdown) instead");
  CLI::App* run_command =
      program.add_subcommand("run",
                             "Run a case: print its times with their numerical error, write the whole history.\n"
                             "Example: palier run cases/castings/cover-rim-sand.yaml -o cover.h5");
  run_command->add_option("CASE", run_options.case_file, "Case file (YAML)")->required();
  run_command->add_option("-o,--output", run_options.output, "Result file (HDF5, also netCDF-4); none unless given");
  run_command->add_flag("--json", run_options.json, "Answer as JSON instead of a table");
  run_command->add_flag("--quiet", run_options.quiet, "No progress bar");
  AlloyOptions alloy_options;
  CLI::App* alloy_command = program.add_subcommand(
      "alloy",
      "How an alloy freezes: liquidus, end of freezing by each rule, arrests with their fractions.\n"
      "Example: palier alloy Al-4.5Cu --composition 'Cu 5 %' --table");
  alloy_command->add_option("NAME", alloy_options.name, "Alloy of the library or beside, or a file ending in .yaml")
      ->required();
  alloy_command->add_option("--composition", alloy_options.composition,
                            "Such as 'Cu 5 %' or 'Si 7.4 %, Mg 0.35 %'; default: that of the file");
  alloy_command->add_option("--path", alloy_options.rule, "Rule told in detail; default: that of the file");
  alloy_command->add_option("--cooling-rate", alloy_options.cooling_rate,
                            "Mean rate over freezing, such as '1 K/s': adds the rules of back-diffusion");
  alloy_command->add_option("--diagram", alloy_options.diagram, "Draw diagram and path to a file, .png or .svg");
  alloy_command->add_flag("--table", alloy_options.table, "Add fraction solid against temperature");
  alloy_command->add_flag("--json", alloy_options.json, "Answer as JSON instead of a table");
  std::string library;
  for (CLI::App* command : {check_command, run_command, alloy_command})
    command->add_option("--library", library, "Folder with alloys/ and molds/; default: the shipped cases");

  if (const std::string wrong = wrong_command(program, argc, argv); !wrong.empty()) throw base::InputError(wrong);
  try {
    program.parse(argc, argv);
  } catch (const CLI::Success& success) {  // --help, --version
    return program.exit(success);
  } catch (const CLI::ParseError& error) {
    const std::vector<CLI::App*> chosen = program.get_subcommands();
    throw base::InputError(std::string(error.what()) + "\nSee palier " +
                           (chosen.empty() ? "" : chosen.front()->get_name() + " ") + "--help");
  }
  if (check_command->parsed() && reference) {
    std::fputs(files::key_reference().c_str(), stdout);
    return done;
  }
  const std::string folder = library.empty() ? library_folder() : library;
  if (alloy_command->parsed()) {
    alloy_options.library = folder;
    show_alloy(alloy_options);
  } else if (check_command->parsed()) {
    if (check_options.case_file.empty()) throw base::InputError("palier check needs a CASE\nSee palier check --help");
    check_options.library = folder;
    check(check_options);
  } else {
    run_options.library = folder;
    for (int i = 0; i < argc; ++i)
      run_options.command_line += (i > 0 ? " " : "") + std::string(i > 0 ? argv[i] : "palier");
    run(run_options);
  }
  return done;
}

}  // namespace

int main(int argc, char** argv) {
  const auto told = [](const char* what, ExitStatus status) {
    fmt::print(stderr, "palier: {}\n", what);
    return status;
  };
  try {
    return dispatch(argc, argv);
  } catch (const base::InputError& e) {
    return told(e.what(), input_refused);
  } catch (const base::NoSolution& e) {
    return told(e.what(), no_solution);
  } catch (const base::FileTrouble& e) {
    return told(e.what(), file_trouble);
  } catch (const std::exception& e) {
    fmt::print(stderr, "palier: internal error: {}\n", e.what());
    return internal_error;
  }
}

}  // namespace palier::app
