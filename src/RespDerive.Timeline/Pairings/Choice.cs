using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline;

/// <summary>What a pairing rule chose: readings and one value, or a reading that blocks, or nothing.</summary>
internal sealed record Choice
{
    public static readonly Choice Nothing = new();

    public Kind? Kind { get; private init; }

    public double Value { get; private init; }

    public IReadOnlyList<Reading> Readings { get; private init; } = [];

    public IReadOnlyList<string> Flags { get; init; } = [];

    /// <summary>Withheld code of a reading that would have been chosen but cannot be used.</summary>
    public string? Blocked { get; private init; }

    public bool Found => Kind is not null;

    public static Choice Of(Reading? reading, params IReadOnlyList<string> flags) => reading switch
    {
        null => Nothing,
        { Refused: { } code } => new Choice { Blocked = code, Readings = [reading] },
        _ => new Choice { Kind = reading.Kind, Value = reading.Value, Readings = [reading], Flags = flags },
    };

    public static Choice Median(IReadOnlyList<Reading> readings)
    {
        var values = readings.Select(reading => reading.Value).Order().ToArray();
        var middle = values.Length / 2;
        return new Choice
        {
            Kind = readings[0].Kind,
            Value = values.Length % 2 == 1 ? values[middle] : (values[middle - 1] + values[middle]) / 2,
            Readings = readings,
        };
    }

    public static Choice Block(string code, params IReadOnlyList<Reading> readings) => new() { Blocked = code, Readings = readings };
}
