#include "hydraulics/affinity.h"

#include <math.h>
#include <stdbool.h>

static bool a_ratio(double speed_ratio)
{
    return isfinite(speed_ratio) && speed_ratio > 0.0;
}

double sl_affinity_flow(double flow, double speed_ratio)
{
    if (!isfinite(flow) || flow < 0.0 || !a_ratio(speed_ratio))
        return NAN;
    return flow * speed_ratio; /* F18 */
}

double sl_affinity_head(double head, double speed_ratio)
{
    if (!isfinite(head) || !a_ratio(speed_ratio))
        return NAN;
    return head * speed_ratio * speed_ratio; /* F18 */
}

double sl_affinity_npshr(double npshr, double speed_ratio, double exponent)
{
    if (!isfinite(npshr) || npshr < 0.0 || !a_ratio(speed_ratio) ||
        !(exponent >= 0.0 && exponent <= 3.0))
        return NAN;
    return npshr * pow(speed_ratio, exponent); /* F18 */
}
