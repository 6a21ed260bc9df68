using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>How readings of one source behave in time.</summary>
public sealed record SourceTiming
{
    /// <summary>How long a setting stays in force without confirmation: 4 h where settings are charted periodically, 24 h where each change is charted.</summary>
    public TimeSpan SettingMaxAge { get; init; } = TimeSpan.FromHours(4);
}

/// <summary>The site's settings that change numbers, from one moment on. In force by event time, also when recomputed late.</summary>
public sealed record Policy
{
    /// <summary>In force for anchors at or after this time; null = always.</summary>
    public DateTimeOffset? ValidFrom { get; init; }

    /// <summary>Station pressure, mm[Hg]; excludes <see cref="AltitudeMetres"/>.</summary>
    public double? PressureMmHg { get; init; }

    /// <summary>Altitude in metres, turned into pressure by the standard atmosphere.</summary>
    public double? AltitudeMetres { get; init; }

    /// <summary>Respiratory exchange ratio where none is measured.</summary>
    public double RespiratoryQuotient { get; init; } = 0.8;

    /// <summary>Tolerances of the site in place of the generic ones, by kind key.</summary>
    public IReadOnlyDictionary<string, Tolerance> Tolerances { get; init; } = new Dictionary<string, Tolerance>();

    /// <summary>Definitions that run, by key; null = those of the catalogue that run by default.</summary>
    public IReadOnlyList<string>? Definitions { get; init; }

    /// <summary>True when the definition runs: those that are for hands only never do, lesser variants and bands only where they are named.</summary>
    public bool Runs(Definition definition) =>
        !definition.ByHandOnly && (Definitions is { } run ? run.Contains(definition.Key, StringComparer.Ordinal) : definition.OnByDefault);

    /// <summary>Publish mechanics from set PEEP (flagged) when total PEEP is unknown.</summary>
    public bool AcceptSetPeep { get; init; } = true;

    /// <summary>Timing by source name; a source not named has the defaults.</summary>
    public IReadOnlyDictionary<string, SourceTiming> Sources
    {
        get;
        init => (field, LongestSetting) = (value, value.Values.Append(Default).Max(timing => timing.SettingMaxAge));
    } = new Dictionary<string, SourceTiming>();

    /// <summary>Longest time a setting of any source stays in force.</summary>
    public TimeSpan LongestSetting { get; private init; } = Default.SettingMaxAge;

    /// <summary>Hash of the canonical policy document, lower-case hex; names it in every Provenance.</summary>
    public string Hash { get; init; } = "";

    /// <summary>Timing of a source.</summary>
    public SourceTiming TimingOf(string source) => Sources.TryGetValue(source, out var timing) ? timing : Default;

    private static readonly SourceTiming Default = new();
}

/// <summary>The policies of a site in the order of their validity.</summary>
public sealed class PolicyBook
{
    private readonly Policy[] _policies;

    /// <summary>Takes the policies; one without <see cref="Policy.ValidFrom"/> is in force before all others.</summary>
    public PolicyBook(params IEnumerable<Policy> policies)
    {
        _policies = [.. policies.OrderBy(policy => policy.ValidFrom ?? DateTimeOffset.MinValue)];
        if (_policies.Length == 0)
        {
            _policies = [new Policy()];
        }
    }

    /// <summary>All policies, oldest first.</summary>
    public IReadOnlyList<Policy> All => _policies;

    /// <summary>Longest time a setting stays in force under any of the policies.</summary>
    public TimeSpan LongestSetting => _policies.Max(policy => policy.LongestSetting);

    /// <summary>The policy in force at an event time; before the first one, the first.</summary>
    public Policy At(DateTimeOffset time) => _policies.LastOrDefault(policy => (policy.ValidFrom ?? DateTimeOffset.MinValue) <= time) ?? _policies[0];
}
