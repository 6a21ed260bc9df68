using CsCheck;
using RespDerive.Physiology;

namespace RespDerive.Timeline.Tests;

/// <summary>Arrival order does not matter: any order, batching and repetition of a history ends in the outcomes of the whole history at once.</summary>
public sealed class ConfluenceTests
{
    private const int Runs = 4000;

    /// <summary>Two policies in time; settings that last longer than a day under one of them.</summary>
    private static readonly Evaluator Evaluator = Ward.Evaluator(
        Ward.SeaLevel, Ward.SeaLevel with
        {
            PressureMmHg = null,
            AltitudeMetres = 100,
            ValidFrom = Ward.Morning.AddMinutes(150),
            Sources = new Dictionary<string, SourceTiming> { ["ehr"] = new() { SettingMaxAge = TimeSpan.FromHours(26) } },
        });

    private static readonly Gen<(Version[] History, Version[] Shuffled, int Batch)> Cases =
        from history in Histories.One
        from shuffled in Gen.Shuffle(history.Concat(history.Take(history.Length / 3)).ToArray())
        from batch in Gen.Int[1, 6]
        select (history, shuffled, batch);

    [Fact]
    public void Any_order_batching_and_repetition_ends_in_the_same_outcomes() =>
        Cases.Sample(run => Describe(Replay(run.Shuffled, run.Batch)) == Describe(FromScratch(run.History)), iter: Runs,
            print: run => string.Join('\n', run.Shuffled.Select(version => $"{version.Resource.Id} v{version.Order.Number} {string.Join(' ', version.Readings)}"))
                + "\n--- replayed\n" + Describe(Replay(run.Shuffled, run.Batch)) + "\n--- from scratch\n" + Describe(FromScratch(run.History)));

    /// <summary>What an evaluation may look at is exactly what the windows declare: loading only that for one anchor gives the same outcome.</summary>
    [Fact]
    public void One_anchor_with_only_its_declared_windows_has_the_same_outcome() => Histories.One.Sample(history =>
    {
        var winners = Winners(history);
        var slice = new Slice(winners.SelectMany(version => version.Readings), Person(winners));
        var store = new InMemoryHistory();
        store.Apply(new TurnChanges { Readings = [.. winners.SelectMany(version => version.Readings)] });
        foreach (var definition in Evaluator.Called)
        {
            foreach (var outcome in Evaluator.Evaluate(definition, slice, DateTimeOffset.MinValue, DateTimeOffset.MaxValue))
            {
                var ranges = Evaluator.ReachOf(definition).Spans.Select(pair => new KindRange(pair.Key, outcome.At.Minus(pair.Value.Before), outcome.At.Plus(pair.Value.After), pair.Value.Back));
                var part = new Slice(store.Readings([.. ranges]), Person(winners));
                var alone = Evaluator.Evaluate(definition, part, outcome.At, outcome.At).Where(other => other.Identity == outcome.Identity);
                Assert.Equal(Describe([outcome]), Describe(alone));
            }
        }
    }, iter: Runs / 4);

    [Fact]
    public void Generated_histories_reach_values_and_many_reasons()
    {
        var seen = new HashSet<string>(StringComparer.Ordinal);
        Histories.One.Sample(history =>
        {
            lock (seen)
            {
                seen.UnionWith(FromScratch(history).Select(outcome => outcome.Withheld ?? outcome.Definition));
            }
        }, iter: Runs);
        string[] expected =
        [
            "pf-ratio", "aa-gradient", "driving-pressure", "static-compliance", "oxygenation-index", "tidal-volume-per-pbw", "ventilatory-ratio",
            Withheld.InputMissing, Withheld.UnitUnknown, Withheld.NotEquilibrated, Withheld.PatientNotPassive, Withheld.SexUnknown, Withheld.ConflictingInputs,
        ];
        Assert.Empty(expected.Except(seen));
    }

    /// <summary>The reference: all winning versions in one slice, every definition evaluated over all time.</summary>
    private static IEnumerable<Outcome> FromScratch(Version[] history)
    {
        var winners = Winners(history);
        var slice = new Slice(winners.SelectMany(version => version.Readings), Person(winners));
        return Catalogue.Shipped.All.SelectMany(definition => Evaluator.Evaluate(definition, slice, DateTimeOffset.MinValue, DateTimeOffset.MaxValue));
    }

    private static Version[] Winners(Version[] history) =>
        [.. history.GroupBy(version => version.Resource).Select(group => group.MaxBy(version => version.Order)!)];

    private static Person? Person(Version[] winners) => winners.Select(version => version.Person).SingleOrDefault(person => person is not null);

    private static IReadOnlyCollection<Outcome> Replay(Version[] arrivals, int batch)
    {
        var history = new InMemoryHistory();
        var winning = new Dictionary<ResourceKey, VersionOrder>();
        foreach (var chunk in arrivals.Chunk(batch))
        {
            var won = new Dictionary<ResourceKey, Version>();
            foreach (var version in chunk)
            {
                if (!winning.TryGetValue(version.Resource, out var known) || version.Order.CompareTo(known) > 0)
                {
                    winning[version.Resource] = version.Order;
                    won[version.Resource] = version;
                }
            }

            history.Apply(Turn.Run(Evaluator, history,
                [.. won.Values.Where(version => version.Person is null).Select(version => new Replacement(version.Resource, version.Readings))],
                won.Values.Select(version => version.Person).SingleOrDefault(person => person is not null)));
        }

        return history.All;
    }

    private static string Describe(IEnumerable<Outcome> outcomes) => string.Join('\n', outcomes
        .OrderBy(outcome => outcome.Identity)
        .Select(outcome => $"{outcome.Definition} {outcome.AnchorReference} {outcome.AtText} {outcome.Withheld} {outcome.Value} {outcome.Published} ±{outcome.Uncertainty} "
            + $"[{string.Join(',', outcome.Flags)}] {(outcome.Withheld is null ? $"{outcome.Preliminary} {outcome.Variant} {outcome.Person?.Resource.Id}" : "")} "
            + (outcome.Withheld is null ? string.Join(' ', outcome.Inputs.Where(input => !input.GateOnly).Select(input => $"{input.Kind}={input.Value}:{string.Join('+', input.Readings.Select(reading => reading.Resource.Id + "v" + reading.Version))}")) : "")));
}
