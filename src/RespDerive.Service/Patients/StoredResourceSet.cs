using RespDerive.Fhir;
using RespDerive.Storage;

namespace RespDerive.Service.Patients;

/// <summary>The resources around a patient, from the store's snapshot of this turn; each is parsed once.</summary>
internal sealed class StoredResourceSet(PatientHistory history, string source) : IResourceSet
{
    private readonly Dictionary<string, (ResourceFacts? Facts, bool Gone)> _seen = new(StringComparer.Ordinal);

    /// <inheritdoc/>
    public ResourceFacts? Find(string reference) => Look(reference).Facts;

    /// <inheritdoc/>
    public IReadOnlyList<ResourceFacts> PanelsOf(string reference) =>
        [.. history.PanelsOf(source, reference).Select(FactsOf).OfType<ResourceFacts>()];

    /// <summary>True when the source no longer has the resource, so that waiting for it is vain.</summary>
    public bool IsGone(string reference) => Look(reference).Gone;

    /// <summary>Facts of a stored resource; null when it has none.</summary>
    public static ResourceFacts? FactsOf(ResourceBody body) =>
        body.Gone ? null : FactReader.Read(body.Body, body.Key.Source, body.Base, $"{body.Base}/{body.Key.Reference}", body.Arrived).Facts is { } facts
            ? facts with { Key = body.Key }
            : null;

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
