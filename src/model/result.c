#include "model/result.h"

#include <math.h>

const char *sl_state_name(enum sl_state state)
{
    static const char *const names[] = {"short", "thin", "unproven", "clear"};

    return state < SL_STATE_COUNT ? names[state] : "unknown state";
}

const char *sl_provenance_name(enum sl_provenance provenance)
{
    static const char *const names[] = {"unknown", "recorded", "derived",
                                        "assumed"};

    return provenance <= SL_ASSUMED ? names[provenance] : "?";
}

const char *sl_flow_basis_name(enum sl_flow_basis basis)
{
    static const char *const names[] = {"solved", "recorded", "rated",
                                        "unknown"};

    return basis <= SL_FLOW_NONE ? names[basis] : "?";
}

const char *sl_npshr_basis_name(enum sl_npshr_basis basis)
{
    static const char *const names[] = {"curve", "rated point", "estimate",
                                        "unknown"};

    return basis <= SL_NPSHR_NONE ? names[basis] : "?";
}

const char *sl_source_basis_name(enum sl_source_basis basis)
{
    static const char *const names[] = {
        "low-level cut-out", "lowest level on record", "normal level",
        "lowest pressure",   "normal pressure",        "unknown",
    };

    return basis <= SL_SOURCE_UNKNOWN ? names[basis] : "?";
}

const char *sl_curve_position_name(enum sl_curve_position position)
{
    static const char *const names[] = {"on the curve", "before its start",
                                        "past its end"};

    return position <= SL_PAST_END ? names[position] : "?";
}

const char *sl_check_name(enum sl_check_id id)
{
    static const char *const names[SL_CHECK_COUNT] = {
        [SL_CHECK_SUBMERGENCE] = "submergence",
        [SL_CHECK_OPERATING_REGION] = "operating region",
        [SL_CHECK_SUCTION_VELOCITY] = "suction velocity",
        [SL_CHECK_BELL_VELOCITY] = "bell velocity",
        [SL_CHECK_SUCTION_LIFT] = "suction lift",
        [SL_CHECK_STRAIGHT_RUN] = "straight run",
        [SL_CHECK_BOOSTER_PRESSURE] = "suction pressure of a booster",
        [SL_CHECK_SUCTION_ENERGY] = "suction energy",
        [SL_CHECK_OFF_CURVE] = "off curve",
        [SL_CHECK_TWO_CROSSINGS] = "two crossings",
        [SL_CHECK_ROUGHNESS] = "roughness over bore",
    };

    return id < SL_CHECK_COUNT ? names[id] : "?";
}

const char *sl_limit_end_name(enum sl_limit_end end)
{
    static const char *const names[] = {"unknown", "found", "none", "always",
                                        "figures end"};

    return end <= SL_LIMIT_FIGURES_END ? names[end] : "?";
}

double sl_limit_value(const struct sl_limit *limit)
{
    bool has =
        limit->end == SL_LIMIT_FOUND || limit->end == SL_LIMIT_FIGURES_END;

    return has ? limit->value : NAN;
}

static const struct {
    const char *column;
    const char *words;
    enum sl_quantity quantity;
} inputs[SL_INPUT_COUNT] = {
    [SL_IN_SITE_ELEVATION] = {"site_elevation", "the site's elevation",
                              SL_LENGTH},
    [SL_IN_BAROMETER] = {"barometer_low", "the low barometer", SL_PURE},
    [SL_IN_SOURCE_KIND] = {"source_kind", "the kind of source", SL_PURE},
    [SL_IN_SOURCE_PRESSURE] = {"source_pressure_low",
                               "the source's gauge pressure", SL_PRESSURE},
    [SL_IN_SOURCE_PRESSURE_ELEVATION] = {"source_pressure_elevation",
                                         "the gauge's elevation", SL_LENGTH},
    [SL_IN_SOURCE_LEVEL] = {"cut_out_level", "the source level", SL_LENGTH},
    [SL_IN_DATUM] = {"datum_elevation", "the elevation of the impeller eye",
                     SL_LENGTH},
    [SL_IN_TEMPERATURE] = {"water_temp_summer", "the water temperature",
                           SL_TEMPERATURE},
    [SL_IN_GAS] = {"service", "the gas allowance", SL_LENGTH},
    [SL_IN_SUCTION_PIPING] = {"suction_pipe_id", "the suction piping",
                              SL_LENGTH},
    [SL_IN_SUCTION_LENGTH] = {"length", "a suction pipe's length", SL_LENGTH},
    [SL_IN_SUCTION_BORE] = {"bore", "a suction pipe's bore", SL_LENGTH},
    [SL_IN_SUCTION_ROUGHNESS] = {"material", "a suction pipe's roughness",
                                 SL_BORE},
    [SL_IN_SUCTION_MINOR] = {"fitting", "the losses of the suction fittings",
                             SL_PURE},
    [SL_IN_DISCHARGE_LEVEL] = {"discharge_low", "the discharge level",
                               SL_LENGTH},
    [SL_IN_DISCHARGE_LOSS] = {"discharge_loss_head",
                              "the loss of the discharge main", SL_LENGTH},
    [SL_IN_FLOW] = {"curve_id", "the flow it really runs at", SL_FLOW},
    [SL_IN_SPEED] = {"max_speed", "its highest speed", SL_SPEED},
    [SL_IN_NPSHR] = {"npshr", "NPSHR at the flow it runs at", SL_LENGTH},
    [SL_IN_RUNNING_TOGETHER] = {"pumps_running_max",
                                "how many pumps run at once", SL_PURE},
    [SL_IN_RULE_MEASURE] = {"suction_nozzle_bore",
                            "what the margin rule goes by", SL_PURE},
};

const char *sl_input_column(enum sl_input_id id)
{
    return inputs[id].column;
}

const char *sl_input_words(enum sl_input_id id)
{
    return inputs[id].words;
}

enum sl_quantity sl_input_quantity(enum sl_input_id id)
{
    return inputs[id].quantity;
}
