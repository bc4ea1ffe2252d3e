/* The C side of the kernel comparison: plain code of the kind a careful C programmer writes first. Built by gcc -O3 -march=native. */
#include <stddef.h>
#include <stdint.h>
#include <string.h>

/* Order 0 in four tables, so that equal neighbours do not wait on one store. */
void count_order0(const uint8_t *source, size_t length, uint64_t *counts)
{
    uint32_t lanes[4][256];
    memset(lanes, 0, sizeof lanes);
    size_t at = 0;
    for (; at + 4 <= length; at += 4) {
        lanes[0][source[at]]++;
        lanes[1][source[at + 1]]++;
        lanes[2][source[at + 2]]++;
        lanes[3][source[at + 3]]++;
    }
    for (; at < length; at++) lanes[0][source[at]]++;
    for (int symbol = 0; symbol < 256; symbol++)
        counts[symbol] += (uint64_t)lanes[0][symbol] + lanes[1][symbol] + lanes[2][symbol] + lanes[3][symbol];
}

/* Order 1, one table, one pair a step. */
void count_order1(const uint8_t *source, size_t length, uint32_t *counts)
{
    for (size_t at = 1; at < length; at++) counts[(source[at - 1] << 8) | source[at]]++;
}

/* Order 2, one table, one triple a step. */
void count_order2(const uint8_t *source, size_t length, uint32_t *counts)
{
    for (size_t at = 2; at < length; at++) counts[(source[at - 2] << 16) | (source[at - 1] << 8) | source[at]]++;
}
