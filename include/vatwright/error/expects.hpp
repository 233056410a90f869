#pragma once
#include <cstdio>
#include <cstdlib>

/// A precondition that only a programmer can break: prints what was expected and where, and stops.
#define VATWRIGHT_EXPECTS(condition)                                                            \
  do {                                                                                          \
    if (!(condition)) {                                                                         \
      std::fprintf(stderr, "%s:%d: expects %s\n", __FILE__, __LINE__, #condition);              \
      std::abort();                                                                             \
    }                                                                                           \
  } while (false)
