using System.Text.Json;

namespace RespDerive.Fhir;

/// <summary>
/// Turns the references of one resource into keys that are equal when they mean the same resource:
/// <c>Type/id</c> within the source, an absolute URL or URN outside it, <c>identifier:system|value</c> for a logical reference.
/// </summary>
/// <param name="sourceBase">Base URL of the source; empty when unknown.</param>
/// <param name="entryBase">Base URL of the entry's own address; null when it has none.</param>
/// <param name="links">Full URLs of the Bundle that stand for resources with an id.</param>
internal sealed class References(string sourceBase, string? entryBase, IReadOnlyDictionary<string, string> links)
{
    private readonly List<string> _seen = [];
    private readonly Dictionary<string, string> _contained = new(StringComparer.Ordinal);

    /// <summary>All keys given out, in order, each once.</summary>
    public IReadOnlyList<string> Seen => _seen;

    /// <summary>True when the resource comes from another server than the source's.</summary>
    public bool Foreign => entryBase is not null && sourceBase.Length > 0 && entryBase != sourceBase;

    /// <summary>Makes a contained resource known under its local id.</summary>
    public void Contain(string localId, string key) => _contained[localId] = key;

    /// <summary>Key of a Reference element; null when it names nothing.</summary>
    public string? Key(JsonElement? reference)
    {
        if (reference is not { } element)
        {
            return null;
        }

        var key = element.Text("reference") is { } text ? FromText(text) : null;
        key ??= element.Get("identifier") is { } identifier && identifier.Text("value") is { } value
            ? new IdentifierFact(identifier.Text("system") ?? "", value).Reference : null;
        if (key is not null && !_seen.Contains(key))
        {
            _seen.Add(key);
        }

        return key;
    }

    /// <summary>Keys of a list of Reference elements.</summary>
    public IReadOnlyList<string> Keys(IEnumerable<JsonElement> references) =>
        [.. references.Select(reference => Key(reference)).OfType<string>().Distinct()];

    /// <summary>Key of the patient a Reference names; null when it names something else.</summary>
    public string? Patient(JsonElement? reference)
    {
        var key = Key(reference);
        if (key is null || reference?.Text("type") is { } type && type != "Patient")
        {
            return null;
        }

        return key.StartsWith("identifier:", StringComparison.Ordinal) || key.StartsWith("urn:", StringComparison.Ordinal)
            || key.StartsWith("Patient/", StringComparison.Ordinal) || key.Contains("/Patient/", StringComparison.Ordinal) ? key : null;
    }

    /// <summary>The relative reference within a base, or the absolute one.</summary>
    public string Absolute(string relative) => Foreign ? $"{entryBase}/{relative}" : relative;

    private string? FromText(string text)
    {
        text = WithoutVersion(text.Trim());
        if (text.StartsWith('#'))
        {
            return _contained.GetValueOrDefault(text[1..]);
        }

        if (links.TryGetValue(text, out var linked))
        {
            return linked;
        }

        foreach (var own in sourceBase.Length > 0 ? [sourceBase] : entryBase is null ? Array.Empty<string>() : [entryBase])
        {
            if (text.StartsWith(own + "/", StringComparison.Ordinal))
            {
                return text[(own.Length + 1)..];
            }
        }

        return text.Contains(':', StringComparison.Ordinal) ? text : Absolute(text.TrimStart('/'));
    }

    private static string WithoutVersion(string text) =>
        text.IndexOf("/_history/", StringComparison.Ordinal) is var at and > 0 ? text[..at] : text;
}
