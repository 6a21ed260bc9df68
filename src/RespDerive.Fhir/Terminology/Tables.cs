namespace RespDerive.Fhir;

/// <summary>The tables shipped with the code: lines of fields between tabs, <c>#</c> begins a comment, <c>-</c> is an empty field.</summary>
internal static class Tables
{
    public static IEnumerable<string[]> Rows(string name)
    {
        using var stream = typeof(Tables).Assembly.GetManifestResourceStream(name)
            ?? throw new InvalidOperationException($"The table {name} is not in the assembly.");
        using var reader = new StreamReader(stream);
        while (reader.ReadLine() is { } line)
        {
            if (line.Length > 0 && line[0] != '#')
            {
                yield return [.. line.Split('\t').Select(field => field == "-" ? "" : field)];
            }
        }
    }
}
