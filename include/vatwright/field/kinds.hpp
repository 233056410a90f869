#pragma once
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "vatwright/field/field.hpp"

namespace vatwright {

// One maker of a Field for each shape of value. Arguments in this order: key, what it may be, where it goes, what it
// means, what holds where it is left out.

namespace field_detail {
template <class T>
void give(Given<T>& given, const Node& node, std::optional<T> value) {
  given = {std::move(value), node.place, true};
}
}  // namespace field_detail

/// A figure: `"6.3 m3"`, or a bare number where it has no dimension.
template <class D>
Field<D> figure(std::string key, Measure m, Given<double> D::*member, std::string doc, std::string_view left_out = "") {
  auto read = [key, m, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_figure(n, m, s, key));
  };
  return {key, m.text() + ", `" + m.example() + "`", std::string(left_out), std::move(doc), read};
}

/// A figure whose dimension is judged later; form says what fits.
template <class D>
Field<D> raw(std::string key, std::string form, Given<Raw> D::*member, std::string doc,
             std::string_view left_out = "") {
  auto read = [key, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_raw(n, s, key));
  };
  return {key, std::move(form), std::string(left_out), std::move(doc), read};
}

template <class D>
Field<D> raws(std::string key, std::string form, Given<std::vector<Raw>> D::*member, std::string doc,
              std::string_view left_out = "") {
  auto read = [key, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_raws(n, s, key));
  };
  return {key, std::move(form), std::string(left_out), std::move(doc), read};
}

template <class D>
Field<D> text(std::string key, std::string form, Given<std::string> D::*member, std::string doc,
              std::string_view left_out = "") {
  auto read = [key, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_text(n, s, key));
  };
  return {key, std::move(form), std::string(left_out), std::move(doc), read};
}

template <class D>
Field<D> texts(std::string key, std::string form, Given<std::vector<std::string>> D::*member, std::string doc,
               std::string_view left_out = "") {
  auto read = [key, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, vatwright::read_texts(n, s, key));
  };
  return {key, std::move(form), std::string(left_out), std::move(doc), read};
}

template <class D>
Field<D> truth(std::string key, Given<bool> D::*member, std::string doc, std::string_view left_out = "") {
  auto read = [key, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_truth(n, s, key));
  };
  return {key, "true or false", std::string(left_out), std::move(doc), read};
}

template <class D>
Field<D> whole(std::string key, std::int64_t least, Given<std::int64_t> D::*member, std::string doc,
               std::string_view left_out = "") {
  auto read = [key, least, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_whole(n, least, s, key));
  };
  return {key, "a whole number, " + std::to_string(least) + " or more", std::string(left_out), std::move(doc), read};
}

/// One of a few words, each with its meaning.
template <class D, class E>
Field<D> words(std::string key, std::vector<std::pair<std::string, E>> known, Given<E> D::*member, std::string doc,
               std::string_view left_out = "") {
  std::vector<std::string> names;
  for (const auto& [word, meaning] : known) names.push_back(word);
  const std::string form = joined(names, "or");
  auto read = [key, known, names, form, member](const Node& n, const Scope& s, D& d) {
    std::optional<E> value;
    if (const std::optional<std::string> word = read_text(n, s, key)) {
      for (const auto& [name, meaning] : known)
        if (name == *word) value = meaning;
      const std::string near = meant(*word, names);
      if (!value)
        s.error(n.place, key, found_text(n), "expected " + form + (near.empty() ? "" : "; nearest: " + quoted(near)));
    }
    field_detail::give(d.*member, n, value);
  };
  return {key, form, std::string(left_out), std::move(doc), read};
}

/// [least, most]; what: what the two are, for the message.
template <class D>
Field<D> pair_of(std::string key, Measure m, std::string what, std::string example,
                 Given<std::pair<double, double>> D::*member, std::string doc, std::string_view left_out = "") {
  auto read = [key, m, what, example, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_pair(n, m, what, example, s, key));
  };
  return {key, what + ", `" + example + "`", std::string(left_out), std::move(doc), read};
}

/// [least, most], or the most alone.
template <class D>
Field<D> bounds(std::string key, Measure m, std::string example, Given<Bounds> D::*member, std::string doc,
                std::string_view left_out = "") {
  auto read = [key, m, example, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_bounds(n, m, example, s, key));
  };
  return {key, "least and most, `" + example + "`, or the most alone", std::string(left_out), std::move(doc), read};
}

template <class D>
Field<D> figures(std::string key, Measure m, Given<std::vector<double>> D::*member, std::string doc,
                 std::string_view left_out = "") {
  auto read = [key, m, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_figures(n, m, s, key));
  };
  return {key, "a list, each " + m.text(), std::string(left_out), std::move(doc), read};
}

template <class D>
Field<D> figures_by_species(std::string key, Measure m, std::string form, Given<ByName<double>> D::*member,
                            std::string doc, std::string_view left_out = "") {
  auto read = [key, m, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_figures_by_name(n, m, s, key));
  };
  return {key, std::move(form), std::string(left_out), std::move(doc), read};
}

template <class D>
Field<D> raws_by_species(std::string key, std::string form, Given<ByName<Raw>> D::*member, std::string doc,
                         std::string_view left_out = "") {
  auto read = [key, member](const Node& n, const Scope& s, D& d) {
    field_detail::give(d.*member, n, read_raws_by_name(n, s, key));
  };
  return {key, std::move(form), std::string(left_out), std::move(doc), read};
}

}  // namespace vatwright
