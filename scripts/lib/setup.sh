# Sets up what scripts/start and scripts/test need before Node can take over. Sourced, with the clone as the current folder.

say() { printf '%s\n' "$*"; }
fail() { printf '%s\n' "$*" >&2; exit 1; }

check_node() {
  local version
  version=$(node --version 2>/dev/null) || fail 'Node.js is missing: install Node 20 (20.19 or later) with npm.'
  node -e 'const [major, minor] = process.versions.node.split(".").map(Number); process.exit(major > 20 || (major === 20 && minor >= 19) ? 0 : 1)' ||
    fail "Node.js $version is too old: install Node 20.19 or later."
  command -v npm >/dev/null || fail 'npm is missing: install it beside Node.js.'
}

# The git-ignored folder for everything the scripts keep; PostgreSQL's own user must be able to pass through.
make_state_folder() {
  mkdir -p .halyard 2>/dev/null && [ -w .halyard ] && [ -w . ] ||
    fail "$PWD or its folder .halyard belongs to another user: run this as $(stat -c %U .halyard 2>/dev/null || stat -c %U .), or in a clone of your own."
  chmod 755 .halyard 2>/dev/null || true
}

is_there() {
  case $1 in
    postgresql) ls /usr/lib/postgresql/*/bin/initdb >/dev/null 2>&1 ;;
    zbar-tools) command -v zbarimg >/dev/null ;;
    poppler-utils) command -v pdftoppm >/dev/null ;;
    *) command -v "$1" >/dev/null ;;
  esac
}

# Installs those of the named Debian packages that are missing, when it may.
need_packages() {
  local name missing=()
  for name in "$@"; do is_there "$name" || missing+=("$name"); done
  [ ${#missing[@]} -eq 0 ] && return
  local as_root=()
  if [ "$(id -u)" -ne 0 ]; then
    if ! sudo -n true 2>/dev/null; then
      fail "Missing Debian packages, and this user may not install them. As root, run:

  apt-get update && apt-get install -y --no-install-recommends ${missing[*]}

then start this again."
    fi
    as_root=(sudo -n)
  fi
  say "Installing Debian packages: ${missing[*]}"
  "${as_root[@]}" scripts/lib/install-packages "${missing[@]}"
  for name in "${missing[@]}"; do is_there "$name" || fail "The Debian package $name could not be installed."; done
}

# argon2 brings a program ready made, which not every Node 20 can load: it may crash at once.
loads_argon2() {
  { (ulimit -c 0 && node -e 'require("argon2")'); } >/dev/null 2>&1
}

# Two starts in one clone must not install over each other: whoever waited finds the work done. `exec 9>&-` lets go.
lock_npm() {
  exec 9>.halyard/npm.lock
  flock -n 9 && return
  say 'Waiting for another scripts/start or scripts/test of this clone, which installs npm packages'
  flock 9
}

install_npm_packages() {
  node scripts/lib/is-installed.mjs && return
  lock_npm
  if ! node scripts/lib/is-installed.mjs; then
    say 'Installing npm packages (npm ci)'
    # No package but argon2 needs its install script. The signal ends npm should this script be killed.
    setpriv --pdeathsig TERM -- npm ci --ignore-scripts --no-audit --no-fund --loglevel=error ||
      fail 'npm ci failed: see above.'
  fi
  exec 9>&-
}

# Built against the headers that came with Node, where they did; npm fetches them otherwise.
build_argon2() {
  local prefix
  prefix=$(dirname "$(dirname "$(readlink -f "$(command -v node)")")")
  lock_npm
  if ! loads_argon2; then
    say 'Building argon2 for this machine'
    [ ! -e "$prefix/include/node/node_api.h" ] || export npm_config_nodedir=$prefix
    setpriv --pdeathsig TERM -- npm rebuild argon2 --loglevel=error >&2 || fail 'argon2 could not be built: see above.'
    loads_argon2 || fail 'argon2 was built, but Node.js cannot load it.'
  fi
  exec 9>&-
}

# Everything before Node can take over; the arguments are the Debian packages that the caller needs.
set_up() {
  local needed=("$@")
  check_node
  make_state_folder
  install_npm_packages
  loads_argon2 || needed+=(python3 make g++)
  need_packages "${needed[@]}"
  loads_argon2 || build_argon2
}
