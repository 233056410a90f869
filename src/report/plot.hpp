#pragma once
#include <string>
#include <vector>

namespace vatwright {

/// One line of a plot: figures over the places of the plot, drawn with a mark of its own.
struct Series {
  char mark = '*';
  std::string name;
  std::vector<double> y;  ///< one for each place
};
/// A small plot in characters, later series over earlier ones. x rises; labels of both ends of x and y stand at the
/// axes.
///   ends_x, ends_y: texts at the lowest and highest x and y.
struct Plot {
  std::vector<double> x;
  std::vector<Series> series;
  std::string name_x;
  std::pair<std::string, std::string> ends_x, ends_y;
};
/// Lines of at most 80 columns; none where there is nothing to draw.
std::vector<std::string> lines_of(const Plot& plot);
/// Lowest and highest figure of all series.
std::pair<double, double> range_of(const std::vector<Series>& series);

}  // namespace vatwright
