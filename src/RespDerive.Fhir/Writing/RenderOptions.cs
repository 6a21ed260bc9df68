namespace RespDerive.Fhir.Writing;

/// <summary>What the site decides about the form of what is written; nothing here changes a number.</summary>
public sealed record RenderOptions
{
    /// <summary>Name of the site, as in the identities of its results.</summary>
    public required string Site { get; init; }

    /// <summary>Version of this software, named by the Device.</summary>
    public required string SoftwareVersion { get; init; }

    /// <summary>Base of our own code systems, identifier systems, extensions and canonicals; no trailing slash.</summary>
    public string Base { get; init; } = "https://respderive.example/fhir";

    /// <summary>Reference of the organisation on whose behalf the software acts; null when none is configured.</summary>
    public string? Organization { get; init; }

    /// <summary>Leave <c>Observation.device</c> out, where a national profile reserves it for the measuring device. Provenance names ours all the same.</summary>
    public bool OmitDevice { get; init; }

    /// <summary>Add the standard category <c>procedure</c> to our own.</summary>
    public bool ProcedureCategory { get; init; }

    /// <summary>
    /// True when the server written to is the one that holds the inputs: references are literal and version-specific.
    /// False: references carry the identifier alone, since the same id may mean another patient there.
    /// </summary>
    public bool TargetHoldsInputs { get; init; } = true;

    /// <summary>Write under our own ids (PUT) instead of conditional create and update by the server's id.</summary>
    public bool UsePutIds { get; init; }

    /// <summary>Server id of our Device, once known; null lets a transaction create it.</summary>
    public string? DeviceId { get; init; }
}
