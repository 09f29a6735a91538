#include "importer/answers.h"

#include <string.h>

/* How a referring field is spoken of, and the file it refers to. */
static const struct reference {
    const char *field;
    const char *words;
    const char *no_such;
    enum sl_kind to;
} references[] = {
    {"station_id", "its station", "no-such-station_id", SL_KIND_STATION},
    {"curve_id", "its curve", "no-such-curve_id", SL_KIND_CURVE},
    {"suction_pipe_id", "its suction pipe", "no-such-suction_pipe_id",
     SL_KIND_PIPE},
    {"draws_from", "the pipe it draws from", "no-such-draws_from",
     SL_KIND_PIPE},
    {"pipe_id", "its pipe", "no-such-pipe_id", SL_KIND_PIPE},
};

static const struct reference *reference_of(const char *field)
{
    const size_t count = sizeof references / sizeof references[0];

    for (size_t i = 0; i < count; i++)
        if (field && strcmp(references[i].field, field) == 0)
            return &references[i];
    return &references[0];
}

static void no_such(const struct sl_answer *answer, const char *value,
                    struct sl_problem *problem)
{
    const struct reference *reference = reference_of(answer->field);

    sl_problem_set(problem, reference->no_such,
                   "correct the key, or add the record it names",
                   "%s has no \"%s\"", sl_record_kind(reference->to)->file,
                   value);
}

static void reference_rejected(const struct sl_answer *answer,
                               const char *value, struct sl_problem *problem)
{
    sl_problem_set(problem, "reference-rejected",
                   "mend that record first; this one may be in order",
                   "%s \"%s\" was rejected (%s:%ld)",
                   reference_of(answer->field)->words, value, answer->file,
                   answer->line);
}

/* The key of a curve's point is its curve and its flow. */
static void duplicate(const struct sl_record_kind *kind,
                      const struct sl_answer *answer, const char *value,
                      struct sl_problem *problem)
{
    if (kind == sl_record_kind(SL_KIND_CURVE))
        sl_problem_set(problem, "duplicate-key", "keep one of the two points",
                       "the curve \"%s\" has a point at this flow already "
                       "(%s:%ld)",
                       value, kind->file, answer->line);
    else
        sl_problem_set(problem, "duplicate-key",
                       "keep one of the two records, or give each its own key",
                       "\"%s\" is taken by the record at %s:%ld", value,
                       kind->file, answer->line);
}

static void other_station(const struct sl_answer *answer, const char *value,
                          struct sl_problem *problem)
{
    sl_problem_set(problem, "other-station",
                   "name a record of the same station, or correct the "
                   "station_id of one of them",
                   "%s \"%s\" belongs to another station (%s:%ld)",
                   reference_of(answer->field)->words, value, answer->file,
                   answer->line);
}

enum sl_fate sl_answer_fate(const struct sl_record_kind *kind,
                            const struct sl_answer *answer, const char *value,
                            struct sl_problem *problem)
{
    switch (answer->kind) {
    case SL_ANSWER_KEPT:
        return SL_KEPT;
    case SL_ANSWER_REFERENCE_OUT_OF_SCOPE:
        sl_problem_set(problem, "reference-out-of-scope", "",
                       "%s \"%s\" is out of scope (%s:%ld)",
                       reference_of(answer->field)->words, value, answer->file,
                       answer->line);
        return SL_OUT_OF_SCOPE;
    case SL_ANSWER_DUPLICATE:
        duplicate(kind, answer, value, problem);
        break;
    case SL_ANSWER_NO_SUCH:
        no_such(answer, value, problem);
        break;
    case SL_ANSWER_REFERENCE_REJECTED:
        reference_rejected(answer, value, problem);
        break;
    case SL_ANSWER_OTHER_STATION:
        other_station(answer, value, problem);
        break;
    case SL_ANSWER_CYCLE:
        sl_problem_set(problem, "cycle",
                       "follow draws_from from pipe to pipe; it must end at "
                       "one that draws from the source",
                       "drawing from \"%s\" leads back to this pipe", value);
        break;
    }
    return SL_REJECTED;
}
