using System.Text.Json.Serialization;

namespace RespDerive.Timeline;

/// <summary>A reading, in one version, that a result rests on or that a gate looked at.</summary>
/// <param name="Resource">The resource.</param>
/// <param name="Part">Component, or empty.</param>
/// <param name="Version">Version of the resource.</param>
/// <param name="Base">Base URL of the source; empty when unknown.</param>
/// <param name="At">Event time.</param>
/// <param name="Value">Canonical value of this reading (for a median, one of those it was taken from).</param>
public sealed record UsedReading(ResourceKey Resource, string Part, string Version, string Base, DateTimeOffset At, double Value);

/// <summary>One root of a result: a kind, the value used, and where it came from.</summary>
public sealed record UsedInput
{
    /// <summary>Key of the kind.</summary>
    public required string Kind { get; init; }

    /// <summary>Value used, canonical unit; index of the code for a coded kind.</summary>
    public required double Value { get; init; }

    /// <summary>Canonical unit; null for a coded kind.</summary>
    public string? Unit { get; init; }

    /// <summary>The code of a coded kind; null for a quantity.</summary>
    public string? Code { get; init; }

    /// <summary>Readings behind it: several for a median, none for a constant.</summary>
    public IReadOnlyList<UsedReading> Readings { get; init; } = [];

    /// <summary>Minutes from the anchor's event time to this reading's, negative = before; null for constants and properties.</summary>
    public double? GapMinutes { get; init; }

    /// <summary>Share of the variance, 0 to 1.</summary>
    public double Share { get; init; }

    /// <summary>True for a constant of the policy or the definition.</summary>
    public bool Assumed { get; init; }

    /// <summary>True when only a gate looked at it; it is evidence, not a source of the number.</summary>
    public bool GateOnly { get; init; }
}

/// <summary>What became of one called anchor and definition: a quantity, a code, or a withheld value with its reason.</summary>
public sealed record Outcome
{
    /// <summary>Name-based identity: site, definition, source, patient, anchor (or the quarter of an hour for streamed anchors).</summary>
    public required Guid Identity { get; init; }

    /// <summary>Key of the definition.</summary>
    public required string Definition { get; init; }

    /// <summary>Revision of the definition.</summary>
    public required int Revision { get; init; }

    /// <summary>Source of the patient and anchor.</summary>
    public required string Source { get; init; }

    /// <summary>Reference of the patient as the anchor gave it.</summary>
    public required string Patient { get; init; }

    /// <summary>Encounter of the anchor.</summary>
    public string? Encounter { get; init; }

    /// <summary>The anchor reading.</summary>
    public required UsedReading Anchor { get; init; }

    /// <summary>Anchor's reference with version, and #part for a component.</summary>
    public required string AnchorReference { get; init; }

    /// <summary>Event time.</summary>
    public required DateTimeOffset At { get; init; }

    /// <summary>Event time as the anchor's source wrote it.</summary>
    public required string AtText { get; init; }

    /// <summary>Unrounded value, canonical unit; null when withheld or coded.</summary>
    public double? Value { get; init; }

    /// <summary>Published number; null when withheld or coded.</summary>
    public decimal? Published { get; init; }

    /// <summary>Unit; null when withheld or coded.</summary>
    public string? Unit { get; init; }

    /// <summary>Standard uncertainty, k = 1.</summary>
    public double? Uncertainty { get; init; }

    /// <summary>True when a site tolerance took part in the uncertainty.</summary>
    public bool SiteTolerance { get; init; }

    /// <summary>Share of the variance due to transducer offsets shared between inputs.</summary>
    public double SharedOffsetShare { get; init; }

    /// <summary>Code of a coded result.</summary>
    public string? Code { get; init; }

    /// <summary>Flags, ordered.</summary>
    public IReadOnlyList<string> Flags { get; init; } = [];

    /// <summary>Method variant; null for the plain method.</summary>
    public string? Variant { get; init; }

    /// <summary>Roots, and evidence of gates, in the order of the formula.</summary>
    public IReadOnlyList<UsedInput> Inputs { get; init; } = [];

    /// <summary>The person whose sex or age was used; null when none was.</summary>
    public UsedReading? Person { get; init; }

    /// <summary>Intermediate results of a chain, unrounded: key, value, unit.</summary>
    public IReadOnlyList<Intermediate> Intermediates { get; init; } = [];

    /// <summary>True while an input is preliminary.</summary>
    public bool Preliminary { get; init; }

    /// <summary>True when an input's source calls it amended or corrected.</summary>
    public bool InputCorrected { get; init; }

    /// <summary>Withheld code; null when there is a value.</summary>
    public string? Withheld { get; init; }

    /// <summary>What is missing, in words; told only when asked for, never stored.</summary>
    [JsonIgnore]
    public IReadOnlyList<string> Missing { get; init; } = [];

    /// <summary>Candidates looked at and why each was not used; told only when asked for, never stored.</summary>
    [JsonIgnore]
    public IReadOnlyList<Candidate> Considered { get; init; } = [];

    /// <summary>Hash of the policy in force.</summary>
    public string Policy { get; init; } = "";
}

/// <summary>Value of a definition inside a chain.</summary>
public sealed record Intermediate(string Definition, double Value, string Unit);

/// <summary>A reading that pairing looked at and did not use.</summary>
/// <param name="Input">What the definition was looking for.</param>
/// <param name="Reference">Versioned reference of the reading.</param>
/// <param name="Effective">Its time as sent.</param>
/// <param name="Value">Its number as sent; null when refused without one.</param>
/// <param name="Unit">Its unit as sent.</param>
/// <param name="Reason">Why it was not used: a withheld code or a short phrase.</param>
public sealed record Candidate(string Input, string Reference, string Effective, decimal? Value, string? Unit, string Reason);
