#include "palier/files/result_file.hpp"

#include <fcntl.h>
#include <hdf5_hl.h>
#include <sys/file.h>
#include <unistd.h>

#include <catch2/catch.hpp>
#include <cmath>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <limits>

#include "palier/alloy/path.hpp"
#include "palier/base/error.hpp"
#include "palier/files/hdf5.hpp"
#include "palier/files/whole_file.hpp"

namespace fs = std::filesystem;
using namespace palier;
using Catch::Matchers::Contains;

namespace {

constexpr double none = std::numeric_limits<double>::quiet_NaN();

/// An own folder for each test, removed with all in it.
class Folder {
 public:
  Folder() {
    std::string name = (fs::temp_directory_path() / "palier-result-XXXXXX").string();
    if (mkdtemp(name.data()) == nullptr) throw std::runtime_error("no temporary folder");
    path_ = name;
  }
  ~Folder() { fs::remove_all(path_); }
  Folder(const Folder&) = delete;
  Folder& operator=(const Folder&) = delete;
  std::string file(const std::string& name) const { return (path_ / name).string(); }
  std::size_t entries() const {
    return static_cast<std::size_t>(std::distance(fs::directory_iterator(path_), fs::directory_iterator()));
  }

 private:
  fs::path path_;
};

/// Invented: a plate of a measured alloy with one layer of sand. Every number differs, so that a mix-up shows.
files::CaseFile plate_case() {
  files::CaseFile input;
  input.path = "/home/somebody/castings/plate.yaml";
  input.text = "palier: 1\ntitle: Größe\n";
  input.section.title = "Größe \xC2\xB5, plate in sand";
  input.section.alloy = "Al-7Si";
  input.section.thickness = 0.04;
  input.section.pouring_temperature = 993.0;
  input.section.path = alloy::measured_path({886.0, 850.0}, {0.0, 0.5});
  input.resolved = {{"section.thickness", "40 mm", "case"}, {"accuracy", "0.1 %", "default"}};
  input.materials = {{"Al-7Si", "alloys/Al-7Si.yaml", "density: 1", {{"density", "2400 kg/m3", "invented"}}},
                     {"silica sand, dry", "/opt/palier/molds/sand.yaml", std::string(70000, 's'), {}}};
  return input;
}

freeze::Result plate_result(int rows, int metal_cells, int mold_cells) {
  freeze::Result result;
  const int cells = metal_cells + mold_cells;
  result.solidification_time = 321.5;
  result.solidification_time_error = 0.25;
  result.last_to_freeze = 0.019;
  result.end_time = 400;
  result.heat_imbalance = 1e-12;
  result.steps = 1234;
  result.rejected_steps = 5;
  result.newton_iterations = 4321;
  result.cpu_seconds = 0.5;
  result.probes = {{{0.0, 1, 61, 60}, {0, 0.1, 0.2, 0.3}}, {{0.02, 2, none, none}, {0, 0.4, none, none}}};
  result.remarks = {"conductivity held constant above 1000 K", "second remark"};
  freeze::History& history = result.history;
  history.layer_name = {"Al-7Si", "silica sand, dry"};
  history.metal_end = metal_cells;
  for (int cell = 0; cell < cells; ++cell) {
    history.radius.push_back(0.001 * (cell + 0.5));
    history.layer.push_back(cell < metal_cells ? 0 : 1);
    history.face.push_back(0.001 * cell);
  }
  history.face.push_back(0.001 * cells);
  for (int cell = 0; cell < metal_cells; ++cell) result.by_depth.push_back({0.02 - 0.001 * cell, 3.0 + cell, 7, none});
  for (int row = 0; row < rows; ++row) {
    history.time.push_back(2.0 * row);
    for (int cell = 0; cell < cells; ++cell) history.temperature.push_back(900 - row - 0.01 * cell);
    for (int cell = 0; cell < metal_cells; ++cell) history.fraction_solid.push_back(1e-4 * row + 1e-7 * cell);
    for (int probe = 0; probe < 2; ++probe) history.probe_temperature.push_back(800 - row - 0.1 * probe);
    for (int probe = 0; probe < 2; ++probe) history.probe_fraction.push_back(1e-4 * row + 1e-2 * probe);
    history.solidus_depth.push_back(row == 0 ? none : 0.001 * row);
    history.liquidus_depth.push_back(0.002 * row);
    history.mushy_width.push_back(0.0005 * row);
    history.surface_flux.push_back(1e5 - row);
  }
  return result;
}

const files::Provenance provenance{"9.8.7", "v9-test", "palier run plate.yaml"};

void write_plate(const std::string& path) {
  files::write_result(path, plate_case(), plate_result(3, 4, 2), provenance);
}

std::string contents(const std::string& path) {
  std::ifstream stream(path, std::ios::binary);
  return {std::istreambuf_iterator<char>(stream), {}};
}

/// Reads back through the C interface, independently of the writer.
class Reader {
 public:
  explicit Reader(const std::string& path) : file_(H5Fopen(path.c_str(), H5F_ACC_RDONLY, H5P_DEFAULT), H5Fclose) {
    REQUIRE(file_ >= 0);
  }
  std::string text(const char* object, const char* name) const {
    hsize_t size = 0;
    H5T_class_t kind{};
    std::size_t bytes = 0;
    REQUIRE(H5LTget_attribute_info(file_, object, name, &size, &kind, &bytes) >= 0);
    REQUIRE(kind == H5T_STRING);
    std::string value(bytes + 1, '\0');
    REQUIRE(H5LTget_attribute_string(file_, object, name, value.data()) >= 0);
    value.resize(value.find('\0'));
    return value;
  }
  std::vector<double> values(const char* name, const std::vector<std::string>& dimensions) const {
    const files::Handle dataset(H5Dopen2(file_, name, H5P_DEFAULT), H5Dclose);
    REQUIRE(dataset >= 0);
    const files::Handle space(H5Dget_space(dataset), H5Sclose);
    CHECK(H5Sget_simple_extent_ndims(space) == static_cast<int>(dimensions.size()));
    for (unsigned i = 0; i < dimensions.size(); ++i) {
      const files::Handle scale(H5Dopen2(file_, dimensions[i].c_str(), H5P_DEFAULT), H5Dclose);
      CAPTURE(name, dimensions[i]);
      CHECK((dimensions[i] == name || H5DSis_attached(dataset, scale, i) > 0));
      CHECK(H5DSis_scale(scale) > 0);
    }
    std::vector<double> read(static_cast<std::size_t>(H5Sget_simple_extent_npoints(space)));
    REQUIRE(H5Dread(dataset, H5T_NATIVE_DOUBLE, H5S_ALL, H5S_ALL, H5P_DEFAULT, read.data()) >= 0);
    return read;
  }
  double scalar(const char* name) const { return values(name, {}).at(0); }
  std::vector<std::string> links() const {
    std::vector<std::string> names;
    const auto note = [](hid_t, const char* name, const H5L_info_t*, void* list) -> herr_t {
      static_cast<std::vector<std::string>*>(list)->emplace_back(name);
      return 0;
    };
    REQUIRE(H5Literate(file_, H5_INDEX_CRT_ORDER, H5_ITER_INC, nullptr, note, &names) >= 0);
    return names;
  }

 private:
  files::Handle file_;
};

bool same(const std::vector<double>& a, const std::vector<double>& b) {
  if (a.size() != b.size()) return false;
  for (std::size_t i = 0; i < a.size(); ++i) {
    if (!(a[i] == b[i] || (std::isnan(a[i]) && std::isnan(b[i])))) return false;
  }
  return true;
}

}  // namespace

TEST_CASE("a result file gives back what the run gave", "[result-file]") {
  const Folder folder;
  const std::string path = folder.file("plate.h5");
  // 600 x 130 values take more than one chunk; 3 rows take none.
  const int rows = GENERATE(3, 600);
  const freeze::Result result = plate_result(rows, 100, 30);
  files::write_result(path, plate_case(), result, provenance);
  const Reader reader(path);
  const freeze::History& history = result.history;

  CHECK(same(reader.values("time", {"time"}), history.time));
  CHECK(same(reader.values("r", {"r"}), history.radius));
  CHECK(same(reader.values("temperature", {"time", "r"}), history.temperature));
  CHECK(same(reader.values("fraction_solid", {"time", "r_metal"}), history.fraction_solid));
  CHECK(same(reader.values("probe_temperature", {"time", "probe"}), history.probe_temperature));
  CHECK(same(reader.values("probe_fraction_solid", {"time", "probe"}), history.probe_fraction));
  CHECK(same(reader.values("solidus_depth", {"time"}), history.solidus_depth));
  CHECK(same(reader.values("liquidus_depth", {"time"}), history.liquidus_depth));
  CHECK(same(reader.values("mushy_width", {"time"}), history.mushy_width));
  CHECK(same(reader.values("surface_heat_flux", {"time"}), history.surface_flux));
  CHECK(folder.entries() == 1);  // no partial file left
}

TEST_CASE("readings carry their numerical errors", "[result-file]") {
  const Folder folder;
  write_plate(folder.file("plate.h5"));
  const Reader reader(folder.file("plate.h5"));
  CHECK(same(reader.values("depth", {"probe"}), {0.0, 0.02}));
  CHECK(same(reader.values("start_of_freezing", {"probe"}), {1, 2}));
  CHECK(same(reader.values("start_of_freezing_error", {"probe"}), {0.1, 0.4}));
  CHECK(same(reader.values("end_of_freezing", {"probe"}), {61, none}));
  CHECK(same(reader.values("end_of_freezing_error", {"probe"}), {0.2, none}));
  CHECK(same(reader.values("local_solidification_time", {"probe"}), {60, none}));
  CHECK(same(reader.values("local_solidification_time_error", {"probe"}), {0.3, none}));
  CHECK(same(reader.values("start_of_freezing_by_depth", {"r_metal"}), {3, 4, 5, 6}));
  CHECK(same(reader.values("end_of_freezing_by_depth", {"r_metal"}), {7, 7, 7, 7}));
  CHECK(same(reader.values("local_solidification_time_by_depth", {"r_metal"}), {none, none, none, none}));
  CHECK(same(reader.values("depth_metal", {"r_metal"}), {0.02, 0.02 - 0.001, 0.02 - 0.002, 0.02 - 0.003}));
  for (const std::string name : {"start_of_freezing", "end_of_freezing", "local_solidification_time"}) {
    CHECK(reader.text(name.c_str(), "ancillary_variables") == name + "_error");
    CHECK(reader.text(name.c_str(), "units") == "s");
  }
}

TEST_CASE("cells carry faces and layers", "[result-file]") {
  const Folder folder;
  write_plate(folder.file("plate.h5"));
  const Reader reader(folder.file("plate.h5"));
  std::vector<double> bounds;
  for (int cell = 0; cell < 6; ++cell) {
    bounds.push_back(0.001 * cell);
    bounds.push_back(0.001 * (cell + 1));
  }
  CHECK(same(reader.values("r_bounds", {"r", "side"}), bounds));
  CHECK(same(reader.values("r_metal", {"r_metal"}), {0.001 * 0.5, 0.001 * 1.5, 0.001 * 2.5, 0.001 * 3.5}));
  CHECK(same(reader.values("layer", {"r"}), {0, 0, 0, 0, 1, 1}));
  CHECK(reader.text("layer", "flag_meanings") == "Al-7Si silica_sand__dry");
  CHECK(reader.text("layer", "names") == "Al-7Si\nsilica sand, dry");
}

TEST_CASE("scalars of the run and of the alloy", "[result-file]") {
  const Folder folder;
  write_plate(folder.file("plate.h5"));
  const Reader reader(folder.file("plate.h5"));
  CHECK(reader.scalar("solidification_time") == 321.5);
  CHECK(reader.scalar("solidification_time_error") == 0.25);
  CHECK(reader.scalar("last_to_freeze_depth") == 0.019);
  CHECK(reader.scalar("end_time") == 400);
  CHECK(reader.scalar("heat_imbalance") == 1e-12);
  CHECK(reader.scalar("steps") == 1234);
  CHECK(reader.scalar("rejected_steps") == 5);
  CHECK(reader.scalar("newton_iterations") == 4321);
  CHECK(reader.scalar("liquidus_temperature") == 886);
  CHECK(reader.scalar("end_of_freezing_temperature") == 850);
  CHECK(reader.scalar("pouring_temperature") == 993);
}

TEST_CASE("texts of a result: title, remarks, caution, provenance", "[result-file]") {
  const Folder folder;
  write_plate(folder.file("plate.h5"));
  const Reader reader(folder.file("plate.h5"));
  CHECK(reader.text("/", "Conventions") == "CF-1.8");
  CHECK(reader.text("/", "title") == plate_case().section.title);
  CHECK(reader.text("/", "remarks") == "conductivity held constant above 1000 K\nsecond remark");
  CHECK_THAT(reader.text("/", "caution"), Contains("trial casting") && Contains("can explode"));
  CHECK(reader.text("/provenance", "version") == "9.8.7");
  CHECK(reader.text("/provenance", "commit") == "v9-test");
  CHECK(reader.text("/provenance", "command_line") == "palier run plate.yaml");
  CHECK(reader.text("/provenance", "hdf5_version") == files::hdf5_version());
  CHECK(reader.text("/provenance", "case_text") == plate_case().text);
  CHECK(reader.text("/provenance", "resolved_case") == "section.thickness\t40 mm\tcase\naccuracy\t0.1 %\tdefault\n");
  CHECK(reader.text("/provenance/material_1", "path") == "alloys/Al-7Si.yaml");
  CHECK(reader.text("/provenance/material_1", "values") == "density\t2400 kg/m3\tinvented\n");
  CHECK(reader.text("/provenance/material_2", "text") == std::string(70000, 's'));  // more than 64 KiB
}

TEST_CASE("a result file tells no folders of the machine beyond the last", "[result-file]") {
  const Folder folder;
  write_plate(folder.file("plate.h5"));
  const Reader reader(folder.file("plate.h5"));
  CHECK(reader.text("/provenance", "case_file") == "castings/plate.yaml");
  CHECK(reader.text("/provenance/material_2", "path") == "molds/sand.yaml");
  CHECK_THAT(contents(folder.file("plate.h5")), !Contains("somebody") && !Contains(folder.file("")));
}

TEST_CASE("the same run gives the same bytes", "[result-file]") {
  const Folder folder;
  freeze::Result result = plate_result(600, 100, 30);
  files::write_result(folder.file("a.h5"), plate_case(), result, provenance);
  result.cpu_seconds = 77;  // volatile, therefore not stored
  files::write_result(folder.file("another name.h5"), plate_case(), result, provenance);
  const std::string first = contents(folder.file("a.h5"));
  CHECK(first.size() > 10000);
  CHECK(first == contents(folder.file("another name.h5")));
}

TEST_CASE("no object of a result file carries a time of day", "[result-file]") {
  const Folder folder;
  write_plate(folder.file("plate.h5"));
  const files::Handle file(H5Fopen(folder.file("plate.h5").c_str(), H5F_ACC_RDONLY, H5P_DEFAULT), H5Fclose);
  REQUIRE(file >= 0);
  std::vector<std::string> dated;
  const auto note = [](hid_t, const char* name, const H5O_info_t* info, void* list) -> herr_t {
    if (info->atime + info->mtime + info->ctime + info->btime != 0) {
      static_cast<std::vector<std::string>*>(list)->emplace_back(name);
    }
    return 0;
  };
  REQUIRE(H5Ovisit2(file, H5_INDEX_NAME, H5_ITER_INC, note, &dated, H5O_INFO_TIME) >= 0);
  CAPTURE(dated);
  CHECK(dated.empty());
}

TEST_CASE("variables stand in the file in the order they were written", "[result-file]") {
  const Folder folder;
  write_plate(folder.file("plate.h5"));
  const std::vector<std::string> links = Reader(folder.file("plate.h5")).links();
  REQUIRE(links.size() > 3);
  CHECK(links.front() == "time");
  CHECK(links.back() == "provenance");
}

TEST_CASE("a result replaces an older one", "[result-file]") {
  const Folder folder;
  const std::string path = folder.file("plate.h5");
  std::ofstream(path) << "old";
  std::ofstream(path + ".partial") << std::string(1 << 20, 'x');  // left by a killed run, longer than the new one
  write_plate(path);
  CHECK(Reader(path).scalar("steps") == 1234);
  CHECK(fs::file_size(path) < (1 << 20));
  CHECK(folder.entries() == 1);
}

TEST_CASE("a link is followed", "[result-file]") {
  const Folder folder;
  write_plate(folder.file("plate.h5"));
  fs::create_symlink("plate.h5", folder.file("link.h5"));
  files::write_result(folder.file("link.h5"), plate_case(), plate_result(5, 4, 2), provenance);
  CHECK(fs::is_symlink(folder.file("link.h5")));
  CHECK(Reader(folder.file("plate.h5")).values("time", {"time"}).size() == 5);
  CHECK(folder.entries() == 2);
}

TEST_CASE("trouble with the file is told with path and cause, and nothing is left", "[result-file][errors]") {
  const Folder folder;
  const std::string path = folder.file("plate.h5");

  SECTION("missing folder") {
    const std::string lost = folder.file("no/such/plate.h5");
    CHECK_THROWS_AS(write_plate(lost), base::FileTrouble);
    CHECK_THROWS_WITH(write_plate(lost),
                      lost + ": cannot be written: the folder " + folder.file("no/such") + " does not exist");
    CHECK(folder.entries() == 0);
  }
  SECTION("target is a folder") {
    CHECK_THROWS_WITH(write_plate(folder.file("")), folder.file("") + ": cannot be written: it is a folder");
    CHECK(folder.entries() == 0);
  }
  SECTION("target is a device") {
    CHECK_THROWS_WITH(write_plate("/dev/null"), "/dev/null: cannot be written: it is not a regular file");
    CHECK(fs::is_character_file("/dev/null"));
  }
  SECTION("part of the path is a file") {
    std::ofstream(folder.file("file")) << "x";
    CHECK_THROWS_WITH(write_plate(folder.file("file/plate.h5")), Contains("Not a directory"));
    CHECK(contents(folder.file("file")) == "x");
  }
  SECTION("folder in which nobody may write, root included") {
    const std::string refused = "/proc/self/plate.h5";
    CHECK_THROWS_AS(write_plate(refused), base::FileTrouble);
    CHECK_THROWS_WITH(write_plate(refused), Contains(refused + ": cannot be written: "));
  }
  SECTION("disk full, the older result survives") {
    std::ofstream(path) << "old";
    fs::create_symlink("/dev/full", path + ".partial");
    CHECK_THROWS_WITH(write_plate(path), path + ": cannot be written: No space left on device");
    CHECK(contents(path) == "old");
    CHECK(folder.entries() == 1);
  }
  SECTION("another process is writing it") {
    const int other = open((path + ".partial").c_str(), O_WRONLY | O_CREAT, 0600);
    REQUIRE(flock(other, LOCK_EX) == 0);
    CHECK_THROWS_WITH(write_plate(path), path + ": cannot be written: another process is writing it");
    CHECK(folder.entries() == 1);  // the other's partial file
    close(other);
    write_plate(path);
    CHECK(folder.entries() == 1);
  }
}

TEST_CASE("a case without a solidification path is refused", "[result-file][errors]") {
  const Folder folder;
  files::CaseFile input = plate_case();
  input.section.path.reset();
  CHECK_THROWS_AS(files::write_result(folder.file("plate.h5"), input, plate_result(3, 4, 2), provenance),
                  base::InputError);
  CHECK(folder.entries() == 0);
}

TEST_CASE("a history whose rows do not fit its cells is a fault of the program", "[result-file][errors]") {
  const Folder folder;
  freeze::Result result = plate_result(3, 4, 2);
  SECTION("a temperature too few") { result.history.temperature.pop_back(); }
  SECTION("a face too few") { result.history.face.pop_back(); }
  SECTION("a layer without a name") { result.history.layer.back() = 2; }
  SECTION("a reading too few") { result.by_depth.pop_back(); }
  CHECK_THROWS_AS(files::write_result(folder.file("plate.h5"), plate_case(), result, provenance), std::logic_error);
  CHECK(folder.entries() == 0);
}

TEST_CASE("a failing call of HDF5 is told with its cause", "[result-file][errors]") {
  files::prepare_hdf5();
  CHECK_THROWS_AS(files::require(H5Fopen("/no/such/file.h5", H5F_ACC_RDONLY, H5P_DEFAULT), "file.h5: cannot open"),
                  base::FileTrouble);
  CHECK_THROWS_WITH(files::require(H5Fopen("/no/such/file.h5", H5F_ACC_RDONLY, H5P_DEFAULT), "file.h5: cannot open"),
                    Contains("file.h5: cannot open: ") && Contains("No such file or directory"));
}
