using System.Text;
using Tallybound.Profiling.Ledger;
using Tallybound.Profiling.Records;
using Tallybound.Reports.Files;

namespace Tallybound.Reports.Csv;

/// <summary>Writes <c>sources.csv</c>: one line a source, in the order of names, control characters as they are inside quotes.</summary>
internal static class SourcesTable
{
    private const string Header =
        "name,kind,status,reason,bytes,sha256,symbols_in_use,entropy_bits_per_symbol,held_out_order1_bits_per_symbol,stored_bytes,huffman_bytes,best_code,best_bytes";

    /// <summary>Writes the table of a ledger.</summary>
    public static void Write(string path, RunLedger ledger) => WholeFile.Write(path, stream =>
    {
        using var writer = new StreamWriter(stream, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false), bufferSize: 1 << 16, leaveOpen: true) { NewLine = "\r\n" };
        writer.WriteLine(Header);
        foreach (SourceSummary line in ledger.Summaries()) writer.WriteLine(Line(line));
    });

    private static string Line(SourceSummary line) => string.Join(',',
        CsvCell.Text(line.Name), CsvCell.Text(NameOf(line.Kind)), CsvCell.Text(NameOf(line.Status)), CsvCell.Text(line.Reason), CsvCell.Number(line.Bytes),
        CsvCell.Text(line.Digest), CsvCell.Number(line.SymbolsInUse), CsvCell.Number(line.EntropyBitsPerSymbol), CsvCell.Number(line.HeldOutOrder1BitsPerSymbol),
        CsvCell.Number(line.StoredBytes), CsvCell.Number(line.HuffmanBytes), CsvCell.Text(line.BestCode), CsvCell.Number(line.BestBytes));

    private static string NameOf<T>(T value) where T : struct, Enum => value.ToString().ToLowerInvariant();
}
