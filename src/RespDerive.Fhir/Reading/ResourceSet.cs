namespace RespDerive.Fhir;

/// <summary>The winning versions that a resource may refer to: a file's, or the store's of one patient.</summary>
public interface IResourceSet
{
    /// <summary>The winning version of a resource by its reference; null when it is not known.</summary>
    ResourceFacts? Find(string reference);

    /// <summary>Panels and reports that name the resource as a member or result.</summary>
    IReadOnlyList<ResourceFacts> PanelsOf(string reference);
}

/// <summary>The winning versions of one source, in memory.</summary>
public sealed class InMemoryResourceSet : IResourceSet
{
    private readonly Dictionary<string, ResourceFacts> _byReference = new(StringComparer.Ordinal);
    private readonly Dictionary<string, string> _byIdentifier = new(StringComparer.Ordinal);
    private readonly Dictionary<string, SortedSet<string>> _panels = new(StringComparer.Ordinal);
    private readonly SortedSet<string> _bases = new(StringComparer.Ordinal);

    /// <summary>Every winning version, in the order in which the resources first came.</summary>
    public IEnumerable<ResourceFacts> All => _byReference.Values;

    /// <summary>Bases seen; more than one means that equal ids may be different resources.</summary>
    public IReadOnlyCollection<string> Bases => _bases;

    /// <summary>Takes a version; true when it is now the winning one.</summary>
    public bool Add(ResourceFacts facts)
    {
        var reference = facts.Key.Reference;
        if (_byReference.TryGetValue(reference, out var before))
        {
            if (!facts.Supersedes(before))
            {
                return false;
            }

            foreach (var member in Members(before))
            {
                _panels[member].Remove(reference);
            }
        }

        _byReference[reference] = facts;
        foreach (var identifier in facts.Identifiers)
        {
            _byIdentifier.TryAdd(identifier.Reference, reference);
        }

        foreach (var member in Members(facts))
        {
            (_panels.TryGetValue(member, out var panels) ? panels : _panels[member] = new(StringComparer.Ordinal)).Add(reference);
        }

        if (facts.Base.Length > 0)
        {
            _bases.Add(facts.Base);
        }

        return true;
    }

    /// <inheritdoc/>
    public ResourceFacts? Find(string reference) =>
        _byReference.GetValueOrDefault(reference)
        ?? (_byIdentifier.TryGetValue(reference, out var named) ? _byReference.GetValueOrDefault(named) : null);

    /// <inheritdoc/>
    public IReadOnlyList<ResourceFacts> PanelsOf(string reference) =>
        _panels.TryGetValue(reference, out var panels) ? [.. panels.Select(panel => _byReference[panel])] : [];

    private static IEnumerable<string> Members(ResourceFacts facts) => facts.Content switch
    {
        ObservationFacts panel => panel.Members,
        ReportFacts report => report.Results,
        _ => [],
    };
}
