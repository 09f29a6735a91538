/* mkstemp, fsync and mkdir are POSIX. */
#define _POSIX_C_SOURCE 200809L

#include "base/output.h"

#include <errno.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

#include "base/memory.h"
#include "base/text.h"

static enum sl_status make_one(const char *folder, struct sl_error *error)
{
    struct stat found;

    if (mkdir(folder, 0777) == 0)
        return SL_OK;
    if (errno == EEXIST && stat(folder, &found) == 0 && S_ISDIR(found.st_mode))
        return SL_OK;
    return sl_error_set(error, SL_FILE,
                        "cannot make the folder \"%s\": %s; name a folder "
                        "that can be written",
                        folder, strerror(errno));
}

enum sl_status sl_make_folder(const char *folder, struct sl_error *error)
{
    enum sl_status status = SL_OK;
    struct sl_text path = {0};

    sl_text_add_string(&path, folder);
    for (size_t i = 1; !status && i < path.length; i++) {
        if (path.bytes[i] != '/')
            continue;
        path.bytes[i] = '\0';
        status = make_one(path.bytes, error);
        path.bytes[i] = '/';
    }
    if (!status)
        status = make_one(sl_text_string(&path), error);
    sl_text_release(&path);
    return status;
}

static char *joined(const char *folder, const char *name, const char *ending)
{
    struct sl_text path = {0};

    sl_text_addf(&path, "%s/%s%s", folder, name, ending);
    return path.bytes;
}

static enum sl_status failed(struct sl_output *output, const char *what,
                             struct sl_error *error)
{
    sl_error_set(error, SL_FILE,
                 "cannot %s \"%s\": %s; free some space or "
                 "name another folder",
                 what, output->path, strerror(errno));
    sl_output_abandon(output);
    return SL_FILE;
}

enum sl_status sl_output_open(struct sl_output *output, const char *folder,
                              const char *name, struct sl_error *error)
{
    mode_t mask = umask(0);
    int file;

    umask(mask);
    *output = (struct sl_output){0};
    output->path = joined(folder, name, "");
    output->temporary = joined(folder, name, ".XXXXXX");
    file = mkstemp(output->temporary);
    if (file < 0) {
        free(output->temporary);
        output->temporary = NULL;
        return failed(output, "write", error);
    }
    /* mkstemp gives 0600; a report is meant to be shared as any file is. */
    fchmod(file, 0666 & ~mask);
    output->stream = fdopen(file, "w");
    if (!output->stream) {
        close(file);
        return failed(output, "write", error);
    }
    return SL_OK;
}

enum sl_status sl_output_commit(struct sl_output *output,
                                struct sl_error *error)
{
    FILE *stream = output->stream;
    int bad = ferror(stream);

    /* What an earlier write failed of is forgotten by now. */
    errno = EIO;
    bad |= fflush(stream) != 0 || fsync(fileno(stream)) != 0;
    output->stream = NULL;
    bad |= fclose(stream) != 0;
    if (bad)
        return failed(output, "write", error);
    if (rename(output->temporary, output->path) != 0)
        return failed(output, "replace", error);
    free(output->temporary);
    output->temporary = NULL;
    sl_output_abandon(output);
    return SL_OK;
}

void sl_output_abandon(struct sl_output *output)
{
    if (output->stream)
        fclose(output->stream);
    if (output->temporary)
        unlink(output->temporary);
    free(output->temporary);
    free(output->path);
    *output = (struct sl_output){0};
}
