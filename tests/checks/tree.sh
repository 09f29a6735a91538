#!/bin/sh
# What lies at the top, and that raw text is never written into markup.
set -u
bad=0
for entry in *; do
    case $entry in
    README.md | DEVELOPERS.md | LICENSE | Makefile | src | include | sql | \
        tests | sample-inventory | docs | build) ;;
    *)
        echo "$entry does not belong at the top"
        bad=1
        ;;
    esac
done
# In the files that write markup, a %s would pass text by the escaping call.
if grep -n '%s' src/ranker/markup.c src/ranker/page.c src/ranker/report*.c \
    2>/dev/null; then
    echo "text reaches the page through sl_markup_text alone"
    bad=1
fi
# Long files and functions are for splitting.
for file in src/*/*.c include/*/*.h; do
    lines=$(wc -l <"$file")
    [ "$lines" -le 400 ] || {
        echo "$file has $lines lines; 400 is the most"
        bad=1
    }
done
[ $bad -eq 0 ] && echo "tree: ok"
exit $bad
