using RespDerive.Sandbox.Search;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>
/// One version of one resource as bytes, so that decimals leave exactly as they came (7.40 stays 7.40).
/// No bytes: the version is a deletion.
/// </summary>
internal sealed record StoredVersion(
    string Type, string Id, int Version, DateTimeOffset LastUpdated, DateTimeOffset CommittedAt, string Method, byte[]? Json, SearchIndex Index)
{
    public bool Deleted => Json is null;
    public string Reference => $"{Type}/{Id}";
    public string VersionedReference => $"{Type}/{Id}/_history/{Version}";
    public string ETag => $"W/\"{Version}\"";
}
