using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>
/// One fact about a patient out of one resource version: a quantity in the canonical unit of its kind, a code, or an event.
/// A refused reading keeps its place on the timeline and blocks it; a withdrawn one yields no reading at all.
/// </summary>
public sealed record Reading
{
    /// <summary>Identity, stable over versions.</summary>
    public required ReadingId Id { get; init; }

    /// <summary>meta.versionId as sent, else the first 16 digits of the content digest.</summary>
    public required string Version { get; init; }

    /// <summary>Base URL of the source when known; empty otherwise.</summary>
    public string Base { get; init; } = "";

    /// <summary>What it is.</summary>
    public required Kind Kind { get; init; }

    /// <summary>Canonical unit, or the index of the code; NaN when refused.</summary>
    public double Value { get; init; } = double.NaN;

    /// <summary>The number as sent.</summary>
    public decimal? Given { get; init; }

    /// <summary>The unit as sent (UCUM code), or the code or text of a coded value.</summary>
    public string? GivenUnit { get; init; }

    /// <summary>When it was true of the patient.</summary>
    public required DateTimeOffset At { get; init; }

    /// <summary>The time as sent, repeated in results anchored here.</summary>
    public required string AtText { get; init; }

    /// <summary>Why it cannot be used; null when usable.</summary>
    public string? Refused { get; init; }

    /// <summary>The source calls it preliminary.</summary>
    public bool Preliminary { get; init; }

    /// <summary>The source calls it amended or corrected.</summary>
    public bool Corrected { get; init; }

    /// <summary>Reference of the patient as sent.</summary>
    public required string Patient { get; init; }

    /// <summary>Reference of the encounter, if any.</summary>
    public string? Encounter { get; init; }

    /// <summary>Reference of the specimen, if any.</summary>
    public string? Specimen { get; init; }

    /// <summary>References of the panels and reports it belongs to.</summary>
    public IReadOnlyList<string> Panels { get; init; } = [];

    /// <summary>Reference of the device, or of the device behind a metric.</summary>
    public string? Device { get; init; }

    /// <summary>True when a device streams it, so that only the first in each quarter of an hour calls.</summary>
    public bool Streamed { get; init; }

    /// <summary>Flags that results using it carry.</summary>
    public IReadOnlyList<string> Flags { get; init; } = [];

    /// <summary>True when it has a value.</summary>
    public bool Usable => Refused is null;

    /// <summary>Reference with version, and <c>#part</c> for a component.</summary>
    public string VersionedReference => $"{Id.Resource.Reference}/_history/{Version}" + (Id.Part.Length == 0 ? "" : "#" + Id.Part);
}

/// <summary>Kinds that are events: they end settings in force.</summary>
public static class Events
{
    /// <summary>End of mechanical ventilation or oxygen therapy.</summary>
    public static readonly Kind SupportEnd = Kind.Coded("support-end", "support_end", "end of ventilation or oxygen therapy", Origin.Circumstance, "ended");

    /// <summary>End of an encounter; ends what was set in it.</summary>
    public static readonly Kind EncounterEnd = Kind.Coded("encounter-end", "encounter_end", "end of the encounter", Origin.Circumstance, "ended");

    /// <summary>All of them.</summary>
    public static readonly IReadOnlyList<Kind> All = [SupportEnd, EncounterEnd];
}

/// <summary>What is known of a patient as a person, from the current Patient version.</summary>
/// <param name="Resource">The Patient resource.</param>
/// <param name="Version">Its version.</param>
/// <param name="Sex">Code of <see cref="Kinds.Sex"/>: female, male or unknown.</param>
/// <param name="BirthDate">FHIR date as sent (year, year-month or day); null when absent.</param>
public sealed record Person(ResourceKey Resource, string Version, string Sex, string? BirthDate)
{
    /// <summary>Base URL of the source when known; empty otherwise.</summary>
    public string Base { get; init; } = "";
}
