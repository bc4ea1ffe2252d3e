using ScottPlot;
using SkiaSharp;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>The one type family of all pictures, read from the program itself: a machine without fonts draws the same.</summary>
internal sealed class BundledFont : IFontResolver
{
    /// <summary>Name of the family, as pictures and pages call it.</summary>
    public const string Family = "Noto Sans";

    private static readonly SKTypeface Regular = Load("NotoSans-Regular.ttf");
    private static readonly SKTypeface Bold = Load("NotoSans-Bold.ttf");
    private static readonly Lock Gate = new();
    private static bool installed;

    private BundledFont()
    {
    }

    /// <summary>Makes the plotting library use this family for whatever name it asks for.</summary>
    public static void Install()
    {
        lock (Gate)
        {
            if (installed) return;
            Fonts.FontResolvers.Clear();
            Fonts.FontResolvers.Add(new BundledFont());
            Fonts.Default = Family;
            Fonts.Sans = Family;
            installed = true;
        }
    }

    /// <summary>The regular or the bold face.</summary>
    public static SKTypeface Face(bool bold) => bold ? Bold : Regular;

    /// <inheritdoc/>
    public SKTypeface CreateTypeface(string fontName, FontWeight weight, FontSlant slant, FontSpacing spacing) => Face(weight >= FontWeight.SemiBold);

    /// <inheritdoc/>
    public SKTypeface CreateTypeface(string fontName, bool bold, bool italic) => Face(bold);

    private static SKTypeface Load(string file)
    {
        using Stream stream = typeof(BundledFont).Assembly.GetManifestResourceStream(file)
            ?? throw new InvalidOperationException($"The program was built without its font {file}.");
        using SKData data = SKData.Create(stream);
        return SKTypeface.FromData(data);
    }
}
