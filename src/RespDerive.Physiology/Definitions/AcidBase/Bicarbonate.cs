using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Bicarbonate of plasma by the Henderson-Hasselbalch equation.</summary>
/// <remarks>
/// HCO3 = α·PCO2·10^(pH − pK'). Solubility and pK' belong together; the default set is CLSI C46 (0.0307, 6.105).
/// Not the total carbon dioxide of a chemistry panel, which is about 1.2 mmol/L higher.
/// </remarks>
public sealed class Bicarbonate : Definition
{
    private static readonly Slot Solubility = new(Kinds.CO2Solubility, new Pairing.Site(TimeSpan.Zero));
    private static readonly Slot Pk = new(Kinds.CO2Pk, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("bicarbonate", "HCO3", "bicarbonate of arterial plasma", "mmol/L", 1, 80,
        Tolerance.Deviation(0.8, 0, "typical"), [CarbonDioxideSlots.Ph, Slots.PaCO2, Solubility, Pk],
        x => Of(x[Solubility], x[Slots.PaCO2], x[CarbonDioxideSlots.Ph], x[Pk]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Acid-base and temperature";

    /// <inheritdoc/>
    public override string Summary => "Actual bicarbonate from pH and carbon dioxide tension.";

    /// <inheritdoc/>
    public override string Equation => "HCO3 = alphaCO2·PCO2·10^(pH − pK)";

    /// <inheritdoc/>
    public override string Assumptions => "Arterial blood measured at 37 °C. Constants: CLSI C46 (0.0307 mmol/L/mm[Hg], 6.105) unless another published set is given whole: Zander (0.0304, 6.1), Siggaard-Andersen (0.230 mmol/L/kPa, 6.1). No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "The value the analyser reports goes before this one. Not the total carbon dioxide of a chemistry panel. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (18, 34);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PhArterial]) { NotWith = [Kinds.BicarbonateReported] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        CommonGates.ArterialCarbonDioxide with { TrippedBy = [.. Example, ("sample", "venous")] },
        CarbonDioxideGates.NotYetCorrected with { TrippedBy = [.. Example, ("corrected", "true")] },
        CarbonDioxideGates.OneBicarbonateSet with { TrippedBy = [.. Example, ("alphaCO2", 0.0304, "mmol/L/mm[Hg]"), ("pK", 6.105, "[pH]")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols { get; } = new Dictionary<string, Kind> { ["PCO2"] = Kinds.PaCO2, ["alpha"] = Kinds.CO2Solubility };

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("CLSI C46. Blood gas and pH analysis and related measurements (0.0307 and 6.105, from memory)"),
        new("Lang W, Zander R. The accuracy of calculated base excess in blood. Clin Chem Lab Med 2002;40:404, abstract (0.0304, 6.1, 24.26)"),
        new("Siggaard-Andersen O. Van Slyke equation (0.230 mmol/L/kPa and 6.1, from a public implementation)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Published, "Lang and Zander 2002: 24.26 mmol/L at 40 mm[Hg] and 7.40", 24.26, 0.005,
            ("PaCO2", 40, "mm[Hg]"), ("pH", 7.4, "[pH]"), ("alphaCO2", 0.0304, "mmol/L/mm[Hg]"), ("pK", 6.1, "[pH]")),
        new(Evidence.Published, "public test data of an open package for carbon dioxide content: 5 kPa, 7.40", 22.74763, 0.0005,
            ("PaCO2", 5, "kPa"), ("pH", 7.4, "[pH]"), ("alphaCO2", 0.0304, "mmol/L/mm[Hg]"), ("pK", 6.1, "[pH]")),
        new(Evidence.Limit, "one pH unit above pK', ten times the dissolved gas: 10·0.0307·50", 15.35, 1e-9,
            ("PaCO2", 50, "mm[Hg]"), ("pH", 7.105, "[pH]")),
    ];

    private static Given[] Example => [("PaCO2", 40, "mm[Hg]"), ("pH", 7.4, "[pH]")];

    /// <summary>Solubility per unit of the tension, tension, pH and pK'; mmol/L.</summary>
    public static double Of(double solubility, double tension, double ph, double pk) => solubility * tension * Math.Pow(10, ph - pk);
}
