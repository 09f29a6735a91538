/* Records: the sums by file, and what was set aside. */
#include "ranker/page.h"

static const struct sl_file_sum *sum_of(const void *row)
{
    return row;
}

static void write_file(const struct sl_report *report, const void *row)
{
    sl_page_name(report, sum_of(row)->file);
    if (!sum_of(row)->present)
        sl_markup(report->stream, "<small>not in the inventory</small>");
}

static void write_read(const struct sl_report *report, const void *row)
{
    sl_markup_count(report->stream, sum_of(row)->read);
}

static void write_kept(const struct sl_report *report, const void *row)
{
    sl_markup_count(report->stream, sum_of(row)->kept);
}

static void write_rejected(const struct sl_report *report, const void *row)
{
    sl_markup_count(report->stream, sum_of(row)->rejected);
}

static void write_out_of_scope(const struct sl_report *report, const void *row)
{
    sl_markup_count(report->stream, sum_of(row)->out_of_scope);
}

static const struct sl_page_column file_columns[] = {
    {"File", "name", write_file, true},
    {"Read", "number", write_read, false},
    {"= kept", "number", write_kept, false},
    {"+ rejected", "number", write_rejected, false},
    {"+ out of scope", "number", write_out_of_scope, false},
};

static const struct sl_page_list files = {
    "Records read, file by file", "narrow", file_columns,
    sizeof file_columns / sizeof file_columns[0], "No file was read."};

static const struct sl_set_aside_row *aside(const void *row)
{
    return row;
}

static void write_record(const struct sl_report *report, const void *row)
{
    if (aside(row)->record_id && aside(row)->record_id[0] != '\0')
        sl_page_name(report, aside(row)->record_id);
    else
        sl_markup(report->stream, "no identifier");
}

static void write_place(const struct sl_report *report, const void *row)
{
    sl_page_name(report, aside(row)->file);
    if (aside(row)->line <= 0)
        return;
    sl_markup(report->stream, ", line&nbsp;");
    sl_markup_count(report->stream, aside(row)->line);
}

static void write_fate(const struct sl_report *report, const void *row)
{
    sl_page_text(report, sl_fate_name(aside(row)->fate));
}

static void write_reason(const struct sl_report *report, const void *row)
{
    sl_page_text(report, aside(row)->reason);
}

static const struct sl_page_column aside_columns[] = {
    {"Record", "name", write_record, true},
    {"Where", "case", write_place, false},
    {"What became of it", "brief", write_fate, false},
    {"Why", "long reason", write_reason, false},
};

static const struct sl_page_list aside_list = {
    "Records rejected or out of scope", "wide compact", aside_columns,
    sizeof aside_columns / sizeof aside_columns[0],
    "No record was rejected and none is out of scope."};

void sl_page_files(struct sl_report *report)
{
    sl_page_section(report, "records", "Records",
                    "Every record read has one fate: kept, rejected, or out of "
                    "scope.");
    for (int kind = 0; kind < SL_KIND_COUNT; kind++)
        if (report->summary->sums[kind].file)
            sl_page_list_row(report, &files, &report->summary->sums[kind]);
    sl_page_list_end(report, &files);
    sl_markup(report->stream, "<h3>Set aside</h3>\n");
}

void sl_report_set_aside(struct sl_report *report,
                         const struct sl_set_aside_row *row)
{
    sl_page_list_row(report, &aside_list, row);
}

void sl_page_set_aside_end(struct sl_report *report)
{
    sl_page_list_end(report, &aside_list);
    sl_page_section_end(report);
}
