#include "palier/files/units.hpp"

#include <udunits2.h>

#include <algorithm>
#include <memory>
#include <mutex>
#include <utility>

#include "palier/base/error.hpp"

namespace palier::files {
namespace {

struct FreeSystem {
  void operator()(ut_system* system) const { ut_free_system(system); }
};
struct FreeUnit {
  void operator()(ut_unit* unit) const { ut_free(unit); }
};
struct FreeConverter {
  void operator()(cv_converter* converter) const { cv_free(converter); }
};
using Unit = std::unique_ptr<ut_unit, FreeUnit>;
using Converter = std::unique_ptr<cv_converter, FreeConverter>;

/// The definitions of UDUNITS-2. The library ends the process where two threads parse at once: hence the lock.
class UnitSystem {
 public:
  static UnitSystem& shared() {
    static UnitSystem system;
    return system;
  }
  std::unique_lock<std::mutex> lock() { return std::unique_lock<std::mutex>(mutex_); }
  /// Null where unknown. The status is no guide: it reads "success" for `0 m`.
  Unit parse(const std::string& text) const { return Unit(ut_parse(system_.get(), text.c_str(), UT_ASCII)); }

 private:
  UnitSystem() {
    ut_set_error_message_handler(ut_ignore);
    system_.reset(ut_read_xml(nullptr));
    if (!system_)
      throw base::FileTrouble(
          "the unit definitions of UDUNITS-2 cannot be loaded; install the package libudunits2-data");
  }
  std::mutex mutex_;
  std::unique_ptr<ut_system, FreeSystem> system_;
};

Converter converter_between(const ut_unit* from, const ut_unit* to) {
  if (from == nullptr || to == nullptr || ut_are_convertible(from, to) == 0) return nullptr;
  // UDUNITS-2 takes the units by mutable pointer but does not change them.
  return Converter(ut_get_converter(const_cast<ut_unit*>(from), const_cast<ut_unit*>(to)));
}

}  // namespace

bool is_unit(const std::string& unit) {
  UnitSystem& system = UnitSystem::shared();
  const auto guard = system.lock();
  return system.parse(unit) != nullptr;
}

bool is_dimensionless(const std::string& unit) {
  UnitSystem& system = UnitSystem::shared();
  const auto guard = system.lock();
  const Unit parsed = system.parse(unit);
  return parsed && ut_is_dimensionless(parsed.get()) != 0;
}

std::string base_units(const std::string& unit) {
  UnitSystem& system = UnitSystem::shared();
  const auto guard = system.lock();
  const Unit parsed = system.parse(unit);
  if (!parsed) return {};
  std::string text(200, '\0');
  const int length = ut_format(parsed.get(), text.data(), text.size(), UT_ASCII | UT_DEFINITION);
  if (length < 0) return {};
  text.resize(std::min(text.size(), static_cast<std::size_t>(length)));
  // UDUNITS-2 writes a factor, the base units joined by points, and an origin: only the middle is the dimension.
  if (!text.empty() && text[0] == '(') text.erase(0, 1);
  const bool factor = !text.empty() && text[0] >= '0' && text[0] <= '9';
  if (factor) text.erase(0, std::min(text.find(' '), text.size() - 1) + 1);
  text.erase(std::min(text.find_first_of(" )"), text.size()));
  if (text.empty()) return "1";
  std::replace(text.begin(), text.end(), '.', ' ');
  return text;
}

std::optional<double> unit_slope(const std::string& from, const std::string& to) {
  UnitSystem& system = UnitSystem::shared();
  const auto guard = system.lock();
  const Unit source = system.parse(from), target = system.parse(to), meter = system.parse("m");
  if (!source || !target) return std::nullopt;
  // A product has no offset: degF times m against K times m leaves the slope alone.
  const Unit source_product(ut_multiply(source.get(), meter.get()));
  const Unit target_product(ut_multiply(target.get(), meter.get()));
  const Converter converter = converter_between(source_product.get(), target_product.get());
  if (!converter) return std::nullopt;
  return cv_convert_double(converter.get(), 1.0);
}

std::optional<UnitScale> unit_scale(const std::string& from, const std::string& to) {
  const std::optional<double> slope = unit_slope(from, to);
  if (!slope) return std::nullopt;
  UnitSystem& system = UnitSystem::shared();
  const auto guard = system.lock();
  const Unit source = system.parse(from), target = system.parse(to);
  const Converter converter = converter_between(source.get(), target.get());
  if (!converter) return std::nullopt;
  return UnitScale{*slope, cv_convert_double(converter.get(), 0.0)};
}

}  // namespace palier::files
