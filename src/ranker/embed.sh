#!/bin/sh
# embed.sh OUTDIR: write OUTDIR/style.h, the style sheet of the report as an
# array of lines (a single literal of it would be longer than C17 promises).
set -eu

style=$(dirname "$0")/report.css
mkdir -p "$1"
if grep -q '</' "$style"; then
    echo "embed.sh: '$style' would end its style element; take '</' out" >&2
    exit 1
fi
{
    echo '/* Made by src/ranker/embed.sh from src/ranker/report.css. */'
    echo 'static const char *const sl_style[] = {'
    sed -e 's/\\/\\\\/g' -e 's/"/\\"/g' -e 's/^/    "/' -e 's/$/\\n",/' \
        "$style"
    echo '};'
} >"$1/style.h.new"
mv "$1/style.h.new" "$1/style.h"
