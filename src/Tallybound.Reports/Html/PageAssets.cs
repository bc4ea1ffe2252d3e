using System.Security.Cryptography;
using System.Text;

namespace Tallybound.Reports.Html;

/// <summary>Style, script and fonts that every page carries inside itself, and the policy that allows just those.</summary>
internal static class PageAssets
{
    private static readonly string Style = Text("report.css").Replace("{{regular}}", Font("NotoSans-Regular.latin.woff2"), StringComparison.Ordinal).Replace("{{bold}}", Font("NotoSans-Bold.latin.woff2"), StringComparison.Ordinal);
    private static readonly string Script = Text("report.js");

    /// <summary>The style element.</summary>
    public static string StyleElement { get; } = $"<style>{Style}</style>";

    /// <summary>The script element; pages read well without it.</summary>
    public static string ScriptElement { get; } = $"<script>{Script}</script>";

    /// <summary>Content security policy: nothing from anywhere, the one style, the one script, pictures and fonts from inside the page.</summary>
    public static string Policy { get; } =
        $"default-src 'none'; base-uri 'none'; form-action 'none'; style-src '{Digest(Style)}'; script-src '{Digest(Script)}'; img-src data:; font-src data:";

    private static string Digest(string text) => "sha256-" + Convert.ToBase64String(SHA256.HashData(Encoding.UTF8.GetBytes(text)));

    private static string Font(string name) => Convert.ToBase64String(Bytes(name));

    private static string Text(string name) => Encoding.UTF8.GetString(Bytes(name)).ReplaceLineEndings("\n");

    private static byte[] Bytes(string name)
    {
        using Stream stream = typeof(PageAssets).Assembly.GetManifestResourceStream(name) ?? throw new InvalidOperationException($"The program was built without {name}.");
        using var bytes = new MemoryStream();
        stream.CopyTo(bytes);
        return bytes.ToArray();
    }
}
