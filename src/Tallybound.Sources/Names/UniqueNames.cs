using System.Globalization;

namespace Tallybound.Sources.Names;

/// <summary>Keeps the names of a run apart.</summary>
internal sealed class UniqueNames
{
    private readonly HashSet<string> taken = new(StringComparer.Ordinal);

    /// <summary>Whether a name had to be changed.</summary>
    public bool Changed { get; private set; }

    /// <summary>The name, or the name with <c>~2</c>, <c>~3</c> … where it is taken.</summary>
    public string Take(string name)
    {
        string candidate = name;
        for (int number = 2; !taken.Add(candidate); number++)
        {
            candidate = string.Create(CultureInfo.InvariantCulture, $"{name}~{number}");
            Changed = true;
        }
        return candidate;
    }
}
