namespace RespDerive.Fhir;

/// <summary>Facts, or the word that says why there are none.</summary>
/// <param name="Facts">The facts; null when refused.</param>
/// <param name="Refused">One of <see cref="Refusals"/>; null when there are facts.</param>
public sealed record FactResult(ResourceFacts? Facts, string? Refused);

/// <summary>Why a body, or a part of one, gives nothing. Closed: safe as labels of counters.</summary>
public static class Refusals
{
    /// <summary>Not JSON text in UTF-8.</summary>
    public const string NotJson = "not-json";

    /// <summary>JSON, but not a FHIR resource.</summary>
    public const string NotFhir = "not-fhir";

    /// <summary>A type of resource we have no use for.</summary>
    public const string TypeNotRead = "type-not-read";

    /// <summary>Neither id nor address, so that it could not be followed.</summary>
    public const string NoIdentity = "no-identity";

    /// <summary>None of its codes is mapped.</summary>
    public const string CodeNotMapped = "code-not-mapped";

    /// <summary>Its code is known, and known not to be an input: a venous gas, a dynamic plateau, a corrected gas…</summary>
    public const string NotUsed = "not-used";

    /// <summary>Its code alone does not say what it is: an oxygen saturation without category or specimen.</summary>
    public const string CodeAmbiguous = "code-ambiguous";

    /// <summary>An event without the time at which it happened.</summary>
    public const string EventWithoutTime = "event-without-time";
}
