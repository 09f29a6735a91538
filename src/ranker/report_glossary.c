#include "ranker/page.h"

static const struct {
    const char *word;
    const char *meaning;
} words[] = {
    {"NPSH", "net positive suction head: the head over the vapour pressure of "
             "the water at the eye of the impeller. Where it runs out, the "
             "water boils cold; the bubbles then collapse on the blades. That "
             "is cavitation."},
    {"NPSHA", "the NPSH available: what air, source and suction piping leave "
              "at the eye."},
    {"NPSHR", "the NPSH required, by the maker's test. It is NPSH3: at that "
              "value the pump has already lost 3 % of its head, and "
              "cavitation began well before."},
    {"Margin", "NPSHA less NPSHR."},
    {"Margin rule", "how much more than NPSHR is asked for."},
    {"Typical, adverse, favourable",
     "three values of anything not known exactly: the likely one, the end "
     "that lowers the margin, the end that raises it."},
    {"Recorded, derived, assumed",
     "from the inventory; worked out from recorded values by a named rule; "
     "taken from a default."},
    {"Low-level cut-out", "the lowest level at which the controls still let a "
                          "pump run."},
    {"Impeller eye", "where the water enters the impeller; heads are measured "
                     "to its elevation, the datum."},
    {"Running set", "pumps of a station that run at the same time. The one a "
                    "pump has the least to spare in governs."},
    {"One pump less",
     "the worst set with one pump fewer than may run at once."},
    {"Flags", "checks beside the margin that are beyond their limit; they "
              "change no state."},
    {"By little", "clear with less than 0.3 m (1 ft) to spare over the rule at "
                  "the adverse values. Recorded values are taken as exact so "
                  "far: a pump clear by so little deserves a second look."},
    {"Solved, recorded, rated flow",
     "the flow the pump runs at: where its curve meets the station's system; "
     "the largest ever recorded; or the rated point, which says nothing of "
     "how far out the pump really runs."},
};

void sl_page_glossary(const struct sl_report *report)
{
    sl_markup(report->stream, "<section id=\"words\" aria-labelledby=\""
                              "words-head\">\n<h2 id=\"words-head\">What the "
                              "words mean</h2>\n<dl class=\"glossary\">\n");
    for (size_t i = 0; i < sizeof words / sizeof words[0]; i++) {
        sl_markup(report->stream, "<dt>");
        sl_markup_text(report->stream, words[i].word);
        sl_markup(report->stream, "</dt><dd>");
        sl_markup_text(report->stream, words[i].meaning);
        sl_markup(report->stream, "</dd>\n");
    }
    sl_markup(report->stream, "</dl>\n</section>\n");
}
