#include "hydraulics/submergence.h"

#include <math.h>

#include "hydraulics/constants.h"
#include "hydraulics/friction.h"

double sl_minimum_submergence(double diameter, double flow)
{
    double velocity = sl_pipe_velocity(flow, diameter);
    double froude;

    if (!isfinite(velocity))
        return NAN;
    froude = velocity / sqrt(SL_GRAVITY * diameter);
    return diameter * (1 + 2.3 * froude); /* F16 */
}
