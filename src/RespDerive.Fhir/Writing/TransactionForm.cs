using Hl7.Fhir.Model;

namespace RespDerive.Fhir.Writing;

/// <summary>The small transaction that delivers one edition.</summary>
internal sealed class TransactionForm(RenderOptions options, Vocabulary words, Edition edition)
{
    private const int Most = 6;

    private bool IsFirst => edition.PreviousVersion is null;

    /// <summary>Reference of the Observation for its Provenance.</summary>
    public string Target(Guid identity) => options.UsePutIds ? $"Observation/{identity}"
        : IsFirst ? FullUrl(identity)
        : $"Observation/{edition.ServerId}";

    public Bundle Of(Observation observation, Provenance provenance, Device? device, IReadOnlyList<Library> first)
    {
        // Without the version we wrote last, an update would overwrite what a person changed.
        if (edition.Revision > 1 && (edition.PreviousVersion is null || (edition.ServerId is null && !options.UsePutIds)))
        {
            throw new ArgumentException("A later edition needs the server's version, and id unless ours, of the one before.");
        }

        var entries = new List<Bundle.EntryComponent> { Observation(observation), Provenance(provenance) };
        if (device is not null)
        {
            entries.Add(Standing(device, device.Identifier[0]));
        }

        entries.AddRange(first.Select(library => Standing(library, library.Identifier[0])));
        return entries.Count <= Most
            ? new Bundle { Type = Bundle.BundleType.Transaction, Entry = entries }
            : throw new ArgumentException($"A transaction has at most {Most} entries.", nameof(first));
    }

    public static string FullUrl(Guid id) => $"urn:uuid:{id}";

    /// <summary>Query by identifier; everything reserved is percent-encoded.</summary>
    public static string Query(string system, string value) => $"identifier={Uri.EscapeDataString(system)}%7C{Uri.EscapeDataString(value)}";

    /// <summary>Full URL of an entry that is known by its identifier.</summary>
    public static string EntryUrl(Identifier identifier) => FullUrl(Timeline.NameBasedUuid.Of(Timeline.NameBasedUuid.Root, identifier.System!, identifier.Value!));

    private Bundle.EntryComponent Observation(Observation observation)
    {
        var identity = observation.Identifier[0].Value!;
        var entry = new Bundle.EntryComponent { FullUrl = $"urn:uuid:{identity}", Resource = observation };
        entry.Request = options.UsePutIds || !IsFirst
            ? new Bundle.RequestComponent
            {
                Method = Bundle.HTTPVerb.PUT,
                Url = $"Observation/{observation.Id}",
                IfMatch = IsFirst ? null : $"W/\"{edition.PreviousVersion}\"",
            }
            : new Bundle.RequestComponent
            {
                Method = Bundle.HTTPVerb.POST,
                Url = "Observation",
                IfNoneExist = Query(words.Result, identity),
            };
        return entry;
    }

    private Bundle.EntryComponent Provenance(Provenance provenance)
    {
        var own = "urn:uuid:" + ((FhirString)provenance.GetExtension(words.ProvenanceId)!.Value!).Value!;
        return new Bundle.EntryComponent
        {
            FullUrl = own,
            Resource = provenance,
            Request = options.UsePutIds
                ? new Bundle.RequestComponent { Method = Bundle.HTTPVerb.PUT, Url = $"Provenance/{provenance.Id}" }
                : new Bundle.RequestComponent { Method = Bundle.HTTPVerb.POST, Url = "Provenance" },
        };
    }

    /// <summary>A resource that is the same for many results: created once, whoever comes first.</summary>
    private Bundle.EntryComponent Standing(DomainResource resource, Identifier identifier)
    {
        var type = resource.TypeName;
        return new Bundle.EntryComponent
        {
            FullUrl = EntryUrl(identifier),
            Resource = resource,
            Request = options.UsePutIds
                ? new Bundle.RequestComponent { Method = Bundle.HTTPVerb.PUT, Url = $"{type}/{resource.Id}" }
                : new Bundle.RequestComponent { Method = Bundle.HTTPVerb.POST, Url = type, IfNoneExist = Query(identifier.System!, identifier.Value!) },
        };
    }
}
