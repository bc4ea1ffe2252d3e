using System.Buffers;
using System.Globalization;
using System.Text;
using System.Text.Unicode;

namespace Tallybound.Sources.Names;

/// <summary>Turns the bytes of a path into a name that says the same everywhere.</summary>
internal static class NameBytes
{
    /// <summary>Text where the bytes are UTF-8; each byte that is not stands as <c>%HH</c>, and <c>%</c> as <c>%25</c>.</summary>
    public static string ToName(ReadOnlySpan<byte> bytes) =>
        !bytes.Contains((byte)'%') && Utf8.IsValid(bytes) ? Encoding.UTF8.GetString(bytes) : Escaped(bytes);

    private static string Escaped(ReadOnlySpan<byte> bytes)
    {
        var name = new StringBuilder(bytes.Length);
        Span<char> pair = stackalloc char[2];
        while (!bytes.IsEmpty)
        {
            OperationStatus status = Rune.DecodeFromUtf8(bytes, out Rune rune, out int length);
            if (status == OperationStatus.Done && rune.Value != '%')
            {
                name.Append(pair[..rune.EncodeToUtf16(pair)]);
            }
            else
            {
                foreach (byte each in bytes[..length]) name.Append(CultureInfo.InvariantCulture, $"%{each:X2}");
            }
            bytes = bytes[length..];
        }
        return name.ToString();
    }
}
