"""Works out covariances and shifts of networks by exact fractions, apart from the engine and from any library.

Reads a list of networks on standard input and writes them with their results on standard output:

    python3 work-out.py < networks.json > results.json

A value is the sum of its links' sensitivities times what they lean on, plus its local part. Every value is first
written out as a sum over elementary effects (local parts, sources, class limits); the covariance of two values is
then the double sum over the covariances of these effects. A class limit is an effect of its own, one for each pair
of child and parent. A shift of a value or source goes down every path except those through a class limit.
"""

import json
import sys
from fractions import Fraction


def work_out(network):
    ids = [value["id"] for value in network["values"]]
    links_of = {name: [] for name in ids}
    for link in network["links"]:
        links_of[link["child"]].append(link)

    effect_covariance = {}
    for value in network["values"]:
        local = Fraction(value["local"])
        effect_covariance[("local", value["id"]), ("local", value["id"])] = local * local
    for group in network.get("groups", []):
        for i, one in enumerate(group["members"]):
            for j, other in enumerate(group["members"]):
                effect_covariance[("local", one), ("local", other)] = Fraction(group["covariance"][i][j])
    for source in network.get("sources", []):
        u = Fraction(source["standardUncertainty"])
        effect_covariance[("source", source["id"]), ("source", source["id"])] = u * u

    sums = {source["id"]: {("source", source["id"]): Fraction(1)} for source in network.get("sources", [])}

    def sum_of(name):
        """The value as sensitivities to elementary effects."""
        if name in sums:
            return sums[name]
        total = {("local", name): Fraction(1)}
        for link in links_of[name]:
            c = Fraction(link["sensitivity"])
            if "classLimit" in link:
                effect = ("limit", name, link["parent"])
                u = Fraction(link["classLimit"]["standardUncertainty"])
                effect_covariance[effect, effect] = u * u
                total[effect] = total.get(effect, 0) + c
                continue
            for effect, part in sum_of(link["parent"]).items():
                total[effect] = total.get(effect, 0) + c * part
        sums[name] = total
        return total

    for name in ids:
        sum_of(name)

    def covariance(a, b):
        return sum(
            (x * y * effect_covariance.get((p, q), 0) for p, x in sums[a].items() for q, y in sums[b].items()),
            Fraction(0),
        )

    def shifts_from(start):
        shifted = {start: Fraction(1)}

        def of(name):
            if name not in shifted:
                below = [
                    (link, of(link["parent"])) for link in links_of.get(name, []) if of(link["parent"]) is not None
                ]
                shifted[name] = (
                    sum((0 if "classLimit" in link else Fraction(link["sensitivity"]) * part) for link, part in below)
                    if below
                    else None
                )
            return shifted[name]

        return {name: float(of(name)) for name in ids if name != start and of(name) is not None}

    return {
        **network,
        "covariance": [[float(covariance(a, b)) for b in ids] for a in ids],
        "shifts": {start: shifts_from(start) for start in network["shiftFrom"]},
    }


json.dump([work_out(network) for network in json.load(sys.stdin)], sys.stdout)
