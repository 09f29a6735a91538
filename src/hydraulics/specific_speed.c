#include "hydraulics/specific_speed.h"

#include <math.h>
#include <stdbool.h>

#define FOOT 0.3048                          /* m, by definition */
#define INCH (FOOT / 12)                     /* m */
#define US_GALLON (231 * INCH * INCH * INCH) /* m³, by definition */
#define SECONDS_A_MINUTE 60

static bool positive(double value)
{
    return isfinite(value) && value > 0.0;
}

/* Products of finite figures may leave the range of a double. */
static double finite(double value)
{
    return isfinite(value) ? value : NAN;
}

static double shape_number(double speed, double flow, double head)
{
    if (!positive(speed) || !positive(flow) || !positive(head))
        return NAN;
    return finite(speed * sqrt(flow) / pow(head, 0.75)); /* F14 */
}

double sl_suction_specific_speed(double speed, double flow_per_eye,
                                 double npshr)
{
    return shape_number(speed, flow_per_eye, npshr);
}

double sl_specific_speed(double speed, double flow, double head_per_stage)
{
    return shape_number(speed, flow, head_per_stage);
}

/* The flow of 1 m³/s in gallons a minute, and 1 m in feet, put into F14. */
double sl_us_specific_speed_factor(void)
{
    return sqrt(SECONDS_A_MINUTE / US_GALLON) / pow(1 / FOOT, 0.75);
}

double sl_estimated_npshr(double speed, double flow_per_eye,
                          double suction_specific_speed)
{
    if (!positive(speed) || !positive(flow_per_eye) ||
        !positive(suction_specific_speed))
        return NAN;
    return finite(pow(speed * sqrt(flow_per_eye) / suction_specific_speed,
                      4.0 / 3.0)); /* F13 */
}

double sl_suction_energy(double eye_diameter, double speed,
                         double suction_specific_speed, double specific_gravity)
{
    double us;

    if (!positive(eye_diameter) || !positive(speed) ||
        !positive(suction_specific_speed) || !positive(specific_gravity))
        return NAN;
    us = suction_specific_speed * sl_us_specific_speed_factor();
    return finite(eye_diameter / INCH * speed * us *
                  specific_gravity); /* F15 */
}
