/* The reference rows' specific speeds and submergence. */
#ifndef SL_TESTS_REFERENCE_SUCTION_H
#define SL_TESTS_REFERENCE_SUCTION_H

#include "hydraulics/specific_speed.h"
#include "hydraulics/submergence.h"
#include "reference_functions.h"

static double pipe_velocity(struct inputs *in)
{
    return sl_pipe_velocity(number(in, "flow"), number(in, "bore"));
}

static double minimum_submergence(struct inputs *in)
{
    double diameter = number(in, "diameter");
    double given = number_or(in, "velocity", NAN);
    double flow = isnan(given) ? number(in, "flow")
                               : given / sl_pipe_velocity(1.0, diameter);

    return sl_minimum_submergence(diameter, flow);
}

/* Of the head, or of the NPSHR where the row has one. */
static double specific_speed(struct inputs *in)
{
    double npshr = number_or(in, "npshr", NAN);
    double speed = number(in, "speed"), flow = number(in, "flow");

    return isnan(npshr) ? sl_specific_speed(speed, flow, number(in, "head"))
                        : sl_suction_specific_speed(speed, flow, npshr);
}

static double us_specific_speed(struct inputs *in)
{
    return specific_speed(in) * sl_us_specific_speed_factor();
}

static double us_factor(struct inputs *in)
{
    (void)in;
    return sl_us_specific_speed_factor();
}

/* Without a unit: turns a second, or radians where a turn is given as 2 pi,
 * and the energy g H in place of the head. */
static double pure_specific_speed(struct inputs *in)
{
    return specific_speed(in) / 60 * number_or(in, "a_turn", 1.0) /
           pow(gravity(in), 0.75);
}

static double estimated_npshr(struct inputs *in)
{
    return sl_estimated_npshr(number(in, "speed"), number(in, "flow"),
                              number(in, "us_suction_specific_speed") /
                                  sl_us_specific_speed_factor());
}

/* The lift a pump may have, its NPSHR told from both specific speeds: only
 * their ratio counts, so any speed and flow of that shape will do. */
static double lift_by_specific_speeds(struct inputs *in)
{
    double turning =
        number(in, "specific_speed") * pow(number(in, "head"), 0.75);
    double npshr =
        sl_estimated_npshr(turning, 1.0, number(in, "suction_specific_speed"));
    struct sl_balance balance = still_balance(standard_density(in));

    balance.air_pressure =
        number(in, "atmosphere") * balance.density * SL_GRAVITY;
    balance.vapour_pressure = number(in, "vapour_pressure");
    return npsha(&balance) - npshr;
}

/* NPSHA over head, from the absolute head at the inlet. */
static double thoma_number(struct inputs *in)
{
    struct sl_balance balance = still_balance(standard_density(in));

    balance.air_pressure =
        number(in, "inlet_head") * balance.density * SL_GRAVITY;
    balance.vapour_pressure = number(in, "vapour_pressure");
    return npsha(&balance) / number(in, "head");
}

#endif
