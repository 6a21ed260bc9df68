using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Part of the arterial oxygen that the body takes up.</summary>
/// <remarks>
/// O2ER = (CaO2 − CvO2)/CaO2, contents in mL/dL.
/// </remarks>
public sealed class OxygenExtractionRatio : Definition
{
    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("oxygen-extraction-ratio", "O2ER", "oxygen extraction ratio", "1", 0.02, 0.95,
        Tolerance.Deviation(0, 0.06, "typical"), [TransportGates.Arterial, TransportGates.Venous],
        x => Of(x[OxygenContent.Value], x[OxygenContentVenous.Value]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen transport";

    /// <inheritdoc/>
    public override string Summary => "Difference of arterial and mixed venous oxygen content over the arterial content.";

    /// <inheritdoc/>
    public override string Equation => "O2ER = (CaO2 − CvO2) / CaO2";

    /// <inheritdoc/>
    public override string Assumptions => "Mixed venous sample within 5 min of the arterial one; blood of the pulmonary artery. As for the oxygen contents.";

    /// <inheritdoc/>
    public override string Caution => "Central venous blood is no substitute. Rests on the constants shown. Not a diagnosis.";

    /// <inheritdoc/>
    public override int Decimals => 2;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (0.2, 0.3);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PaO2]) { OnlyWith = [Kinds.SvO2] };

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        TransportGates.ArterialSample with { TrippedBy = [("Hb", 12, "g/dL"), ("SaO2", 95, "%"), ("PaO2", 80, "mm[Hg]"), ("SvO2", 70, "%"), ("PvO2", 38, "mm[Hg]"), ("sample", "venous")] },
        TransportGates.MixedVenous with { TrippedBy = [("Hb", 12, "g/dL"), ("SaO2", 95, "%"), ("PaO2", 80, "mm[Hg]"), ("ScvO2", 70, "%"), ("PvO2", 38, "mm[Hg]")] },
        TransportGates.DyshemoglobinKnown with { TrippedBy = [("Hb", 12, "g/dL"), ("FO2Hb", 93, "%"), ("PaO2", 80, "mm[Hg]"), ("SvO2", 70, "%"), ("PvO2", 38, "mm[Hg]")] },
        TransportGates.VenousBelowArterial with { TrippedBy = [("CaO2", 19, "mL/dL"), ("CvO2", 19.5, "mL/dL")] },
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Ratio of consumption to delivery; common practice, no single source. Usual 0.20 to 0.30 (from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "exact on paper: (20 − 15)/20", 0.25, 1e-9, ("CaO2", 20, "mL/dL"), ("CvO2", 15, "mL/dL")),
    ];

    /// <summary>Both in mL/dL.</summary>
    public static double Of(double arterial, double venous) => (arterial - venous) / arterial;
}
