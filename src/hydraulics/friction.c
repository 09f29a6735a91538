#include "hydraulics/friction.h"

#include <math.h>
#include <stdbool.h>

#include "hydraulics/constants.h"
#include "hydraulics/minor_loss.h"

#define PI 3.14159265358979323846

#define REYNOLDS_LARGEST 1.0e9
#define ROUGHNESS_LARGEST 0.1
static bool not_negative(double value)
{
    return isfinite(value) && value >= 0.0;
}

static bool positive(double value)
{
    return isfinite(value) && value > 0.0;
}

double sl_pipe_velocity(double flow, double bore)
{
    if (!not_negative(flow) || !positive(bore))
        return NAN;
    return 4.0 * flow / (PI * bore * bore); /* F23 */
}

double sl_reynolds(double velocity, double bore, double kinematic_viscosity)
{
    if (!not_negative(velocity) || !positive(bore) ||
        !positive(kinematic_viscosity))
        return NAN;
    return velocity * bore / kinematic_viscosity; /* F23 */
}

/* With x = 1/sqrt(f): x + 2 log10(r/3.7 + 2.51 x/Re) = 0, and 2 log10 is
 * TWO_LOG10 of the natural logarithm. */
struct colebrook {
    double rough, smooth; /* r/3.7 and 2.51/Re */
    double x;
};

#define TWO_LOG10 0.86858896380650365530 /* 2/ln 10 */

/* One step of Halley's method: the left side's slope and bend are
 * 1 + TWO_LOG10 part and -TWO_LOG10 part². */
static double halley(const struct colebrook *c)
{
    double inside = c->rough + c->smooth * c->x;
    double part = c->smooth / inside;
    double value = c->x + TWO_LOG10 * log(inside); /* F8 */
    double slope = 1.0 + TWO_LOG10 * part;
    double bend = -TWO_LOG10 * part * part;

    return c->x - 2.0 * value * slope / (2.0 * slope * slope - value * bend);
}

/* x lies within 4.6 and 8 below Re 1e5 where the wall is smooth, within 7 and
 * 13 above; the rougher the wall the less x counts on the right.  Put in once
 * from the middle, x is off by less than 0.3; a step of Halley's takes that
 * to less than 1e-4 and the next to less than a double's spacing. */
static struct colebrook colebrook(double reynolds, double relative_roughness)
{
    struct colebrook c = {relative_roughness / 3.7, 2.51 / reynolds,
                          reynolds < 1.0e5 ? 6.0 : 9.0};

    c.x = -TWO_LOG10 * log(c.rough + c.smooth * c.x);
    c.x = halley(&c);
    c.x = halley(&c);
    return c;
}

static double colebrook_factor(double x)
{
    return 1.0 / (x * x);
}

double sl_friction_factor(double reynolds, double relative_roughness)
{
    if (!(reynolds > 0.0 && reynolds <= REYNOLDS_LARGEST) ||
        !(relative_roughness >= 0.0 && relative_roughness <= ROUGHNESS_LARGEST))
        return NAN;
    if (reynolds < SL_LAMINAR_BELOW)
        return 64.0 / reynolds; /* F8 */
    /* Up to Re 4000 the larger of 64/Re and Colebrook is asked for; above
     * 2300 Colebrook is the larger one, and above 4000 it stands alone. */
    return fmax(64.0 / reynolds,
                colebrook_factor(colebrook(reynolds, relative_roughness).x));
}

double sl_aged_roughness(double new_roughness, double rate, double years)
{
    if (!not_negative(new_roughness) || !not_negative(rate) ||
        !not_negative(years))
        return NAN;
    return new_roughness + rate * years; /* F10 */
}

double sl_darcy_head(double factor, double length, double bore, double velocity)
{
    if (!not_negative(length) || !positive(bore) || !not_negative(velocity))
        return NAN;
    if (velocity == 0.0)
        return 0.0;
    if (!not_negative(factor))
        return NAN;
    return factor * length / bore * sl_velocity_head(velocity); /* F7 */
}

double sl_hazen_williams_head(double flow, double c, double length, double bore)
{
    if (!not_negative(flow) || !(c >= 10.0 && c <= 200.0) ||
        !not_negative(length) || !positive(bore))
        return NAN;
    return 10.67 * length * pow(flow / c, 1.852) / pow(bore, 4.87); /* F9 */
}

static struct sl_loss no_loss_known(void)
{
    return (struct sl_loss){NAN, NAN};
}

static struct sl_loss laminar_loss(double flow, double length, double bore,
                                   double velocity, double reynolds,
                                   double kinematic_viscosity)
{
    double square = bore * bore;

    return (struct sl_loss){
        sl_darcy_head(flow > 0.0 ? 64.0 / reynolds : 0.0, length, bore,
                      velocity),
        128.0 * kinematic_viscosity * length /
            (PI * SL_GRAVITY * square * square), /* F7 */
    };
}

/* Down a pipe f falls as Re^(-2 s/(1 + s)) with s = TWO_LOG10 part (the
 * derivative of F8), so that the loss grows as Q^(2/(1 + s)). */
struct sl_loss sl_darcy_loss(double flow, double length, double bore,
                             double roughness, double kinematic_viscosity)
{
    double velocity = sl_pipe_velocity(flow, bore);
    double reynolds = sl_reynolds(velocity, bore, kinematic_viscosity);
    double relative = roughness / bore, head, part;
    struct colebrook c;

    if (!(reynolds >= 0.0 && reynolds <= REYNOLDS_LARGEST) ||
        !(relative >= 0.0 && relative <= ROUGHNESS_LARGEST))
        return no_loss_known();
    if (reynolds < SL_LAMINAR_BELOW)
        return laminar_loss(flow, length, bore, velocity, reynolds,
                            kinematic_viscosity);
    c = colebrook(reynolds, relative);
    head = sl_darcy_head(colebrook_factor(c.x), length, bore, velocity);
    part = c.smooth / (c.rough + c.smooth * c.x);
    return (struct sl_loss){
        head, 2.0 * head / (flow * (1.0 + TWO_LOG10 * part)), /* F7, F8 */
    };
}

struct sl_loss sl_hazen_williams_loss(double flow, double c, double length,
                                      double bore)
{
    double head = sl_hazen_williams_head(flow, c, length, bore);

    return (struct sl_loss){head, flow > 0.0 ? 1.852 * head / flow : head};
}
