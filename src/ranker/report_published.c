/* Published rows that decide beside the defaults, each with its source. */
#include "ranker/page.h"

#include <math.h>

#include "ranker/digits.h"
#include "ranker/words.h"

static void write_trust_of(const struct sl_report *report, char trust)
{
    sl_page_text(report, sl_words_trust(trust));
}

static const struct sl_ageing *ageing(const void *row)
{
    return row;
}

static void write_material(const struct sl_report *report, const void *row)
{
    sl_page_text(report, ageing(row)->material);
}

static void write_surface(const struct sl_report *report, const void *row)
{
    int condition = ageing(row)->condition;

    sl_page_text(
        report,
        condition
            ? sl_word(&report->vocabularies->of[SL_WORDS_CONDITION], condition)
            : "not recorded, or any other");
}

static void write_rate(const struct sl_report *report, const void *row)
{
    sl_page_interval(report, SL_BORE, &ageing(row)->rate);
}

static void write_ageing_source(const struct sl_report *report, const void *row)
{
    sl_page_name(report, ageing(row)->source);
}

static void write_ageing_trust(const struct sl_report *report, const void *row)
{
    write_trust_of(report, ageing(row)->trust);
}

static const struct sl_page_column ageing_columns[] = {
    {"Wall", "name", write_material, true},
    {"Its condition", "case", write_surface, false},
    {"Rougher each year by (adverse … favourable)", "case", write_rate, false},
    {"Source", "long", write_ageing_source, false},
    {"Trust", "case", write_ageing_trust, false},
};

static const struct sl_page_list ageing_list = {
    "How walls grow rougher", "wide compact", ageing_columns,
    sizeof ageing_columns / sizeof ageing_columns[0],
    "The store holds no row of how walls grow rougher."};

static const struct sl_check_limit *limit(const void *row)
{
    return row;
}

static void write_check(const struct sl_report *report, const void *row)
{
    sl_page_text(report, limit(row)->check);
}

static void write_circumstance(const struct sl_report *report, const void *row)
{
    const char *circumstance = limit(row)->circumstance;

    sl_page_text(report, circumstance[0] ? circumstance : "all others");
}

static void write_end(const struct sl_report *report, enum sl_quantity quantity,
                      double end)
{
    if (isnan(end))
        sl_markup(report->stream, "none");
    else
        sl_page_quantity(
            report, quantity, end,
            sl_digits_decimals(sl_shown(quantity, report->units, end)));
}

static void write_lowest(const struct sl_report *report, const void *row)
{
    write_end(report, limit(row)->quantity, limit(row)->lowest);
}

static void write_highest(const struct sl_report *report, const void *row)
{
    write_end(report, limit(row)->quantity, limit(row)->highest);
}

static void write_limit_source(const struct sl_report *report, const void *row)
{
    sl_page_name(report, limit(row)->source);
}

static void write_limit_trust(const struct sl_report *report, const void *row)
{
    write_trust_of(report, limit(row)->trust);
}

static const struct sl_page_column limit_columns[] = {
    {"Check", "name", write_check, true},
    {"Where", "case", write_circumstance, false},
    {"At least", "number", write_lowest, false},
    {"At most", "number", write_highest, false},
    {"Source", "long", write_limit_source, false},
    {"Trust", "case", write_limit_trust, false},
};

static const struct sl_page_list limit_list = {
    "Limits that the flags tell of", "wide compact", limit_columns,
    sizeof limit_columns / sizeof limit_columns[0],
    "The store holds no limit of a check beside the margin."};

/* A row of K or of roughness, as far as its source goes. */
struct origin {
    const char *name, *source;
    char trust;
};

static struct origin fitting_origin(const struct sl_tables *tables, size_t i)
{
    const struct sl_fitting_k *row = &tables->fittings[i];

    return (struct origin){row->fitting, row->source, row->trust};
}

static struct origin roughness_origin(const struct sl_tables *tables, size_t i)
{
    const struct sl_roughness *row = &tables->roughness[i];

    return (struct origin){row->material, row->source, row->trust};
}

/* What all rows of one source have in common stands before its first
 * semicolon. */
static void write_first_part(const struct sl_report *report, const char *source)
{
    struct sl_text part = {0};

    while (*source != '\0' && *source != ';')
        sl_text_add(&part, source++, 1);
    sl_page_say(report, &part);
}

/* The rows of one trust: those read in a source are counted, the others are
 * named. */
static void write_rows_of(const struct sl_report *report, size_t count,
                          struct origin (*of)(const struct sl_tables *, size_t),
                          char trust)
{
    size_t found = 0;

    for (size_t i = 0; i < count; i++) {
        struct origin row = of(report->tables, i);

        if (row.trust != trust)
            continue;
        if (found == 0) {
            sl_markup(report->stream, "; ");
            write_trust_of(report, trust);
            sl_markup(report->stream, ": ");
            if (trust == 'S')
                write_first_part(report, row.source);
        }
        if (trust != 'S') {
            sl_markup(report->stream, found ? ", " : "");
            sl_page_name(report, row.name);
        }
        found++;
    }
}

static void write_origins(const struct sl_report *report, const char *title,
                          size_t count,
                          struct origin (*of)(const struct sl_tables *, size_t))
{
    static const char trusts[] = "SCNPMO";

    sl_markup(report->stream, "<p><b>");
    sl_page_text(report, title);
    sl_markup(report->stream, "</b>, ");
    sl_page_counted(report, (long long)count, "row", "rows");
    for (size_t i = 0; trusts[i] != '\0'; i++)
        write_rows_of(report, count, of, trusts[i]);
    sl_markup(report->stream, ".</p>\n");
}

void sl_page_published(struct sl_report *report)
{
    const struct sl_tables *tables = report->tables;

    sl_markup(report->stream, "<h3>Published rows used beside them</h3>\n");
    for (size_t i = 0; i < tables->ageing_count; i++)
        sl_page_list_row(report, &ageing_list, &tables->ageing[i]);
    sl_page_list_end(report, &ageing_list);
    sl_markup(report->stream, "<h3>Limits of the checks</h3>\n");
    for (size_t i = 0; i < tables->limit_count; i++)
        sl_page_list_row(report, &limit_list, &tables->limits[i]);
    sl_page_list_end(report, &limit_list);
    sl_markup(report->stream, "<h3>Losses of the suction</h3>\n");
    write_origins(report, "K of fittings", tables->fitting_count,
                  fitting_origin);
    write_origins(report, "Roughness of walls as laid", tables->roughness_count,
                  roughness_origin);
}
