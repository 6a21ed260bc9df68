using RespDerive.Timeline;

namespace RespDerive.Storage;

public sealed partial class Store
{
    /// <summary>What a patient's next turn has to read; without resources when nothing is open. Null when there is no such patient.</summary>
    /// <param name="patient">Number of the patient.</param>
    /// <param name="limit">At most this many resources; the rest stays open.</param>
    public TurnInput? OpenTurn(long patient, int limit = 1000) => _readers.Read(session =>
    {
        if (Name(session, patient) is not { } name)
        {
            return null;
        }

        var open = session.All(Sql.OpenBodies, row => (Body: Columns.Body(row), Mark: row.GetInt64(12), Left: row.GetInt64(13) == 1), patient, limit);
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

    /// <summary>The patient's timeline and outcomes in one snapshot; dispose it soon.</summary>
    public PatientHistory History(long patient) => new(_readers, _records, patient);

    /// <summary>Patients with something to read, the longest waiting first.</summary>
    public IReadOnlyList<long> PatientsWithOpenRows(int limit) => _readers.Read(session => session.All(Sql.OpenPatients, row => row.GetInt64(0), limit));

    /// <summary>Commits a turn whole or not at all.</summary>
    /// <returns>False when the turn number is taken: nothing was written; open the turn again.</returns>
    public Task<bool> CommitTurnAsync(long patient, long turn, long upTo, TurnChanges changes, DateTimeOffset now)
    {
        ArgumentNullException.ThrowIfNull(changes);
        return _writer.RunAsync(session =>
        {
            if (session.Execute(Sql.AddTurn, patient, turn, now.UtcTicks) == 0)
            {
                return false;
            }

            ReplaceReadings(session, patient, changes);
            if (changes.Person is { } person)
            {
                session.Execute(Sql.SetPerson, patient, _records.Bytes(person));
            }

            foreach (var change in changes.Outcomes)
            {
                SetOutcome(session, patient, change, now);
            }

            session.Execute(Sql.CloseUpTo, patient, upTo);
            return true;
        });
    }

    private void ReplaceReadings(Session session, long patient, TurnChanges changes)
    {
        var resources = changes.Replaced.Distinct().ToDictionary(key => key, key => Resource(session, key));
        foreach (var resource in resources.Values)
        {
            session.Execute(Sql.ClearReadings, patient, resource);
        }

        foreach (var reading in changes.Readings)
        {
            session.Execute(Sql.AddReading, patient, reading.Kind.Key, reading.At.UtcTicks, resources[reading.Id.Resource], _records.Bytes(reading));
        }
    }

    private void SetOutcome(Session session, long patient, OutcomeChange change, DateTimeOffset now)
    {
        var identity = Columns.Identity(change.Identity);
        var had = session.Number(Sql.HasValue, identity);
        var has = change.Now is { Withheld: null };
        var changed = change.Now is { } outcome
            ? session.Execute(Sql.SetOutcome, identity, patient, now.UtcTicks,
                outcome.Definition, outcome.At.UtcTicks, outcome.Withheld, _records.Bytes(outcome), has ? 1 : 0)
            : session.Execute(Sql.ClearOutcome, identity, patient, now.UtcTicks);
        if (changed == 0 && had is not null)
        {
            throw new InvalidOperationException("an outcome of this identity belongs to another patient");
        }

        if (had == 1)
        {
            Count(session, has ? Tallies.Revisions : Tallies.Retractions);
        }
    }

    private static long Resource(Session session, ResourceKey key) =>
        session.One<long?>(Sql.FindResource, row => row.GetInt64(0), key.Source, key.Type, key.Id)
        ?? session.Number(Sql.AddResource, key.Source, key.Type, key.Id, key.Reference)!.Value;
}
