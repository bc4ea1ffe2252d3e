using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>The source is so short that its own table and framing take a third or more of what Huffman saves.</summary>
internal sealed class OwnTableEatsGain : IFindingRule
{
    public string Id => "own-table-eats-gain";

    public string Against => "each source's own table sent with it";

    public string HoldsUnless => "A shared table fits the source so much worse that it costs more than the own one; no shared table was priced.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.Binary("huffman") is not { PayloadBits: { } payload, TableBits: { } table, FramingBits: { } framing, TotalBits: { } total }) return null;
        long gain = view.RawBits - payload, eaten = table + framing;
        if (gain <= 0 || 3 * eaten < gain || !ViewPrices.Matters(table / 8, total / 8)) return null;
        return this.Claim(
            $"Huffman saves {SizeText.Bytes(gain / 8)} of payload, and its table and framing take {SizeText.Bytes(eaten / 8)}; a table that both ends know beforehand could save the {SizeText.Bytes(table / 8)} of the table.",
            table / 8,
            Share("share of the payload's saving that table and framing take", (double)eaten / gain),
            Bytes("as it stands", view.RawBits),
            Bytes("Huffman, payload", payload),
            Bytes("Huffman, table", table),
            Bytes("Huffman, total", total)) with
        {
            Against = "the source's own table sent with it",
        };
    }

    public string ClaimOfMany(FindingTotal total) =>
        $"{total.Where}, the own table and framing take a third or more of what Huffman saves; a table that both ends know beforehand could save {SizeText.Bytes(total.BytesAtStake)} of tables.";
}
