using System.Globalization;
using Microsoft.AspNetCore.WebUtilities;
using RespDerive.Sandbox.Endpoint;

namespace RespDerive.Sandbox.Search;

/// <summary>A parsed search: what it asks, and which of the given parameters were really used (for the self link).</summary>
internal sealed class SearchQuery
{
    private readonly List<Criterion> _criteria = [];
    private readonly List<KeyValuePair<string, string>> _used = [];
    private readonly List<string> _sort = [];

    private SearchQuery(string type) => Type = type;

    public string Type { get; }
    public int? Count { get; private set; }
    public bool CountOnly { get; private set; }
    public List<string> Ignored { get; } = [];
    public bool HasCriteria => _criteria.Count > 0;

    /// <summary>The used parameters as a query string, with its question mark when there are any.</summary>
    public string Self => _used.Count == 0 ? "" : "?" + string.Join('&', _used.Select(p => $"{Uri.EscapeDataString(p.Key)}={Uri.EscapeDataString(p.Value)}"));

    public IReadOnlyList<string>? Ids => _criteria.OfType<IdCriterion>().FirstOrDefault()?.Ids;

    /// <summary>A store key that every match must have, when there is one.</summary>
    public string? Shortcut { get; private set; }

    public bool Matches(StoredVersion version) => _criteria.TrueForAll(c => c.Matches(version));

    public void Order(List<StoredVersion> found) => found.Sort((a, b) =>
    {
        foreach (var key in _sort)
        {
            var order = key.TrimStart('-') switch
            {
                "date" => Nullable.Compare(First(a), First(b)),
                "_id" => string.CompareOrdinal(a.Id, b.Id),
                _ => a.LastUpdated.CompareTo(b.LastUpdated),
            };
            if (order != 0)
            {
                return key[0] == '-' ? -order : order;
            }
        }
        return a.LastUpdated.CompareTo(b.LastUpdated);
    });

    public static SearchQuery Parse(string type, string queryString, string baseUrl, string? form = null)
    {
        var query = new SearchQuery(type);
        foreach (var text in new[] { queryString, form ?? "" })
        {
            foreach (var pair in new QueryStringEnumerable(text))
            {
                query.Add(pair.DecodeName().ToString(), pair.DecodeValue().ToString(), baseUrl);
            }
        }
        return query;
    }

    private void Add(string given, string value, string baseUrl)
    {
        var colon = given.IndexOf(':', StringComparison.Ordinal);
        var (name, modifier) = colon < 0 ? (given, null) : (given[..colon], given[(colon + 1)..]);
        var used = value.Length > 0 && (Control(name, value) || Filter(name, modifier, value, baseUrl));
        if (used)
        {
            _used.Add(new(given, value));
        }
        else
        {
            Ignored.Add(given);
        }
    }

    private bool Control(string name, string value)
    {
        switch (name)
        {
            case "_count":
                Count = int.TryParse(value, NumberStyles.None, CultureInfo.InvariantCulture, out var count) ? count : throw Refusal.BadRequest("'_count' is not a number");
                return true;
            case "_summary" when value == "count":
                return CountOnly = true;
            case "_format" or "_total":
                return true;
            case "_sort":
                var keys = value.Split(',', StringSplitOptions.RemoveEmptyEntries);
                if (!Array.TrueForAll(keys, k => k.TrimStart('-') is "_lastUpdated" or "date" or "_id"))
                {
                    return false;
                }
                _sort.AddRange(keys);
                return true;
            default:
                return false;
        }
    }

    private bool Filter(string name, string? modifier, string value, string baseUrl)
    {
        var values = SearchText.Split(value, ',');
        var parameter = Array.Find(SearchParameter.Of(Type), p => p.Name == name);
        Criterion? criterion = (name, modifier, parameter?.Kind) switch
        {
            ("_id", null, _) => new IdCriterion([.. values.Select(SearchText.Unescape)]),
            ("_lastUpdated", null, _) => DateCriterion.Parse(name, values),
            ("_tag", null, _) => TokenCriterion.Parse(name, not: false, values),
            (_, "missing", not null) => new MissingCriterion(parameter!, value == "true"),
            (_, null, SearchKind.Date) => DateCriterion.Parse(name, values),
            (_, null or "not", SearchKind.Token) => TokenCriterion.Parse(name, modifier == "not", values),
            (_, null, SearchKind.Reference) => new ReferenceCriterion(name, [.. values.Select(v => Relative(v, parameter!.Target, baseUrl))]),
            (_, { Length: > 0 }, SearchKind.Reference) when char.IsAsciiLetterUpper(modifier[0]) => new ReferenceCriterion(name, [.. values.Select(v => $"{modifier}/{v}")]),
            (_, _, null) => null,
            // R4 search, "Modifiers": a server rejects a modifier it does not support.
            _ => throw Refusal.BadRequest($"modifier ':{modifier}' is not supported for '{name}'"),
        };
        if (criterion is null)
        {
            return false;
        }
        _criteria.Add(criterion);
        Shortcut ??= criterion switch
        {
            TokenCriterion { Name: "identifier", Not: false, Wanted: [{ System: { } system, Code: { } code }] } => SearchIndex.IdentifierKey(new Token(system.Length == 0 ? null : system, code)),
            ReferenceCriterion { Name: "subject" or "patient" or "target", Wanted: [var reference] } when reference.Contains('/', StringComparison.Ordinal) => SearchIndex.ReferenceKey(reference),
            _ => null,
        };
        return true;
    }

    private static string Relative(string value, string? target, string baseUrl)
    {
        var plain = SearchText.Unescape(value);
        plain = plain.StartsWith(baseUrl + "/", StringComparison.Ordinal) ? plain[(baseUrl.Length + 1)..] : plain;
        return target is not null && !plain.Contains('/', StringComparison.Ordinal) ? $"{target}/{plain}" : plain;
    }

    private static DateTimeOffset? First(StoredVersion version) =>
        version.Index.Dates("date") is { Count: > 0 } dates ? dates[0].From : null;
}
