using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Diffusing capacity per volume of lung that the test gas reached.</summary>
/// <remarks>KCO = DLCO/VA, both of one manoeuvre; DLCO at STPD, VA at BTPS.</remarks>
public sealed class Kco : Definition
{
    private static readonly Slot Anchor = new(Kinds.Dlco, new Pairing.AnchorItself());
    private static readonly Slot Volume = new(Kinds.AlveolarVolume, new Pairing.SameManoeuvre(TimeSpan.FromMinutes(2)));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("kco", "KCO", "transfer coefficient for carbon monoxide", "mL/min/mm[Hg]/L", 0.3, 12,
        Tolerance.Deviation(0, 0.06, "typical"), [Anchor, Volume], x => Of(x[Anchor], x[Volume]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Diffusion";

    /// <inheritdoc/>
    public override string Summary => "Diffusing capacity for carbon monoxide divided by alveolar volume.";

    /// <inheritdoc/>
    public override string Equation => "KCO = DLCO/VA";

    /// <inheritdoc/>
    public override string Assumptions => "Both from the same manoeuvre; VA at BTPS, DLCO at STPD; not adjusted for haemoglobin unless DLCO is. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "A lung function value: not for ventilated patients. Rises when the lung is not filled; normal KCO does not mean normal lungs. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (3, 6);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.Dlco]);

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["VA"] = Kinds.AlveolarVolume };

    /// <inheritdoc/>
    public override IReadOnlyList<StandardCode> Codes =>
    [
        StandardCode.Loinc("19916-6", "Diffusion capacity/Alveolar volume"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Graham BL et al. 2017 ERS/ATS standards for single-breath carbon monoxide uptake in the lung. Eur Respir J 2017;49:1600016", "10.1183/13993003.00016-2016"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: 24/6", 4, 1e-9,
            ("DLCO", 24, "mL/min/mm[Hg]"), ("VAeff", 6, "L")),
        new(Evidence.Limit, "half the lung reached, half the uptake: the coefficient stays", 4, 1e-9,
            ("DLCO", 12, "mL/min/mm[Hg]"), ("VAeff", 3000, "mL")),
    ];

    /// <summary>Diffusing capacity in mL/min/mm[Hg], alveolar volume in L.</summary>
    public static double Of(double dlco, double volume) => dlco / volume;
}
