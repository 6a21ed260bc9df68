namespace RespDerive.Physiology;

/// <summary>Names that somebody may have meant.</summary>
public static class NearNames
{
    private const int Most = 5;

    /// <summary>The nearest names by edits (letter case counts little), nearest first; empty when none is near.</summary>
    public static IReadOnlyList<string> To(string name, IEnumerable<string> names)
    {
        var limit = Math.Max(1, name.Length / 3);
        return [.. names.Select(other => (Name: other, Edits: Edits(name, other))).Where(pair => pair.Edits <= limit)
            .OrderBy(pair => pair.Edits).ThenBy(pair => pair.Name, StringComparer.Ordinal).Take(Most).Select(pair => pair.Name)];
    }

    /// <summary>Insertions, deletions and substitutions (Levenshtein 1966), ignoring case.</summary>
    private static int Edits(string from, string to)
    {
        var previous = Enumerable.Range(0, to.Length + 1).ToArray();
        for (var i = 1; i <= from.Length; i++)
        {
            var current = new int[to.Length + 1];
            current[0] = i;
            for (var j = 1; j <= to.Length; j++)
            {
                var substitution = char.ToLowerInvariant(from[i - 1]) == char.ToLowerInvariant(to[j - 1]) ? 0 : 1;
                current[j] = Math.Min(Math.Min(current[j - 1], previous[j]) + 1, previous[j - 1] + substitution);
            }

            previous = current;
        }

        return previous[^1];
    }
}
