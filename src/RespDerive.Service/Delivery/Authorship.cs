using RespDerive.Fhir.Server;

namespace RespDerive.Service.Delivery;

/// <summary>Who wrote what the server holds of a result.</summary>
internal abstract record Authorship
{
    /// <summary>We did, and the server has confirmed it.</summary>
    public sealed record Confirmed : Authorship;

    /// <summary>We did, in the attempt whose answer never came.</summary>
    public sealed record Attempted : Authorship;

    /// <summary>We did, in an edition that we had lost sight of, as after the store was lost.</summary>
    public sealed record Forgotten(int Revision) : Authorship;

    /// <summary>Somebody else did.</summary>
    public sealed record Foreign : Authorship;

    /// <summary>
    /// Judges by version and content alone: the version confirmed last, the attempt, or our latest testimony at the server.
    /// Content that we wrote before and that a person has restored is not ours: only what follows the last confirmed edition can be.
    /// </summary>
    public static Authorship Of(Storage.Delivery delivery, HeldResult held, IReadOnlyList<OwnProvenance> ours)
    {
        if (held.Version is not null && delivery.ServerVersion == held.Version)
        {
            return new Confirmed();
        }

        if (delivery.Attempt?.Digest == held.Digest)
        {
            return new Attempted();
        }

        // Where the server never told the version of the last confirmed edition, that one may be what is held.
        var known = delivery.ServerVersion is null ? delivery.Revisions - 1 : delivery.Revisions;
        var latest = ours.Select(one => one.Revision).DefaultIfEmpty().Max();
        return latest > known && ours.Any(one => one.Revision == latest && one.Digest == held.Digest) ? new Forgotten(latest) : new Foreign();
    }
}
