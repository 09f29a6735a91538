#!/bin/sh
# Each header compiles alone.
set -u
bad=0
count=0
for header in include/*/*.h; do
    count=$((count + 1))
    # A header of macros alone makes an empty unit: declare something.
    printf '#include "%s"\nextern int something;\n' "${header#include/}" |
        ${CC:-cc} -std=c17 -Wall -Wextra -Wpedantic -Werror -Iinclude \
            -Ibuild/generated -fsyntax-only -x c - || {
        echo "$header does not compile alone"
        bad=1
    }
done
# Base names are unique across the tree.
twice=$(basename -a src/*/*.c | sort | uniq -d)
[ -z "$twice" ] || {
    echo "two files of one name: $twice"
    bad=1
}
[ $bad -eq 0 ] && [ $count -gt 0 ] && echo "headers: $count ok"
exit $bad
