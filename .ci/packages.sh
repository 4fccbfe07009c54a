# SPDX-License-Identifier: MIT
# shellcheck shell=sh
# Sourced by the scripts. need_packages NAME...: installs the Debian packages that are missing, and
# calls apt only if there is one.
need_packages() {
  if ! command -v dpkg-query >/dev/null 2>&1; then
    echo "This is no Debian system. Make sure that the equivalents of these are there: $*" >&2
    return 0
  fi
  missing=
  for package in "$@"; do
    case $(dpkg-query -W -f '${db:Status-Status}' "$package" 2>/dev/null) in
      installed*) ;;
      *) missing="$missing $package" ;;
    esac
  done
  if [ -z "$missing" ]; then
    return 0
  fi
  echo "Installing:$missing"
  if [ "$(id -u)" -eq 0 ]; then
    as_root=
  elif command -v sudo >/dev/null 2>&1; then
    as_root=sudo
  else
    echo "These packages are missing, and neither root rights nor sudo are at hand. Ask for:" >&2
    echo "  apt-get install --no-install-recommends$missing" >&2
    return 1
  fi
  # shellcheck disable=SC2086  # $missing is a list, and $as_root may be nothing
  $as_root apt-get update -qq &&
    $as_root env DEBIAN_FRONTEND=noninteractive \
      apt-get install -qq -y --no-install-recommends $missing >/dev/null
}
