/* The corners of a pump hold every station that its records allow: tried at
 * points at random within the intervals of what is not known.
 *
 * SL_CORNER_STATIONS in the environment sets how many stations. */
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
#include <stdlib.h>

#include <cmocka.h>

#include "unit/random_station.h"

#ifdef __SANITIZE_ADDRESS__ /* several times slower */
enum { STATIONS = 600, POINTS_EACH = 20 };
#else
enum { STATIONS = 3000, POINTS_EACH = 20 };
#endif

/* Of heads, m. */
#define ALLOWED 0.001

struct judged {
    struct sl_layout layout;
    struct sl_tally *tallies;
    size_t class_of[PUMPS_MOST];
};

static void judge_station(struct random_station *s, struct judged *judged,
                          const struct sl_margin_rule *rule)
{
    sl_layout_make(&judged->layout, &s->dossier, &s->condition, &s->tables,
                   rule, false, &s->arena);
    judged->tallies = sl_arena_new(&s->arena, judged->layout.class_count,
                                   sizeof *judged->tallies);
    sl_govern(&judged->layout, false, &s->arena, judged->tallies);
    for (size_t c = 0; c < judged->layout.class_count; c++)
        for (int i = 0; i < judged->layout.classes[c].count; i++)
            judged->class_of[judged->layout.classes[c].pumps[i]] = c;
}

struct seen {
    long points, held[2], states[SL_STATE_COUNT], off_curve, standing;
    long broken, stations_broken;
    uint64_t last_broken;
    double excess[2]; /* largest past the adverse, the favourable corner */
};

static void say_broken(struct seen *seen, const char *what, uint64_t from,
                       int point, size_t pump, double corner, double got)
{
    seen->broken++;
    if (from == seen->last_broken)
        return;
    seen->last_broken = from;
    if (seen->stations_broken++ < 20)
        print_message("seed %llu point %d pump %zu: %s %.6f at a point, "
                      "corner %.6f\n",
                      (unsigned long long)from, point, pump, what, got, corner);
}

/* Keeps count of a figure against a corner. */
static void hold(struct seen *seen, int end, const char *what, uint64_t from,
                 int point, size_t pump, double corner, double got)
{
    double past = end == 0 ? corner - got : got - corner;

    if (isnan(past))
        return;
    seen->held[end]++;
    if (past > seen->excess[end])
        seen->excess[end] = past;
    if (past > ALLOWED)
        say_broken(seen, what, from, point, pump, corner, got);
}

static enum sl_state drawn(const struct sl_tally *tally)
{
    const struct sl_case *best = &tally->favourable.outcome.figures;

    if (!isnan(best->surplus) && tally->favourable.outcome.margin < 0)
        return SL_SHORT;
    if (best->surplus < 0)
        return SL_THIN;
    if (tally->adverse.counts && tally->adverse.outcome.figures.surplus >= 0 &&
        !isnan(tally->typical.outcome.figures.surplus) &&
        !tally->off_curve.counts)
        return SL_CLEAR;
    return SL_UNPROVEN;
}

static void hold_state(struct seen *seen, const struct sl_tally *open,
                       const struct sl_tally *known, uint64_t from, int point,
                       size_t pump)
{
    enum sl_state state = drawn(open);
    double margin = known->typical.outcome.margin;
    double surplus = known->typical.outcome.figures.surplus;

    seen->states[state]++;
    if (known->off_curve.counts) {
        seen->off_curve += state != SL_UNPROVEN;
        if (isnan(surplus) || state != SL_CLEAR)
            return;
    }
    if (state == SL_CLEAR && !(surplus >= -ALLOWED))
        say_broken(seen, "called clear: surplus", from, point, pump, NAN,
                   surplus);
    if (state == SL_SHORT && !(margin < ALLOWED))
        say_broken(seen, "called short: margin", from, point, pump, NAN,
                   margin);
    if (state == SL_THIN && !(surplus < ALLOWED))
        say_broken(seen, "called thin: surplus", from, point, pump, NAN,
                   surplus);
}

static void hold_pump(struct seen *seen, const struct sl_tally *open,
                      const struct sl_tally *known, uint64_t from, int point,
                      size_t pump)
{
    static const char *const names[RULES] = {"floor", "ratio", "by lift"};
    const struct sl_tried *ends[2] = {&open->adverse, &open->favourable};

    seen->points++;
    if (!known->runs) {
        seen->standing++;
        return;
    }
    for (int end = 0; end < 2; end++) {
        /* Off the curve in some set there is no figure to compare. */
        if (!ends[end]->counts || (end == 1 && known->off_curve.counts))
            continue;
        hold(seen, end, "surplus", from, point, pump,
             ends[end]->outcome.figures.surplus,
             known->typical.outcome.figures.surplus);
        hold(seen, end, "margin", from, point, pump, ends[end]->outcome.margin,
             known->typical.outcome.margin);
        for (int r = 0; r < RULES; r++)
            hold(seen, end, names[r], from, point, pump,
                 ends[end]->outcome.surplus[r],
                 known->typical.outcome.surplus[r]);
    }
    hold_state(seen, open, known, from, point, pump);
}

static void try_station(uint64_t *seed, struct seen *seen)
{
    struct random_station s;
    struct judged open;
    uint64_t from = *seed;
    int rule = one_of(seed, RULES);

    random_make(&s, seed);
    judge_station(&s, &open, &s.rules[rule]);
    for (int n = 0; n < POINTS_EACH; n++) {
        struct random_station point;
        struct judged known;

        random_point(&s, seed, &open.layout, n % 2, &point);
        judge_station(&point, &known, &point.rules[rule]);
        for (size_t p = 0; p < s.dossier.pump_count; p++)
            hold_pump(seen, &open.tallies[open.class_of[p]],
                      &known.tallies[known.class_of[p]], from, n, p);
        sl_arena_release(&point.arena);
    }
    sl_arena_release(&s.arena);
}

static int stations(void)
{
    const char *wanted = getenv("SL_CORNER_STATIONS");

    return wanted ? (int)strtol(wanted, NULL, 10) : STATIONS;
}

static void every_point_lies_between_the_corners(void **state)
{
    uint64_t seed = 20260801;
    struct seen seen = {0};

    (void)state;
    for (int n = stations(); n > 0; n--)
        try_station(&seed, &seen);
    print_message("%ld points: %ld held to the adverse corner, most past it "
                  "%.2e m; %ld to the favourable, %.2e m; %ld short, %ld thin, "
                  "%ld unproven, %ld clear; %ld off their curve, %ld stand\n",
                  seen.points, seen.held[0], seen.excess[0], seen.held[1],
                  seen.excess[1], seen.states[SL_SHORT], seen.states[SL_THIN],
                  seen.states[SL_UNPROVEN], seen.states[SL_CLEAR],
                  seen.off_curve, seen.standing);
    assert_true(seen.held[0] > seen.points && seen.held[1] > seen.points);
    for (int i = 0; i < SL_STATE_COUNT; i++)
        assert_true(seen.states[i] > seen.points / 20);
    assert_int_equal(seen.broken, 0);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_point_lies_between_the_corners),
    };

    return cmocka_run_group_tests(tests, NULL, NULL);
}
