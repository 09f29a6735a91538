# Writes an inventory's file anew with its customary columns in SI, each value
# to 17 digits, which tell any two doubles apart.
function fields(line, into, n, i, c, quoted)
{
    n = 1
    into[1] = ""
    for (i = 1; i <= length(line); i++) {
        c = substr(line, i, 1)
        if (c == "\"")
            quoted = !quoted
        if (c == "," && !quoted)
            into[++n] = ""
        else
            into[n] = into[n] c
    }
    return n
}
function si(name, value)
{
    if (value !~ /^[-+.0-9eE]+$/)
        return value
    if (name ~ /_f$/)
        return sprintf("%.17g", (value + 459.67) * 5 / 9 - 273.15)
    return sprintf("%.17g", value * factor[kind])
}
BEGIN {
    split("ft in gpm psi inhg mgd hp", from)
    split("m mm l_s kpa hpa m3_s kw", to)
    factor["ft"] = 0.3048
    factor["in"] = 25.4
    factor["gpm"] = 3.785411784 / 60
    factor["psi"] = 6.894757293168362
    factor["inhg"] = 33.86389
    factor["mgd"] = 3785.411784 / 86400
    factor["hp"] = 0.55 * 0.3048 * 0.45359237 * 9.80665
}
{
    sub(/\r$/, "")
    count = fields($0, field)
    for (i = 1; i <= count; i++) {
        if (FNR == 1) {
            header[i] = field[i]
            sub(/_f$/, "_c", field[i])
            for (u in from)
                if (header[i] ~ "_" from[u] "$")
                    sub("_" from[u] "$", "_" to[u], field[i])
        } else {
            kind = header[i]
            sub(/.*_/, "", kind)
            if (kind == "f" || kind in factor)
                field[i] = si(header[i], field[i])
        }
        printf("%s%s", (i > 1) ? "," : "", field[i])
    }
    print ""
}
