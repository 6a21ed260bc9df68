using System.Text.Json;
using System.Text.RegularExpressions;

namespace RespDerive.Fhir.Server;

/// <summary>Where a write landed: id and version from the body, else the Location, else the ETag.</summary>
internal static partial class Landing
{
    /// <summary>Null when neither tells an id.</summary>
    public static ServerAnswer.Delivered? Of(JsonElement resource, string? type, string? location, string? etag)
    {
        var known = location is null ? Match.Empty : Place().Match(location);
        var id = resource.Text("resourceType") == type ? resource.Text("id") : null;
        id ??= known.Success && known.Groups["type"].Value == type ? known.Groups["id"].Value : null;
        if (id is null)
        {
            return null;
        }

        var version = resource.Text("resourceType") == type ? resource.Member("meta").Text("versionId") : null;
        return new ServerAnswer.Delivered(id, version ?? (known.Groups["version"].Success ? known.Groups["version"].Value : Version(etag)));
    }

    /// <summary>The version inside an ETag.</summary>
    public static string? Version(string? etag)
    {
        if (etag is null)
        {
            return null;
        }

        var bare = (etag.StartsWith("W/", StringComparison.Ordinal) ? etag[2..] : etag).Trim('"');
        return bare.Length == 0 ? null : bare;
    }

    /// <summary>Absolute or relative, with or without version.</summary>
    [GeneratedRegex(@"(?:^|/)(?<type>[A-Z][A-Za-z]+)/(?<id>[A-Za-z0-9\-.]{1,64})(?:/_history/(?<version>[A-Za-z0-9\-.]{1,64}))?/?$")]
    private static partial Regex Place();
}
