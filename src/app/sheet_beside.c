/* What stands beside the margin on a calculation sheet: companion checks
 * and limits. */
#include <math.h>
#include <string.h>

#include "app/sheet_parts.h"
#include "app/terminal.h"
#include "base/text.h"
#include "ranker/digits.h"

/* A figure from memory says so, unless its source does already. */
static const char *from_memory(char trust, const char *source)
{
    static const char said[] = "from memory";

    if (trust != 'M' || strncmp(source, said, sizeof said - 1) == 0)
        return "";
    return " (from memory)";
}

/* "1.20 m, at least 0.95 m" */
static void check_figures(const struct sl_sheet *sheet,
                          const struct sl_check *check)
{
    double shown = !isnan(check->value)    ? check->value
                   : !isnan(check->lowest) ? check->lowest
                                           : check->highest;
    int decimals = check->quantity == SL_PURE
                       ? sl_digits_decimals(shown)
                       : sl_sheet_decimals(check->quantity);
    char room[SL_FIGURE_ROOM];

    if (isnan(check->value) && isnan(check->lowest) && isnan(check->highest))
        return;
    fprintf(
        sheet->stream, "; %s",
        sl_sheet_figure(sheet, check->quantity, check->value, decimals, room));
    if (!isnan(check->lowest))
        fprintf(sheet->stream, ", at least %s",
                sl_sheet_figure(sheet, check->quantity, check->lowest, decimals,
                                room));
    if (!isnan(check->highest))
        fprintf(sheet->stream, ", at most %s",
                sl_sheet_figure(sheet, check->quantity, check->highest,
                                decimals, room));
}

static void check_line(const struct sl_sheet *sheet, enum sl_check_id id,
                       const struct sl_check *check)
{
    static const char *const ends[] = {
        [SL_CHECK_NOT_MADE] = "not made",
        [SL_CHECK_UNKNOWN] = "unknown",
        [SL_CHECK_WITHIN] = "within",
        [SL_CHECK_BEYOND] = "BEYOND",
    };

    fprintf(sheet->stream, "  %-30s %s", sl_check_name(id), ends[check->end]);
    check_figures(sheet, check);
    if (check->source && check->source[0] != '\0')
        fprintf(sheet->stream, "; %s%s", check->source,
                from_memory(check->trust, check->source));
    putc('\n', sheet->stream);
}

static void checks_not_made(const struct sl_sheet *sheet,
                            const struct sl_pump_result *pump)
{
    bool any = false;

    for (int id = 0; id < SL_CHECK_COUNT; id++) {
        if (pump->checks[id].end != SL_CHECK_NOT_MADE)
            continue;
        fprintf(sheet->stream, "%s%s", any ? ", " : "  not made: ",
                sl_check_name((enum sl_check_id)id));
        any = true;
    }
    if (any)
        fputs(" (nothing on record to make them by, or not about this pump)\n",
              sheet->stream);
}

void sl_sheet_checks(const struct sl_sheet *sheet,
                     const struct sl_pump_result *pump)
{
    fputs("\nChecks beside the margin, the worst over the sets; they change no "
          "state\n",
          sheet->stream);
    for (int id = 0; id < SL_CHECK_COUNT; id++)
        if (pump->checks[id].end != SL_CHECK_NOT_MADE)
            check_line(sheet, (enum sl_check_id)id, &pump->checks[id]);
    checks_not_made(sheet, pump);
}

static void end_limit(const struct sl_sheet *sheet,
                      const struct sl_limit *limit)
{
    if (limit->end == SL_LIMIT_FIGURES_END)
        fputs("; met so far, past it some set leaves its published curve",
              sheet->stream);
    putc('\n', sheet->stream);
}

static void level_limit(const struct sl_sheet *sheet,
                        const struct sl_pump_result *pump)
{
    bool main_gauge = pump->inputs[SL_IN_SOURCE_PRESSURE_ELEVATION].applies &&
                      !pump->inputs[SL_IN_SOURCE_LEVEL].applies;
    const struct sl_input *now =
        &pump->inputs[main_gauge ? SL_IN_SOURCE_PRESSURE_ELEVATION
                                 : SL_IN_SOURCE_LEVEL];
    const struct sl_limit *limit = &pump->limits[SL_LIMIT_LEVEL];
    char room[SL_FIGURE_ROOM], reach[SL_FIGURE_ROOM];

    fprintf(sheet->stream, "  %-34s ",
            main_gauge ? "lowest gauge, at that pressure"
                       : "lowest source level");
    sl_sheet_figure(sheet, SL_LENGTH, SL_LIMIT_REACH, 0, reach);
    switch (limit->end) {
    case SL_LIMIT_FOUND:
    case SL_LIMIT_FIGURES_END:
        fputs(sl_sheet_figure(sheet, SL_LENGTH, limit->value, 2, room),
              sheet->stream);
        fprintf(sheet->stream, " (here %s)",
                sl_sheet_figure(sheet, SL_LENGTH, now->value.typical, 2, room));
        break;
    case SL_LIMIT_NONE:
        fprintf(sheet->stream, "none within %s of where it is", reach);
        break;
    case SL_LIMIT_ALWAYS:
        fprintf(sheet->stream, "met even %s lower", reach);
        break;
    case SL_LIMIT_UNKNOWN:
        fputs("unknown", sheet->stream);
        break;
    }
    end_limit(sheet, limit);
}

static void temperature_limit(const struct sl_sheet *sheet,
                              const struct sl_pump_result *pump)
{
    const struct sl_limit *limit = &pump->limits[SL_LIMIT_TEMPERATURE];
    double warmest = sheet->dossier->record.service == SL_SEAWATER
                         ? SL_LIMIT_WARMEST_SEAWATER
                         : SL_LIMIT_WARMEST;
    double here = pump->inputs[SL_IN_TEMPERATURE].value.typical;
    char room[SL_FIGURE_ROOM];

    fprintf(sheet->stream, "  %-34s ", "warmest water");
    switch (limit->end) {
    case SL_LIMIT_FOUND:
    case SL_LIMIT_FIGURES_END:
        fputs(sl_sheet_figure(sheet, SL_TEMPERATURE, limit->value, 1, room),
              sheet->stream);
        fprintf(sheet->stream, " (here %s)",
                sl_sheet_figure(sheet, SL_TEMPERATURE, here, 1, room));
        break;
    case SL_LIMIT_NONE:
        fprintf(
            sheet->stream, "none: the rule is not met even at %s",
            sl_sheet_figure(sheet, SL_TEMPERATURE, SL_LIMIT_COLDEST, 0, room));
        break;
    case SL_LIMIT_ALWAYS:
        fprintf(sheet->stream, "met even at %s",
                sl_sheet_figure(sheet, SL_TEMPERATURE, fmax(warmest, here), 0,
                                room));
        break;
    case SL_LIMIT_UNKNOWN:
        fputs("unknown", sheet->stream);
        break;
    }
    end_limit(sheet, limit);
}

static void flow_limit(const struct sl_sheet *sheet,
                       const struct sl_pump_result *pump)
{
    const struct sl_limit *limit = &pump->limits[SL_LIMIT_FLOW];
    char room[SL_FIGURE_ROOM];

    fprintf(sheet->stream, "  %-34s ", "largest flow, in the governing set");
    switch (limit->end) {
    case SL_LIMIT_FOUND:
    case SL_LIMIT_FIGURES_END:
        fputs(sl_sheet_figure(sheet, SL_FLOW, limit->value, 1, room),
              sheet->stream);
        fprintf(sheet->stream, " (here %s)",
                sl_sheet_figure(sheet, SL_FLOW, pump->cases[SL_TYPICAL].flow, 1,
                                room));
        break;
    case SL_LIMIT_NONE:
        fputs("none on the published NPSHR curve", sheet->stream);
        break;
    case SL_LIMIT_ALWAYS:
        fputs("met to the end of the published NPSHR curve", sheet->stream);
        break;
    case SL_LIMIT_UNKNOWN:
        fputs("unknown", sheet->stream);
        break;
    }
    end_limit(sheet, limit);
}

void sl_sheet_limits(const struct sl_sheet *sheet,
                     const struct sl_pump_result *pump)
{
    fputs("\nHow far one thing may go until the rule is just met, all else "
          "typical\n",
          sheet->stream);
    level_limit(sheet, pump);
    temperature_limit(sheet, pump);
    flow_limit(sheet, pump);
}
