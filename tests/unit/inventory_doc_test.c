/* docs/inventory.md says of every column what model/fields.h says.
 *
 * With --print the tables are printed as they must stand between the two
 * marks. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>

#include <cmocka.h>
#include <math.h>
#include <stdio.h>
#include <string.h>

#include "base/text.h"
#include "model/fields.h"
#include "model/vocabulary.h"

#define DOCUMENT "docs/inventory.md"
#define BEGIN "<!-- columns: begin -->\n"
#define END "<!-- columns: end -->\n"

static void add_words(struct sl_text *text, enum sl_vocabulary vocabulary)
{
    const struct sl_vocabularies all = sl_fixed_vocabularies();
    const struct sl_words *words = &all.of[vocabulary];

    if (vocabulary == SL_WORDS_MATERIAL)
        sl_text_add_string(text, "a [material](#materials)");
    if (vocabulary == SL_WORDS_FITTING)
        sl_text_add_string(text, "a [fitting](#fittings)");
    for (size_t i = 0; i < words->count; i++)
        sl_text_addf(text, "%s%s", i ? "; " : "", words->words[i]);
}

static void add_figure(struct sl_text *text, double value)
{
    sl_text_addf(text, fabs(value) < 1e6 ? "%.6g" : "%.0f", value);
}

/* The range in the unit that comes first among the column's choices. */
static void add_range(struct sl_text *text, const struct sl_field *field)
{
    const struct sl_unit *unit = sl_unit_shown(field->quantity, SL_SI);

    add_figure(text, sl_from_si(unit, field->lowest));
    sl_text_add_string(text, " to ");
    add_figure(text, sl_from_si(unit, field->highest));
    if (*unit->label)
        sl_text_addf(text, " %s", unit->label);
}

static void add_field(struct sl_text *text, const struct sl_field *field)
{
    const char *units = sl_unit_choices(field->quantity);

    sl_text_addf(text, "| `%s%s`%s | ", field->name, *units ? "_…" : "",
                 field->required ? " \\*" : "");
    switch (field->type) {
    case SL_FIELD_TEXT:
        sl_text_add_string(text, "text |");
        break;
    case SL_FIELD_WORD:
        add_words(text, field->vocabulary);
        sl_text_add_string(text, " |");
        break;
    case SL_FIELD_NUMBER:
        sl_text_addf(text, "%s | ", *units ? units : "number");
        add_range(text, field);
        break;
    case SL_FIELD_WHOLE:
        sl_text_add_string(text, "whole number | ");
        add_range(text, field);
        break;
    }
    sl_text_addf(text, " | %s | %s |\n", field->meaning, field->left_out);
}

static void add_tables(struct sl_text *text)
{
    for (int i = 0; i < SL_KIND_COUNT; i++) {
        const struct sl_record_kind *kind = sl_record_kind((enum sl_kind)i);

        sl_text_addf(text,
                     "\n### %s: one %s a record\n\n"
                     "| column | holds, or units | range | meaning | "
                     "left out |\n"
                     "|---|---|---|---|---|\n",
                     kind->file, kind->name);
        for (size_t j = 0; j < kind->field_count; j++)
            add_field(text, &kind->fields[j]);
    }
    sl_text_add_string(text, "\n");
}

static void read_document(struct sl_text *text)
{
    char piece[4096];
    size_t got;
    FILE *stream = fopen(DOCUMENT, "rb");

    assert_non_null(stream);
    while ((got = fread(piece, 1, sizeof piece, stream)) > 0)
        sl_text_add(text, piece, got);
    fclose(stream);
}

static void the_document_tells_every_column(void **state)
{
    struct sl_text document = {0}, tables = {0};
    const char *begin, *end, *want;
    long line = 1;

    (void)state;
    read_document(&document);
    add_tables(&tables);
    begin = strstr(sl_text_string(&document), BEGIN);
    assert_non_null(begin);
    begin += strlen(BEGIN);
    end = strstr(begin, END);
    assert_non_null(end);
    for (want = sl_text_string(&tables); begin < end && *begin == *want;
         begin++, want++)
        line += *begin == '\n';
    if (begin != end || *want)
        fail_msg(DOCUMENT ": line %ld of the tables: put what --print prints "
                          "between the marks",
                 line);
    sl_text_release(&document);
    sl_text_release(&tables);
}

int main(int argc, char **argv)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_document_tells_every_column),
    };
    struct sl_text tables = {0};

    if (argc > 1 && strcmp(argv[1], "--print") == 0) {
        add_tables(&tables);
        fputs(sl_text_string(&tables), stdout);
        sl_text_release(&tables);
        return 0;
    }
    return cmocka_run_group_tests_name("inventory_doc", tests, NULL, NULL);
}
