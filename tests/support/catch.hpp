#pragma once
// The one place that names the header of the test library: version 2 has one header, version 3 another.
#if __has_include(<catch2/catch.hpp>)
#include <catch2/catch.hpp>
#else
#include <catch2/catch_all.hpp>
using Catch::Approx;
#endif
