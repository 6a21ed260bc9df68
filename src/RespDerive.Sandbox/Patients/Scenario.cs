namespace RespDerive.Sandbox.Patients;

/// <summary>
/// The invented Ward Alder as pure data: which messages reach the record, and what was true all along.
/// Nothing depends on a clock; the same seed, start and duration give the same scenario.
/// </summary>
public sealed record Scenario(IReadOnlyList<ScenarioEvent> Events, IReadOnlyList<Truth> Truths)
{
    /// <summary>Number of different patients; more beds repeat them with other individual values.</summary>
    public const int Patients = 3;

    /// <summary>
    /// Plays the ward from a start for a duration. Events are in filing order and filed by the end; what was
    /// measured but not filed by then is left out.
    /// </summary>
    public static Scenario Play(int seed, DateTimeOffset from, TimeSpan duration, int beds = Patients)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(beds);
        var stories = Enumerable.Range(1, beds).Select(number => new BedStory(number, seed, from)).ToArray();
        foreach (var story in stories)
        {
            story.Run(duration);
        }
        var end = from + duration;
        return new Scenario(
            [.. stories.SelectMany(s => s.Events).Where(e => e.FilingTime <= end).OrderBy(e => e.FilingTime)],
            [.. stories.SelectMany(s => s.Truths).OrderBy(t => t.At)]);
    }
}
