using Hl7.Fhir.Model;
using Microsoft.Extensions.Options;
using RespDerive.Fhir.Server;
using RespDerive.Fhir.Writing;
using RespDerive.Storage;
using RespDerive.Timeline;
using Outcome = RespDerive.Timeline.Outcome;

namespace RespDerive.Service.Delivery;

/// <summary>
/// Delivers one edition idempotently. What people changed at the server is never overwritten, and nothing whose outcome is unknown
/// is sent again before looking what the server holds.
/// </summary>
internal sealed class Postman(Target target, Site site, Store store, IOptions<ServiceOptions> options)
{
    private const string Foreign = "foreign-edit";
    private readonly HashSet<string> _libraries = new(StringComparer.Ordinal);
    private readonly Lock _lock = new();

    private FhirServer Server => target.Server;

    /// <summary>True when our Device is at the server, so that results can point at it.</summary>
    public Task<bool> ReadyAsync(CancellationToken cancel) => target.ReadyAsync(cancel);

    public async Task<Became> DeliverAsync(Storage.Delivery delivery, CancellationToken cancel)
    {
        if (delivery.Current is { } current && !options.Value.Delivery.PublishHistory && current.At < StartOf(store))
        {
            return new Became.Nothing();
        }

        // A failed try may have reached the server all the same.
        if (delivery.Tries > 0)
        {
            if (await LookAsync(delivery, cancel) is { } seen)
            {
                return seen;
            }
        }

        if (EditionRules.Of(delivery) is not var (outcome, edition))
        {
            return new Became.Nothing();
        }

        var renderer = target.Renderer;
        var answer = await SendAsync(renderer, outcome, edition, cancel);
        return answer switch
        {
            ServerAnswer.Delivered { Existed: false } there when edition.PreviousVersion is null && !await IsOnlyOneAsync(delivery.Identity, there.Id, cancel) => new Became.Again(null),
            ServerAnswer.Delivered { Existed: false } there => Delivered(outcome, edition, there),
            ServerAnswer.Delivered or ServerAnswer.Conflict or ServerAnswer.Unknown => await LookAsync(delivery, cancel) ?? new Became.Again(null),
            ServerAnswer.Gone => new Became.Parked("deleted-at-server", "The result was deleted at the server."),
            ServerAnswer.Retry retry => new Became.Again(retry.After),
            ServerAnswer.Parked parked => new Became.Parked(parked.Code, parked.Text),
            _ => new Became.Again(null),
        };
    }

    /// <summary>Time of the first start: what happened to the patient before is context.</summary>
    private static DateTimeOffset StartOf(Store store) =>
        DateTimeOffset.Parse(store.Cursor(FirstStart.Name)!, System.Globalization.CultureInfo.InvariantCulture);

    private async Task<ServerAnswer> SendAsync(ResultRenderer renderer, Outcome outcome, Edition edition, CancellationToken cancel)
    {
        var libraries = LibrariesFor(renderer, outcome);
        var bundle = renderer.Transaction(outcome, edition, [.. libraries.Select(entry => entry.Library)]);
        var answer = await Server.TransactAsync(bundle, cancel);
        if (answer.Whole is ServerAnswer.Delivered)
        {
            lock (_lock)
            {
                _libraries.UnionWith(libraries.Select(entry => entry.Key));
            }

            // Nothing was written, since the result is there already; what came along would testify to an edition that never was.
            if (answer.Entries is [ServerAnswer.Delivered { Existed: true }, ServerAnswer.Delivered surplus, ..])
            {
                await Server.DeleteAsync("Provenance", surplus.Id, cancel);
            }

            return answer.Entries[0];
        }

        return answer.Whole;
    }

    private (string Key, Library Library)[] LibrariesFor(ResultRenderer renderer, Outcome outcome)
    {
        lock (_lock)
        {
            var definition = $"{outcome.Definition}|{outcome.Revision}";
            var policy = site.Evaluator.Policies.All.FirstOrDefault(one => one.Hash == outcome.Policy);
            return
            [
                .. _libraries.Contains(definition) ? [] : new[] { (definition, renderer.Definition(site.Catalogue.Find(outcome.Definition, outcome.Revision)!)) },
                .. policy is null || _libraries.Contains(policy.Hash) ? [] : new[] { (policy.Hash, renderer.Policy(policy)) },
            ];
        }
    }

    /// <summary>Looks what the server holds of a result. Null when it holds nothing new: then the edition may be sent.</summary>
    private async Task<Became?> LookAsync(Storage.Delivery delivery, CancellationToken cancel)
    {
        string id;
        if (delivery.ServerId is { } known)
        {
            id = known;
        }
        else
        {
            var found = await FindAsync(delivery.Identity, cancel);
            if (found is null)
            {
                return new Became.Again(null);
            }

            if (found.Count == 0)
            {
                return null;
            }

            id = found[0];
        }

        var answer = await Server.ReadAsync($"Observation/{id}", cancel);
        if (!answer.Found)
        {
            return answer.Transient ? new Became.Again(answer.After)
                : answer.Status is 404 or 410 ? new Became.Parked("deleted-at-server", "The result was deleted at the server.")
                : new Became.Parked($"http-{answer.Status}", "The result cannot be read at the server.");
        }

        var judged = Judge(delivery, id, answer);
        return judged is Became.Delivered there && !await EvidencedAsync(there.Outcome, EditionRules.Of(delivery, existed: true)!.Value.Edition, id, cancel)
            ? new Became.Again(null)
            : judged;
    }

    /// <summary>True when the Provenance of an edition is at the server; sent again when a transaction was carried out by half.</summary>
    private async Task<bool> EvidencedAsync(Outcome outcome, Edition edition, string id, CancellationToken cancel)
    {
        var renderer = target.Renderer;
        try
        {
            if (await Server.FindProvenanceAsync($"Observation/{id}", renderer.Words.ProvenanceId, renderer.ProvenanceId(outcome, edition), cancel) is not null)
            {
                return true;
            }

            var provenance = renderer.Provenance(outcome, edition, $"Observation/{id}");
            return await (provenance.Id is null ? Server.CreateAsync(provenance, null, cancel) : Server.UpdateAsync(provenance, null, cancel)) is ServerAnswer.Delivered;
        }
        catch (SearchFailedException)
        {
            return false;
        }
    }

    /// <summary>False when a conditional create raced and another result with our identifier stands; every other one is retired.</summary>
    private async Task<bool> IsOnlyOneAsync(Guid identity, string id, CancellationToken cancel) =>
        options.Value.Delivery.OwnIds || await FindAsync(identity, cancel) is not { Count: > 0 } found || found[0] == id;

    /// <summary>The ids of the results with our identifier, duplicates retired; null when the server could not be asked.</summary>
    private async Task<IReadOnlyList<string>?> FindAsync(Guid identity, CancellationToken cancel)
    {
        try
        {
            var found = await Server.FindAsync("Observation", target.Renderer.Words.Result, identity.ToString(), cancel);
            var ids = found.Select(one => one.Id).Order(StringComparer.Ordinal).ToArray();
            foreach (var surplus in ids.Skip(1))
            {
                await target.RetireAsync(surplus, cancel);
            }

            return ids;
        }
        catch (SearchFailedException)
        {
            return null;
        }
    }

    private Became? Judge(Storage.Delivery delivery, string id, ReadAnswer answer)
    {
        var held = HeldResult.Read(answer.Body);
        var version = held?.Version ?? answer.ETag;
        if (held is null || version is null)
        {
            return new Became.Parked(Foreign, "What the server holds under our identifier is no Observation.");
        }

        if (delivery.ServerVersion == version)
        {
            return null;
        }

        if (EditionRules.Of(delivery, existed: true) is var (outcome, edition)
            && ContentDigest.Of(target.Renderer.Observation(outcome, edition)) == held.Digest)
        {
            return Delivered(outcome, edition, new ServerAnswer.Delivered(id, version));
        }

        // Never confirmed by the server, yet of our making: an earlier state of ours, such as after the store was lost.
        if (delivery.ServerId is null && held.OfThisSoftware(target.Renderer.Words))
        {
            return new Became.Adopted(id, version, held.Status is "final" or "amended" or "corrected");
        }

        return held.Status == "entered-in-error" ? new Became.Withdrawn()
            : new Became.Parked(Foreign, "The result was changed at the server by somebody else.");
    }

    private static Became.Delivered Delivered(Outcome outcome, Edition edition, ServerAnswer.Delivered there) =>
        new(outcome, there.Id, there.Version, edition.Status);
}
