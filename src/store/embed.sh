#!/bin/sh
# Turn the SQL under sql/ into C: OUTDIR/store/catalogue.h and catalogue.c.
# Run from the root of the project: sh src/store/embed.sh OUTDIR
set -eu
LC_ALL=C
export LC_ALL

out=$1/store
mkdir -p "$out"

# Texts are arrays of numbers: a C string may not hold 4096 characters by
# the standard, and needs no escaping this way.
bytes() {
    od -An -v -tu1 "$1" | sed 's/  *\([0-9][0-9]*\)/\1,/g'
}

# list ARRAY FILE...: the files in order of name, {name, number, text} each.
list() {
    array=$1
    shift
    count=0
    for file; do
        printf 'static const unsigned char %s_%d[] = {\n' "$array" "$count"
        bytes "$file"
        echo '0};'
        count=$((count + 1))
    done
    printf 'const struct sl_embedded sl_%s[] = {\n' "$array"
    count=0
    for file; do
        name=$(basename "$file" .sql)
        number=$(expr "$name" : '0*\([1-9][0-9]*\)-') || number=0
        printf '    {"%s", %d, (const char *)%s_%d},\n' "$name" "$number" \
            "$array" "$count"
        count=$((count + 1))
    done
    echo '};'
    printf 'const size_t sl_%s_count = %d;\n\n' "$array" "$count"
}

{
    echo '/* Made by src/store/embed.sh from sql/; not to be edited. */'
    echo '#include "store/catalogue.h"'
    echo
    list migrations sql/migrations/*.sql
    list views sql/views/*.sql
    list queries sql/queries/*.sql
} >"$out/catalogue.c.new"

{
    echo '/* Made by src/store/embed.sh from sql/; not to be edited. */'
    echo '#ifndef SL_STORE_CATALOGUE_H'
    echo '#define SL_STORE_CATALOGUE_H'
    echo
    echo '#include <stddef.h>'
    echo
    echo '/* Which statement: the file of that name in sql/queries. */'
    echo 'enum sl_query {'
    for file in sql/queries/*.sql; do
        basename "$file" .sql | tr 'a-z-' 'A-Z_' | sed 's/.*/    SL_QUERY_&,/'
    done
    echo '    SL_QUERY_COUNT'
    echo '};'
    echo
    echo 'struct sl_embedded {'
    echo '    const char *name; /* of the file, without ".sql" */'
    echo '    int number;       /* of a migration; else 0 */'
    echo '    const char *text;'
    echo '};'
    echo
    for array in migrations views queries; do
        printf 'extern const struct sl_embedded sl_%s[];\n' "$array"
        printf 'extern const size_t sl_%s_count;\n' "$array"
    done
    echo
    echo '#endif'
} >"$out/catalogue.h.new"

mv "$out/catalogue.c.new" "$out/catalogue.c"
mv "$out/catalogue.h.new" "$out/catalogue.h"
