using System.Buffers;
using System.Numerics;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Tallybound.Profiling.Segments;

/// <summary>Merged segments laid out for the split's search: the symbols in use only, eight to a vector, in single precision.</summary>
/// <remarks>The search needs N·H0 of every stretch and no last digit of it: the error stays below 2^-20 bit a symbol. Nothing but IEEE sums, products and quotients in a
/// fixed order is used, so every machine finds the same division.</remarks>
internal sealed class SplitCells : IDisposable
{
    /// <summary>Bits a symbol that an estimate may be off.</summary>
    public const double Error = 1.0 / (1 << 20);

    private const int Lanes = 8;

    private readonly Vector256<float>[] rows;
    private readonly (long Symbols, int Only)[] cells;
    private readonly int width;

    /// <param name="counts">Counts of merged segments, one after the other; the first has a symbol.</param>
    /// <param name="alphabetSize">A, at most 256.</param>
    public SplitCells(ReadOnlySpan<long> counts, int alphabetSize)
    {
        Span<int> columns = stackalloc int[alphabetSize];
        columns = columns[..ColumnsInUse(counts, alphabetSize, columns)];
        Count = counts.Length / alphabetSize;
        width = (columns.Length + Lanes - 1) / Lanes;
        rows = ArrayPool<Vector256<float>>.Shared.Rent((Count + 1) * width);
        cells = ArrayPool<(long, int)>.Shared.Rent(Count);
        rows.AsSpan(0, (Count + 1) * width).Clear();
        Span<float> flat = MemoryMarshal.Cast<Vector256<float>, float>(rows.AsSpan());
        for (int cell = 0; cell < Count; cell++)
        {
            ReadOnlySpan<long> row = counts.Slice(cell * alphabetSize, alphabetSize);
            long symbols = 0;
            for (int i = 0; i < columns.Length; i++)
            {
                long count = row[columns[i]];
                symbols += count;
                flat[(cell * width * Lanes) + i] = count;
            }
            int first = row.IndexOfAnyExcept(0L);
            cells[cell] = (symbols, first >= 0 && row[first] == symbols ? first : -1);
        }
    }

    /// <summary>Merged segments.</summary>
    public int Count { get; }

    /// <summary>A row that a stretch's counts are summed in; one, for one stretch at a time.</summary>
    public Span<Vector256<float>> Stretch => rows.AsSpan(Count * width, width);

    /// <summary>N of a cell, and the symbol that fills it alone or −1.</summary>
    public (long Symbols, int Only) this[int cell] => cells[cell];

    /// <inheritdoc/>
    public void Dispose()
    {
        ArrayPool<Vector256<float>>.Shared.Return(rows);
        ArrayPool<(long, int)>.Shared.Return(cells);
    }

    /// <summary>Adds a cell's counts to a stretch's and gives N·H0 of the sum: Σ n·(log2 N − log2 n).</summary>
    /// <param name="cell">Which cell.</param>
    /// <param name="stretch">Counts of the stretch so far, one row.</param>
    /// <param name="symbols">N of the sum.</param>
    public double Extend(int cell, Span<Vector256<float>> stretch, long symbols)
    {
        if (symbols == 0) return 0;
        // Whole exponents are taken from each other first, so that a large N costs no digit.
        int exponent = BitOperations.Log2((ulong)symbols);
        Vector256<float> wholeExponent = Vector256.Create((float)exponent), wholeFraction = Vector256.Create((float)Math.Log2(symbols / (double)(1L << exponent)));
        Vector256<double> low = Vector256<double>.Zero, high = Vector256<double>.Zero;
        ReadOnlySpan<Vector256<float>> row = rows.AsSpan(cell * width, width);
        stretch = stretch[..row.Length];
        for (int i = 0; i < row.Length; i++)
        {
            Vector256<float> count = stretch[i] + row[i];
            stretch[i] = count;
            (Vector256<float> countExponent, Vector256<float> countFraction) = Log2(count);
            Vector256<float> information = count * (wholeExponent - countExponent + (wholeFraction - countFraction));
            low += Vector256.WidenLower(information);
            high += Vector256.WidenUpper(information);
        }
        return Vector256.Sum(low + high);
    }

    /// <summary>log2 as a whole number and a rest from −½ to ½ with an error below 1e-7; for 0 some finite numbers, which a factor 0 takes away.</summary>
    /// <remarks>The number is e·2^k with e from √½ to √2; log2 e = 2/ln 2 · artanh((e − 1)/(e + 1)), by four terms of its series (M. Abramowitz and I. Stegun, 4.1.27).</remarks>
    private static (Vector256<float> Exponent, Vector256<float> Fraction) Log2(Vector256<float> value)
    {
        Vector256<int> rootHalf = Vector256.Create(0x3f3504f3), above = value.AsInt32() - rootHalf;
        Vector256<float> exponent = Vector256.ConvertToSingle(Vector256.ShiftRightArithmetic(above, 23));
        Vector256<float> mantissa = ((above & Vector256.Create(0x7fffff)) + rootHalf).AsSingle(), one = Vector256<float>.One;
        Vector256<float> t = (mantissa - one) / (mantissa + one), square = t * t;
        Vector256<float> series = Vector256.Create(2.885390082f) + (square * (Vector256.Create(0.9617966939f) + (square * (Vector256.Create(0.5770780164f) + (square * Vector256.Create(0.4121985831f))))));
        return (exponent, t * series);
    }

    private static int ColumnsInUse(ReadOnlySpan<long> counts, int alphabetSize, Span<int> columns)
    {
        Span<long> whole = stackalloc long[alphabetSize];
        whole.Clear();
        for (int at = 0; at < counts.Length; at += alphabetSize) SegmentCounts.AddTo(whole, counts.Slice(at, alphabetSize));
        int inUse = 0;
        for (int symbol = 0; symbol < alphabetSize; symbol++)
        {
            if (whole[symbol] > 0) columns[inUse++] = symbol;
        }
        return inUse;
    }
}
