using RespDerive.Timeline;

namespace RespDerive.Storage;

public sealed partial class Store
{
    private const long ValuedState = 1;
    private const long WithheldState = 2;

    /// <summary>What a patient's next turn has to read; without resources when nothing is open. Null when there is no such patient.</summary>
    /// <param name="patient">Number of the patient.</param>
    /// <param name="limit">At most this many resources; the rest stays open.</param>
    public TurnInput? OpenTurn(long patient, int limit = 1000) => _readers.Read(session =>
    {
        if (Name(session, patient) is not { } name)
        {
            return null;
        }

        var open = session.All(Sql.OpenBodies, row => (Body: Columns.Body(row), Mark: row.GetInt64(13), Left: row.GetInt64(14) == 1), patient, limit);
        var upTo = open.Count == 0 ? 0 : open[^1].Mark;
        return new TurnInput
        {
            Source = name.Source,
            Patient = name.Reference,
            Turn = (session.Number(Sql.LastTurn, patient) ?? 0) + 1,
            UpTo = upTo,
            Resources = [.. open.Where(row => !row.Left).Select(row => row.Body)],
            Left = [.. open.Where(row => row.Left).Select(row => row.Body.Key)],
            More = open.Count == limit && session.Number(Sql.AnyOpenAfter, patient, upTo) is not null,
        };
    });

    /// <summary>The patient's timeline and outcomes in one snapshot; dispose it soon, and hold one at a time: there are few.</summary>
    public PatientHistory History(long patient) => new(_histories, _records, patient);

    /// <summary>Patients with something to read, the longest waiting first.</summary>
    public IReadOnlyList<long> PatientsWithOpenRows(int limit) => _readers.Read(session => session.All(Sql.OpenPatients, row => row.GetInt64(0), limit));

    /// <summary>Commits a turn whole or not at all.</summary>
    /// <param name="patient">Number of the patient.</param>
    /// <param name="turn">Number of the turn, from <see cref="OpenTurn"/>.</param>
    /// <param name="upTo">Mark up to which it has read, from <see cref="OpenTurn"/>.</param>
    /// <param name="changes">What it changes.</param>
    /// <param name="now">Time of the commit; deliveries are due from then on.</param>
    /// <param name="due">Times at which something of it has to be looked at again.</param>
    /// <returns>False when the turn number is taken: nothing was written; open the turn again.</returns>
    public Task<bool> CommitTurnAsync(long patient, long turn, long upTo, TurnChanges changes, DateTimeOffset now, IReadOnlyList<DueItem>? due = null)
    {
        ArgumentNullException.ThrowIfNull(changes);
        var replaced = changes.Replaced.ToHashSet();
        if (changes.Readings.Any(reading => !replaced.Contains(reading.Id.Resource)))
        {
            throw new ArgumentException("a reading belongs to a resource that is not replaced", nameof(changes));
        }

        // the writer only writes: what it will write is made here
        var readings = changes.Readings.Select(reading => (reading, _records.Bytes(reading))).ToList();
        var outcomes = changes.Outcomes.Select(change => (change, change.Now is { } outcome ? _records.Bytes(outcome) : null)).ToList();
        var bytes = readings.Sum(row => (long)row.Item2.Length) + outcomes.Sum(row => row.Item2?.Length ?? 0L);
        return _writer.RunAsync(
            session =>
            {
                if (session.Execute(Sql.AddTurn, patient, turn, now.UtcTicks) == 0)
                {
                    return false;
                }

                ReplaceReadings(session, patient, replaced, readings);
                if (changes.Person is { } person)
                {
                    session.Execute(Sql.SetPerson, patient, _records.Bytes(person));
                }

                foreach (var (change, body) in outcomes)
                {
                    SetOutcome(session, patient, change, body, now);
                }

                foreach (var item in due ?? [])
                {
                    session.Execute(Sql.SetDue, item.Purpose, item.Key, item.At.UtcTicks);
                }

                session.Execute(Sql.CloseUpTo, patient, upTo);
                return true;
            },
            bytes);
    }

    private static void ReplaceReadings(Session session, long patient, HashSet<ResourceKey> replaced, List<(Reading Reading, byte[] Body)> readings)
    {
        var resources = replaced.ToDictionary(key => key, key => Resource(session, key));
        foreach (var resource in resources.Values)
        {
            session.Execute(Sql.ClearReadings, patient, resource);
        }

        foreach (var (reading, body) in readings)
        {
            session.Execute(Sql.AddReading, patient, reading.Kind.Key, reading.At.UtcTicks, resources[reading.Id.Resource], body);
        }
    }

    private static void SetOutcome(Session session, long patient, OutcomeChange change, byte[]? body, DateTimeOffset now)
    {
        var identity = Columns.Identity(change.Identity);
        var before = session.Number(Sql.OutcomeState, identity);
        var has = change.Now is { Withheld: null };
        var changed = change.Now is { } outcome
            ? session.Execute(Sql.SetOutcome, identity, patient, now.UtcTicks,
                outcome.Definition, outcome.At.UtcTicks, has ? ValuedState : WithheldState, outcome.Withheld, body)
            : session.Execute(Sql.ClearOutcome, identity, patient, now.UtcTicks);
        if (changed == 0 && before is not null)
        {
            throw new InvalidOperationException("an outcome of this identity belongs to another patient");
        }

        if (before == ValuedState)
        {
            Count(session, has ? Tallies.Revisions : Tallies.Retractions);
        }
    }

    private static long Resource(Session session, ResourceKey key) =>
        session.One<long?>(Sql.FindResource, row => row.GetInt64(0), key.Source, key.Type, key.Id)
        ?? session.Number(Sql.AddResource, key.Source, key.Type, key.Id, key.Reference)!.Value;
}
