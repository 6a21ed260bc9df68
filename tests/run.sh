#!/usr/bin/env bash
# Restores, builds with warnings as errors, and runs every test. Needs the .NET 10 SDK and package registries.
#
#   bash tests/run.sh [--long]
#
# The last line reads "N passed, N failed, N skipped"; the exit code is 0 only when nothing failed.
# --long turns on explicit tests (long properties, many crashes). CI=true restores with locked package versions.
set -uo pipefail
cd "$(dirname "${BASH_SOURCE[0]}")/.."

explicit=()
for argument in "$@"; do
    case $argument in
        --long) explicit=(-explicit on) ;;
        *) echo "usage: bash tests/run.sh [--long]" >&2; exit 2 ;;
    esac
done

export DOTNET_CLI_TELEMETRY_OPTOUT=1 DOTNET_NOLOGO=1 MSBUILDDISABLENODEREUSE=1 DOTNET_CLI_UI_LANGUAGE=en NO_COLOR=1
# Test programs are started by themselves, so they must find the runtime that the SDK brings.
if [ -z "${DOTNET_ROOT:-}" ] && command -v dotnet > /dev/null; then
    DOTNET_ROOT=$(dirname "$(readlink -f "$(command -v dotnet)")")
    export DOTNET_ROOT
fi

passed=0 failed=0 skipped=0
log=$(mktemp)
trap 'rm -f "$log"' EXIT

finish() {
    echo "$passed passed, $failed failed, $skipped skipped"
    [ "$failed" -eq 0 ]
    exit
}

# A step that is not a test; when it fails, nothing after it can run.
require() {
    "$@" && return
    echo "FAILED: $*" >&2
    failed=$((failed + 1))
    finish
}

plain() { sed -E 's/\x1b\[[0-9;]*[A-Za-z]//g' "$1"; }

# One number of the last summary line of a log, such as "X  Total: 9, Errors: 0, Failed: 1, Skipped: 0, Not Run: 2, Time: 1s".
count() { plain "$log" | grep -E '(^|[[:space:]])Total: [0-9]+' | tail -n 1 | grep -oE "$1: [0-9]+" | grep -oE '[0-9]+$' || echo 0; }

run_project() {
    local name="RespDerive.$1" project="tests/RespDerive.$1" program code total
    program="$project/bin/Release/net10.0/$name"
    if [ ! -x "$program" ]; then
        echo "FAILED: $name was not built" >&2
        failed=$((failed + 1))
        return
    fi

    "$program" -noColor -noLogo "${explicit[@]}" > "$log" 2>&1 < /dev/null
    code=$?
    if ! plain "$log" | grep -qE '(^|[[:space:]])Total: [0-9]+'; then
        plain "$log"
        echo "FAILED: $name printed no summary (exit code $code)" >&2
        failed=$((failed + 1))
        return
    fi

    local bad
    total=$(count Total)
    bad=$(($(count Failed) + $(count Errors)))
    local left=$(($(count Skipped) + $(count 'Not Run')))
    # A program that ends with an error although no test failed has broken off.
    if [ "$code" -ne 0 ] && [ "$bad" -eq 0 ]; then
        bad=1
    fi

    if [ "$bad" -gt 0 ]; then
        plain "$log"
    else
        plain "$log" | grep -E '\[SKIP\]' || true
    fi

    local good=$((total - $(count Failed) - left))
    if [ "$good" -lt 0 ]; then
        good=0
    fi

    passed=$((passed + good))
    failed=$((failed + bad))
    skipped=$((skipped + left))
    local note=""
    if [ "$total" -eq 0 ]; then
        note="  (it has no tests)"
    fi

    printf '  %-34s %5d passed, %d failed, %d skipped%s\n' "$name" "$good" "$bad" "$left" "$note"
}

# What the tier took against what it may take; told, not enforced: machines differ.
tier_started=0
begin() { echo "== $1"; tier_started=$SECONDS; }
end() {
    local took=$((SECONDS - tier_started)) note=""
    if [ "$took" -gt $(($1 * 60)) ]; then
        note="  (over its budget)"
    fi

    echo "   $((took / 60)) min $((took % 60)) s of $1 min$note"
}

# Node: the reference library of the unit tests and the peers of the process tests come from npm.
find_npm() {
    if ! command -v npm > /dev/null && command -v apt-get > /dev/null && [ "$(id -u)" -eq 0 ]; then
        { apt-get update && DEBIAN_FRONTEND=noninteractive apt-get install -y --no-install-recommends nodejs npm; } > "$log" 2>&1 ||
            plain "$log" >&2
    fi

    command -v npm > /dev/null
}

# Peers of the process tests: independent FHIR servers from npm, where the repository asks for them.
install_peers() {
    [ -f tests/peers/package.json ] || return 0
    if ! find_npm; then
        echo "FAILED: npm is needed for tests/peers and is not here" >&2
        return 1
    fi

    (cd tests/peers && npm ci --no-audit --no-fund --loglevel=error)
}

begin build
if [ "${CI:-}" = true ]; then
    require dotnet restore RespDerive.sln --locked-mode --verbosity minimal
else
    require dotnet restore RespDerive.sln --verbosity minimal
fi

require dotnet build RespDerive.sln --configuration Release --no-restore --nologo --verbosity minimal -warnaserror
find_npm || echo "npm is not here: the units are not checked against the reference library" >&2
end 3

begin pure
for project in Physiology.Tests Timeline.Tests Fhir.Tests; do run_project $project; done
end 3

begin component
for project in Storage.Tests Sandbox.Tests Service.Tests Tests; do run_project $project; done
end 5

begin processes
if install_peers; then
    run_project Acceptance.Tests
else
    echo "FAILED: the peers of the process tests could not be installed" >&2
    failed=$((failed + 1))
fi
end 9

finish
