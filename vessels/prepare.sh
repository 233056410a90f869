# Sourced by vessels/demo.sh and tests/run.sh: installs what is missing on Debian and Ubuntu, without asking; elsewhere it names what is needed.
# Plain sh; needs nothing but the base system.

# need "what the step wants" PROGRAM|FILE=PACKAGE ..   A name with a slash is a file below /usr, all else a program.
need() {
  wanted=$1
  shift
  missing=
  for pair in "$@"; do
    thing=${pair%%=*}
    package=${pair#*=}
    case $thing in
      */*) found=$(ls -d /usr/$thing /usr/local/$thing 2>/dev/null | head -n 1) ;;
      *) found=$(command -v "$thing" 2>/dev/null || true) ;;
    esac
    [ -n "$found" ] || missing="$missing $package"
  done
  [ -n "$missing" ] || return 0
  if ! command -v apt-get >/dev/null 2>&1; then
    echo "$wanted needs what Debian calls:$missing" >&2
    echo "install them with this system's package manager, then run this again" >&2
    exit 1
  fi
  as_root=
  if [ "$(id -u)" != 0 ]; then
    as_root=sudo
    command -v sudo >/dev/null 2>&1 || { echo "$wanted needs (as root): apt-get install$missing" >&2; exit 1; }
  fi
  echo "installing for $wanted:$missing" >&2
  $as_root apt-get update -qq >&2
  # shellcheck disable=SC2086
  DEBIAN_FRONTEND=noninteractive $as_root apt-get install -y -qq --no-install-recommends $missing >&2
}

need_for_build() {
  need "the build" g++=g++ cmake=cmake ninja=ninja-build include/boost/version.hpp=libboost-dev include/CLI/CLI.hpp=libcli11-dev \
    include/toml++/toml.h=libtomlplusplus-dev include/nlohmann/json.hpp=nlohmann-json3-dev \
    include/eigen3/Eigen/Dense=libeigen3-dev include/sha256.h=libmd-dev
}
