# Some columns, by name, of some records of a CSV file: `columns` are their
# names parted by commas, `records` an extended regular expression that the
# first of them matches.  Takes csv.awk before it.
FNR == 1 {
    count = cells($0, header)
    for (i = 1; i <= count; i++)
        place[header[i]] = i
    count = split(columns, names, ",")
    next
}
{
    cells($0, row)
    if (row[place[names[1]]] !~ records)
        next
    for (i = 1; i <= count; i++)
        printf "%s%s", names[i] in place ? row[place[names[i]]] : "no column",
            i < count ? "," : "\n"
}
