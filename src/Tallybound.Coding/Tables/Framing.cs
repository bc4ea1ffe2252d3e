using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;

namespace Tallybound.Coding.Tables;

/// <summary>What stands around table and payload of a table block: 2 bits of <see cref="BlockKind"/>, Elias δ of the number of symbols + 1, and padding to a whole byte at the end.</summary>
public static class Framing
{
    private const int KindBits = 2;

    /// <summary>Framing bits of a block, padding included, so that table + payload + framing are whole bytes.</summary>
    /// <param name="symbols">Symbols in the block, at least 0.</param>
    /// <param name="tableBits">Bits of the table that the block carries; 0 where it carries none.</param>
    /// <param name="payloadBits">Bits of the coded symbols.</param>
    public static long Bits(long symbols, long tableBits, long payloadBits)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(tableBits);
        ArgumentOutOfRangeException.ThrowIfNegative(payloadBits);
        long head = KindBits + EliasDelta.Length(symbols + 1);
        return head + Padding(head, tableBits, payloadBits);
    }

    /// <summary>Writes kind and number of symbols; table, payload and padding follow.</summary>
    public static void Encode<TSink>(BlockKind kind, long symbols, ref TSink sink)
        where TSink : IBitSink
    {
        sink.Write((ulong)kind, KindBits);
        EliasDelta.Encode(symbols + 1, ref sink);
    }

    /// <summary>Fills the last byte with zero bits; the block began on a byte boundary of the sink.</summary>
    public static void Pad<TSink>(ref TSink sink)
        where TSink : IBitSink => sink.Write(0, (int)(-sink.Bits & 7));

    /// <summary>Reads kind and number of symbols.</summary>
    /// <exception cref="InvalidDataException">The bits end early.</exception>
    public static (BlockKind Kind, long Symbols) Decode(ref BitReader reader)
    {
        var kind = (BlockKind)reader.Read(KindBits);
        return (kind, EliasDelta.Decode(ref reader) - 1);
    }

    private static long Padding(long head, long tableBits, long payloadBits) => -(head + tableBits + payloadBits) & 7;
}
