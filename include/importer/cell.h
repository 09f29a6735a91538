/* One cell into its member of a record. */
#ifndef SL_IMPORTER_CELL_H
#define SL_IMPORTER_CELL_H

#include "importer/columns.h"

/* Longer keys are rejected: struct sl_recall has room for this many bytes. */
#define SL_KEY_LONGEST 255

/* What is wrong, in the words of a finding.  The texts are reused from one
 * problem to the next. */
struct sl_problem {
    const char *code;
    struct sl_text reason;
    struct sl_text remedy;
};
void sl_problem_release(struct sl_problem *problem);
void sl_problem_set(struct sl_problem *problem, const char *code,
                    const char *remedy, const char *reason, ...)
    __attribute__((format(printf, 4, 5)));

/* Take the cell: `text` ends in NUL and lives as long as the record needs
 * it.  An empty cell leaves the member unknown.  False when the cell cannot
 * be taken: then the problem says why. */
bool sl_cell_take(const struct sl_column *column,
                  const struct sl_vocabularies *vocabularies, const char *text,
                  size_t length, void *record, struct sl_problem *problem);

#endif
