namespace RespDerive.Storage;

/// <summary>Names of the totals that are kept, not counted.</summary>
internal static class Tallies
{
    public const string Received = "received";
    public const string Repeats = "repeats";
    public const string VersionResets = "version-reset";
    public const string Revisions = "revisions";
    public const string Retractions = "retractions";
    public const string Delivered = "delivered";
}
