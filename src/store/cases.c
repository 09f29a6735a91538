#include "store/cases.h"

#include <math.h>
#include <stddef.h>

/* A column, and the member of a struct sl_case or sl_terms it holds. */
struct sl_case_column {
    const char *names[SL_CORNER_COUNT];
    size_t offset;
};

static const struct sl_case_column figures[] = {
    {{"flow_typical", "flow_adverse", "flow_favourable"},
     offsetof(struct sl_case, flow)},
    {{"npsha_typical", "npsha_adverse", "npsha_favourable"},
     offsetof(struct sl_case, terms.npsha)},
    {{"npshr_typical", "npshr_adverse", "npshr_favourable"},
     offsetof(struct sl_case, npshr)},
    {{"required_typical", "required_adverse", "required_favourable"},
     offsetof(struct sl_case, required)},
    {{"margin_typical", "margin_adverse", "margin_favourable"},
     offsetof(struct sl_case, margin)},
    {{"surplus_typical", "surplus_adverse", "surplus_favourable"},
     offsetof(struct sl_case, surplus)},
};

static const struct {
    const char *name;
    size_t offset; /* in struct sl_terms */
} terms[] = {
    {"atmosphere", offsetof(struct sl_terms, atmosphere)},
    {"barometer", offsetof(struct sl_terms, barometer)},
    {"gauge", offsetof(struct sl_terms, gauge)},
    {"elevation", offsetof(struct sl_terms, elevation)},
    {"velocity", offsetof(struct sl_terms, velocity)},
    {"friction", offsetof(struct sl_terms, friction)},
    {"minor", offsetof(struct sl_terms, minor)},
    {"vapour", offsetof(struct sl_terms, vapour)},
    {"gas", offsetof(struct sl_terms, gas)},
};

#define COUNT_OF(list) (sizeof(list) / sizeof((list)[0]))

static const double *held(const void *thing, size_t offset)
{
    return (const double *)((const char *)thing + offset);
}

static double *holder(void *thing, size_t offset)
{
    return (double *)((char *)thing + offset);
}

void sl_bind_cases(struct sl_statement *statement,
                   const struct sl_case cases[SL_CORNER_COUNT])
{
    for (size_t i = 0; i < COUNT_OF(figures); i++)
        for (int corner = 0; corner < SL_CORNER_COUNT; corner++)
            sl_bind_number(statement, figures[i].names[corner],
                           *held(&cases[corner], figures[i].offset));
    for (size_t i = 0; i < COUNT_OF(terms); i++)
        sl_bind_number(statement, terms[i].name,
                       *held(&cases[SL_TYPICAL].terms, terms[i].offset));
}

void sl_read_cases(struct sl_statement *statement,
                   struct sl_case cases[SL_CORNER_COUNT])
{
    for (size_t i = 0; i < COUNT_OF(terms); i++) {
        for (int corner = 0; corner < SL_CORNER_COUNT; corner++)
            *holder(&cases[corner].terms, terms[i].offset) = NAN;
        *holder(&cases[SL_TYPICAL].terms, terms[i].offset) =
            sl_read_number(statement, terms[i].name);
    }
    for (size_t i = 0; i < COUNT_OF(figures); i++)
        for (int corner = 0; corner < SL_CORNER_COUNT; corner++)
            *holder(&cases[corner], figures[i].offset) =
                sl_read_number(statement, figures[i].names[corner]);
}
