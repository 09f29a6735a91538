#!/bin/sh
# recompute.sh SUMMERLOW DIR: audits each inventory, one of them by each margin
# rule, and holds every figure to the second implementation.
set -u
program=$1
work=$2
failed=0

# one INVENTORY NAME [--rule RULE]
one() {
    inventory=$1
    out=$work/$2
    shift 2
    rm -rf "$out"
    echo "== $inventory $*"
    "$program" audit "$inventory" --out "$out" --year 2026 "$@" \
        >/dev/null 2>&1
    test $? -le 1 || exit 1
    /usr/bin/python3 tests/independent/recompute.py "$inventory" "$out" \
        || failed=1
}

one sample-inventory sample
one tests/independent/hard-cases hard-cases
one tests/independent/hard-conditions hard-conditions
for rule in 'ANSI/HI 9.6.1-1998' 'ANSI/HI 9.6.1 after 2012' \
    'Ill. Adm. Code 370.420' 'Ill. Adm. Code 370.420, self-priming' \
    'ISO 5199 and ISO 9905' 'board 2026'; do
    one tests/independent/hard-conditions by-rule --rule "$rule"
done
exit $failed
