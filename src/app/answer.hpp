// The answer of a run, as a table for a person and as JSON for a program.
#pragma once

#include <string>

#include "palier/files/case_file.hpp"
#include "palier/freeze/result.hpp"

namespace palier::app {

/// What every output that a decision may rest on ends with.
std::string caution();

std::string answer_table(const files::CaseFile& input, const freeze::Result& result);
std::string answer_json(const files::CaseFile& input, const freeze::Result& result);

}  // namespace palier::app
