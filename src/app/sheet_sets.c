/* The running sets of a pump, on its calculation sheet. */
#include <math.h>
#include <stdlib.h>

#include "app/sheet_parts.h"
#include "app/terminal.h"
#include "base/memory.h"
#include "base/text.h"

/* More sets than this are too many to read: the worst are listed. */
#define SETS_READABLE 40
#define WORST_LISTED 20

/* The least surplus first, what has none last, else in the order tried. */
static int worse_first(const void *one, const void *other)
{
    const struct sl_set_case *a = *(const struct sl_set_case *const *)one;
    const struct sl_set_case *b = *(const struct sl_set_case *const *)other;
    double surplus_a = a->figures.surplus, surplus_b = b->figures.surplus;

    if (isnan(surplus_a) != isnan(surplus_b))
        return isnan(surplus_a) ? 1 : -1;
    if (surplus_a < surplus_b || surplus_a > surplus_b)
        return surplus_a < surplus_b ? -1 : 1;
    return a < b ? -1 : a > b;
}

static void mark(const struct sl_sheet *sheet, bool yes, const char *words)
{
    if (yes)
        fputs(words, sheet->stream);
}

/* Of many pumps the words may be those of another set too. */
static bool same_set(const struct sl_set_case *a, const struct sl_set_case *b)
{
    return b->words && sl_same(a->words, b->words) &&
           a->running == b->running &&
           (a->figures.surplus == b->figures.surplus ||
            isnan(a->figures.surplus));
}

static void set_line(const struct sl_sheet *sheet,
                     const struct sl_pump_result *pump,
                     const struct sl_set_case *set)
{
    const struct sl_case *figures = &set->figures;
    char flow[SL_FIGURE_ROOM], npsha[SL_FIGURE_ROOM], npshr[SL_FIGURE_ROOM];
    char margin[SL_FIGURE_ROOM], surplus[SL_FIGURE_ROOM];

    fprintf(sheet->stream, "  %11s %11s %11s %11s %11s  ",
            sl_sheet_figure(sheet, SL_FLOW, figures->flow, 1, flow),
            sl_sheet_figure(sheet, SL_LENGTH, figures->terms.npsha, 2, npsha),
            sl_sheet_figure(sheet, SL_LENGTH, figures->npshr, 2, npshr),
            sl_sheet_figure(sheet, SL_LENGTH, figures->margin, 2, margin),
            sl_sheet_figure(sheet, SL_LENGTH, figures->surplus, 2, surplus));
    sl_print_safely(sheet->stream, set->words);
    mark(sheet, same_set(set, &pump->governing), "; governs");
    mark(sheet, same_set(set, &pump->one_out), "; one pump less");
    if (set->position != SL_ON_CURVE)
        fprintf(sheet->stream, "; %s of the curve",
                set->position == SL_PAST_END ? "past the end"
                                             : "before the start");
    mark(sheet, set->stands, "; it delivers nothing");
    mark(sheet, set->two_crossings, "; its head meets the system's twice");
    if (set->solution)
        fprintf(sheet->stream, "; flows: %s", set->solution);
    putc('\n', sheet->stream);
}

static void list_sets(const struct sl_sheet *sheet,
                      const struct sl_pump_result *pump)
{
    size_t count = pump->set_count;
    const struct sl_set_case **order = sl_new(count, sizeof *order);
    size_t listed = count > SETS_READABLE ? WORST_LISTED : count;

    for (size_t i = 0; i < count; i++)
        order[i] = &pump->sets[i];
    qsort(order, count, sizeof *order, worse_first);
    fprintf(sheet->stream, "  %11s %11s %11s %11s %11s  %s\n", "flow", "NPSHA",
            "NPSHR", "margin", "surplus", "set");
    for (size_t i = 0; i < listed; i++)
        set_line(sheet, pump, order[i]);
    if (listed < count)
        fprintf(sheet->stream, "  and %zu more, none with a lesser surplus\n",
                count - listed);
    free(order);
}

void sl_sheet_sets(const struct sl_sheet *sheet,
                   const struct sl_pump_result *pump)
{
    fprintf(sheet->stream,
            "\nRunning sets it is in, at the typical values: %zu tried, %s\n",
            pump->sets_tried,
            pump->sets_all ? "all that the controls allow"
                           : "not all that the controls allow");
    if (pump->set_count)
        list_sets(sheet, pump);
    if (pump->adverse_set) {
        fputs(isnan(pump->cases[SL_ADVERSE].surplus)
                  ? "  With every unknown at its adverse end: unknown; in this "
                    "set there is no adverse end: "
                  : "  With every unknown at its adverse end the worst is: ",
              sheet->stream);
        sl_print_safely(sheet->stream, pump->adverse_set);
        putc('\n', sheet->stream);
    }
}
