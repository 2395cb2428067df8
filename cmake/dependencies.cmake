# Everything palier links against, all from Debian packages (see tools/packages.txt).
find_package(Eigen3 3.4 REQUIRED NO_MODULE)
find_package(Boost 1.74 REQUIRED)
find_package(yaml-cpp 0.7 REQUIRED)
find_package(fmt 9 REQUIRED)
find_package(nlohmann_json 3.11 REQUIRED)
find_package(CLI11 REQUIRED)

# The MPI build of HDF5 would be picked up where both are installed: ask for the serial one by its pkg-config name.
find_package(PkgConfig REQUIRED)
pkg_check_modules(hdf5_serial REQUIRED IMPORTED_TARGET hdf5-serial)
add_library(hdf5::hdf5 INTERFACE IMPORTED)
target_link_libraries(hdf5::hdf5 INTERFACE PkgConfig::hdf5_serial)
find_library(HDF5_HL_LIBRARY NAMES hdf5_serial_hl hdf5_hl HINTS ${hdf5_serial_LIBRARY_DIRS} REQUIRED)
add_library(hdf5::hdf5_hl INTERFACE IMPORTED)
target_link_libraries(hdf5::hdf5_hl INTERFACE ${HDF5_HL_LIBRARY} hdf5::hdf5)

find_path(UDUNITS_INCLUDE_DIR udunits2.h REQUIRED)
find_library(UDUNITS_LIBRARY udunits2 REQUIRED)
add_library(udunits INTERFACE IMPORTED)
target_include_directories(udunits INTERFACE ${UDUNITS_INCLUDE_DIR})
target_link_libraries(udunits INTERFACE ${UDUNITS_LIBRARY})
