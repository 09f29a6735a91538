/* open, fstat, O_NONBLOCK: POSIX. */
#define _POSIX_C_SOURCE 200809L

#include "importer/input_file.h"

#include <errno.h>
#include <fcntl.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

#include <sha2.h>

#include "base/memory.h"
#include "base/text.h"

static enum sl_status failed(const struct sl_input_file *file,
                             const char *doing, struct sl_error *error)
{
    return sl_error_set(error, SL_FILE, "cannot %s \"%s\": %s", doing,
                        file->name, strerror(errno));
}

static enum sl_status check_regular(struct sl_input_file *file,
                                    struct sl_error *error)
{
    struct stat about;

    if (fstat(file->descriptor, &about) != 0)
        return failed(file, "look at", error);
    if (!S_ISREG(about.st_mode))
        return sl_error_set(error, SL_FILE,
                            "\"%s\" is not a regular file; put a CSV file of "
                            "that name in its place",
                            file->name);
    return SL_OK;
}

enum sl_status sl_input_file_open(struct sl_input_file *file,
                                  const char *folder, const char *name,
                                  struct sl_error *error)
{
    struct sl_text path = {0};
    enum sl_status status = SL_OK;

    *file = (struct sl_input_file){.name = name};
    sl_text_addf(&path, "%s/%s", folder, name);
    /* Without O_NONBLOCK a named pipe would hold us up for ever. */
    file->descriptor =
        open(sl_text_string(&path), O_RDONLY | O_NONBLOCK | O_CLOEXEC);
    if (file->descriptor >= 0)
        status = check_regular(file, error);
    else if (errno != ENOENT)
        status = failed(file, "open", error);
    if (status)
        sl_input_file_close(file);
    sl_text_release(&path);
    return status;
}

void sl_input_file_close(struct sl_input_file *file)
{
    if (file->descriptor >= 0)
        close(file->descriptor);
    file->descriptor = -1;
}

bool sl_input_file_present(const struct sl_input_file *file)
{
    return file->descriptor >= 0;
}

enum sl_status sl_input_file_rewind(struct sl_input_file *file,
                                    struct sl_error *error)
{
    if (lseek(file->descriptor, 0, SEEK_SET) != 0)
        return failed(file, "go to the start of", error);
    file->running = 0;
    file->position = 0;
    return SL_OK;
}

/* Multiply by an odd constant with well spread bits (2^64 over the golden
 * ratio) and fold the high half down, a word at a time. */
static uint64_t sum_of(uint64_t sum, const char *bytes, size_t length)
{
    while (length > 0) {
        size_t taken = length < sizeof sum ? length : sizeof sum;
        uint64_t word = 0;

        memcpy(&word, bytes, taken);
        sum = (sum ^ word) * UINT64_C(0x9E3779B97F4A7C15);
        sum ^= sum >> 32;
        bytes += taken;
        length -= taken;
    }
    return sum;
}

enum sl_status sl_input_file_read(struct sl_input_file *file, char *piece,
                                  size_t *length, struct sl_error *error)
{
    *length = 0;
    while (*length < SL_PIECE_BYTES) {
        ssize_t got =
            read(file->descriptor, piece + *length, SL_PIECE_BYTES - *length);

        if (got < 0 && errno == EINTR)
            continue;
        if (got < 0)
            return failed(file, "read", error);
        if (got == 0)
            break;
        *length += (size_t)got;
    }
    file->position += (long long)*length;
    file->running = sum_of(file->running, piece, *length);
    return SL_OK;
}

enum sl_status sl_input_file_hash(struct sl_input_file *file,
                                  struct sl_error *error)
{
    char *piece = sl_new(SL_PIECE_BYTES, 1);
    size_t length = 0;
    SHA2_CTX hash;
    enum sl_status status = sl_input_file_rewind(file, error);

    SHA256Init(&hash);
    while (!status) {
        status = sl_input_file_read(file, piece, &length, error);
        if (status || length == 0)
            break;
        SHA256Update(&hash, (const uint8_t *)piece, length);
    }
    SHA256End(&hash, file->sha256);
    file->bytes = file->position;
    file->sum = file->running;
    free(piece);
    return status;
}

enum sl_status sl_input_file_unchanged(const struct sl_input_file *file,
                                       struct sl_error *error)
{
    if (file->position == file->bytes && file->running == file->sum)
        return SL_OK;
    return sl_error_set(error, SL_FILE,
                        "\"%s\" changed while it was read; try again when "
                        "nobody writes to it",
                        file->name);
}
