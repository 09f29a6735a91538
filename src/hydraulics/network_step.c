/* Newton's step for the flows of a network.
 *
 * Where the curves fall, each unit's lack of head, times its count, is the
 * slope of one convex potential of the flows; its least point between
 * nought and the reach of each curve is the solution (F12).  The matrix of
 * its second derivatives is symmetric, and positive. */
#include <math.h>

#include "hydraulics/network_parts.h"

/* A pivot that is less than this share of the diagonal is rounding. */
#define PIVOT_LEAST 1e-13

struct matrix {
    double at[SL_NETWORK_UNITS][SL_NETWORK_UNITS]; /* lower half */
};

static double count_of(const struct sl_network_work *work, size_t unit)
{
    return work->network->units[unit].count;
}

/* One pipe's slope into the rows of the units it feeds. */
static void add_pipe(const struct sl_network_work *work,
                     const struct sl_free_units *freed, size_t pipe,
                     struct matrix *m)
{
    uint64_t fed = work->fed[pipe];
    double slope = work->pipe_slope[pipe];
    bool own = work->network->pipes[pipe].own;
    size_t i, j;

    for (i = 0; i < freed->count; i++) {
        double count = count_of(work, freed->unit[i]);

        if (!(fed >> freed->unit[i] & 1))
            continue;
        if (own) {
            m->at[i][i] += count * slope;
            continue;
        }
        for (j = 0; j <= i; j++)
            if (fed >> freed->unit[j] & 1)
                m->at[i][j] += count * count_of(work, freed->unit[j]) * slope;
    }
}

/* Where the curve of a unit rises the matrix may not be positive.  Then its
 * slope is taken as if it fell, so that the step falls. */
static void fill(const struct sl_network_work *work,
                 const struct sl_free_units *freed, bool as_if_falling,
                 struct matrix *m)
{
    size_t i, j;

    for (i = 0; i < freed->count; i++) {
        double count = count_of(work, freed->unit[i]);
        double slope = work->head_slope[freed->unit[i]];

        for (j = 0; j <= i; j++)
            m->at[i][j] =
                count * count_of(work, freed->unit[j]) * work->delivery_slope;
        m->at[i][i] += count * (as_if_falling ? fabs(slope) : -slope);
    }
    for (i = 0; i < work->used_count; i++)
        add_pipe(work, freed, work->used[i], m);
}

/* What stands in for a pivot that is not positive: the slope of the whole
 * curve. */
static double whole_slope(const struct sl_network_work *work, size_t unit)
{
    return count_of(work, unit) * (work->largest_head + 1.0) / work->most[unit];
}

/* L D L' of the rows and columns of those `left`, in place of them.
 * Whether it is positive. */
static bool factorise(const struct sl_network_work *work,
                      const struct sl_free_units *freed,
                      const struct sl_free_units *left, struct matrix *m)
{
    bool positive = true;
    size_t i, j, k;

    for (j = 0; j < left->count; j++) {
        double pivot = m->at[j][j];

        for (k = 0; k < j; k++)
            pivot -= m->at[j][k] * m->at[j][k] * m->at[k][k];
        if (pivot < 0.0)
            positive = false;
        if (!(fabs(pivot) > PIVOT_LEAST * fabs(m->at[j][j]))) {
            pivot = whole_slope(work, freed->unit[left->unit[j]]);
            positive = false;
        }
        for (i = j + 1; i < left->count; i++) {
            double sum = m->at[i][j];

            for (k = 0; k < j; k++)
                sum -= m->at[i][k] * m->at[j][k] * m->at[k][k];
            m->at[i][j] = sum / pivot;
        }
        m->at[j][j] = pivot;
    }
    return positive;
}

static void substitute(const struct matrix *m, size_t count, double *b)
{
    size_t i, k;

    for (i = 0; i < count; i++)
        for (k = 0; k < i; k++)
            b[i] -= m->at[i][k] * b[k];
    for (i = 0; i < count; i++)
        b[i] /= m->at[i][i];
    for (i = count; i-- > 0;)
        for (k = i + 1; k < count; k++)
            b[i] -= m->at[k][i] * b[k];
}

static double entry(const struct matrix *m, size_t i, size_t j)
{
    return i >= j ? m->at[i][j] : m->at[j][i];
}

double sl_network_within(const struct sl_network_work *work, size_t unit,
                         double flow)
{
    return fmin(fmax(flow, 0.0), work->most[unit]);
}

/* Slope of the potential along the step. */
double sl_network_along(const struct sl_network_work *work,
                        const struct sl_free_units *freed, const double *step)
{
    double sum = 0.0;
    size_t i;

    for (i = 0; i < freed->count; i++)
        sum += count_of(work, freed->unit[i]) * work->lack[freed->unit[i]] *
               step[i];
    return sum;
}

/* Newton's step of those `left` (places in `freed`), where the others of
 * `freed` take the step they have.  Whether the matrix is positive. */
static bool step_of_left(const struct sl_network_work *work,
                         const struct sl_free_units *freed,
                         const struct sl_free_units *left,
                         const struct matrix *m, double *step)
{
    struct matrix part;
    double b[SL_NETWORK_UNITS];
    bool positive;
    size_t i, j;

    for (i = 0; i < left->count; i++) {
        size_t at = left->unit[i];

        step[at] = 0.0;
        for (j = 0; j <= i; j++)
            part.at[i][j] = m->at[at][left->unit[j]];
    }
    for (i = 0; i < left->count; i++) {
        size_t at = left->unit[i], unit = freed->unit[at];

        b[i] = -count_of(work, unit) * work->lack[unit];
        for (j = 0; left->count < freed->count && j < freed->count; j++)
            b[i] -= entry(m, at, j) * step[j];
    }
    positive = factorise(work, freed, left, &part);
    substitute(&part, left->count, b);
    for (i = 0; i < left->count; i++)
        step[left->unit[i]] = b[i];
    return positive;
}

/* Ends the step of each of those `left` that would leave its bounds there,
 * and takes it out of them.  Whether there was one. */
static bool bound(const struct sl_network_work *work,
                  const struct sl_free_units *freed, struct sl_free_units *left,
                  double *step)
{
    size_t before = left->count, i;

    left->count = 0;
    for (i = 0; i < before; i++) {
        size_t at = left->unit[i], unit = freed->unit[at];
        double to = work->flow[unit] + step[at];
        double within = sl_network_within(work, unit, to);

        if (within == to)
            left->unit[left->count++] = at;
        else
            step[at] = within - work->flow[unit];
    }
    return left->count < before;
}

/* Each unit by itself: a step that falls for certain. */
static void step_alone(const struct sl_network_work *work,
                       const struct sl_free_units *freed,
                       const struct matrix *m, double *step)
{
    size_t i;

    for (i = 0; i < freed->count; i++) {
        size_t unit = freed->unit[i];
        double slope =
            m->at[i][i] > 0.0 ? m->at[i][i] : whole_slope(work, unit);
        double moved = -count_of(work, unit) * work->lack[unit] / slope;

        step[i] = sl_network_within(work, unit, work->flow[unit] + moved) -
                  work->flow[unit];
    }
}

/* Newton's step, bound after bound.  Whether its matrices are positive. */
static bool step_together(const struct sl_network_work *work,
                          const struct sl_free_units *freed,
                          const struct matrix *m, double *step)
{
    struct sl_free_units left;
    bool positive = true;

    for (left.count = 0; left.count < freed->count; left.count++)
        left.unit[left.count] = left.count;
    do
        positive = step_of_left(work, freed, &left, m, step) && positive;
    while (bound(work, freed, &left, step));
    return positive;
}

double sl_network_step(const struct sl_network_work *work,
                       const struct sl_free_units *freed, bool near_root,
                       double *step)
{
    struct matrix m;
    double falls;

    fill(work, freed, false, &m);
    if (!step_together(work, freed, &m, step) && !near_root) {
        fill(work, freed, true, &m);
        step_together(work, freed, &m, step);
    }
    falls = sl_network_along(work, freed, step);
    if (falls < 0.0 || near_root)
        return falls;
    step_alone(work, freed, &m, step);
    return sl_network_along(work, freed, step);
}
