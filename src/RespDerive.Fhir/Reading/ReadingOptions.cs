namespace RespDerive.Fhir;

/// <summary>What the site says about one source.</summary>
public sealed record SourceReading
{
    /// <summary>Zone of times sent without one; null: such readings are refused.</summary>
    public TimeZoneInfo? Zone { get; init; }

    /// <summary>Whether readings other than laboratory ones are streamed; null: those with a device are.</summary>
    public bool? Streamed { get; init; }
}

/// <summary>The site's settings for reading.</summary>
public sealed record ReadingOptions
{
    /// <summary>For sources not named in <see cref="Sources"/>.</summary>
    public SourceReading Default { get; init; } = new();

    /// <summary>By name of the source.</summary>
    public IReadOnlyDictionary<string, SourceReading> Sources { get; init; } = new Dictionary<string, SourceReading>();

    /// <summary>How far an event may lie after the time at which its version was stored.</summary>
    public TimeSpan AllowedFuture { get; init; } = TimeSpan.FromMinutes(2);

    /// <summary>Read 0.2 to 1.0 sent as a percentage of oxygen as a fraction, flagged, instead of refusing it.</summary>
    public bool Fio2PercentRepair { get; init; }

    /// <summary>Modes and other coded values.</summary>
    public CodedMap Values { get; init; } = new();

    /// <summary>Identifier system of our own results; they are recognised by it and never read.</summary>
    public string? ResultIdentifierSystem { get; init; }

    /// <summary>Settings of a source.</summary>
    public SourceReading Of(string source) => Sources.GetValueOrDefault(source, Default);
}
