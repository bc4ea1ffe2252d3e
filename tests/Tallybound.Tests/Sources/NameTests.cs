using System.Text;
using CsCheck;
using Tallybound.Sources;
using Tallybound.Sources.Names;
using Tallybound.Sources.Walking;
using Xunit;

namespace Tallybound.Tests.Sources;

public sealed class NameTests
{
    private static readonly string[] Parts = ["a", "\uE000", "\uFFFF", "\U0001F6A2", "\U0010FFFF", "é", "/", "."];
    private static readonly byte[] FolderBytes = [(byte)'a', (byte)'.', (byte)'-', (byte)'0', 0xFF];

    [Fact]
    public void A_name_says_its_bytes_and_no_others()
    {
        int cases = 0;
        Gen.OneOf(Gen.Byte.Array[0, 40], Gen.String[0, 40].Select(Encoding.UTF8.GetBytes)).Sample(
            bytes =>
            {
                Interlocked.Increment(ref cases);
                string name = NameBytes.ToName(bytes);
                return BytesOf(name).AsSpan().SequenceEqual(bytes) && Encoding.UTF8.GetString(Encoding.UTF8.GetBytes(name)) == name;
            }, iter: 2000);
        Assert.Equal(2000, cases);
    }

    [Fact]
    public void Names_sort_as_their_utf8_bytes_do_whatever_they_hold()
    {
        Gen<string> text = Gen.Int[0, 7].Select(i => Parts[i]).Array[0, 6].Select(parts => string.Concat(parts));
        int cases = 0;
        Gen.Select(text, text).Sample(
            (a, b) =>
            {
                Interlocked.Increment(ref cases);
                return Math.Sign(NameOrder.Compare(a, b)) == Math.Sign(Encoding.UTF8.GetBytes(a).AsSpan().SequenceCompareTo(Encoding.UTF8.GetBytes(b)));
            }, iter: 2000);
        Assert.Equal(2000, cases);
    }

    [Fact]
    public void Folders_are_walked_in_the_order_of_the_names_of_what_lies_in_them()
    {
        Gen<byte[]> folder = Gen.Int[0, 4].Select(i => FolderBytes[i]).Array[1, 4];
        int cases = 0;
        Gen.Select(folder, folder).Sample(
            (a, b) =>
            {
                Interlocked.Increment(ref cases);
                byte[] inA = [.. a, (byte)'/'], inB = [.. b, (byte)'/'];
                return Math.Sign(FolderOrder.Instance.Compare(a, b)) == Math.Sign(inA.AsSpan().SequenceCompareTo(inB));
            }, iter: 2000);
        Assert.Equal(2000, cases);
    }

    [Theory]
    [InlineData("plain/é 井.txt", "plain/é 井.txt")]
    [InlineData("<b>&amp;", "<b>&amp;")]
    [InlineData("a\u001b[2Jb", "a\\u{1b}[2Jb")]
    [InlineData("line\nbreak\t\u007f\u0085", "line\\u{a}break\\u{9}\\u{7f}\\u{85}")]
    [InlineData("bidi\u202etxt.exe\u2066", "bidi\\u{202e}txt.exe\\u{2066}")]
    [InlineData("\u2028\u2029\u200b\ufeff", "\\u{2028}\\u{2029}\\u{200b}\\u{feff}")]
    [InlineData("", "")]
    public void What_could_move_a_cursor_or_reorder_text_is_shown_as_its_number(string name, string shown) => Assert.Equal(shown, DisplayText.Escape(name));

    [Fact]
    public void Half_a_surrogate_pair_is_shown_as_its_number() => Assert.Equal("a\\u{d83d}", DisplayText.Escape("a\uD83D"));

    [Fact]
    public void Arguments_that_look_alike_are_told_apart_by_their_order()
    {
        byte[] line = [.. "profile\0"u8, (byte)'a', 0xFF, 0, .. "plain\0"u8, (byte)'a', 0xFE, 0];
        List<byte[]> bytes = RawArguments.Recover(["a\uFFFD", "plain", "a\uFFFD"], line);
        Assert.Equal(["61FF", Convert.ToHexString("plain"u8), "61FE"], bytes.Select(Convert.ToHexString));
    }

    [Fact]
    public void An_argument_that_holds_the_replacement_character_itself_keeps_its_bytes()
    {
        byte[] line = [.. "profile\0a\uFFFD\0"u8];
        Assert.Equal("61EFBFBD", Convert.ToHexString(Assert.Single(RawArguments.Recover(["a\uFFFD"], line))));
        Assert.Equal("62EFBFBD", Convert.ToHexString(Assert.Single(RawArguments.Recover(["b\uFFFD"], line))));
    }

    private static byte[] BytesOf(string name)
    {
        using var bytes = new MemoryStream();
        ReadOnlySpan<byte> text = Encoding.UTF8.GetBytes(name);
        for (int i = 0; i < text.Length; i++)
        {
            if (text[i] != '%')
            {
                bytes.WriteByte(text[i]);
                continue;
            }
            bytes.WriteByte(Convert.FromHexString(Encoding.ASCII.GetString(text.Slice(i + 1, 2)))[0]);
            i += 2;
        }
        return bytes.ToArray();
    }
}
