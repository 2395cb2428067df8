#include "palier/app/commands.hpp"

int main(int argc, char** argv) { return palier::app::main(argc, argv); }
