/* What the reference rows name in their column `function`: the program's
 * own functions, alone or in the short chains that worked examples take.
 *
 * Worked examples are worked at their own gravity.  The program's metre of
 * head is at the standard one, so `at_source_gravity` restates a head, and
 * `standard_density` gives the density that makes a pressure weigh at
 * standard gravity what it weighs in the source. */
#ifndef SL_TESTS_REFERENCE_FUNCTIONS_H
#define SL_TESTS_REFERENCE_FUNCTIONS_H

#include "base/units.h"
#include "hydraulics/affinity.h"
#include "hydraulics/atmosphere.h"
#include "hydraulics/constants.h"
#include "hydraulics/curve.h"
#include "hydraulics/friction.h"
#include "hydraulics/minor_loss.h"
#include "hydraulics/npsh.h"
#include "hydraulics/operating_point.h"
#include "hydraulics/water.h"
#include "reference_inputs.h"

static double gravity(struct inputs *in)
{
    return number_or(in, "g", SL_GRAVITY);
}

static double at_source_gravity(struct inputs *in, double head)
{
    return head * SL_GRAVITY / gravity(in);
}

/* From `density` and `g`, or from a specific weight `gamma`. */
static double standard_density(struct inputs *in)
{
    double gamma = number_or(in, "gamma", NAN);

    return isnan(gamma) ? number(in, "density") * gravity(in) / SL_GRAVITY
                        : gamma / SL_GRAVITY;
}

/* --- water and air --- */

static double vapour_pressure(struct inputs *in)
{
    return sl_vapour_pressure(number(in, "temperature"));
}

static double water_density(struct inputs *in)
{
    return sl_water_density(number(in, "temperature"));
}

static double specific_weight(struct inputs *in)
{
    return water_density(in) * SL_GRAVITY;
}

static double water_viscosity(struct inputs *in)
{
    return sl_water_viscosity(number(in, "temperature"));
}

static double seawater_vapour_pressure(struct inputs *in)
{
    return sl_seawater_vapour_pressure(number(in, "temperature"),
                                       number(in, "salinity"));
}

static double seawater_density(struct inputs *in)
{
    return sl_seawater_density(number(in, "temperature"),
                               number(in, "salinity"));
}

static double standard_atmosphere(struct inputs *in)
{
    return sl_standard_atmosphere(number(in, "altitude"));
}

/* Of water at 1000 kg/m³, as tables print it. */
static double atmosphere_head(struct inputs *in)
{
    return standard_atmosphere(in) / (1000 * SL_GRAVITY);
}

/* By the program's units, not this test's. */
static double gpm_from_cfs(struct inputs *in)
{
    double si = sl_to_si(sl_unit_by_suffix(SL_FLOW, "cfs"), number(in, "cfs"));

    return sl_from_si(sl_unit_by_suffix(SL_FLOW, "gpm"), si);
}

/* --- friction and minor losses --- */

static double velocity(struct inputs *in)
{
    double given = number_or(in, "velocity", NAN);

    return isnan(given)
               ? sl_pipe_velocity(number(in, "flow"), number(in, "bore"))
               : given;
}

static double bore_area(struct inputs *in)
{
    return 1.0 / sl_pipe_velocity(1.0, number(in, "bore"));
}

/* The Darcy factor: given, from a Fanning factor, or found. */
static double factor(struct inputs *in)
{
    double darcy = number_or(in, "factor", NAN);
    double fanning = number_or(in, "fanning", NAN);
    double reynolds = number_or(in, "reynolds", NAN);
    double relative = number_or(in, "relative_roughness", NAN);

    if (!isnan(darcy) || !isnan(fanning))
        return isnan(darcy) ? 4 * fanning : darcy;
    if (isnan(reynolds))
        reynolds = sl_reynolds(velocity(in), number(in, "bore"),
                               number(in, "kinematic_viscosity"));
    if (isnan(relative))
        relative = number(in, "roughness") / number(in, "bore");
    return sl_friction_factor(reynolds, relative);
}

static double darcy_loss(struct inputs *in)
{
    return at_source_gravity(in,
                             sl_darcy_head(factor(in), number(in, "length"),
                                           number(in, "bore"), velocity(in)));
}

static double minor_loss(struct inputs *in)
{
    return at_source_gravity(in, sl_minor_head(number(in, "k"), velocity(in)));
}

static double pipe_and_minor_loss(struct inputs *in)
{
    return darcy_loss(in) + minor_loss(in);
}

/* Heads lost as pressure, gravity in and out again. */
static double darcy_pressure(struct inputs *in)
{
    return darcy_loss(in) * number(in, "density") * gravity(in);
}

static double minor_pressure(struct inputs *in)
{
    return minor_loss(in) * number(in, "density") * gravity(in);
}

static double darcy_energy(struct inputs *in)
{
    return darcy_loss(in) * gravity(in);
}

static double hazen_williams_loss(struct inputs *in)
{
    return sl_hazen_williams_head(number(in, "flow"), number(in, "c"),
                                  number(in, "length"), number(in, "bore"));
}

static double hazen_over_darcy(struct inputs *in)
{
    return hazen_williams_loss(in) / darcy_loss(in);
}

/* Pressure behind an enlargement; k of the upstream velocity head, by
 * Borda and Carnot, or `k_of_difference` on the difference's. */
static double enlarged_pressure(struct inputs *in)
{
    double up = sl_pipe_velocity(number(in, "flow"), number(in, "bore"));
    double down =
        sl_pipe_velocity(number(in, "flow"), number(in, "bore_after"));
    double k = number_or(in, "k_of_difference", 1.0);
    double gain = sl_velocity_head(up) - sl_velocity_head(down) -
                  sl_minor_head(k, up - down);

    return number(in, "pressure") +
           standard_density(in) * SL_GRAVITY * at_source_gravity(in, gain);
}

/* Pressure at the foot of a supply pipe that ends in a narrower outlet. */
static double supply_pressure(struct inputs *in)
{
    double out =
        sl_pipe_velocity(number(in, "flow"), number(in, "outlet_bore"));
    double head = number(in, "rise") + pipe_and_minor_loss(in) +
                  at_source_gravity(in, sl_velocity_head(out) -
                                            sl_velocity_head(velocity(in)));

    return head * standard_density(in) * SL_GRAVITY;
}

static double system_head(struct inputs *in)
{
    return number(in, "static_head") + pipe_and_minor_loss(in);
}

/* The valve that holds a pump to a stated velocity. */
static double throttle_k(struct inputs *in)
{
    double curve[VALUES_MOST] = {0};
    double flow = velocity(in) * bore_area(in);
    double head;

    if (numbers(in, "head_polynomial", curve) != 3)
        return NAN;
    head = curve[0] + flow * (curve[1] + flow * curve[2]);
    return (head - darcy_loss(in)) /
               at_source_gravity(in, sl_velocity_head(velocity(in))) -
           number(in, "k_exit");
}

/* --- balance --- */

static struct sl_balance still_balance(double density)
{
    return (struct sl_balance){.density = density};
}

static double npsha(const struct sl_balance *balance)
{
    struct sl_terms terms;

    sl_npsha(balance, &terms);
    return terms.npsha;
}

static double npsha_from_heads(struct inputs *in)
{
    const double density = 987.6; /* any: heads in, heads out */
    struct sl_balance balance = still_balance(density);

    balance.air_pressure = number(in, "atmosphere") * density * SL_GRAVITY;
    balance.vapour_pressure = number(in, "vapour") * density * SL_GRAVITY;
    balance.surface = number(in, "lift_of_source");
    balance.friction = number(in, "friction");
    balance.minor = number_or(in, "minor", 0.0);
    return npsha(&balance);
}

/* Air, density and vapour from the program's own formulas. */
static double npsha_of_water(struct inputs *in)
{
    struct sl_balance balance = still_balance(water_density(in));

    balance.air_pressure = standard_atmosphere(in);
    balance.vapour_pressure = vapour_pressure(in);
    balance.surface = number(in, "lift_of_source");
    balance.friction = number(in, "friction");
    balance.minor = number_or(in, "minor", 0.0);
    return npsha(&balance);
}

/* The row's balance with source and eye level: what is left is the lift
 * that a pump may have, or, below nought, the depth it needs. */
static struct sl_balance level_balance(struct inputs *in)
{
    struct sl_balance balance = still_balance(standard_density(in));

    balance.air_pressure = number(in, "surface_pressure");
    balance.vapour_pressure = number(in, "vapour_pressure");
    balance.friction = number_or(in, "loss", 0.0);
    if (!isnan(number_or(in, "k", NAN)))
        balance.minor = minor_loss(in);
    if (!isnan(number_or(in, "length", NAN)))
        balance.friction += darcy_loss(in);
    return balance;
}

static double suction_lift_limit(struct inputs *in)
{
    struct sl_balance balance = level_balance(in);

    return npsha(&balance) - number(in, "npshr");
}

/* The same with air, density and vapour from the program's own formulas. */
static double suction_lift_limit_of_water(struct inputs *in)
{
    struct sl_balance balance = still_balance(water_density(in));

    balance.air_pressure = standard_atmosphere(in);
    balance.vapour_pressure = vapour_pressure(in);
    balance.minor = minor_loss(in);
    return npsha(&balance) - number(in, "npshr");
}

static double lowest_level(struct inputs *in)
{
    return number_or(in, "level_of_eye", 0.0) - suction_lift_limit(in);
}

static double volume_to_lowest_level(struct inputs *in)
{
    return bore_area(in) * (number(in, "level") - lowest_level(in));
}

/* The suction pipe grows with the lift, so its loss does: per metre. */
static double lift_with_its_pipe(struct inputs *in)
{
    double speed = velocity(in), bore = number(in, "bore");
    double reynolds =
        sl_reynolds(speed, bore, number(in, "kinematic_viscosity"));
    double blasius = 8 * number(in, "phi") * pow(reynolds, -0.25);
    double a_metre =
        at_source_gravity(in, sl_darcy_head(blasius, 1.0, bore, speed));
    struct sl_balance balance = level_balance(in);
    double lift = (npsha(&balance) - number(in, "npshr")) / (1 + a_metre);

    balance.surface = -lift;
    balance.friction = lift * a_metre;
    return fabs(npsha(&balance) - number(in, "npshr")) < 1e-9 ? lift : NAN;
}

static double npsha_from_surface(struct inputs *in)
{
    struct sl_balance balance = level_balance(in);

    balance.surface = number(in, "lift_of_source");
    return npsha(&balance);
}

/* Absolute pressure at the eye: static, so the velocity head is lost. */
static double suction_pressure(struct inputs *in)
{
    struct sl_balance balance = level_balance(in);
    double head;

    balance.vapour_pressure = 0.0;
    balance.surface = number(in, "lift_of_source");
    head =
        npsha(&balance) - at_source_gravity(in, sl_velocity_head(velocity(in)));
    return head * balance.density * SL_GRAVITY;
}

/* NPSHA from a gauge at the eye that shows that pressure: the velocity
 * head, taken off in the pressure, comes back. */
static double npsha_by_gauge_at_eye(struct inputs *in)
{
    struct sl_balance gauge = still_balance(standard_density(in));

    gauge.air_pressure = number(in, "surface_pressure");
    gauge.gauge_pressure = suction_pressure(in) - gauge.air_pressure;
    gauge.vapour_pressure = number(in, "vapour_pressure");
    gauge.velocity_head = at_source_gravity(in, sl_velocity_head(velocity(in)));
    return npsha(&gauge);
}

static double required_npsha(struct inputs *in)
{
    return sl_required_npsha(number(in, "npshr"), number(in, "ratio"),
                             number(in, "floor"));
}

#endif
