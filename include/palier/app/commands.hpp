// The commands of the palier program.
#pragma once

#include <string>

namespace palier::app {

/// Exit statuses of the program.
enum ExitStatus { done = 0, input_refused = 2, no_solution = 3, file_trouble = 4, internal_error = 70 };

struct CheckOptions {
  std::string case_file;
  std::string library;  ///< folder of alloys and molds
};

struct RunOptions {
  std::string case_file;
  std::string library;
  std::string output;        ///< result file; empty: none
  bool json = false;         ///< answer for programs instead of the table
  bool quiet = false;        ///< no progress bar
  std::string command_line;  ///< for the provenance
};

struct AlloyOptions {
  std::string name;  ///< in the library or beside, or a file ending in .yaml
  std::string library;
  std::string composition;   ///< "Cu 4.5 %"; empty: that of the file
  std::string rule;          ///< of the path told in detail; empty: the file's default
  std::string cooling_rate;  ///< "1 K/s": adds the rules of back-diffusion; empty: none
  std::string diagram;       ///< picture to draw, .png or .svg; empty: none
  bool table = false;        ///< fraction solid against temperature
  bool json = false;
};

/// Reads and resolves a case and prints it with the source of every value; solves nothing.
void check(const CheckOptions& options);

/// Runs a case; prints the table or JSON and writes the result file.
void run(const RunOptions& options);

/// How an alloy freezes: liquidus, end of freezing by each rule, arrests, path.
void show_alloy(const AlloyOptions& options);

/// Parses the command line, runs what it asks for, prints errors to stderr. Returns the exit status.
int main(int argc, char** argv);

}  // namespace palier::app
