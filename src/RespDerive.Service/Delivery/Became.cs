using RespDerive.Fhir.Server;

namespace RespDerive.Service.Delivery;

/// <summary>What became of one attempt to deliver an edition.</summary>
internal abstract record Became
{
    /// <summary>There is nothing to send.</summary>
    public sealed record Nothing : Became;

    /// <summary>The server holds the edition with this counter; a later one may be wanted by now.</summary>
    public sealed record Delivered(long Wanted, string Id, string? Version, bool Final, bool Retracted) : Became;

    /// <summary>The server holds an edition of ours that we had lost sight of; the wanted one is still to be sent.</summary>
    public sealed record Adopted(string Id, string Version, int Revision, bool Final, bool Retracted) : Became;

    /// <summary>To be tried again.</summary>
    public sealed record Again(TimeSpan? After) : Became;

    /// <summary>A person has withdrawn the result.</summary>
    public sealed record Withdrawn : Became;

    /// <summary>A person must look.</summary>
    public sealed record Parked(string Code, string Text) : Became;

    /// <summary>What an answer means that is no success.</summary>
    public static Became Of(ServerAnswer answer) => answer switch
    {
        ServerAnswer.Retry retry => new Again(retry.After),
        ServerAnswer.Parked parked => new Parked(parked.Code, parked.Text),
        ServerAnswer.Gone => Deleted,
        _ => new Again(null),
    };

    /// <summary>Somebody deleted the result.</summary>
    public static Parked Deleted { get; } = new("deleted-at-server", "The result was deleted at the server.");

    /// <summary>Without a version, an update could overwrite what a person changed.</summary>
    public static Parked NoVersion { get; } = new("no-version", "The server gives no version of the result, so that it cannot be updated safely.");
}
