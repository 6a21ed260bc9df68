using RespDerive.Timeline;

namespace RespDerive.Storage;

/// <summary>One resource version that has come in.</summary>
public sealed record Arrival
{
    /// <summary>The resource.</summary>
    public required ResourceKey Key { get; init; }

    /// <summary>Base URL of the source when known; empty otherwise.</summary>
    public string Base { get; init; } = "";

    /// <summary>meta.versionId as sent, else the first digits of the digest.</summary>
    public required string Version { get; init; }

    /// <summary>Place among the versions of the resource; also tells a repeat: all three parts equal.</summary>
    public required VersionOrder Order { get; init; }

    /// <summary>Reference of the patient within the source; null for resources of no patient (Device, DeviceMetric).</summary>
    public string? Patient { get; init; }

    /// <summary>The resource as bytes; empty when gone.</summary>
    public ReadOnlyMemory<byte> Body { get; init; }

    /// <summary>Arrival time.</summary>
    public required DateTimeOffset Arrived { get; init; }

    /// <summary>The server has withdrawn the resource; see <see cref="GoneAfter"/> for its order.</summary>
    public bool Gone { get; init; }

    /// <summary>
    /// References, relative and without version, to resources that decide how this one is read (specimen, device,
    /// encounter, members of a panel). The subject is not among them: a new Patient version does not change readings.
    /// </summary>
    public IReadOnlyList<string> References { get; init; } = [];

    /// <summary>Other names by which resources refer to this one: <c>identifier:system|value</c>.</summary>
    public IReadOnlyList<string> Names { get; init; } = [];

    /// <summary>References that URNs in the body stand for, where a Bundle brought it.</summary>
    public IReadOnlyDictionary<string, string> Links { get; init; } = new Dictionary<string, string>();

    /// <summary>The order of a withdrawal seen while the given version was the newest known: after it, before any with a later time or number.</summary>
    public static VersionOrder GoneAfter(VersionOrder known) => Following(known, "-gone");

    /// <summary>The order of the same version read again after its withdrawal had been journalled; see <see cref="GoneAfter"/>.</summary>
    public static VersionOrder SeenAfter(VersionOrder gone) => Following(gone, "-seen");

    // a longer text sorts after its own beginning
    private static VersionOrder Following(VersionOrder known, string what)
    {
        ArgumentNullException.ThrowIfNull(known);
        return known with { Digest = known.Digest + what };
    }
}

/// <summary>What became of an arrival.</summary>
/// <param name="New">False when this version was there already; nothing was changed then.</param>
/// <param name="Won">True when it is now the winning version of its resource.</param>
/// <param name="Patients">Numbers of the patients to wake.</param>
/// <param name="Withdrawn">True when the winning version is a withdrawal.</param>
public sealed record Appended(bool New, bool Won, IReadOnlyList<long> Patients, bool Withdrawn = false);

/// <summary>A poll position that moves in the same transaction as what was read up to it.</summary>
public sealed record Cursor(string Name, string Value);

/// <summary>The winning version of a resource.</summary>
public sealed record ResourceBody
{
    /// <summary>The resource.</summary>
    public required ResourceKey Key { get; init; }

    /// <summary>Base URL of the source; empty when unknown.</summary>
    public required string Base { get; init; }

    /// <summary>Its version.</summary>
    public required string Version { get; init; }

    /// <summary>Place among the versions of the resource.</summary>
    public required VersionOrder Order { get; init; }

    /// <summary>Reference of its patient within the source; null for a resource of no patient.</summary>
    public string? Patient { get; init; }

    /// <summary>The resource as bytes; empty when gone.</summary>
    public required ReadOnlyMemory<byte> Body { get; init; }

    /// <summary>Arrival time of this version.</summary>
    public required DateTimeOffset Arrived { get; init; }

    /// <summary>The server has withdrawn the resource.</summary>
    public bool Gone { get; init; }

    /// <summary>References that URNs in the body stand for.</summary>
    public IReadOnlyDictionary<string, string> Links { get; init; } = new Dictionary<string, string>();
}
