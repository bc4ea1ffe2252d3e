using System.Text.Json;

namespace Tallybound.Reports.Json;

/// <summary>Reads JSON off a stream in blocks: token by token, or one whole value at a time.</summary>
/// <remarks>Memory is a block, or the largest value that was asked for whole. A <see cref="Utf8JsonReader"/> cannot outlive a block, so that one is
/// made for each question, and its state is carried along.</remarks>
/// <param name="stream">The document's bytes.</param>
/// <param name="blockBytes">Bytes read at a time, at least 1; the first time at least 3.</param>
internal sealed class JsonBlocks(Stream stream, int blockBytes)
{
    private byte[] buffer = new byte[Math.Max(blockBytes, ByteOrderMark.Length)];
    private int start;
    private int end;
    private bool begun;
    private bool atEnd;
    private JsonReaderState state;

    /// <summary>What some editors put before UTF-8.</summary>
    private static ReadOnlySpan<byte> ByteOrderMark => [0xEF, 0xBB, 0xBF];

    /// <summary>Place in the document of the next byte to be read.</summary>
    public long Position { get; private set; }

    /// <summary>The next token's kind; <see cref="JsonTokenType.None"/> at the end of a whole document.</summary>
    /// <param name="name">Text of the token where it is a member's name, else null.</param>
    /// <exception cref="JsonBlocksException">The document is cut off, or is no JSON.</exception>
    public JsonTokenType Next(out string? name)
    {
        while (true)
        {
            var reader = new Utf8JsonReader(buffer.AsSpan(start, end - start), atEnd, state);
            if (Advance(ref reader))
            {
                name = reader.TokenType == JsonTokenType.PropertyName ? Name(ref reader) : null;
                Consume(ref reader);
                return reader.TokenType;
            }
            name = null;
            if (atEnd) return JsonTokenType.None;
            Fill();
        }
    }

    /// <summary>The next value whole, or nothing where the array around it ends here.</summary>
    /// <param name="value">The value's bytes, good until the next question.</param>
    /// <returns>False at the end of the array, which is then left behind.</returns>
    /// <exception cref="JsonBlocksException">The document is cut off, or is no JSON, or a list in the value holds null.</exception>
    public bool TryValue(out ReadOnlySpan<byte> value)
    {
        while (true)
        {
            var reader = new Utf8JsonReader(buffer.AsSpan(start, end - start), atEnd, state);
            if (Advance(ref reader))
            {
                int from = start + (int)reader.TokenStartIndex;
                bool isEnd = reader.TokenType == JsonTokenType.EndArray;
                if (isEnd || SkipToEnd(ref reader))
                {
                    value = buffer.AsSpan(from, isEnd ? 0 : start + (int)reader.BytesConsumed - from);
                    Consume(ref reader);
                    return !isEnd;
                }
            }
            Fill();
        }
    }

    /// <summary>Leaves the next value behind, however large it is.</summary>
    /// <exception cref="JsonBlocksException">The document is cut off, or is no JSON.</exception>
    public void Skip()
    {
        int depth = 0;
        do
        {
            JsonTokenType token = Next(out _);
            if (token is JsonTokenType.StartObject or JsonTokenType.StartArray) depth++;
            if (token is JsonTokenType.EndObject or JsonTokenType.EndArray) depth--;
        }
        while (depth > 0);
    }

    /// <summary>Moves on inside a value to its last token; false: the block ends first.</summary>
    /// <remarks>No list of a record holds null, and what reads a record would not look for one.</remarks>
    private bool SkipToEnd(ref Utf8JsonReader reader)
    {
        int depth = reader.CurrentDepth;
        bool whole = reader.TokenType is not (JsonTokenType.StartObject or JsonTokenType.StartArray);
        JsonTokenType last = reader.TokenType;
        while (!whole)
        {
            if (!Advance(ref reader)) return false;
            if (reader.TokenType == JsonTokenType.Null && last != JsonTokenType.PropertyName)
                throw new JsonBlocksException(JsonFault.NullInList, Position + reader.TokenStartIndex, null);
            last = reader.TokenType;
            whole = reader.CurrentDepth == depth && last is JsonTokenType.EndObject or JsonTokenType.EndArray;
        }
        return true;
    }

    private bool Advance(ref Utf8JsonReader reader)
    {
        try
        {
            return reader.Read();
        }
        catch (JsonException e)
        {
            throw new JsonBlocksException(IsCutOff() ? JsonFault.CutOff : JsonFault.NoJson, Position + reader.BytesConsumed, e);
        }
    }

    /// <summary>Whether what is there is a beginning of JSON: then only its end is missing.</summary>
    private bool IsCutOff()
    {
        if (!atEnd) return false;
        var reader = new Utf8JsonReader(buffer.AsSpan(start, end - start), isFinalBlock: false, state);
        try
        {
            while (reader.Read())
            {
            }
            return true;
        }
        catch (JsonException)
        {
            return false;
        }
    }

    private void Consume(ref Utf8JsonReader reader)
    {
        start += (int)reader.BytesConsumed;
        Position += reader.BytesConsumed;
        state = reader.CurrentState;
    }

    /// <summary>Makes room and reads on until the buffer is full or the stream ends.</summary>
    private void Fill()
    {
        buffer.AsSpan(start, end - start).CopyTo(buffer);
        end -= start;
        start = 0;
        if (end == buffer.Length)
        {
            if (end == Array.MaxLength) throw new JsonBlocksException(JsonFault.TooLarge, Position, null);
            // Twice as large each time: a large value is looked at a few times, not once a block.
            Array.Resize(ref buffer, (int)Math.Min(2L * end, Array.MaxLength));
        }
        int read = stream.ReadAtLeast(buffer.AsSpan(end), buffer.Length - end, throwOnEndOfStream: false);
        atEnd = end + read < buffer.Length;
        end += read;
        if (!begun && buffer.AsSpan(0, end).StartsWith(ByteOrderMark)) Position = start = ByteOrderMark.Length;
        begun = true;
    }

    private string Name(ref Utf8JsonReader reader)
    {
        try
        {
            return reader.GetString()!;
        }
        catch (InvalidOperationException e)
        {
            // Not UTF-8: the reader looks for that no earlier.
            throw new JsonBlocksException(JsonFault.NoJson, Position + reader.TokenStartIndex, e);
        }
    }
}

/// <summary>What is wrong with bytes that should be a document.</summary>
internal enum JsonFault
{
    /// <summary>They begin well and end too early.</summary>
    CutOff,

    /// <summary>They are no JSON.</summary>
    NoJson,

    /// <summary>A list holds null.</summary>
    NullInList,

    /// <summary>One value is larger than an array may be.</summary>
    TooLarge,
}

/// <summary>The bytes are no whole JSON document.</summary>
/// <param name="fault">What is wrong.</param>
/// <param name="position">Byte of the document at which it was noticed.</param>
/// <param name="cause">What the reader says; null where it says nothing.</param>
internal sealed class JsonBlocksException(JsonFault fault, long position, Exception? cause) : Exception(fault.ToString(), cause)
{
    /// <summary>What is wrong.</summary>
    public JsonFault Fault { get; } = fault;

    /// <summary>Byte of the document at which it was noticed.</summary>
    public long Position { get; } = position;
}
