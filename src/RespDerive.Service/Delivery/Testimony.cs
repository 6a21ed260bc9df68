using Hl7.Fhir.Model;
using Hl7.Fhir.Serialization;
using RespDerive.Fhir.Server;
using RespDerive.Fhir.Writing;
using RespDerive.Storage;

namespace RespDerive.Service.Delivery;

/// <summary>Exactly one Provenance for each edition at the server, also where transactions are carried out by half.</summary>
internal sealed class Testimony(Target target)
{
    private FhirServer Server => target.Server;

    /// <summary>Our Provenances of a result; or why they could not be had.</summary>
    public async Task<(IReadOnlyList<OwnProvenance> Ours, Became? Hindrance)> OfAsync(string id, CancellationToken cancel)
    {
        try
        {
            return (await Server.OwnProvenancesAsync($"Observation/{id}", target.Renderer.Words, cancel), null);
        }
        catch (SearchFailedException failed)
        {
            return ([], Became.Of(failed.Answer));
        }
    }

    /// <summary>The edition attempted is at the server: sees to its Provenance. Null when that is there, once.</summary>
    public async Task<Became?> CompleteAsync(Storage.Delivery delivery, Attempt attempt, string id, IReadOnlyList<OwnProvenance> ours, CancellationToken cancel)
    {
        var (provenance, own) = Read(attempt);
        var there = ours.Where(one => one.OwnId == own).ToArray();
        foreach (var surplus in there.Skip(1))
        {
            await Server.DeleteAsync("Provenance", surplus.Id, cancel);
        }

        if (there.Length > 0)
        {
            return null;
        }

        if (provenance.Id is null && delivery.Tries < Recovery.Patience)
        {
            return new Became.Again(null);
        }

        provenance.Target[0].Reference = $"Observation/{id}";
        var answer = provenance.Id is null ? await Server.CreateAsync(provenance, null, cancel) : await Server.UpdateAsync(provenance, null, cancel);
        return answer is ServerAnswer.Delivered ? null : Became.Of(answer);
    }

    /// <summary>The edition attempted never came to be: takes back what testifies to it.</summary>
    public async System.Threading.Tasks.Task TakeBackAsync(Attempt attempt, IReadOnlyList<OwnProvenance> ours, CancellationToken cancel)
    {
        var (_, own) = Read(attempt);
        foreach (var stray in ours.Where(one => one.OwnId == own))
        {
            await Server.DeleteAsync("Provenance", stray.Id, cancel);
        }
    }

    private (Provenance Provenance, string? OwnId) Read(Attempt attempt)
    {
        var provenance = (Provenance)FhirJsonDeserializer.RECOVERABLE.DeserializeResource(System.Text.Encoding.UTF8.GetString(attempt.Evidence));
        return (provenance, (provenance.GetExtension(target.Renderer.Words.ProvenanceId)?.Value as FhirString)?.Value);
    }
}
