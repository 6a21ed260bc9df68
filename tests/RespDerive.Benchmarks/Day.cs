using RespDerive.Fhir;
using RespDerive.Sandbox.Patients;
using RespDerive.Timeline;

namespace RespDerive.Benchmarks;

/// <summary>
/// A day of one patient: what came in, what was read, and a history that lacks the last minute of the devices and the last
/// blood gas, so that either can come in as a turn.
/// </summary>
internal sealed class Day
{
    private static readonly Lazy<Day> Whole = new(() => new Day(Ward.Play(TimeSpan.FromHours(24))));
    private readonly Dictionary<ResourceKey, ReadResult> _read;

    private Day(IReadOnlyList<Message> messages)
    {
        Messages = messages;
        foreach (var message in messages)
        {
            Set.Add(FactsOf(message));
        }

        _read = Set.All.ToDictionary(facts => facts.Key, facts => Ward.Site.Rules.Read(facts, Set));
        var lastMinute = messages.Last(message => message.Kind == WardEventKind.Measurement).At;
        var lastGas = messages.Last(message => message.Kind == WardEventKind.BloodGas && message.Type == "Observation").At;
        Minute = Replacements(message => message.Kind == WardEventKind.Measurement && message.At == lastMinute);
        Gas = Replacements(message => message.Kind == WardEventKind.BloodGas && message.At == lastGas);
        Noon = [.. Replacements(message => message.Kind == WardEventKind.Measurement && (message.At - Ward.Start.AddHours(12)).Duration() < TimeSpan.FromSeconds(30))
            .Select(replacement => replacement with { Readings = [.. replacement.Readings.Select(reading => reading with { Version = "2", Value = reading.Value * 1.01 })] })];
        var late = Minute.Concat(Gas).Select(replacement => replacement.Resource).ToHashSet();
        Before = new InMemoryHistory();
        Before.Apply(Turn.Run(Ward.Site.Evaluator, Before, [.. _read.Where(entry => !late.Contains(entry.Key)).Select(entry => new Replacement(entry.Key, entry.Value.Readings))],
            _read.Values.Select(read => read.Person).FirstOrDefault(person => person is not null)));
    }

    /// <summary>The day, made once.</summary>
    public static Day Made => Whole.Value;

    /// <summary>What came in, in order.</summary>
    public IReadOnlyList<Message> Messages { get; }

    /// <summary>Winning versions.</summary>
    public InMemoryResourceSet Set { get; } = new();

    /// <summary>The day without <see cref="Minute"/> and <see cref="Gas"/>.</summary>
    public InMemoryHistory Before { get; }

    /// <summary>The last minute of the devices.</summary>
    public IReadOnlyList<Replacement> Minute { get; }

    /// <summary>A minute of the devices at noon, read again with other values: what a correction or a late batch costs.</summary>
    public IReadOnlyList<Replacement> Noon { get; }

    /// <summary>The last blood gas.</summary>
    public IReadOnlyList<Replacement> Gas { get; }

    /// <summary>Every reading of the day.</summary>
    public IEnumerable<Reading> Readings => _read.Values.SelectMany(read => read.Readings);

    public static ResourceFacts FactsOf(Message message) =>
        FactReader.Read(message.Body, Ward.Source, Ward.Base, null, message.Filed).Facts ?? throw new InvalidOperationException($"{message.Type}/{message.Id} is not read.");

    /// <summary>True for the messages of <see cref="Minute"/>.</summary>
    public bool IsOfMinute(Message message) => Minute.Any(replacement => replacement.Resource.Id == message.Id);

    private Replacement[] Replacements(Func<Message, bool> chosen) =>
        [.. Messages.Where(chosen).Where(message => message.Type == "Observation").Select(message => new ResourceKey(Ward.Source, message.Type, message.Id)).Distinct()
            .Select(key => new Replacement(key, _read[key].Readings))];
}
