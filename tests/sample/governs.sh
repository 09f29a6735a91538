#!/bin/sh
# What docs/what-governs.md tells of the sample inventory, in the results: in
# summer low, the state of each pump, the running set that governs, and the
# flow in that set, which no other set comes near.
# Usage: governs.sh PROGRAM INVENTORY
set -u
tests=$(dirname "$0")/..
work=$(mktemp -d)
trap 'rm -rf "$work"' EXIT
"$1" audit "$2" --out "$work" --units us --year 2026 >"$work/said" 2>&1
[ $? -le 1 ] || {
    cat "$work/said"
    exit 1
}
# pump|state|the set, an extended regular expression|its flow in gpm
cat >"$work/expected" <<'END'
RW-074-P1|thin|^alone$|1173.3
RW-074-P3|thin|^alone$|1173.3
PW-075-P1|short|^with PW-075-P2,? (and )?PW-075-P3,? (and )?PW-075-P4$|1026.1
PW-076-P1|short|^with (any 1 of PW-076-P2,? (or )?)?PW-076-P[23]$|1295.0
PW-076-P3|short|^with (any 1 of PW-076-P1,? (or )?)?PW-076-P[12]$|1295.0
RW-077-P1|short|^alone$|1525.5
PW-078-P1|short|^alone$|1174.2
PW-079-P1|clear|^alone$|920.3
END
cat >"$work/look.awk" <<'END'
FNR == 1 { file++ }
file == 1 && FNR == 1 {
    columns = cells($0, header)
    for (i = 1; i <= columns; i++)
        place[header[i]] = i
    next
}
file == 1 {
    cells($0, row)
    if (row[place["condition"]] == "summer low")
        line[row[place["pump_id"]]] = $0
    next
}
{
    split($0, expected, "|")
    pump = expected[1]
    cells(line[pump], row)
    state = row[place["state"]]
    away = row[place["flow_gpm"]] - expected[4]
    set = row[place["running_set"]]
    fits = (pump in line) && state == expected[2] &&
        away <= 0.5 && away >= -0.5 && set ~ expected[3]
    if (!fits)
        bad = 1
    printf "%-7s %s: %s, %s gpm, %s\n", fits ? "ok" : "FAILED:", pump, state,
        row[place["flow_gpm"]], set
    looked++
}
END { exit bad || looked < 8 }
END
awk -f "$tests/csv.awk" -f "$work/look.awk" "$work/pumps.csv" "$work/expected"
