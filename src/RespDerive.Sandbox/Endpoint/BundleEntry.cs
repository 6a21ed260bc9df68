using System.Text.Json.Nodes;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>One entry of a batch or transaction, with its request split into type, id and query.</summary>
internal sealed record BundleEntry(int Position, string Method, string Url, string? FullUrl, JsonObject? Resource)
{
    public string? IfMatch { get; init; }
    public string? IfNoneMatch { get; init; }
    public string? IfNoneExist { get; init; }

    public string Path { get; } = Url.Split('?')[0].Trim('/');
    public string Query { get; } = Url.Contains('?', StringComparison.Ordinal) ? Url[Url.IndexOf('?', StringComparison.Ordinal)..] : "";
    public string Type => Path.Split('/')[0];
    public string? Id => Path.Split('/') is [_, var id] && Method != "POST" ? id : null;

    /// <summary>R4 "Transaction Processing Rules": DELETE, POST, PUT, then GET.</summary>
    public int Turn => Method switch { "DELETE" => 0, "POST" => 1, "PUT" => 2, _ => 3 };

    public FhirRequest Request => new(Method, Path, Query)
    {
        Body = Resource is null ? [] : ResourceJson.Bytes(Resource),
        IfMatch = IfMatch,
        IfNoneMatch = IfNoneMatch,
        IfNoneExist = IfNoneExist,
    };

    public static List<BundleEntry> All(JsonObject bundle, string baseUrl)
    {
        var entries = new List<BundleEntry>();
        foreach (var node in bundle["entry"]?.AsArray() ?? [])
        {
            if (node?["request"] is not JsonObject request || request.Text("method") is not { } method || request.Text("url") is not { } url)
            {
                throw Refusal.BadRequest($"entry {entries.Count} has no request with method and url");
            }
            if (method is not ("GET" or "POST" or "PUT" or "DELETE"))
            {
                throw Refusal.BadRequest($"entry {entries.Count}: method {method} is not supported");
            }
            if (method is "POST" or "PUT" && node["resource"] is not JsonObject)
            {
                throw Refusal.BadRequest($"entry {entries.Count} has no resource");
            }
            var relative = url.StartsWith(baseUrl + "/", StringComparison.Ordinal) ? url[(baseUrl.Length + 1)..] : url;
            entries.Add(new BundleEntry(entries.Count, method, relative, node.Text("fullUrl"), (node["resource"] as JsonObject)?.DeepClone() as JsonObject)
            {
                IfMatch = request.Text("ifMatch"),
                IfNoneMatch = request.Text("ifNoneMatch"),
                IfNoneExist = request.Text("ifNoneExist"),
            });
        }
        return entries;
    }
}
