using RespDerive.Sandbox.Endpoint;

namespace RespDerive.Sandbox.Search;

/// <summary>One <c>name[:modifier]=value,value…</c> of a search: any of its values may match.</summary>
internal abstract record Criterion(string Name)
{
    public abstract bool Matches(StoredVersion version);
}

internal sealed record IdCriterion(IReadOnlyList<string> Ids) : Criterion("_id")
{
    public override bool Matches(StoredVersion version) => Ids.Contains(version.Id, StringComparer.Ordinal);
}

internal sealed record MissingCriterion(SearchParameter Parameter, bool Missing) : Criterion(Parameter.Name)
{
    public override bool Matches(StoredVersion version) =>
        Missing == (version.Index.Tokens(Name).Count + version.Index.References(Name).Count + version.Index.Dates(Name).Count == 0);
}

internal sealed record DateCriterion(string Parameter, IReadOnlyList<(string Prefix, DateRange Value)> Wanted) : Criterion(Parameter)
{
    private static readonly string[] s_prefixes = ["eq", "ne", "gt", "lt", "ge", "le", "sa", "eb"];

    public override bool Matches(StoredVersion version)
    {
        IReadOnlyList<DateRange> values = Name == "_lastUpdated"
            ? [new DateRange(version.LastUpdated, version.LastUpdated.AddMilliseconds(1))]
            : version.Index.Dates(Name);
        return values.Any(value => Wanted.Any(wanted => value.Satisfies(wanted.Prefix, wanted.Value)));
    }

    public static DateCriterion Parse(string name, IEnumerable<string> values) => new(name, [.. values.Select(value =>
    {
        var prefix = Array.Find(s_prefixes, p => value.StartsWith(p, StringComparison.Ordinal));
        return DateRange.TryParse(prefix is null ? value : value[2..]) is { } range
            ? (prefix ?? "eq", range)
            : throw Refusal.BadRequest($"'{name}' has a value that is not a date");
    })]);
}

/// <summary><c>code</c> (any system), <c>system|code</c>, <c>|code</c> (no system), <c>system|</c> (any code).</summary>
internal sealed record TokenCriterion(string Parameter, bool Not, IReadOnlyList<(string? System, string? Code)> Wanted) : Criterion(Parameter)
{
    public override bool Matches(StoredVersion version) => Not != version.Index.Tokens(Name).Any(token => Wanted.Any(wanted =>
        (wanted.Code is null || wanted.Code == token.Code)
        && (wanted.System is null || wanted.System == (token.System ?? ""))));

    public static TokenCriterion Parse(string name, bool not, IEnumerable<string> values) => new(name, not, [.. values.Select(value =>
    {
        var bar = SearchText.Split(value, '|');
        return bar.Count == 1
            ? ((string?)null, (string?)SearchText.Unescape(value))
            : (SearchText.Unescape(bar[0]), bar[1].Length == 0 ? null : SearchText.Unescape(bar[1]));
    })]);
}

/// <summary><c>Type/id</c>, <c>id</c>, an absolute URL of this server, or any of these with a version.</summary>
internal sealed record ReferenceCriterion(string Parameter, IReadOnlyList<string> Wanted) : Criterion(Parameter)
{
    public override bool Matches(StoredVersion version) => version.Index.References(Name).Any(reference => Wanted.Any(wanted =>
        reference == wanted
        || (!wanted.Contains('/', StringComparison.Ordinal) && reference.EndsWith($"/{wanted}", StringComparison.Ordinal) && !reference.Contains("/_history/", StringComparison.Ordinal))));
}
