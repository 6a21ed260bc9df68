namespace RespDerive.Sandbox.Patients.Gas;

/// <summary>
/// Oxygen dissociation curve at 37 °C: Severinghaus JW. Simple, accurate equations for human blood O2 dissociation
/// computations. J Appl Physiol 1979;46:599-602, equation 1 and its pH shift (from memory, without the base-excess term).
/// </summary>
internal static class Dissociation
{
    /// <summary>Saturation (0 to 1) of blood at a PO2 in mm[Hg].</summary>
    public static double Saturation(double po2, double ph = 7.40)
    {
        if (po2 <= 0)
        {
            return 0;
        }
        var standard = po2 * Math.Exp((7.40 - ph) * (Math.Pow(po2 / 26.6, 0.184) - 2.2));
        return 1 / ((23400 / ((standard * standard * standard) + (150 * standard))) + 1);
    }

    /// <summary>Oxygen content in mL/dL (Hüfner 1.34 mL/g, solubility 0.003 mL/dL/mm[Hg]).</summary>
    public static double Content(double po2, double ph, double hemoglobin) =>
        (1.34 * hemoglobin * Saturation(po2, ph)) + (0.003 * po2);

    /// <summary>The PO2 at which blood has this content; bisection, since content rises with PO2.</summary>
    public static double Pressure(double content, double ph, double hemoglobin)
    {
        double low = 1, high = 800;
        for (var i = 0; i < 60; i++)
        {
            var middle = (low + high) / 2;
            (low, high) = Content(middle, ph, hemoglobin) < content ? (middle, high) : (low, middle);
        }
        return (low + high) / 2;
    }
}
