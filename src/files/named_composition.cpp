#include "palier/files/named_composition.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cctype>
#include <string>
#include <utility>
#include <vector>

#include "palier/base/error.hpp"
#include "palier/files/atomic_weight.hpp"
#include "palier/files/quantity.hpp"

namespace palier::files {
namespace {

[[noreturn]] void refuse_text(const std::string& text, const std::string& problem) {
  throw base::InputError("composition '" + text + "': " + problem);
}

std::string trimmed(const std::string& text) {
  const std::size_t begin = text.find_first_not_of(' ');
  return begin == std::string::npos ? "" : text.substr(begin, text.find_last_not_of(' ') + 1 - begin);
}

/// "Cu 4.5 %" in two.
struct NamedAmount {
  std::string element, amount;
};

NamedAmount split_amount(const std::string& text) {
  std::size_t end = 0;
  while (end < text.size() && std::isalpha(static_cast<unsigned char>(text[end])) != 0) ++end;
  std::string amount = trimmed(text.substr(end));
  // In a composition a bare % is of mass.
  if (!amount.empty() && amount.back() == '%' &&
      (amount.size() < 2 || std::isalpha(static_cast<unsigned char>(amount[amount.size() - 2])) == 0))
    amount.insert(amount.size() - 1, "wt");
  return {text.substr(0, end), std::move(amount)};
}

Quantity parse_amount(const std::string& text, const std::string& amount, const std::string& example) {
  try {
    return parse_quantity(amount, QuantityKind::composition);
  } catch (const QuantityFault& fault) {
    refuse_text(text, std::string(fault.what()) + "; " + example);
  }
}

double binary_composition(const std::string& text, const AlloyFile& alloy) {
  const BinaryAlloy& binary = *alloy.binary;
  const NamedAmount named = split_amount(text);
  const std::string example = "expected such as '" + binary.solute + " 4.5 %'";
  if (text.find(',') != std::string::npos)
    refuse_text(text, "found several elements; " + alloy.file.name + " is a binary; " + example);
  if (named.element != binary.solute)
    refuse_text(text, "found the element '" + named.element + "'; the solute of " + alloy.file.name + " is " +
                          binary.solute + "; " + example);
  const Quantity q = parse_amount(text, named.amount, example);
  if (!q.atomic_percent) return q.value;
  const auto solute = atomic_weight(binary.solute), base = atomic_weight(binary.base);
  if (!solute || !base) refuse_text(text, "at% wants the atomic weights of both elements, which are not known here");
  return mass_percent(q.value, *solute, *base);
}

/// Contents named in a text, each of an element the alloy has.
std::vector<ElementContent> named_contents(const std::string& text, const AlloyFile& alloy) {
  std::vector<std::string> known;
  for (const ElementContent& content : elements_of(alloy)) known.push_back(content.element);
  const std::string example = fmt::format("expected such as '{} 0.5 %'", known.front());
  std::vector<ElementContent> contents;
  std::size_t begin = 0;
  while (begin <= text.size()) {
    const std::size_t comma = std::min(text.find(',', begin), text.size());
    const NamedAmount named = split_amount(trimmed(text.substr(begin, comma - begin)));
    begin = comma + 1;
    if (std::find(known.begin(), known.end(), named.element) == known.end())
      refuse_text(text, fmt::format("found the element '{}'; the elements of {} are {}; {}", named.element,
                                    alloy.file.name, fmt::join(known, ", "), example));
    for (const ElementContent& earlier : contents)
      if (earlier.element == named.element) refuse_text(text, fmt::format("found '{}' twice", named.element));
    const Quantity q = parse_amount(text, named.amount, example);
    if (q.atomic_percent)
      refuse_text(text, fmt::format("found at%; {} has several elements: state each in wt%", alloy.file.name));
    contents.push_back({named.element, q.value});
  }
  return contents;
}

void set_content(const ElementContent& content, AlloyFile& alloy) {
  const auto set = [&](auto& elements) {
    for (auto& element : elements)
      if (element.name == content.element) element.composition = content.composition;
  };
  if (alloy.dilute) set(alloy.dilute->elements);
  if (!alloy.steel) return;
  set(alloy.steel->elements);
  if (content.element == "C") alloy.steel->carbon = content.composition;
}

}  // namespace

AlloyFile with_composition(AlloyFile alloy, const std::string& text) {
  if (alloy.binary)
    alloy.binary->composition = binary_composition(text, alloy);
  else if (alloy.dilute || alloy.steel)
    for (const ElementContent& content : named_contents(text, alloy)) set_content(content, alloy);
  else
    refuse_text(text, alloy.file.name + " has no binary lines; it holds for its own composition only");
  return alloy;
}

}  // namespace palier::files
