# For awk programs of the tests: `awk -f tests/csv.awk -f PROGRAM`.

# The cells of one CSV line, no cell over two lines, into the array; how many.
function cells(line, into,    count, quoted, at, character, cell)
{
    count = 0
    cell = ""
    quoted = 0
    for (at = 1; at <= length(line) + 1; at++) {
        character = substr(line, at, 1)
        if (character == "\"")
            quoted = !quoted # a doubled one turns it twice
        else if (at > length(line) || (character == "," && !quoted)) {
            into[++count] = cell
            cell = ""
        } else if (character != "\r")
            cell = cell character
    }
    return count
}
