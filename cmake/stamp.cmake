# Version and commit in one generated header, looked up on every build but rewritten only when they change, so that
# nothing is compiled again for no reason. Included by CMakeLists.txt; run by the target as a script (cmake -P).
if(CMAKE_SCRIPT_MODE_FILE)
  set(PALIER_COMMIT unknown)
  find_package(Git QUIET)
  if(GIT_FOUND)
    # Empty only where the top folder of the checkout is ours: an unpacked archive may lie inside another repository.
    execute_process(COMMAND ${GIT_EXECUTABLE} rev-parse --show-prefix WORKING_DIRECTORY ${source_dir}
                    OUTPUT_VARIABLE prefix RESULT_VARIABLE status OUTPUT_STRIP_TRAILING_WHITESPACE ERROR_QUIET)
    if(status EQUAL 0 AND prefix STREQUAL "")
      execute_process(COMMAND ${GIT_EXECUTABLE} describe --always --dirty --abbrev=12 WORKING_DIRECTORY ${source_dir}
                      OUTPUT_VARIABLE described RESULT_VARIABLE status OUTPUT_STRIP_TRAILING_WHITESPACE ERROR_QUIET)
      if(status EQUAL 0)
        set(PALIER_COMMIT ${described})
      endif()
    endif()
  endif()
  file(CONFIGURE OUTPUT ${stamp} @ONLY CONTENT [[
// Made by cmake/stamp.cmake on every build; not to be edited.
#pragma once

#define PALIER_VERSION "@version@"
#define PALIER_COMMIT "@PALIER_COMMIT@"
]])
  return()
endif()

set(stamp_dir ${PROJECT_BINARY_DIR}/stamp)
add_custom_target(palier_stamp
  COMMAND ${CMAKE_COMMAND} -D source_dir=${PROJECT_SOURCE_DIR} -D version=${PROJECT_VERSION}
          -D stamp=${stamp_dir}/palier_stamp.hpp -P ${CMAKE_CURRENT_LIST_FILE}
  BYPRODUCTS ${stamp_dir}/palier_stamp.hpp
  COMMENT "Looking up the commit")
add_dependencies(palier_app palier_stamp)
target_include_directories(palier_app PRIVATE ${stamp_dir})
