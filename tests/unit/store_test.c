/* The store as a file: opening, versions, schema, transactions. */
#define _POSIX_C_SOURCE 200809L /* mkdtemp, unlink, fork */
#include "store_fixture.h"

#include <sys/wait.h>

#include "base/text.h"
#include "unit/check.h"

static void open_and_close(struct fixture *f, enum sl_store_mode mode)
{
    struct sl_store *store = NULL;

    must(f, sl_store_open(f->path, mode, &store, &f->error));
    sl_store_close(store);
}

/* The file's bytes, to tell that nothing touched it. */
static char *bytes_of(const char *path, size_t *length)
{
    FILE *stream = fopen(path, "rb");
    char *bytes = malloc(1 << 20);

    assert_non_null(stream);
    *length = fread(bytes, 1, 1 << 20, stream);
    fclose(stream);
    return bytes;
}

static void assert_refused_untouched(struct fixture *f, enum sl_store_mode mode,
                                     const char *message)
{
    size_t before_length = 0, after_length = 0;
    char *before = bytes_of(f->path, &before_length);
    struct sl_store *store = (struct sl_store *)f;
    char *after = NULL;

    assert_int_equal(sl_store_open(f->path, mode, &store, &f->error), SL_STORE);
    assert_null(store);
    if (!strstr(f->error.message, message))
        fail_msg("\"%s\" does not say \"%s\"", f->error.message, message);
    after = bytes_of(f->path, &after_length);
    assert_int_equal(before_length, after_length);
    assert_memory_equal(before, after, before_length);
    free(before);
    free(after);
}

static void fresh_store_is_marked_ours(void **state)
{
    struct fixture *f = *state;

    open_and_close(f, SL_STORE_CREATE);
    assert_int_equal(file_says(f, "PRAGMA application_id"), 0x736C7731);
    assert_int_equal(file_says(f, "PRAGMA user_version"), 8);
    assert_int_equal(file_says(f, "SELECT count(*) FROM fitting_k"), 26);
    assert_int_equal(file_says(f, "SELECT count(*) FROM roughness"), 17);
    assert_int_equal(file_says(f, "SELECT count(*) FROM sqlite_schema "
                                  "WHERE type = 'view'"),
                     7);
}

static void opening_again_changes_no_byte(void **state)
{
    struct fixture *f = *state;
    size_t before_length = 0, after_length = 0;
    char *before = NULL, *after = NULL;

    open_and_close(f, SL_STORE_CREATE);
    before = bytes_of(f->path, &before_length);
    open_and_close(f, SL_STORE_CREATE);
    open_and_close(f, SL_STORE_READ);
    after = bytes_of(f->path, &after_length);
    assert_int_equal(before_length, after_length);
    assert_memory_equal(before, after, before_length);
    free(before);
    free(after);
}

static void reading_makes_no_file(void **state)
{
    struct fixture *f = *state;
    struct sl_store *store = NULL;

    assert_int_equal(sl_store_open(f->path, SL_STORE_READ, &store, &f->error),
                     SL_STORE);
    assert_null(store);
    assert_int_equal(access(f->path, F_OK), -1);
    assert_non_null(strstr(f->error.message, f->path));
}

static void newer_store_is_refused(void **state)
{
    struct fixture *f = *state;

    open_and_close(f, SL_STORE_CREATE);
    file_does(f, "PRAGMA user_version = 9");
    assert_refused_untouched(f, SL_STORE_CREATE,
                             "is of version 9, this program knows 8; use the "
                             "newer program");
    assert_refused_untouched(f, SL_STORE_READ, "use the newer program");
}

static void a_version_none_has_is_refused(void **state)
{
    struct fixture *f = *state;

    open_and_close(f, SL_STORE_CREATE);
    file_does(f, "PRAGMA user_version = -5");
    assert_refused_untouched(f, SL_STORE_CREATE, "which none is");
    assert_refused_untouched(f, SL_STORE_READ, "which none is");
}

static void older_store_is_not_read(void **state)
{
    struct fixture *f = *state;

    open_and_close(f, SL_STORE_CREATE);
    file_does(f, "PRAGMA user_version = 7");
    assert_refused_untouched(f, SL_STORE_READ, "is of version 7");
}

static void other_database_is_refused(void **state)
{
    struct fixture *f = *state;

    file_does(f, "CREATE TABLE theirs (a); INSERT INTO theirs VALUES (7)");
    assert_refused_untouched(f, SL_STORE_CREATE, "is no store of this program");
    assert_refused_untouched(f, SL_STORE_READ, "is no store of this program");
}

static void no_database_is_refused(void **state)
{
    struct fixture *f = *state;
    FILE *stream = fopen(f->path, "wb");

    assert_non_null(stream);
    for (int i = 0; i < 200; i++)
        fputs("station_id,name\r\nS-17,\"Low ford\"\r\n", stream);
    fclose(stream);
    assert_refused_untouched(f, SL_STORE_CREATE, "is no store of this program");
    assert_refused_untouched(f, SL_STORE_READ, "is no store of this program");
}

static void changed_views_are_made_anew(void **state)
{
    struct fixture *f = *state;
    struct sl_store *store = NULL;

    open_and_close(f, SL_STORE_CREATE);
    file_does(f, "DROP VIEW station_order; DROP VIEW vintage_sums;"
                 "CREATE VIEW stale AS SELECT 1;"
                 "CREATE VIEW station_order AS SELECT 7 AS seven");
    /* Reading leaves the file alone, and yet its statements work. */
    must(f, sl_store_open(f->path, SL_STORE_READ, &store, &f->error));
    must(f, sl_store_prepare_all(store, &f->error));
    sl_store_close(store);
    assert_int_equal(file_says(f, "SELECT seven FROM station_order"), 7);
    open_and_close(f, SL_STORE_CREATE);
    assert_int_equal(file_says(f, "SELECT count(*) FROM sqlite_schema WHERE "
                                  "type = 'view'"),
                     7);
    assert_int_equal(file_says(f, "SELECT count(*) FROM station_order"), 0);
}

/* Undoing the quoting of its name, a view could run what it likes. */
static void a_view_named_to_break_out_is_only_dropped(void **state)
{
    struct fixture *f = *state;

    open_and_close(f, SL_STORE_CREATE);
    file_does(f, "CREATE VIEW \"a\"\"; DELETE FROM conditions; --\" AS "
                 "SELECT 1");
    open_and_close(f, SL_STORE_CREATE);
    assert_int_equal(file_says(f, "SELECT count(*) FROM conditions"), 2);
    assert_int_equal(file_says(f, "SELECT count(*) FROM sqlite_schema WHERE "
                                  "type = 'view'"),
                     7);
}

static void a_store_without_a_name_is_refused(void **state)
{
    struct fixture *f = *state;
    struct sl_store *store = NULL;

    assert_int_equal(sl_store_open("", SL_STORE_CREATE, &store, &f->error),
                     SL_STORE);
    assert_null(store);
    assert_non_null(strstr(f->error.message, "empty"));
}

static void every_statement_prepares(void **state)
{
    struct fixture *f = *state;

    must(f, sl_store_prepare_all(f->store, &f->error));
}

static void every_view_can_be_read(void **state)
{
    struct fixture *f = *state;
    static const char *const views[] = {"station_order", "ranked_stations",
                                        "pump_terms", "vintage_sums",
                                        "findings_by_code"};

    must(f, sl_store_commit(f->store, &f->error));
    for (size_t i = 0; i < sizeof views / sizeof views[0]; i++) {
        char sql[80] = "";

        snprintf(sql, sizeof sql, "SELECT count(*) FROM %s", views[i]);
        assert_int_equal(file_says(f, sql),
                         strcmp(views[i], "vintage_sums") == 0 ? 1 : 0);
    }
}

/* The columns of a table that are not the store's own keys, in order. */
static void assert_columns(sqlite3 *database, const struct sl_record_kind *kind)
{
    static const char types[][8] = {"TEXT", "REAL", "INTEGER", "TEXT"};
    char sql[200] = "";
    sqlite3_stmt *asked = NULL;
    size_t i = 0;

    snprintf(sql, sizeof sql,
             "SELECT name, type, \"notnull\" FROM pragma_table_info('%s') "
             "WHERE pk = 0 AND name NOT IN ('vintage', 'line', 'station', "
             "'pipe', 'suction_pipe') ORDER BY cid",
             kind->table);
    assert_int_equal(sqlite3_prepare_v2(database, sql, -1, &asked, NULL),
                     SQLITE_OK);
    while (sqlite3_step(asked) == SQLITE_ROW) {
        assert_true(i < kind->field_count);
        assert_string_equal(sqlite3_column_text(asked, 0),
                            kind->fields[i].name);
        assert_string_equal(sqlite3_column_text(asked, 1),
                            types[kind->fields[i].type]);
        assert_int_equal(sqlite3_column_int(asked, 2),
                         kind->fields[i].required);
        i++;
    }
    assert_int_equal(i, kind->field_count);
    sqlite3_finalize(asked);
}

static void columns_are_the_list_of_fields(void **state)
{
    struct fixture *f = *state;
    sqlite3 *database = NULL;

    open_and_close(f, SL_STORE_CREATE);
    assert_int_equal(sqlite3_open(f->path, &database), SQLITE_OK);
    for (int kind = 0; kind < SL_KIND_COUNT; kind++)
        assert_columns(database, sl_record_kind((enum sl_kind)kind));
    sqlite3_close(database);
}

static void every_table_is_strict(void **state)
{
    struct fixture *f = *state;

    open_and_close(f, SL_STORE_CREATE);
    assert_int_equal(file_says(f, "SELECT count(*) FROM pragma_table_list "
                                  "WHERE schema = 'main' AND type = 'table' "
                                  "AND name NOT LIKE 'sqlite_%'"),
                     27);
    assert_int_equal(file_says(f, "SELECT count(*) FROM pragma_table_list "
                                  "WHERE schema = 'main' AND type = 'table' "
                                  "AND name NOT LIKE 'sqlite_%' "
                                  "AND NOT strict"),
                     0);
}

/* The rest of the schema text after the definition of a column begins; one
 * that was added to its table later stands behind a comma. */
static const char *definition_of(const char *sql, const char *column)
{
    char start[80] = "";
    const char *at = NULL;

    snprintf(start, sizeof start, "\n    %s ", column);
    at = strstr(sql, start);
    if (!at) {
        snprintf(start, sizeof start, ", %s ", column);
        at = strstr(sql, start);
    }
    return at ? at + 1 : NULL;
}

/* A "--" before the next line that defines something else; the one on the
 * line of a column added later belongs to the column before, its own stands
 * between it and the next comma. */
static bool is_commented(const char *definition)
{
    const char *end = definition;

    if (definition[1] != ' ') {
        const char *inner = strstr(definition, "/*");

        return inner && inner < strchr(definition, ',');
    }
    do {
        end = strchr(end, '\n');
        if (!end)
            return strstr(definition, "--") != NULL;
        end++;
    } while (strncmp(end, "        ", 8) == 0);
    const char *comment = strstr(definition, "--");

    return comment && comment < end;
}

static void assert_commented(sqlite3 *database, const char *table,
                             const char *sql)
{
    char columns[120] = "";
    sqlite3_stmt *asked = NULL;

    if (!strstr(sql, "(\n    -- "))
        fail_msg("the table %s has no comment", table);
    snprintf(columns, sizeof columns,
             "SELECT name FROM pragma_table_info('%s')", table);
    assert_int_equal(sqlite3_prepare_v2(database, columns, -1, &asked, NULL),
                     SQLITE_OK);
    while (sqlite3_step(asked) == SQLITE_ROW) {
        const char *column = (const char *)sqlite3_column_text(asked, 0);
        const char *definition = definition_of(sql, column);

        if (!definition || !is_commented(definition))
            fail_msg("the column %s.%s has no comment", table, column);
    }
    sqlite3_finalize(asked);
}

static void every_table_and_column_has_a_comment(void **state)
{
    struct fixture *f = *state;
    sqlite3 *database = NULL;
    sqlite3_stmt *asked = NULL;
    int tables = 0;

    open_and_close(f, SL_STORE_CREATE);
    assert_int_equal(sqlite3_open(f->path, &database), SQLITE_OK);
    assert_int_equal(
        sqlite3_prepare_v2(database,
                           "SELECT name, sql FROM sqlite_schema WHERE type = "
                           "'table' AND name NOT LIKE 'sqlite_%'",
                           -1, &asked, NULL),
        SQLITE_OK);
    for (; sqlite3_step(asked) == SQLITE_ROW; tables++)
        assert_commented(database, (const char *)sqlite3_column_text(asked, 0),
                         (const char *)sqlite3_column_text(asked, 1));
    assert_int_equal(tables, 27);
    sqlite3_finalize(asked);
    sqlite3_close(database);
}

static void rollback_leaves_nothing(void **state)
{
    struct fixture *f = *state;

    keep_station(f, 2, "S-17");
    sl_store_rollback(f->store);
    assert_int_equal(sl_store_count_stations(f->store, f->vintage), 0);
    assert_int_equal(file_says(f, "SELECT count(*) FROM vintages"), 0);
}

static void closing_rolls_back(void **state)
{
    struct fixture *f = *state;

    keep_station(f, 2, "S-17");
    sl_store_close(f->store);
    f->store = NULL;
    assert_int_equal(file_says(f, "SELECT count(*) FROM stations"), 0);
    assert_int_equal(file_says(f, "SELECT count(*) FROM vintages"), 0);
}

/* A writer that dies in the middle, with part of its work in the file. */
static void die_writing(struct fixture *f)
{
    struct sl_vintage next = {0, "2027", "decaf", "2027-07-01T12:00:00Z"};
    const size_t length = 1 << 20;
    char *raw = malloc(length);

    memset(raw, 'x', length);
    if (sl_store_open(f->path, SL_STORE_CREATE, &f->store, &f->error) ||
        sl_store_begin(f->store, &f->error) ||
        sl_store_add_vintage(f->store, &next, &f->error))
        _exit(1);
    /* More than the cache holds, so that pages reach the file. */
    for (long line = 1; line <= 48; line++) {
        struct sl_aside aside = {SL_KIND_PUMP, SL_REJECTED, line, "P",
                                 "S",          "why",       raw,  length};

        if (sl_store_add_set_aside(f->store, next.vintage, &aside, &f->error))
            _exit(1);
    }
    _exit(0);
}

static void a_killed_writer_leaves_the_old_state(void **state)
{
    struct fixture *f = *state;
    char journal[120] = "";
    struct sl_store *store = NULL;
    int ended = -1;
    pid_t child = 0;

    keep_station(f, 2, "S-17");
    must(f, sl_store_commit(f->store, &f->error));
    sl_store_close(f->store);
    f->store = NULL;
    child = fork();
    if (child == 0)
        die_writing(f);
    assert_int_equal(waitpid(child, &ended, 0), child);
    assert_int_equal(ended, 0);
    snprintf(journal, sizeof journal, "%s-journal", f->path);
    assert_int_equal(access(journal, F_OK), 0);
    /* A reader may not put it back, and says who can. */
    assert_int_equal(sl_store_open(f->path, SL_STORE_READ, &store, &f->error),
                     SL_STORE);
    assert_non_null(strstr(f->error.message, "import or evaluate once"));
    must(f, sl_store_open(f->path, SL_STORE_CREATE, &store, &f->error));
    assert_int_equal(sl_store_count_stations(store, f->vintage), 1);
    assert_int_equal(sl_store_count_stations(store, f->vintage + 1), 0);
    sl_store_close(store);
    assert_int_equal(access(journal, F_OK), -1);
    assert_int_equal(file_says(f, "SELECT count(*) FROM set_aside"), 0);
    assert_int_equal(file_says(f, "SELECT count(*) FROM vintages"), 1);
}

static void a_second_writer_is_told_to_wait(void **state)
{
    struct fixture *f = *state;
    struct sl_store *second = NULL;

    must(f, sl_store_open(f->path, SL_STORE_CREATE, &second, &f->error));
    assert_int_equal(sl_store_begin(second, &f->error), SL_STORE);
    assert_non_null(strstr(f->error.message, "in use by another program"));
    sl_store_close(second);
}

static void a_reading_store_cannot_be_written(void **state)
{
    struct fixture *f = *state;
    struct sl_vintage vintage = {0, "2027", "decaf", "2027-07-01T12:00:00Z"};
    struct sl_store *store = NULL;

    open_and_close(f, SL_STORE_CREATE);
    must(f, sl_store_open(f->path, SL_STORE_READ, &store, &f->error));
    assert_int_equal(sl_store_add_vintage(store, &vintage, &f->error),
                     SL_STORE);
    sl_store_close(store);
}

static void the_same_content_twice_is_our_bug(void **state)
{
    struct fixture *f = *state;
    struct sl_vintage again = {0, "2027", "c0ffee", "2027-07-01T12:00:00Z"};

    assert_int_equal(sl_store_add_vintage(f->store, &again, &f->error), SL_BUG);
    assert_non_null(strstr(f->error.message, "INSERT INTO vintages"));
}

static void published_tables_are_read(void **state)
{
    struct fixture *f = *state;
    const struct sl_tables *t = &f->tables;
    const struct sl_words *fittings = &t->vocabularies.of[SL_WORDS_FITTING];
    const struct sl_words *materials = &t->vocabularies.of[SL_WORDS_MATERIAL];
    int elbow = sl_word_find(fittings, "90-elbow,_long radius", 21);

    assert_int_equal(t->fitting_count, 26);
    assert_int_equal(t->roughness_count, 17);
    assert_int_equal(t->condition_count, 2);
    assert_int_equal(elbow, 6);
    assert_true(t->fittings[elbow - 1].k.typical == 0.18);
    assert_true(t->fittings[elbow - 1].k.adverse == 0.33);
    assert_true(t->fittings[elbow - 1].k.favourable == 0.07);
    assert_int_equal(t->fittings[elbow - 1].trust, 'S');
    assert_int_equal(sl_word_find(materials, "galvanised iron", 15), 6);
    assert_true(t->roughness[5].poor == 0.0003);
    assert_string_equal(t->conditions[1].condition, "summer low");
    assert_int_equal(t->conditions[1].level, SL_LEVEL_LOW);
    assert_int_equal(t->conditions[0].pressure, SL_LEVEL_NORMAL);
    assert_true(t->conditions[1].storm_barometer);
    assert_false(t->conditions[0].summer_temperature);
    assert_int_equal(t->conditions[0].suction_friction, SL_FRICTION_AGED);
    assert_int_equal(t->conditions[0].discharge_friction, SL_FRICTION_AGED);
    assert_int_equal(t->conditions[1].suction_friction, SL_FRICTION_AGED);
    assert_int_equal(t->conditions[1].discharge_friction, SL_FRICTION_NEW);
    assert_true(t->conditions[1].level_addition == 0);
    assert_true(t->conditions[1].temperature_addition == 0);
}

static void assert_tier(const struct sl_margin_rule *rule, size_t tier,
                        double over, double ratio, double floor)
{
    assert_true(tier < rule->tier_count);
    check_close(rule->rule, rule->tiers[tier].over, over, 0, 0);
    check_close(rule->rule, rule->tiers[tier].ratio, ratio, 0, 0);
    check_close(rule->rule, rule->tiers[tier].floor, floor, 0, 0);
}

/* In the order shown: the first is ranked on. */
static void published_rules_are_read_by_tier(void **state)
{
    struct fixture *f = *state;
    const struct sl_margin_rule *r = f->tables.rules;

    assert_int_equal(f->tables.rule_count, 6);
    assert_string_equal(r[0].rule, "fixed head");
    assert_int_equal(r[0].tier_count, 1);
    assert_true(isnan(r[0].tiers[0].over));
    assert_true(r[0].tiers[0].ratio == 1 && r[0].tiers[0].floor == 1.5);
    assert_int_equal(r[0].trust, 'N');
    assert_int_equal(r[0].measure, SL_MEASURE_NONE);
    assert_true(isnan(r[0].lift_limit));
    assert_string_equal(r[1].rule, "ANSI/HI 9.6.1-1998");
    assert_int_equal(r[1].measure, SL_MEASURE_SUCTION_ENERGY);
    assert_int_equal(r[1].tier_count, 3);
    assert_true(isnan(r[1].tiers[0].over));
    assert_true(r[1].tiers[0].ratio == 1.1 && r[1].tiers[0].floor == 0.6);
    assert_tier(&r[1], 1, 1, 1.3, 1.5);
    assert_tier(&r[1], 2, 1.5, 2, 1.5);
    assert_int_equal(r[2].measure, SL_MEASURE_SUCTION_SPECIFIC_SPEED);
    assert_tier(&r[2], 1, 7500, 1.2, 1);
    assert_int_equal(r[3].measure, SL_MEASURE_SUCTION_LIFT);
    assert_true(r[3].tiers[0].floor == 0);
    assert_tier(&r[3], 1, 0, 1, 1.83);
    assert_int_equal(r[3].make_up, 0);
    assert_int_equal(r[4].make_up, SL_SELF_PRIMING);
    assert_true(r[4].lift_limit == 6.7);
    assert_int_equal(r[5].tier_count, 1);
    assert_true(r[5].tiers[0].ratio == 1.1 && r[5].tiers[0].floor == 0.5);
}

static const struct sl_ageing *rate_of(const struct sl_tables *t,
                                       const char *material, int condition)
{
    for (size_t i = 0; i < t->ageing_count; i++)
        if (strcmp(t->ageing[i].material, material) == 0 &&
            t->ageing[i].condition == condition)
            return &t->ageing[i];
    return NULL;
}

/* Every material has a rate where its condition is not recorded, and the
 * fastest end is no slower than the slowest. */
static void every_material_has_a_rate_of_ageing(void **state)
{
    struct fixture *f = *state;
    const struct sl_tables *t = &f->tables;
    const struct sl_ageing *poor = rate_of(t, "uncoated cast iron", SL_POOR);

    for (size_t i = 0; i < t->roughness_count; i++)
        if (!rate_of(t, t->roughness[i].material, 0))
            fail_msg("%s has no rate", t->roughness[i].material);
    for (size_t i = 0; i < t->ageing_count; i++) {
        assert_true(t->ageing[i].rate.favourable <= t->ageing[i].rate.typical);
        assert_true(t->ageing[i].rate.typical <= t->ageing[i].rate.adverse);
        assert_true(strchr("MP", t->ageing[i].trust) != NULL);
    }
    assert_int_equal(t->ageing_count, 26);
    assert_non_null(poor);
    check_close("poor cast iron", poor->rate.typical, 0.25e-3, 0, 0);
    check_close("poor cast iron at worst", poor->rate.adverse, 0.76e-3, 0, 0);
    assert_int_equal(poor->trust, 'M');
    assert_true(rate_of(t, "GRP", 0)->rate.adverse == 0);
    assert_true(rate_of(t, "galvanised iron", 0)->rate.adverse == 0.025e-3);
}

static const struct sl_check_limit *
limit_of(const struct sl_tables *t, const char *check, const char *circumstance)
{
    for (size_t i = 0; i < t->limit_count; i++)
        if (strcmp(t->limits[i].check, check) == 0 &&
            strcmp(t->limits[i].circumstance, circumstance) == 0)
            return &t->limits[i];
    fail_msg("no limit of %s, \"%s\"", check, circumstance);
    return NULL;
}

static void limits_of_the_checks_are_read(void **state)
{
    struct fixture *f = *state;
    const struct sl_tables *t = &f->tables;
    const struct sl_check_limit *sewage =
        limit_of(t, "suction velocity", "wastewater");
    const struct sl_check_limit *any = limit_of(t, "suction velocity", "");

    assert_int_equal(t->limit_count, 14);
    assert_true(sewage->lowest == 0.9 && sewage->highest == 2.1);
    assert_int_equal(sewage->quantity, SL_VELOCITY);
    assert_int_equal(sewage->trust, 'S');
    assert_true(isnan(any->lowest) && any->highest == 2.4);
    assert_int_equal(any->trust, 'M');
    check_close("booster",
                limit_of(t, "suction pressure of a booster", "")->lowest,
                35 * 6894.757293168362, 1e-5, 0);
    assert_true(limit_of(t, "suction energy", "submersible")->highest == 100e6);
    for (size_t i = 0; i < t->limit_count; i++) {
        assert_false(isnan(t->limits[i].lowest) && isnan(t->limits[i].highest));
        assert_false(t->limits[i].lowest > t->limits[i].highest);
        assert_true(strlen(t->limits[i].source) > 10);
    }
}

/* Common practice, no source: a rounded entrance has K 0.25. */
static void a_rounded_entrance_has_a_k_of_a_quarter(void **state)
{
    struct fixture *f = *state;
    const struct sl_words *fittings =
        &f->tables.vocabularies.of[SL_WORDS_FITTING];
    int rounded = sl_word_find(fittings, "rounded entrance", 16);

    assert_int_not_equal(rounded, 0);
    check_close("K of a rounded entrance",
                f->tables.fittings[rounded - 1].k.typical, 0.25, 0, 0);
}

/* Ends of an interval lie about the typical value, and each row has its
 * source: what a slip of the pen in the data would break. */
static void published_intervals_hold_together(void **state)
{
    struct fixture *f = *state;
    const struct sl_tables *t = &f->tables;

    for (size_t i = 0; i < t->fitting_count; i++) {
        assert_true(t->fittings[i].k.favourable <= t->fittings[i].k.typical);
        assert_true(t->fittings[i].k.typical <= t->fittings[i].k.adverse);
        assert_true(strlen(t->fittings[i].source) > 10);
    }
    for (size_t i = 0; i < t->roughness_count; i++) {
        assert_true(t->roughness[i].good <= t->roughness[i].fair);
        assert_true(t->roughness[i].fair <= t->roughness[i].poor);
        assert_true(t->roughness[i].poor <= 0.06);
    }
    for (size_t i = 0; i < t->default_count; i++) {
        const struct sl_interval *value = &t->defaults[i].value;

        assert_false((value->typical < value->adverse &&
                      value->typical < value->favourable) ||
                     (value->typical > value->adverse &&
                      value->typical > value->favourable));
        assert_true(strchr("SCMP", t->defaults[i].trust) != NULL);
    }
}

/* docs/schema.md tells of every table and view, in a row of its own. */
static void the_schema_is_documented(void **state)
{
    struct fixture *f = *state;
    size_t length = 0;
    char *text = bytes_of("docs/schema.md", &length);
    sqlite3 *database = NULL;
    sqlite3_stmt *asked = NULL;
    int things = 0;

    text[length] = '\0';
    open_and_close(f, SL_STORE_CREATE);
    assert_int_equal(sqlite3_open(f->path, &database), SQLITE_OK);
    assert_int_equal(
        sqlite3_prepare_v2(database,
                           "SELECT name FROM sqlite_schema WHERE type IN "
                           "('table', 'view') AND name NOT LIKE 'sqlite_%'",
                           -1, &asked, NULL),
        SQLITE_OK);
    for (; sqlite3_step(asked) == SQLITE_ROW; things++) {
        char row[80] = "";

        snprintf(row, sizeof row, "\n| `%s` | ",
                 (const char *)sqlite3_column_text(asked, 0));
        if (!strstr(text, row))
            fail_msg("docs/schema.md has no row:%s", row + 1);
    }
    for (const char *at = text; (at = strstr(at, "\n| `")); at++)
        things--;
    assert_int_equal(things, 0);
    sqlite3_finalize(asked);
    sqlite3_close(database);
    free(text);
}

/* The store finds an input by its column. */
static void input_columns_are_told_apart(void **state)
{
    (void)state;
    for (int i = 0; i < SL_INPUT_COUNT; i++)
        for (int j = 0; j < i; j++)
            assert_string_not_equal(sl_input_column((enum sl_input_id)i),
                                    sl_input_column((enum sl_input_id)j));
}

#define IN_FOLDER(test)                                                        \
    cmocka_unit_test_setup_teardown(test, fixture_folder, fixture_end)
#define IN_VINTAGE(test)                                                       \
    cmocka_unit_test_setup_teardown(test, fixture_vintage, fixture_end)

int main(void)
{
    const struct CMUnitTest tests[] = {
        IN_FOLDER(fresh_store_is_marked_ours),
        IN_FOLDER(opening_again_changes_no_byte),
        IN_FOLDER(reading_makes_no_file),
        IN_FOLDER(newer_store_is_refused),
        IN_FOLDER(a_version_none_has_is_refused),
        IN_FOLDER(older_store_is_not_read),
        IN_FOLDER(other_database_is_refused),
        IN_FOLDER(no_database_is_refused),
        IN_FOLDER(changed_views_are_made_anew),
        IN_FOLDER(a_view_named_to_break_out_is_only_dropped),
        IN_FOLDER(a_store_without_a_name_is_refused),
        IN_VINTAGE(every_statement_prepares),
        IN_VINTAGE(every_view_can_be_read),
        IN_FOLDER(columns_are_the_list_of_fields),
        IN_FOLDER(every_table_is_strict),
        IN_FOLDER(every_table_and_column_has_a_comment),
        IN_VINTAGE(rollback_leaves_nothing),
        IN_VINTAGE(closing_rolls_back),
        IN_VINTAGE(a_killed_writer_leaves_the_old_state),
        IN_VINTAGE(a_second_writer_is_told_to_wait),
        IN_FOLDER(a_reading_store_cannot_be_written),
        IN_VINTAGE(the_same_content_twice_is_our_bug),
        IN_VINTAGE(published_tables_are_read),
        IN_VINTAGE(published_rules_are_read_by_tier),
        IN_VINTAGE(every_material_has_a_rate_of_ageing),
        IN_VINTAGE(limits_of_the_checks_are_read),
        IN_VINTAGE(a_rounded_entrance_has_a_k_of_a_quarter),
        IN_VINTAGE(published_intervals_hold_together),
        IN_FOLDER(the_schema_is_documented),
        cmocka_unit_test(input_columns_are_told_apart),
    };

    return cmocka_run_group_tests_name("store", tests, NULL, NULL);
}
