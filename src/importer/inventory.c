/* stat: POSIX. */
#define _POSIX_C_SOURCE 200809L

#include "importer/inventory.h"

#include <errno.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>

#include <sha2.h>

#include "base/memory.h"
#include "importer/broken.h"
#include "importer/file_pass.h"

struct sl_inventory {
    struct sl_text folder;
    struct sl_input_file files[SL_KIND_COUNT];
    struct sl_columns columns[SL_KIND_COUNT];
    struct sl_file_sum sums[SL_KIND_COUNT];
    char sha256[65];
};

static enum sl_status check_folder(const char *folder, struct sl_error *error)
{
    struct stat about;

    if (stat(folder, &about) != 0)
        return sl_error_set(error, SL_FILE,
                            "cannot open the inventory \"%s\": %s", folder,
                            strerror(errno));
    if (!S_ISDIR(about.st_mode))
        return sl_error_set(error, SL_FILE,
                            "the inventory \"%s\" is not a folder; name the "
                            "folder that holds stations.csv",
                            folder);
    return SL_OK;
}

enum sl_status sl_inventory_open(const char *folder,
                                 struct sl_inventory **inventory,
                                 struct sl_error *error)
{
    struct sl_inventory *opened;
    enum sl_status status = check_folder(folder, error);

    *inventory = NULL;
    if (status)
        return status;
    opened = sl_new(1, sizeof *opened);
    sl_text_add_string(&opened->folder, folder);
    for (int i = 0; i < SL_KIND_COUNT; i++) {
        opened->files[i].descriptor = -1;
        opened->sums[i].file = sl_record_kind((enum sl_kind)i)->file;
    }
    *inventory = opened;
    return SL_OK;
}

void sl_inventory_close(struct sl_inventory *inventory)
{
    if (!inventory)
        return;
    for (int i = 0; i < SL_KIND_COUNT; i++) {
        sl_input_file_close(&inventory->files[i]);
        sl_columns_release(&inventory->columns[i]);
    }
    sl_text_release(&inventory->folder);
    free(inventory);
}

/* What a reader's first record is, when it is no header. */
static void refuse_header(const struct sl_record_kind *kind,
                          const struct sl_csv_reader *reader,
                          enum sl_csv_outcome outcome,
                          struct sl_refusal *refusal)
{
    struct sl_problem problem = {0};

    if (outcome == SL_CSV_END) {
        sl_refusal_add(refusal,
                       "%s:1: the file is empty; its first line names the "
                       "columns",
                       kind->file);
    } else if (outcome == SL_CSV_RECORD) {
        sl_refusal_add(
            refusal, "%s:%ld: the header has %zu columns; %d are the most",
            kind->file, reader->line, reader->count, SL_COLUMNS_MOST);
    } else {
        sl_broken_problem(reader, outcome, &problem);
        sl_refusal_add(refusal, "%s:%ld: the header cannot be read: %s; %s",
                       kind->file, reader->line,
                       sl_text_string(&problem.reason),
                       sl_text_string(&problem.remedy));
    }
    sl_problem_release(&problem);
}

static enum sl_status read_header(struct sl_inventory *inventory, int i,
                                  struct sl_refusal *refusal,
                                  struct sl_error *error)
{
    const struct sl_record_kind *kind = sl_record_kind((enum sl_kind)i);
    struct sl_csv_reader reader;
    enum sl_csv_outcome outcome = SL_CSV_END;
    enum sl_status status =
        sl_csv_reader_init(&reader, &inventory->files[i], error);

    if (!status)
        status = sl_csv_reader_next(&reader, &outcome, error);
    if (!status && outcome == SL_CSV_RECORD && reader.count <= SL_COLUMNS_MOST)
        sl_columns_init(&inventory->columns[i], kind, &reader, refusal);
    else if (!status)
        refuse_header(kind, &reader, outcome, refusal);
    sl_csv_reader_release(&reader);
    return status;
}

static bool is_required(int kind)
{
    return kind == SL_KIND_STATION || kind == SL_KIND_PUMP;
}

static enum sl_status first_pass(struct sl_inventory *inventory, int i,
                                 struct sl_refusal *refusal,
                                 struct sl_error *error)
{
    struct sl_input_file *file = &inventory->files[i];
    struct sl_file_sum *sum = &inventory->sums[i];
    enum sl_status status = sl_input_file_open(
        file, sl_text_string(&inventory->folder), sum->file, error);

    if (status)
        return status;
    if (!sl_input_file_present(file)) {
        if (is_required(i))
            sl_refusal_add(refusal,
                           "\"%s\" holds no %s; an inventory has at least "
                           "stations.csv and pumps.csv",
                           sl_text_string(&inventory->folder), sum->file);
        return SL_OK;
    }
    status = sl_input_file_hash(file, error);
    if (status)
        return status;
    sum->present = true;
    sum->bytes = file->bytes;
    memcpy(sum->sha256, file->sha256, sizeof sum->sha256);
    return read_header(inventory, i, refusal, error);
}

/* Over what `sha256sum` prints for the files that are there, so that an
 * owner can check it. */
static void hash_all(struct sl_inventory *inventory)
{
    SHA2_CTX hash;
    struct sl_text lines = {0};

    for (int i = 0; i < SL_KIND_COUNT; i++)
        if (inventory->sums[i].present)
            sl_text_addf(&lines, "%s  %s\n", inventory->sums[i].sha256,
                         inventory->sums[i].file);
    SHA256Init(&hash);
    SHA256Update(&hash, (const uint8_t *)lines.bytes, lines.length);
    SHA256End(&hash, inventory->sha256);
    sl_text_release(&lines);
}

enum sl_status sl_inventory_read_headers(struct sl_inventory *inventory,
                                         struct sl_error *error)
{
    struct sl_refusal refusal = {0};
    enum sl_status status = SL_OK;

    for (int i = 0; i < SL_KIND_COUNT && !status; i++)
        status = first_pass(inventory, i, &refusal, error);
    if (!status && refusal.count > refusal.told)
        sl_text_addf(&refusal.problems, " (and %d more)",
                     refusal.count - refusal.told);
    if (!status && refusal.count > 0)
        status = sl_error_set(error, SL_REFUSED, "%s",
                              sl_text_string(&refusal.problems));
    if (!status)
        hash_all(inventory);
    sl_text_release(&refusal.problems);
    return status;
}

enum sl_status sl_inventory_read(struct sl_inventory *inventory,
                                 const struct sl_vocabularies *vocabularies,
                                 int year, const struct sl_sink *sink,
                                 struct sl_error *error)
{
    struct sl_file_pass pass = {
        .vocabularies = vocabularies, .year = year, .sink = sink};
    enum sl_status status = SL_OK;

    for (int i = 0; i < SL_KIND_COUNT; i++)
        pass.bytes_all += inventory->sums[i].bytes;
    for (int i = 0; i < SL_KIND_COUNT && !status; i++) {
        if (!inventory->sums[i].present)
            continue;
        pass.kind = (enum sl_kind)i;
        pass.columns = &inventory->columns[i];
        pass.file = &inventory->files[i];
        pass.sum = &inventory->sums[i];
        status = sl_file_pass_run(&pass, error);
        if (!status && i == SL_KIND_PIPE)
            status = sl_file_pass_recall(&pass, error);
        pass.bytes_before += pass.sum->bytes;
    }
    return status;
}

const struct sl_file_sum *sl_inventory_sum(const struct sl_inventory *inventory,
                                           enum sl_kind kind)
{
    return &inventory->sums[kind];
}

const char *sl_inventory_sha256(const struct sl_inventory *inventory)
{
    return inventory->sha256;
}
