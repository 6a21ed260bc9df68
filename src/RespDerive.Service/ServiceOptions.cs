namespace RespDerive.Service;

/// <summary>Configuration of the service, section <c>RespDerive</c>. Every key has a default but the source's address.</summary>
public sealed class ServiceOptions
{
    /// <summary>Name of the site; part of every result's identity, so it must never change.</summary>
    public string Site { get; set; } = "site";

    /// <summary>The system of record that is read.</summary>
    public SourceOptions Source { get; set; } = new();

    /// <summary>How resources come in.</summary>
    public IntakeOptions Intake { get; set; } = new();

    /// <summary>How results go out.</summary>
    public DeliveryOptions Delivery { get; set; } = new();

    /// <summary>The SQLite file.</summary>
    public string Store { get; set; } = "respderive.db";

    /// <summary>The policy file (JSON); without one the defaults hold, and barometric pressure is unknown.</summary>
    public string? Policy { get; set; }

    /// <summary>Code map of the site (CSV: system,code,unit,key).</summary>
    public string? CodeMap { get; set; }

    /// <summary>Modes of the site (CSV).</summary>
    public string? ModeMap { get; set; }

    /// <summary>Use the SNOMED CT map; turn it off where no SNOMED licence is held.</summary>
    public bool UseSnomed { get; set; } = true;

    /// <summary>IANA name of the zone of times sent without one; such readings are refused when it is not set.</summary>
    public string? TimeZone { get; set; }

    /// <summary>Read 0.2 to 1.0 sent with % as a fraction of oxygen, flagged, instead of refusing it.</summary>
    public bool RepairOxygenPercent { get; set; }
}

/// <summary>The FHIR server that is read.</summary>
public sealed class SourceOptions
{
    /// <summary>Name of the system of record; part of every result's identity.</summary>
    public string Name { get; set; } = "ehr";

    /// <summary>Service base, such as https://ehr.example/fhir.</summary>
    public Uri? Address { get; set; }

    /// <summary>Value of the Authorization header; keep it in the environment, not in a file.</summary>
    public string? Authorization { get; set; }
}

/// <summary>How resources come in.</summary>
public sealed class IntakeOptions
{
    /// <summary>Searches that say what is read; subscribed to, polled, and queried again after an empty notification.</summary>
    public IList<string> Criteria { get; } = [];

    /// <summary>What is used when <see cref="Criteria"/> is empty.</summary>
    public static IReadOnlyList<string> DefaultCriteria { get; } =
        ["Observation?", "Patient?", "Specimen?", "Encounter?", "DeviceMetric?", "DiagnosticReport?", "Procedure?"];

    /// <summary>Create and keep rest-hook Subscriptions at the source; they notify <see cref="Endpoint"/>.</summary>
    public bool Subscribe { get; set; }

    /// <summary>Our address as the source sees it, for Subscriptions: https://…/notify.</summary>
    public Uri? Endpoint { get; set; }

    /// <summary>Ask for the resource in the notification; without, notifications are empty and the criteria are queried.</summary>
    public bool Payload { get; set; } = true;

    /// <summary>Value of the Authorization header that notifications must carry; null accepts any sender.</summary>
    public string? NotificationAuthorization { get; set; }

    /// <summary>Time between polls of each criterion; zero turns polling off.</summary>
    public TimeSpan PollEvery { get; set; } = TimeSpan.FromMinutes(1);

    /// <summary>How far each poll reaches back before the last seen change.</summary>
    public TimeSpan Overlap { get; set; } = TimeSpan.FromMinutes(2);

    /// <summary>Resources asked for in one page.</summary>
    public int PageSize { get; set; } = 200;

    /// <summary>How far the first poll reaches back, as context.</summary>
    public TimeSpan FirstLookBack { get; set; } = TimeSpan.FromHours(48);

    /// <summary>Largest notification, in bytes.</summary>
    public long LargestNotification { get; set; } = 4_000_000;

    /// <summary>The criteria in force.</summary>
    public IReadOnlyList<string> Searches => Criteria.Count > 0 ? [.. Criteria] : DefaultCriteria;
}

/// <summary>How results go out.</summary>
public sealed class DeliveryOptions
{
    /// <summary>Off: compute, store and show, post nothing.</summary>
    public bool On { get; set; }

    /// <summary>Service base written to; null = the source.</summary>
    public Uri? Address { get; set; }

    /// <summary>Value of the Authorization header when another server is written to.</summary>
    public string? Authorization { get; set; }

    /// <summary>Publish also anchors before the first start (they are context otherwise).</summary>
    public bool PublishHistory { get; set; }

    /// <summary>Write under our own ids (PUT).</summary>
    public bool OwnIds { get; set; }

    /// <summary>Base of our code systems and identifiers.</summary>
    public string Canonical { get; set; } = "https://respderive.example/fhir";

    /// <summary>Organisation on whose behalf we act, as a reference at the target.</summary>
    public string? Organization { get; set; }

    /// <summary>Leave Observation.device out, where a national profile reserves it.</summary>
    public bool OmitDevice { get; set; }

    /// <summary>Add the standard category procedure.</summary>
    public bool ProcedureCategory { get; set; }

    /// <summary>Transactions under way at once.</summary>
    public int Parallel { get; set; } = 4;

    /// <summary>Longest wait between tries.</summary>
    public TimeSpan LongestBackOff { get; set; } = TimeSpan.FromMinutes(5);
}
