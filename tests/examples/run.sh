#!/bin/sh
# Published worked examples through the whole program, CSV in, CSV out.
# Each folder of tests/examples is an inventory, with expected.csv beside it;
# see README.md.  Fails when a figure lies outside its tolerance, when there
# is none, and when fewer than LEAST examples were compared.
set -u
LEAST=20
summerlow=$(realpath "$1")
cd "$(dirname "$0")" || exit 1
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
failed=0
compared=0

# audit EXAMPLE UNITS: its pumps.csv, in the units that a column may ask for,
# by the example's own margin rule where it has one.
audit()
{
    rule="fixed head"
    [ ! -f "$1/margin_rules.csv" ] || rule="NPSHR alone"
    rm -rf "$work/out"
    "$summerlow" audit "$1" --out "$work/out" --units "$2" --rule "$rule" \
        >"$work/said" 2>&1 && mv "$work/out/pumps.csv" "$work/$2.csv"
}

for example in */; do
    example=${example%/}
    if ! audit "$example" si || ! audit "$example" us; then
        echo "FAILED: $example: the audit, or not all its records are kept"
        cat "$work/said"
        failed=$((failed + 1))
        continue
    fi
    if awk -v example="$example" -f ../csv.awk -f compare.awk \
        "$work/si.csv" "$work/us.csv" "$example/expected.csv"; then
        compared=$((compared + 1))
    else
        failed=$((failed + 1))
    fi
done
echo "$compared examples agree, $failed do not"
[ "$failed" -eq 0 ] && [ "$compared" -ge "$LEAST" ]
