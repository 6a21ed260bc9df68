using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology.Definitions;

/// <summary>Tension of half saturation by the shifts of Dash.</summary>
/// <remarks>
/// P50 = 26.8·Π(P50k/26.8) over four shifts: pH 26.8 − 25.535·d + 10.646·d² − 1.764·d³, d = pHrbc − 7.24, pHrbc = 0.795·pH + 1.357;
/// CO2 26.8 + 0.1273·c + 1.083e-4·c², c = PCO2 − 40; DPG 26.8 + 795.63·g − 19660.89·g², g = DPG − 0.00465 mol/L;
/// temperature 26.8 + 1.435·u + 0.04163·u² + 0.000686·u³, u = T − 37. The pH of the shift is that of the red cell, computed from plasma pH.
/// </remarks>
public sealed class P50Dash : Definition
{
    private static readonly Slot Phosphate = new Slot(Kinds.Diphosphoglycerate, new Pairing.Site(TimeSpan.Zero));

    /// <summary>The result as a kind.</summary>
    public static readonly Kind Value = Kind.Derived("p50-dash", "P50dash", "half-saturation tension by the shifts of Dash", "mm[Hg]", 10, 60,
        Tolerance.Deviation(1, 0, "typical"), [BloodSlots.Ph, BloodSlots.CarbonDioxide, Phosphate, BloodSlots.Temperature],
        x => Of(x[BloodSlots.Ph], x[BloodSlots.CarbonDioxide], x[Phosphate], x[BloodSlots.Temperature]));

    /// <inheritdoc/>
    public override Kind Result => Value;

    /// <inheritdoc/>
    public override bool OnByDefault => false;

    /// <inheritdoc/>
    public override string Purpose => "Oxygen in blood";

    /// <inheritdoc/>
    public override string Summary => "Half-saturation tension expected from pH, carbon dioxide tension, 2,3-DPG and temperature (Dash 2016).";

    /// <inheritdoc/>
    public override string Equation => "P50dash = 26.8·(P50pH/26.8)·(P50CO2/26.8)·(P50DPG/26.8)·(P50T/26.8); P50pH = 26.8 − 25.535·d + 10.646·d² − 1.764·d³, d = 0.795·pH + 1.357 − 7.24; P50CO2 = 26.8 + 0.1273·c + 1.083e-4·c², c = PCO2 − 40; P50DPG = 26.8 + 795.63·g − 19660.89·g², g = DPG/1000 − 0.00465; P50T = 26.8 + 1.435·u + 0.04163·u² + 0.000686·u³, u = T − 37";

    /// <inheritdoc/>
    public override string Assumptions => "Adult haemoglobin. 2,3-DPG is assumed (4.65 mmol/L) unless given. No range given by the source beyond physiological conditions.";

    /// <inheritdoc/>
    public override string Caution => "An estimate, not a measurement: a shifted curve of the patient (fetal or abnormal haemoglobin, 2,3-DPG) and carboxy- or methaemoglobin are not seen. Not the P50 of the patient.";

    /// <inheritdoc/>
    public override int Decimals => 1;

    /// <inheritdoc/>
    public override (double Least, double Greatest) Usual => (24, 29);

    /// <inheritdoc/>
    public override Calling Calling => new([Kinds.PhArterial]);

    /// <inheritdoc/>
    public override IReadOnlyList<Citation> Citations =>
    [
        new("Dash RK, Korman B, Bassingthwaighte JB. Simple accurate mathematical models of blood HbO2 and HbCO2 dissociation curves at varied physiological conditions. Eur J Appl Physiol 2016;116:97"),
    ];

    /// <inheritdoc/>
    public override IReadOnlyList<Vector> Vectors =>
    [
        new(Evidence.Limit, "standard conditions leave 26.8: 0.795·7.40 + 1.357 = 7.24", 26.8, 1e-9, ("pH_plasma", 7.4, "[pH]"), ("PCO2", 40, "mm[Hg]"), ("DPG", 4.65, "mmol/L"), ("temp", 37, "Cel")),
        new(Evidence.Limit, "one shift alone: 26.8 + 1.435·2 + 0.04163·4 + 0.000686·8", 29.842008, 1e-9, ("pH_plasma", 7.4, "[pH]"), ("PCO2", 40, "mm[Hg]"), ("temp", 39, "Cel")),
    ];

    /// <inheritdoc/>
    public override IReadOnlyDictionary<string, Kind> Symbols => new Dictionary<string, Kind>(StringComparer.Ordinal) { ["pH_plasma"] = Kinds.PhArterial, ["temp"] = Kinds.GasTemperature };

    private const double Standard = 26.8;

    /// <summary>Plasma pH, carbon dioxide tension in mm[Hg], 2,3-DPG in mmol/L, temperature in °C; result in mm[Hg].</summary>
    public static double Of(double ph, double pco2, double dpg, double celsius)
    {
        var (d, c, g, u) = ((0.795 * ph) + 1.357 - 7.24, pco2 - 40, (dpg / 1000) - 0.00465, celsius - 37);
        var byPh = Standard - (25.535 * d) + (10.646 * d * d) - (1.764 * d * d * d);
        var byCarbonDioxide = Standard + (0.1273 * c) + (1.083e-4 * c * c);
        var byPhosphate = Standard + (795.63 * g) - (19660.89 * g * g);
        var byTemperature = Standard + (1.435 * u) + (0.04163 * u * u) + (0.000686 * u * u * u);
        return byPh * byCarbonDioxide * byPhosphate * byTemperature / (Standard * Standard * Standard);
    }
}
