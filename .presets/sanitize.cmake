# cmake -C .presets/sanitize.cmake -S . -B build-sanitize      the other compiler, address and undefined behaviour watched, the fuzz target too
set(CMAKE_BUILD_TYPE RelWithDebInfo CACHE STRING "")
set(CMAKE_CXX_COMPILER clang++ CACHE STRING "")
set(CMAKE_CXX_FLAGS "-O1 -fsanitize=address,undefined,fuzzer-no-link -fno-sanitize-recover=all -fno-omit-frame-pointer" CACHE STRING "")
set(VATWRIGHT_FUZZ ON CACHE BOOL "")
