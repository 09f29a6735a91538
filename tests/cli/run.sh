#!/bin/sh
# Command-line cases: each folder of tests/cli holds `cmd` (a shell line in
# which $summerlow is the program and $work an empty folder) and what is
# expected: `stdout`, `stderr` and `status`, each optional; nothing, nothing
# and 0 where a file is missing.  `sh tests/cli/run.sh PROGRAM --accept`
# writes what came as what is expected: read the difference before you
# commit it.
set -u
summerlow=$(realpath "$1")
accept=${2:-}
root=$(cd "$(dirname "$0")/../.." && pwd)
passed=0
failed=0
export summerlow root
export SOURCE_DATE_EPOCH=1767225600

# same FILE EXPECTED: equal, where a missing EXPECTED is an empty one.
same()
{
    if [ -f "$2" ]; then cmp -s "$1" "$2"; else [ ! -s "$1" ]; fi
}

for case in "$root"/tests/cli/*/; do
    case=${case%/}
    work=$(mktemp -d)
    export work
    (cd "$root" && sh "$case/cmd") >"$work.out" 2>"$work.err" </dev/null
    echo $? >"$work.status"
    # The temporary folder has another name each time.
    sed -i "s|$work|WORK|g" "$work.out" "$work.err"
    [ -f "$case/status" ] || [ "$(cat "$work.status")" != 0 ] ||
        : >"$work.status"
    if [ "$accept" = --accept ]; then
        for what in out:stdout err:stderr status:status; do
            got=$work.${what%:*}
            rm -f "$case/${what#*:}"
            [ ! -s "$got" ] || cp "$got" "$case/${what#*:}"
        done
    fi
    if same "$work.out" "$case/stdout" && same "$work.err" "$case/stderr" &&
        same "$work.status" "$case/status"; then
        passed=$((passed + 1))
    else
        failed=$((failed + 1))
        echo "FAILED: ${case##*/}: $(cat "$case/cmd")"
        for what in out:stdout err:stderr status:status; do
            expected=$case/${what#*:}
            [ -f "$expected" ] || expected=/dev/null
            diff -u "$expected" "$work.${what%:*}" | head -40
        done
    fi
    rm -rf "$work" "$work.out" "$work.err" "$work.status"
done
echo "$passed passed, $failed failed"
[ "$passed" -gt 0 ] && [ "$failed" -eq 0 ]
