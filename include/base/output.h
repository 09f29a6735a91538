/* A file that appears whole or not at all.
 *
 * It is written under a temporary name beside its place and renamed into it
 * on commit; until then, and after any failure, an earlier file of that name
 * is untouched.  The temporary name is new (O_EXCL), so no link is followed.
 * Life cycle: open, print any number of times, then commit or abandon. */
#ifndef SL_BASE_OUTPUT_H
#define SL_BASE_OUTPUT_H

#include <stdio.h>

#include "base/status.h"

struct sl_output {
    FILE *stream; /* to write to; NULL when not open */
    char *path;
    char *temporary;
};

/* Make `folder` and its parents where they are missing. */
enum sl_status sl_make_folder(const char *folder, struct sl_error *error);

enum sl_status sl_output_open(struct sl_output *output, const char *folder,
                              const char *name, struct sl_error *error);
/* Write out, sync and rename.  Reports any earlier failed write too. */
enum sl_status sl_output_commit(struct sl_output *output,
                                struct sl_error *error);
/* Remove the temporary file; harmless when nothing is open. */
void sl_output_abandon(struct sl_output *output);

#endif
