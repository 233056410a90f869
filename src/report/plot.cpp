#include "plot.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "vatwright/report/layout.hpp"

namespace vatwright {
namespace {

constexpr int rows = 14, columns = 64;

/// The place of a value between two ends, in cells.
int cell_of(double value, double low, double high, int cells) {
  return std::clamp(static_cast<int>(std::lround((value - low) / (high - low) * (cells - 1))), 0, cells - 1);
}

std::string padded(const std::string& text, int width) {
  return std::string(static_cast<std::size_t>(std::max(0, width - width_of(text))), ' ') + text;
}

/// The figure at a column, between the two places beside it.
double at_column(const Plot& plot, const Series& series, int column) {
  const double x = plot.x.front() + (plot.x.back() - plot.x.front()) * column / (columns - 1);
  const auto after = std::ranges::lower_bound(plot.x, x);
  const auto k = static_cast<std::size_t>(after - plot.x.begin());
  if (k == 0) return series.y.front();
  if (k == plot.x.size()) return series.y.back();
  const double share = (x - plot.x[k - 1]) / (plot.x[k] - plot.x[k - 1]);
  return series.y[k - 1] + share * (series.y[k] - series.y[k - 1]);
}

}  // namespace

std::pair<double, double> range_of(const std::vector<Series>& series) {
  double low = std::numeric_limits<double>::infinity(), high = -low;
  for (const Series& one : series)
    for (const double y : one.y) low = std::min(low, y), high = std::max(high, y);
  return {low, high};
}

std::vector<std::string> lines_of(const Plot& plot) {
  const auto [low, high] = range_of(plot.series);
  if (plot.x.size() < 2 || !(high > low)) return {};
  std::vector<std::string> grid(rows, std::string(columns, ' '));
  for (const Series& series : plot.series) {
    int before = cell_of(at_column(plot, series, 0), low, high, rows);
    for (int column = 0; column < columns; ++column) {
      const int here = cell_of(at_column(plot, series, column), low, high, rows);
      // steep pieces are drawn through, up to the row beside the last one
      const int from = here > before ? std::min(before + 1, here) : here,
                to = here < before ? std::max(before - 1, here) : here;
      for (int row = from; row <= to; ++row)
        grid[static_cast<std::size_t>(rows - 1 - row)][static_cast<std::size_t>(column)] = series.mark;
      before = here;
    }
  }
  const int width = std::max(width_of(plot.ends_y.first), width_of(plot.ends_y.second));
  std::vector<std::string> lines;
  for (int row = 0; row < rows; ++row) {
    const std::string label = row == 0 ? plot.ends_y.second : row == rows - 1 ? plot.ends_y.first : "";
    std::string drawn = grid[static_cast<std::size_t>(row)];
    drawn.erase(drawn.find_last_not_of(' ') + 1);
    lines.push_back("  " + padded(label, width) + " |" + drawn);
  }
  const std::string indent(static_cast<std::size_t>(width + 4), ' ');
  lines.push_back(indent.substr(1) + "+" + std::string(columns, '-'));
  const int between = columns - width_of(plot.ends_x.first);
  lines.push_back(indent + plot.ends_x.first + padded(plot.ends_x.second, between));
  std::string key = "over " + plot.name_x + ": ";
  for (std::size_t k = 0; k < plot.series.size(); ++k)
    key += (k == 0 ? "" : ", ") + std::string(1, plot.series[k].mark) + " " + plot.series[k].name;
  lines.push_back(indent + key);
  return lines;
}

}  // namespace vatwright
