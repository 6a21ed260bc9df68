using RespDerive.Physiology.Definitions;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Physiology;

/// <summary>Gates and flag rules that several definitions share.</summary>
public static class CommonGates
{
    /// <summary>Expanded by this factor before a reading is called impossible.</summary>
    private const double K = 2;

    /// <summary>Highest barometric pressure taken when none is known, so that the gate errs towards publishing (mm[Hg]).</summary>
    private const double HighestPressure = 800;

    /// <summary>A sample of unstated site must be known to be arterial (AARC clinical practice guideline 2013: venous and capillary PO2 are no substitute).</summary>
    public static readonly Gate Arterial = new(Withheld.NotArterial, "the sample is not arterial, or its site is not known", [Kinds.Sample, Kinds.Po2],
        x => (x.Has(Kinds.Sample) && x.Code(Kinds.Sample) != "arterial") || (x.Has(Kinds.Po2) && !x.Has(Kinds.PaO2) && x.Code(Kinds.Sample) != "arterial"),
        ("PO2", 42, "mm[Hg]"), ("FiO2", 0.4, "1"), ("sample", "venous"));

    /// <summary>As <see cref="Arterial"/>, for values whose only gas is the carbon dioxide tension.</summary>
    public static readonly Gate ArterialCarbonDioxide = new(Withheld.NotArterial, "the sample is not arterial, or its site is not known", [Kinds.Sample],
        x => x.Has(Kinds.Sample) && x.Code(Kinds.Sample) != "arterial",
        ("PaCO2", 46, "mm[Hg]"), ("FiO2", 0.4, "1"), ("PB", 760, "mm[Hg]"), ("sample", "venous"));

    /// <summary>FiO2 must have been steady for 10 min before the draw (Cakar 2001: 10 min adequate without chronic lung disease).</summary>
    public static readonly Gate Equilibrated = new(Withheld.NotEquilibrated, "FiO2 was changed less than 10 min before the draw", [Kinds.FiO2Changed],
        x => x.Has(Kinds.FiO2Changed) && x[Kinds.FiO2Changed] < 10,
        ("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("FiO2_changed_before_draw", 4, "min"));

    /// <summary>Extracorporeal gas exchange sets the gases, not the lung.</summary>
    public static readonly Gate Ecls = new(Withheld.Ecls, "extracorporeal gas exchange is running", [Kinds.Ecls], x => x.Code(Kinds.Ecls) == "true",
        ("PaO2", 90, "mm[Hg]"), ("FiO2", 0.4, "1"), ("ecls", "true"));

    /// <summary>PaO2 above the alveolar PO2 with R = 1 (the highest it can be) by more than two standard uncertainties.</summary>
    public static readonly Gate BelowAlveolar = new(Withheld.Pao2ExceedsAlveolar, "PaO2 is above alveolar PO2 at R = 1", [Kinds.PaCO2, Kinds.BarometricPressure],
        ExceedsAlveolar, ("PaO2", 180, "mm[Hg]"), ("FiO2", 0.21, "1"), ("PaCO2", 40, "mm[Hg]"), ("PB", 760, "mm[Hg]"));

    /// <summary>Mechanics hold only without effort: effort hides pressure from the airway.</summary>
    public static readonly Gate Passive = new(Withheld.PatientNotPassive, "the patient makes breathing efforts", [Kinds.PatientEffort],
        x => x.Code(Kinds.PatientEffort) == "true", ("VT", 420, "mL"), ("Pplat", 24, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]"), ("patient_effort", "true"));

    /// <summary>A peak pressure contains the resistive drop and never stands in for a plateau; a given compliance needs neither.</summary>
    public static readonly Gate PlateauMeasured = new(Withheld.NoPlateau, "only a peak pressure is given, no plateau pressure of an end-inspiratory hold", [],
        x => x.Has(Kinds.Peak) && !x.Has(Kinds.Plateau) && !x.Has(StaticCompliance.Value),
        ("VT", 420, "mL"), ("Ppeak", 31, "cm[H2O]"), ("PEEPtot", 10, "cm[H2O]")) { ReadsByHand = [Kinds.Peak] };

    /// <summary>Pressure that distends the respiratory system must be above zero.</summary>
    public static readonly Gate PlateauAbovePeep = new(Withheld.NonPositiveDrivingPressure, "plateau pressure is not above total PEEP", [],
        x => x.Has(Slots.Plateau) && x.Has(Slots.Peep) && x[Slots.Plateau] <= x[Slots.Peep],
        ("VT", 420, "mL"), ("Pplat", 12, "cm[H2O]"), ("PEEPtot", 12, "cm[H2O]"));

    /// <summary>The formula is for adults.</summary>
    public static readonly Gate Adult = new(Withheld.AgeOutOfRange, "the patient is under 18", [Kinds.Age],
        x => x.Has(Kinds.Age) && x[Kinds.Age] < 18, ("sex", "male"), ("height", 170, "cm"), ("age", 12, "a"));

    /// <summary>Predicted weight has one formula for each sex and none for an unknown one.</summary>
    public static readonly Gate SexKnown = new(Withheld.SexUnknown, "the sex is unknown", [],
        x => x.Code(Kinds.Sex) == "unknown" && !x.Has(PredictedBodyWeight.Value), ("sex", "unknown"), ("height", 170, "cm"));

    /// <summary>Raised when the age is not known to be of an adult; a given predicted weight answers for itself.</summary>
    public static readonly FlagRule AgeUnconfirmed = new(Flags.AgeUnconfirmed, [Kinds.Age], x => !x.Has(Kinds.Age) && !x.Has(PredictedBodyWeight.Value));

    /// <summary>Raised when nothing shows whether the patient was passive.</summary>
    public static readonly FlagRule PassivityUnconfirmed = new(Flags.PassivityUnconfirmed, [Kinds.PatientEffort], x => !x.Has(Kinds.PatientEffort));

    /// <summary>FiO2 changed 10 to 20 min before, PEEP lowered under 15 or raised under 60 min before (Chiumello 2013 for PEEP).</summary>
    public static readonly FlagRule Settling = new(Flags.Settling, [Kinds.FiO2Changed, Kinds.PeepLowered, Kinds.PeepRaised],
        x => (x.Has(Kinds.FiO2Changed) && x[Kinds.FiO2Changed] is >= 10 and < 20)
            || (x.Has(Kinds.PeepLowered) && x[Kinds.PeepLowered] < 15)
            || (x.Has(Kinds.PeepRaised) && x[Kinds.PeepRaised] < 60));

    private static bool ExceedsAlveolar(Roots x) =>
        x.Has(Slots.PaO2) && x.Has(Slots.FiO2) && Excess(x) is > 0 and var excess && excess > K * Budget.Standard(x, Excess);

    private static double Excess(Roots x)
    {
        var pressure = x.Has(Kinds.BarometricPressure) ? x[Kinds.BarometricPressure] : HighestPressure;
        return x[Slots.PaO2] - ((x[Slots.FiO2] * (pressure - 47)) - (x.Has(Kinds.PaCO2) ? x[Kinds.PaCO2] : 0));
    }
}
