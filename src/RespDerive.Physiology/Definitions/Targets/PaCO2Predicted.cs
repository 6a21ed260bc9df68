using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Arterial carbon dioxide tension that a production and an alveolar ventilation lead to.</summary>
/// <remarks>PaCO2 = 0.863·VCO2/VA, the alveolar ventilation equation turned round. A prediction: only by hand, never published.</remarks>
public sealed class PaCO2Predicted : Definition
{
    private static readonly Slot Ventilation = new(AlveolarVentilation.Value, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("paco2-predicted", "PaCO2pred", "predicted arterial carbon dioxide partial pressure", "mm[Hg]", 5, 200,
        Tolerance.Deviation(0, 0.11, "typical"), [CarbonDioxideSlots.Production, Ventilation, CarbonDioxideSlots.Conversion],
        x => AlveolarVentilation.Of(x[CarbonDioxideSlots.Conversion], x[CarbonDioxideSlots.Production], x[Ventilation]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Targets";

    /// <inheritdoc/>
    public override string Summary => "PaCO2 predicted from carbon dioxide production and alveolar ventilation.";

    /// <inheritdoc/>
    public override string Equation => "PaCO2pred = factor·VCO2/VA";

    /// <inheritdoc/>
    public override string Assumptions => "Steady state; no inspired carbon dioxide. Constant: 0.863 mm[Hg]·L/mL. No range given by the source.";

    /// <inheritdoc/>
    public override string Caution => "A prediction, not a measurement: it never stands in for a blood gas. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (30, 60);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Factor 0.863 = 760·310.15/273.15/1000 mm[Hg]·L/mL (760 mm[Hg], 37 °C, 0 °C): gas laws; West JB. Respiratory Physiology, chapter on ventilation (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "1000 mL/min over 21.575 L/min: 863/21.575", 40, 1e-9,
            ("VCO2", 1000, "mL/min"), ("VA", 21.575, "L/min"), ("factor", 0.863, "mm[Hg].L/mL")),
        new(Evidence.Limit, "half the ventilation, twice the tension", 80, 1e-9,
            ("VCO2", 200, "mL/min"), ("VA", 2.1575, "L/min")),
    ];
}
