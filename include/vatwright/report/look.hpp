#pragma once
#include "vatwright/quantity/show.hpp"

namespace vatwright {

/// How an answer is shown to a person.
struct Look {
  Units units = Units::trade;
  bool colour = false;  ///< bold and dim text; never the only carrier of meaning
  bool ascii = true;    ///< nothing beyond ASCII, for what is not a terminal
};

}  // namespace vatwright
