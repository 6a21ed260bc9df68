namespace RespDerive.Physiology;

/// <summary>Reasons for withholding a value: permanent codes, one sentence each, in order of precedence.</summary>
/// <remarks>When several apply, the first of <see cref="All"/> is published.</remarks>
public static class Withheld
{
#pragma warning disable CS1591 // the table below says what each one means
    public const string InputMissing = "input-missing";
    public const string InputInvalid = "input-invalid";
    public const string NoPatient = "no-patient";
    public const string NoIdentity = "no-identity";
    public const string UnitUnknown = "unit-unknown";
    public const string ValueNotExact = "value-not-exact";
    public const string ValueAbsent = "value-absent";
    public const string NotArterial = "not-arterial";
    public const string NotMixedVenous = "not-mixed-venous";
    public const string DifferentBlood = "different-blood";
    public const string Fio2UnitImplausible = "fio2-unit-implausible";
    public const string Fio2Estimated = "fio2-estimated";
    public const string NotEquilibrated = "not-equilibrated";
    public const string StalePair = "stale-pair";
    public const string Pao2ExceedsAlveolar = "pao2-exceeds-alveolar";
    public const string Ecls = "ecls";
    public const string PatientNotPassive = "patient-not-passive";
    public const string NoPlateau = "no-plateau";
    public const string NoPeepTotal = "no-peep-total";
    public const string PeepZero = "peep-zero";
    public const string PeepBelowMinimum = "peep-below-minimum";
    public const string FlowNotConstant = "flow-not-constant";
    public const string WrongMode = "wrong-mode-for-formula";
    public const string Leak = "leak";
    public const string AgeOutOfRange = "age-out-of-range";
    public const string SexUnknown = "sex-unknown";
    public const string HeightOutOfRange = "height-out-of-range";
    public const string Spo2Above97 = "spo2-above-97";
    public const string SaturationOutOfRange = "saturation-out-of-range";
    public const string Dyshemoglobin = "dyshaemoglobin";
    public const string NotOnRoomAir = "not-on-room-air";
    public const string NotOnHighFlow = "not-on-high-flow";
    public const string NotSpontaneous = "not-spontaneous";
    public const string ExpiredExceedsArterial = "expired-exceeds-arterial";
    public const string AlreadyCorrected = "already-temperature-corrected";
    public const string TemperatureOutOfRange = "temperature-out-of-range";
    public const string ConstantsMixed = "constants-mixed";
    public const string RateAboveCeiling = "rate-above-ceiling";
    public const string PressureUnknown = "pressure-unknown";
    public const string ConflictingInputs = "conflicting-inputs";
    public const string TimeUncertain = "time-uncertain";
    public const string NonPositiveDrivingPressure = "non-positive-driving-pressure";
    public const string VenousExceedsArterial = "venous-content-exceeds-arterial";
    public const string UncertaintyTooLarge = "uncertainty-too-large";
    public const string Impossible = "physiologically-impossible";
    public const string WithdrawnByPerson = "withdrawn-by-person";
#pragma warning restore CS1591

    /// <summary>Code and sentence of every reason, in order of precedence.</summary>
    public static IReadOnlyList<(string Code, string Text)> All { get; } =
    [
        (InputMissing, "A required input is missing at this time."),
        (NoPatient, "The resource names no patient."),
        (NoIdentity, "The resource has no id and no address, so it cannot be followed."),
        (UnitUnknown, "The unit is missing, or not one accepted for this kind of value."),
        (ValueNotExact, "The value carries a comparator (such as <) or is not a single number."),
        (ValueAbsent, "The source says that the value is absent."),
        (InputInvalid, "An input is unusable or outside its plausible range."),
        (NotArterial, "The sample is not arterial, or not known to be."),
        (NotMixedVenous, "The sample is not mixed venous blood of the pulmonary artery; central venous blood is no substitute."),
        (DifferentBlood, "The saturation and the tension are not of the same blood."),
        (Fio2UnitImplausible, "The inspired oxygen fraction is outside 0.205 to 1.0 after unit conversion."),
        (Fio2Estimated, "The inspired oxygen fraction is an estimate, not a delivered fraction."),
        (NotEquilibrated, "Settings changed too short a time before the sample was drawn."),
        (StalePair, "The inputs are too far apart in time."),
        (Pao2ExceedsAlveolar, "PaO2 is above what the alveoli can hold: wrong sample, wrong FiO2 or an air bubble."),
        (Ecls, "Gas exchange is supported outside the body."),
        (PatientNotPassive, "The patient is making breathing efforts."),
        (NoPlateau, "There is no plateau pressure from an end-inspiratory hold."),
        (NoPeepTotal, "Total PEEP is not known and the site does not accept set PEEP in its place."),
        (PeepZero, "PEEP is zero, and the value divides by it."),
        (PeepBelowMinimum, "The end-expiratory pressure is below the minimum the definition asks for."),
        (FlowNotConstant, "The inspiratory flow is not known to be constant."),
        (WrongMode, "The formula does not hold in this ventilation mode."),
        (Leak, "Inspired and expired volume differ too much."),
        (AgeOutOfRange, "The formula is for adults."),
        (SexUnknown, "The formula needs the sex, which is unknown."),
        (HeightOutOfRange, "The height is outside the range the formula was made for (140 to 210 cm)."),
        (Spo2Above97, "Above an SpO2 of 97 % the dissociation curve is too flat."),
        (SaturationOutOfRange, "The saturation is outside the range in which the value means anything."),
        (Dyshemoglobin, "Carboxy- and methaemoglobin are not known where they count."),
        (NotOnRoomAir, "The prediction holds on room air only."),
        (NotOnHighFlow, "The value is defined only for high-flow nasal oxygen."),
        (NotSpontaneous, "The value is defined only for spontaneous breaths."),
        (ExpiredExceedsArterial, "Expired carbon dioxide is not below arterial: not simultaneous, or not what it is called."),
        (AlreadyCorrected, "The blood gas is already corrected to the patient's temperature; it is never corrected twice."),
        (TemperatureOutOfRange, "The temperature is outside the range the correction holds for (25 to 42 °C)."),
        (ConstantsMixed, "Constants of different published sets are combined."),
        (RateAboveCeiling, "The rate would be above 35 /min, the ceiling of the ARDS Network protocol."),
        (PressureUnknown, "The barometric pressure is not known; it is never assumed."),
        (ConflictingInputs, "Two inputs of equal rank disagree."),
        (TimeUncertain, "The time of the anchor is not known to the minute."),
        (NonPositiveDrivingPressure, "The inspiratory pressure is not above the end-expiratory pressure."),
        (VenousExceedsArterial, "The venous oxygen content is not below the arterial one."),
        (UncertaintyTooLarge, "The result is too uncertain to mean anything."),
        (Impossible, "The result is outside what is physically possible."),
        (WithdrawnByPerson, "A person withdrew this result at the server."),
    ];

    /// <summary>Place in the order of precedence; an unknown code comes last.</summary>
    public static int Rank(string code)
    {
        for (var i = 0; i < All.Count; i++)
        {
            if (All[i].Code == code)
            {
                return i;
            }
        }

        return int.MaxValue;
    }

    /// <summary>The sentence of a code.</summary>
    public static string Text(string code) => Rank(code) is var rank && rank < All.Count ? All[rank].Text : code;
}
