#include "importer/cell.h"

#include <math.h>
#include <stdarg.h>
#include <stdio.h>
#include <string.h>

#include "base/number.h"
#include "importer/likeness.h"

/* More words than this are not all told, only the nearest. */
#define WORDS_TOLD 12
#define WORDS_NEAR 3
/* A bound written in another unit may come out some units in the last place
 * beside it; this is thousands of those and far below any meaning. */
#define BOUND_SLACK 1e-12

void sl_problem_release(struct sl_problem *problem)
{
    sl_text_release(&problem->reason);
    sl_text_release(&problem->remedy);
}

void sl_problem_set(struct sl_problem *problem, const char *code,
                    const char *remedy, const char *reason, ...)
{
    char words[SL_ERROR_LENGTH];
    va_list arguments;

    va_start(arguments, reason);
    vsnprintf(words, sizeof words, reason, arguments);
    va_end(arguments);
    problem->code = code;
    sl_text_clear(&problem->reason);
    sl_text_add_string(&problem->reason, words);
    sl_text_clear(&problem->remedy);
    sl_text_add_string(&problem->remedy, remedy);
}

static bool take_text(const struct sl_column *column, const char *text,
                      size_t length, void *record, struct sl_problem *problem)
{
    if (column->is_key && length > SL_KEY_LONGEST) {
        sl_problem_set(problem, "key-length", "give it a shorter key",
                       "the key is %zu bytes long, %d are the most", length,
                       SL_KEY_LONGEST);
        return false;
    }
    *sl_field_text(column->field, record) = text;
    return true;
}

static bool in_range(const struct sl_field *field, double si)
{
    return si >= field->lowest - BOUND_SLACK * fabs(field->lowest) &&
           si <= field->highest + BOUND_SLACK * fabs(field->highest);
}

/* "6000", "1000000000" and not "1e+09"; digits people take in. */
static void add_figure(struct sl_text *text, double value)
{
    sl_text_addf(text, fabs(value) < 1e6 ? "%.6g" : "%.0f", value);
}

/* What an empty cell says: of a sum's addition that there is none, else that
 * the value is unknown; in a required column it says nothing. */
static const char *leave_empty(const struct sl_field *field)
{
    static const char addition[] = "_addition";
    size_t length = strlen(field->name), ending = sizeof addition - 1;

    if (field->required)
        return NULL;
    return length > ending && sl_same(field->name + length - ending, addition)
               ? "leave the cell empty for none"
               : "leave the cell empty where the value is unknown";
}

/* Go on with the remedy, where leaving the cell empty is one. */
static void or_leave_empty(const struct sl_column *column, const char *between,
                           struct sl_problem *problem)
{
    const char *advice = leave_empty(column->field);

    if (advice)
        sl_text_addf(&problem->remedy, "%s%s", between, advice);
}

static void tell_range(const struct sl_column *column,
                       struct sl_problem *problem)
{
    double low = column->field->lowest;
    double high = column->field->highest;

    if (column->unit) {
        low = sl_from_si(column->unit, low);
        high = sl_from_si(column->unit, high);
    }
    sl_problem_set(problem, "out-of-range",
                   column->unit ? "check the value and the unit in the header"
                                : "check the value",
                   "it is outside ");
    or_leave_empty(column, "; ", problem);
    add_figure(&problem->reason, low);
    sl_text_add_string(&problem->reason, " to ");
    add_figure(&problem->reason, high);
    if (column->unit)
        sl_text_addf(&problem->reason, " %s", column->unit->label);
}

/* The advice says why and, behind a semicolon, what to do. */
static void tell_number(const struct sl_column *column,
                        enum sl_number_outcome outcome,
                        struct sl_problem *problem)
{
    const char *advice = sl_number_advice(outcome);
    const char *remedy = strstr(advice, "; ");

    sl_problem_set(problem, "number-form", remedy ? remedy + 2 : "", "%.*s",
                   (int)(remedy ? (size_t)(remedy - advice) : strlen(advice)),
                   advice);
    if (outcome == SL_NUMBER_NOT_ONE)
        or_leave_empty(column, ", or ", problem);
}

static bool take_number(const struct sl_column *column, const char *text,
                        size_t length, void *record, struct sl_problem *problem)
{
    struct sl_number *number = sl_field_number(column->field, record);
    double value = 0;
    enum sl_number_outcome outcome = sl_number_parse(text, length, &value);

    if (outcome != SL_NUMBER_OK) {
        tell_number(column, outcome, problem);
        return false;
    }
    if (column->field->type == SL_FIELD_WHOLE && value != floor(value)) {
        sl_problem_set(problem, "not-whole", "write a whole number",
                       "it has a fraction; this column holds whole numbers");
        or_leave_empty(column, ", or ", problem);
        return false;
    }
    if (column->unit)
        value = sl_to_si(column->unit, value);
    if (!in_range(column->field, value)) {
        tell_range(column, problem);
        return false;
    }
    number->value = value;
    number->known = true;
    return true;
}

static bool take_grade(const struct sl_column *column, const char *text,
                       size_t length, void *record, struct sl_problem *problem)
{
    char grade = length == 1 ? text[0] : '?';

    if (grade >= 'a' && grade <= 'e')
        grade = (char)(grade - 'a' + 'A');
    if (grade < 'A' || grade > 'E') {
        sl_problem_set(problem, "grade",
                       "write a letter from A (best known) to E (least), or "
                       "leave the cell empty",
                       "a grade is one of A, B, C, D, E");
        return false;
    }
    sl_field_number(column->field, record)->grade = grade;
    return true;
}

static void tell_all(const struct sl_words *words, struct sl_text *remedy)
{
    sl_text_add_string(remedy, "write one of: ");
    for (size_t i = 0; i < words->count; i++)
        sl_text_addf(remedy, "%s%s", i ? "; " : "", words->words[i]);
}

static bool is_told(const size_t *told, size_t count, size_t word)
{
    for (size_t i = 0; i < count; i++)
        if (told[i] == word)
            return true;
    return false;
}

/* The nearest word not told yet; of equals the one listed first. */
static size_t nearest(const struct sl_words *words, const char *text,
                      size_t length, const size_t *told, size_t count)
{
    size_t best = words->count;

    for (size_t i = 0; i < words->count; i++)
        if (!is_told(told, count, i) &&
            (best == words->count ||
             sl_is_nearer(text, length, words->words[i], words->words[best])))
            best = i;
    return best;
}

static void tell_nearest(const struct sl_words *words, const char *text,
                         size_t length, struct sl_text *remedy)
{
    size_t told[WORDS_NEAR];

    sl_text_add_string(remedy, "the nearest words are: ");
    for (size_t n = 0; n < WORDS_NEAR; n++) {
        told[n] = nearest(words, text, length, told, n);
        sl_text_addf(remedy, "%s%s", n ? "; " : "", words->words[told[n]]);
    }
}

static bool take_word(const struct sl_column *column,
                      const struct sl_words *words, const char *text,
                      size_t length, void *record, struct sl_problem *problem)
{
    int word = sl_word_find(words, text, length);

    if (word) {
        *sl_field_word(column->field, record) = word;
        return true;
    }
    sl_problem_set(problem, "unknown-word", "",
                   "it is none of this column's words");
    if (words->count <= WORDS_TOLD)
        tell_all(words, &problem->remedy);
    else
        tell_nearest(words, text, length, &problem->remedy);
    return false;
}

bool sl_cell_take(const struct sl_column *column,
                  const struct sl_vocabularies *vocabularies, const char *text,
                  size_t length, void *record, struct sl_problem *problem)
{
    const struct sl_field *field = column->field;

    if (length == 0) {
        if (!field->required || column->is_grade)
            return true;
        sl_problem_set(problem, "required-missing",
                       "fill it in; nothing can stand for it",
                       "the cell is empty, and the column is required");
        return false;
    }
    if (column->is_grade)
        return take_grade(column, text, length, record, problem);
    switch (field->type) {
    case SL_FIELD_TEXT:
        return take_text(column, text, length, record, problem);
    case SL_FIELD_NUMBER:
    case SL_FIELD_WHOLE:
        return take_number(column, text, length, record, problem);
    case SL_FIELD_WORD:
        break;
    }
    return take_word(column, &vocabularies->of[field->vocabulary], text, length,
                     record, problem);
}
