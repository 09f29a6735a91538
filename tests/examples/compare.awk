# Compare one example: the results in SI, in US units, and expected.csv.
# A column is found by its name in either; "a_m+b_m" is the sum of two, and
# "a~word" is 1 where the column's text has that word, else 0.  Takes
# ../csv.awk before it.  Ends with 1 when a figure is outside, or none is.

# The sum of the columns named for that pump; "" where one is missing.
function figure(pump, names,    parts, count, part, sum)
{
    if (split(names, parts, "~") == 2) {
        if (!((pump, parts[1]) in results))
            return ""
        return index(results[pump, parts[1]], parts[2]) > 0
    }
    count = split(names, parts, "+")
    sum = 0
    for (part = 1; part <= count; part++) {
        if (!((pump, parts[part]) in results) ||
            results[pump, parts[part]] == "")
            return ""
        sum += results[pump, parts[part]]
    }
    return sum
}

FNR == 1 {
    file++
    columns = cells($0, header)
    for (i = 1; i <= columns; i++)
        place[file, header[i]] = i
    next
}

file < 3 {
    columns = cells($0, row)
    for (i = 1; i <= columns; i++)
        results[row[place[file, "pump_id"]], header[i]] = row[i]
    next
}

{
    cells($0, row)
    pump = row[place[3, "pump_id"]]
    names = row[place[3, "column"]]
    wanted = row[place[3, "published"]]
    tolerance = row[place[3, "tolerance"]]
    compared++
    got = figure(pump, names)
    away = got - wanted
    fits = got != "" && tolerance != "" && wanted != "" &&
        away <= tolerance + 1e-9 && -away <= tolerance + 1e-9
    if (!fits)
        bad = 1
    printf "%-7s %-4s %-6s %-24s got %9s, published %8s +/- %s %s\n",
        fits ? "ok" : "FAILED:", example, pump,
        (length(names) > 24) ? substr(names, 1, 21) "..." : names,
        got == "" ? "none" : got, wanted, tolerance, row[place[3, "unit"]]
}

END { exit bad || !compared }
