using RespDerive.Fhir;
using RespDerive.Service.Patients;
using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Benchmarks;

/// <summary>A store in a folder of its own, deleted at the end.</summary>
internal sealed class TemporaryStore : IAsyncDisposable
{
    private readonly DirectoryInfo _folder = Directory.CreateTempSubdirectory("respderive-bench-");

    public TemporaryStore() => Store = Store.Open(Path.Combine(_folder.FullName, "respderive.db"), Ward.Site.KindOf);

    public Store Store { get; }

    public static Arrival ArrivalOf(ResourceFacts facts, byte[] body) => new()
    {
        Key = facts.Key,
        Base = facts.Base,
        Version = facts.Version,
        Order = facts.Order,
        Patient = facts.Patient,
        Body = body,
        Arrived = facts.Arrived,
        References = [.. facts.References.Where(reference => reference != facts.Patient).Distinct(StringComparer.Ordinal)],
    };

    public Task AppendAsync(IEnumerable<Message> messages) =>
        Store.AppendAsync([.. messages.Select(message => ArrivalOf(Day.FactsOf(message), message.Body))]);

    /// <summary>Reads what is open and works out what changes, as the service does; commits nothing.</summary>
    public (TurnInput Input, TurnChanges Changes) Work(long patient)
    {
        var input = Store.OpenTurn(patient)!;
        using var history = Store.History(patient);
        var set = new StoredResourceSet(history, input.Source);
        var replacements = input.Left.Select(key => new Replacement(key, [])).ToList();
        Person? person = null;
        foreach (var resource in input.Resources)
        {
            var read = StoredResourceSet.FactsOf(resource) is { } facts ? Ward.Site.Rules.Read(facts, set) : new ReadResult();
            person = read.Person ?? person;
            replacements.Add(new Replacement(resource.Key, read.Readings));
        }

        return (input, Turn.Run(Ward.Site.Evaluator, history, replacements, person));
    }

    /// <summary>Takes turns until nothing is open.</summary>
    public async Task TakeAllAsync(long patient)
    {
        while (Store.OpenTurn(patient, 1) is { UpTo: > 0 })
        {
            var (input, changes) = Work(patient);
            await Store.CommitTurnAsync(patient, input.Turn, input.UpTo, changes, Ward.Start);
        }
    }

    public async ValueTask DisposeAsync()
    {
        await Store.DisposeAsync();
        _folder.Delete(recursive: true);
    }
}
