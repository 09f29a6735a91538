/* The page as a whole: its head, the defaults, what the words mean, its foot.
 */
#include "ranker/report.h"

#include "ranker/page.h"
#include "ranker/style.h"
#include "ranker/words.h"

static void write_style(const struct sl_report *report)
{
    sl_markup(report->stream, "<style>\n");
    for (size_t i = 0; i < sizeof sl_style / sizeof sl_style[0]; i++)
        sl_markup(report->stream, sl_style[i]);
    sl_markup(report->stream, "</style>\n");
}

static void write_page_head(const struct sl_report *report)
{
    sl_markup(report->stream,
              "<!DOCTYPE html>\n<html lang=\"en\">\n<head>\n"
              "<meta charset=\"utf-8\">\n"
              "<meta http-equiv=\"Content-Security-Policy\" content=\""
              "default-src 'none'; style-src 'unsafe-inline'; "
              "img-src data:\">\n"
              "<meta name=\"viewport\" content=\"width=device-width, "
              "initial-scale=1\">\n"
              "<link rel=\"icon\" href=\"data:,\">\n<title>");
    sl_page_text(report, report->summary->label);
    sl_markup(report->stream, ": suction head of the pump stations</title>\n");
    write_style(report);
    sl_markup(report->stream, "</head>\n<body>\n"
                              "<a class=\"skip\" href=\"#main\">Skip to the "
                              "findings</a>\n");
}

static void write_masthead(const struct sl_report *report)
{
    sl_markup(report->stream,
              "<header>\n<p class=\"program\">summerlow <span>lowest water, "
              "hottest week</span></p>\n"
              "<h1>Suction head of the pump stations: ");
    sl_page_name(report, report->summary->label);
    sl_markup(report->stream,
              "</h1>\n</header>\n<nav aria-label=\"Sections\">\n<ul>\n"
              "<li><a href=\"#at-risk\">Stations at risk</a></li>\n"
              "<li><a href=\"#clear\">Clear</a></li>\n"
              "<li><a href=\"#find-out\">Find out first</a></li>\n"
              "<li><a href=\"#terms\">Terms</a></li>\n"
              "<li><a href=\"#rules\">Margin rules</a></li>\n"
              "<li><a href=\"#records\">Records</a></li>\n"
              "<li><a href=\"#defaults\">Defaults</a></li>\n"
              "<li><a href=\"#words\">What the words mean</a></li>\n"
              "</ul>\n</nav>\n");
}

void sl_report_begin(struct sl_report *report)
{
    report->rows = 0;
    report->list = 0;
    write_page_head(report);
    sl_page_marks(report);
    write_masthead(report);
    sl_markup(report->stream, "<main id=\"main\">\n");
    sl_page_front(report);
}

static const struct sl_default_row *used(const void *row)
{
    return row;
}

static void write_field(const struct sl_report *report, const void *row)
{
    sl_page_text(report, sl_words_default(used(row)->row.field));
    sl_markup(report->stream, "<small><code>");
    sl_page_text(report, used(row)->row.field);
    sl_markup(report->stream, "</code></small>");
}

static void write_circumstance(const struct sl_report *report, const void *row)
{
    const char *circumstance = used(row)->row.circumstance;

    if (circumstance && circumstance[0] != '\0')
        sl_page_name(report, circumstance);
    else
        sl_markup(report->stream, "all others");
}

static void write_value(const struct sl_report *report, const void *row)
{
    sl_page_interval(report, used(row)->row.quantity, &used(row)->row.value);
}

static void write_source(const struct sl_report *report, const void *row)
{
    sl_page_name(report, used(row)->row.source);
}

static void write_trust(const struct sl_report *report, const void *row)
{
    sl_page_text(report, sl_words_trust(used(row)->row.trust));
}

static void write_uses(const struct sl_report *report, const void *row)
{
    sl_markup_count(report->stream, used(row)->uses);
}

static const struct sl_page_column columns[] = {
    {"Stands for", "name", write_field, true},
    {"Where", "case", write_circumstance, false},
    {"Typical (adverse … favourable)", "case", write_value, false},
    {"Source", "long", write_source, false},
    {"Trust", "case", write_trust, false},
    {"Times used", "number", write_uses, false},
};

static const struct sl_page_list defaults = {
    "Values assumed where the inventory has none", "wide compact", columns,
    sizeof columns / sizeof columns[0],
    "No value was assumed: every one used is recorded or derived."};

void sl_report_begin_defaults(struct sl_report *report)
{
    sl_page_set_aside_end(report);
    report->rows = 0;
    sl_page_section(report, "defaults", "Defaults used",
                    "A default stands in only where nothing is on record, as a "
                    "range. Put your own value into the inventory and it is no "
                    "longer used. Below: the published rows used beside "
                    "them.");
}

void sl_report_default(struct sl_report *report,
                       const struct sl_default_row *row)
{
    sl_page_list_row(report, &defaults, row);
}

static void write_foot(const struct sl_report *report)
{
    sl_markup(report->stream, "<footer>\n<p>summerlow ");
    sl_page_text(report, report->summary->version);
    sl_markup(report->stream, " · inventory ");
    sl_page_name(report, report->summary->label);
    sl_markup(report->stream, " · vintage ");
    sl_markup_count(report->stream, report->summary->vintage);
    sl_markup(report->stream, " · evaluation ");
    sl_markup_count(report->stream, report->summary->evaluation);
    sl_markup(report->stream, "</p>\n<p>Content, SHA-256: <code>");
    sl_page_text(report, report->summary->inventory_sha256);
    sl_markup(report->stream,
              "</code></p>\n<p>Screening, not design. The same inventory, "
              "conditions and version give the same bytes.</p>\n</footer>\n");
}

void sl_report_end(struct sl_report *report)
{
    sl_page_list_end(report, &defaults);
    sl_page_published(report);
    sl_page_section_end(report);
    sl_page_glossary(report);
    sl_markup(report->stream, "</main>\n");
    write_foot(report);
    sl_markup(report->stream, "</body>\n</html>\n");
}
