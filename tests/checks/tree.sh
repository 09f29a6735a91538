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
# Only markup.c writes to the page's stream, and sl_markup is given a literal
# (or a choice of two) or one of these tables of literals.
if grep -nwE 'fputs|fputc|putc|fprintf|fwrite' \
    src/ranker/page.c src/ranker/report*.c; then
    echo "only src/ranker/markup.c writes to the page"
    bad=1
fi
given=$(cat src/ranker/page.c src/ranker/report*.c | tr '\n' ' ' |
    grep -oE 'sl_markup\([^,;]*, *[^;]*;' | sed 's/^[^,]*, *//')
[ -n "$given" ] || {
    echo "no call of sl_markup is found: nothing was checked"
    bad=1
}
raw=$(printf '%s\n' "$given" | grep -vE '^("|VESSEL|[^"?]*\? *")' | grep -vxF \
    -e 'list->caption);' -e 'lead);' -e 'marks[state]);' \
    -e 'opening[state]);' -e 'sl_style[i]);')
[ -z "$raw" ] || {
    echo "sl_markup is given more than a literal: $raw"
    bad=1
}
# Long files and functions are for splitting.
for file in src/*/*.c include/*/*.h; do
    lines=$(wc -l <"$file")
    [ "$lines" -le 400 ] || {
        echo "$file has $lines lines; 400 is the most"
        bad=1
    }
done
long=$(awk '/^\{/ { begun = FNR }
    /^\}/ && begun {
        if (FNR - begun - 1 > 60)
            print FILENAME ":" begun ": " FNR - begun - 1 " lines"
        begun = 0
    }' src/*/*.c)
[ -z "$long" ] || {
    echo "a function has more than 60 lines: $long"
    bad=1
}
[ $bad -eq 0 ] && echo "tree: ok"
exit $bad
