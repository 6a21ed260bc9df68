using RespDerive.Fhir.Server;
using RespDerive.Fhir.Writing;

namespace RespDerive.Service.Delivery;

/// <summary>One copy of each result: where creates raced, every copy but one is retracted, unless a person has changed it.</summary>
internal sealed class Copies(Target target, Testimony testimony, TimeProvider time)
{
    /// <summary>The id of the one copy; null when there is none, or when something stands in the way.</summary>
    public async Task<(string? Id, Became? Hindrance)> OnlyAsync(Storage.Delivery delivery, CancellationToken cancel)
    {
        try
        {
            var found = await target.Server.FindAsync("Observation", target.Renderer.Words.Result, delivery.Identity.ToString(), cancel);
            var ids = found.Select(one => one.Id).Order(StringComparer.Ordinal).ToArray();
            foreach (var surplus in ids.Skip(1))
            {
                if (await RetractAsync(delivery, surplus, cancel) is { } hindrance)
                {
                    return (null, hindrance);
                }
            }

            return (ids.FirstOrDefault(), null);
        }
        catch (SearchFailedException failed)
        {
            return (null, Became.Of(failed.Answer));
        }
    }

    /// <summary>Null when the copy no longer stands.</summary>
    private async Task<Became?> RetractAsync(Storage.Delivery delivery, string id, CancellationToken cancel)
    {
        var answer = await target.Server.ReadAsync($"Observation/{id}", cancel);
        if (!answer.Found)
        {
            return answer.Status is 404 or 410 ? null : new Became.Again(answer.After);
        }

        if (HeldResult.Read(answer) is not { IsRetracted: false } held || delivery.LastValued is not { } outcome)
        {
            return null;
        }

        var (ours, hindrance) = await testimony.OfAsync(id, cancel);
        if (hindrance is not null)
        {
            return hindrance;
        }

        var author = Authorship.Of(delivery, held, ours);
        if (author is Authorship.Foreign)
        {
            return delivery.Tries < Recovery.Patience ? new Became.Again(null)
                : new Became.Parked("foreign-edit", "The server holds the result twice, and somebody else changed one of the copies.");
        }

        if (held.Version is null)
        {
            return Became.NoVersion;
        }

        var edition = new Edition
        {
            Status = EditionStatus.EnteredInError,
            Recorded = time.GetUtcNow(),
            Revision = (author is Authorship.Forgotten earlier ? earlier.Revision : 1) + 1,
            ServerId = id,
            PreviousVersion = held.Version,
            IsSecondCopy = true,
        };
        var written = await target.Server.TransactAsync(target.Renderer.Transaction(outcome, edition), cancel);
        return written.Whole is ServerAnswer.Delivered ? null : Became.Of(written.Whole);
    }
}
