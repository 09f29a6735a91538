/* The base room: numbers, units, text, memory, outputs. */
#define _POSIX_C_SOURCE 200809L /* mkdtemp */

#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>

#include <cmocka.h>
#include <errno.h>
#include <signal.h>
#include <stdlib.h>
#include <string.h>
#include <sys/resource.h>
#include <sys/stat.h>
#include <sys/wait.h>
#include <unistd.h>

#include "base/memory.h"
#include "base/number.h"
#include "base/output.h"
#include "base/status.h"
#include "base/text.h"
#include "base/units.h"
#include "unit/check.h"

static void numbers_are_taken_by_the_grammar_alone(void **state)
{
    static const struct {
        const char *text;
        enum sl_number_outcome outcome;
        double value;
    } rows[] = {
        {"12", SL_NUMBER_OK, 12},         {"-0.625", SL_NUMBER_OK, -0.625},
        {"+3.", SL_NUMBER_OK, 3},         {".5", SL_NUMBER_OK, 0.5},
        {"2.385e2", SL_NUMBER_OK, 238.5}, {"1E-3", SL_NUMBER_OK, 0.001},
        {"", SL_NUMBER_EMPTY, 0},         {"1,234", SL_NUMBER_COMMA, 0},
        {"12,5", SL_NUMBER_COMMA, 0},     {"3.5 m", SL_NUMBER_TRAILING, 0},
        {"12 in", SL_NUMBER_TRAILING, 0}, {"1e", SL_NUMBER_TRAILING, 0},
        {"1.2.3", SL_NUMBER_TRAILING, 0}, {"0x1A", SL_NUMBER_TRAILING, 0},
        {"nan", SL_NUMBER_NOT_ONE, 0},    {"inf", SL_NUMBER_NOT_ONE, 0},
        {"-", SL_NUMBER_NOT_ONE, 0},      {".", SL_NUMBER_NOT_ONE, 0},
        {"N/A", SL_NUMBER_NOT_ONE, 0},    {"1e999", SL_NUMBER_TOO_LARGE, 0},
    };

    (void)state;
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        double value = -77;
        enum sl_number_outcome outcome =
            sl_number_parse(rows[i].text, strlen(rows[i].text), &value);

        if (outcome != rows[i].outcome)
            fail_msg("\"%s\" ended as %d, not %d", rows[i].text, outcome,
                     rows[i].outcome);
        check_close(rows[i].text, value,
                    outcome == SL_NUMBER_OK ? rows[i].value : -77, 0, 0);
        assert_true(strlen(sl_number_advice(outcome)) > 10);
    }
}

static void a_number_of_endless_digits_is_refused(void **state)
{
    char digits[200];
    double value;

    (void)state;
    memset(digits, '7', sizeof digits);
    assert_int_equal(sl_number_parse(digits, sizeof digits, &value),
                     SL_NUMBER_NOT_ONE);
}

/* Factors of NIST SP 811 (2008), appendix B.8; "exact" there where no more
 * digits follow. The rows of unit pairs are from that table. */
static void units_agree_with_nist_sp_811(void **state)
{
    static const struct {
        enum sl_quantity quantity;
        const char *suffix;
        double value, si, relative;
        const char *row;
    } rows[] = {
        {SL_LENGTH, "ft", 1, 0.3048, 0, "foot, exact"},
        {SL_LENGTH, "in", 1, 0.0254, 1e-15, "inch, exact"},
        {SL_BORE, "in", 12, 0.3048, 1e-15, "inch, exact"},
        {SL_FLOW, "gpm", 1, 6.309020e-5, 1e-7, "gallon (US) per minute"},
        {SL_FLOW, "cfs", 1, 2.831685e-2, 1e-6, "cubic foot per second"},
        {SL_FLOW, "mgd", 1, 4.381264e-2, 1e-6,
         "gallon (US) per day, a million times"},
        {SL_PRESSURE, "psi", 1, 6894.757, 1e-7, "pound-force per sq. inch"},
        {SL_PRESSURE, "bar", 1, 1e5, 0, "bar, exact"},
        {SL_PRESSURE, "inhg", 1, 3386.389, 1e-6,
         "inch of mercury, conventional"},
        {SL_TEMPERATURE, "f", 50, 283.15, 1e-15, "degree Fahrenheit"},
        {SL_TEMPERATURE, "c", 25, 298.15, 1e-15, "degree Celsius"},
        {SL_POWER, "hp", 1, 745.6999, 1e-7, "horsepower (550 ft lbf/s)"},
        {SL_TEMPERATURE_DIFFERENCE, "delta_f", 9, 5, 1e-15,
         "degree Fahrenheit, temperature interval"},
        {SL_TEMPERATURE_DIFFERENCE, "delta_c", 2.5, 2.5, 0,
         "degree Celsius, temperature interval"},
        {SL_VELOCITY, "ft_s", 1, 0.3048, 0, "foot per second, exact"},
    };

    (void)state;
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        const struct sl_unit *unit =
            sl_unit_by_suffix(rows[i].quantity, rows[i].suffix);

        assert_non_null(unit);
        check_close(rows[i].row, sl_to_si(unit, rows[i].value), rows[i].si,
                    rows[i].relative, 0);
        check_close(rows[i].row, sl_from_si(unit, rows[i].si), rows[i].value,
                    rows[i].relative + 1e-14, 0);
    }
}

static void a_unit_of_another_quantity_is_no_unit(void **state)
{
    (void)state;
    assert_null(sl_unit_by_suffix(SL_LENGTH, "gpm"));
    assert_null(sl_unit_by_suffix(SL_PURE, "m"));
    assert_null(sl_unit_by_suffix(SL_FLOW, "furlong"));
}

static void each_quantity_names_each_of_its_units(void **state)
{
    (void)state;
    for (int q = SL_LENGTH; q <= SL_TEMPERATURE_DIFFERENCE; q++) {
        char choices[128];
        char *rest = NULL;
        int count = 0;

        snprintf(choices, sizeof choices, "%s",
                 sl_unit_choices((enum sl_quantity)q));
        for (char *word = strtok_r(choices, ", ", &rest); word;
             word = strtok_r(NULL, ", ", &rest)) {
            if (!sl_unit_by_suffix((enum sl_quantity)q, word))
                fail_msg("quantity %d offers \"%s\" and has no such unit", q,
                         word);
            count++;
        }
        assert_true(count >= 1);
        assert_non_null(sl_unit_by_suffix(
            (enum sl_quantity)q,
            sl_unit_shown((enum sl_quantity)q, SL_US)->suffix));
    }
}

static void shown_units_are_the_systems(void **state)
{
    (void)state;
    assert_string_equal(sl_unit_shown(SL_LENGTH, SL_SI)->label, "m");
    assert_string_equal(sl_unit_shown(SL_LENGTH, SL_US)->label, "ft");
    assert_string_equal(sl_unit_shown(SL_FLOW, SL_US)->label, "gpm");
    assert_string_equal(sl_unit_shown(SL_TEMPERATURE, SL_US)->suffix, "f");
    assert_string_equal(sl_unit_shown(SL_PURE, SL_US)->label, "");
}

static void utf8_is_told_from_what_is_not(void **state)
{
    static const struct {
        const char *bytes;
        size_t length, valid;
        const char *why;
    } rows[] = {
        {"na\xC3\xAFve", 6, 6, "two bytes"},
        {"\xE2\x82\xAC", 3, 3, "three bytes"},
        {"\xF0\x9F\x92\xA7", 4, 4, "four bytes"},
        {"a\xC0\xAF", 3, 1, "an overlong form"},
        {"\xE0\x80\xAF", 3, 0, "an overlong form of three"},
        {"\xED\xA0\x80", 3, 0, "a surrogate"},
        {"\xF4\x90\x80\x80", 4, 0, "above U+10FFFF"},
        {"ok\xE2\x82", 4, 2, "cut short"},
        {"caf\xE9", 4, 3, "Latin-1"},
        {"\x80", 1, 0, "a stray follower"},
    };

    (void)state;
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++)
        if (sl_utf8_valid_length(rows[i].bytes, rows[i].length) !=
            rows[i].valid)
            fail_msg("%s was not told", rows[i].why);
}

static void hidden_characters_are_told(void **state)
{
    static const struct {
        const char *bytes;
        size_t length;
        unsigned long code;
        bool hidden;
    } rows[] = {
        {"\x1B[", 1, 0x1B, false},
        {"\xC2\x9B", 2, 0x9B, true},
        {"\xC2\xA0", 2, 0xA0, false},
        {"\xD8\x9C", 2, 0x061C, true},
        {"\xE2\x80\x8D", 3, 0x200D, false},
        {"\xE2\x80\xAE", 3, 0x202E, true},
        {"\xE2\x80\xAF", 3, 0x202F, false},
        {"\xE2\x81\xA9", 3, 0x2069, true},
        {"\xEF\xBF\xBE", 3, 0xFFFE, true},
        {"\xF0\x9F\x92\xA7", 4, 0x1F4A7, false},
        {"\x9B", 0, 0, false},
        {"\xE2\x80", 0, 0, false},
    };

    (void)state;
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        unsigned long code = 1;

        assert_int_equal(
            sl_utf8_character(rows[i].bytes, strlen(rows[i].bytes), &code),
            rows[i].length);
        assert_int_equal(code, rows[i].code);
        assert_int_equal(sl_utf8_hidden(code), rows[i].hidden);
    }
}

static void text_grows_and_ends_in_nul(void **state)
{
    struct sl_text text = {0};

    (void)state;
    assert_string_equal(sl_text_string(&text), "");
    for (int i = 0; i < 1000; i++)
        sl_text_addf(&text, "%d,", i % 10);
    assert_int_equal(text.length, 2000);
    assert_int_equal(strlen(sl_text_string(&text)), 2000);
    sl_text_clear(&text);
    assert_string_equal(sl_text_string(&text), "");
    sl_text_release(&text);
    assert_false(sl_same(NULL, NULL));
    assert_true(sl_same("a", "a"));
}

static void an_arena_gives_zeroed_pieces_that_do_not_overlap(void **state)
{
    struct sl_arena arena = {0};
    unsigned char *large, *small;

    (void)state;
    for (int round = 0; round < 3; round++) {
        small = sl_arena_new(&arena, 3, 7);
        large = sl_arena_new(&arena, 1000, 1000);
        for (int i = 0; i < 21; i++)
            assert_int_equal(small[i], 0);
        assert_int_equal(large[999999], 0);
        memset(small, 0xAB, 21);
        memset(large, 0xCD, 1000000);
        assert_int_equal(small[20], 0xAB);
        assert_string_equal(sl_arena_text(&arena, "pump", 4), "pump");
        sl_arena_reset(&arena);
    }
    sl_arena_release(&arena);
    assert_null(arena.blocks);
}

/* The one way to see exit status 70 without a bug: ask for more than there
 * can be. */
static void want_of_memory_ends_the_program_with_status_70(void **state)
{
    size_t capacity = 0;
    int status = 0;
    pid_t child = fork();

    (void)state;
    if (child == 0) {
        fclose(stderr);
        sl_grow(NULL, &capacity, SIZE_MAX / 8, 16);
        _exit(0);
    }
    assert_int_equal(waitpid(child, &status, 0), child);
    assert_true(WIFEXITED(status));
    assert_int_equal(WEXITSTATUS(status), 70);
}

static void errors_keep_their_message_and_every_status_a_name(void **state)
{
    struct sl_error error = {0};

    (void)state;
    assert_int_equal(sl_error_set(&error, SL_FILE, "no \"%s\"", "x.csv"),
                     SL_FILE);
    assert_string_equal(error.message, "no \"x.csv\"");
    assert_int_equal(sl_error_set(NULL, SL_BUG, "unseen"), SL_BUG);
    for (int i = SL_OK; i <= SL_BUG; i++)
        assert_string_not_equal(sl_status_name((enum sl_status)i),
                                "unknown status");
    assert_string_equal(sl_status_name((enum sl_status)99), "unknown status");
}

static char *scratch_folder(void)
{
    static char folder[64];

    snprintf(folder, sizeof folder, "/tmp/base_test.XXXXXX");
    assert_non_null(mkdtemp(folder));
    return folder;
}

static void read_back(const char *path, char *bytes, size_t size)
{
    FILE *file = fopen(path, "r");
    size_t length;

    assert_non_null(file);
    length = fread(bytes, 1, size - 1, file);
    bytes[length] = '\0';
    fclose(file);
}

static void an_output_appears_only_when_committed(void **state)
{
    char *folder = scratch_folder();
    char path[128], bytes[64];
    struct sl_output output;
    struct sl_error error = {0};

    (void)state;
    snprintf(path, sizeof path, "%s/list.csv", folder);
    assert_int_equal(sl_output_open(&output, folder, "list.csv", &error), 0);
    fputs("new", output.stream);
    assert_int_equal(access(path, F_OK), -1);
    assert_int_equal(sl_output_commit(&output, &error), SL_OK);
    read_back(path, bytes, sizeof bytes);
    assert_string_equal(bytes, "new");

    assert_int_equal(sl_output_open(&output, folder, "list.csv", &error), 0);
    fputs("newer", output.stream);
    sl_output_abandon(&output);
    read_back(path, bytes, sizeof bytes);
    assert_string_equal(bytes, "new");
    assert_int_equal(unlink(path), 0);
    assert_int_equal(rmdir(folder), 0); /* no temporary file is left */
}

static void a_full_disk_keeps_the_earlier_file(void **state)
{
    char *folder = scratch_folder();
    struct sl_output output;
    struct sl_error error = {0};
    FILE *full = fopen("/dev/full", "w");

    (void)state;
    assert_non_null(full);
    assert_int_equal(sl_output_open(&output, folder, "list.csv", &error), 0);
    fclose(output.stream);
    output.stream = full; /* every write to it fails for want of room */
    fputs("lost", output.stream);
    assert_int_equal(sl_output_commit(&output, &error), SL_FILE);
    assert_non_null(strstr(error.message, "list.csv"));
    assert_int_equal(rmdir(folder), 0);
}

/* A disk that was full for a while: what is in the file has a hole. */
static void an_earlier_failed_write_is_told(void **state)
{
    char *folder = scratch_folder();
    struct sl_output output;
    struct sl_error error = {0};
    struct rlimit limit, none;

    (void)state;
    assert_int_equal(sl_output_open(&output, folder, "list.csv", &error), 0);
    setvbuf(output.stream, NULL, _IONBF, 0);
    signal(SIGXFSZ, SIG_IGN);
    assert_int_equal(getrlimit(RLIMIT_FSIZE, &limit), 0);
    none = limit;
    none.rlim_cur = 0;
    setrlimit(RLIMIT_FSIZE, &none);
    fputs("lost", output.stream);
    setrlimit(RLIMIT_FSIZE, &limit);
    fputs("written", output.stream);
    errno = 0;
    assert_int_equal(sl_output_commit(&output, &error), SL_FILE);
    assert_non_null(strstr(error.message, strerror(EIO)));
    assert_int_equal(rmdir(folder), 0);
}

static void folders_are_made_with_their_parents(void **state)
{
    char *folder = scratch_folder();
    char deep[128], file[256];
    struct sl_error error = {0};
    struct sl_output output;

    (void)state;
    snprintf(deep, sizeof deep, "%s/a/b", folder);
    assert_int_equal(sl_make_folder(deep, &error), SL_OK);
    assert_int_equal(sl_make_folder(deep, &error), SL_OK);
    assert_int_equal(sl_output_open(&output, deep, "f", &error), SL_OK);
    assert_int_equal(sl_output_commit(&output, &error), SL_OK);
    snprintf(file, sizeof file, "%s/f", deep);
    assert_int_equal(sl_make_folder(file, &error), SL_FILE);
    assert_int_equal(sl_output_open(&output, file, "g", &error), SL_FILE);
    assert_int_equal(unlink(file), 0);
    assert_int_equal(rmdir(deep), 0);
    snprintf(deep, sizeof deep, "%s/a", folder);
    assert_int_equal(rmdir(deep), 0);
    assert_int_equal(rmdir(folder), 0);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(numbers_are_taken_by_the_grammar_alone),
        cmocka_unit_test(a_number_of_endless_digits_is_refused),
        cmocka_unit_test(units_agree_with_nist_sp_811),
        cmocka_unit_test(a_unit_of_another_quantity_is_no_unit),
        cmocka_unit_test(each_quantity_names_each_of_its_units),
        cmocka_unit_test(shown_units_are_the_systems),
        cmocka_unit_test(utf8_is_told_from_what_is_not),
        cmocka_unit_test(hidden_characters_are_told),
        cmocka_unit_test(text_grows_and_ends_in_nul),
        cmocka_unit_test(an_arena_gives_zeroed_pieces_that_do_not_overlap),
        cmocka_unit_test(want_of_memory_ends_the_program_with_status_70),
        cmocka_unit_test(errors_keep_their_message_and_every_status_a_name),
        cmocka_unit_test(an_output_appears_only_when_committed),
        cmocka_unit_test(a_full_disk_keeps_the_earlier_file),
        cmocka_unit_test(an_earlier_failed_write_is_told),
        cmocka_unit_test(folders_are_made_with_their_parents),
    };

    return cmocka_run_group_tests_name("base", tests, NULL, NULL);
}
