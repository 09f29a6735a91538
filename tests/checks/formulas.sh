#!/bin/sh
# Each formula key that the code cites is in docs/formulas.md, and each key
# there is cited by the code.
set -u
bad=0
known=$(sed -n 's/^#* *\**\(F[0-9][0-9]*\)\b.*/\1/p' docs/formulas.md | sort -u)
cited=$(grep -ohE '\bF[0-9]+\b' src/*/*.c include/*/*.h | sort -u)
[ -n "$known" ] || {
    echo "docs/formulas.md has no formula"
    exit 1
}
for key in $cited; do
    echo "$known" | grep -qx "$key" || {
        echo "the code cites $key, docs/formulas.md does not have it"
        bad=1
    }
done
for key in $known; do
    echo "$cited" | grep -qx "$key" || {
        echo "docs/formulas.md has $key, no code cites it"
        bad=1
    }
done
[ $bad -eq 0 ] && echo "formulas: $(echo "$known" | wc -l) keys ok"
exit $bad
