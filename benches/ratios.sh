#!/bin/sh
# Ratios of the product to its floor: every pair in turn, five times; prints the least, the median and the greatest.
#
#   benches/ratios.sh [SHEET]
#
# Times alone mean little on a shared machine; the ratio of two times taken one after the other does. Ratios are of
# whole times, but `start` is what `heatpath run SHEET` takes beyond `true`, in milliseconds. Set CARGO_TARGET_DIR as
# for any build.
set -eu
cd "$(dirname "$0")/.."
sheet=${1:-examples/zinc-pot.heat}
rounds=5
starts=40
pairs="evaluate_one evaluate_block table plateau read cold"
target=${CARGO_TARGET_DIR:-target}
program=$target/release/heatpath
taken=$(mktemp)
trap 'rm -f "$taken"' EXIT

cargo build --release --quiet
bench=$(cargo bench --bench passes --no-run 2>&1 | sed -n 's/.*(\(.*passes-[0-9a-f]*\)).*/\1/p')

# Nanoseconds of one half of a pair.
nanoseconds() {
    "$bench" --bench --output-format bencher --noplot --warm-up-time 0.2 --measurement-time 0.5 "^$1\$" 2>/dev/null |
        sed -n 's/^test .* bench: *\([0-9,]*\) ns.*/\1/p' | tr -d ,
}

# Milliseconds of one start of a command, by the mean of several; its answer and its exit status do not matter.
milliseconds() {
    from=$(date +%s%N)
    start=0
    while [ "$start" -lt "$starts" ]; do
        "$@" >/dev/null 2>&1 || true
        start=$((start + 1))
    done
    echo "$from $(date +%s%N) $starts" | awk '{ printf "%.3f", ($2 - $1) / $3 / 1e6 }'
}

# Least, median and greatest of what stands behind a name.
spread() {
    grep "^$1 " "$taken" | cut -d' ' -f2 | sort -g |
        awk -v name="$1" -v unit="$2" '{ v[NR] = $1 }
            END { printf "%-16s %10.2f %10.2f %10.2f  %s\n", name, v[1], v[int((NR + 1) / 2)], v[NR], unit }'
}

round=0
while [ "$round" -lt "$rounds" ]; do
    for pair in $pairs; do
        product=$(nanoseconds "$pair/product")
        floor=$(nanoseconds "$pair/floor")
        echo "$pair $product $floor" | awk '{ print $1, $2 / $3 }' >>"$taken"
    done
    whole=$(milliseconds "$program" run "$sheet")
    empty=$(milliseconds true)
    echo "$whole $empty" | awk '{ print "start", $1 - $2 }' >>"$taken"
    round=$((round + 1))
done

printf '%-16s %10s %10s %10s\n' pair least median greatest
for pair in $pairs; do
    spread "$pair" "times the floor"
done
spread start "ms beyond true"

if [ -x /usr/bin/time ]; then
    /usr/bin/time -f '%M' "$program" run "$sheet" 2>&1 >/dev/null | tail -1 |
        awk '{ printf "%-16s %10s %10.2f %10s  MB at most\n", "memory", "", $1 / 1024, "" }'
fi
