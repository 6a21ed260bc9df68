namespace RespDerive.Physiology.Inputs;

/// <summary>How often an anchor may call.</summary>
public enum Cadence
{
    /// <summary>Every anchor reading; of readings a device streams, the first in each quarter of an hour (UTC).</summary>
    EachOrQuarterHourIfStreamed,

    /// <summary>The first anchor reading in each quarter of an hour (UTC), streamed or not.</summary>
    QuarterHour,
}

/// <summary>When a definition is called for.</summary>
/// <param name="Anchors">Kinds whose readings call, best first; a lower one calls only where no better one is near.</param>
/// <param name="Cadence">How often.</param>
public sealed record Calling(IReadOnlyList<Kind> Anchors, Cadence Cadence = Cadence.EachOrQuarterHourIfStreamed)
{
    /// <summary>Called for only when one of these was read in the <see cref="Recent"/> before the anchor; empty means always.</summary>
    public IReadOnlyList<Kind> OnlyWith { get; init; } = [];

    /// <summary>How far back <see cref="OnlyWith"/> looks.</summary>
    public TimeSpan Recent { get; init; } = TimeSpan.FromHours(24);

    /// <summary>Not called for when one of these was read within <see cref="Around"/> of the anchor.</summary>
    public IReadOnlyList<Kind> NotWith { get; init; } = [];

    /// <summary>How far to both sides <see cref="NotWith"/> looks.</summary>
    public TimeSpan Around { get; init; } = TimeSpan.FromMinutes(5);
}
