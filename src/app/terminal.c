/* sigaction and isatty are POSIX. */
#define _POSIX_C_SOURCE 200809L

#include "app/terminal.h"

#include <signal.h>
#include <string.h>
#include <unistd.h>

static volatile sig_atomic_t stop_asked;
static int shown_percent = -1;

static void ask_to_stop(int number)
{
    (void)number;
    stop_asked = 1;
}

void sl_watch_for_stop(void)
{
    struct sigaction action = {0};

    action.sa_handler = ask_to_stop;
    sigemptyset(&action.sa_mask);
    sigaction(SIGINT, &action, NULL);
    sigaction(SIGTERM, &action, NULL);
}

bool sl_stop_asked(void)
{
    return stop_asked != 0;
}

void sl_progress(const char *what, long long done, long long all)
{
    int percent = all > 0 ? (int)(100.0 * (double)done / (double)all) : 0;

    if (percent == shown_percent || !isatty(STDERR_FILENO))
        return;
    shown_percent = percent;
    fprintf(stderr, "\r%s %3d %%", what, percent);
    fflush(stderr);
}

void sl_progress_end(void)
{
    if (shown_percent < 0)
        return;
    shown_percent = -1;
    fputs("\r\033[K", stderr);
}

/* What a terminal would obey, or what would turn the line around. */
static bool is_unsafe(unsigned long code)
{
    return code < 0x20 || code == 0x7F || sl_utf8_hidden(code);
}

void sl_print_safely(FILE *stream, const char *text)
{
    size_t left = strlen(text);

    while (left > 0) {
        unsigned long code;
        size_t length = sl_utf8_character(text, left, &code);

        if (length > 0 && !is_unsafe(code))
            fwrite(text, 1, length, stream);
        else
            fprintf(stream, "<%02lX>",
                    length ? code : (unsigned long)(unsigned char)*text);
        length = length ? length : 1;
        text += length;
        left -= length;
    }
}
