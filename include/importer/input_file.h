/* One inventory file, read twice.
 *
 * Life cycle: open, hash (the first pass, all of it), rewind, read piece by
 * piece to the end (the second pass), then ask whether it was unchanged;
 * close.  The same descriptor serves both passes, so a file renamed over it
 * in between does no harm.
 *
 * SHA-256 is for people and for the store; at some 150 MB/s it is too dear
 * to be taken twice of every inventory, so the passes are compared by a sum
 * of 64 bits.  It finds accidents, not forgeries. */
#ifndef SL_IMPORTER_INPUT_FILE_H
#define SL_IMPORTER_INPUT_FILE_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "base/status.h"

/* Every read but a file's last gives this many bytes: the two passes see
 * the same pieces, and one piece stays in a core's cache. */
#define SL_PIECE_BYTES ((size_t)256 * 1024)

struct sl_input_file {
    const char *name; /* "pumps.csv", for messages; the caller's */
    int descriptor;   /* -1 when it is not there */
    char sha256[65];  /* from here on: set by the first pass */
    long long bytes;  /* ... */
    uint64_t sum;     /* ... */
    uint64_t running; /* of the pass under way */
    long long position;
};

/* Open `name` in `folder`.  A name that is not there is no failure: the
 * descriptor is -1.  A folder, pipe or device of that name is SL_FILE. */
enum sl_status sl_input_file_open(struct sl_input_file *file,
                                  const char *folder, const char *name,
                                  struct sl_error *error);
void sl_input_file_close(struct sl_input_file *file);
bool sl_input_file_present(const struct sl_input_file *file);

enum sl_status sl_input_file_rewind(struct sl_input_file *file,
                                    struct sl_error *error);
/* The next piece; *length is 0 at the end.  `piece` has SL_PIECE_BYTES. */
enum sl_status sl_input_file_read(struct sl_input_file *file, char *piece,
                                  size_t *length, struct sl_error *error);

/* The first pass: fills sha256, bytes and sum. */
enum sl_status sl_input_file_hash(struct sl_input_file *file,
                                  struct sl_error *error);
/* After a second pass to the end: SL_FILE when it read something else. */
enum sl_status sl_input_file_unchanged(const struct sl_input_file *file,
                                       struct sl_error *error);

#endif
