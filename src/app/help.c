#include "app/options.h"

#define EXIT_CODES                                                             \
    "\nExit status:\n"                                                         \
    "  0    done\n"                                                            \
    "  1    done, with rejected records: see findings.csv\n"                   \
    "  2    the command line makes no command\n"                               \
    "  3    input refused, nothing written\n"                                  \
    "  4    a file or the store could not be read or written\n"                \
    "  70   a bug of ours, or out of memory\n"                                 \
    "  130  interrupted: what was stored or written before is as it was\n"

static const char general[] =
    "summerlow finds the pumps of a portfolio that cavitate in the hottest\n"
    "week with the source at its lowest: NPSHA below NPSHR plus a margin.\n"
    "\n"
    "Usage:\n"
    "  summerlow audit INVENTORY --out DIR      import, evaluate and rank\n"
    "  summerlow import INVENTORY --store FILE  read an inventory folder\n"
    "  summerlow evaluate --store FILE          work out the margins\n"
    "  summerlow rank --store FILE --out DIR    write the CSV and HTML lists\n"
    "  summerlow explain PUMP --store FILE      the calculation sheet\n"
    "  summerlow COMMAND --help                 more on a command\n"
    "  summerlow --version\n"
    "\n"
    "Example:\n"
    "  summerlow audit sample-inventory --out build/demo\n"
    "\n"
    "Screening, not design: the maker's curves, local codes and a licensed\n"
    "engineer decide.\n" EXIT_CODES;

static const char audit[] =
    "Usage: summerlow audit INVENTORY --out DIR [options]\n"
    "\n"
    "Reads the inventory folder, works out the worst-case margins and writes\n"
    "ranked-stations.csv, pumps.csv, find-out-first.csv, findings.csv and\n"
    "report.html into DIR; the store is kept there too.\n"
    "\n"
    "Options:\n"
    "  --out DIR      where the results go; made if missing\n"
    "  --units si|us  units of the results (default si)\n"
    "  --store FILE   keep the store here instead of DIR/summerlow.db\n"
    "  --label TEXT   name of this vintage (default: the folder's name)\n"
    "  --rule NAME    the margin rule to judge by (default: the first,\n"
    "                 fixed head)\n"
    "  --year YYYY    the year pipes are aged to (default: that of the "
    "import)\n"
    "\n"
    "Examples:\n"
    "  summerlow audit sample-inventory --out build/demo\n"
    "  summerlow audit export-2026 --out results --units us --label "
    "2026\n" EXIT_CODES;

static const char import[] =
    "Usage: summerlow import INVENTORY --store FILE [options]\n"
    "\n"
    "Reads the inventory folder into the store as a new vintage, all or\n"
    "nothing. The same content again is recognised and not stored twice.\n"
    "\n"
    "Options:\n"
    "  --store FILE   the store; made if missing\n"
    "  --label TEXT   name of this vintage (default: the folder's name)\n"
    "  --dry-run      do all but write; needs no --store\n"
    "\n"
    "Examples:\n"
    "  summerlow import sample-inventory --dry-run\n"
    "  summerlow import export-2026 --store audit.db --label 2026\n" EXIT_CODES;

static const char evaluate[] =
    "Usage: summerlow evaluate --store FILE [options]\n"
    "\n"
    "Works out the margins of every pump of the newest vintage, under the\n"
    "inventory's own conditions where it has any, else the shipped ones.\n"
    "\n"
    "Options:\n"
    "  --rule NAME    the margin rule to judge by (default: the first,\n"
    "                 fixed head)\n"
    "  --year YYYY    the year pipes are aged to (default: that of the "
    "import)\n"
    "\n"
    "Examples:\n"
    "  summerlow evaluate --store audit.db\n"
    "  summerlow evaluate --store audit.db --rule 'ANSI/HI 9.6.1-1998'\n"
    "  summerlow evaluate --store audit.db --year 2045\n" EXIT_CODES;

static const char rank[] =
    "Usage: summerlow rank --store FILE --out DIR [options]\n"
    "\n"
    "Writes the lists of the newest evaluation: ranked-stations.csv,\n"
    "pumps.csv, find-out-first.csv, findings.csv and report.html.\n"
    "\n"
    "Options:\n"
    "  --out DIR      where the results go; made if missing\n"
    "  --units si|us  units of the results (default si)\n"
    "  --rule NAME    the newest evaluation by this margin rule\n"
    "  --year YYYY    the newest evaluation of this year\n"
    "\n"
    "Example:\n"
    "  summerlow rank --store audit.db --out results --units us\n" EXIT_CODES;

static const char explain[] =
    "Usage: summerlow explain PUMP --store FILE [options]\n"
    "\n"
    "Prints the calculation sheet of one pump of the newest vintage: each\n"
    "term with its inputs, where they come from, and its formula; the\n"
    "running sets, checks beside the margin, limits and margin rules.\n"
    "\n"
    "Options:\n"
    "  --units si|us  units of the sheet (default si)\n"
    "  --rule NAME    the margin rule to judge by (default: that of the\n"
    "                 newest evaluation)\n"
    "  --year YYYY    the year pipes are aged to (default: likewise)\n"
    "\n"
    "Example:\n"
    "  summerlow explain EB-014-P1 --store "
    "build/demo/summerlow.db\n" EXIT_CODES;

const char *sl_help(enum sl_command command)
{
    switch (command) {
    case SL_COMMAND_AUDIT:
        return audit;
    case SL_COMMAND_IMPORT:
        return import;
    case SL_COMMAND_EVALUATE:
        return evaluate;
    case SL_COMMAND_RANK:
        return rank;
    case SL_COMMAND_EXPLAIN:
        return explain;
    case SL_COMMAND_NONE:
        break;
    }
    return general;
}
