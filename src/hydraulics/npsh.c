#include "hydraulics/npsh.h"

#include <math.h>
#include <stdbool.h>

#include "hydraulics/constants.h"

static double not_negative(double value)
{
    return isfinite(value) && value >= 0.0 ? value : NAN;
}

static double any_finite(double value)
{
    return isfinite(value) ? value : NAN;
}

void sl_npsha(const struct sl_balance *balance, struct sl_terms *terms)
{
    bool has_density = isfinite(balance->density) && balance->density > 0.0;
    double weight = has_density ? balance->density * SL_GRAVITY : NAN;

    /* 0 - x, not -x: a loss of nought must not print as "-0". */
    *terms = (struct sl_terms){
        .atmosphere = not_negative(balance->air_pressure) / weight,
        .barometer = (0.0 - any_finite(balance->air_fall)) / weight,
        .gauge = any_finite(balance->gauge_pressure) / weight,
        .elevation = any_finite(balance->surface) - any_finite(balance->datum),
        .velocity = not_negative(balance->velocity_head),
        .friction = 0.0 - not_negative(balance->friction),
        .minor = 0.0 - not_negative(balance->minor),
        .vapour = (0.0 - not_negative(balance->vapour_pressure)) / weight,
        .gas = 0.0 - not_negative(balance->gas),
    };
    terms->npsha = terms->atmosphere + terms->barometer + terms->gauge +
                   terms->elevation + terms->velocity + terms->friction +
                   terms->minor + terms->vapour + terms->gas; /* F1 */
}

double sl_required_npsha(double npshr, double ratio, double floor)
{
    double by_ratio = not_negative(ratio) * not_negative(npshr);
    double by_floor = not_negative(npshr) + not_negative(floor);

    if (isnan(by_ratio) || isnan(by_floor))
        return NAN;
    return fmax(by_ratio, by_floor); /* F22 */
}
