using RespDerive.Timeline;

namespace RespDerive.Storage;

/// <summary>One arrival in the transaction of its append.</summary>
internal sealed class Append(Session session, Arrival arrival)
{
    private readonly SortedSet<long> _wake = [];
    private readonly HashSet<string> _followed = new(StringComparer.Ordinal);

    private string Source => arrival.Key.Source;

    public Appended Run()
    {
        var (resource, winner, before) = FindOrAddResource();
        var order = arrival.Order;
        if (winner is not null && session.Number(Sql.FindVersion, resource, Columns.Updated(order), Columns.Number(order), order.Digest) is not null)
        {
            session.Execute(Sql.AddTally, Tallies.Repeats, 1);
            return new Appended(New: false, Won: false, [], IsGone(winner));
        }

        // a withdrawal often does not know the patient
        var patient = arrival.Patient is { } reference ? NumberOf(reference) : arrival.Gone ? before : null;
        var version = session.Number(Sql.AddVersion, resource, arrival.Base, arrival.Version, Columns.Updated(order), Columns.Number(order),
            order.Digest, patient, arrival.Arrived.UtcTicks, arrival.Gone ? 1 : 0, arrival.Body.ToArray(), Columns.Text(arrival.Links));
        session.Execute(Sql.AddTally, Tallies.Received, 1);
        if (!Wins(order, winner))
        {
            return new Appended(New: true, Won: false, [], IsGone(winner));
        }

        session.Execute(Sql.SetWinner, resource, version, patient);
        Open(before, resource);
        Open(patient, resource);
        var earlier = winner is null ? [] : session.All(Sql.ReferencesOf, row => row.GetString(0), resource);
        ReplaceReferences(resource, earlier);
        OpenReferring(arrival.Key.Reference);
        foreach (var name in ReplaceNames(resource, winner is null))
        {
            OpenReferring(name);
        }

        OpenMembers(earlier.Union(arrival.References));
        return new Appended(New: true, Won: true, [.. _wake], arrival.Gone);
    }

    private bool IsGone(long? winner) => session.Number(Sql.IsGone, winner) == 1;

    private (long Resource, long? Winner, long? Patient) FindOrAddResource()
    {
        var key = arrival.Key;
        var found = session.One<(long, long?, long?)?>(Sql.FindResource,
            row => (row.GetInt64(0), Columns.OptionalNumber(row, 1), Columns.OptionalNumber(row, 2)), key.Source, key.Type, key.Id);
        return found ?? (session.Number(Sql.AddResource, key.Source, key.Type, key.Id, key.Reference)!.Value, null, null);
    }

    private long NumberOf(string reference) =>
        session.Number(Sql.FindPatient, Source, reference) ?? session.Number(Sql.AddPatient, Source, reference)!.Value;

    private bool Wins(VersionOrder order, long? winner)
    {
        if (winner is null)
        {
            return true;
        }

        var best = session.One(Sql.VersionOrder, row => Columns.Order(row, 0), winner)!;
        if (order.IsUnordered && best.IsUnordered)
        {
            return true;
        }

        var wins = order.CompareTo(best) > 0;
        if (wins && order.Number < best.Number && order.LastUpdated > best.LastUpdated)
        {
            session.Execute(Sql.AddTally, Tallies.VersionResets, 1);
        }

        return wins;
    }

    private void ReplaceReferences(long resource, List<string> earlier)
    {
        if (earlier.Count > 0)
        {
            session.Execute(Sql.ClearReferences, resource);
        }

        foreach (var target in arrival.References)
        {
            session.Execute(Sql.AddReference, Source, target, resource);
        }
    }

    // All names it had or has: what refers to it by one of them may read differently now.
    private List<string> ReplaceNames(long resource, bool first)
    {
        var earlier = first ? [] : session.All(Sql.NamesOf, row => row.GetString(0), resource);
        if (earlier.Count > 0)
        {
            session.Execute(Sql.ClearNames, resource);
        }

        foreach (var name in arrival.Names)
        {
            session.Execute(Sql.AddName, Source, name, resource);
        }

        return [.. earlier.Union(arrival.Names)];
    }

    // Through resources of no patient on to those that refer to them: Observation to DeviceMetric to Device.
    private void OpenReferring(string reference)
    {
        if (!_followed.Add(reference))
        {
            return;
        }

        foreach (var (resource, patient, next) in session.All(Sql.Referring,
            row => (row.GetInt64(0), Columns.OptionalNumber(row, 1), row.GetString(2)), Source, reference))
        {
            if (patient is null)
            {
                OpenReferring(next);
            }

            Open(patient, resource);
        }
    }

    // A panel or report tells its members that they belong together, so they are read again when it changes.
    private void OpenMembers(IEnumerable<string> members)
    {
        if (arrival.Key.Type is not ("Observation" or "DiagnosticReport"))
        {
            return;
        }

        foreach (var member in members.Where(CanBeObservation))
        {
            foreach (var (resource, patient) in session.All(Sql.Member, row => (row.GetInt64(0), Columns.OptionalNumber(row, 1)), Source, member))
            {
                Open(patient, resource);
            }
        }
    }

    // by id, or by the URL of a Bundle entry, which does not tell the type
    private static bool CanBeObservation(string reference) =>
        reference.StartsWith("Observation/", StringComparison.Ordinal) || reference.Contains(':', StringComparison.Ordinal);

    // A new mark each time: a turn under way that has read the older version must not close this row.
    private void Open(long? patient, long resource)
    {
        if (patient is null)
        {
            return;
        }

        var since = session.Number(Sql.OpenSince, patient, resource) ?? arrival.Arrived.UtcTicks;
        session.Execute(Sql.CloseOne, patient, resource);
        session.Execute(Sql.Open, patient, resource, since);
        _wake.Add(patient.Value);
    }
}
