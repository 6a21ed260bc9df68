using RespDerive.Fhir.Writing;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Service.Delivery;

/// <summary>Which edition of a result the server should hold now. Pure.</summary>
public static class EditionRules
{
    /// <summary>The outcome to render and its edition; null when there is nothing to send.</summary>
    /// <param name="delivery">State of the result.</param>
    public static (Outcome Outcome, Edition Edition)? Of(Storage.Delivery delivery)
    {
        ArgumentNullException.ThrowIfNull(delivery);
        var current = delivery.Current;
        if (current is { Withheld: null })
        {
            return (current, Edition(delivery, StatusOf(delivery, current)));
        }

        return delivery is { LastValued: { } last, Retracted: false, Revisions: > 0 }
            ? (last, Edition(delivery, EditionStatus.EnteredInError) with { Withheld = current?.Withheld })
            : null;
    }

    /// <summary>The record's own history: a change after a final is amended, or corrected when an input was.</summary>
    private static EditionStatus StatusOf(Storage.Delivery delivery, Outcome current) =>
        delivery.FinalSeen ? current.InputCorrected ? EditionStatus.Corrected : EditionStatus.Amended
        : current.Preliminary ? EditionStatus.Preliminary
        : EditionStatus.Final;

    private static Edition Edition(Storage.Delivery delivery, EditionStatus status) => new()
    {
        Status = status,
        Recorded = delivery.Recorded,
        Revision = (int)delivery.Revisions + 1,
        ServerId = delivery.ServerId,
        PreviousVersion = delivery.ServerVersion,
    };
}
