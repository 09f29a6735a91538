/* The ranked results in sentences a board can read.
 *
 * Every function appends to `text`.  Heads in m or ft, flows in L/s or gpm,
 * pressures in kPa or psi, by `units`; heads and levels to one decimal. */
#ifndef SL_RANKER_WORDS_H
#define SL_RANKER_WORDS_H

#include <stdbool.h>
#include <stddef.h>

#include "base/text.h"
#include "base/units.h"
#include "model/row.h"

/* The case the words and the lists tell of: the typical one, or, where that
 * has no honest figure, the favourable one, which is then "at least". */
enum sl_corner sl_words_corner(const struct sl_pump_row *row);

/* Why: "low-level cut-out leaves 2.1 m over the eye; suction losses take
 * 1.4 m; NPSHR 6.3 m at 212 L/s".  Names the source, then each term that
 * takes a large share of the air's head, then what the pump needs.  What is
 * not proven begins with the evaluator's reason. */
void sl_words_why(const struct sl_pump_row *row, enum sl_unit_system units,
                  struct sl_text *text);
/* The term that takes most, "suction losses 1.4 m"; "the pump's own need"
 * when no term takes much; nothing when the terms are unknown. */
void sl_words_leading_term(const struct sl_pump_row *row,
                           enum sl_unit_system units, struct sl_text *text);
/* How sure: "nothing assumed" or "3 assumed, 1 unknown". */
void sl_words_confidence(const struct sl_pump_row *row, struct sl_text *text);
/* What to do next: "find out the elevation of the impeller eye", "confirm
 * ... on site; then look into ...". */
void sl_words_next_step(const struct sl_pump_row *row, struct sl_text *text);
/* "summer low, with P-2, P-3, solved flow, low-level cut-out"; says so where
 * not every set was tried */
void sl_words_case(const struct sl_pump_row *row, struct sl_text *text);

/* The running set that governs, "with P-2, P-3"; nothing where none does. */
void sl_words_set(const struct sl_pump_row *row, struct sl_text *text);
/* "the worst of all 7 sets"; says so where not all were tried. */
void sl_words_sets_tried(const struct sl_pump_row *row, struct sl_text *text);
/* What each rule of the summary says: "fixed head: clear; ..."; nothing when
 * that was not kept. */
void sl_words_rule_states(const struct sl_pump_row *row,
                          const struct sl_summary *summary,
                          struct sl_text *text);
/* What stands beside the margin: "flags: submergence; by a rule (from
 * memory): thin"; nothing where nothing does.  Only the rules that find the
 * pump short or thin, and not the one ranked on. */
void sl_words_beside(const struct sl_pump_row *row,
                     const struct sl_summary *summary, struct sl_text *text);
/* What the rule of that place says of the pump; false where it is not about
 * it, or that was not kept. */
bool sl_rule_state(const struct sl_pump_row *row, size_t rule,
                   enum sl_state *state);
/* "lowest source level", and how the search for it ended. */
const char *sl_words_limit(enum sl_limit_id id, const struct sl_pump_row *row);
const char *sl_words_limit_end(enum sl_limit_end end);

/* One sentence of what a state means. */
const char *sl_words_state(enum sl_state state);
/* The words of an inventory column, "the impeller eye's ..."; the column
 * itself when it is none that a balance is made from. */
const char *sl_words_column(const char *column);
/* A default's field in words; the field itself where there are none. */
const char *sl_words_default(const char *field);
/* How far a published value can be trusted, from its mark. */
const char *sl_words_trust(char trust);
/* Its name, and "(from memory)" or "(the owner's own)" where it is. */
void sl_words_rule_name(const struct sl_margin_rule *rule,
                        struct sl_text *text);
/* The rule: "NPSHA at least 1.30 x NPSHR, and at least NPSHR + 1.5 m". */
void sl_words_rule(const struct sl_margin_rule *rule, enum sl_unit_system units,
                   struct sl_text *text);
/* A case to audit: "source at its low level, summer water, ...". */
void sl_words_condition(const struct sl_condition *condition,
                        enum sl_unit_system units, struct sl_text *text);

#endif
