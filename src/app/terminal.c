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

/* The length of a control character at `text`, 0 when it is none: C0, DEL,
 * and C1 as UTF-8 (C2 80 to C2 9F). */
static size_t control_length(const unsigned char *text)
{
    if (text[0] < 0x20 || text[0] == 0x7F)
        return 1;
    return text[0] == 0xC2 && text[1] >= 0x80 && text[1] <= 0x9F ? 2 : 0;
}

void sl_print_safely(FILE *stream, const char *text)
{
    const unsigned char *at = (const unsigned char *)text;

    while (*at) {
        size_t control = control_length(at);

        if (control == 0)
            putc(*at++, stream);
        else
            fprintf(stream, "<%02X>", at[control - 1]);
        at += control;
    }
}
