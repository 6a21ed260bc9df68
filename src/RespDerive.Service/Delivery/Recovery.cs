using Microsoft.Extensions.Options;
using RespDerive.Fhir.Server;

namespace RespDerive.Service.Delivery;

/// <summary>
/// Finds out what the server holds of a result after an answer that never came or was not the one expected: lost, cut off by
/// our own end, or a conflict. Judged by content; what people wrote has the last word.
/// </summary>
internal sealed class Recovery(Target target, Copies copies, Testimony testimony, IOptions<ServiceOptions> options)
{
    /// <summary>Searches may lag behind writes, so what speaks against our having written something is believed after this many tries.</summary>
    public const int Patience = 3;

    /// <summary>True when nothing may be sent before looking.</summary>
    public bool MustLook(Storage.Delivery delivery) =>
        delivery.Attempt is not null || (delivery.ServerId is null ? options.Value.Delivery.OwnIds : delivery.ServerVersion is null);

    /// <summary>What became of the result; null when the server holds what it confirmed last, or nothing: then the edition may be sent.</summary>
    public async Task<Became?> LookAsync(Storage.Delivery delivery, CancellationToken cancel)
    {
        var id = delivery.ServerId ?? (options.Value.Delivery.OwnIds ? delivery.Identity.ToString() : null);
        if (id is null)
        {
            (id, var hindrance) = await copies.OnlyAsync(delivery, cancel);
            if (id is null)
            {
                return hindrance;
            }
        }

        var answer = await target.Server.ReadAsync($"Observation/{id}", cancel);
        return answer switch
        {
            { Found: true } => await JudgeAsync(delivery, id, answer, cancel),
            { Status: 404 } when delivery.ServerId is null && options.Value.Delivery.OwnIds => null,
            { Status: 404 or 410 } => Became.Deleted,
            { Transient: true } or { Status: 401 } => new Became.Again(answer.After),
            _ => new Became.Parked($"http-{answer.Status}", "The result cannot be read at the server."),
        };
    }

    private async Task<Became?> JudgeAsync(Storage.Delivery delivery, string id, ReadAnswer answer, CancellationToken cancel)
    {
        if (HeldResult.Read(answer) is not { } held)
        {
            return new Became.Parked("foreign-edit", "What the server holds under our identifier is no Observation.");
        }

        var (ours, hindrance) = await testimony.OfAsync(id, cancel);
        if (hindrance is not null)
        {
            return hindrance;
        }

        switch (Authorship.Of(delivery, held, ours))
        {
            case Authorship.Confirmed:
                if (delivery.Attempt is { } failed)
                {
                    await testimony.TakeBackAsync(failed, ours, cancel);
                }

                return null;
            case Authorship.Attempted:
                var attempt = delivery.Attempt!;
                return await testimony.CompleteAsync(delivery, attempt, id, ours, cancel)
                    ?? (attempt.Wanted > delivery.Delivered
                        ? new Became.Delivered(attempt.Wanted, id, held.Version, held.IsFinal, held.IsRetracted)
                        : Adopted((int)delivery.Revisions + 1, held.IsFinal)); // given up meanwhile, and there all the same
            case Authorship.Forgotten earlier:
                // What a retraction followed is no longer to be seen; saying amended of its successor claims less than saying final.
                return Adopted(earlier.Revision, held.IsFinal || (held.IsRetracted && delivery.ServerId is null));
            default:
                return delivery.Tries < Patience ? new Became.Again(null)
                    : held.IsRetracted ? new Became.Withdrawn()
                    : new Became.Parked("foreign-edit", "The result was changed at the server by somebody else.");
        }

        Became Adopted(int revision, bool final) =>
            held.Version is { } version ? new Became.Adopted(id, version, revision, final, held.IsRetracted) : Became.NoVersion;
    }
}
