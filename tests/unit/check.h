/* Comparing numbers in tests.  Include after the headers cmocka.h asks
 * for.  cmocka's own comparison of floats casts to float. */
#ifndef SL_TESTS_CHECK_H
#define SL_TESTS_CHECK_H

#include <math.h>

/* Fails unless |got - want| <= atol + rtol |want|; NaN is close to nothing.
 * Prints 17 digits, which tell any two doubles apart. */
static inline void check_close(const char *label, double got, double want,
                               double rtol, double atol)
{
    double allowed = atol + rtol * fabs(want);
    double apart = fabs(got - want);

    if (apart <= allowed)
        return;
    fail_msg("%s: got %.17g, want %.17g; apart %.3g, allowed %.3g", label, got,
             want, apart, allowed);
}

static inline void check_nan(const char *label, double got)
{
    if (!isnan(got))
        fail_msg("%s: got %.17g, want NaN", label, got);
}

#endif
