using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>P/F ratio with an oxygen tension imputed from the pulse oximeter.</summary>
/// <remarks>
/// PFimputed = P(SpO2) / FiO2, P from the inverse of the standard dissociation curve (pH 7.40, 37 °C), mm[Hg].
/// An imputed tension is no measured one: it is fed to no index and no band.
/// </remarks>
public sealed class PO2ImputedPf : Definition
{
    private static readonly Slot Saturation = new(Kinds.SpO2, new Pairing.ByHand());

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("po2-imputed-pf", "PFimputed", "P/F ratio with imputed oxygen tension", "mm[Hg]", 20, 700,
        Tolerance.Deviation(0, 0.2, "typical"), [Saturation, Slots.FiO2, new Slot(Kinds.SeveringhausMisfit, new Pairing.ByHand())],
        x => Of(x[Saturation] - x[Kinds.SeveringhausMisfit], x[Slots.FiO2]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool ByHandOnly => true;

    /// <inheritdoc/>
    public override string Purpose => "Oxygenation";

    /// <inheritdoc/>
    public override string Summary => "P/F ratio with the arterial oxygen tension imputed from SpO2 by the standard dissociation curve.";

    /// <inheritdoc/>
    public override string Equation => "PFimputed = P(SpO2) / FiO2";

    /// <inheritdoc/>
    public override string Assumptions => "SpO2 up to 97 %; a normal dissociation curve at pH 7.40 and 37 °C.";

    /// <inheritdoc/>
    public override string Caution => "An estimate: pulse oximetry overestimates in dark skin, poor perfusion and with carboxyhaemoglobin. Never in place of a measured P/F ratio.";

    /// <inheritdoc/>
    public override int Decimals => 0;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (50, 500);

    /// <inheritdoc/>
    public override Calling Calling => new([]);

    /// <inheritdoc/>
    public override IReadOnlyList<Gate> Gates =>
    [
        new Gate(Withheld.Spo2Above97, "SpO2 is above 97 %", [], x => x.Has(Saturation) && x[Saturation] > 97, ("SpO2", 98, "%"), ("FiO2", 0.5, "1")),
        CommonGates.Ecls with { TrippedBy = [("SpO2", 92, "%"), ("FiO2", 0.4, "1"), ("ecls", "true")] },
    ];

    /// <inheritdoc/>
    public override double? GreatestRelativeUncertainty => 0.3;

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Ellis RK. Determination of PO2 from saturation. J Appl Physiol 1989;67:902 (inverse of the curve)"),
        new("Brown SM et al. Nonlinear imputation of PaO2/FiO2 from SpO2/FiO2. Chest 2016;150:307 (use of that inverse; from memory)"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "the curve gives 0.9057971 at 60 mm[Hg] (216000 + 9000 = 225000; 225000/248400): 60 / 0.5", 120, 1e-6, ("SpO2", 90.57971014492754, "%"), ("FiO2", 0.5, "1")),
    ];

    /// <summary>SpO2 in percent, FiO2 a fraction; result in mm[Hg].</summary>
    public static double Of(double spo2, double fio2) => SeveringhausCurve.Tension(spo2 / 100) / fio2;
}
