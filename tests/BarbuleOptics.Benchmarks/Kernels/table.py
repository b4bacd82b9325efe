#!/usr/bin/env python3
"""Writes the table of the kernels' speed into a document, between its marks.

    python3 table.py LINES DOCUMENT SDK_VERSION

LINES has the JSON objects that `kernels --json` and the plain scripts print, one a line.
"""
import json
import sys

BEGIN, END = "<!-- kernels: begin -->", "<!-- kernels: end -->"


def processor():
    with open("/proc/cpuinfo", encoding="utf-8") as lines:
        for line in lines:
            if line.startswith("model name"):
                return line.split(":", 1)[1].strip()
    return "unknown processor"


def speed(line):
    if line["points_per_second"]:
        return f"{line['points_per_second']:.2g} points/s".replace("e+0", "e")
    return f"{line['microseconds_per_solve']:.3g} us/solve"


def row(name, lines, plain):
    one = next(line for line in lines if line["threads"] == 1 and not line["forced"])
    rate = lambda line: line["points_per_second"] or 1 / line["microseconds_per_solve"]
    pick = lambda **wanted: next((line for line in lines if all(line[key] == value for key, value in wanted.items())), None)
    two, half = pick(threads=2), pick(width=256, forced=True)
    share = f"{one['fma_peak_share']:.2f}" if one["fma_peak_share"] is not None else ""
    # Two threads of solves: the time of a solve is counted a thread.
    threads = rate(two) / rate(one) * (1 if two["points_per_second"] else 2) if two else None
    against = f"{rate(one) / rate(plain):.0f}" if plain else ""
    cells = [name, speed(one), share, against, f"{threads:.2f}" if threads else "", f"{rate(half) / rate(one):.2f}" if half else "", f"{one['max_error']:.0e}"]
    return "| " + " | ".join(cells) + " |"


def main():
    lines = [json.loads(line) for line in open(sys.argv[1], encoding="utf-8") if line.startswith("{")]
    plain = {line["workload"]: line for line in lines if line.get("plain")}
    names = list(dict.fromkeys(line["workload"] for line in lines))
    own = {name: [line for line in lines if line["workload"] == name and not line.get("plain")] for name in names}
    width = max(line["width"] for line in lines if not line.get("plain") and not line["forced"])
    table = [f"{processor()}, vectors of {width} bits, .NET SDK {sys.argv[3]}; medians of one run.", "",
             "| workload | one thread | share of FMA peak | times plain numpy | two threads / one | 256 bits / widest | largest error |", "|---|---|---|---|---|---|---|"]
    table += [row(name, own[name], plain.get(name)) for name in names if own[name]]
    text = open(sys.argv[2], encoding="utf-8").read()
    head, rest = text.split(BEGIN)
    text = head + BEGIN + "\n" + "\n".join(table) + "\n" + END + rest.split(END)[1]
    open(sys.argv[2], "w", encoding="utf-8").write(text)


if __name__ == "__main__":
    main()
