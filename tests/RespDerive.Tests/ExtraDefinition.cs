using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Tests;

/// <summary>An invented value, to show that one file is all a new value takes.</summary>
public sealed class ExtraDefinition : Definition
{
    private static readonly Slot Rate = new(Kinds.RateTotal, new Pairing.Nearest(TimeSpan.FromHours(2), TimeSpan.FromHours(2)));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("plateau-rate-product", "PRP", "product of plateau pressure and rate", "cm[H2O]", 1, 9000,
        Tolerance.None, [Slots.Plateau, Rate], x => x[Slots.Plateau] * x[Rate]);

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Invented";

    /// <inheritdoc/>
    public override string Summary => "Plateau pressure times breath rate; means nothing.";

    /// <inheritdoc/>
    public override string Equation => "PRP = Pplat·RR";

    /// <inheritdoc/>
    public override string Assumptions => "None; the value is invented.";

    /// <inheritdoc/>
    public override string Caution => "Means nothing.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (100, 1000);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Plateau]);

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations => [new("Invented for this test")];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors => [new(Evidence.Limit, "exact on paper: 24·20", 480, 1e-9, ("Pplat", 24, "cm[H2O]"), ("RR", 20, "/min"))];
}
