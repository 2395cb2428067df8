#include <cstdio>

#include "answer.hpp"
#include "palier/app/commands.hpp"
#include "palier/files/case_file.hpp"
#include "palier/files/result_file.hpp"
#include "palier/freeze/run.hpp"
#include "progress_bar.hpp"
#include "version.hpp"

namespace palier::app {

void run(const RunOptions& options) {
  files::CaseFile input = files::read_case(options.case_file, options.library);
  freeze::Result result;
  {
    ProgressBar bar(!options.quiet);
    result = freeze::run(input.section, [&bar](double share) { bar.show(share); });
  }
  input.section.path = result.path;  // under back-diffusion the case alone does not know it
  if (!options.output.empty())
    files::write_result(options.output, input, result, {version(), commit(), options.command_line});
  std::fputs((options.json ? answer_json(input, result) : answer_table(input, result)).c_str(), stdout);
  if (!options.json && !options.output.empty()) std::printf("\nResult file: %s\n", options.output.c_str());
}

}  // namespace palier::app
