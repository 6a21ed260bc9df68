using RespDerive.Fhir;
using RespDerive.Fhir.Writing;
using RespDerive.Service;
using RespDerive.Timeline;

namespace RespDerive.Files;

/// <summary>One published state of a result, ready to be written.</summary>
internal sealed record Published(Outcome Outcome, Edition Edition);

/// <summary>What a derivation over files yields.</summary>
internal sealed record Derived(IReadOnlyList<Published> Published, IReadOnlyList<Outcome> Withheld, long Readings);

/// <summary>Every patient evaluated once, over the winning versions: the end of the files is taken as settled.</summary>
internal static class Derivation
{
    public static Derived Once(Site site, InMemoryResourceSet set, DateTimeOffset recorded)
    {
        var published = new List<Published>();
        var withheld = new List<Outcome>();
        var readings = 0L;
        foreach (var patient in set.All.Where(facts => facts.Patient is not null).GroupBy(facts => facts.Patient!, StringComparer.Ordinal).OrderBy(group => group.Key, StringComparer.Ordinal))
        {
            var read = patient.Select(facts => site.Rules.Read(facts, set)).ToArray();
            var slice = new Slice(read.SelectMany(result => result.Readings), read.Select(result => result.Person).FirstOrDefault(person => person is not null));
            readings += read.Sum(result => result.Readings.Count);
            var outcomes = site.Catalogue.All.SelectMany(definition =>
                site.Evaluator.Evaluate(definition, slice, DateTimeOffset.MinValue, DateTimeOffset.MaxValue, explain: true));
            foreach (var outcome in InOrder(outcomes))
            {
                if (outcome.Withheld is null)
                {
                    published.Add(new(outcome, First(outcome, recorded)));
                }
                else
                {
                    withheld.Add(outcome);
                }
            }
        }

        return new(published, withheld, readings);
    }

    /// <summary>By event time, then definition, then identity, so that ties have one order.</summary>
    public static IOrderedEnumerable<Outcome> InOrder(IEnumerable<Outcome> outcomes) =>
        outcomes.OrderBy(outcome => outcome.At).ThenBy(outcome => outcome.Definition, StringComparer.Ordinal).ThenBy(outcome => outcome.Identity);

    private static Edition First(Outcome outcome, DateTimeOffset recorded) => new()
    {
        Status = outcome.Preliminary ? EditionStatus.Preliminary : EditionStatus.Final,
        Recorded = recorded,
    };
}
