using System.Collections.Frozen;

namespace RespDerive.Fhir;

/// <summary>One row of a code map.</summary>
/// <param name="System">Code system.</param>
/// <param name="Code">Code.</param>
/// <param name="Unit">Unit the row is limited to, as sent; empty for any.</param>
/// <param name="Key">What it means: the key of a kind, of something recognised and kept apart, or <c>none</c>.</param>
public sealed record MappedCode(string System, string Code, string Unit, string Key);

/// <summary>From codes to keys: the site's rows first, then the tables shipped with the code.</summary>
public sealed class CodeMap
{
    private readonly FrozenDictionary<(string System, string Code, string Unit), string> _site;
    private readonly FrozenDictionary<(string System, string Code), string> _shipped;

    /// <summary>Builds a map.</summary>
    /// <param name="site">Rows of the site, which win.</param>
    /// <param name="snomed">False leaves out SNOMED CT, for sites without a licence.</param>
    public CodeMap(IEnumerable<MappedCode>? site = null, bool snomed = true)
    {
        var own = (site ?? []).ToList();
        var shipped = Shipped(snomed).ToList();
        _site = own.ToFrozenDictionary(row => (row.System, row.Code, row.Unit), row => row.Key);
        _shipped = shipped.ToFrozenDictionary(row => (row.System, row.Code), row => row.Key);
        Rows = [.. own, .. shipped.Where(row => !own.Exists(mine => mine.System == row.System && mine.Code == row.Code && mine.Unit.Length == 0))];
    }

    /// <summary>Every row in force, the site's first: what a subscription or a search has to ask for.</summary>
    public IReadOnlyList<MappedCode> Rows { get; }

    /// <summary>Rows whose code becomes a reading, alone or with what a metric or specimen adds.</summary>
    public IEnumerable<MappedCode> Readable => Rows.Where(row => Keys.Find(row.Key) is { CanBeRead: true });

    /// <summary>The site's word on a code with a unit, else on the code alone; null when it has none.</summary>
    internal string? OfSite(CodeFact code, string? unit) =>
        unit is { Length: > 0 } && _site.TryGetValue((code.System, code.Code, unit), out var exact) ? exact
        : _site.GetValueOrDefault((code.System, code.Code, ""));

    /// <summary>The shipped meaning of a code; null when it has none.</summary>
    internal string? OfTables(CodeFact code) => _shipped.GetValueOrDefault((code.System, code.Code));

    /// <summary>The site's word on a code, else the shipped meaning.</summary>
    internal string? Of(CodeFact code) => OfSite(code, null) ?? OfTables(code);

    private static IEnumerable<MappedCode> Shipped(bool snomed) =>
    [
        .. Of("loinc.tsv", CodeSystems.Loinc),
        .. Of("mdc.tsv", CodeSystems.Mdc),
        .. Of("specimens.tsv", CodeSystems.SpecimenType),
        .. snomed ? Of("snomed.tsv", CodeSystems.Snomed) : [],
    ];

    private static IEnumerable<MappedCode> Of(string table, string system) =>
        Tables.Rows(table).Select(row => new MappedCode(system, row[0], "", row[1]));
}
