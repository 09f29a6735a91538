/* Evaluations: results kept, read back, and in which order. */
#define _POSIX_C_SOURCE 200809L /* mkdtemp, unlink */
#include "store_fixture.h"

#include "base/text.h"

#define PUMPS_AT_MOST 4

/* A station's result under the two shipped conditions, made by hand. */
struct made {
    struct sl_dossier dossier;

    struct sl_pump_result results[2][PUMPS_AT_MOST];
    struct sl_condition_result conditions[2];
    struct sl_station_result result;
};

struct evaluated {
    struct fixture *f;
    long long evaluation;
};

static struct evaluated begin(struct fixture *f)
{
    struct sl_evaluation evaluation = {0, f->vintage, "0.1", "fixed head",
                                       2026};

    must(f, sl_store_add_evaluation(f->store, &evaluation, &f->error));
    return (struct evaluated){f, evaluation.evaluation};
}

static void blank(struct sl_pump_result *result,
                  const struct sl_dossier_pump *p)
{
    const struct sl_terms no_terms = {NAN, NAN, NAN, NAN, NAN,
                                      NAN, NAN, NAN, NAN, NAN};
    *result = (struct sl_pump_result){.pump = p,
                                      .state = SL_CLEAR,
                                      .likely = SL_CLEAR,
                                      .reason = "why",
                                      .flow_basis = SL_FLOW_NONE,
                                      .source_basis = SL_SOURCE_UNKNOWN};
    for (int i = 0; i < SL_CORNER_COUNT; i++)
        result->cases[i] = (struct sl_case){NAN, no_terms, NAN, NAN, NAN, NAN};
    for (int i = 0; i < SL_INPUT_COUNT; i++)
        result->inputs[i] =
            (struct sl_input){.id = (enum sl_input_id)i,
                              .provenance = SL_RECORDED,
                              .applies = true,
                              .value = {i + 0.5, i + 0.5, i + 0.5}};
}

/* Keep a station with pumps "<id>-0", "<id>-1", ... and begin its result,
 * clear throughout. */
static void make(struct evaluated *e, struct made *made, const char *id,
                 double people, size_t pumps)
{
    static long line = 100;
    struct sl_station station = {.line = ++line, .station_id = id};
    bool found = false;

    if (!isnan(people))
        station.people_served = known(people);
    keep(e->f, SL_KIND_STATION, &station);
    for (size_t i = 0; i < pumps; i++) {
        char pump_id[40] = "";

        snprintf(pump_id, sizeof pump_id, "%s-%zu", id, i);
        keep_pump(e->f, ++line, pump_id, id);
    }
    /* The station before it in the order of keys: none is shorter by one. */
    char before[40] = "";
    snprintf(before, sizeof before, "%.*s", (int)strlen(id) - 1, id);
    must(e->f,
         sl_store_next_dossier(e->f->store, e->f->vintage, before, &e->f->arena,
                               &made->dossier, &found, &e->f->error));
    while (found && strcmp(made->dossier.record.station_id, id) != 0)
        must(e->f, sl_store_next_dossier(e->f->store, e->f->vintage,
                                         made->dossier.record.station_id,
                                         &e->f->arena, &made->dossier, &found,
                                         &e->f->error));
    assert_true(found);
    assert_int_equal(made->dossier.pump_count, pumps);
    for (int c = 0; c < 2; c++) {
        for (size_t i = 0; i < pumps; i++)
            blank(&made->results[c][i], &made->dossier.pumps[i]);
        made->conditions[c] = (struct sl_condition_result){
            &e->f->tables.conditions[c], made->results[c], pumps};
    }
    made->result = (struct sl_station_result){.dossier = &made->dossier,
                                              .conditions = made->conditions,
                                              .condition_count = 2,
                                              .state = SL_UNPROVEN};
}

static void file(struct evaluated *e, struct made *made)
{
    must(e->f, sl_store_add_result(e->f->store, e->evaluation, &made->result,
                                   &e->f->error));
}

/* A station of one pump whose summer low governs. */
static void file_one(struct evaluated *e, const char *id, enum sl_state state,
                     enum sl_state likely, double typical, double favourable,
                     double people)
{
    struct made made;

    make(e, &made, id, people, 1);
    made.results[1][0].state = state;
    made.results[1][0].likely = likely;
    made.results[1][0].cases[SL_TYPICAL].surplus = typical;
    made.results[1][0].cases[SL_FAVOURABLE].surplus = favourable;
    made.result.state = state;
    made.result.worst_condition = &made.conditions[1];
    made.result.worst = &made.results[1][0];
    file(e, &made);
}

static enum sl_status note_station(void *context,
                                   const struct sl_station_row *row,
                                   struct sl_error *error)
{
    struct sl_text *text = context;

    (void)error;
    sl_text_addf(text, "%ld %s %s;", row->rank, sl_state_name(row->state),
                 row->worst.station_id);
    return SL_OK;
}

static void assert_order(struct evaluated *e, const char *want)
{
    struct sl_text text = {NULL, 0, 0};

    must(e->f, sl_store_each_station(e->f->store, e->evaluation, note_station,
                                     &text, &e->f->error));
    assert_string_equal(sl_text_string(&text), want);
    sl_text_release(&text);
}

static void at_risk_by_state_then_shortfall(void **state)
{
    struct evaluated e = begin(*state);

    file_one(&e, "A", SL_THIN, SL_THIN, -4.1, -3, 9000);
    file_one(&e, "B", SL_SHORT, SL_SHORT, -0.2, -0.1, 5);
    file_one(&e, "C", SL_SHORT, SL_SHORT, -1.7, -0.1, NAN);
    /* No typical figure: by the favourable one. */
    file_one(&e, "D", SL_SHORT, SL_SHORT, NAN, -0.9, 77);
    file_one(&e, "E", SL_SHORT, SL_SHORT, NAN, NAN, 1e6);
    assert_order(&e, "1 short C;2 short D;3 short B;4 short E;5 thin A;");
}

static void ties_end_in_people_then_key(void **state)
{
    struct evaluated e = begin(*state);

    file_one(&e, "B", SL_THIN, SL_THIN, -1, -1, 20);
    file_one(&e, "D", SL_THIN, SL_THIN, -1, -1, NAN);
    file_one(&e, "C", SL_THIN, SL_THIN, -1, -1, 20);
    file_one(&e, "A", SL_THIN, SL_THIN, -1, -1, NAN);
    file_one(&e, "E", SL_THIN, SL_THIN, -1, -1, 21);
    file_one(&e, "F", SL_THIN, SL_THIN, -1, -1, 0);
    assert_order(&e, "1 thin E;2 thin B;3 thin C;4 thin F;5 thin A;6 thin D;");
}

static void clear_by_surplus_unproven_by_likelihood_last(void **state)
{
    struct evaluated e = begin(*state);

    file_one(&e, "A", SL_UNPROVEN, SL_UNPROVEN, NAN, NAN, 5);
    file_one(&e, "B", SL_UNPROVEN, SL_CLEAR, 0.3, 2, 5);
    file_one(&e, "C", SL_UNPROVEN, SL_THIN, -0.3, 2, 5);
    file_one(&e, "D", SL_UNPROVEN, SL_SHORT, -0.2, 2, 5);
    file_one(&e, "E", SL_UNPROVEN, SL_CLEAR, 0.1, 2, 5);
    file_one(&e, "F", SL_CLEAR, SL_CLEAR, 3.2, 4, 5);
    file_one(&e, "G", SL_CLEAR, SL_CLEAR, 0.4, 4, 5);
    file_one(&e, "H", SL_THIN, SL_THIN, -0.4, -0.1, 5);
    assert_order(&e, "1 thin H;1 clear G;2 clear F;1 unproven D;2 unproven C;"
                     "3 unproven E;4 unproven B;5 unproven A;");
}

static void evaluations_do_not_mix(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct sl_evaluation other = {0, f->vintage, "0.2", "fixed head", 2026};
    struct sl_evaluation got = {0, f->vintage, NULL, NULL, 0};
    bool found = false;

    file_one(&e, "A", SL_SHORT, SL_SHORT, -1, -1, 5);
    must(f, sl_store_add_evaluation(f->store, &other, &f->error));
    assert_order(&(struct evaluated){f, other.evaluation}, "");
    assert_order(&e, "1 short A;");
    must(f, sl_store_find_evaluation(f->store, &got, &found, &f->error));
    assert_true(found);
    assert_int_equal(got.evaluation, other.evaluation);
    assert_string_equal(got.version, "0.2");
    assert_string_equal(got.rule, "fixed head");
    got.version = "0.1";
    must(f, sl_store_find_evaluation(f->store, &got, &found, &f->error));
    assert_int_equal(got.evaluation, e.evaluation);
    got.year = 2027;
    must(f, sl_store_find_evaluation(f->store, &got, &found, &f->error));
    assert_false(found);
    got.year = 2026;
    must(f, sl_store_find_evaluation(f->store, &got, &found, &f->error));
    assert_int_equal(got.evaluation, e.evaluation);
    got.rule = "another";
    must(f, sl_store_find_evaluation(f->store, &got, &found, &f->error));
    assert_false(found);
}

/* What a row told, kept beyond the call. */
struct seen {
    int rows;
    struct sl_station_row station;
    struct sl_pump_row pump;
    struct sl_text texts;
};

static enum sl_status see_station(void *context,
                                  const struct sl_station_row *row,
                                  struct sl_error *error)
{
    struct seen *seen = context;

    (void)error;
    seen->rows++;
    seen->station = *row;
    sl_text_addf(&seen->texts, "%s|%s|%s|%s|%s", row->worst.station_id,
                 row->worst.pump_id, row->worst.condition, row->worst.reason,
                 row->worst.leading_unknown ? row->worst.leading_unknown : "-");
    return SL_OK;
}

static void a_station_without_a_pump_is_unproven(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct seen seen = {.rows = 0};
    struct made made;

    make(&e, &made, "A", 12, 0);
    file(&e, &made);
    must(f, sl_store_each_station(f->store, e.evaluation, see_station, &seen,
                                  &f->error));
    assert_int_equal(seen.rows, 1);
    assert_int_equal(seen.station.state, SL_UNPROVEN);
    assert_int_equal(seen.station.worst.state, SL_UNPROVEN);
    assert_int_equal(seen.station.worst.likely, SL_UNPROVEN);
    assert_int_equal(seen.station.worst.flow_basis, SL_FLOW_NONE);
    assert_int_equal(seen.station.worst.source_basis, SL_SOURCE_UNKNOWN);
    assert_int_equal(seen.station.pumps, 0);
    assert_true(isnan(seen.station.worst.cases[SL_TYPICAL].surplus));
    assert_true(isnan(seen.station.worst.altitude));
    assert_true(seen.station.people_served == 12);
    assert_string_equal(sl_text_string(&seen.texts),
                        "A|||no pump of it was kept|-");
    sl_text_release(&seen.texts);
}

/* A result with a value of its own in every place. */
static void fill_result(struct sl_pump_result *result)
{
    for (int i = 0; i < SL_CORNER_COUNT; i++)
        result->cases[i] = (struct sl_case){
            .flow = 0.1 + i,
            .terms = {10.1 + i, -0.2, 0.3, -4.4, 0.5, -0.6, -0.7, -0.8, -0.9,
                      3.3 + i},
            .npshr = 2.2 + i,
            .required = 3.7 + i,
            .margin = 1.1 + i,
            .surplus = -0.4 + i,
        };
    result->state = SL_THIN;
    result->likely = SL_SHORT;
    result->reason = "thin even so";
    result->flow_basis = SL_FLOW_RATED;
    result->source_basis = SL_SOURCE_PRESSURE_LOW;
    result->off_curve = true;
    result->stands = true;
    result->counts[SL_UNKNOWN] = 2;
    result->counts[SL_RECORDED] = 7;
    result->counts[SL_DERIVED] = 3;
    result->counts[SL_ASSUMED] = 5;
    result->leading_unknown = &result->inputs[SL_IN_DATUM];
    result->inputs[SL_IN_SITE_ELEVATION].value =
        (struct sl_interval){1500, 1500, 1500};
    result->inputs[SL_IN_TEMPERATURE].value =
        (struct sl_interval){297.15, 308.15, 283.15};
}

static enum sl_status see_pump(void *context, const struct sl_pump_row *row,
                               struct sl_error *error)
{
    struct seen *seen = context;

    (void)error;
    seen->rows++;
    seen->pump = *row;
    sl_text_addf(&seen->texts, "%s %s;", row->pump_id, row->condition);
    return SL_OK;
}

static void assert_filled(const struct sl_pump_row *got,
                          const struct sl_pump_result *want)
{
    const struct sl_terms *a = &got->cases[SL_TYPICAL].terms;
    const struct sl_terms *b = &want->cases[SL_TYPICAL].terms;

    for (int i = 0; i < SL_CORNER_COUNT; i++) {
        assert_true(got->cases[i].flow == want->cases[i].flow);
        assert_true(got->cases[i].terms.npsha == want->cases[i].terms.npsha);
        assert_true(got->cases[i].npshr == want->cases[i].npshr);
        assert_true(got->cases[i].required == want->cases[i].required);
        assert_true(got->cases[i].margin == want->cases[i].margin);
        assert_true(got->cases[i].surplus == want->cases[i].surplus);
    }
    assert_memory_equal(a, b, sizeof *a);
    assert_true(isnan(got->cases[SL_ADVERSE].terms.friction));
    assert_int_equal(got->state, SL_THIN);
    assert_int_equal(got->likely, SL_SHORT);
    assert_int_equal(got->flow_basis, SL_FLOW_RATED);
    assert_int_equal(got->source_basis, SL_SOURCE_PRESSURE_LOW);
    assert_true(got->off_curve);
    assert_true(got->stands);
    assert_true(got->altitude == 1500);
    assert_true(got->temperature == 297.15);
    assert_int_equal(got->recorded, 7);
    assert_int_equal(got->derived, 3);
    assert_int_equal(got->assumed, 5);
    assert_int_equal(got->unknown, 2);
}

static void a_result_comes_back_whole(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct seen seen = {.rows = 0};
    struct made made;

    make(&e, &made, "A", 12, 2);
    fill_result(&made.results[1][1]);
    made.result.state = SL_THIN;
    made.result.worst_condition = &made.conditions[1];
    made.result.worst = &made.results[1][1];
    file(&e, &made);
    must(f, sl_store_each_pump(f->store, e.evaluation, see_pump, &seen,
                               &f->error));
    assert_string_equal(sl_text_string(&seen.texts),
                        "A-0 normal;A-0 summer low;A-1 normal;A-1 summer low;");
    assert_filled(&seen.pump, &made.results[1][1]);
    sl_text_clear(&seen.texts);
    must(f, sl_store_each_station(f->store, e.evaluation, see_station, &seen,
                                  &f->error));
    assert_filled(&seen.station.worst, &made.results[1][1]);
    assert_string_equal(sl_text_string(&seen.texts),
                        "A|A-1|summer low|thin even so|datum_elevation");
    assert_int_equal(seen.station.pumps, 2);
    assert_int_equal(seen.station.pumps_by_state[SL_CLEAR], 1);
    assert_int_equal(seen.station.pumps_by_state[SL_THIN], 1);
    assert_int_equal(seen.station.line, made.dossier.record.line);
    sl_text_release(&seen.texts);
}

/* Every set, check, rule and limit told, each with a value of its own. */
static void fill_sets(struct fixture *f, struct sl_pump_result *result)
{
    result->governing =
        (struct sl_set_case){.words = "with P-2, P-3", .running = 3};
    result->one_out =
        (struct sl_set_case){.words = "with any 1 of P-2, P-3",
                             .running = 2,
                             .figures = {.margin = 1.31, .surplus = -0.19}};
    result->off_curve_set = (struct sl_set_case){
        .words = "alone", .running = 1, .position = SL_PAST_END};
    result->adverse_set = "with P-3";
    result->cases[SL_ADVERSE].surplus = -0.4;
    result->npshr_basis = SL_NPSHR_ESTIMATE;
    result->stands_set = "with P-2";
    result->sets_tried = 6;
    result->sets_all = true;
    result->checks[SL_CHECK_SUBMERGENCE] =
        (struct sl_check){.end = SL_CHECK_BEYOND, .trust = 'M'};
    result->checks[SL_CHECK_SUCTION_LIFT].end = SL_CHECK_UNKNOWN;
    result->checks[SL_CHECK_STRAIGHT_RUN].end = SL_CHECK_WITHIN;
    result->checks[SL_CHECK_TWO_CROSSINGS].end = SL_CHECK_BEYOND;
    result->limits[SL_LIMIT_LEVEL] = (struct sl_limit){SL_LIMIT_FOUND, 1204.37};
    result->limits[SL_LIMIT_TEMPERATURE] =
        (struct sl_limit){SL_LIMIT_NONE, 300.5};
    result->limits[SL_LIMIT_FLOW] =
        (struct sl_limit){SL_LIMIT_FIGURES_END, 0.0734};
    result->rule_count = f->tables.rule_count;
    result->rules =
        sl_arena_new(&f->arena, result->rule_count, sizeof *result->rules);
    for (size_t i = 0; i < result->rule_count; i++)
        result->rules[i] = (struct sl_rule_verdict){
            .rule = &f->tables.rules[i],
            .applies = i != 4,
            .state = (enum sl_state)(i % SL_STATE_COUNT)};
}

static enum sl_status tell_sets(void *context, const struct sl_pump_row *row,
                                struct sl_error *error)
{
    struct sl_text *text = context;

    (void)error;
    sl_text_addf(text, "%s|%d|%lld|%d|%s|%s|%.2f|%.2f|", row->running_set,
                 row->running, row->sets_tried, row->sets_all, row->adverse_set,
                 row->one_out_set, row->one_out_margin, row->one_out_surplus);
    sl_text_addf(text, "%s|%s|%s|%d|%s|%s",
                 sl_curve_position_name(row->curve_position),
                 row->off_curve_set, row->stands_set, row->two_crossings,
                 row->flags, row->rule_states);
    sl_text_addf(text, "|%s", sl_npshr_basis_name(row->npshr_basis));
    for (int i = 0; i < SL_LIMIT_COUNT; i++)
        sl_text_addf(text, "|%s %.2f", sl_limit_end_name(row->limits[i].end),
                     row->limits[i].value);
    sl_text_add_string(text, "\n");
    return SL_OK;
}

static void the_sets_come_back_whole(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct sl_text text = {NULL, 0, 0};
    struct made made;

    make(&e, &made, "A", 12, 1);
    fill_sets(f, &made.results[1][0]);
    file(&e, &made);
    must(f, sl_store_each_pump(f->store, e.evaluation, tell_sets, &text,
                               &f->error));
    assert_string_equal(
        sl_text_string(&text),
        "|0|0|0|||nan|nan|on the curve|||0|||curve|"
        "unknown nan|unknown nan|unknown nan\n"
        "with P-2, P-3|3|6|1|with P-3|with any 1 of P-2, P-3|1.31|-0.19|"
        "past its end|alone|with P-2|1|submergence (from memory); two "
        "crossings|STUC-T|estimate|"
        "found 1204.37|none nan|figures end 0.07\n");
    sl_text_release(&text);
}

static void no_adverse_figure_has_no_adverse_set(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct sl_text text = {NULL, 0, 0};
    struct made made;

    make(&e, &made, "A", 12, 1);
    fill_sets(f, &made.results[1][0]);
    made.results[1][0].cases[SL_ADVERSE].surplus = NAN;
    file(&e, &made);
    must(f, sl_store_each_pump(f->store, e.evaluation, tell_sets, &text,
                               &f->error));
    assert_non_null(
        strstr(sl_text_string(&text), "|6|1||with any 1 of P-2, P-3|"));
    sl_text_release(&text);
}

/* Of three clear stations one has nothing beside its margin, one a flag, and
 * one is thin by a rule that is not the one ranked on. */
static void clear_stations_with_something_beside_are_counted(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct sl_summary summary = {.version = "0.1"};
    struct seen seen = {.rows = 0};
    static const char *const ids[] = {"A", "B", "C", "D"};
    struct made made[4];

    for (int i = 0; i < 4; i++) {
        make(&e, &made[i], ids[i], 12 + i, 2);
        made[i].result.state = SL_CLEAR;
    }
    made[1].results[0][1].checks[SL_CHECK_STRAIGHT_RUN].end = SL_CHECK_BEYOND;
    fill_sets(f, &made[2].results[1][0]);
    made[2].results[1][0].checks[SL_CHECK_SUBMERGENCE].end = SL_CHECK_WITHIN;
    made[2].results[1][0].checks[SL_CHECK_TWO_CROSSINGS].end = SL_CHECK_WITHIN;
    made[3].result.state = SL_UNPROVEN;
    made[3].results[0][0].checks[SL_CHECK_STRAIGHT_RUN].end = SL_CHECK_BEYOND;
    for (int i = 0; i < 4; i++)
        file(&e, &made[i]);
    must(f, sl_store_read_summary(f->store, e.evaluation, &f->arena, &summary,
                                  &f->error));
    assert_int_equal(summary.clear_beside, 2);
    must(f, sl_store_each_station(f->store, e.evaluation, see_station, &seen,
                                  &f->error));
    assert_true(seen.station.any_beside); /* the last: unproven */
    sl_text_release(&seen.texts);
}

static void rules_are_told_and_their_pumps_counted(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct sl_summary summary = {.version = "0.1"};
    struct made made;

    must(f, sl_store_add_rules(f->store, e.evaluation, &f->tables, &f->error));
    make(&e, &made, "A", 12, 2);
    for (int c = 0; c < 2; c++)
        for (int p = 0; p < 2; p++)
            fill_sets(f, &made.results[c][p]);
    /* The worst condition counts, whichever it is. */
    made.results[0][0].rules[3].state = SL_THIN;
    made.results[1][1].rules[3].state = SL_SHORT;
    file(&e, &made);
    must(f, sl_store_read_summary(f->store, e.evaluation, &f->arena, &summary,
                                  &f->error));
    assert_int_equal(summary.year, 2026);
    assert_int_equal(summary.rule_count, f->tables.rule_count);
    for (size_t i = 0; i < summary.rule_count; i++) {
        assert_string_equal(summary.rules[i].rule.rule,
                            f->tables.rules[i].rule);
        assert_string_equal(summary.rules[i].rule.source,
                            f->tables.rules[i].source);
        assert_int_equal(summary.rules[i].rule.trust, f->tables.rules[i].trust);
        assert_int_equal(summary.rules[i].rule.tier_count,
                         f->tables.rules[i].tier_count);
    }
    assert_int_equal(summary.rules[0].pumps_by_state[SL_SHORT], 2);
    assert_int_equal(summary.rules[2].pumps_by_state[SL_UNPROVEN], 2);
    assert_int_equal(summary.rules[3].pumps_by_state[SL_THIN], 1);
    assert_int_equal(summary.rules[3].pumps_by_state[SL_SHORT], 1);
    assert_int_equal(summary.rules[3].pumps_by_state[SL_CLEAR], 0);
    assert_int_equal(summary.rules[4].pumps_apart, 2);
    must(f, sl_store_commit(f->store, &f->error));
    assert_int_equal(
        file_says(f, "SELECT sum(pumps_short + pumps_thin + pumps_unproven + "
                     "pumps_clear + pumps_apart) FROM evaluation_rules"),
        (long long)(2 * f->tables.rule_count));
    assert_int_equal(file_says(f, "SELECT count(*) FROM rule_verdicts WHERE "
                                  "state = 'does not apply'"),
                     4);
    assert_int_equal(file_says(f, "SELECT count(*) FROM pump_limits WHERE "
                                  "lowest_level_m = 1204.37 AND "
                                  "warmest_water_end = 'none'"),
                     4);
}

static void counts_of_rules_are_rolled_back_too(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct made made;

    must(f, sl_store_add_rules(f->store, e.evaluation, &f->tables, &f->error));
    must(f, sl_store_commit(f->store, &f->error));
    must(f, sl_store_begin(f->store, &f->error));
    make(&e, &made, "A", 12, 1);
    fill_sets(f, &made.results[0][0]);
    file(&e, &made);
    sl_store_rollback(f->store);
    must(f, sl_store_begin(f->store, &f->error));
    must(f, sl_store_commit(f->store, &f->error));
    assert_int_equal(file_says(f, "SELECT sum(pumps_short) + count(*) FROM "
                                  "evaluation_rules"),
                     (long long)f->tables.rule_count);
}

static void an_unknown_site_has_no_altitude(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct seen seen = {.rows = 0};
    struct made made;

    make(&e, &made, "A", 12, 1);
    /* An unknown's place may hold anything. */
    made.results[1][0].inputs[SL_IN_SITE_ELEVATION].provenance = SL_UNKNOWN;
    file(&e, &made);
    must(f, sl_store_each_pump(f->store, e.evaluation, see_pump, &seen,
                               &f->error));
    assert_int_equal(seen.rows, 2);
    assert_true(isnan(seen.pump.altitude));
    assert_true(seen.pump.temperature == SL_IN_TEMPERATURE + 0.5);
    sl_text_release(&seen.texts);
}

static enum sl_status note_unknown(void *context,
                                   const struct sl_unknown_row *row,
                                   struct sl_error *error)
{
    struct sl_text *text = context;

    (void)error;
    sl_text_addf(text, "%ld %s %s %s;", row->rank, row->pump_id, row->condition,
                 sl_input_column(row->input));
    return SL_OK;
}

static void assert_unknowns(struct evaluated *e, const char *want)
{
    struct sl_text text = {NULL, 0, 0};

    must(e->f, sl_store_each_unknown(e->f->store, e->evaluation, note_unknown,
                                     &text, &e->f->error));
    assert_string_equal(sl_text_string(&text), want);
    sl_text_release(&text);
}

static void doubt(struct sl_pump_result *result, enum sl_input_id id,
                  enum sl_provenance provenance, double swing, bool settles)
{
    result->inputs[id].provenance = provenance;
    result->inputs[id].open = true;
    if (provenance == SL_UNKNOWN)
        result->inputs[id].value = (struct sl_interval){NAN, NAN, NAN};
    result->inputs[id].swing = swing;
    result->inputs[id].settles = settles;
    result->state = SL_UNPROVEN;
}

static void what_settles_is_found_out_first(void **state)
{
    struct evaluated e = begin(*state);
    struct made a, b, c;

    make(&e, &a, "A", 10, 1);
    a.results[1][0].likely = SL_CLEAR;
    doubt(&a.results[1][0], SL_IN_TEMPERATURE, SL_ASSUMED, 0.4, false);
    doubt(&a.results[1][0], SL_IN_DATUM, SL_UNKNOWN, NAN, false);
    doubt(&a.results[1][0], SL_IN_GAS, SL_ASSUMED, 0.6, true);
    /* What is not open is nothing to find out. */
    doubt(&a.results[1][0], SL_IN_BAROMETER, SL_ASSUMED, 9, true);
    a.results[1][0].inputs[SL_IN_BAROMETER].open = false;
    file(&e, &a);
    make(&e, &b, "B", 20, 1);
    b.results[1][0].likely = SL_THIN;
    doubt(&b.results[1][0], SL_IN_SUCTION_LENGTH, SL_ASSUMED, 0.4, false);
    /* Equal but for its last bits, which order nothing. */
    doubt(&b.results[1][0], SL_IN_SUCTION_BORE, SL_ASSUMED, 0.4 + 1e-12, false);
    file(&e, &b);
    make(&e, &c, "C", NAN, 1);
    c.results[1][0].likely = SL_SHORT;
    doubt(&c.results[1][0], SL_IN_NPSHR, SL_UNKNOWN, NAN, false);
    file(&e, &c);
    assert_unknowns(&e, "1 A-0 summer low service;2 B-0 summer low length;"
                        "3 B-0 summer low bore;4 C-0 summer low npshr;"
                        "5 A-0 summer low datum_elevation;"
                        "6 A-0 summer low water_temp_summer;");
}

static void only_unproven_pumps_have_something_to_find_out(void **state)
{
    struct evaluated e = begin(*state);
    struct made made;

    make(&e, &made, "A", 10, 4);
    /* Unproven in the mild condition alone. */
    doubt(&made.results[0][0], SL_IN_DATUM, SL_UNKNOWN, NAN, true);
    /* Unproven in both: told once. */
    doubt(&made.results[0][1], SL_IN_DATUM, SL_UNKNOWN, NAN, true);
    doubt(&made.results[1][1], SL_IN_GAS, SL_ASSUMED, 0.6, true);
    /* Worse than unproven. */
    doubt(&made.results[0][2], SL_IN_DATUM, SL_UNKNOWN, NAN, true);
    made.results[1][2].state = SL_SHORT;
    /* Clear in spite of an assumption. */
    doubt(&made.results[1][3], SL_IN_GAS, SL_ASSUMED, 0.6, false);
    made.results[1][3].state = SL_CLEAR;
    file(&e, &made);
    assert_unknowns(&e, "1 A-0 normal datum_elevation;"
                        "2 A-1 summer low service;");
}

static enum sl_status see_unknown(void *context,
                                  const struct sl_unknown_row *row,
                                  struct sl_error *error)
{
    struct sl_text *text = context;

    (void)error;
    sl_text_addf(text, "%s %g %g %g %g %d %g \"%s\";",
                 sl_provenance_name(row->provenance), row->value.typical,
                 row->value.adverse, row->value.favourable, row->swing,
                 row->settles, row->people_served, row->what);
    return SL_OK;
}

static void an_unknown_says_what_it_rests_on(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct sl_text text = {NULL, 0, 0};
    struct made made;
    struct sl_input *gas = NULL;

    make(&e, &made, "A", 10, 1);
    doubt(&made.results[1][0], SL_IN_DATUM, SL_UNKNOWN, NAN, true);
    doubt(&made.results[1][0], SL_IN_GAS, SL_ASSUMED, 0.625, false);
    gas = &made.results[1][0].inputs[SL_IN_GAS];
    gas->row = &f->tables.defaults[0];
    gas->value = (struct sl_interval){0, 0.5, NAN};
    made.results[1][0].inputs[SL_IN_DATUM].rule = "not recorded";
    file(&e, &made);
    must(f, sl_store_each_unknown(f->store, e.evaluation, see_unknown, &text,
                                  &f->error));
    assert_non_null(strstr(sl_text_string(&text), "unknown "));
    assert_non_null(
        strstr(sl_text_string(&text), " nan 1 10 \"not recorded\""));
    assert_non_null(strstr(sl_text_string(&text), "assumed 0 0.5 nan 0.625 0"));
    assert_non_null(
        strstr(sl_text_string(&text), f->tables.defaults[0].source));
    sl_text_release(&text);
}

static const struct sl_default *
default_of(const struct fixture *f, const char *field, const char *circumstance)
{
    for (size_t i = 0; i < f->tables.default_count; i++)
        if (sl_same(f->tables.defaults[i].field, field) &&
            sl_same(f->tables.defaults[i].circumstance, circumstance))
            return &f->tables.defaults[i];
    fail_msg("no default for %s, \"%s\"", field, circumstance);
    return NULL;
}

static enum sl_status count_uses(void *context,
                                 const struct sl_default_row *row,
                                 struct sl_error *error)
{
    struct sl_text *text = context;

    (void)error;
    if (row->uses)
        sl_text_addf(text, "%s/%s %lld;", row->row.field, row->row.circumstance,
                     row->uses);
    return SL_OK;
}

static void assert_uses(struct evaluated *e, const char *want)
{
    struct sl_text text = {NULL, 0, 0};

    must(e->f, sl_store_each_default(e->f->store, e->evaluation, count_uses,
                                     &text, &e->f->error));
    assert_string_equal(sl_text_string(&text), want);
    sl_text_release(&text);
}

static void every_use_of_a_default_is_counted(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct made made;
    const struct sl_default *barometer = &f->tables.defaults[0];

    assert_string_equal(barometer->field, "barometer_fall");
    for (int i = 0; i < 2; i++) {
        make(&e, &made, i ? "B" : "A", 10, 2);
        for (int c = 0; c < 2; c++)
            for (int p = 0; p < 2; p++)
                made.results[c][p].inputs[SL_IN_BAROMETER].row = barometer;
        made.results[1][0].inputs[SL_IN_GAS].row =
            default_of(f, "gas_allowance", "wastewater");
        file(&e, &made);
        if (i == 0)
            assert_uses(&e, "barometer_fall/ 4;gas_allowance/wastewater 1;");
    }
    assert_uses(&e, "barometer_fall/ 8;gas_allowance/wastewater 2;");
    must(f, sl_store_commit(f->store, &f->error));
    assert_int_equal(file_says(f, "SELECT sum(uses) FROM default_uses"), 10);
}

static void uses_are_rolled_back_too(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct made made;

    must(f, sl_store_commit(f->store, &f->error));
    must(f, sl_store_begin(f->store, &f->error));
    make(&e, &made, "A", 10, 1);
    made.results[1][0].inputs[SL_IN_GAS].row =
        default_of(f, "gas_allowance", "wastewater");
    file(&e, &made);
    sl_store_rollback(f->store);
    must(f, sl_store_begin(f->store, &f->error));
    must(f, sl_store_commit(f->store, &f->error));
    assert_int_equal(file_says(f, "SELECT count(*) FROM default_uses"), 0);
    assert_int_equal(file_says(f, "SELECT count(*) FROM pump_results"), 0);
}

static void the_summary_adds_up(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct sl_file_sum sum = {"pumps.csv", true, "ab", 512, 17, 11, 4, 2};
    struct sl_summary summary = {.version = "0.1",
                                 .conditions = f->tables.conditions,
                                 .condition_count = 2};
    struct made made;

    must(f, sl_store_add_file(f->store, f->vintage, &sum, &f->error));
    file_one(&e, "A", SL_SHORT, SL_SHORT, -1, -1, 5);
    file_one(&e, "B", SL_CLEAR, SL_CLEAR, 1, 1, 5);
    file_one(&e, "C", SL_CLEAR, SL_CLEAR, 1, 1, 5);
    make(&e, &made, "D", 10, 3);
    made.results[0][0].state = SL_THIN;
    made.results[1][2].state = SL_UNPROVEN;
    file(&e, &made);
    make(&e, &made, "E", 10, 0);
    file(&e, &made);
    must(f, sl_store_read_summary(f->store, e.evaluation, &f->arena, &summary,
                                  &f->error));
    assert_string_equal(summary.label, "2026");
    assert_string_equal(summary.inventory_sha256, "c0ffee");
    assert_string_equal(summary.version, "0.1");
    assert_ptr_equal(summary.conditions, f->tables.conditions);
    assert_int_equal(summary.vintage, f->vintage);
    assert_int_equal(summary.stations_by_state[SL_SHORT], 1);
    assert_int_equal(summary.stations_by_state[SL_THIN], 0);
    assert_int_equal(summary.stations_by_state[SL_CLEAR], 2);
    assert_int_equal(summary.stations_by_state[SL_UNPROVEN], 2);
    assert_int_equal(summary.pumps_by_state[SL_SHORT], 1);
    assert_int_equal(summary.pumps_by_state[SL_THIN], 1);
    assert_int_equal(summary.pumps_by_state[SL_UNPROVEN], 1);
    assert_int_equal(summary.pumps_by_state[SL_CLEAR], 3);
    assert_int_equal(summary.stations_without_pumps, 1);
    assert_string_equal(summary.rule.rule, "fixed head");
    assert_true(summary.rule.tiers[0].floor == 1.5);
    assert_int_equal(summary.sums[SL_KIND_PUMP].kept, 11);
    assert_int_equal(
        sl_store_read_summary(f->store, 99, &f->arena, &summary, &f->error),
        SL_BUG);
}

static void a_result_of_other_pumps_is_our_bug(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    struct made made;

    make(&e, &made, "A", 10, 2);
    made.dossier.pump_count = 1;
    assert_int_equal(
        sl_store_add_result(f->store, e.evaluation, &made.result, &f->error),
        SL_BUG);
    made.dossier.pump_count = 2;
    made.dossier.pumps[1].record.pump_id = "A-2";
    assert_int_equal(
        sl_store_add_result(f->store, e.evaluation, &made.result, &f->error),
        SL_BUG);
    assert_non_null(strstr(f->error.message, "\"A\""));
}

static enum sl_status stop_at_once(void *context,
                                   const struct sl_station_row *row,
                                   struct sl_error *error)
{
    (void)row;
    ++*(int *)context;
    return sl_error_set(error, SL_INTERRUPTED, "stopped");
}

static void a_status_from_a_row_ends_the_reading(void **state)
{
    struct fixture *f = *state;
    struct evaluated e = begin(f);
    int rows = 0;

    file_one(&e, "A", SL_SHORT, SL_SHORT, -1, -1, 5);
    file_one(&e, "B", SL_CLEAR, SL_CLEAR, 1, 1, 5);
    assert_int_equal(sl_store_each_station(f->store, e.evaluation, stop_at_once,
                                           &rows, &f->error),
                     SL_INTERRUPTED);
    assert_int_equal(rows, 1);
    assert_order(&e, "1 short A;1 clear B;");
}

#define IN_VINTAGE(test)                                                       \
    cmocka_unit_test_setup_teardown(test, fixture_vintage, fixture_end)

int main(void)
{
    const struct CMUnitTest tests[] = {
        IN_VINTAGE(at_risk_by_state_then_shortfall),
        IN_VINTAGE(ties_end_in_people_then_key),
        IN_VINTAGE(clear_by_surplus_unproven_by_likelihood_last),
        IN_VINTAGE(evaluations_do_not_mix),
        IN_VINTAGE(a_station_without_a_pump_is_unproven),
        IN_VINTAGE(a_result_comes_back_whole),
        IN_VINTAGE(the_sets_come_back_whole),
        IN_VINTAGE(no_adverse_figure_has_no_adverse_set),
        IN_VINTAGE(clear_stations_with_something_beside_are_counted),
        IN_VINTAGE(rules_are_told_and_their_pumps_counted),
        IN_VINTAGE(counts_of_rules_are_rolled_back_too),
        IN_VINTAGE(an_unknown_site_has_no_altitude),
        IN_VINTAGE(what_settles_is_found_out_first),
        IN_VINTAGE(only_unproven_pumps_have_something_to_find_out),
        IN_VINTAGE(an_unknown_says_what_it_rests_on),
        IN_VINTAGE(every_use_of_a_default_is_counted),
        IN_VINTAGE(uses_are_rolled_back_too),
        IN_VINTAGE(the_summary_adds_up),
        IN_VINTAGE(a_result_of_other_pumps_is_our_bug),
        IN_VINTAGE(a_status_from_a_row_ends_the_reading),
    };

    return cmocka_run_group_tests_name("store results", tests, NULL, NULL);
}
