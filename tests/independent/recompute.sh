#!/bin/sh
# recompute.sh SUMMERLOW DIR: audits each inventory, one of them by each margin
# rule, and holds every figure to the second implementation.
set -u
program=$1
work=$2
failed=0

# one INVENTORY NAME EVERY [--rule RULE]: each station, or each so manieth
one() {
    inventory=$1
    out=$work/$2
    every=$3
    shift 3
    rm -rf "$out"
    echo "== $inventory $*"
    "$program" audit "$inventory" --out "$out" --year 2026 "$@" \
        >/dev/null 2>&1
    test $? -le 1 || exit 1
    /usr/bin/python3 tests/independent/recompute.py "$inventory" "$out" \
        --every "$every" || failed=1
}

one sample-inventory sample 1
one tests/independent/hard-cases hard-cases 1
one tests/independent/hard-conditions hard-conditions 1
for rule in 'ANSI/HI 9.6.1-1998' 'ANSI/HI 9.6.1 after 2012' \
    'Ill. Adm. Code 370.420' 'Ill. Adm. Code 370.420, self-priming' \
    'ISO 5199 and ISO 9905' 'board 2026'; do
    one tests/independent/hard-conditions by-rule 2 --rule "$rule"
done
exit $failed
