using System.Globalization;
using System.Text.Json;

namespace Tallybound.Cli.Tests.Browser.Numbers;

/// <summary>A value that the record holds, or that one step of arithmetic makes of what it holds.</summary>
/// <remarks><para><c>value = sum [" over " sum]</c>, <c>sum = term {" + " term | " - " term}</c>,
/// <c>term = [of] JSON pointer into profile.json (RFC 6901)</c>, <c>of = "#" | "sum:" | "max:" | "min:"</c>: the number of items of an array,
/// their sum, the greatest, the least.</para>
/// <para>A term is in bits where the last name in its pointer ends in <c>Bits</c>. Bits become bytes by rounding the whole sum up;
/// any other term of a value in bytes or bits is in bytes. A quotient of sizes is taken in bits on both sides, save in
/// <c>bit/symbol</c> and <c>bit/byte</c>, where only the numerator is.</para></remarks>
internal static class RecordValue
{
    /// <summary>The value of an expression in the unit in which it is printed; units are those of <see cref="PrintedNumber"/>.</summary>
    /// <exception cref="FormatException">The expression is none, names nothing in the record, or names what is no number.</exception>
    public static double Of(JsonElement record, string expression, string unit)
    {
        string[] sides = expression.Split(" over ");
        if (sides.Length > 2) throw new FormatException($"{expression} has more than one over");
        bool sizes = unit is "×" or "%" or "% saved" or "log2" && sides.Length == 2;
        bool bytes = PrintedNumber.IsOfBytes(unit);
        double top = Sum(record, sides[0], unit switch { _ when bytes => Scale.Bytes, "bits" => Scale.Bits, "bit/symbol" or "bit/byte" when sides.Length == 2 => Scale.Bits, _ => sizes ? Scale.Bits : Scale.None });
        if (bytes) top = Math.Ceiling(top);
        if (sides.Length == 2) top /= Sum(record, sides[1], sizes ? Scale.Bits : Scale.None);
        return unit switch
        {
            "%" => 100 * top,
            "% saved" => 100 * (1 - top),
            "log2" => Math.Log2(top),
            _ => top,
        };
    }

    private enum Scale
    {
        None,
        Bytes,
        Bits,
    }

    private static double Sum(JsonElement record, string sum, Scale scale)
    {
        double total = 0;
        int sign = 1;
        foreach (string word in sum.Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            if (word is "+" or "-")
            {
                sign = word == "+" ? 1 : -1;
                continue;
            }
            double value = Term(record, word);
            bool bits = LastName(word).EndsWith("Bits", StringComparison.Ordinal);
            total += sign * scale switch
            {
                Scale.Bytes => bits ? value / 8 : value,
                Scale.Bits => bits ? value : value * 8,
                _ => value,
            };
        }
        return total;
    }

    private static double Term(JsonElement record, string term)
    {
        int start = term.IndexOf('/', StringComparison.Ordinal);
        if (start < 0) throw new FormatException($"{term} holds no JSON pointer");
        string pointer = term[start..];
        JsonElement at = At(record, pointer);
        string of = term[..start];
        if (of.Length == 0) return Number(at, pointer);
        if (at.ValueKind != JsonValueKind.Array) throw new FormatException($"{pointer} is no array");
        IEnumerable<double> items = at.EnumerateArray().Select(item => Number(item, pointer));
        return of switch
        {
            "#" => at.GetArrayLength(),
            "sum:" => items.Sum(),
            "max:" => items.Max(),
            "min:" => items.Min(),
            _ => throw new FormatException($"{of} is no word of the grammar"),
        };
    }

    private static double Number(JsonElement value, string pointer) =>
        value.ValueKind == JsonValueKind.Number ? value.GetDouble() : throw new FormatException($"{pointer} is no number");

    private static JsonElement At(JsonElement record, string pointer)
    {
        JsonElement at = record;
        foreach (string part in pointer[1..].Split('/').Select(part => part.Replace("~1", "/", StringComparison.Ordinal).Replace("~0", "~", StringComparison.Ordinal)))
        {
            JsonElement next = default;
            bool found = at.ValueKind switch
            {
                JsonValueKind.Object => at.TryGetProperty(part, out next),
                JsonValueKind.Array when int.TryParse(part, NumberStyles.None, CultureInfo.InvariantCulture, out int index) && index < at.GetArrayLength() => (next = at[index]).ValueKind != JsonValueKind.Undefined,
                _ => false,
            };
            if (!found) throw new FormatException($"the record holds nothing at {pointer}");
            at = next;
        }
        return at;
    }

    private static string LastName(string pointer) => pointer.Split('/').Last(part => !part.All(char.IsAsciiDigit));
}
