namespace Tallybound.Profiling.Ledger;

/// <summary>The tables of <c>ledger.sqlite</c>.</summary>
internal static class LedgerSchema
{
    /// <summary>Number of this layout, kept in SQLite's <c>user_version</c>.</summary>
    public const int Version = 1;

    /// <summary>Statements that make an empty ledger.</summary>
    /// <remarks>Record and drawing counts stand apart, so that lists are read without paging through either.</remarks>
    public const string Create = """
        CREATE TABLE plan (key TEXT PRIMARY KEY, value TEXT NOT NULL) WITHOUT ROWID;
        CREATE TABLE source (
            id INTEGER PRIMARY KEY, name TEXT NOT NULL, kind TEXT NOT NULL, path BLOB, planned_bytes INTEGER, modified_utc TEXT,
            state TEXT NOT NULL, reason TEXT, bytes INTEGER, digest TEXT, symbols_in_use INTEGER, entropy REAL, held_out_order1 REAL,
            stored_bytes INTEGER, huffman_bytes INTEGER, best_code TEXT, best_bytes INTEGER);
        CREATE TABLE record (id INTEGER PRIMARY KEY, utf8 BLOB NOT NULL);
        CREATE TABLE drawing (id INTEGER PRIMARY KEY, utf8 BLOB NOT NULL);
        """;
}

/// <summary>A source as the plan has it: what the ledger holds before anything is read.</summary>
/// <param name="Id">Place in the plan's order, which is the order of names.</param>
/// <param name="Name">Unique name.</param>
/// <param name="Kind">Where the bytes come from.</param>
/// <param name="Path">Raw bytes of the path; null where there is none.</param>
/// <param name="Bytes">Size at the time of the plan; null when unknown.</param>
/// <param name="ModifiedUtc">Time of last change at the time of the plan; null when unknown.</param>
public readonly record struct PlannedSource(int Id, string Name, Records.SourceProfileKind Kind, byte[]? Path, long? Bytes, DateTime? ModifiedUtc);
