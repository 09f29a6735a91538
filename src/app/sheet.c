#include "app/sheet.h"

#include <math.h>

#include "app/sheet_parts.h"
#include "app/terminal.h"
#include "model/fields.h"
#include "ranker/words.h"

static void head(const struct sl_sheet *sheet, const char *name, double value,
                 const char *formula)
{
    char room[48];

    fprintf(sheet->stream, "  %-34s %12s   %s\n", name,
            sl_sheet_figure(sheet, SL_LENGTH, value, 2, room), formula);
}

static void title(const struct sl_sheet *sheet,
                  const struct sl_condition_result *condition,
                  const struct sl_pump_result *pump)
{
    FILE *stream = sheet->stream;
    const struct sl_station *station = &sheet->dossier->record;

    fputs("Pump ", stream);
    sl_print_safely(stream, pump->pump->record.pump_id);
    fputs(" of station ", stream);
    sl_print_safely(stream, station->station_id);
    if (station->name) {
        fputs(", ", stream);
        sl_print_safely(stream, station->name);
    }
    fprintf(stream, "\nCondition: %s\n", condition->condition->condition);
    fprintf(stream, "State: %s", sl_state_name(pump->state));
    if (pump->state == SL_UNPROVEN && pump->likely != SL_UNPROVEN)
        fprintf(stream, " (likely %s)", sl_state_name(pump->likely));
    if (pump->reason[0]) {
        fputs(": ", stream);
        sl_print_safely(stream, pump->reason);
    }
    fputs("\n\n", stream);
}

/* Where NPSHR comes from: a curve brought to another speed rests on the row of
 * its exponent. */
static const char *npshr_key(const struct sl_pump_result *pump)
{
    bool scaled = pump->inputs[SL_IN_NPSHR].row != NULL;

    switch (pump->npshr_basis) {
    case SL_NPSHR_CURVE:
        return scaled ? "F18, F19" : "F19";
    case SL_NPSHR_RATED:
        return scaled ? "rated point, F18" : "rated point";
    case SL_NPSHR_ESTIMATE:
        return "F13";
    case SL_NPSHR_NONE:
        break;
    }
    return "not on record";
}

/* How the air, the surface, the pipes make up NPSHA: formula keys are those
 * of docs/formulas.md. */
static void balance(const struct sl_sheet *sheet,
                    const struct sl_pump_result *pump)
{
    const struct sl_case *typical = &pump->cases[SL_TYPICAL];
    const struct sl_terms *terms = &typical->terms;
    struct sl_text rule = {0};
    char room[48];

    fprintf(sheet->stream,
            "Head balance (F1) at the typical values; flow %s, %s; source "
            "by %s",
            sl_sheet_figure(sheet, SL_FLOW, typical->flow, 1, room),
            sl_flow_basis_name(pump->flow_basis),
            sl_source_basis_name(pump->source_basis));
    if (pump->governing.words) {
        fputs("; running ", sheet->stream);
        sl_print_safely(sheet->stream, pump->governing.words);
    }
    putc('\n', sheet->stream);
    head(sheet, "standard air at the site", terms->atmosphere, "F6, F3");
    head(sheet, "its fall in a storm", terms->barometer, "F1, F3");
    head(sheet, "gauge pressure of the source", terms->gauge, "F1, F3");
    head(sheet, "source over the impeller eye", terms->elevation, "F1");
    head(sheet, "velocity head at the main's gauge", terms->velocity, "F24");
    head(sheet, "friction of the suction", terms->friction, "F7, F8 or F9");
    head(sheet, "fittings of the suction", terms->minor, "F24, F30");
    head(sheet, "vapour pressure", terms->vapour, "F2, F3");
    head(sheet, "allowance for gas", terms->gas, "F1");
    head(sheet, "NPSHA", terms->npsha, "the sum");
    head(sheet, "NPSHR (NPSH3)", typical->npshr, npshr_key(pump));
    head(sheet, "margin", typical->margin, "NPSHA - NPSHR");
    sl_words_rule_name(sheet->rule, &rule);
    head(sheet, "the rule asks for an NPSHA of", typical->required,
         sl_text_string(&rule));
    head(sheet, "surplus over the rule", typical->surplus, sheet->rule->source);
    sl_text_release(&rule);
}

static void corner(const struct sl_sheet *sheet, const char *name,
                   const struct sl_case *solved)
{
    char flow[48], npsha[48], npshr[48], margin[48], surplus[48];

    fprintf(sheet->stream, "  %-11s %12s %11s %11s %11s %11s\n", name,
            sl_sheet_figure(sheet, SL_FLOW, solved->flow, 1, flow),
            sl_sheet_figure(sheet, SL_LENGTH, solved->terms.npsha, 2, npsha),
            sl_sheet_figure(sheet, SL_LENGTH, solved->npshr, 2, npshr),
            sl_sheet_figure(sheet, SL_LENGTH, solved->margin, 2, margin),
            sl_sheet_figure(sheet, SL_LENGTH, solved->surplus, 2, surplus));
}

static void corners(const struct sl_sheet *sheet,
                    const struct sl_pump_result *pump)
{
    fprintf(sheet->stream,
            "\nWith every unknown at one end\n  %-11s %12s %11s %11s %11s "
            "%11s\n",
            "end", "flow", "NPSHA", "NPSHR", "margin", "surplus");
    corner(sheet, "favourable", &pump->cases[SL_FAVOURABLE]);
    corner(sheet, "typical", &pump->cases[SL_TYPICAL]);
    corner(sheet, "adverse", &pump->cases[SL_ADVERSE]);
}

static void pipe_line(const struct sl_sheet *sheet,
                      const struct sl_pipe_loss *loss)
{
    char flow[48], velocity[48], friction[48], minor[48], roughness[48];
    char reynolds[48], factor[48];

    fputs("  ", sheet->stream);
    sl_print_safely(sheet->stream, loss->pipe->record.pipe_id);
    fprintf(sheet->stream,
            ": flow %s, velocity %s, Re %s, roughness %s, f %s, friction "
            "%s, K %.2f, fittings %s (suction_pipes.csv:%ld)\n",
            sl_sheet_figure(sheet, SL_FLOW, loss->flow, 1, flow),
            sl_sheet_figure(sheet, SL_VELOCITY, loss->velocity, 2, velocity),
            sl_sheet_figure(sheet, SL_PURE, loss->reynolds, 0, reynolds),
            sl_sheet_figure(sheet, SL_BORE, loss->roughness, 3, roughness),
            sl_sheet_figure(sheet, SL_PURE, loss->factor, 5, factor),
            sl_sheet_figure(sheet, SL_LENGTH, loss->friction, 3, friction),
            loss->minor_k,
            sl_sheet_figure(sheet, SL_LENGTH, loss->minor, 3, minor),
            loss->pipe->record.line);
}

static void pipes(const struct sl_sheet *sheet,
                  const struct sl_pump_result *pump)
{
    if (pump->loss_count == 0)
        return;
    fputs("\nSuction pipes, from the source to the pump\n", sheet->stream);
    for (size_t i = 0; i < pump->loss_count; i++)
        pipe_line(sheet, &pump->losses[i]);
}

/* A bore that is recorded is shown as a bore; one that is not has a suction
 * loss standing in, which is a head. */
static enum sl_quantity quantity_of(const struct sl_input *input)
{
    if (input->id == SL_IN_SUCTION_BORE && input->provenance != SL_ASSUMED &&
        input->provenance != SL_UNKNOWN)
        return SL_BORE;
    return sl_input_quantity(input->id);
}

static void default_used(FILE *stream, const struct sl_default *row)
{
    if (row)
        fprintf(stream, " [default %s%s%s, trust %c]", row->field,
                row->circumstance[0] ? ", " : "", row->circumstance,
                row->trust);
}

/* A low barometer is on record as a pressure, and counts as a part of the
 * standard air. */
static void recorded_barometer(const struct sl_sheet *sheet,
                               const struct sl_input *input)
{
    double fall = input->value.typical;
    char pressure[SL_FIGURE_ROOM], part[SL_FIGURE_ROOM];

    fprintf(sheet->stream, " %s: %s of the standard air %s it",
            sl_sheet_figure(sheet, SL_PRESSURE,
                            sheet->dossier->record.barometer_low.value, 1,
                            pressure),
            sl_sheet_figure(sheet, SL_PURE, fabs(fall), 3, part),
            fall < 0 ? "above" : "below");
}

/* "2.40 m" or "2.40 m (1.10 m at best, 3.00 m at worst)" */
static void input_value(const struct sl_sheet *sheet,
                        const struct sl_input *input)
{
    enum sl_quantity quantity = quantity_of(input);
    int decimals =
        input->id == SL_IN_RUNNING_TOGETHER ? 0 : sl_sheet_decimals(quantity);
    char typical[SL_FIGURE_ROOM], adverse[SL_FIGURE_ROOM];
    char favourable[SL_FIGURE_ROOM];
    FILE *stream = sheet->stream;

    if (!isnan(input->value.typical) && input->id != SL_IN_SOURCE_KIND)
        fprintf(stream, " %s",
                sl_sheet_figure(sheet, quantity, input->value.typical, decimals,
                                typical));
    if (!(input->value.adverse == input->value.favourable) &&
        !isnan(input->value.favourable))
        fprintf(stream, " (%s at best, %s at worst)",
                sl_sheet_figure(sheet, quantity, input->value.favourable,
                                decimals, favourable),
                isnan(input->value.adverse)
                    ? "no bound"
                    : sl_sheet_figure(sheet, quantity, input->value.adverse,
                                      decimals, adverse));
}

/* What it is, and where it comes from. */
static void input_line(const struct sl_sheet *sheet,
                       const struct sl_input *input)
{
    FILE *stream = sheet->stream;

    fprintf(stream, "  %-42s %s", sl_input_words(input->id),
            sl_provenance_name(input->provenance));
    if (input->id == SL_IN_BAROMETER && input->provenance == SL_RECORDED)
        recorded_barometer(sheet, input);
    else
        input_value(sheet, input);
    if (input->line)
        fprintf(stream, ", %s:%ld", sl_record_kind(input->kind)->file,
                input->line);
    if (input->rule && input->rule[0])
        fprintf(stream, "; %s", input->rule);
    default_used(stream, input->row);
    default_used(stream, input->other);
    putc('\n', stream);
}

static void inputs(const struct sl_sheet *sheet,
                   const struct sl_pump_result *pump)
{
    fputs("\nWhat goes in, and where it comes from\n", sheet->stream);
    for (int i = 0; i < SL_INPUT_COUNT; i++)
        if (pump->inputs[i].applies)
            input_line(sheet, &pump->inputs[i]);
    if (!pump->leading_unknown)
        return;
    fprintf(sheet->stream, "Find out first: %s%s\n",
            sl_input_words(pump->leading_unknown->id),
            pump->leading_unknown->settles ? "; it alone could settle this"
                                           : "");
}

void sl_sheet_print(const struct sl_sheet *sheet,
                    const struct sl_condition_result *condition,
                    const struct sl_pump_result *pump)
{
    title(sheet, condition, pump);
    balance(sheet, pump);
    corners(sheet, pump);
    sl_sheet_sets(sheet, pump);
    sl_sheet_checks(sheet, pump);
    sl_sheet_limits(sheet, pump);
    sl_sheet_rules(sheet, pump);
    pipes(sheet, pump);
    inputs(sheet, pump);
    putc('\n', sheet->stream);
}
