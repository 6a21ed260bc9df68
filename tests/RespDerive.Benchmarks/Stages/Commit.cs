using BenchmarkDotNet.Attributes;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Benchmarks.Stages;

/// <summary>Durable writes of 16 callers at once, each waiting for its own before the next, as in the service.</summary>
[WaitsForDisk]
public class Commit
{
    private const int Callers = 16;
    private const int Each = 16;
    private readonly long[] _patients = new long[Callers];
    private readonly long[] _turns = new long[Callers];
    private readonly Arrival _sample;
    private readonly TurnChanges _changes;
    private TemporaryStore _temporary = null!;
    private int _number;

    public Commit()
    {
        var message = Day.Made.Messages.Last(one => one.Type == "Observation");
        _sample = TemporaryStore.ArrivalOf(Day.FactsOf(message), message.Body);
        _changes = Turn.Run(Ward.Site.Evaluator, Day.Made.Before, Day.Made.Minute, null);
    }

    [GlobalSetup]
    public async Task SetUpAsync()
    {
        _temporary = new TemporaryStore();
        await _temporary.Store.AppendAsync([.. Enumerable.Range(0, Callers).Select(Next)]);
        for (var i = 0; i < Callers; i++)
        {
            _patients[i] = _temporary.Store.PatientNumber(Ward.Source, Patient(i))!.Value;
        }
    }

    [GlobalCleanup]
    public async Task CleanUpAsync() => await _temporary.DisposeAsync();

    [Benchmark(Description = "resource version journalled", OperationsPerInvoke = Callers * Each)]
    public Task Append() => TogetherAsync(caller => _temporary.Store.AppendAsync([Next(caller)]));

    [Benchmark(Description = "turn committed (a minute of the devices)", OperationsPerInvoke = Callers * Each)]
    public Task Turns() => TogetherAsync(caller => _temporary.Store.CommitTurnAsync(_patients[caller], ++_turns[caller], 0, NextChanges(), Ward.Start));

    private static Task TogetherAsync(Func<int, Task> write) => Task.WhenAll(Enumerable.Range(0, Callers).Select(caller => Task.Run(async () =>
    {
        for (var i = 0; i < Each; i++)
        {
            await write(caller);
        }
    })));

    private static string Patient(int caller) => $"Patient/bench-{caller}";

    private Arrival Next(int caller)
    {
        var number = Interlocked.Increment(ref _number);
        return _sample with { Key = _sample.Key with { Id = $"bench-{number}" }, Patient = Patient(caller) };
    }

    /// <summary>The same changes about other resources and results.</summary>
    private TurnChanges NextChanges()
    {
        var number = Interlocked.Increment(ref _number);
        ResourceKey Other(ResourceKey key) => key with { Id = $"{key.Id}-{number}" };
        Guid OtherResult(Guid identity) => NameBasedUuid.Of(identity, number.ToString(System.Globalization.CultureInfo.InvariantCulture));
        return _changes with
        {
            Replaced = [.. _changes.Replaced.Select(Other)],
            Readings = [.. _changes.Readings.Select(reading => reading with { Id = reading.Id with { Resource = Other(reading.Id.Resource) } })],
            Outcomes = [.. _changes.Outcomes.Select(change => new OutcomeChange(OtherResult(change.Identity), null,
                change.Now is { } outcome ? outcome with { Identity = OtherResult(change.Identity) } : null))],
        };
    }
}
