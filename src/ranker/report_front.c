/* The first screen: what was found, what to do, how it was judged. */
#include "ranker/page.h"

#include <string.h>

#include "ranker/words.h"

/* Enough of the hash to tell two inventories apart by eye. */
#define HASH_SHOWN 12

static long long stations_in_all(const struct sl_summary *summary)
{
    long long all = 0;

    for (int state = 0; state < SL_STATE_COUNT; state++)
        all += summary->stations_by_state[state];
    return all;
}

static long long at_risk(const struct sl_summary *summary)
{
    return summary->stations_by_state[SL_SHORT] +
           summary->stations_by_state[SL_THIN];
}

/* "7 of 212 stations are at risk: 3 short, 4 thin." */
static void write_finding(const struct sl_report *report)
{
    const struct sl_summary *summary = report->summary;
    long long risky = at_risk(summary);

    sl_markup(report->stream, "<p class=\"finding\">");
    if (stations_in_all(summary) == 0) {
        sl_markup(report->stream, "No station was audited.</p>\n");
        return;
    }
    if (risky == 0)
        sl_markup(report->stream, "No station");
    else
        sl_markup_count(report->stream, risky);
    sl_markup(report->stream, " of ");
    sl_markup_count(report->stream, stations_in_all(summary));
    sl_markup(report->stream, risky > 1 ? " stations are" : " is");
    sl_markup(report->stream, " established to be at risk of cavitation under "
                              "the conditions audited.");
    if (summary->stations_by_state[SL_UNPROVEN] > 0) {
        sl_markup(report->stream, " What is on record does not settle ");
        sl_markup_count(report->stream,
                        summary->stations_by_state[SL_UNPROVEN]);
        sl_markup(report->stream, " more.");
    }
    if (summary->sums[SL_KIND_STATION].rejected > 0) {
        sl_markup(report->stream, " Not among them: ");
        sl_page_counted(report, summary->sums[SL_KIND_STATION].rejected,
                        "station record that was rejected.",
                        "station records that were rejected.");
    }
    sl_markup(report->stream, "</p>\n");
}

/* Clear is by the rule ranked on, and says nothing of what is beside it. */
static void write_beside_clear(const struct sl_report *report)
{
    long long count = report->summary->clear_beside;

    if (count == 0)
        return;
    sl_markup(report->stream, "<p class=\"besides\"><a href=\"#clear\">");
    sl_markup_count(report->stream, count);
    sl_markup(report->stream, count == 1 ? " of them carries a flag, or is"
                                         : " of them carry a flag, or are");
    sl_markup(report->stream, " thin or short by another rule</a>.</p>");
}

static void write_tile(const struct sl_report *report, enum sl_state state)
{
    static const char *const opening[SL_STATE_COUNT] = {
        [SL_SHORT] = "<li class=\"tile short\">",
        [SL_THIN] = "<li class=\"tile thin\">",
        [SL_UNPROVEN] = "<li class=\"tile unproven\">",
        [SL_CLEAR] = "<li class=\"tile clear\">",
    };
    long long count = report->summary->stations_by_state[state];

    sl_markup(report->stream, opening[state]);
    sl_markup(report->stream, "<p class=\"count\"><b>");
    sl_markup_count(report->stream, count);
    sl_markup(report->stream, count == 1 ? "</b> station " : "</b> stations ");
    sl_page_state(report, state);
    sl_markup(report->stream, "</p><p>");
    sl_page_text(report, sl_words_state(state));
    sl_markup(report->stream, "</p>");
    if (state == SL_CLEAR)
        write_beside_clear(report);
    sl_markup(report->stream, "</li>\n");
}

static void write_tiles(const struct sl_report *report)
{
    sl_markup(report->stream, "<ul class=\"tiles\" aria-label=\"Stations by "
                              "state\">\n");
    write_tile(report, SL_SHORT);
    write_tile(report, SL_THIN);
    write_tile(report, SL_UNPROVEN);
    write_tile(report, SL_CLEAR);
    sl_markup(report->stream, "</ul>\n");
}

static void write_next_steps(const struct sl_report *report)
{
    const struct sl_summary *summary = report->summary;

    sl_markup(report->stream, "<section aria-labelledby=\"next-head\">\n"
                              "<h2 id=\"next-head\">What to do next</h2>\n"
                              "<ol>\n");
    if (at_risk(summary) > 0)
        sl_markup(report->stream,
                  "<li>Start at the top of <a href=\"#at-risk\">Stations at "
                  "risk</a>: worst first, each with its reason and its next "
                  "step.</li>\n");
    if (summary->stations_by_state[SL_UNPROVEN] > 0)
        sl_markup(report->stream,
                  "<li>Plan surveys from <a href=\"#find-out\">Find out "
                  "first</a>: for each station that the records do not "
                  "settle, what matters most.</li>\n");
    sl_markup(report->stream,
              "<li>Mend the records under <a href=\"#records\">Records</a> "
              "that were set aside, and audit again.</li>\n"
              "<li>Before a set point or a machine is changed: the "
              "maker&#39;s curve for it, the local code, and a licensed "
              "engineer.</li>\n</ol>\n</section>\n");
}

static void write_conditions(const struct sl_report *report)
{
    const struct sl_summary *summary = report->summary;

    sl_markup(report->stream, "<dt>Conditions</dt>\n");
    for (size_t i = 0; i < summary->condition_count; i++) {
        struct sl_text words = {0};

        sl_words_condition(&summary->conditions[i], report->units, &words);
        sl_markup(report->stream, "<dd><b>");
        sl_page_name(report, summary->conditions[i].condition);
        sl_markup(report->stream, "</b>: ");
        sl_page_say(report, &words);
        sl_markup(report->stream, "</dd>\n");
    }
    if (summary->condition_count == 0)
        sl_markup(report->stream, "<dd>none</dd>\n");
}

/* What the flow stands for, so that nobody reads more into it. */
static void write_running(const struct sl_report *report)
{
    sl_markup(report->stream,
              "<dt>Running</dt>\n<dd>every set of pumps that a station's "
              "controls may run together; each pump is judged by its worst "
              "set. A station too large to try every set says so.</dd>\n");
}

static void write_year(const struct sl_report *report)
{
    struct sl_text year = {0};

    if (report->summary->year == 0)
        return;
    sl_text_addf(&year, "%d", report->summary->year);
    sl_markup(report->stream, "<dt>Year</dt>\n<dd>");
    sl_page_say(report, &year);
    sl_markup(report->stream, ", for the age of pipes</dd>\n");
}

static void write_rule(const struct sl_report *report)
{
    const struct sl_margin_rule *rule = &report->summary->rule;
    struct sl_text words = {0};

    sl_words_rule(rule, report->units, &words);
    sl_markup(report->stream, "<dt>Margin rule</dt>\n<dd><b>");
    sl_page_name(report, rule->rule);
    sl_markup(report->stream, "</b> (");
    sl_page_text(report, sl_words_trust(rule->trust));
    sl_markup(report->stream, ")");
    if (rule->edition && rule->edition[0] != '\0' &&
        !strstr(rule->rule, rule->edition)) {
        sl_markup(report->stream, ", ");
        sl_page_name(report, rule->edition);
    }
    sl_markup(report->stream, ": ");
    sl_page_say(report, &words);
    sl_markup(report->stream, "; <a href=\"#rules\">all the rules</a></dd>\n");
}

static void write_hash(const struct sl_report *report)
{
    const char *hash = report->summary->inventory_sha256;
    struct sl_text first = {0};

    for (size_t i = 0; hash && hash[i] != '\0' && i < HASH_SHOWN; i++)
        sl_text_add(&first, &hash[i], 1);
    sl_markup(report->stream, "<code title=\"SHA-256 ");
    sl_markup_attribute(report->stream, hash);
    sl_markup(report->stream, "\">");
    sl_page_say(report, &first);
    sl_markup(report->stream, "</code>");
}

static void write_origin(const struct sl_report *report)
{
    const struct sl_summary *summary = report->summary;

    sl_markup(report->stream, "<dt>Inventory</dt>\n<dd><b>");
    sl_page_name(report, summary->label);
    sl_markup(report->stream, "</b>, content ");
    write_hash(report);
    sl_markup(report->stream, "</dd>\n<dt>Program</dt>\n<dd>summerlow ");
    sl_page_text(report, summary->version);
    sl_markup(report->stream, "</dd>\n");
}

static void write_records_read(const struct sl_report *report)
{
    long long read = 0, kept = 0, rejected = 0, out_of_scope = 0;

    for (int kind = 0; kind < SL_KIND_COUNT; kind++) {
        read += report->summary->sums[kind].read;
        kept += report->summary->sums[kind].kept;
        rejected += report->summary->sums[kind].rejected;
        out_of_scope += report->summary->sums[kind].out_of_scope;
    }
    sl_markup(report->stream, "<dt>Records</dt>\n<dd>");
    sl_markup_count(report->stream, read);
    sl_markup(report->stream, " read = ");
    sl_markup_count(report->stream, kept);
    sl_markup(report->stream, " kept + ");
    sl_markup_count(report->stream, rejected);
    sl_markup(report->stream, " rejected + ");
    sl_markup_count(report->stream, out_of_scope);
    sl_markup(report->stream, " out of scope (<a href=\"#records\">file by "
                              "file</a>)");
    if (rejected > 0)
        sl_markup(report->stream, "; what a rejected record would have said "
                                  "is in none of the figures");
    sl_markup(report->stream, "</dd>\n");
    if (report->summary->stations_without_pumps > 0) {
        sl_markup(report->stream, "<dd>");
        sl_page_counted(report, report->summary->stations_without_pumps,
                        "station has no pump on record",
                        "stations have no pump on record");
        sl_markup(report->stream, "</dd>\n");
    }
}

static void write_judgement(const struct sl_report *report)
{
    sl_markup(report->stream,
              "<section aria-labelledby=\"judged-head\">\n"
              "<h2 id=\"judged-head\">How it was judged</h2>\n<dl>\n");
    write_conditions(report);
    write_year(report);
    write_running(report);
    write_rule(report);
    write_origin(report);
    write_records_read(report);
    sl_markup(report->stream, "</dl>\n</section>\n");
}

static void write_cautions(const struct sl_report *report)
{
    sl_markup(
        report->stream,
        "<section class=\"cautions\" aria-labelledby=\"cautions-head\">\n"
        "<h2 id=\"cautions-head\">Before you act on this</h2>\n<ul>\n"
        "<li>This is screening, not design. The maker&#39;s curves, local "
        "codes and a licensed engineer decide.</li>\n"
        "<li>Site surveys meet confined spaces and energised equipment: "
        "qualified crews, under the owner&#39;s permits only.</li>\n"
        "<li>NPSHA that just equals NPSHR is not safe: NPSHR is NPSH3, where "
        "3&nbsp;% of the head is already lost to cavitation.</li>\n"
        "<li>Recorded values are taken as exact so far: a pump clear by less "
        "than 0.3&nbsp;m (1&nbsp;ft) deserves a second look.</li>\n"
        "<li>What is not known is shown as unknown, and every value assumed "
        "is <a href=\"#defaults\">listed</a>.</li>\n"
        "</ul>\n</section>\n");
}

void sl_page_front(const struct sl_report *report)
{
    write_finding(report);
    write_tiles(report);
    sl_markup(report->stream, "<div class=\"front\">\n");
    write_next_steps(report);
    write_judgement(report);
    write_cautions(report);
    sl_markup(report->stream, "</div>\n");
}
