/* What the steps print on standard output. */
#include <math.h>

#include "app/run.h"
#include "app/terminal.h"
#include "ranker/words.h"

#define WORST_SHOWN 5

enum sl_status sl_print_records(struct sl_run *run, struct sl_error *error)
{
    struct sl_file_sum sums[SL_KIND_COUNT];
    enum sl_status status =
        sl_store_read_files(run->store, run->vintage.vintage, sums, error);

    if (status)
        return status;
    printf("Records read, and what became of them:\n"
           "  %-21s %8s = %8s + %8s + %12s\n",
           "file", "read", "kept", "rejected", "out of scope");
    for (int kind = 0; kind < SL_KIND_COUNT; kind++) {
        if (!sums[kind].present) {
            printf("  %-21s not in the inventory\n", sums[kind].file);
            continue;
        }
        printf("  %-21s %8lld = %8lld + %8lld + %12lld\n", sums[kind].file,
               sums[kind].read, sums[kind].kept, sums[kind].rejected,
               sums[kind].out_of_scope);
        run->rejected = run->rejected || sums[kind].rejected > 0;
    }
    return SL_OK;
}

struct worst {
    enum sl_unit_system units;
    int shown;
};

static enum sl_status print_worst(void *context,
                                  const struct sl_station_row *row,
                                  struct sl_error *error)
{
    struct worst *worst = context;
    struct sl_text text = {0};

    (void)error;
    if (worst->shown == WORST_SHOWN ||
        (row->state != SL_SHORT && row->state != SL_THIN))
        return SL_OK;
    worst->shown++;
    sl_text_addf(&text, "  %d. %s  %s%s%s, pump %s", worst->shown,
                 sl_state_name(row->state), row->worst.station_id,
                 row->worst.station_name[0] ? " " : "", row->worst.station_name,
                 row->worst.pump_id);
    if (row->worst.running > 1) {
        sl_text_add_string(&text, " ");
        sl_words_set(&row->worst, &text);
    }
    sl_text_add_string(&text, ": ");
    sl_words_why(&row->worst, worst->units, &text);
    sl_print_safely(stdout, sl_text_string(&text));
    putchar('\n');
    sl_text_release(&text);
    return SL_OK;
}

static long long count_stations(const struct sl_summary *summary)
{
    long long count = 0;

    for (int state = 0; state < SL_STATE_COUNT; state++)
        count += summary->stations_by_state[state];
    return count;
}

static const char *known_how(char trust)
{
    if (trust == 'O')
        return " (the owner's own)";
    return trust == 'M' ? " (from memory)" : "";
}

static void print_counts(const struct sl_summary *summary)
{
    struct sl_text head = {0};

    sl_text_addf(&head,
                 "Stations by state, by the rule \"%s\"%s, year %d (each by "
                 "its worst pump and condition):",
                 summary->rule.rule, known_how(summary->rule.trust),
                 summary->year);
    sl_print_safely(stdout, sl_text_string(&head));
    putchar('\n');
    sl_text_release(&head);
    for (int state = 0; state < SL_STATE_COUNT; state++)
        printf("  %-9s %6lld\n", sl_state_name((enum sl_state)state),
               summary->stations_by_state[state]);
    if (summary->stations_without_pumps)
        printf("  (%lld of the unproven have no pump on record)\n",
               summary->stations_without_pumps);
}

static void print_rejected_conditions(long long count)
{
    if (count)
        printf("%lld condition%s of conditions.csv %s rejected: no pump is "
               "called clear; see findings.csv\n",
               count, count == 1 ? "" : "s", count == 1 ? "was" : "were");
}

enum sl_status sl_print_states(struct sl_run *run, struct sl_error *error)
{
    struct worst worst = {.units = run->options->units};
    struct sl_summary summary;
    enum sl_status status = sl_store_read_summary(
        run->store, run->evaluation.evaluation, &run->arena, &summary, error);

    if (status)
        return status;
    if (count_stations(&summary) == 0) {
        puts("No station was kept: there is nothing to judge.");
        return SL_OK;
    }
    print_counts(&summary);
    print_rejected_conditions(run->tables.rejected_conditions);
    if (summary.stations_by_state[SL_SHORT] +
            summary.stations_by_state[SL_THIN] ==
        0) {
        puts("No station is established to be at risk.");
        return SL_OK;
    }
    puts("The worst:");
    return sl_store_each_station(run->store, run->evaluation.evaluation,
                                 print_worst, &worst, error);
}
