#!/bin/sh
# The walls between the rooms: which room may include which, and which
# symbols hydraulics may import.
set -u
bad=0

# allowed ROOM ROOMS...: headers of other rooms and no outside library.
allowed()
{
    room=$1
    shift
    for file in src/"$room"/*.c include/"$room"/*.h; do
        [ -f "$file" ] || continue
        for used in $(sed -n 's|^ *# *include *["<]\([a-z]*\)/.*|\1|p' \
            "$file" | grep -vx sys); do
            case " $room $* " in
            *" $used "*) ;;
            *)
                echo "$file: $room may not use $used"
                bad=1
                ;;
            esac
        done
    done
}

# only ROOM HEADER: no other room includes this library.
only()
{
    for file in $(grep -lE "# *include *[<\"]$2[>\"]" \
        src/*/*.c include/*/*.h); do
        case $file in
        */"$1"/*) ;;
        *)
            echo "$file: only $1 may use <$2>"
            bad=1
            ;;
        esac
    done
}

allowed base
allowed model base
allowed hydraulics base model
allowed store model base
allowed importer model base
allowed evaluator hydraulics model base
allowed ranker model base
allowed app base model hydraulics store importer evaluator ranker
only store sqlite3.h
only importer csv.h
only importer sha2.h

# Only app prints, exits, reads the environment or the clock.
calls='exit|_exit|abort|getenv|time|clock|clock_gettime|gettimeofday|printf'
calls="$calls|puts|putchar|perror|isatty|signal|sigaction"
for file in $(grep -lE "\b($calls) ?\(|^[^/*]*\b(stdin|stdout|stderr)\b" \
    src/*/*.c); do
    case $file in
    src/app/* | src/base/memory.c) ;;
    *)
        echo "$file: only app prints, exits, reads environment or clock"
        bad=1
        ;;
    esac
done

# hydraulics is pure: the mathematics library and nothing else.
objects=$(find build -path '*/src/hydraulics/*.o' | grep release)
if [ -z "$objects" ]; then
    objects=$(find build -path '*/src/hydraulics/*.o')
fi
[ -n "$objects" ] || {
    echo "no hydraulics objects are built: nothing was checked"
    exit 1
}
for symbol in $(nm -u $objects | sed -n 's/^ *U //p' | sort -u); do
    case $symbol in
    sl_* | acos | cbrt | exp | ldexp | log2 | fabs | fmax | fmin | isfinite | log | log10 | \
        memcpy | memset | \
        pow | sqrt | nan | __stack_chk_fail | __asan_* | __ubsan_* | \
        _GLOBAL_OFFSET_TABLE_) ;;
    *)
        echo "hydraulics imports $symbol: no I/O, no heap, no state there"
        bad=1
        ;;
    esac
done

state=$(nm $objects | grep -E ' [BbCDdGgSs] ')
[ -z "$state" ] || {
    echo "hydraulics keeps state: $state"
    bad=1
}

# Unchecked text functions are banned everywhere.
banned='strcpy|strcat|sprintf|vsprintf|strtok|atoi|atol|atoll|atof|gets|scanf'
banned="$banned|sscanf|fscanf|localtime|ctime|asctime|setlocale"
if grep -nE "\b($banned) *\(" src/*/*.c include/*/*.h; then
    echo "a banned function"
    bad=1
fi
if grep -nwE 'strtod|strtof|strtold' src/*/*.c |
    grep -v '^src/base/number.c:'; then
    echo "strtod belongs in src/base/number.c, behind the number grammar"
    bad=1
fi
[ $bad -eq 0 ] && echo "walls: ok"
exit $bad
