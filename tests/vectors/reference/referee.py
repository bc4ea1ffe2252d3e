#!/usr/bin/env python3
"""Computes the figures of a byte source anew, from the formulas alone, to judge what the program writes.

Nothing of the project is imported. Debian's python3 and python3-numpy are all it needs.
Usage: referee.py FILE...      prints one JSON object a file, in order
       referee.py --self-test  checks itself against published values and ends with 0 or 1

Formulas: entropy and its bound (Shannon 1948); correction (Miller 1955); adaptive code length of a sequential Dirichlet coder
(Krichevsky & Trofimov 1981, with other alphas); held-out cost with escapes; Huffman 1952; limited codes by the coin collector's
problem (Larmore & Hirschberg 1990); table formats of RFC 1951 section 3.2.7 and two of the project's own.
"""
import hashlib
import heapq
import json
import math
import sys

import numpy as np

LN2 = math.log(2)


# ---- counting: plain indexing of the whole file ------------------------------------------------------------------

def context_rows(data, order):
    """Sorted arrays (context, symbol, fold, count) of an order."""
    n = len(data)
    symbol = data[order:].astype(np.int64)
    context = np.zeros(n - order, np.int64)
    for back in range(order, 0, -1):
        context = (context << 8) | data[order - back:n - back].astype(np.int64)
    fold = (np.arange(order, n, dtype=np.int64) >> 12) & 1
    key, count = np.unique((context << 9) | (symbol << 1) | fold, return_counts=True)
    return key >> 9, (key >> 1) & 255, key & 1, count


def block_counts(data, n):
    whole = len(data) // n
    key = np.zeros(whole, np.int64)
    for at in range(n):
        key = (key << 8) | data[at:whole * n:n].astype(np.int64)
    return np.unique(key, return_counts=True)


# ---- entropies ------------------------------------------------------------------------------------------------------

def information(count, total):
    """-log2(count/total), well behaved near 1."""
    count, total = np.asarray(count, float), np.asarray(total, float)
    return np.where(count > total - count, np.log1p((total - count) / count) / LN2, np.log2(total / count))


def log_gamma(x):
    return np.array([math.lgamma(float(v)) for v in np.atleast_1d(x)])


def rising_excess(n, a):
    """ln[Γ(n+a)/Γ(a)] for each n: products for small n, so that no large numbers cancel."""
    out = np.empty(len(n))
    for i, value in enumerate(n):
        value = int(value)
        out[i] = math.fsum(math.log(a + j) for j in range(value)) if value <= 64 else math.lgamma(value + a) - math.lgamma(a)
    return out


def order_figures(data, order, alphabet=256):
    context, symbol, fold, count = context_rows(data, order)
    total = len(data)
    predicted = total - order
    pair = (context << 8) | symbol
    pairs, at = np.unique(pair, return_inverse=True)
    both = np.bincount(at, weights=count).astype(np.int64)
    fold0 = np.bincount(at, weights=count * (fold == 0)).astype(np.int64)
    fold1 = both - fold0
    contexts, where = np.unique(pairs >> 8, return_inverse=True)
    size = np.bincount(where, weights=both).astype(np.int64)
    bits = information(both, size[where])
    entropy = math.fsum(both * bits) / predicted
    mean = entropy
    variance = math.fsum(both * (bits - mean) ** 2) / predicted
    corrected = entropy + (len(pairs) - len(contexts)) / (2 * predicted * LN2)

    grid = range(math.ceil(math.log2(alphabet)) + 1)
    values, times = np.unique(both, return_counts=True)
    sizes, many = np.unique(size, return_counts=True)
    best = None
    for j in grid:
        a = 2.0 ** -j
        nats = math.fsum(many * rising_excess(sizes, alphabet * a)) - math.fsum(times * rising_excess(values, a))
        best = nats / LN2 if best is None else min(best, nats / LN2)
    adaptive = (best + math.ceil(math.log2(len(grid))) + order * math.log2(alphabet)) / total

    held, escapes = [], 0
    for train, pay in ((fold0, fold1), (fold1, fold0)):
        n = np.bincount(where, weights=train).astype(np.int64)[where]
        d = np.bincount(where, weights=(train > 0)).astype(np.int64)[where]
        for p, t, context_size, distinct in zip(pay, train, n, d):
            if p == 0:
                continue
            if context_size == 0:
                cost = math.log2(alphabet)
                escapes += int(p)
            elif t > 0:
                cost = -math.log2(t / (context_size if distinct == alphabet else context_size + distinct))
            else:
                cost = -math.log2(distinct / (context_size + distinct) / (alphabet - distinct))
                escapes += int(p)
            held.append(p * cost)
    return {"order": order, "entropy": entropy, "corrected": corrected, "standardError": math.sqrt(variance / predicted), "adaptive": adaptive,
            "heldOut": math.fsum(held) / predicted if total >= 8192 else None, "escapes": escapes if total >= 8192 else None,
            "contexts": len(contexts), "under8": int((size < 8).sum()), "pairs": len(pairs), "thin": int((both == 1).sum()) / predicted}


# ---- codes -----------------------------------------------------------------------------------------------------------

def huffman_cost(weights, radix=2):
    """Sum of package weights = sum of weight x length of any optimal code."""
    heap = [int(w) for w in weights if w > 0]
    if len(heap) == 0:
        return 0
    if len(heap) == 1:
        return heap[0]
    heap += [0] * ((radix - 1 - (len(heap) - 1) % (radix - 1)) % (radix - 1))
    heapq.heapify(heap)
    total = 0
    while len(heap) > 1:
        package = sum(heapq.heappop(heap) for _ in range(radix))
        total += package
        heapq.heappush(heap, package)
    return total


def huffman_lengths(counts):
    """Lengths as the method fixes them: two queues, a leaf before an equal package; then the longest to the lowest (count, symbol)."""
    order = sorted((c, s) for s, c in enumerate(counts) if c > 0)
    lengths = [0] * len(counts)
    if len(order) == 1:
        lengths[order[0][1]] = 1
        return lengths
    leaves = [c for c, _ in order]
    packages, children, leaf, package = [], [], 0, 0
    for _ in range(len(order) - 1):
        took = []
        for _ in range(2):
            if leaf < len(leaves) and (package >= len(packages) or leaves[leaf] <= packages[package]):
                took.append(("leaf", leaf, leaves[leaf]))
                leaf += 1
            else:
                took.append(("package", package, packages[package]))
                package += 1
        packages.append(took[0][2] + took[1][2])
        children.append(took)
    depth = [0] * len(packages)
    histogram = {}
    for k in range(len(packages) - 1, -1, -1):
        for kind, index, _ in children[k]:
            if kind == "package":
                depth[index] = depth[k] + 1
            else:
                histogram[depth[k] + 1] = histogram.get(depth[k] + 1, 0) + 1
    ranked = [length for length in sorted(histogram, reverse=True) for _ in range(histogram[length])]
    for (_, symbol), length in zip(order, ranked):
        lengths[symbol] = length
    return lengths


def limited_cost(counts, limit):
    """Coin collector: each symbol has one coin of weight n at each of `limit` face values; the cheapest 2m - 2 at the top level pay."""
    leaves = sorted(int(c) for c in counts if c > 0)
    if len(leaves) < 2:
        return sum(leaves)
    if 2 ** limit < len(leaves):
        return None
    row = leaves
    for _ in range(limit - 1):
        row = sorted(leaves + [row[i] + row[i + 1] for i in range(0, len(row) - 1, 2)])
    return sum(row[:2 * len(leaves) - 2])


def grouped_cost(weights, times):
    """Huffman cost of symbols given as (weight, how many): equal weights are paired in bulk."""
    many = {}
    for w, t in zip(weights, times):
        many[w] = many.get(w, 0) + t
    if sum(many.values()) == 1:
        return next(iter(many))
    heap = list(many)
    heapq.heapify(heap)
    total = 0
    while heap:
        w = heapq.heappop(heap)
        t = many.pop(w)
        made = {}
        if t > 1:
            made[2 * w] = t // 2
            total += 2 * w * (t // 2)
        if t % 2:
            if not heap:
                if not made:
                    return total
            else:
                o = heap[0]
                if made and 2 * w < o:
                    o = None
                if o is None:
                    # The lightest partner is a pair of the same weight just made.
                    made[2 * w] -= 1
                    made[3 * w] = made.get(3 * w, 0) + 1
                    total += 3 * w
                    t = 0
                else:
                    many[o] -= 1
                    if many[o] == 0:
                        heapq.heappop(heap)
                        del many[o]
                    made[w + o] = made.get(w + o, 0) + 1
                    total += w + o
                    t = 0
            if t % 2 and not heap and made:
                made[2 * w] -= 1
                made[3 * w] = made.get(3 * w, 0) + 1
                total += 3 * w
        for weight, number in made.items():
            if number == 0:
                continue
            if weight not in many:
                heapq.heappush(heap, weight)
                many[weight] = 0
            many[weight] += number
        if len(heap) == 1 and many[heap[0]] == 1:
            return total
    return total


def extension_rate(counts, n):
    """Expected bit/symbol of the Huffman code of the n-th extension, by listing products with their multiplicity, in exact integers."""
    used = [int(c) for c in counts if c > 0]
    if len(used) == 1:
        return 1 / n
    products = {1: 1}
    for _ in range(n):
        step = {}
        for weight, times in products.items():
            for c in used:
                step[weight * c] = step.get(weight * c, 0) + times
        products = step
    return grouped_cost(list(products), list(products.values())) / sum(used) ** n / n


# ---- tables ----------------------------------------------------------------------------------------------------------

def elias_delta(v):
    bits = v.bit_length()
    return bits - 1 + 2 * bits.bit_length() - 1


def flat_bits(lengths):
    longest = max(lengths)
    return 7 + len(lengths) * math.ceil(math.log2(longest + 1))


def sparse_bits(lengths):
    symbols = [s for s, length in enumerate(lengths) if length]
    bits = elias_delta(len(symbols)) + elias_delta(symbols[0] + 1) + sum(elias_delta(b - a) for a, b in zip(symbols, symbols[1:])) + 7
    longest = max(lengths)
    histogram = [sum(1 for length in lengths if length == at) for at in range(1, longest + 1)]
    bits += 4 * longest
    return bits if sum(1 for h in histogram if h) == 1 else bits + limited_cost(histogram, 15)


def deflate_header_bits(lengths):
    """RFC 1951 section 3.2.7 for 257 literal lengths (the last one 0) and one distance length of 0, greedy runs that do not cross; the 3 bits of block type left out."""
    if max(lengths) > 15:
        return None
    tokens = []
    for part in (lengths + [0], [0]):
        at = 0
        while at < len(part):
            run = 1
            while at + run < len(part) and part[at + run] == part[at]:
                run += 1
            at += run
            value = part[at - 1]
            if value == 0:
                while run >= 11:
                    take = min(run, 138)
                    tokens.append((18, 7))
                    run -= take
                if run >= 3:
                    tokens.append((17, 3))
                    run = 0
                tokens += [(0, 0)] * run
            else:
                tokens.append((value, 0))
                run -= 1
                while run >= 3:
                    take = min(run, 6)
                    tokens.append((16, 2))
                    run -= take
                tokens += [(value, 0)] * run
    counts = [sum(1 for t, _ in tokens if t == s) for s in range(19)]
    order = [16, 17, 18, 0, 8, 7, 9, 6, 10, 5, 11, 4, 12, 3, 13, 2, 14, 1, 15]
    last = max(i for i, s in enumerate(order) if counts[s])
    return 14 + 3 * max(4, last + 1) + limited_cost(counts, 7) + sum(extra for _, extra in tokens)


def framing_bits(symbols, table, payload):
    head = 2 + elias_delta(symbols + 1)
    return head + -(head + table + payload) % 8


# ---- one file ---------------------------------------------------------------------------------------------------------

def figures(content):
    data = np.frombuffer(content, np.uint8)
    total = len(data)
    out = {"bytes": total, "sha256": hashlib.sha256(content).hexdigest(), "symbols": total}
    if total == 0:
        return out
    counts = np.bincount(data, minlength=256).tolist()
    out["symbolsInUse"] = sum(1 for c in counts if c)
    out["orders"] = [order_figures(data, k) for k in range(3) if total > k]
    expected = total / 256
    out["chiSquare"] = math.fsum((c - expected) ** 2 / expected for c in counts)
    lengths = huffman_lengths(counts)
    out["huffman"] = huffman_cost(counts)
    assert out["huffman"] == sum(c * length for c, length in zip(counts, lengths))
    out["longestCode"] = max(lengths)
    out["limited"] = {str(limit): limited_cost(counts, limit) for limit in (11, 12, 15)}
    out["radix3"] = huffman_cost(counts, 3)
    out["tables"] = {"flat": flat_bits(lengths), "sparse": sparse_bits(lengths), "RFC 1951 dynamic header": deflate_header_bits(lengths)}
    out["fixed"] = total * math.ceil(math.log2(out["symbolsInUse"])) if out["symbolsInUse"] > 1 else 0
    out["blocks"] = []
    for n in (2, 3):
        if total < n:
            continue
        _, times = block_counts(data, n)
        weights, many = np.unique(times, return_counts=True)
        left = total % n * 8
        entry = {"blockLength": n, "inUse": len(times), "entropy": math.fsum(times * information(times, np.full(len(times), times.sum()))) / int(times.sum()) / n,
                 "payload": grouped_cost(weights.tolist(), many.tolist()) + left}
        if len(set(c for c in counts if c)) ** n <= 200_000:
            entry["extension"] = extension_rate(counts, n)
        out["blocks"].append(entry)
    if total > 1:
        context, symbol, _, count = context_rows(data, 1)
        table = np.zeros((256, 256), np.int64)
        np.add.at(table, (context, symbol), count)
        out["contextHuffman"] = 8 + sum(huffman_cost(row[row > 0].tolist()) for row in table if row.any())
    return out


def self_test():
    checks = []
    abra = figures(b"abracadabra")
    checks += [abs(abra["orders"][0]["entropy"] - 2.0403733936884962) < 1e-12, abra["huffman"] == 23, abs(abra["orders"][1]["entropy"] - 0.6) < 1e-12]
    checks += [limited_cost([1, 1, 2, 3, 5, 8], 3) == 47, limited_cost([1, 1, 2, 3, 5, 8], 4) == 46, huffman_cost([1, 1, 2, 3, 5, 8]) == 45]
    checks += [huffman_cost([22, 20, 18, 15, 10, 8, 5, 2], 4) == 147, huffman_cost([25, 25, 20, 15, 15]) == 230, huffman_cost([25, 25, 20, 15, 15], 3) == 150]
    rates = [1, 129 / 200, 799 / 1500, 9851 / 20000, 240097 / 500000, 2820941 / 6000000]
    checks += [abs(extension_rate([9, 1], n) - rate) < 1e-12 for n, rate in enumerate(rates, 1)]
    rng = np.random.default_rng(1)
    for _ in range(300):
        weights = rng.integers(1, 9, rng.integers(1, 60)).tolist()
        checks.append(grouped_cost(weights, [1] * len(weights)) == huffman_cost(weights))
    print(json.dumps({"checks": len(checks), "failed": [i for i, ok in enumerate(checks) if not ok]}))
    return 0 if all(checks) else 1


def main(arguments):
    if arguments == ["--self-test"]:
        return self_test()
    for path in arguments:
        with open(path, "rb") as stream:
            print(json.dumps(figures(stream.read())))
    return 0


if __name__ == "__main__":
    sys.exit(main(sys.argv[1:]))
