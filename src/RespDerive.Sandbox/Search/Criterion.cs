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

internal sealed record DateCriterion(string Parameter, (string Prefix, DateRange Value)[] Wanted) : Criterion(Parameter)
{
    private static readonly string[] s_prefixes = ["eq", "ne", "gt", "lt", "ge", "le", "sa", "eb"];

    public override bool Matches(StoredVersion version)
    {
        if (Name == "_lastUpdated")
        {
            return Matches(new DateRange(version.LastUpdated, version.LastUpdated.AddMilliseconds(1)));
        }
        foreach (var value in version.Index.Dates(Name))
        {
            if (Matches(value))
            {
                return true;
            }
        }
        return false;
    }

    private bool Matches(DateRange value)
    {
        foreach (var (prefix, wanted) in Wanted)
        {
            if (value.Satisfies(prefix, wanted))
            {
                return true;
            }
        }
        return false;
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
internal sealed record TokenCriterion(string Parameter, bool Not, (string? System, string? Code)[] Wanted) : Criterion(Parameter)
{
    public override bool Matches(StoredVersion version)
    {
        // Plain loops: a poll asks this of every Observation there is.
        foreach (var token in version.Index.Tokens(Name))
        {
            foreach (var (system, code) in Wanted)
            {
                if ((code is null || code == token.Code) && (system is null || system == (token.System ?? "")))
                {
                    return !Not;
                }
            }
        }
        return Not;
    }

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
