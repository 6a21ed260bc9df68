using RespDerive.Fhir.Writing;
using RespDerive.Timeline;

namespace RespDerive.Service.Delivery;

/// <summary>What became of one attempt to deliver an edition.</summary>
internal abstract record Became
{
    /// <summary>There is nothing to send.</summary>
    public sealed record Nothing : Became;

    /// <summary>The server holds the wanted edition.</summary>
    public sealed record Delivered(Outcome Outcome, string Id, string? Version, EditionStatus Status) : Became;

    /// <summary>The server holds an older edition of ours; the wanted one is still to be sent.</summary>
    public sealed record Adopted(string Id, string Version, bool Final) : Became;

    /// <summary>To be tried again.</summary>
    public sealed record Again(TimeSpan? After) : Became;

    /// <summary>A person has withdrawn the result.</summary>
    public sealed record Withdrawn : Became;

    /// <summary>A person must look.</summary>
    public sealed record Parked(string Code, string Text) : Became;
}
