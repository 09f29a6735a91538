/* The owner's own conditions and margin rules: kept, and read as tables. */
#define _POSIX_C_SOURCE 200809L /* mkdtemp, unlink */
#include "store_fixture.h"

#include "unit/check.h"

/* Places in their vocabularies. */
enum { LEVEL_NORMAL = 1, LEVEL_LOWEST, LEVEL_CUT_OUT, LEVEL_RECORD_LOW };
enum { BASIS_NORMAL = 1, BASIS_LOW };
enum { WATER_NORMAL = 1, WATER_SUMMER };
enum { AIR_STANDARD = 1, AIR_STORM };
enum { WALLS_NEW = 1, WALLS_AGED };

static const struct sl_owner_condition usual = {
    .line = 2,
    .condition = "usual",
    .level_basis = LEVEL_NORMAL,
    .level_addition = {0, true, 0},
    .discharge_basis = BASIS_NORMAL,
    .pressure_basis = BASIS_NORMAL,
    .temperature_basis = WATER_NORMAL,
    .temperature_addition = {0, true, 0},
    .barometer = AIR_STANDARD,
    .suction_friction = WALLS_NEW,
    .discharge_friction = WALLS_AGED,
};
static const struct sl_owner_condition drought = {
    .line = 3,
    .condition = "drought",
    .level_basis = LEVEL_RECORD_LOW,
    .level_addition = {-0.457, true, 0},
    .temperature_basis = WATER_SUMMER,
    .temperature_addition = {2.25, true, 0},
};

static void read_for(struct fixture *f, long long vintage)
{
    must(f, sl_store_read_tables(f->store, vintage, &f->arena, &f->tables,
                                 &f->error));
}

static void own_conditions_stand_in_place_of_the_published(void **state)
{
    struct fixture *f = *state;
    const struct sl_condition *c = NULL;

    /* In the order of their lines, not of their names or of being kept. */
    keep(f, SL_KIND_CONDITION, &drought);
    keep(f, SL_KIND_CONDITION, &usual);
    read_for(f, f->vintage);
    c = f->tables.conditions;
    assert_int_equal(f->tables.condition_count, 2);
    assert_string_equal(c[0].condition, "usual");
    assert_int_equal(c[0].level, SL_LEVEL_NORMAL);
    assert_int_equal(c[0].discharge, SL_LEVEL_NORMAL);
    assert_int_equal(c[0].pressure, SL_LEVEL_NORMAL);
    assert_false(c[0].summer_temperature);
    assert_false(c[0].storm_barometer);
    assert_int_equal(c[0].suction_friction, SL_FRICTION_NEW);
    assert_int_equal(c[0].discharge_friction, SL_FRICTION_AGED);
    assert_string_equal(c[1].condition, "drought");
    assert_int_equal(c[1].level, SL_LEVEL_RECORD_LOW);
    check_close("level", c[1].level_addition, -0.457, 0, 0);
    assert_true(c[1].summer_temperature);
    check_close("temperature", c[1].temperature_addition, 2.25, 0, 0);
}

static void what_a_condition_leaves_out_is_adverse(void **state)
{
    struct fixture *f = *state;
    const struct sl_condition *c = NULL;

    keep(f, SL_KIND_CONDITION,
         &(struct sl_owner_condition){.line = 2,
                                      .condition = "bare",
                                      .level_basis = LEVEL_LOWEST,
                                      .temperature_basis = WATER_SUMMER});
    keep(f, SL_KIND_CONDITION,
         &(struct sl_owner_condition){.line = 3,
                                      .condition = "cut-out",
                                      .level_basis = LEVEL_CUT_OUT,
                                      .temperature_basis = WATER_NORMAL});
    read_for(f, f->vintage);
    c = f->tables.conditions;
    assert_int_equal(c[0].level, SL_LEVEL_LOW);
    assert_int_equal(c[1].level, SL_LEVEL_CUT_OUT);
    assert_int_equal(c[0].discharge, SL_LEVEL_LOW);
    assert_int_equal(c[0].pressure, SL_LEVEL_LOW);
    assert_true(c[0].storm_barometer);
    assert_int_equal(c[0].suction_friction, SL_FRICTION_AGED);
    assert_int_equal(c[0].discharge_friction, SL_FRICTION_NEW);
    assert_true(c[0].level_addition == 0);
    assert_true(c[0].temperature_addition == 0);
}

static void another_vintage_has_the_published_ones(void **state)
{
    struct fixture *f = *state;
    struct sl_vintage next = {0, "2027", "decaf", "2027-07-01T12:00:00Z"};
    struct sl_owner_rule rule = {
        .line = 2, .rule = "ours", .ratio = known(1.25), .floor = known(0.5)};

    keep(f, SL_KIND_CONDITION, &usual);
    keep(f, SL_KIND_RULE, &rule);
    must(f, sl_store_add_vintage(f->store, &next, &f->error));
    f->tables.year = 2031;
    read_for(f, next.vintage);
    assert_int_equal(f->tables.condition_count, 2);
    assert_string_equal(f->tables.conditions[0].condition, "normal");
    assert_int_equal(f->tables.rule_count, 6);
    assert_int_equal(f->tables.year, 2031);
    read_for(f, 0);
    assert_string_equal(f->tables.conditions[1].condition, "summer low");
    assert_int_equal(f->tables.rule_count, 6);
    read_for(f, f->vintage);
    assert_int_equal(f->tables.condition_count, 1);
    assert_int_equal(f->tables.rule_count, 7);
}

static void own_rules_come_behind_or_in_place_of_their_name(void **state)
{
    struct fixture *f = *state;
    const struct sl_margin_rule *r = NULL;

    /* Lines as low as the places of the published ones. */
    keep(f, SL_KIND_RULE,
         &(struct sl_owner_rule){.line = 4,
                                 .rule = "ANSI/HI 9.6.1-1998",
                                 .ratio = known(1.45),
                                 .floor = known(0.915),
                                 .edition = "the 1998 one",
                                 .source = "the board"});
    keep(f, SL_KIND_RULE,
         &(struct sl_owner_rule){.line = 3,
                                 .rule = "zeal",
                                 .ratio = known(3),
                                 .floor = known(2.75)});
    keep(f, SL_KIND_RULE,
         &(struct sl_owner_rule){.line = 5,
                                 .rule = "a last one",
                                 .ratio = known(1),
                                 .floor = known(0)});
    read_for(f, f->vintage);
    r = f->tables.rules;
    assert_int_equal(f->tables.rule_count, 8);
    assert_string_equal(r[0].rule, "fixed head");
    assert_string_equal(r[1].rule, "ANSI/HI 9.6.1-1998");
    assert_int_equal(r[1].measure, SL_MEASURE_NONE);
    assert_int_equal(r[1].tier_count, 1);
    assert_true(isnan(r[1].lift_limit));
    check_close("ratio", r[1].tiers[0].ratio, 1.45, 0, 0);
    check_close("floor", r[1].tiers[0].floor, 0.915, 0, 0);
    assert_string_equal(r[1].edition, "the 1998 one");
    assert_string_equal(r[1].source, "the board");
    assert_int_equal(r[1].trust, 'O');
    assert_string_equal(r[6].rule, "zeal");
    assert_string_equal(r[6].source, "the owner's own");
    assert_string_equal(r[6].edition, "");
    assert_string_equal(r[7].rule, "a last one");
}

/* One more than results have room for; one in another's place is none more. */
static void more_rules_than_are_judged_are_refused(void **state)
{
    struct fixture *f = *state;
    char name[] = "ours a";
    struct sl_owner_rule rule = {
        .line = 2, .rule = name, .ratio = known(1.25), .floor = known(0.5)};

    read_for(f, 0);
    for (size_t i = f->tables.rule_count; i < SL_RULES_MOST; i++) {
        keep(f, SL_KIND_RULE, &rule);
        rule.line++;
        name[5]++;
    }
    rule.rule = "fixed head";
    keep(f, SL_KIND_RULE, &rule);
    read_for(f, f->vintage);
    assert_int_equal(f->tables.rule_count, SL_RULES_MOST);
    rule.rule = name;
    rule.line++;
    keep(f, SL_KIND_RULE, &rule);
    assert_int_equal(sl_store_read_tables(f->store, f->vintage, &f->arena,
                                          &f->tables, &f->error),
                     SL_REFUSED);
    assert_non_null(strstr(f->error.message, "there are 17 margin rules"));
    assert_int_equal(f->tables.rule_count, SL_RULES_MOST);
}

static void a_name_taken_is_told_with_its_line(void **state)
{
    struct fixture *f = *state;
    struct sl_owner_condition again = usual;
    struct sl_owner_rule rule = {
        .line = 7, .rule = "ours", .ratio = known(1.25), .floor = known(0.5)};
    struct sl_answer answer;

    keep(f, SL_KIND_CONDITION, &usual);
    again.line = 9;
    answer = add(f, SL_KIND_CONDITION, &again);
    assert_int_equal(answer.kind, SL_ANSWER_DUPLICATE);
    assert_string_equal(answer.field, "condition");
    assert_int_equal(answer.line, 2);
    keep(f, SL_KIND_RULE, &rule);
    rule.line = 8;
    answer = add(f, SL_KIND_RULE, &rule);
    assert_int_equal(answer.kind, SL_ANSWER_DUPLICATE);
    assert_string_equal(answer.field, "rule");
    assert_int_equal(answer.line, 7);
}

/* The summary tells the rule of its vintage, not one that has its name. */
static void the_summary_has_the_owners_rule(void **state)
{
    struct fixture *f = *state;
    struct sl_evaluation evaluation = {0, f->vintage, "0.1", "fixed head",
                                       2026};
    struct sl_owner_rule rule = {.line = 7,
                                 .rule = "fixed head",
                                 .ratio = known(1),
                                 .floor = known(2.135)};
    struct sl_summary summary = {.version = "0.1"};

    keep(f, SL_KIND_RULE, &rule);
    must(f, sl_store_add_evaluation(f->store, &evaluation, &f->error));
    must(f, sl_store_read_summary(f->store, evaluation.evaluation, &f->arena,
                                  &summary, &f->error));
    assert_string_equal(summary.rule.rule, "fixed head");
    check_close("floor", summary.rule.tiers[0].floor, 2.135, 0, 0);
    assert_int_equal(summary.rule.trust, 'O');
    evaluation.rule = "gone";
    must(f, sl_store_add_evaluation(f->store, &evaluation, &f->error));
    must(f, sl_store_read_summary(f->store, evaluation.evaluation, &f->arena,
                                  &summary, &f->error));
    assert_string_equal(summary.rule.rule, "gone");
    assert_int_equal(summary.rule.tier_count, 0);
}

#define IN_VINTAGE(test)                                                       \
    cmocka_unit_test_setup_teardown(test, fixture_vintage, fixture_end)

int main(void)
{
    const struct CMUnitTest tests[] = {
        IN_VINTAGE(own_conditions_stand_in_place_of_the_published),
        IN_VINTAGE(what_a_condition_leaves_out_is_adverse),
        IN_VINTAGE(another_vintage_has_the_published_ones),
        IN_VINTAGE(own_rules_come_behind_or_in_place_of_their_name),
        IN_VINTAGE(more_rules_than_are_judged_are_refused),
        IN_VINTAGE(a_name_taken_is_told_with_its_line),
        IN_VINTAGE(the_summary_has_the_owners_rule),
    };

    return cmocka_run_group_tests_name("store_owner", tests, NULL, NULL);
}
