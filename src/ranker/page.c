#include "ranker/page.h"

#include <math.h>

#include "ranker/digits.h"

/* Of an interval; as many as sl_digits_decimals() gives. */
#define MOST_DECIMALS 4

static void write_column_head(const struct sl_report *report,
                              const struct sl_page_column *column)
{
    sl_markup(report->stream, "<th scope=\"col\" role=\"columnheader\" "
                              "class=\"");
    sl_markup_attribute(report->stream, column->look);
    sl_markup(report->stream, "\">");
    sl_markup_text(report->stream, column->label);
    sl_markup(report->stream, "</th>");
}

static void open_list(const struct sl_report *report,
                      const struct sl_page_list *list)
{
    sl_markup(report->stream, "<div class=\"scroll\"><table role=\"table\" "
                              "class=\"");
    sl_markup_attribute(report->stream, list->look);
    sl_markup(report->stream, "\">\n<caption>");
    sl_markup(report->stream, list->caption);
    sl_markup(report->stream, "</caption>\n<thead role=\"rowgroup\">"
                              "<tr role=\"row\">");
    for (size_t i = 0; i < list->column_count; i++)
        write_column_head(report, &list->columns[i]);
    sl_markup(report->stream, "</tr></thead>\n<tbody role=\"rowgroup\">\n");
}

static void write_cell(const struct sl_report *report,
                       const struct sl_page_column *column, const void *row)
{
    sl_markup(report->stream, column->names_row
                                  ? "<th scope=\"row\" role=\"rowheader\" "
                                  : "<td role=\"cell\" ");
    sl_markup(report->stream, "class=\"");
    sl_markup_attribute(report->stream, column->look);
    sl_markup(report->stream, "\" data-label=\"");
    sl_markup_attribute(report->stream, column->label);
    sl_markup(report->stream, "\"><div>");
    column->write(report, row);
    sl_markup(report->stream,
              column->names_row ? "</div></th>" : "</div></td>");
}

void sl_page_list_row(struct sl_report *report, const struct sl_page_list *list,
                      const void *row)
{
    if (report->rows == 0)
        open_list(report, list);
    report->rows++;
    sl_markup(report->stream, "<tr role=\"row\">");
    for (size_t i = 0; i < list->column_count; i++)
        write_cell(report, &list->columns[i], row);
    sl_markup(report->stream, "</tr>\n");
}

void sl_page_list_more(const struct sl_report *report,
                       const struct sl_page_list *list,
                       void (*write)(const struct sl_report *report,
                                     const void *row),
                       const void *row)
{
    sl_markup(report->stream, "<tr role=\"row\" class=\"more\">"
                              "<td role=\"cell\" colspan=\"");
    sl_markup_count(report->stream, (long long)list->column_count);
    sl_markup(report->stream, "\"><div>");
    write(report, row);
    sl_markup(report->stream, "</div></td></tr>\n");
}

void sl_page_list_end(struct sl_report *report, const struct sl_page_list *list)
{
    if (report->rows > 0) {
        sl_markup(report->stream, "</tbody>\n</table></div>\n");
    } else {
        sl_markup(report->stream, "<p class=\"empty\">");
        sl_markup_text(report->stream, list->empty);
        sl_markup(report->stream, "</p>\n");
    }
    report->rows = 0;
}

void sl_page_section(const struct sl_report *report, const char *id,
                     const char *title, const char *lead)
{
    sl_markup(report->stream, "<section id=\"");
    sl_markup_attribute(report->stream, id);
    sl_markup(report->stream, "\" aria-labelledby=\"");
    sl_markup_attribute(report->stream, id);
    sl_markup(report->stream, "-head\">\n<h2 id=\"");
    sl_markup_attribute(report->stream, id);
    sl_markup(report->stream, "-head\">");
    sl_markup_text(report->stream, title);
    sl_markup(report->stream, "</h2>\n<p class=\"lead\">");
    sl_markup(report->stream, lead);
    sl_markup(report->stream, "</p>\n");
}

void sl_page_section_end(const struct sl_report *report)
{
    sl_markup(report->stream, "</section>\n");
}

/* Our own sign for a state: a vessel, a pointer at the level the rule asks
 * for, and how far the water comes; dashed where nobody knows. */
#define VESSEL                                                                 \
    "<path d=\"M7 2v16h11V2\" fill=\"none\" stroke=\"currentColor\" "          \
    "stroke-width=\"1.7\"/>"
#define POINTER "<path d=\"M0 4l5 3.5L0 11z\" fill=\"currentColor\"/>"

void sl_page_marks(const struct sl_report *report)
{
    sl_markup(
        report->stream,
        "<svg class=\"shapes\" aria-hidden=\"true\" width=\"0\" height=\"0\">"
        "<symbol id=\"mark-short\" viewBox=\"0 0 20 20\">" VESSEL POINTER
        "<path d=\"M7 15h11v3H7z\" fill=\"currentColor\"/></symbol>"
        "<symbol id=\"mark-thin\" viewBox=\"0 0 20 20\">" VESSEL POINTER
        "<path d=\"M7 10h11v8H7z\" fill=\"currentColor\"/></symbol>"
        "<symbol id=\"mark-clear\" viewBox=\"0 0 20 20\">" VESSEL POINTER
        "<path d=\"M7 4h11v14H7z\" fill=\"currentColor\"/></symbol>"
        "<symbol id=\"mark-unproven\" viewBox=\"0 0 20 20\">" POINTER
        "<path d=\"M7 2v16h11V2M7 10h11\" fill=\"none\" "
        "stroke=\"currentColor\" stroke-width=\"1.7\" "
        "stroke-dasharray=\"2.6 2.2\"/></symbol></svg>\n");
}

void sl_page_state(const struct sl_report *report, enum sl_state state)
{
    static const char *const marks[SL_STATE_COUNT] = {
        [SL_SHORT] = "<span class=\"state short\"><svg aria-hidden=\"true\">"
                     "<use href=\"#mark-short\"/></svg>short</span>",
        [SL_THIN] = "<span class=\"state thin\"><svg aria-hidden=\"true\">"
                    "<use href=\"#mark-thin\"/></svg>thin</span>",
        [SL_UNPROVEN] = "<span class=\"state unproven\">"
                        "<svg aria-hidden=\"true\">"
                        "<use href=\"#mark-unproven\"/></svg>unproven</span>",
        [SL_CLEAR] = "<span class=\"state clear\"><svg aria-hidden=\"true\">"
                     "<use href=\"#mark-clear\"/></svg>clear</span>",
    };

    if (state < SL_STATE_COUNT)
        sl_markup(report->stream, marks[state]);
}

void sl_page_name(const struct sl_report *report, const char *text)
{
    if (!text || text[0] == '\0')
        return;
    sl_markup(report->stream, "<bdi>");
    sl_markup_text(report->stream, text);
    sl_markup(report->stream, "</bdi>");
}

void sl_page_text(const struct sl_report *report, const char *text)
{
    sl_markup_text(report->stream, text);
}

void sl_page_say(const struct sl_report *report, struct sl_text *text)
{
    sl_markup_text(report->stream, sl_text_string(text));
    sl_text_release(text);
}

const char *sl_page_unit(const struct sl_report *report,
                         enum sl_quantity quantity)
{
    return sl_unit_shown(quantity, report->units)->label;
}

void sl_page_number(const struct sl_report *report, enum sl_quantity quantity,
                    double si, int decimals)
{
    sl_markup_number(report->stream, sl_shown(quantity, report->units, si),
                     decimals);
}

static void write_unit(const struct sl_report *report,
                       enum sl_quantity quantity)
{
    const char *unit = sl_page_unit(report, quantity);

    if (unit[0] == '\0')
        return;
    sl_markup(report->stream, "&nbsp;");
    sl_markup_text(report->stream, unit);
}

void sl_page_quantity(const struct sl_report *report, enum sl_quantity quantity,
                      double si, int decimals)
{
    sl_page_number(report, quantity, si, decimals);
    if (isfinite(si))
        write_unit(report, quantity);
}

/* Shown with so many decimals it would read as zero, and is not. */
static bool reads_as_zero(double shown, int decimals)
{
    return isfinite(shown) && shown != 0 &&
           fabs(shown) < 0.5 * pow(10, -decimals);
}

/* Heads, levels and temperatures have one decimal; the rest, from bores to
 * roughness, about three digits; more, to four, where one of the three would
 * else be shown as a zero. */
static int interval_decimals(const struct sl_report *report,
                             enum sl_quantity quantity,
                             const struct sl_interval *value)
{
    const double shown[] = {
        sl_shown(quantity, report->units, value->typical),
        sl_shown(quantity, report->units, value->adverse),
        sl_shown(quantity, report->units, value->favourable),
    };
    int decimals = quantity == SL_LENGTH ? 1 : sl_digits_decimals(shown[0]);

    if (quantity == SL_TEMPERATURE)
        return 1; /* its zero is a temperature as any other */
    for (size_t i = 0; i < sizeof shown / sizeof shown[0]; i++)
        while (decimals < MOST_DECIMALS && reads_as_zero(shown[i], decimals))
            decimals++;
    return decimals;
}

void sl_page_interval(const struct sl_report *report, enum sl_quantity quantity,
                      const struct sl_interval *value)
{
    int decimals = interval_decimals(report, quantity, value);

    sl_page_quantity(report, quantity, value->typical, decimals);
    if (!isfinite(value->adverse) && !isfinite(value->favourable))
        return;
    sl_markup(report->stream, " <span class=\"range\">(");
    sl_page_number(report, quantity, value->adverse, decimals);
    sl_markup(report->stream, " … ");
    sl_page_number(report, quantity, value->favourable, decimals);
    sl_markup(report->stream, ")</span>");
}

void sl_page_counted(const struct sl_report *report, long long count,
                     const char *one, const char *many)
{
    sl_markup_count(report->stream, count);
    sl_markup(report->stream, " ");
    sl_markup_text(report->stream, count == 1 ? one : many);
}

void sl_page_pump(const struct sl_report *report, const char *pump_id,
                  const char *station, const char *condition)
{
    sl_page_name(report, pump_id);
    sl_markup(report->stream, "<small>");
    sl_page_name(report, station);
    sl_markup(report->stream, " · ");
    sl_page_name(report, condition);
    sl_markup(report->stream, "</small>");
}
