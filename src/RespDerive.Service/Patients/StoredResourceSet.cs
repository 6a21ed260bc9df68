using RespDerive.Fhir;
using RespDerive.Storage;

namespace RespDerive.Service.Patients;

/// <summary>The resources around a patient, from the store's snapshot of this turn; each is parsed once.</summary>
/// <param name="history">The snapshot.</param>
/// <param name="source">Name of the system of record.</param>
/// <param name="sourceBase">Its base URL.</param>
internal sealed class StoredResourceSet(PatientHistory history, string source, string sourceBase) : IResourceSet
{
    private readonly Dictionary<string, (ResourceFacts? Facts, bool Gone)> _seen = new(StringComparer.Ordinal);

    /// <inheritdoc/>
    public ResourceFacts? Find(string reference) => Look(reference).Facts;

    /// <inheritdoc/>
    public IReadOnlyList<ResourceFacts> PanelsOf(string reference) =>
        [.. history.PanelsOf(source, reference).Select(FactsOf).OfType<ResourceFacts>()];

    /// <summary>True when the source no longer has the resource, so that waiting for it is vain.</summary>
    public bool IsGone(string reference) => Look(reference).Gone;

    /// <summary>Facts of a stored resource, the same as when it came; null when it has none.</summary>
    public ResourceFacts? FactsOf(ResourceBody body)
    {
        if (body.Gone)
        {
            return null;
        }

        // A resource of another server, or without an id, has its address as its key.
        var (address, own) = body.Key.Id.Contains(':', StringComparison.Ordinal) ? (body.Key.Id, sourceBase) : ($"{body.Base}/{body.Key.Reference}", body.Base);
        return FactReader.Read(body.Body, body.Key.Source, own, address, body.Arrived, body.Links).Facts is { } facts ? facts with { Key = body.Key } : null;
    }

    private (ResourceFacts? Facts, bool Gone) Look(string reference)
    {
        if (!_seen.TryGetValue(reference, out var found))
        {
            var body = history.Find(source, reference);
            found = (body is null ? null : FactsOf(body), body?.Gone == true);
            _seen[reference] = found;
        }

        return found;
    }
}
