#include <algorithm>

#include "unit.hpp"

namespace vatwright {
namespace {

constexpr std::string_view degree_sign_c =
                               "\xc2\xb0"
                               "c",
                           degree_sign_f =
                               "\xc2\xb0"
                               "f",
                           degree_sign_k = "\xc2\xb0k";

struct Pair {
  std::string_view slip, right;
};

/// Common slips, small letters unless capitals tell two apart; what differs from a unit by capitals alone is found
/// without this list.
constexpr Pair slips[] = {
    {"c", "degC"},
    {"f", "degF"},
    {"r", "degR"},
    {degree_sign_c, "degC"},
    {degree_sign_f, "degF"},
    {degree_sign_k, "K"},
    {"celsius", "degC"},
    {"fahrenheit", "degF"},
    {"kelvin", "K"},
    {"kelvins", "K"},
    {"degk", "K"},
    {"deg c", "degC"},
    {"deg f", "degF"},
    {"dm3", "L"},
    {"cm3", "mL"},
    {"cc", "mL"},
    {"ltr", "L"},
    {"lt", "L"},
    {"lit", "L"},
    {"liter", "L"},
    {"litre", "L"},
    {"liters", "L"},
    {"litres", "L"},
    {"cbm", "m3"},
    {"cum", "m3"},
    {"cuft", "ft3"},
    {"cf", "ft3"},
    {"sqm", "m2"},
    {"sqft", "ft2"},
    {"gallon", "gal"},
    {"gallons", "gal"},
    {"usgal", "gal"},
    {"usgpm", "gpm"},
    {"lbs", "lb"},
    {"lbm", "lb"},
    {"kgs", "kg"},
    {"kilo", "kg"},
    {"gr", "g"},
    {"gm", "g"},
    {"tonne", "t"},
    {"tonnes", "t"},
    {"te", "t"},
    {"mole", "mol"},
    {"moles", "mol"},
    {"mols", "mol"},
    {"gmol", "mol"},
    {"kgmol", "kmol"},
    {"lb-mol", "lbmol"},
    {"lbmole", "lbmol"},
    {"sec", "s"},
    {"secs", "s"},
    {"second", "s"},
    {"seconds", "s"},
    {"mins", "min"},
    {"minute", "min"},
    {"minutes", "min"},
    {"hr", "h"},
    {"hrs", "h"},
    {"hour", "h"},
    {"hours", "h"},
    {"days", "d"},
    {"yr", "year"},
    {"years", "year"},
    {"a", "year"},
    {"inch", "in"},
    {"inches", "in"},
    {"foot", "ft"},
    {"feet", "ft"},
    {"micron", "um"},
    {"microns", "um"},
    {"\xc2\xb5m", "um"},
    {"\xce\xbcm", "um"},
    {"meter", "m"},
    {"metre", "m"},
    {"meters", "m"},
    {"metres", "m"},
    {"bar(g)", "barg"},
    {"bar(a)", "bara"},
    {"barabs", "bara"},
    {"psi(g)", "psig"},
    {"psi(a)", "psia"},
    {"kpa(g)", "kPag"},
    {"kpaa", "kPa"},
    {"kpa(a)", "kPa"},
    {"cps", "cP"},
    {"percent", "%"},
    {"pct", "%"},
    {"kwh", "kW.h"},
    {"mwh", "MW.h"},
    {"wh", "W.h"},
    {"joule", "J"},
    {"watt", "W"},
    {"pascal", "Pa"},
    {"mpas", "mPa.s"},
    {"pas", "Pa.s"},
};

constexpr Pair questions[] = {
    {"nm3", "a normal cubic metre: at which temperature and pressure? write kmol/h, or m3 at feed conditions"},
    {"sm3", "a standard cubic metre: at which temperature and pressure? write kmol/h, or m3 at feed conditions"},
    {"nl", "a normal litre: at which temperature and pressure? write mol, or L at feed conditions"},
    {"sl", "a standard litre: at which temperature and pressure? write mol, or L at feed conditions"},
    {"scf", "a standard cubic foot: at which temperature and pressure? write lbmol, or ft3 at feed conditions"},
    {"scm", "a standard cubic metre: at which temperature and pressure? write kmol/h, or m3 at feed conditions"},
    {"mscf", "standard cubic feet: how many, at which temperature and pressure? write lbmol/h"},
    {"mmscf", "standard cubic feet: how many, at which temperature and pressure? write lbmol/h"},
    {"scfm", "standard cubic feet per minute: at which temperature and pressure? write lbmol/min"},
    {"scfh", "standard cubic feet per hour: at which temperature and pressure? write lbmol/h"},
    {"scfd", "standard cubic feet per day: at which temperature and pressure? write lbmol/d"},
    {"mscfd", "standard cubic feet per day: how many, at which temperature and pressure? write lbmol/d"},
    {"mmscfd", "standard cubic feet per day: how many, at which temperature and pressure? write lbmol/d"},
    {"sccm", "standard cubic centimetres per minute: at which temperature and pressure? write mol/min"},
    {"slpm", "standard litres per minute: at which temperature and pressure? write mol/min"},
    {"slm", "standard litres per minute: at which temperature and pressure? write mol/min"},
    {"ppm", "of mass, moles or volume? write mg/L, mol/m3, or a fraction such as 1e-6"},
    {"ppb", "of mass, moles or volume? write mg/L, mol/m3, or a fraction such as 1e-9"},
    {"ppt", "of mass, moles or volume, and thousand or trillion? write mg/L, mol/m3, or a fraction"},
    {"ppmv", "of which mixture, at which state? write mol/m3, or a mole fraction such as 1e-6"},
    {"ppmw", "of which mixture? write mg/L, or a mass fraction such as 1e-6"},
    {"wt%", "of which mixture? write kg/m3, or a fraction in %"},
    {"vol%", "at which state? write mol/m3, or a fraction in %"},
    {"mol%", "of which mixture? write mol/m3, or a fraction in %"},
    {"ton", "metric, short or long? write t for 1000 kg, or lb"},
    {"tons", "metric, short or long? write t for 1000 kg, or lb"},
    {"sch", "schedules are not looked up: which inside diameter? write it, such as 52.5 mm"},
};

const Unit* by_capitals(const std::string& small) {
  for (const Unit& unit : all_units())  // "mpa" and "MPA" are the megapascal: mPa stands inside compounds only
    if (unit.kind != Unit::Kind::part && small_letters(unit.name) == small) return &unit;
  return nullptr;
}

std::string slip_of(const std::string& small) {
  const auto found = std::find_if(std::begin(slips), std::end(slips), [&](const Pair& p) { return p.slip == small; });
  return found == std::end(slips) ? "" : std::string(found->right);
}

std::string one_unit_near(std::string_view word) {
  const std::string small = small_letters(word);
  if (std::string right = slip_of(small); !right.empty()) return right;
  const Unit* unit = by_capitals(small);
  return unit == nullptr ? "" : std::string(unit->name);
}

/// "kgK" -> "kg/K": two units run together.
std::string split(std::string_view word, char separator) {
  for (std::size_t i = word.size() - 1; i > 0; --i) {
    std::string_view left = word.substr(0, i), right = word.substr(i);
    if (left.ends_with('-')) left.remove_suffix(1);
    if (find_unit(left) != nullptr && find_unit(right) != nullptr)
      return std::string(left) + separator + std::string(right);
  }
  return {};
}

/// One letter wrong, missing or too many, in words long enough that this says something.
bool is_one_edit_off(std::string_view a, std::string_view b) {
  if (a.size() > b.size()) std::swap(a, b);
  if (b.size() < 4 || b.size() - a.size() > 1) return false;
  std::size_t front = 0, back = 0;
  while (front < a.size() && a[front] == b[front]) ++front;
  while (back < a.size() - front && a[a.size() - 1 - back] == b[b.size() - 1 - back]) ++back;
  return front + back + 1 >= b.size();
}

}  // namespace

std::string small_letters(std::string_view word) {
  std::string small(word);
  for (char& c : small)
    if (c >= 'A' && c <= 'Z') c = static_cast<char>(c - 'A' + 'a');
  return small;
}

std::string near_unit(std::string_view word, char separator) {
  if (word.empty() || word.size() > 40) return {};
  if (std::string whole = one_unit_near(word); !whole.empty()) return whole;
  const std::size_t end = std::min(word.find_last_not_of("0123456789") + 1, word.size());
  if (end > 0 && end < word.size())
    if (std::string base = near_unit(word.substr(0, end), separator); !base.empty())
      return base + std::string(word.substr(end));
  if (std::string two = split(word, separator); !two.empty()) return two;
  for (const Unit& u : all_units())
    if (is_one_edit_off(small_letters(word), small_letters(u.name))) return std::string(u.name);
  return {};
}

std::string question_about(std::string_view word) {
  if (word.size() > 10) return {};
  std::string small = small_letters(word);
  const auto asked = [&] {
    return std::find_if(std::begin(questions), std::end(questions), [&](const Pair& p) { return p.slip == small; });
  };
  auto found = asked();
  if (found == std::end(questions))
    small.resize(std::min(small.find_last_not_of("0123456789") + 1, small.size())), found = asked();
  return found == std::end(questions) ? "" : "expected an answer first: " + std::string(found->right);
}

}  // namespace vatwright
