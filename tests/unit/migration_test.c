/* A store of an older version, brought up to date: what was in it stays. */
#define _POSIX_C_SOURCE 200809L /* mkdtemp, unlink */
#include "store_fixture.h"

#include "store/catalogue.h"
#include "unit/check.h"

/* What a program of that version would have left. */
static void make_store_of(const struct fixture *f, int version)
{
    char marks[120] = "";

    for (size_t i = 0; i < sl_migrations_count; i++)
        if (sl_migrations[i].number <= version)
            file_does(f, sl_migrations[i].text);
    snprintf(marks, sizeof marks,
             "PRAGMA application_id = %d; PRAGMA user_version = %d;",
             0x736C7731, version);
    file_does(f, marks);
}

static const char evaluated[] =
    "INSERT INTO vintages (vintage, label, inventory_sha256, imported_at)"
    "VALUES (1, '2024', 'aa', '2024-07-03T10:00:00Z'),"
    "(2, '2025', 'bb', '2025-06-30T10:00:00Z');"
    "INSERT INTO stations (station, vintage, line, station_id)"
    "VALUES (1, 1, 2, 'S'), (2, 2, 2, 'S');"
    "INSERT INTO pumps (pump, vintage, line, station, pump_id, station_id,"
    "year_installed) VALUES (1, 1, 2, 1, 'P', 'S', 1987);"
    "INSERT INTO evaluations (evaluation, vintage, version, rule)"
    "VALUES (7, 1, '0.1.0', 'fixed head'), (8, 2, '0.1.0', 'fixed head');"
    "INSERT INTO station_results VALUES"
    "(7, 1, 'clear', NULL, NULL, 0, 0, 0, 0, 0, 0),"
    "(8, 2, 'thin', NULL, NULL, 0, 0, 0, 0, 0, 0);"
    "INSERT INTO default_uses VALUES (7, 'gas_allowance', '', 3);";

static void bring_up_to_date(struct fixture *f)
{
    must(f, sl_store_open(f->path, SL_STORE_WRITE, &f->store, &f->error));
    must(f,
         sl_store_read_tables(f->store, 1, &f->arena, &f->tables, &f->error));
    assert_int_equal(
        file_says(f, "SELECT count(*) FROM pragma_foreign_key_check"), 0);
}

static void evaluations_stay_and_get_the_year_of_their_import(void **state)
{
    struct fixture *f = *state;

    make_store_of(f, 3);
    file_does(f, evaluated);
    bring_up_to_date(f);
    assert_int_equal(file_says(f, "PRAGMA user_version"), 8);
    assert_int_equal(
        file_says(f, "SELECT year FROM evaluations WHERE evaluation = 7"),
        2024);
    assert_int_equal(
        file_says(f, "SELECT year FROM evaluations WHERE evaluation = 8"),
        2025);
    assert_int_equal(file_says(f, "SELECT count(*) FROM evaluations"), 2);
    assert_int_equal(file_says(f, "SELECT count(*) FROM station_results"), 2);
    assert_int_equal(file_says(f, "SELECT uses FROM default_uses"), 3);
    assert_int_equal(file_says(f, "SELECT year_installed FROM pumps"), 1987);
    assert_int_equal(file_says(f, "SELECT straight_run IS NULL FROM pumps"), 1);
}

static void results_still_need_their_evaluation(void **state)
{
    struct fixture *f = *state;
    sqlite3 *database = NULL;

    make_store_of(f, 3);
    file_does(f, evaluated);
    bring_up_to_date(f);
    assert_int_equal(sqlite3_open(f->path, &database), SQLITE_OK);
    assert_int_equal(
        sqlite3_exec(database, "PRAGMA foreign_keys = ON", NULL, NULL, NULL),
        SQLITE_OK);
    assert_int_equal(
        sqlite3_exec(database, "DELETE FROM evaluations WHERE evaluation = 7",
                     NULL, NULL, NULL),
        SQLITE_CONSTRAINT);
    sqlite3_close(database);
}

static void an_untouched_store_comes_to_what_a_new_one_has(void **state)
{
    struct fixture *f = *state;

    make_store_of(f, 3);
    bring_up_to_date(f);
    assert_int_equal(f->tables.condition_count, 2);
    assert_int_equal(f->tables.rule_count, 6);
    assert_string_equal(f->tables.conditions[0].condition, "normal");
    assert_string_equal(f->tables.conditions[1].condition, "summer low");
    assert_int_equal(f->tables.conditions[1].level, SL_LEVEL_LOW);
    assert_string_equal(f->tables.rules[0].rule, "fixed head");
    assert_true(f->tables.rules[0].tiers[0].floor == 1.5);
}

/* An owner may have written rows of their own. */
static void an_owners_rows_stay(void **state)
{
    struct fixture *f = *state;
    const struct sl_tables *t = &f->tables;

    make_store_of(f, 3);
    file_does(f, "INSERT INTO conditions VALUES"
                 "('drought', 3, 'low', 'normal', 'low', 1, 0);"
                 "UPDATE conditions SET level = 'low' WHERE place = 1;"
                 "UPDATE margin_rules SET floor = 2.135;"
                 "INSERT INTO margin_rules VALUES"
                 "('ours', 1.25, 0.75, 'B', 'the board', 'N'),"
                 "('ISO 5199 and ISO 9905', 1.15, 0.55, '', 'typed in', 'M');");
    bring_up_to_date(f);
    assert_int_equal(t->condition_count, 3);
    assert_int_equal(t->conditions[0].level, SL_LEVEL_LOW);
    assert_string_equal(t->conditions[2].condition, "drought");
    assert_int_equal(t->conditions[2].discharge, SL_LEVEL_NORMAL);
    assert_int_equal(t->conditions[2].discharge_friction, SL_FRICTION_NEW);
    assert_int_equal(t->rule_count, 7);
    check_close("fixed head", t->rules[0].tiers[0].floor, 2.135, 0, 0);
    assert_string_equal(t->rules[5].source, "typed in");
    assert_int_equal(t->rules[5].tier_count, 1);
    check_close("ISO", t->rules[5].tiers[0].ratio, 1.15, 0, 0);
    assert_string_equal(t->rules[6].rule, "ours");
    assert_string_equal(t->rules[6].edition, "B");
    check_close("ours", t->rules[6].tiers[0].ratio, 1.25, 0, 0);
    check_close("ours", t->rules[6].tiers[0].floor, 0.75, 0, 0);
}

/* Nothing is made up for what an older program did not keep. */
static void results_of_an_older_program_have_no_sets(void **state)
{
    struct fixture *f = *state;

    make_store_of(f, 7);
    file_does(f, "INSERT INTO vintages VALUES"
                 "(1, '2024', 'aa', '2024-07-03T10:00:00Z');"
                 "INSERT INTO stations (station, vintage, line, station_id)"
                 "VALUES (1, 1, 2, 'S');"
                 "INSERT INTO pumps (pump, vintage, line, station, pump_id,"
                 "station_id) VALUES (1, 1, 2, 1, 'P', 'S');"
                 "INSERT INTO evaluations VALUES"
                 "(7, 1, '0.1.0', 'fixed head', 2024);"
                 "INSERT INTO pump_results (evaluation, station, pump,"
                 "condition, state, likely, reason, flow_basis, source_basis,"
                 "off_curve, stands, recorded, derived, assumed, unknown)"
                 "VALUES (7, 1, 1, 'normal', 'thin', 'thin', 'why', 'solved',"
                 "'normal level', 0, 0, 1, 2, 3, 4);");
    bring_up_to_date(f);
    assert_int_equal(
        file_says(f, "SELECT count(*) FROM pump_results WHERE recorded = 1 "
                     "AND coalesce(npshr_basis, running_set, running, sets_tried, sets_all,"
                     "flags, rule_states, limit_level_end) IS NULL"),
        1);
    assert_int_equal(file_says(f, "SELECT count(*) FROM rule_verdicts"), 0);
    assert_int_equal(
        file_says(f, "SELECT lowest_level_end IS NULL FROM pump_limits"), 1);
}

#define IN_FOLDER(test)                                                        \
    cmocka_unit_test_setup_teardown(test, fixture_folder, fixture_end)

int main(void)
{
    const struct CMUnitTest tests[] = {
        IN_FOLDER(evaluations_stay_and_get_the_year_of_their_import),
        IN_FOLDER(results_still_need_their_evaluation),
        IN_FOLDER(an_untouched_store_comes_to_what_a_new_one_has),
        IN_FOLDER(an_owners_rows_stay),
        IN_FOLDER(results_of_an_older_program_have_no_sets),
    };

    return cmocka_run_group_tests_name("migration", tests, NULL, NULL);
}
