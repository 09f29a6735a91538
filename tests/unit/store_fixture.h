/* A store in a folder of its own, for the tests of the store's room. */
#ifndef SL_TEST_STORE_FIXTURE_H
#define SL_TEST_STORE_FIXTURE_H

#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>
/* cmocka.h needs the four above it. */
#include <cmocka.h>
#include <math.h>
#include <sqlite3.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "model/fields.h"
#include "store/evaluation.h"
#include "store/store.h"
#include "store/vintage.h"

struct fixture {
    char folder[64];
    char path[96];
    struct sl_store *store;
    struct sl_arena arena;
    struct sl_tables tables;
    struct sl_error error;
    long long vintage;
};

/* Fails with the message when a call did not end well. */
#define must(fixture, call)                                                    \
    do {                                                                       \
        if ((call) != SL_OK)                                                   \
            fail_msg("%s: %s", #call, (fixture)->error.message);               \
    } while (0)

static inline int fixture_folder(void **state)
{
    struct fixture *f = calloc(1, sizeof *f);

    snprintf(f->folder, sizeof f->folder, "/tmp/store-test-XXXXXX");
    if (!mkdtemp(f->folder))
        return -1;
    snprintf(f->path, sizeof f->path, "%s/a.store", f->folder);
    *state = f;
    return 0;
}

/* Opened for writing, the tables read, in a transaction with a vintage. */
static inline int fixture_vintage(void **state)
{
    struct sl_vintage vintage = {0, "2026", "c0ffee", "2026-07-01T12:00:00Z"};
    struct fixture *f = NULL;

    if (fixture_folder(state))
        return -1;
    f = *state;
    must(f, sl_store_open(f->path, SL_STORE_CREATE, &f->store, &f->error));
    must(f,
         sl_store_read_tables(f->store, 0, &f->arena, &f->tables, &f->error));
    must(f, sl_store_begin(f->store, &f->error));
    must(f, sl_store_add_vintage(f->store, &vintage, &f->error));
    f->vintage = vintage.vintage;
    return 0;
}

static inline int fixture_end(void **state)
{
    struct fixture *f = *state;

    sl_store_close(f->store);
    sl_arena_release(&f->arena);
    unlink(f->path);
    rmdir(f->folder);
    free(f);
    return 0;
}

/* One number from the file, by a connection of the test's own. */
static inline long long file_says(const struct fixture *f, const char *sql)
{
    sqlite3 *database = NULL;
    sqlite3_stmt *asked = NULL;
    long long answer = 0;

    assert_int_equal(sqlite3_open(f->path, &database), SQLITE_OK);
    if (sqlite3_prepare_v2(database, sql, -1, &asked, NULL) != SQLITE_OK)
        fail_msg("%s: %s", sql, sqlite3_errmsg(database));
    if (sqlite3_step(asked) == SQLITE_ROW)
        answer = sqlite3_column_int64(asked, 0);
    sqlite3_finalize(asked);
    sqlite3_close(database);
    return answer;
}

static inline void file_does(const struct fixture *f, const char *sql)
{
    sqlite3 *database = NULL;

    assert_int_equal(sqlite3_open(f->path, &database), SQLITE_OK);
    if (sqlite3_exec(database, sql, NULL, NULL, NULL) != SQLITE_OK)
        fail_msg("%s: %s", sql, sqlite3_errmsg(database));
    sqlite3_close(database);
}

static inline struct sl_number known(double value)
{
    return (struct sl_number){value, true, 0};
}

static inline struct sl_answer add(struct fixture *f, enum sl_kind kind,
                                   const void *record)
{
    struct sl_answer answer = {SL_ANSWER_NO_SUCH, "", "", -1};

    must(f, sl_store_add_record(f->store, f->vintage, kind, record, &answer,
                                &f->error));
    return answer;
}

static inline void keep(struct fixture *f, enum sl_kind kind,
                        const void *record)
{
    assert_int_equal(add(f, kind, record).kind, SL_ANSWER_KEPT);
}

static inline void keep_station(struct fixture *f, long line, const char *id)
{
    keep(f, SL_KIND_STATION,
         &(struct sl_station){.line = line, .station_id = id});
}

static inline void keep_pipe(struct fixture *f, long line, const char *id,
                             const char *station, const char *draws_from)
{
    keep(f, SL_KIND_PIPE,
         &(struct sl_pipe){.line = line,
                           .pipe_id = id,
                           .station_id = station,
                           .draws_from = draws_from});
}

static inline void keep_pump(struct fixture *f, long line, const char *id,
                             const char *station)
{
    keep(f, SL_KIND_PUMP,
         &(struct sl_pump){.line = line, .pump_id = id, .station_id = station});
}

#endif
