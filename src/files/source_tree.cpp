#include "palier/files/source_tree.hpp"

#include <fmt/format.h>
#include <yaml-cpp/anchor.h>
#include <yaml-cpp/eventhandler.h>
#include <yaml-cpp/exceptions.h>
#include <yaml-cpp/mark.h>
#include <yaml-cpp/parser.h>

#include <algorithm>
#include <map>
#include <optional>
#include <sstream>
#include <utility>

#include "palier/files/text_bytes.hpp"

namespace palier::files {
namespace {

/// Turns yaml-cpp's marks (from 0, columns in bytes) into our places (from 1, columns in characters).
class LineIndex {
 public:
  explicit LineIndex(std::string_view text) : text_(text), starts_{0} {
    for (std::size_t i = 0; i < text.size(); ++i) {
      if (text[i] == '\n') starts_.push_back(i + 1);
      if ((static_cast<unsigned char>(text[i]) & 0xC0U) == 0x80U) continuations_.push_back(i);
    }
  }
  std::string_view line(int number) const {
    if (number < 1 || static_cast<std::size_t>(number) > starts_.size()) return {};
    const std::size_t start = starts_[static_cast<std::size_t>(number) - 1];
    return text_.substr(start, text_.find('\n', start) - start);
  }
  /// Whether a text in quotes that begins here is closed: yaml-cpp takes the end of the file for a closing quote.
  bool is_closed(const YAML::Mark& mark) const {
    const std::size_t first = byte_of(mark);
    if (first >= text_.size() || (text_[first] != '"' && text_[first] != '\'')) return true;
    const char quote = text_[first];
    for (std::size_t i = first + 1; i < text_.size(); ++i) {
      const bool doubled = quote == '\'' && text_.substr(i, 2) == "''";
      if (text_[i] == quote && !doubled) return true;
      if (doubled || (quote == '"' && text_[i] == '\\')) ++i;
    }
    return false;
  }
  TextPlace place(const YAML::Mark& mark) const {
    const std::size_t start = start_of(mark);
    const std::size_t byte = byte_of(mark);
    return {mark.line + 1,
            1 + static_cast<int>(byte - start - continuations_before(byte) + continuations_before(start))};
  }

 private:
  std::size_t start_of(const YAML::Mark& mark) const {
    return starts_[std::min(static_cast<std::size_t>(std::max(mark.line, 0)), starts_.size() - 1)];
  }
  std::size_t byte_of(const YAML::Mark& mark) const {
    return std::min(start_of(mark) + static_cast<std::size_t>(std::max(mark.column, 0)), text_.size());
  }
  std::size_t continuations_before(std::size_t byte) const {
    const auto end = std::lower_bound(continuations_.begin(), continuations_.end(), byte);
    return static_cast<std::size_t>(end - continuations_.begin());
  }

  std::string_view text_;
  std::vector<std::size_t> starts_;         ///< first byte of each line
  std::vector<std::size_t> continuations_;  ///< bytes that continue a character
};

/// Builds the tree from yaml-cpp's events and refuses what a case has no use for.
class TreeBuilder : public YAML::EventHandler {
 public:
  TreeBuilder(std::string file, const LineIndex& lines) : file_(std::move(file)), lines_(lines) {}

  void OnDocumentStart(const YAML::Mark& mark) override {
    if (started_)
      fail(lines_.place(mark), "found text after the end of the mapping; expected one YAML document",
           "remove '---' and what follows, or indent it as the lines above");
    started_ = true;
  }
  void OnDocumentEnd() override {}

  void OnNull(const YAML::Mark& mark, YAML::anchor_t anchor) override {
    refuse_anchor(mark, anchor);
    TextPlace at = lines_.place(mark);
    if (key_pending()) fail(at, "found an empty key; expected a text");
    // yaml-cpp marks an absent value where the next token stands, often lines below: its key is the better place.
    if (!open_.empty() && open_.back().key) at = {open_.back().key->line, open_.back().key->column};
    add(node(SourceNode::Kind::nothing, at));
  }
  void OnAlias(const YAML::Mark& mark, YAML::anchor_t /*anchor*/) override { refuse_anchor(mark, 1); }
  void OnScalar(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
                const std::string& value) override {
    refuse_anchor(mark, anchor);
    refuse_tag(mark, tag);
    if (!lines_.is_closed(mark)) fail(lines_.place(mark), "found a quote that is not closed", "close it");
    // Escapes in quotes can hold what the bytes of the file may not.
    const auto control = [](char c) { return (c >= 0 && c < 0x20 && c != '\n' && c != '\t') || c == 0x7F; };
    if (std::any_of(value.begin(), value.end(), control))
      fail(lines_.place(mark), "found a control character in a text; expected a plain text");
    SourceNode text = node(SourceNode::Kind::text, lines_.place(mark));
    text.text = value;
    text.quoted = tag == "!";
    add(std::move(text));
  }
  void OnSequenceStart(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
                       YAML::EmitterStyle::value style) override {
    open(SourceNode::Kind::list, mark, tag, anchor, style);
  }
  void OnSequenceEnd() override { close(); }
  void OnMapStart(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
                  YAML::EmitterStyle::value style) override {
    open(SourceNode::Kind::map, mark, tag, anchor, style);
  }
  void OnMapEnd() override { close(); }

  /// The innermost list or mapping in brackets that is still open.
  std::optional<TextPlace> open_bracket() const {
    for (auto level = open_.rbegin(); level != open_.rend(); ++level)
      if (level->brackets) return TextPlace{level->node.line, level->node.column};
    return std::nullopt;
  }
  std::optional<SourceNode> take() { return std::move(root_); }

 private:
  struct Level {
    SourceNode node;
    bool brackets = false;
    std::optional<SourceKey> key;                  ///< whose value comes next
    std::map<std::string, int, std::less<>> seen;  ///< keys and their lines
  };

  [[noreturn]] void fail(const TextPlace& at, const std::string& problem, const std::string& hint = {}) const {
    throw base::InputError({file_, at.line, at.column}, "", problem, hint);
  }
  void refuse_anchor(const YAML::Mark& mark, YAML::anchor_t anchor) const {
    if (anchor != 0)
      fail(lines_.place(mark), "found an anchor (&) or alias (*); expected the value itself",
           "write the value out, or put text that begins with & or * in quotes");
  }
  void refuse_tag(const YAML::Mark& mark, const std::string& tag) const {
    if (tag != "?" && tag != "!" && !tag.empty())
      fail(lines_.place(mark), "found a tag (!); expected a plain value", "put text that begins with ! in quotes");
  }
  SourceNode node(SourceNode::Kind kind, const TextPlace& at) {
    if (++nodes_ > SourceLimits::nodes)
      fail(at, fmt::format("found more than {} values; expected a smaller file", SourceLimits::nodes),
           "shorten its tables");
    SourceNode result;
    result.kind = kind;
    result.line = at.line;
    result.column = at.column;
    return result;
  }
  bool key_pending() const {
    return !open_.empty() && open_.back().node.kind == SourceNode::Kind::map && !open_.back().key;
  }
  void open(SourceNode::Kind kind, const YAML::Mark& mark, const std::string& tag, YAML::anchor_t anchor,
            YAML::EmitterStyle::value style) {
    refuse_anchor(mark, anchor);
    refuse_tag(mark, tag);
    const TextPlace at = lines_.place(mark);
    if (key_pending()) fail(at, "found a list or mapping as a key; expected a text");
    if (open_.size() >= static_cast<std::size_t>(SourceLimits::depth))
      fail(at, fmt::format("found more than {} levels of nesting; expected fewer", SourceLimits::depth));
    Level level;
    level.node = node(kind, at);
    level.brackets = style == YAML::EmitterStyle::Flow;
    open_.push_back(std::move(level));
  }
  void close() {
    SourceNode done = std::move(open_.back().node);
    open_.pop_back();
    add(std::move(done));
  }
  void add(SourceNode value) {
    if (open_.empty()) {
      root_ = std::move(value);
    } else if (key_pending()) {
      add_key(value);
    } else {
      Level& level = open_.back();
      if (level.key) level.node.keys.push_back(std::move(*level.key));
      level.key.reset();
      level.node.items.push_back(std::move(value));
    }
  }
  void add_key(const SourceNode& key) {
    const TextPlace at{key.line, key.column};
    if (key.text == "<<" && !key.quoted)
      fail(at, "found the merge key '<<'; expected a key of the file's own", "write the values out");
    const auto [first, fresh] = open_.back().seen.emplace(key.text, key.line);
    if (!fresh)
      fail(at, fmt::format("found the key '{}' again; it stands first on line {}", key.text, first->second),
           "keep one of the two");
    open_.back().key = SourceKey{key.text, key.line, key.column};
  }

  std::string file_;
  const LineIndex& lines_;
  bool started_ = false;
  int nodes_ = 0;
  std::vector<Level> open_;
  std::optional<SourceNode> root_;
};

struct Wording {
  std::string problem, hint;
};

/// yaml-cpp's message in words for someone who writes a case.
Wording reword(const std::string& message, std::string_view line, std::string_view line_before) {
  if (message == YAML::ErrorMsg::MAP_VALUE) {
    const bool glued =
        line_before.find(':') != std::string_view::npos && line_before.find(": ") == std::string_view::npos;
    const bool two = line.find(": ") != line.rfind(": ");
    return {"found a ':' where no key can stand", glued ? "is a space missing after ':' on the line above?"
                                                  : two ? "put text that contains ': ' in quotes"
                                                        : "is this line indented as the keys above it?"};
  }
  if (message == YAML::ErrorMsg::END_OF_MAP || message == YAML::ErrorMsg::END_OF_SEQ)
    return {"found a line whose indentation fits none of the lines above", "indent it as its neighbors"};
  if (message == YAML::ErrorMsg::EOF_IN_SCALAR) return {"found the end of the file inside quotes", "close the quote"};
  if (message == YAML::ErrorMsg::END_OF_MAP_FLOW) return {"found a '{' that is not closed", "close it with '}'"};
  if (message == YAML::ErrorMsg::END_OF_SEQ_FLOW) return {"found a '[' that is not closed", "close it with ']'"};
  if (message == YAML::ErrorMsg::FLOW_END) return {"found a ']' or '}' that nothing opened", "remove it"};
  if (message == YAML::ErrorMsg::BLOCK_ENTRY)
    return {"found a '-' where no list can begin", "begin the list on a line of its own"};
  if (message == YAML::ErrorMsg::UNKNOWN_TOKEN)
    return {"found a character that cannot begin a value", "put the text in quotes"};
  if (message == YAML::ErrorMsg::UNKNOWN_ANCHOR)
    return {"found an alias (*); expected the value itself", "put text that begins with * in quotes"};
  return {"found text that is no YAML (" + message + ")", ""};
}

[[noreturn]] void rethrow(const YAML::Exception& error, const std::string& file, const LineIndex& lines,
                          const TreeBuilder& builder) {
  TextPlace at = error.mark.is_null() ? TextPlace{1, 1} : lines.place(error.mark);
  const bool unclosed = error.msg == YAML::ErrorMsg::END_OF_MAP_FLOW || error.msg == YAML::ErrorMsg::END_OF_SEQ_FLOW;
  if (unclosed) at = builder.open_bracket().value_or(at);
  const Wording words = reword(error.msg, lines.line(at.line), lines.line(at.line - 1));
  throw base::InputError({file, at.line, at.column}, "", words.problem, words.hint);
}

}  // namespace

const SourceNode* SourceNode::find(std::string_view key) const {
  for (std::size_t i = 0; i < keys.size(); ++i)
    if (keys[i].text == key) return &items[i];
  return nullptr;
}

SourceNode parse_source(std::string_view text, const std::string& file) {
  static constexpr std::string_view byte_order_mark = "\xEF\xBB\xBF";
  if (text.substr(0, byte_order_mark.size()) == byte_order_mark) text.remove_prefix(byte_order_mark.size());
  check_text(text, file);
  const LineIndex lines(text);
  TreeBuilder builder(file, lines);
  std::istringstream stream{std::string(text)};
  try {
    YAML::Parser parser(stream);
    // The second call is there to find a second document, which the builder refuses. It returns false at the end.
    if (parser.HandleNextDocument(builder)) parser.HandleNextDocument(builder);
  } catch (const YAML::Exception& error) {
    rethrow(error, file, lines, builder);
  }
  auto root = builder.take();
  if (!root || root->kind == SourceNode::Kind::nothing)
    throw base::InputError({file, 0, 0}, "", "found no keys; expected a mapping of keys to values");
  if (root->kind != SourceNode::Kind::map)
    throw base::InputError({file, root->line, root->column}, "",
                           fmt::format("found a {}; expected a mapping of keys to values",
                                       root->kind == SourceNode::Kind::list ? "list" : "text"),
                           "write 'key: value', with a space after the ':'");
  return std::move(*root);
}

}  // namespace palier::files
