namespace RespDerive.Physiology.Inputs;

/// <summary>How a companion is chosen relative to the anchor's event time. The timeline carries the rules out.</summary>
public abstract record Pairing
{
    /// <summary>The anchor itself.</summary>
    public sealed record AnchorItself : Pairing;

    /// <summary>The last setting at or before the anchor that is still in force (age by source policy).</summary>
    public sealed record InForce : Pairing;

    /// <summary>A measured value not older than <paramref name="MaxAge"/> nor than the last change of the settings <paramref name="ChangeOf"/>.</summary>
    public sealed record SinceChange(TimeSpan MaxAge, IReadOnlyList<Kind> ChangeOf) : Pairing;

    /// <summary>The closest in the window, ties to the earlier.</summary>
    public sealed record Nearest(TimeSpan Before, TimeSpan After) : Pairing;

    /// <summary>Same specimen, else same panel or report, else equal time within a minute.</summary>
    public sealed record SameSample : Pairing;

    /// <summary>Same panel, else same device within a minute, else within <paramref name="Within"/>.</summary>
    public sealed record SameManoeuvre(TimeSpan Within) : Pairing;

    /// <summary>Median of the readings in the window, one root.</summary>
    public sealed record MedianOver(TimeSpan Before, TimeSpan After, int AtLeast) : Pairing;

    /// <summary>A standing property: the latest at or before the anchor, else the earliest after it in the same encounter.</summary>
    public sealed record Standing : Pairing;

    /// <summary>From the site policy; for barometric pressure else a reading with the patient as subject within <paramref name="ReadingWithin"/>.</summary>
    public sealed record Site(TimeSpan ReadingWithin) : Pairing;

    /// <summary>Not paired from the record; only given by hand.</summary>
    public sealed record ByHand : Pairing;
}
