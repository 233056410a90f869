#include <algorithm>
#include <cmath>
#include <map>

#include "lexer.hpp"
#include "vatwright/error/diagnostic.hpp"
#include "vatwright/hookup/expression.hpp"

namespace vatwright {
namespace {

constexpr int deepest_group = 200;
constexpr double adds_within = 1e-6;  // per cent: less than the last decimal that is printed

std::string in_quotes(const std::string& word) { return "\"" + word + "\""; }

std::string shown(double percent) {
  std::string text = std::to_string(percent);
  text.erase(text.find_last_not_of('0') + 1);
  if (text.back() == '.') text.pop_back();
  return text;
}

/// Recursive descent: train = block {then block}; block = member {beside member}; member = [share] (tag | "[" train
/// "]").
class Parser {
 public:
  Parser(std::vector<Token> tokens, const Site& site) : tokens_(std::move(tokens)) {
    for (const Vessel& v : site.vessels) tags_.push_back(v.tag);
  }

  std::variant<Hookup, HookupFault> run() {
    if (here().is == Token::Is::end) {
      return HookupFault{here().column, "an empty hookup", "vessels, such as \"" + example() + "\""};
    }
    Hookup whole = train();
    if (!fault_ && here().is == Token::Is::close) fail(here().column, "\"]\" without a \"[\" before it", "");
    if (!fault_ && here().is != Token::Is::end) fail_at_join();
    if (fault_) return *fault_;
    return normal_form(std::move(whole));
  }

 private:
  const Token& here() const { return tokens_[at_]; }
  bool is_word(const char* word) const { return here().is == Token::Is::word && here().text == word; }
  bool is_join() const { return is_word("then") || is_word("beside"); }
  std::string example() const {
    if (tags_.empty()) return "K-201";
    return tags_.size() == 1 ? tags_[0] : tags_[0] + " then " + tags_[1];
  }
  void fail(int column, std::string found, std::string expected) {
    if (!fault_) fault_ = HookupFault{column, std::move(found), std::move(expected)};
  }

  Hookup train() {
    Hookup series;
    series.join = Hookup::Join::then;
    series.parts.push_back(block());
    while (!fault_ && is_word("then")) {
      ++at_;
      series.parts.push_back(block());
    }
    return series;
  }

  Hookup block() {
    Hookup group;
    group.join = Hookup::Join::beside;
    const int column = here().column;
    std::vector<Token> shares;
    member(group, shares);
    while (!fault_ && is_word("beside")) {
      ++at_;
      member(group, shares);
    }
    if (fault_) return group;
    if (group.parts.size() > 1) {
      check_shares(group, column);
    } else if (group.shares.front()) {
      fail(shares.front().column, "the share " + shares.front().text + " on a vessel or group with nothing beside it",
           "shares only between members of a beside");
    }
    return group;
  }

  void member(Hookup& group, std::vector<Token>& shares) {
    std::optional<double> share;
    shares.push_back(here());
    if (here().is == Token::Is::share) {
      share = here().percent / 100;
      if (here().percent <= 0 || here().percent > 100) {
        return fail(here().column, "a share of " + here().text, "more than 0 % and at most 100 %");
      }
      ++at_;
    }
    group.shares.push_back(share);
    group.parts.push_back(here().is == Token::Is::open ? bracketed() : leaf());
  }

  Hookup bracketed() {
    const int column = here().column;
    if (++depth_ > deepest_group) {
      fail(column, "more than " + std::to_string(deepest_group) + " groups inside one another", "");
      return {};
    }
    ++at_;
    Hookup inside = train();
    --depth_;
    if (fault_) return inside;
    if (here().is == Token::Is::end)
      fail(column, "\"[\" is not closed", "\"]\"");
    else if (here().is != Token::Is::close)
      fail_at_join();
    else
      ++at_;
    return inside;
  }

  Hookup leaf() {
    const Token& word = here();
    if (word.is != Token::Is::quoted && (word.is != Token::Is::word || is_join())) {
      fail_at_vessel();
      return {};
    }
    const auto found = std::find(tags_.begin(), tags_.end(), word.text);
    if (found == tags_.end()) {
      const std::string near = nearest(word.text, tags_);
      fail(word.column, "no vessel " + in_quotes(word.text),
           near.empty() ? known_tags() : "nearest known tag: " + in_quotes(near));
      return {};
    }
    const auto [first, is_new] = seen_.emplace(word.text, word.column);
    if (!is_new) {
      fail(word.column, word.text + " stands twice, first at column " + std::to_string(first->second),
           "each vessel once");
      return {};
    }
    ++at_;
    Hookup vessel;
    vessel.vessel = static_cast<int>(found - tags_.begin());
    return vessel;
  }

  std::string known_tags() const {
    std::string text = "one of";
    for (std::size_t i = 0; i < tags_.size() && i < 12; ++i) text += (i ? ", " : " ") + tags_[i];
    return tags_.size() > 12 ? text + ", .." : text;
  }

  void fail_at_vessel() {
    const std::string expected = "a vessel's tag or \"[\"";
    if (here().is == Token::Is::end) return fail(here().column, "the end of the hookup", expected);
    if (here().is == Token::Is::share) return fail(here().column, "a second share " + here().text, expected);
    fail(here().column, in_quotes(here().text), expected);
  }
  void fail_at_join() {
    static const std::vector<std::string> joins = {"then", "beside"};
    const std::string expected = "\"then\" or \"beside\"";
    if (here().is == Token::Is::word) {
      const std::string near = nearest(here().text, joins);
      return fail(here().column, in_quotes(here().text),
                  near.empty() ? expected : expected + "; nearest: " + in_quotes(near));
    }
    fail(here().column, in_quotes(here().text), expected + " before it");
  }

  void check_shares(const Hookup& group, int column) {
    double sum = 0;
    std::size_t fixed = 0;
    for (const auto& share : group.shares) {
      if (!share) continue;
      sum += *share * 100;
      ++fixed;
    }
    if (fixed == group.shares.size()) {
      if (std::abs(sum - 100) > adds_within) fail(column, "shares that add to " + shown(sum) + " %", "100 %");
    } else if (sum > 100 - adds_within) {
      fail(column, "shares that add to " + shown(sum) + " % beside members without a share",
           "less than 100 %, something left for them");
    }
  }

  std::vector<Token> tokens_;
  std::vector<std::string> tags_;
  std::map<std::string, int> seen_;
  std::size_t at_ = 0;
  int depth_ = 0;
  std::optional<HookupFault> fault_;
};

}  // namespace

std::variant<Hookup, HookupFault> parse_hookup(std::string_view text, const Site& site) {
  std::vector<std::string> tags;
  for (const Vessel& v : site.vessels) tags.push_back(v.tag);
  auto tokens = cut_words(text, tags);
  if (auto* fault = std::get_if<HookupFault>(&tokens)) return std::move(*fault);
  return Parser(std::move(std::get<std::vector<Token>>(tokens)), site).run();
}

}  // namespace vatwright
