#include "palier/files/named_composition.hpp"

#include <cctype>
#include <string>

#include "palier/base/error.hpp"
#include "palier/files/atomic_weight.hpp"
#include "palier/files/quantity.hpp"

namespace palier::files {
namespace {

[[noreturn]] void refuse_text(const std::string& text, const std::string& problem) {
  throw base::InputError("composition '" + text + "': " + problem);
}

}  // namespace

double named_composition(const std::string& text, const AlloyFile& alloy) {
  if (!alloy.binary) refuse_text(text, alloy.file.name + " has no binary lines; it holds for its own composition only");
  std::size_t end = 0;
  while (end < text.size() && std::isalpha(static_cast<unsigned char>(text[end])) != 0) ++end;
  const std::string element = text.substr(0, end);
  const std::string example = "expected such as '" + alloy.binary->solute + " 4.5 %'";
  if (text.find(',') != std::string::npos)
    refuse_text(text, "found several elements; " + alloy.file.name + " is a binary; " + example);
  if (element != alloy.binary->solute)
    refuse_text(text, "found the element '" + element + "'; the solute of " + alloy.file.name + " is " +
                          alloy.binary->solute + "; " + example);
  std::string amount = text.substr(
      text.find_first_not_of(' ', end) == std::string::npos ? text.size() : text.find_first_not_of(' ', end));
  // In a composition a bare % is of mass.
  if (!amount.empty() && amount.back() == '%' &&
      (amount.size() < 2 || std::isalpha(static_cast<unsigned char>(amount[amount.size() - 2])) == 0))
    amount.insert(amount.size() - 1, "wt");
  try {
    const Quantity q = parse_quantity(amount, QuantityKind::composition);
    if (!q.atomic_percent) return q.value;
    const auto solute = atomic_weight(alloy.binary->solute), base = atomic_weight(alloy.binary->base);
    if (!solute || !base) refuse_text(text, "at% wants the atomic weights of both elements, which are not known here");
    return mass_percent(q.value, *solute, *base);
  } catch (const QuantityFault& fault) {
    refuse_text(text, std::string(fault.what()) + "; " + example);
  }
}

}  // namespace palier::files
