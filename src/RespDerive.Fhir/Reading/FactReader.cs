using System.Buffers;
using System.Globalization;
using System.Runtime.InteropServices;
using System.Security.Cryptography;
using System.Text.Json;
using RespDerive.Timeline;

namespace RespDerive.Fhir;

/// <summary>
/// Bytes of one resource to facts. Never throws for bad data: an element of the wrong shape is absent, and only what has
/// no identity at all is refused.
/// </summary>
public static class FactReader
{
    private static readonly Dictionary<string, string> NoLinks = [];

    /// <summary>Reads one resource.</summary>
    /// <param name="utf8">JSON of the resource.</param>
    /// <param name="source">Name of the system of record.</param>
    /// <param name="baseUrl">Base URL of the source; empty when unknown.</param>
    /// <param name="fullUrl">Address of the Bundle entry; null outside a Bundle.</param>
    /// <param name="arrived">When we got it.</param>
    /// <param name="links">References of the entries of the same Bundle by their URNs.</param>
    public static FactResult Read(ReadOnlyMemory<byte> utf8, string source, string baseUrl, string? fullUrl, DateTimeOffset arrived,
        IReadOnlyDictionary<string, string>? links = null)
    {
        using var document = Json.Parse(utf8);
        if (document is null)
        {
            return new(null, Refusals.NotJson);
        }

        try
        {
            return Read(document.RootElement, source, baseUrl.TrimEnd('/'), fullUrl, arrived, links ?? NoLinks);
        }
        catch (InvalidOperationException)
        {
            return new(null, Refusals.NotJson); // a property name that is no text
        }
    }

    private static FactResult Read(JsonElement root, string source, string baseUrl, string? fullUrl, DateTimeOffset arrived,
        IReadOnlyDictionary<string, string> links)
    {
        if (root.Text("resourceType") is not { } type)
        {
            return new(null, Refusals.NotFhir);
        }

        if (!TypeReader.IsRead(type))
        {
            return new(null, Refusals.TypeNotRead);
        }

        var id = root.Text("id") is { } sent && IsId(sent) ? sent : null;
        if ((id ?? fullUrl) is null)
        {
            return new(null, Refusals.NoIdentity);
        }

        var entryBase = id is not null && fullUrl?.StartsWith("http", StringComparison.Ordinal) == true
            && fullUrl.EndsWith($"/{type}/{id}", StringComparison.Ordinal) ? fullUrl[..^(type.Length + id.Length + 2)] : null;
        var references = new References(baseUrl, entryBase, links);
        var key = new ResourceKey(source, type, id is null ? fullUrl! : references.Foreign ? references.Absolute($"{type}/{id}") : id);
        var contained = Contained(root, key, references);
        var content = TypeReader.Read(type, root, references);
        var digest = Digest(JsonMarshal.GetRawUtf8Value(root));
        var meta = root.Get("meta") ?? default;
        var version = meta.Text("versionId");
        return new(new ResourceFacts
        {
            Key = key,
            Base = entryBase ?? baseUrl,
            Version = version ?? digest[..16],
            Order = new VersionOrder(SentTime.Instant(meta.Text("lastUpdated")),
                long.TryParse(version, NumberStyles.None, CultureInfo.InvariantCulture, out var number) ? number : null, digest),
            Arrived = arrived,
            Patient = type == "Patient" ? key.Reference : references.Patient(root.Get("subject")),
            References = [.. references.Seen],
            Identifiers = [.. root.Each("identifier").Select(Identifier).OfType<IdentifierFact>()],
            Contained = contained,
            Content = content,
        }, null);
    }

    private static Dictionary<string, TypeFacts> Contained(JsonElement root, ResourceKey key, References references)
    {
        var found = new Dictionary<string, TypeFacts>(StringComparer.Ordinal);
        foreach (var inner in root.Each("contained"))
        {
            if (inner.Text("resourceType") is not { } type || !TypeReader.IsRead(type) || inner.Text("id") is not { } id)
            {
                continue;
            }

            var name = inner.Each("identifier").Select(Identifier).OfType<IdentifierFact>().FirstOrDefault()?.Reference ?? $"{key.Reference}#{id}";
            references.Contain(id.TrimStart('#'), name);
            found[name] = TypeReader.Read(type, inner, references);
        }

        return found;
    }

    internal static IdentifierFact? Identifier(JsonElement element) =>
        element.Text("value") is { } value ? new(element.Text("system") ?? "", value) : null;

    private static readonly SearchValues<char> NotInIds = SearchValues.Create("/:#?| ");

    private static bool IsId(string id) => id.AsSpan().IndexOfAny(NotInIds) < 0;

    /// <summary>SHA-256 of the content without insignificant white space, lower-case hex.</summary>
    private static string Digest(ReadOnlySpan<byte> json)
    {
        var kept = new byte[json.Length];
        var length = 0;
        var (inText, escaped) = (false, false);
        foreach (var b in json)
        {
            if (inText || b is not ((byte)' ' or (byte)'\t' or (byte)'\r' or (byte)'\n'))
            {
                kept[length++] = b;
            }

            inText ^= b == '"' && !escaped;
            escaped = inText && b == '\\' && !escaped;
        }

        return Convert.ToHexStringLower(SHA256.HashData(kept.AsSpan(0, length)));
    }
}
