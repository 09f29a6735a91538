/* Reading an inventory: a folder of CSV files, one a kind of record.
 *
 * The importer reads, understands and checks; it keeps nothing itself.
 * Every record goes to a sink, which answers what became of it; every
 * finding goes there too.  Memory does not grow with the files.
 *
 * Two passes.  sl_inventory_read_headers() opens each file and reads its
 * header line: it refuses an inventory that is none (no stations.csv or no
 * pumps.csv, a required column missing, a dimensional column without a unit,
 * one column twice) before anything is written.  sl_inventory_read() then
 * reads the records in the order of enum sl_kind. */
#ifndef SL_IMPORTER_INVENTORY_H
#define SL_IMPORTER_INVENTORY_H

#include "base/status.h"
#include "model/fields.h"
#include "model/finding.h"
#include "model/records.h"
#include "model/vocabulary.h"

struct sl_sink {
    void *context;
    /* Keep one record of a kind, or answer why not.  Fallible: the store may
     * be full. */
    enum sl_status (*record)(void *context, enum sl_kind kind,
                             const void *record, struct sl_answer *answer,
                             struct sl_error *error);
    /* Note that a record is not kept, and why, with its text as read. */
    enum sl_status (*set_aside)(void *context, const struct sl_aside *aside,
                                struct sl_error *error);
    /* The next pipe to take back once all pipes are read; *found false when
     * there is none left.  The sink has already removed it. */
    enum sl_status (*recall)(void *context, struct sl_recall *recall,
                             bool *found, struct sl_error *error);
    enum sl_status (*finding)(void *context, const struct sl_finding *finding,
                              struct sl_error *error);
    enum sl_status (*column)(void *context, const struct sl_column_use *use,
                             struct sl_error *error);
    /* Called now and then, and before each recall, with bytes read of all
     * bytes; false: stop. */
    bool (*progress)(void *context, long long done, long long all);
};

struct sl_inventory;

/* Open a folder.  On any status but SL_OK *inventory is NULL. */
enum sl_status sl_inventory_open(const char *folder,
                                 struct sl_inventory **inventory,
                                 struct sl_error *error);
void sl_inventory_close(struct sl_inventory *inventory);

/* Hash and size of each file, headers understood; SL_REFUSED with the
 * reason when it is not an inventory. */
enum sl_status sl_inventory_read_headers(struct sl_inventory *inventory,
                                         struct sl_error *error);
/* All records, their words by these vocabularies; a year later than `year`,
 * that of the import, is a doubt.  Afterwards the sums are final. */
enum sl_status sl_inventory_read(struct sl_inventory *inventory,
                                 const struct sl_vocabularies *vocabularies,
                                 int year, const struct sl_sink *sink,
                                 struct sl_error *error);

const struct sl_file_sum *sl_inventory_sum(const struct sl_inventory *,
                                           enum sl_kind kind);
/* SHA-256 over the kinds' file hashes in order: the inventory's content. */
const char *sl_inventory_sha256(const struct sl_inventory *inventory);

#endif
