# One call per layer: a static library from src/<name>/*.cpp whose public headers lie in include/palier/<name>.
add_library(palier_options INTERFACE)
target_compile_options(palier_options INTERFACE -Wall -Wextra -Wpedantic -Wshadow -Wconversion -Wno-sign-conversion
                                                $<$<BOOL:${PALIER_WERROR}>:-Werror>)
# g++ 12 sees an overlap in "text" + std::string that is not there (gcc.gnu.org bug 105651), only where it optimizes.
target_compile_options(palier_options INTERFACE
  $<$<AND:$<CXX_COMPILER_ID:GNU>,$<VERSION_LESS:$<CXX_COMPILER_VERSION>,13>>:-Wno-restrict>)
if(PALIER_SANITIZE)
  target_compile_options(palier_options INTERFACE -fsanitize=${PALIER_SANITIZE} -fno-sanitize-recover=all
                                                  -fno-omit-frame-pointer)
  target_link_options(palier_options INTERFACE -fsanitize=${PALIER_SANITIZE})
endif()

function(palier_layer name)
  cmake_parse_arguments(arg "" "BELOW" "USES" ${ARGN})
  file(GLOB sources CONFIGURE_DEPENDS ${PROJECT_SOURCE_DIR}/src/${name}/*.cpp)
  add_library(palier_${name} STATIC ${sources})
  target_include_directories(palier_${name} PUBLIC ${PROJECT_SOURCE_DIR}/include)
  target_link_libraries(palier_${name} PUBLIC ${arg_USES} PRIVATE $<BUILD_INTERFACE:palier_options>)
  if(arg_BELOW)
    target_link_libraries(palier_${name} PUBLIC palier_${arg_BELOW})
  endif()
endfunction()
