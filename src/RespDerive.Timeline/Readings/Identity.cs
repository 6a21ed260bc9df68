namespace RespDerive.Timeline;

/// <summary>A resource of one source, whatever its version.</summary>
/// <param name="Source">System of record, never the channel; default "ehr".</param>
/// <param name="Type">Resource type.</param>
/// <param name="Id">Logical id within the source, or the full URL of a Bundle entry without one.</param>
public sealed record ResourceKey(string Source, string Type, string Id) : IComparable<ResourceKey>
{
    /// <summary>Relative reference, <c>Type/id</c>; the id itself when it is a URL or URN.</summary>
    public string Reference => Id.Contains(':', StringComparison.Ordinal) ? Id : $"{Type}/{Id}";

    /// <inheritdoc/>
    public int CompareTo(ResourceKey? other) => other is null ? 1
        : string.CompareOrdinal(Source, other.Source) is var bySource and not 0 ? bySource
        : string.CompareOrdinal(Type, other.Type) is var byType and not 0 ? byType
        : string.CompareOrdinal(Id, other.Id);
}

/// <summary>Identity of a reading: a resource and the part of it.</summary>
/// <param name="Resource">The resource.</param>
/// <param name="Part">Empty for the resource's own value, else the component's code, with <c>~2</c>, <c>~3</c>… when it repeats.</param>
public sealed record ReadingId(ResourceKey Resource, string Part) : IComparable<ReadingId>
{
    /// <inheritdoc/>
    public int CompareTo(ReadingId? other) => other is null ? 1
        : Resource.CompareTo(other.Resource) is var byResource and not 0 ? byResource
        : string.CompareOrdinal(Part, other.Part);
}

/// <summary>
/// Place of one resource version in the total order of versions, which does not depend on arrival:
/// (meta.lastUpdated, numeric versionId, content digest), a missing part counting as least.
/// </summary>
/// <param name="LastUpdated">meta.lastUpdated.</param>
/// <param name="Number">meta.versionId when it is a number.</param>
/// <param name="Digest">SHA-256 of the canonical content, lower-case hex.</param>
public sealed record VersionOrder(DateTimeOffset? LastUpdated, long? Number, string Digest) : IComparable<VersionOrder>
{
    /// <summary>True when only the content orders it, so that arrival decides between different contents.</summary>
    public bool IsUnordered => LastUpdated is null && Number is null;

    /// <inheritdoc/>
    public int CompareTo(VersionOrder? other) => other is null ? 1
        : Nullable.Compare(LastUpdated, other.LastUpdated) is var byTime and not 0 ? byTime
        : Nullable.Compare(Number, other.Number) is var byNumber and not 0 ? byNumber
        : string.CompareOrdinal(Digest, other.Digest);
}
