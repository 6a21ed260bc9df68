using System.Text.Json.Nodes;
using RespDerive.Sandbox.Endpoint;

namespace RespDerive.Sandbox.Search;

/// <summary>A coding, identifier or code as searched: system (when it has one) and code.</summary>
internal readonly record struct Token(string? System, string Code);

/// <summary>What searches look at, taken out of a resource once, when it is stored.</summary>
internal sealed class SearchIndex
{
    public static readonly SearchIndex Empty = new();

    private static readonly List<Token> s_noTokens = [];
    private static readonly List<DateRange> s_noDates = [];

    private readonly Dictionary<string, List<Token>> _tokens = [];
    private readonly Dictionary<string, List<string>> _references = [];
    private readonly Dictionary<string, List<DateRange>> _dates = [];

    public List<Token> Tokens(string name) => _tokens.GetValueOrDefault(name) ?? s_noTokens;

    /// <summary>As written, and once more without the version when they carry one.</summary>
    public IReadOnlyList<string> References(string name) => _references.GetValueOrDefault(name) ?? [];

    public List<DateRange> Dates(string name) => _dates.GetValueOrDefault(name) ?? s_noDates;

    /// <summary>Keys under which the store finds a resource without walking the whole type.</summary>
    public IEnumerable<string> Shortcuts =>
        Tokens("identifier").Select(IdentifierKey).Concat(References("subject").Concat(References("patient")).Concat(References("target")).Select(ReferenceKey));

    public static string IdentifierKey(Token identifier) => $"identifier={identifier.System}|{identifier.Code}";

    public static string ReferenceKey(string reference) => $"reference={reference}";

    public static SearchIndex Of(string type, JsonObject resource)
    {
        var index = new SearchIndex();
        foreach (var parameter in SearchParameter.Of(type))
        {
            foreach (var node in parameter.Paths.SelectMany(path => Walk(resource, path)))
            {
                index.Add(parameter, node);
            }
        }
        foreach (var node in Walk(resource, "meta.tag"))
        {
            index.AddTokens("_tag", node);
        }
        return index;
    }

    private void Add(SearchParameter parameter, JsonNode node)
    {
        switch (parameter.Kind)
        {
            case SearchKind.Token:
                AddTokens(parameter.Name, node);
                break;
            case SearchKind.Reference when node.Text("reference") is { } reference:
                if (parameter.Target is null || $"/{reference}".Contains($"/{parameter.Target}/", StringComparison.Ordinal))
                {
                    AddReference(parameter.Name, reference);
                }
                break;
            case SearchKind.Date:
                if ((node is JsonObject ? DateRange.OfPeriod(node.Text("start"), node.Text("end")) : DateRange.TryParse(Primitive(node))) is { } range)
                {
                    Bucket(_dates, parameter.Name).Add(range);
                }
                break;
        }
    }

    private void AddReference(string name, string reference)
    {
        var bucket = Bucket(_references, name);
        bucket.Add(reference);
        var version = reference.IndexOf("/_history/", StringComparison.Ordinal);
        if (version > 0)
        {
            bucket.Add(reference[..version]);
        }
    }

    private void AddTokens(string name, JsonNode node)
    {
        if (node is JsonObject { } o && o["coding"] is JsonArray codings)
        {
            foreach (var coding in codings.OfType<JsonObject>())
            {
                AddTokens(name, coding);
            }
        }
        else if ((node is JsonObject ? node.Text("code") ?? node.Text("value") : Primitive(node)) is { } code)
        {
            Bucket(_tokens, name).Add(new Token(node.Text("system"), code));
        }
    }

    private static string? Primitive(JsonNode node) => node is JsonValue value ? value.ToString() : null;

    private static List<T> Bucket<T>(Dictionary<string, List<T>> all, string name) =>
        all.TryGetValue(name, out var bucket) ? bucket : all[name] = [];

    private static IEnumerable<JsonNode> Walk(JsonNode? node, string path)
    {
        IEnumerable<JsonNode> nodes = node is null ? [] : [node];
        foreach (var name in path.Split('.'))
        {
            nodes = nodes.OfType<JsonObject>().SelectMany(o => o[name] switch
            {
                null => [],
                JsonArray list => list.Where(n => n is not null).Select(n => n!),
                var single => [single],
            });
        }
        return nodes;
    }
}
