#include "hydraulics/minor_loss.h"

#include <math.h>

#include "hydraulics/constants.h"

double sl_velocity_head(double velocity)
{
    if (!isfinite(velocity) || velocity < 0.0)
        return NAN;
    return velocity * velocity / (2.0 * SL_GRAVITY); /* F24 */
}

double sl_minor_head(double k, double velocity)
{
    if (!isfinite(k) || k < 0.0)
        return NAN;
    return k * sl_velocity_head(velocity); /* F24 */
}

double sl_small_bore_k(double k, double bore)
{
    const double inch = 0.0254;
    const double full_bore = 12 * inch;

    if (!(bore < full_bore))
        return k;
    if (!(bore > 0))
        return NAN;
    return k * (1 + 0.05 * (full_bore - bore) / inch); /* F30 */
}
