#include "hydraulics/friction.h"

#include <math.h>
#include <stdbool.h>

#include "hydraulics/constants.h"
#include "hydraulics/minor_loss.h"

#define PI 3.14159265358979323846

#define LAMINAR_BELOW 2300.0
#define REYNOLDS_LARGEST 1.0e9
#define ROUGHNESS_LARGEST 0.1
/* Newton from below converges in four to six steps over the whole range;
 * twenty is only a guard against an error in this file. */
#define NEWTON_STEPS 20

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

/* With x = 1/sqrt(f): x + 2 log10(r/3.7 + 2.51 x/Re) = 0.  The left side
 * rises and is concave, so from a start below the root Newton's steps rise
 * to it; the first that does not rise has reached the last digit. */
static double colebrook(double reynolds, double relative_roughness)
{
    const double rough = relative_roughness / 3.7;
    const double smooth = 2.51 / reynolds;
    double x = 1.0;
    int step;

    for (step = 0; step < NEWTON_STEPS; step++) {
        double inside = rough + smooth * x;
        double value = x + 2.0 * log10(inside); /* F8 */
        double slope = 1.0 + 2.0 / log(10.0) * smooth / inside;
        double next = x - value / slope;

        if (!(next > x))
            break;
        x = next;
    }
    return 1.0 / (x * x);
}

double sl_friction_factor(double reynolds, double relative_roughness)
{
    if (!(reynolds > 0.0 && reynolds <= REYNOLDS_LARGEST) ||
        !(relative_roughness >= 0.0 && relative_roughness <= ROUGHNESS_LARGEST))
        return NAN;
    if (reynolds < LAMINAR_BELOW)
        return 64.0 / reynolds; /* F8 */
    /* Up to Re 4000 the larger of 64/Re and Colebrook is asked for; above
     * 2300 Colebrook is the larger one, and above 4000 it stands alone. */
    return fmax(64.0 / reynolds, colebrook(reynolds, relative_roughness));
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
