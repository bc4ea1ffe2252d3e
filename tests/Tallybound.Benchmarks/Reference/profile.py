#!/usr/bin/env python3
"""The default profile's main figures by numpy, written with care for speed, as the other side of the whole-run comparison.

Counts orders 0-2 with folds and symbol blocks of 2 and 3 in one reading of the file, then computes plug-in entropies, adaptive
(Dirichlet) and held-out costs, Huffman and limited payloads, block Huffman payloads and one Huffman table a context, and
the SHA-256. Not in it, and in the program's run: table serialisation, tANS, range coder, segments, block-size curve, the report.

Usage: profile.py FILE
"""
import hashlib
import heapq
import json
import math
import sys

import numpy as np

CHUNK = 1 << 25


def count(path):
    digest = hashlib.sha256()
    triples = [np.zeros(1 << 24, np.int64), np.zeros(1 << 24, np.int64)]
    blocks3 = np.zeros(1 << 24, np.int64)
    blocks2 = np.zeros(1 << 16, np.int64)
    head, before, total = b"", b"", 0
    with open(path, "rb", buffering=0) as stream:
        while True:
            chunk = stream.read(CHUNK)
            if not chunk:
                break
            digest.update(chunk)
            head = (head + chunk)[:2] if total < 2 else head
            data = np.frombuffer(before + chunk, np.uint8).astype(np.uint32)
            first = total - len(before)
            if len(data) >= 3:
                keys = (data[:-2] << 16) | (data[1:-1] << 8) | data[2:]
                fold = ((np.arange(first + 2, first + len(data)) >> 12) & 1).astype(bool)
                triples[0] += np.bincount(keys[~fold], minlength=1 << 24)
                triples[1] += np.bincount(keys[fold], minlength=1 << 24)
                blocks3 += np.bincount(keys[(-first) % 3::3], minlength=1 << 24)
            start = total % 2
            pairs = np.frombuffer((before + chunk)[len(before) - start:], np.uint8)
            pairs = pairs[:len(pairs) // 2 * 2].astype(np.uint32)
            blocks2 += np.bincount((pairs[0::2] << 8) | pairs[1::2], minlength=1 << 16)
            total += len(chunk)
            before = (before + chunk)[-2:]
    return digest.hexdigest(), total, head, triples, blocks2, blocks3


def lgamma(x):
    """Stirling's series, shifted above 10."""
    x = np.asarray(x, float)
    shift = np.zeros_like(x)
    for _ in range(10):
        small = x < 10
        shift = np.where(small, shift - np.log(np.where(small, x, 1.0)), shift)
        x = np.where(small, x + 1, x)
    y = 1 / (x * x)
    return shift + (x - 0.5) * np.log(x) - x + 0.9189385332046727 + (1 / 12 - y * (1 / 360 - y * (1 / 1260 - y / 1680))) / x


def order_figures(fold0, fold1, order, total):
    both = fold0 + fold1
    context = both.sum(axis=1)
    used = both[both > 0]
    n = int(context.sum())
    bits = float((context[context > 0] * np.log2(context[context > 0])).sum() - (used * np.log2(used)).sum())
    counts, times = np.unique(used, return_counts=True)
    sizes, many = np.unique(context[context > 0], return_counts=True)
    best = None
    for j in range(9):
        alpha = 2.0 ** -j
        nats = (many * (lgamma(sizes + 256 * alpha) - lgamma(256 * alpha))).sum() - (times * (lgamma(counts + alpha) - lgamma(alpha))).sum()
        best = nats if best is None else min(best, nats)
    held, escapes = 0.0, 0
    for train, pay in ((fold0, fold1), (fold1, fold0)):
        row, column = np.nonzero(pay)
        p, t = pay[row, column], train[row, column]
        size, distinct = train.sum(axis=1)[row], (train > 0).sum(axis=1)[row]
        with np.errstate(divide="ignore", invalid="ignore"):
            whole = np.where(distinct == 256, size, size + distinct)
            seen = np.log2(whole / t)
            unseen = np.where(size == 0, 8.0, np.log2(whole / distinct * (256 - distinct)))
        held += float((p * np.where(t > 0, seen, unseen)).sum())
        escapes += int(p[t == 0].sum())
    return {"order": order, "entropy": bits / n, "adaptive": (best / math.log(2) + 4 + 8 * order) / total, "heldOut": held / n, "escapes": escapes,
            "contexts": int((context > 0).sum()), "under8": int(((context > 0) & (context < 8)).sum()), "thin": int((used == 1).sum()) / n}


def huffman_bits(counts):
    """Payload of an optimal code: equal weights are merged as runs, so that millions of symbols cost little."""
    weights, times = np.unique(counts[counts > 0], return_counts=True)
    if times.sum() == 1:
        return int(weights[0])
    many = dict(zip(weights.tolist(), times.tolist()))
    heap = list(many)
    heapq.heapify(heap)
    total = 0
    while True:
        weight = heapq.heappop(heap)
        times = many.pop(weight)
        if times == 1:
            if not heap:
                return total
            other = heap[0]
            many[other] -= 1
            if many[other] == 0:
                heapq.heappop(heap)
                del many[other]
            merged, made = weight + other, 1
        else:
            merged, made = 2 * weight, times // 2
            if times % 2:
                many[weight] = 1
                heapq.heappush(heap, weight)
        total += merged * made
        if merged in many:
            many[merged] += made
        else:
            many[merged] = made
            heapq.heappush(heap, merged)


def limited_bits(counts, limit):
    """Package-merge on weights alone: the sum of the 2m - 2 cheapest."""
    leaves = np.sort(counts[counts > 0]).astype(np.int64)
    if len(leaves) < 2:
        return int(leaves.sum())
    level = leaves
    for _ in range(limit - 1):
        level = np.sort(np.concatenate((leaves, level[:len(level) // 2 * 2].reshape(-1, 2).sum(axis=1))), kind="stable")
    return int(level[:2 * len(leaves) - 2].sum())


def main(path):
    digest, total, head, triples, blocks2, blocks3 = count(path)
    order2 = [t.reshape(65536, 256) for t in triples]
    order1 = [t.reshape(256, 65536).sum(axis=0).reshape(256, 256) for t in triples]
    if total >= 2:
        order1[0][head[0], head[1]] += 1
    order0 = [t.sum(axis=0).reshape(1, 256) for t in order1]
    if total >= 1:
        order0[0][0, head[0]] += 1
    single = (order0[0] + order0[1])[0]
    figures = {"bytes": total, "sha256": digest,
               "orders": [order_figures(*folds, k, total) for k, folds in enumerate((order0, order1, order2)) if total > k],
               "huffman": huffman_bits(single), "limited": {limit: limited_bits(single, limit) for limit in (11, 12, 15)},
               "block2": huffman_bits(blocks2) + 8 * (total % 2), "block3": huffman_bits(blocks3) + 8 * (total % 3),
               "context": 8 + sum(huffman_bits(row) for row in order1[0] + order1[1] if row.any())}
    print(json.dumps(figures))


if __name__ == "__main__":
    main(sys.argv[1])
