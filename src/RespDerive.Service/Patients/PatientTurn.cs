using System.Diagnostics.Metrics;
using RespDerive.Fhir;
using RespDerive.Service.Intake;
using RespDerive.Service.Operations;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Service.Patients;

/// <summary>One turn of a patient: read what is open, work out what changes, commit all of it.</summary>
internal sealed class PatientTurn(Store store, Site site, TimeProvider time, Feed feed, Awaited awaited)
{
    private static readonly Counter<long> Ignored = Telemetry.Meter.CreateCounter<long>("respderive.reading.ignored", "{value}", "Values that gave no reading, by reason");
    private static readonly Counter<long> Refused = Telemetry.Meter.CreateCounter<long>("respderive.reading.refused", "{reading}", "Readings that cannot be used and block their place, by reason");
    private static readonly Counter<long> Changed = Telemetry.Meter.CreateCounter<long>("respderive.outcomes.changed", "{outcome}", "Outcomes that changed, by definition and what they are now");

    /// <summary>True when there is something to read.</summary>
    public bool IsOpen(long patient) => store.OpenTurn(patient, 1) is { UpTo: > 0 };

    /// <summary>Takes one turn. True when more may be open.</summary>
    public async Task<bool> TakeAsync(long patient)
    {
        var input = store.OpenTurn(patient);
        if (input is null || input.UpTo == 0)
        {
            return false;
        }

        var now = time.GetUtcNow();
        var (changes, unresolved) = Work(patient, input);
        if (unresolved.Count > 0)
        {
            await store.AddFetchesAsync(input.Source, unresolved, now);
            awaited.Hurry();
        }

        // A turn number that is taken means another activation was faster; what it left open is read again.
        if (!await store.CommitTurnAsync(patient, input.Turn, input.UpTo, changes, now))
        {
            return true;
        }

        foreach (var outcome in changes.Outcomes)
        {
            Changed.Add(1, new("definition", (outcome.Now ?? outcome.Before)!.Definition), new("became", outcome.Now is null ? "gone" : outcome.Now.Withheld ?? "value"));
        }

        feed.Turned(changes);
        return input.More || IsOpen(patient);
    }

    private (TurnChanges Changes, IReadOnlyList<string> Unresolved) Work(long patient, TurnInput input)
    {
        using var history = store.History(patient);
        var set = new StoredResourceSet(history, input.Source, site.SourceBase);
        var replacements = input.Left.Select(key => new Replacement(key, [])).ToList();
        var unresolved = new HashSet<string>(StringComparer.Ordinal);
        Person? person = null;
        foreach (var resource in input.Resources)
        {
            if (resource.Gone || set.FactsOf(resource) is not { } facts)
            {
                replacements.Add(new Replacement(resource.Key, []));
                continue;
            }

            var read = site.Rules.Read(facts, set);
            Count(read);
            person = read.Person ?? person;
            var missing = read.Unresolved.Where(reference => !set.IsGone(reference) && awaited.CanBeFetched(reference)).ToArray();
            unresolved.UnionWith(missing);

            // What decides the meaning of a reading is waited for: a specimen its site and time, a metric whether it is set or measured.
            // Meanwhile what the resource said before stands, so that nothing is retracted only to come back.
            replacements.Add(new Replacement(resource.Key, missing.Any(Awaited.Decides) ? history.ReadingsOf(resource.Key) : read.Readings));
        }

        if (person is null && history.Person is null && history.Find(input.Source, input.Patient) is null && awaited.CanBeFetched(input.Patient))
        {
            unresolved.Add(input.Patient);
        }

        return (Turn.Run(site.Evaluator, history, replacements, person), [.. unresolved]);
    }

    private static void Count(ReadResult read)
    {
        foreach (var part in read.Ignored)
        {
            Ignored.Add(1, new KeyValuePair<string, object?>("reason", part.Reason));
        }

        foreach (var reading in read.Readings.Where(reading => reading.Refused is not null))
        {
            Refused.Add(1, new KeyValuePair<string, object?>("reason", reading.Refused));
        }
    }
}
