using System.Diagnostics;
using System.Globalization;
using Microsoft.Data.Sqlite;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Ledger;

/// <summary>The run's memory on disk: the plan, the state of each source, and every finished record.</summary>
/// <remarks>Records leave the process as soon as they are finished, and reports stream from here. Writes are grouped into
/// transactions of at most one second of work. Members may be called from any thread; they take turns.</remarks>
public sealed class RunLedger : IDisposable
{
    private const string Pending = "pending";
    private static readonly TimeSpan CommitAfter = TimeSpan.FromSeconds(1);

    private readonly Lock gate = new();
    private readonly SqliteConnection connection;
    private readonly SqliteCommand updateSource;
    private readonly SqliteCommand insertRecord;
    private readonly SqliteCommand insertDrawing;
    private SqliteTransaction? transaction;
    private long transactionStarted;

    private RunLedger(SqliteConnection connection)
    {
        this.connection = connection;
        updateSource = Command(
            "UPDATE source SET kind = $kind, state = $state, reason = $reason, bytes = $bytes, digest = $digest, symbols_in_use = $symbols, " +
            "entropy = $entropy, held_out_order1 = $heldOut, stored_bytes = $stored, huffman_bytes = $huffman, best_code = $bestCode, best_bytes = $bestBytes WHERE id = $id",
            "$id", "$kind", "$state", "$reason", "$bytes", "$digest", "$symbols", "$entropy", "$heldOut", "$stored", "$huffman", "$bestCode", "$bestBytes");
        insertRecord = Command("INSERT OR REPLACE INTO record (id, utf8) VALUES ($id, $utf8)", "$id", "$utf8");
        insertDrawing = Command("INSERT OR REPLACE INTO drawing (id, utf8) VALUES ($id, $utf8)", "$id", "$utf8");
    }

    /// <summary>Makes a new ledger and writes the plan into it.</summary>
    /// <param name="path">File to make.</param>
    /// <param name="planFacts">Key and value of each fact of the plan, its digest among them.</param>
    /// <param name="sources">Every source of the plan.</param>
    /// <exception cref="IOException">The file exists or cannot be written.</exception>
    public static RunLedger Create(string path, IEnumerable<KeyValuePair<string, string>> planFacts, IEnumerable<PlannedSource> sources)
    {
        if (File.Exists(path)) throw new IOException($"The ledger {path} exists already.");
        var ledger = new RunLedger(OpenConnection(path));
        ledger.Guarded(() =>
        {
            ledger.WritePlan(planFacts, sources);
            return true;
        });
        return ledger;
    }

    /// <summary>Keeps one finished source.</summary>
    /// <param name="id">The source's place in the plan.</param>
    /// <param name="profile">Its record, without the counts that only drawings need.</param>
    /// <param name="drawing">Those counts; null where the source can have no page.</param>
    /// <exception cref="IOException">The ledger cannot be written.</exception>
    public void Finish(int id, SourceProfile profile, DrawingCounts? drawing) => Guarded(() =>
    {
        BeginIfNeeded();
        SourceSummary line = SourceSummary.Of(profile);
        Run(updateSource, id, NameOf(line.Kind), NameOf(line.Status), line.Reason, line.Bytes, line.Digest, line.SymbolsInUse, line.EntropyBitsPerSymbol,
            line.HeldOutOrder1BitsPerSymbol, line.StoredBytes, line.HuffmanBytes, line.BestCode, line.BestBytes);
        Run(insertRecord, id, RecordJson.ToUtf8(profile));
        if (drawing is not null) Run(insertDrawing, id, drawing.ToUtf8());
        if (Stopwatch.GetElapsedTime(transactionStarted) >= CommitAfter) Commit();
        return true;
    });

    /// <summary>Writes what is pending, and folds the write-ahead log into the file, so that a finished run folder is plain files.</summary>
    /// <exception cref="IOException">The ledger cannot be written.</exception>
    public void Settle() => Guarded(() =>
    {
        Commit();
        Execute("PRAGMA journal_mode = DELETE");
        return true;
    });

    /// <summary>Ids of sources that have no record yet, ascending.</summary>
    public IReadOnlyList<int> Unfinished() => Query("SELECT id FROM source WHERE state = $state ORDER BY id", row => row.GetInt32(0), ("$state", Pending));

    /// <summary>Every record's id and UTF-8 JSON in the order of names; a record is read when it is asked for.</summary>
    public IEnumerable<(int Id, byte[] Utf8)> Records()
    {
        Guarded(() => { Commit(); return true; });
        int after = -1;
        while (true)
        {
            List<(int, byte[])> page = Query("SELECT id, utf8 FROM record WHERE id > $after ORDER BY id LIMIT 256",
                row => (row.GetInt32(0), row.GetFieldValue<byte[]>(1)), ("$after", after));
            foreach ((int id, byte[] utf8) in page)
            {
                after = id;
                yield return (id, utf8);
            }
            if (page.Count == 0) yield break;
        }
    }

    /// <summary>Every source's line in the order of names.</summary>
    public IEnumerable<SourceSummary> Summaries()
    {
        Guarded(() => { Commit(); return true; });
        int after = -1;
        while (true)
        {
            List<(int, SourceSummary)> page = Query(SelectSummary + " WHERE id > $after ORDER BY id LIMIT 1024", row => (row.GetInt32(0), ReadSummary(row)), ("$after", after));
            foreach ((int id, SourceSummary line) in page)
            {
                after = id;
                yield return line;
            }
            if (page.Count == 0) yield break;
        }
    }

    /// <summary>The sources with the most bytes, heaviest first, equal ones by name.</summary>
    public IReadOnlyList<SourceSummary> Heaviest(int count) =>
        Query(SelectSummary + " WHERE bytes IS NOT NULL ORDER BY bytes DESC, id LIMIT $count", ReadSummary, ("$count", count));

    /// <summary>Ids of the sources with the most bytes, heaviest first.</summary>
    public IReadOnlyList<int> HeaviestIds(int count) =>
        Query("SELECT id FROM source WHERE bytes IS NOT NULL ORDER BY bytes DESC, id LIMIT $count", row => row.GetInt32(0), ("$count", count));

    /// <summary>Sources of one status, by name, at most <paramref name="count"/>.</summary>
    public IReadOnlyList<SourceSummary> WithStatus(SourceStatus status, int count) =>
        Query(SelectSummary + " WHERE state = $state ORDER BY id LIMIT $count", ReadSummary, ("$state", NameOf(status)), ("$count", count));

    /// <summary>Failed and partial sources, by name, at most <paramref name="count"/>.</summary>
    public IReadOnlyList<SourceSummary> Failures(int count) =>
        Query(SelectSummary + " WHERE state IN ('failed', 'partial') ORDER BY id LIMIT $count", ReadSummary, ("$count", count));

    /// <summary>Sets of sources with one digest and at least one byte, most bytes first.</summary>
    /// <param name="sets">Greatest number of sets.</param>
    /// <param name="names">Greatest number of names a set.</param>
    public IReadOnlyList<DuplicateSet> Duplicates(int sets, int names)
    {
        List<(string Digest, long Bytes, long Count)> found = Query(
            "SELECT digest, bytes, COUNT(*) AS n FROM source WHERE digest IS NOT NULL AND bytes > 0 GROUP BY digest, bytes HAVING n > 1 ORDER BY bytes * (n - 1) DESC, digest LIMIT $sets",
            row => (row.GetString(0), row.GetInt64(1), row.GetInt64(2)), ("$sets", sets));
        return found.ConvertAll(set => new DuplicateSet(set.Digest, set.Bytes, set.Count,
            Query("SELECT name FROM source WHERE digest = $digest AND bytes = $bytes ORDER BY id LIMIT $names", row => row.GetString(0),
                ("$digest", set.Digest), ("$bytes", set.Bytes), ("$names", names))));
    }

    /// <summary>The counts kept for a source's drawings; null where none were kept.</summary>
    public DrawingCounts? Drawing(int id)
    {
        List<byte[]> found = Query("SELECT utf8 FROM drawing WHERE id = $id", row => row.GetFieldValue<byte[]>(0), ("$id", id));
        return found.Count == 0 ? null : DrawingCounts.FromUtf8(found[0]);
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        transaction?.Dispose();
        updateSource.Dispose();
        insertRecord.Dispose();
        insertDrawing.Dispose();
        connection.Dispose();
    }

    private const string SelectSummary =
        "SELECT id, name, kind, state, reason, bytes, digest, symbols_in_use, entropy, held_out_order1, stored_bytes, huffman_bytes, best_code, best_bytes FROM source";

    private static SourceSummary ReadSummary(SqliteDataReader row) => new()
    {
        Name = row.GetString(1),
        Kind = Enum.Parse<SourceProfileKind>(row.GetString(2), ignoreCase: true),
        Status = Enum.TryParse(row.GetString(3), ignoreCase: true, out SourceStatus status) ? status : SourceStatus.Skipped,
        Reason = row.IsDBNull(4) ? null : row.GetString(4),
        Bytes = Long(row, 5),
        Digest = row.IsDBNull(6) ? null : row.GetString(6),
        SymbolsInUse = Long(row, 7),
        EntropyBitsPerSymbol = row.IsDBNull(8) ? null : row.GetDouble(8),
        HeldOutOrder1BitsPerSymbol = row.IsDBNull(9) ? null : row.GetDouble(9),
        StoredBytes = Long(row, 10),
        HuffmanBytes = Long(row, 11),
        BestCode = row.IsDBNull(12) ? null : row.GetString(12),
        BestBytes = Long(row, 13),
    };

    private static long? Long(SqliteDataReader row, int column) => row.IsDBNull(column) ? null : row.GetInt64(column);

    private static SqliteConnection OpenConnection(string path)
    {
        var opened = new SqliteConnection(new SqliteConnectionStringBuilder { DataSource = path, Pooling = false }.ToString());
        try
        {
            opened.Open();
        }
        catch (SqliteException e)
        {
            opened.Dispose();
            throw new IOException($"The ledger {path} cannot be made: {e.Message}", e);
        }
        return opened;
    }

    private void WritePlan(IEnumerable<KeyValuePair<string, string>> planFacts, IEnumerable<PlannedSource> sources)
    {
        // A record is some kilobytes: pages that hold it whole are read and written in one piece.
        Execute("PRAGMA page_size = 16384");
        Execute("PRAGMA journal_mode = WAL");
        Execute("PRAGMA synchronous = NORMAL");
        Execute("PRAGMA cache_size = -8192");
        Execute(LedgerSchema.Create + $"PRAGMA user_version = {LedgerSchema.Version.ToString(CultureInfo.InvariantCulture)};");
        BeginIfNeeded();
        using SqliteCommand fact = Command("INSERT INTO plan (key, value) VALUES ($key, $value)", "$key", "$value");
        foreach ((string key, string value) in planFacts) Run(fact, key, value);
        using SqliteCommand row = Command(
            "INSERT INTO source (id, name, kind, path, planned_bytes, modified_utc, state) VALUES ($id, $name, $kind, $path, $bytes, $modified, $state)",
            "$id", "$name", "$kind", "$path", "$bytes", "$modified", "$state");
        foreach (PlannedSource source in sources)
            Run(row, source.Id, source.Name, NameOf(source.Kind), source.Path, source.Bytes, source.ModifiedUtc?.ToString("O", CultureInfo.InvariantCulture), Pending);
        Commit();
    }

    private SqliteCommand Command(string text, params ReadOnlySpan<string> parameters)
    {
        SqliteCommand command = connection.CreateCommand();
#pragma warning disable CA2100 // Every text is a constant of this class; values travel as parameters.
        command.CommandText = text;
#pragma warning restore CA2100
        foreach (string name in parameters) command.Parameters.Add(new SqliteParameter { ParameterName = name });
        return command;
    }

    private void Run(SqliteCommand command, params ReadOnlySpan<object?> values)
    {
        command.Transaction = transaction;
        for (int i = 0; i < values.Length; i++) command.Parameters[i].Value = values[i] ?? DBNull.Value;
        command.ExecuteNonQuery();
    }

    private void Execute(string text)
    {
        using SqliteCommand command = Command(text);
        command.ExecuteNonQuery();
    }

    private List<T> Query<T>(string text, Func<SqliteDataReader, T> read, params (string Name, object Value)[] parameters) => Guarded(() =>
    {
        using SqliteCommand command = Command(text);
        command.Transaction = transaction;
        foreach ((string name, object value) in parameters) command.Parameters.AddWithValue(name, value);
        using SqliteDataReader row = command.ExecuteReader();
        var found = new List<T>();
        while (row.Read()) found.Add(read(row));
        return found;
    });

    private void BeginIfNeeded()
    {
        if (transaction is not null) return;
        transaction = connection.BeginTransaction();
        transactionStarted = Stopwatch.GetTimestamp();
    }

    private void Commit()
    {
        transaction?.Commit();
        transaction?.Dispose();
        transaction = null;
    }

    private T Guarded<T>(Func<T> work)
    {
        lock (gate)
        {
            try
            {
                return work();
            }
            catch (SqliteException e)
            {
                throw new IOException($"The ledger {connection.DataSource} cannot be kept: {e.Message}", e);
            }
        }
    }

    private static string NameOf(SourceProfileKind kind) => kind switch
    {
        SourceProfileKind.File => "file",
        SourceProfileKind.Stream => "stream",
        SourceProfileKind.Member => "member",
        _ => "object",
    };

    private static string NameOf(SourceStatus status) => status switch
    {
        SourceStatus.Profiled => "profiled",
        SourceStatus.Partial => "partial",
        SourceStatus.Failed => "failed",
        _ => "skipped",
    };
}
