using RespDerive.Fhir;
using RespDerive.Service;
using RespDerive.Service.Delivery;
using RespDerive.Timeline;

namespace RespDerive.Files;

/// <summary>
/// Replays files in the order given, one resource version after the other, as the service would have seen them:
/// every edition of every result, revisions and retractions among them.
/// </summary>
internal sealed class Replay(Site site, DateTimeOffset recorded)
{
    private readonly InMemoryResourceSet _set = new();
    private readonly Dictionary<string, InMemoryHistory> _patients = new(StringComparer.Ordinal);
    private readonly Dictionary<string, string> _patientOf = new(StringComparer.Ordinal);
    private readonly Dictionary<string, HashSet<string>> _referring = new(StringComparer.Ordinal);
    private readonly Dictionary<Guid, Storage.Delivery> _results = [];
    private readonly List<Published> _published = [];

    /// <summary>Takes the next resource version.</summary>
    public void Take(ResourceFacts facts)
    {
        var before = _set.Find(facts.Key.Reference);
        if (!_set.Add(facts))
        {
            return;
        }

        foreach (var reference in facts.References.Where(reference => reference != facts.Patient))
        {
            (_referring.TryGetValue(reference, out var referring) ? referring : _referring[reference] = new(StringComparer.Ordinal)).Add(facts.Key.Reference);
        }

        // What refers to it, and the members of a panel it is or was, may read differently now.
        var touched = new HashSet<string>(StringComparer.Ordinal) { facts.Key.Reference };
        touched.UnionWith(_referring.GetValueOrDefault(facts.Key.Reference) ?? []);
        touched.UnionWith(facts.References);
        touched.UnionWith(before?.References ?? []);
        var read = touched.Select(_set.Find).OfType<ResourceFacts>().Where(one => one.Patient is not null && (one.Key == facts.Key || one.Content is ObservationFacts)).ToArray();
        foreach (var patient in read.Select(one => one.Patient!).Append(_patientOf.GetValueOrDefault(facts.Key.Reference)).OfType<string>().Distinct(StringComparer.Ordinal).ToArray())
        {
            Turn(patient, read);
        }

        if (facts.Patient is not null)
        {
            _patientOf[facts.Key.Reference] = facts.Patient;
        }
    }

    /// <summary>Everything published, in the order of patient, event time, definition and edition; what is withheld at the end; readings at the end.</summary>
    public Derived Finish()
    {
        var final = _patients.OrderBy(pair => pair.Key, StringComparer.Ordinal).Select(pair => pair.Value).ToArray();
        return new(
            [.. _published.OrderBy(one => one.Outcome.Patient, StringComparer.Ordinal).ThenBy(one => one.Outcome.At)
                .ThenBy(one => one.Outcome.Definition, StringComparer.Ordinal).ThenBy(one => one.Outcome.Identity).ThenBy(one => one.Edition.Revision)],
            [.. final.SelectMany(history => Derivation.InOrder(history.All.Where(outcome => outcome.Withheld is not null)))],
            final.Sum(history => (long)history.Count));
    }

    private void Turn(string patient, IReadOnlyList<ResourceFacts> touched)
    {
        var history = _patients.TryGetValue(patient, out var known) ? known : _patients[patient] = new InMemoryHistory();
        Person? person = null;
        var replacements = new List<Replacement>();
        foreach (var facts in touched)
        {
            var result = site.Rules.Read(facts, _set);
            person = facts.Patient == patient ? result.Person ?? person : person;
            replacements.Add(new(facts.Key, facts.Patient == patient ? result.Readings : []));
        }

        var changes = Timeline.Turn.Run(site.Evaluator, history, replacements, person);
        history.Apply(changes);
        foreach (var change in changes.Outcomes)
        {
            Publish(change);
        }
    }

    private void Publish(OutcomeChange change)
    {
        var state = _results.GetValueOrDefault(change.Identity) ?? Unpublished(change.Identity);
        state = state with
        {
            Current = change.Now,
            LastValued = change.Now is { Withheld: null } valued ? valued : state.LastValued,
        };
        if (EditionRules.Of(state) is var (outcome, edition))
        {
            _published.Add(new(outcome, edition));
            state = state with
            {
                Revisions = edition.Revision,
                ServerId = change.Identity.ToString(),
                ServerVersion = edition.Revision.ToString(System.Globalization.CultureInfo.InvariantCulture),
                FinalSeen = state.FinalSeen || edition.Status is Fhir.Writing.EditionStatus.Final or Fhir.Writing.EditionStatus.Amended or Fhir.Writing.EditionStatus.Corrected,
                Retracted = edition.IsRetraction,
            };
        }

        _results[change.Identity] = state;
    }

    private Storage.Delivery Unpublished(Guid identity) => new()
    {
        Identity = identity,
        Patient = 0,
        Current = null,
        LastValued = null,
        Wanted = 0,
        Delivered = 0,
        Revisions = 0,
        FinalSeen = false,
        Tries = 0,
        Due = recorded,
        Since = recorded,
        Recorded = recorded,
    };
}
