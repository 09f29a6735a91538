/* Any bytes as an inventory file: nothing may break, the sums must add up,
 * and all that is told must be text.
 *
 * Built with clang -fsanitize=fuzzer -DSL_LIBFUZZER it is a fuzzer; without
 * that macro it runs the files named on its command line, so that every
 * corpus is a regression test. */
#define _POSIX_C_SOURCE 200809L /* mkdtemp */

#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

#include "base/text.h"
#include "importer/inventory.h"

int LLVMFuzzerTestOneInput(const uint8_t *bytes, size_t length);

struct counts {
    long long handed; /* records to the sink */
    long long aside[3];
    long errors;
    int calls; /* for answers that differ */
};

static void must(bool kept, const char *promise)
{
    if (kept)
        return;
    fprintf(stderr, "broken promise: %s\n", promise);
    abort();
}

static void must_be_text(const char *text)
{
    size_t length = strlen(text);

    must(sl_utf8_valid_length(text, length) == length, "told in UTF-8");
}

static enum sl_status hear_record(void *context, enum sl_kind kind,
                                  const void *record, struct sl_answer *answer,
                                  struct sl_error *error)
{
    struct counts *counts = context;
    union sl_record copy = {0};
    const struct sl_record_kind *about = sl_record_kind(kind);

    (void)error;
    memcpy(&copy, record, about->size);
    for (size_t i = 0; i < about->field_count; i++)
        if (about->fields[i].type == SL_FIELD_TEXT &&
            *sl_field_text(&about->fields[i], &copy))
            must_be_text(*sl_field_text(&about->fields[i], &copy));
    counts->handed++;
    answer->line = 2;
    answer->file = about->file;
    if (counts->calls++ % 3 == 2)
        answer->kind = SL_ANSWER_DUPLICATE;
    return SL_OK;
}

static enum sl_status hear_aside(void *context, const struct sl_aside *aside,
                                 struct sl_error *error)
{
    struct counts *counts = context;
    unsigned touched = 0;

    (void)error;
    must(aside->line >= 2, "a record begins behind the header");
    must_be_text(aside->record_id);
    must_be_text(aside->station_id);
    must_be_text(aside->reason);
    must(aside->raw_length > 0, "a record has a text");
    for (size_t i = 0; i < aside->raw_length; i++)
        touched += (unsigned char)aside->raw[i];
    must(touched > 0 || aside->raw[0] == '\0', "the text can be read");
    counts->aside[aside->fate]++;
    return SL_OK;
}

static enum sl_status hear_recall(void *context, struct sl_recall *recall,
                                  bool *found, struct sl_error *error)
{
    (void)context;
    (void)recall;
    (void)error;
    *found = false;
    return SL_OK;
}

static enum sl_status hear_finding(void *context,
                                   const struct sl_finding *finding,
                                   struct sl_error *error)
{
    struct counts *counts = context;

    (void)error;
    must_be_text(finding->column);
    must_be_text(finding->record_id);
    must_be_text(finding->value);
    must_be_text(finding->reason);
    must_be_text(finding->remedy);
    must(*finding->reason && *finding->remedy, "a finding says why and what");
    counts->errors += finding->severity == SL_ERROR;
    return SL_OK;
}

static enum sl_status hear_column(void *context,
                                  const struct sl_column_use *use,
                                  struct sl_error *error)
{
    (void)context;
    (void)error;
    must_be_text(use->header);
    return SL_OK;
}

static const char *folder(void)
{
    static char path[] = "/tmp/summerlow-fuzz-XXXXXX";
    static bool made;

    if (!made && !mkdtemp(path))
        abort();
    made = true;
    return path;
}

static void put(enum sl_kind kind, const void *bytes, size_t length)
{
    char path[128];
    FILE *stream;

    snprintf(path, sizeof path, "%s/%s", folder(), sl_record_kind(kind)->file);
    stream = fopen(path, "wb");
    if (!stream || fwrite(bytes, 1, length, stream) != length)
        abort();
    fclose(stream);
}

static void take_away(enum sl_kind kind)
{
    char path[128];

    snprintf(path, sizeof path, "%s/%s", folder(), sl_record_kind(kind)->file);
    unlink(path);
}

static void check_sums(const struct sl_inventory *inventory,
                       const struct counts *counts)
{
    struct sl_file_sum all = {0};

    for (int i = 0; i < SL_KIND_COUNT; i++) {
        const struct sl_file_sum *sum =
            sl_inventory_sum(inventory, (enum sl_kind)i);

        must(sum->read == sum->kept + sum->rejected + sum->out_of_scope,
             "each record has one fate");
        all.read += sum->read;
        all.kept += sum->kept;
        all.rejected += sum->rejected;
        all.out_of_scope += sum->out_of_scope;
    }
    must(all.kept <= counts->handed, "what is kept was handed over");
    must(all.rejected == counts->aside[SL_REJECTED] &&
             all.out_of_scope == counts->aside[SL_OUT_OF_SCOPE],
         "what is not kept was set aside");
    must(counts->errors >= all.rejected, "what is rejected was told");
}

static void read_folder(void)
{
    struct counts counts = {0};
    const struct sl_sink sink = {&counts,     hear_record,  hear_aside,
                                 hear_recall, hear_finding, hear_column,
                                 NULL};
    struct sl_vocabularies words = sl_fixed_vocabularies();
    struct sl_inventory *inventory = NULL;
    struct sl_error error = {0};
    enum sl_status status = sl_inventory_open(folder(), &inventory, &error);

    must(status == SL_OK, "the folder opens");
    status = sl_inventory_read_headers(inventory, &error);
    must(status == SL_OK || (status == SL_REFUSED && *error.message),
         "headers are read or refused");
    if (status == SL_OK) {
        status = sl_inventory_read(inventory, &words, 2026, &sink, &error);
        must(status == SL_OK, "records are read");
        check_sums(inventory, &counts);
    }
    sl_inventory_close(inventory);
}

int LLVMFuzzerTestOneInput(const uint8_t *bytes, size_t length)
{
    static const char stations[] = "station_id\nS1\n";
    static const char pumps[] = "pump_id,station_id\nP1,S1\n";

    for (int i = 0; i < SL_KIND_COUNT; i++) {
        put(SL_KIND_STATION, stations, sizeof stations - 1);
        put(SL_KIND_PUMP, pumps, sizeof pumps - 1);
        put((enum sl_kind)i, bytes, length);
        read_folder();
        take_away((enum sl_kind)i);
    }
    take_away(SL_KIND_STATION);
    take_away(SL_KIND_PUMP);
    return 0;
}

#ifndef SL_LIBFUZZER
static void run_file(const char *path)
{
    struct sl_text text = {0};
    char piece[4096];
    size_t got;
    FILE *stream = fopen(path, "rb");

    if (!stream) {
        fprintf(stderr, "cannot open %s\n", path);
        exit(1);
    }
    while ((got = fread(piece, 1, sizeof piece, stream)) > 0)
        sl_text_add(&text, piece, got);
    fclose(stream);
    LLVMFuzzerTestOneInput((const uint8_t *)sl_text_string(&text), text.length);
    sl_text_release(&text);
}

int main(int argc, char **argv)
{
    for (int i = 1; i < argc; i++)
        run_file(argv[i]);
    rmdir(folder());
    printf("importer_fuzz: %d files read\n", argc - 1);
    return argc > 1 ? 0 : 1;
}
#endif
