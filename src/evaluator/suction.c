/* The suction side of a plan: the pipes from the source to the pump, their
 * surfaces and fittings, or the inlet of a pump that stands in its water. */
#include <math.h>

#include "base/text.h"
#include "evaluator/plan.h"
#include "hydraulics/minor_loss.h"

static size_t path_length(const struct sl_dossier_pipe *pipe)
{
    size_t count = 0;

    for (; pipe; pipe = pipe->draws_from)
        count++;
    return count;
}

/* The surface of one pipe; returns where it comes from. */
static enum sl_provenance surface_of(const struct sl_plan *plan,
                                     struct sl_path_pipe *place,
                                     const struct sl_default **row)
{
    const struct sl_pipe *pipe = &place->pipe->record;

    if (pipe->roughness.known) {
        place->roughness = sl_exactly(pipe->roughness.value);
        return SL_RECORDED;
    }
    if (pipe->hazen_williams_c.known) {
        place->hazen_williams = true;
        place->roughness = sl_no_figure();
        return SL_RECORDED;
    }
    if (pipe->material) {
        bool assumed;

        place->roughness =
            sl_plan_roughness(plan, pipe->material, pipe->condition,
                              &pipe->year_installed, sl_recorded(&pipe->bore),
                              plan->condition->suction_friction, &assumed);
        return assumed ? SL_ASSUMED : SL_DERIVED;
    }
    *row = sl_default_find(plan->tables, "suction_roughness", "");
    place->roughness = *row ? (*row)->value : sl_no_figure();
    return *row ? SL_ASSUMED : SL_UNKNOWN;
}

/* The sum of K over a pipe's fittings: the owner's K as it is, the table's
 * with its interval, more in small bores. */
static enum sl_provenance fittings_of(const struct sl_plan *plan,
                                      struct sl_path_pipe *place)
{
    enum sl_provenance provenance = SL_RECORDED;
    const struct sl_dossier_pipe *pipe = place->pipe;
    double bore = sl_recorded(&pipe->record.bore);

    place->minor_k = sl_exactly(0);
    for (size_t i = 0; i < pipe->fitting_count; i++) {
        const struct sl_fitting *fitting = &pipe->fittings[i];
        double count = fitting->count.known ? fitting->count.value : 1;
        const struct sl_interval *k =
            &plan->tables->fittings[fitting->fitting - 1].k;

        if (fitting->k.known) {
            double known = count * fitting->k.value;

            place->minor_k.typical += known;
            place->minor_k.adverse += known;
            place->minor_k.favourable += known;
            continue;
        }
        provenance = SL_ASSUMED;
        place->minor_k.typical += count * sl_small_bore_k(k->typical, bore);
        place->minor_k.adverse += count * sl_small_bore_k(k->adverse, bore);
        place->minor_k.favourable +=
            count * sl_small_bore_k(k->favourable, bore);
    }
    return provenance;
}

/* The least certain of two: unknown, then assumed, derived, recorded. */
static enum sl_provenance weaker(enum sl_provenance a, enum sl_provenance b)
{
    if (a == SL_UNKNOWN || b == SL_UNKNOWN)
        return SL_UNKNOWN;
    return a > b ? a : b;
}

/* One measure of all pipes of the path, where every pipe has it. */
static void measure(struct sl_plan *plan, enum sl_input_id id, double value,
                    const char *rule)
{
    struct sl_input *input =
        sl_plan_set(plan, id, plan->path_count > 1 ? SL_DERIVED : SL_RECORDED,
                    sl_exactly(value), plan->path_count > 1 ? rule : "");

    input->kind = SL_KIND_PIPE;
    input->line = plan->pump->suction->record.line;
}

/* Where a measure is missing, the default suction loss stands in for what
 * cannot be worked out; it has no upper bound. */
static void stand_in(struct sl_plan *plan, enum sl_input_id id,
                     const char *rule)
{
    struct sl_input *input = sl_plan_default(plan, id, "suction_loss", "");

    plan->unmeasured = id;
    input->rule = rule;
}

static void measures(struct sl_plan *plan)
{
    double length = 0, bore = INFINITY;
    bool all_lengths = true, all_bores = true;

    for (size_t i = 0; i < plan->path_count; i++) {
        const struct sl_pipe *pipe = &plan->path[i].pipe->record;

        all_lengths = all_lengths && pipe->length.known;
        all_bores = all_bores && pipe->bore.known;
        length += pipe->length.value;
        bore = fmin(bore, pipe->bore.known ? pipe->bore.value : bore);
    }
    if (!all_bores)
        stand_in(plan, SL_IN_SUCTION_BORE,
                 "not recorded; the default suction loss stands in");
    else
        measure(plan, SL_IN_SUCTION_BORE, bore,
                "the narrowest pipe of the path");
    if (all_lengths)
        measure(plan, SL_IN_SUCTION_LENGTH, length,
                "all pipes of the path together");
    else if (all_bores)
        stand_in(plan, SL_IN_SUCTION_LENGTH,
                 "not recorded; the default suction loss stands in");
}

#define BY_MATERIAL "the roughest pipe of the path, by its material, condition "

static const char *surface_rule(enum sl_provenance provenance, char ageing,
                                const struct sl_interval *worst,
                                const struct sl_default *row)
{
    if (row)
        return row->source;
    if (provenance != SL_RECORDED && ageing == 'M')
        return BY_MATERIAL "and age; aged by the rates of the table, from "
                           "memory";
    if (provenance != SL_RECORDED && ageing == 'P')
        return BY_MATERIAL "and age; aged by the rates of the table, a "
                           "proposal";
    if (provenance != SL_RECORDED)
        return BY_MATERIAL "and age";
    return isnan(worst->typical) ? "C is recorded in its place"
                                 : "the roughest pipe of the path";
}

static void surfaces(struct sl_plan *plan)
{
    enum sl_provenance provenance = SL_RECORDED;
    const struct sl_default *row = NULL;
    struct sl_interval worst = sl_no_figure(); /* which fmax passes over */
    struct sl_input *input;

    for (size_t i = 0; i < plan->path_count; i++) {
        struct sl_path_pipe *place = &plan->path[i];

        provenance = weaker(provenance, surface_of(plan, place, &row));
        worst.typical = fmax(worst.typical, place->roughness.typical);
        worst.adverse = fmax(worst.adverse, place->roughness.adverse);
        worst.favourable = fmax(worst.favourable, place->roughness.favourable);
    }
    input = sl_plan_set(
        plan, SL_IN_SUCTION_ROUGHNESS, provenance, worst,
        surface_rule(provenance, sl_plan_ageing_trust(plan), &worst, row));
    input->row = row;
    input->kind = SL_KIND_PIPE;
    input->line = plan->pump->suction->record.line;
}

static void miss_rejected_fitting(struct sl_plan *plan)
{
    struct sl_input *input = &plan->inputs[SL_IN_SUCTION_MINOR];

    plan->path[plan->path_count - 1].minor_k.adverse = NAN;
    input->value.adverse = NAN;
    input->provenance = SL_UNKNOWN;
    input->rule = "a fitting of the path was rejected (see findings.csv); "
                  "what it loses is not counted";
}

/* A path on which no fitting is recorded still has some: the default sum,
 * on the pipe at the pump. A suction lift may hold a foot valve. */
static void fittings(struct sl_plan *plan)
{
    enum sl_provenance provenance = SL_RECORDED;
    struct sl_interval sum = sl_exactly(0);
    bool lift = plan->inputs[SL_IN_SOURCE_LEVEL].applies &&
                !(plan->inputs[SL_IN_SOURCE_LEVEL].value.typical >=
                  plan->inputs[SL_IN_DATUM].value.typical);
    struct sl_interval *at_pump = &plan->path[plan->path_count - 1].minor_k;
    size_t recorded = 0;
    bool rejected = false, bare = false;

    for (size_t i = 0; i < plan->path_count; i++) {
        struct sl_path_pipe *place = &plan->path[i];

        recorded += place->pipe->fitting_count;
        bare = bare || place->pipe->fitting_count == 0;
        rejected = rejected || place->pipe->rejected_fittings > 0;
        provenance = weaker(provenance, fittings_of(plan, place));
        sum.typical += place->minor_k.typical;
        sum.adverse += place->minor_k.adverse;
        sum.favourable += place->minor_k.favourable;
    }
    if (recorded)
        sl_plan_set(plan, SL_IN_SUCTION_MINOR,
                    bare && provenance == SL_RECORDED ? SL_DERIVED : provenance,
                    sum,
                    bare ? "the sum of K over the path's fittings; one of its "
                           "pipes has none on record, and none counts there"
                         : "the sum of K over the path's fittings");
    else
        *at_pump = sl_plan_default(plan, SL_IN_SUCTION_MINOR, "suction_minor_k",
                                   lift ? "suction lift" : "")
                       ->value;
    if (rejected)
        miss_rejected_fitting(plan);
}

static void piped(struct sl_plan *plan)
{
    const struct sl_dossier_pipe *pipe = plan->pump->suction;
    size_t count = path_length(pipe);

    plan->path = sl_arena_new(plan->arena, count, sizeof *plan->path);
    plan->path_count = count;
    for (size_t i = count; i-- > 0; pipe = pipe->draws_from)
        plan->path[i].pipe = pipe;
    measures(plan);
    surfaces(plan);
    fittings(plan);
}

/* The K of a bell, on its own diameter. */
static struct sl_interval bell_k(const struct sl_plan *plan)
{
    for (size_t i = 0; i < plan->tables->fitting_count; i++)
        if (sl_same(plan->tables->fittings[i].fitting, "bellmouth entrance"))
            return plan->tables->fittings[i].k;
    return sl_no_figure();
}

static void stands_in_its_water(struct sl_plan *plan)
{
    const struct sl_pump *pump = &plan->pump->record;

    sl_plan_set(plan, SL_IN_SUCTION_PIPING, SL_DERIVED, sl_exactly(0),
                "it stands in its water: no suction pipe");
    if (!pump->inlet_diameter.known) {
        sl_plan_default(plan, SL_IN_SUCTION_MINOR, "wet_pit_inlet_loss", "");
        return;
    }
    plan->inlet_diameter = pump->inlet_diameter.value;
    sl_plan_set(plan, SL_IN_SUCTION_MINOR, SL_ASSUMED, bell_k(plan),
                "K of a bellmouth, on the inlet's diameter");
}

static bool wet_installed(const struct sl_plan *plan)
{
    int make_up = plan->pump->record.make_up;
    int installation = plan->dossier->record.installation;
    bool wet_make_up =
        make_up == SL_VERTICAL_TURBINE || make_up == SL_SUBMERSIBLE;

    if (installation == SL_WET_PIT)
        return wet_make_up || make_up == 0;
    return installation == 0 && wet_make_up;
}

void sl_plan_suction(struct sl_plan *plan)
{
    if (plan->pump->suction)
        piped(plan);
    else if (wet_installed(plan))
        stands_in_its_water(plan);
    else
        stand_in(plan, SL_IN_SUCTION_PIPING,
                 "no suction pipe is recorded; the default suction loss "
                 "stands in");
}
