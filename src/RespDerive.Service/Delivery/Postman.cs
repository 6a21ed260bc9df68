using Hl7.Fhir.Model;
using Microsoft.Extensions.Options;
using RespDerive.Fhir.Server;
using RespDerive.Fhir.Writing;
using RespDerive.Storage;
using RespDerive.Timeline;
using Outcome = RespDerive.Timeline.Outcome;

namespace RespDerive.Service.Delivery;

/// <summary>
/// Delivers one edition idempotently. What is about to be sent is written down first, so that after a lost answer or a crash we
/// look what the server holds before anything else is sent. What people changed at the server is never overwritten.
/// </summary>
internal sealed class Postman(Target target, Site site, Store store, Recovery recovery, Copies copies, IOptions<ServiceOptions> options)
{
    private readonly HashSet<string> _libraries = new(StringComparer.Ordinal);
    private readonly Lock _lock = new();

    private FhirServer Server => target.Server;

    public async Task<Became> DeliverAsync(Storage.Delivery delivery, CancellationToken cancel)
    {
        if (delivery.Attempt is null && IsContext(delivery))
        {
            return new Became.Nothing();
        }

        if (recovery.MustLook(delivery) && await recovery.LookAsync(delivery, cancel) is { } seen)
        {
            return seen;
        }

        if (IsContext(delivery) || EditionRules.Of(delivery) is not var (outcome, edition))
        {
            // What was attempted is not there; a search that lags would say the same.
            return delivery is { Attempt: not null, ServerId: null, Tries: < Recovery.Patience } ? new Became.Again(null) : new Became.Nothing();
        }

        var libraries = LibrariesNeeded(outcome);
        Bundle bundle;
        try
        {
            bundle = Render(outcome, edition, libraries);
        }
        catch (Exception exception)
        {
            return new Became.Parked("not-renderable", $"The result cannot be written as FHIR ({exception.GetType().Name}).");
        }

        var attempt = new Attempt(delivery.Wanted, ContentDigest.Of((Observation)bundle.Entry[0].Resource!), FhirJson.Bytes(bundle.Entry[1].Resource!));
        await store.MarkAttemptAsync(delivery.Identity, attempt);
        delivery = delivery with { Attempt = attempt };
        return await SendAsync(bundle, libraries, cancel) switch
        {
            ServerAnswer.Delivered { Existed: false } there => await OtherCopyAsync(delivery, edition, there, cancel)
                ?? new Became.Delivered(delivery.Wanted, there.Id, await VersionAsync(there, attempt, cancel), edition.IsFinal, edition.IsRetraction),
            ServerAnswer.Delivered or ServerAnswer.Conflict or ServerAnswer.Unknown => await recovery.LookAsync(delivery, cancel) ?? new Became.Again(null),
            var answer => Became.Of(answer),
        };
    }

    /// <summary>What happened to the patient before the first start is context, unless it has been published.</summary>
    private bool IsContext(Storage.Delivery delivery) =>
        delivery is { Current: { } current, Revisions: 0, ServerId: null } && !options.Value.Delivery.PublishHistory && current.At < StartOf(store);

    private static DateTimeOffset StartOf(Store store) =>
        DateTimeOffset.Parse(store.Cursor(FirstStart.Name)!, System.Globalization.CultureInfo.InvariantCulture);

    private async Task<ServerAnswer> SendAsync(Bundle bundle, IReadOnlyList<string> libraries, CancellationToken cancel)
    {
        var answer = await Server.TransactAsync(bundle, cancel);
        if (answer.Whole is ServerAnswer.Delivered)
        {
            lock (_lock)
            {
                _libraries.UnionWith(libraries);
            }
        }

        // The result was not written, or was there already; what came along would testify to an edition that never was.
        if (answer.Entries is [not ServerAnswer.Delivered { Existed: false }, ServerAnswer.Delivered stray, ..])
        {
            await Server.DeleteAsync("Provenance", stray.Id, cancel);
        }

        return answer.Whole is ServerAnswer.Delivered ? answer.Entries[0] : answer.Whole;
    }

    /// <summary>What the result's definition and policy are called, as far as they are not known to be at the server.</summary>
    private string[] LibrariesNeeded(Outcome outcome)
    {
        lock (_lock)
        {
            return [.. new[] { $"{outcome.Definition}|{outcome.Revision}", outcome.Policy }.Where(key => !_libraries.Contains(key))];
        }
    }

    private Bundle Render(Outcome outcome, Edition edition, IReadOnlyList<string> needed)
    {
        var renderer = target.Renderer;
        var policy = site.Evaluator.Policies.All.FirstOrDefault(one => one.Hash == outcome.Policy);
        return renderer.Transaction(outcome, edition,
        [
            .. needed.Contains($"{outcome.Definition}|{outcome.Revision}") ? [renderer.Definition(site.Catalogue.Find(outcome.Definition, outcome.Revision)!)] : Array.Empty<Library>(),
            .. policy is not null && needed.Contains(policy.Hash) ? [renderer.Policy(policy)] : Array.Empty<Library>(),
        ]);
    }

    /// <summary>Null unless a conditional create raced, so that another copy stands or is in the way.</summary>
    private async Task<Became?> OtherCopyAsync(Storage.Delivery delivery, Edition edition, ServerAnswer.Delivered there, CancellationToken cancel)
    {
        if (edition.PreviousVersion is not null || options.Value.Delivery.OwnIds)
        {
            return null;
        }

        var (only, hindrance) = await copies.OnlyAsync(delivery, cancel);
        return hindrance ?? (only is not null && only != there.Id ? new Became.Again(null) : null);
    }

    /// <summary>The version written; read where the answer did not tell it, and null when somebody was faster.</summary>
    private async Task<string?> VersionAsync(ServerAnswer.Delivered there, Attempt attempt, CancellationToken cancel) =>
        there.Version ?? (await Server.ReadAsync($"Observation/{there.Id}", cancel) is { Found: true } answer
            && HeldResult.Read(answer) is { } held && held.Digest == attempt.Digest ? held.Version : null);
}
