using RespDerive.Physiology;

namespace RespDerive.Storage;

public sealed partial class Store
{
    /// <summary>Current outcomes with their delivery state, the latest event times first; one withdrawn by a person lists as withheld.</summary>
    public IReadOnlyList<Delivery> Outcomes(OutcomeFilter filter)
    {
        ArgumentNullException.ThrowIfNull(filter);
        return _readers.Read(session => session.All(Sql.ListOutcomes(filter), ReadDelivery, filter.Patient, filter.Definition, filter.Code,
            Withheld.WithdrawnByPerson, filter.From?.UtcTicks, filter.To?.UtcTicks, filter.Limit));
    }

    /// <summary>Withheld outcomes in a row with the same code, as intervals; a value or another code between ends one. The latest first.</summary>
    public IReadOnlyList<WithheldRun> WithheldRuns(OutcomeFilter filter)
    {
        ArgumentNullException.ThrowIfNull(filter);
        var course = _readers.Read(session => session.All(Sql.Course(filter),
            row => new WithheldRun(row.GetInt64(0), row.GetString(1), Columns.OptionalText(row, 3) ?? "", Columns.Time(row.GetInt64(2)), Columns.Time(row.GetInt64(2)), 1),
            filter.Patient, filter.Definition, filter.From?.UtcTicks, filter.To?.UtcTicks));
        var runs = new List<WithheldRun>();
        foreach (var next in course)
        {
            if (runs.Count > 0 && runs[^1] is var last && (last.Patient, last.Definition, last.Code) == (next.Patient, next.Definition, next.Code))
            {
                runs[^1] = last with { To = next.To, Count = last.Count + 1 };
            }
            else
            {
                runs.Add(next);
            }
        }

        return [.. runs.Where(run => run.Code.Length > 0 && (filter.Code ?? run.Code) == run.Code).OrderByDescending(run => run.To).Take(filter.Limit)];
    }

    /// <summary>Totals.</summary>
    public Counts Counts() => _readers.Read(session => new Counts
    {
        Received = Tally(session, Tallies.Received),
        Repeats = Tally(session, Tallies.Repeats),
        VersionResets = Tally(session, Tallies.VersionResets),
        Readings = session.Number(Sql.CountReadings) ?? 0,
        Results = session.Number(Sql.CountResults) ?? 0,
        Revisions = Tally(session, Tallies.Revisions),
        Retractions = Tally(session, Tallies.Retractions),
        Withheld = session.Number(Sql.CountWithheld) ?? 0,
        Delivered = Tally(session, Tallies.Delivered),
        Refused = session.Number(Sql.CountParked) ?? 0,
        Pending = session.Number(Sql.CountPending) ?? 0,
    });

    private static long Tally(Session session, string name) => session.Number(Sql.Tally, name) ?? 0;
}
