namespace RespDerive.Physiology;

/// <summary>Conditions that are published with a value instead of withholding it: permanent codes, one short line each.</summary>
public static class Flags
{
#pragma warning disable CS1591 // the table below says what each one means
    public const string OutsideUsual = "outside-usual-range";
    public const string PeepNotTotal = "peep-not-total";
    public const string PassivityUnconfirmed = "passivity-unconfirmed";
    public const string Settling = "settling";
    public const string SettlingUnknown = "settling-unknown";
    public const string SettingUnconfirmed = "setting-unconfirmed";
    public const string ConflictingSource = "conflicting-source";
    public const string TimeUncertain = "time-uncertain";
    public const string ZoneAssumed = "zone-assumed";
    public const string AgeUnconfirmed = "age-unconfirmed";
    public const string PeakBelowPlateau = "peak-below-plateau";
    public const string Spo2Above97 = "spo2-above-97";
    public const string OrderUnknown = "order-unknown";
    public const string SpecimenUnread = "specimen-unread";
    public const string OtherDevice = "other-device";
    public const string DyshemoglobinUnknown = "dyshaemoglobin-unknown";
    public const string VenousTensionAssumed = "venous-tension-assumed";
    public const string SupportUnconfirmed = "support-unconfirmed";
    public const string AltitudeUnknown = "altitude-unknown";
    public const string BandUncertain = "band-uncertain";
    public const string ModeUnconfirmed = "mode-unconfirmed";
    public const string OnPressureSupport = "on-pressure-support";
    public const string CorrectionUnstated = "correction-unstated";
#pragma warning restore CS1591

    private static readonly Dictionary<string, string> Lines = new(StringComparer.Ordinal)
    {
        [OutsideUsual] = "Outside the usual range.",
        [PeepNotTotal] = "Total PEEP unknown: with unseen intrinsic PEEP, driving pressure reads falsely high and compliance falsely low.",
        [PassivityUnconfirmed] = "No evidence that the patient was passive: with effort, driving pressure reads falsely low and compliance falsely high.",
        [Settling] = "Settings changed shortly before; the value may still be settling.",
        [SettlingUnknown] = "No earlier setting is known, so a recent change cannot be excluded.",
        [SettingUnconfirmed] = "The setting used was last confirmed more than 60 min before.",
        [ConflictingSource] = "Another source gave an unequal value at the same time.",
        [TimeUncertain] = "Collection and charted time of the sample are more than 60 min apart.",
        [ZoneAssumed] = "The source gave no time zone; the site's zone was used.",
        [AgeUnconfirmed] = "It is not certain that the patient was an adult.",
        [PeakBelowPlateau] = "Peak pressure was below the plateau pressure of the same breath.",
        [Spo2Above97] = "SpO2 above 97 %: the ratio says little about oxygenation.",
        [OrderUnknown] = "The source gave neither version nor time of change; arrival order decided.",
        [SpecimenUnread] = "The specimen named by the source could not be read.",
        [CorrectionUnstated] = "Nothing says whether the analyser already corrected the gas to the patient's temperature; it must not be corrected twice.",
        [OtherDevice] = "The inputs come from different devices.",
        [DyshemoglobinUnknown] = "Carboxy- and methaemoglobin were not measured and are taken as none.",
        [VenousTensionAssumed] = "The mixed venous oxygen tension was not measured; its small part of the content is assumed.",
        [SupportUnconfirmed] = "The kind of respiratory support was taken on trust.",
        [AltitudeUnknown] = "The barometric pressure is not known, so there is no correction for altitude.",
        [BandUncertain] = "A cut-point lies within two standard uncertainties: a neighbouring band is possible.",
        [ModeUnconfirmed] = "The ventilation mode was taken on trust to be the one the formula is made for.",
        [OnPressureSupport] = "Pressure support was set: the index reads lower than in unsupported breathing.",
    };

    /// <summary>All flags with their line.</summary>
    public static IReadOnlyDictionary<string, string> All => Lines;

    /// <summary>The line of a flag.</summary>
    public static string Text(string flag) => Lines.GetValueOrDefault(flag, flag);
}
