namespace RespDerive.Physiology;

/// <summary>What became of one computation: a number with its uncertainty, or a reason for withholding it.</summary>
public sealed record Computation
{
    /// <summary>A thread evaluates one definition after the other.</summary>
    [ThreadStatic]
    private static Evaluation? _evaluation;

    /// <summary>Unrounded, canonical unit; NaN when withheld.</summary>
    public double Value { get; init; } = double.NaN;

    /// <summary>The number as published.</summary>
    public decimal Published { get; init; }

    /// <summary>Standard uncertainty, k = 1, same unit.</summary>
    public double Uncertainty { get; init; }

    /// <summary>Variance shares.</summary>
    public IReadOnlyList<Share> Shares { get; init; } = [];

    /// <summary>Flags, ordered.</summary>
    public IReadOnlyList<string> Flags { get; init; } = [];

    /// <summary>Method variant; null for the plain method.</summary>
    public string? Variant { get; init; }

    /// <summary>The band of a coded result, whose <see cref="Value"/> is the index of its code and which has neither unit nor uncertainty of its own; null for a number.</summary>
    public Placement? Placement { get; init; }

    /// <summary>Reason for withholding; null when there is a value.</summary>
    public string? Withheld { get; init; }

    /// <summary>What is missing, in words, when <see cref="Withheld"/> says so.</summary>
    public IReadOnlyList<string> Missing { get; init; } = [];

    /// <summary>Evaluates a definition on its roots. Never throws for any combination of roots.</summary>
    public static Computation Of(Definition definition, Roots roots)
    {
        var evaluation = _evaluation ??= new Evaluation();
        evaluation.Run(definition, roots);
        return new Computation
        {
            Value = evaluation.Value,
            Published = evaluation.Published,
            Uncertainty = evaluation.Uncertainty,
            Shares = evaluation.Shares.ToArray(),
            Flags = evaluation.Flags.ToArray(),
            Variant = evaluation.Variant,
            Placement = evaluation.Placement,
            Withheld = evaluation.Withheld,
            Missing = evaluation.Missing.ToArray(),
        };
    }

    /// <summary>Codes of the gates that trip.</summary>
    public static IEnumerable<string> Tripped(Definition definition, Roots roots) =>
        definition.Plan.Gates.Where(gate => gate.Trips(roots)).Select(gate => gate.Code);
}
