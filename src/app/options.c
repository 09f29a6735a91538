/* getopt_long is a GNU extension of POSIX getopt. */
#define _GNU_SOURCE

#include "app/options.h"

#include <getopt.h>
#include <math.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"

/* Options without a short form, above any character. */
enum {
    OPT_STORE = 256,
    OPT_OUT,
    OPT_LABEL,
    OPT_UNITS,
    OPT_RULE,
    OPT_YEAR,
    OPT_DRY_RUN
};

#define ON(command) (1U << (command))
#define ON_ANY (~0U)
#define ON_JUDGING                                                             \
    (ON(SL_COMMAND_AUDIT) | ON(SL_COMMAND_EVALUATE) | ON(SL_COMMAND_RANK) |    \
     ON(SL_COMMAND_EXPLAIN))

/* As of the inventory's own years. */
#define FIRST_YEAR 1800
#define LAST_YEAR 2200

static const struct {
    const char *name;
    int has_value;
    int code;
    unsigned commands; /* that take it */
} option_list[] = {
    {"help", no_argument, 'h', ON_ANY},
    {"version", no_argument, 'V', ON_ANY},
    {"store", required_argument, OPT_STORE, ON_ANY},
    {"out", required_argument, OPT_OUT,
     ON(SL_COMMAND_AUDIT) | ON(SL_COMMAND_RANK)},
    {"label", required_argument, OPT_LABEL,
     ON(SL_COMMAND_AUDIT) | ON(SL_COMMAND_IMPORT)},
    {"units", required_argument, OPT_UNITS,
     ON(SL_COMMAND_AUDIT) | ON(SL_COMMAND_RANK) | ON(SL_COMMAND_EXPLAIN)},
    {"rule", required_argument, OPT_RULE, ON_JUDGING},
    {"year", required_argument, OPT_YEAR, ON_JUDGING},
    {"dry-run", no_argument, OPT_DRY_RUN, ON(SL_COMMAND_IMPORT)},
};

#define OPTION_COUNT (sizeof option_list / sizeof option_list[0])

static const struct {
    const char *name;
    const char *subject; /* NULL: takes none */
    bool needs_store;
    bool needs_out;
} commands[] = {
    [SL_COMMAND_AUDIT] = {"audit", "an inventory folder", false, true},
    [SL_COMMAND_IMPORT] = {"import", "an inventory folder", true, false},
    [SL_COMMAND_EVALUATE] = {"evaluate", NULL, true, false},
    [SL_COMMAND_RANK] = {"rank", NULL, true, true},
    [SL_COMMAND_EXPLAIN] = {"explain", "a pump's id", true, false},
};

#define COMMAND_COUNT ((int)(sizeof commands / sizeof commands[0]))

static enum sl_status units_of(const char *word, struct sl_options *options,
                               struct sl_error *error)
{
    if (strcmp(word, "si") == 0)
        options->units = SL_SI;
    else if (strcmp(word, "us") == 0)
        options->units = SL_US;
    else
        return sl_error_set(error, SL_USAGE,
                            "\"%s\" is no system of units; use --units si or "
                            "--units us",
                            word);
    return SL_OK;
}

static enum sl_status year_of(const char *word, struct sl_options *options,
                              struct sl_error *error)
{
    double year = 0;

    if (sl_number_parse(word, strlen(word), &year) != SL_NUMBER_OK ||
        year != floor(year) || year < FIRST_YEAR || year > LAST_YEAR)
        return sl_error_set(error, SL_USAGE,
                            "\"%s\" is no year from %d to %d; use --year "
                            "2026, say",
                            word, FIRST_YEAR, LAST_YEAR);
    options->year = (int)year;
    return SL_OK;
}

static enum sl_status take(int code, const char *value,
                           struct sl_options *options, struct sl_error *error)
{
    switch (code) {
    case 'h':
        options->help = true;
        return SL_OK;
    case 'V':
        options->version = true;
        return SL_OK;
    case OPT_STORE:
        options->store = value;
        return SL_OK;
    case OPT_OUT:
        options->out = value;
        return SL_OK;
    case OPT_LABEL:
        options->label = value;
        return SL_OK;
    case OPT_UNITS:
        return units_of(value, options, error);
    case OPT_RULE:
        options->rule = value;
        return SL_OK;
    case OPT_YEAR:
        return year_of(value, options, error);
    case OPT_DRY_RUN:
        options->dry_run = true;
        return SL_OK;
    }
    return sl_error_set(error, SL_BUG, "option %d has no meaning", code);
}

/* The place of a code in the list. */
static size_t place_of(int code)
{
    size_t i = 0;

    while (i + 1 < OPTION_COUNT && option_list[i].code != code)
        i++;
    return i;
}

/* What getopt could not take: a short option within a word ("-xh") by its
 * letter, since optind still points before it; else the word. */
static enum sl_status not_taken(int code, char **words, struct sl_error *error)
{
    const char *word = words[optind - 1];
    char letter[] = {'-', (char)optopt, '\0'};

    if (code == '?' && optopt > 0 && optopt < OPT_STORE)
        word = letter;
    return sl_error_set(error, SL_USAGE,
                        code == '?' ? "the option \"%s\" is not known; see "
                                      "summerlow --help"
                                    : "the option \"%s\" needs a value; see "
                                      "summerlow --help",
                        word);
}

static enum sl_status read_options(int count, char **words, unsigned *given,
                                   struct sl_options *options,
                                   struct sl_error *error)
{
    struct option list[OPTION_COUNT + 1] = {0};
    enum sl_status status = SL_OK;
    int code;

    for (size_t i = 0; i < OPTION_COUNT; i++)
        list[i] = (struct option){option_list[i].name, option_list[i].has_value,
                                  NULL, option_list[i].code};
    opterr = 0;
    optind = 1;
    while (!status &&
           (code = getopt_long(count, words, ":hV", list, NULL)) != -1) {
        if (code == '?' || code == ':')
            return not_taken(code, words, error);
        *given |= 1U << place_of(code);
        status = take(code, optarg, options, error);
    }
    return status;
}

static enum sl_status find_command(const char *word, struct sl_options *options,
                                   struct sl_error *error)
{
    for (int i = 1; i < COMMAND_COUNT; i++)
        if (strcmp(word, commands[i].name) == 0) {
            options->command = (enum sl_command)i;
            return SL_OK;
        }
    return sl_error_set(error, SL_USAGE,
                        "\"%s\" is no command; use audit, import, evaluate, "
                        "rank or explain",
                        word);
}

/* SQLite keeps a store of these names in memory, or reads them as a URI; a
 * result that nobody can open again is no result. */
static enum sl_status check_place(const char *option, const char *path,
                                  struct sl_error *error)
{
    if (!path || (path[0] != '\0' && strcmp(path, ":memory:") != 0 &&
                  strncmp(path, "file:", strlen("file:")) != 0))
        return SL_OK;
    return sl_error_set(error, SL_USAGE,
                        "--%s \"%s\" names no place on disk; give a path, as "
                        "in ./results",
                        option, path);
}

static enum sl_status check_places(const struct sl_options *options,
                                   struct sl_error *error)
{
    enum sl_status status = check_place("store", options->store, error);

    return status ? status : check_place("out", options->out, error);
}

static enum sl_status check(const struct sl_options *options, unsigned given,
                            struct sl_error *error)
{
    enum sl_command command = options->command;
    const char *name = commands[command].name;

    for (size_t i = 0; i < OPTION_COUNT; i++)
        if ((given & 1U << i) && !(option_list[i].commands & ON(command)))
            return sl_error_set(error, SL_USAGE,
                                "%s takes no --%s; see summerlow %s --help",
                                name, option_list[i].name, name);
    if (commands[command].subject && !options->subject)
        return sl_error_set(error, SL_USAGE,
                            "%s needs %s; see summerlow %s --help", name,
                            commands[command].subject, name);
    if (commands[command].needs_store && !options->store && !options->dry_run)
        return sl_error_set(error, SL_USAGE,
                            "%s needs --store FILE; see summerlow %s --help",
                            name, name);
    if (commands[command].needs_out && !options->out)
        return sl_error_set(error, SL_USAGE,
                            "%s needs --out DIR; see summerlow %s --help", name,
                            name);
    return check_places(options, error);
}

enum sl_status sl_options_parse(int count, char **words,
                                struct sl_options *options,
                                struct sl_error *error)
{
    unsigned given = 0;
    enum sl_status status;
    int extra;

    *options = (struct sl_options){0};
    status = read_options(count, words, &given, options, error);
    if (status)
        return status;
    if (optind < count) {
        status = find_command(words[optind], options, error);
        if (status)
            return status;
    }
    if (options->help || options->version)
        return SL_OK;
    if (optind >= count)
        return sl_error_set(error, SL_USAGE,
                            "no command; try summerlow audit INVENTORY --out "
                            "DIR, or summerlow --help");
    extra = optind + 1;
    if (commands[options->command].subject && extra < count)
        options->subject = words[extra++];
    if (extra < count)
        return sl_error_set(error, SL_USAGE,
                            "\"%s\" is one word too many; see summerlow %s "
                            "--help",
                            words[extra], commands[options->command].name);
    return check(options, given, error);
}
