using System.Globalization;

namespace RespDerive.Sandbox.Endpoint;

/// <summary><c>If-Match</c> with a weak ETag of the version (R4 RESTful API, "Managing Resource Contention").</summary>
internal static class Preconditions
{
    /// <summary>412 unless the current version is the one named.</summary>
    public static void Require(string? ifMatch, StoredVersion? current)
    {
        if (ifMatch is null)
        {
            return;
        }
        if (current is null || current.Deleted || Version(ifMatch) != current.Version)
        {
            throw Refusal.Precondition($"If-Match {ifMatch} is not the current version{(current is null ? "" : $" {current.ETag}")}");
        }
    }

    public static int Version(string tag)
    {
        var plain = tag.Trim();
        plain = plain.StartsWith("W/", StringComparison.Ordinal) ? plain[2..] : plain;
        return int.TryParse(plain.Trim('"'), NumberStyles.None, CultureInfo.InvariantCulture, out var version)
            ? version
            : throw Refusal.BadRequest($"'{tag}' is not a version ETag");
    }
}
