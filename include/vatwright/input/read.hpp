#pragma once
#include <optional>
#include <string>
#include <vector>

#include "vatwright/error/diagnostic.hpp"
#include "vatwright/rating/duty.hpp"

namespace vatwright {

/// What came of reading: diagnostics always; the inventory, and the problems where a duty was given and nothing is wrong.
struct ReadResult {
  Diagnostics diagnostics;
  std::optional<Problems> problems;          ///< both files, in order
  std::optional<Site> site;                  ///< inventory alone (check without a duty)
  std::string inventory_sha256, duty_sha256; ///< hex; duty empty where none
  std::vector<std::string> understood;       ///< sentences for `check`, in words and trade units
};

/// A file's name as the user gave it and its bytes, or why they could not be had, in words.
struct FileText {
  std::string name, text, fault;
};
/// Reads the texts of two files; see read_files.
ReadResult read_texts(const FileText& inventory, const std::optional<FileText>& duty,
                      const std::optional<std::string>& feed_rate = {});

/// Reads an inventory and, where given, a duty (paths), checks all of both and tells every fault at once. Files of any bytes
/// are answered; a duty whose mode or thermal is not computed yet is refused in plain words.
/// feed_rate: text of --feed-rate, put in place of the duty's feed rate or production where given.
ReadResult read_files(const std::string& inventory_path, const std::optional<std::string>& duty_path,
                      const std::optional<std::string>& feed_rate = {});

/// The reference of keys in Markdown, printed from the declarations (docs/keys.md is this text).
std::string keys_reference();

}  // namespace vatwright
