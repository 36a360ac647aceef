# Sourced by the scripts: packages, tools and the build, each done only when it is out of date.

root="$(cd "$(dirname "${BASH_SOURCE[0]}")/../.." && pwd)"
cd "$root" || exit 1
mkdir -p .data
export NUXT_TELEMETRY_DISABLED=1

say() { printf '\033[1m%s\033[0m\n' "$*" >&2; }

packages_up() {
  local now
  now="$(sha256sum package-lock.json | cut -d ' ' -f 1)"
  if [ -d node_modules ] && [ "$(cat .data/packages 2>/dev/null)" = "$now" ]; then return 0; fi
  say 'Installing packages'
  npm ci --include=dev --no-audit --no-fund >&2 || return 1
  printf '%s' "$now" >.data/packages
}

# tools_up program=package ...: installs what is missing from Debian, or names the one command that does.
tools_up() {
  local missing=() pair
  for pair in "$@"; do
    case "$pair" in
      python3:*)
        /usr/bin/python3 -c "import ${pair#python3:}" >/dev/null 2>&1 || missing+=("python3-${pair#python3:}")
        ;;
      *) command -v "${pair%%=*}" >/dev/null 2>&1 || missing+=("${pair#*=}") ;;
    esac
  done
  [ "${#missing[@]}" -gt 0 ] || return 0
  say "Installing ${missing[*]} from Debian"
  if [ "$(id -u)" = 0 ]; then
    (apt-get update -qq && DEBIAN_FRONTEND=noninteractive apt-get install -y -qq "${missing[@]}") >/dev/null
  elif command -v sudo >/dev/null 2>&1 && sudo -n true 2>/dev/null; then
    (sudo apt-get update -qq && sudo DEBIAN_FRONTEND=noninteractive apt-get install -y -qq "${missing[@]}") >/dev/null
  else
    echo "Missing: ${missing[*]}. Install with: sudo apt-get install ${missing[*]}" >&2
    return 1
  fi
}

# A hash of every source that goes into the build. File ages would miss deletions.
sources_hash() {
  local list
  if git rev-parse --is-inside-work-tree >/dev/null 2>&1; then
    list="$(git ls-files -co --exclude-standard)"
  else
    list="$(find . -type f -not -path './node_modules/*' -not -path './.*' | sed 's|^\./||')"
  fi
  printf '%s\n' "$list" | grep -v -E '^(tests|docs|scripts|\.ci)/|\.md$' | LC_ALL=C sort | while IFS= read -r file; do
    if [ -f "$file" ]; then sha256sum "$file"; fi
  done | sha256sum | cut -d ' ' -f 1
}

build_up() {
  local now
  now="$(sources_hash)"
  if [ -f .output/server/index.mjs ] && [ "$(cat .data/built 2>/dev/null)" = "$now" ]; then return 0; fi
  say 'Building'
  rm -f .data/built
  npx --no-install nuxt build >.data/build.log 2>&1 || {
    tail -n 40 .data/build.log >&2
    return 1
  }
  printf '%s' "$now" >.data/built
}
