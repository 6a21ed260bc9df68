namespace RespDerive.Sandbox.Patients;

/// <summary>
/// What really is the case for one patient at one instant, before any instrument. Pressures in cm[H2O] for
/// mechanics and mm[Hg] for gases, volumes in L, fractions as fractions.
/// </summary>
public sealed record Truth
{
    /// <summary><c>Patient/id</c> of the ward's resources.</summary>
    public required string Patient { get; init; }

    /// <summary>Event time; measurements, holds and draws of this patient carry exactly this instant.</summary>
    public required DateTimeOffset At { get; init; }

    /// <summary>No breathing effort: plateau and total PEEP mean what they say.</summary>
    public required bool Passive { get; init; }

    /// <summary>True compliance of the respiratory system, mL/cm[H2O].</summary>
    public required double Compliance { get; init; }

    /// <summary>Inspiratory resistance, cm[H2O].s/L.</summary>
    public required double Resistance { get; init; }

    /// <summary>Expiratory time constant, s.</summary>
    public required double ExpiratoryTimeConstant { get; init; }

    /// <summary>Highest airway pressure of the breath.</summary>
    public required double Peak { get; init; }

    /// <summary>Airway pressure in an inspiratory hold.</summary>
    public required double Plateau { get; init; }

    /// <summary>Mean airway pressure.</summary>
    public required double Mean { get; init; }

    /// <summary>PEEP delivered at the airway.</summary>
    public required double Peep { get; init; }

    /// <summary>Airway pressure in an expiratory hold: PEEP with the intrinsic part.</summary>
    public required double TotalPeep { get; init; }

    /// <summary>Expired tidal volume, L.</summary>
    public required double TidalVolume { get; init; }

    /// <summary>Breaths per minute.</summary>
    public required double Rate { get; init; }

    /// <summary>FiO2 delivered at the airway.</summary>
    public required double FiO2 { get; init; }

    /// <summary>Minutes since the delivered FiO2 last changed.</summary>
    public required double MinutesSinceFiO2Change { get; init; }

    public required double PaO2 { get; init; }
    public required double PaCO2 { get; init; }
    public required double Ph { get; init; }
    public required double SaO2 { get; init; }

    /// <summary>Alveolar PO2 with the patient's own respiratory quotient and the gas that is in the lung.</summary>
    public required double AlveolarPO2 { get; init; }

    /// <summary>True CO2 production over O2 consumption.</summary>
    public required double RespiratoryQuotient { get; init; }

    /// <summary>mm[Hg].</summary>
    public required double Barometric { get; init; }

    public required double Shunt { get; init; }

    /// <summary>Physiological dead space over tidal volume.</summary>
    public required double DeadSpace { get; init; }

    /// <summary>cm.</summary>
    public required double Height { get; init; }

    public required string Gender { get; init; }

    public double IntrinsicPeep => TotalPeep - Peep;
    public double DrivingPressure => Plateau - TotalPeep;

    /// <summary>PaO2/FiO2, mm[Hg].</summary>
    public double PfRatio => PaO2 / FiO2;

    /// <summary>Alveolar-arterial PO2 difference, mm[Hg].</summary>
    public double AaGradient => AlveolarPO2 - PaO2;

    /// <summary>L/min.</summary>
    public double MinuteVolume => TidalVolume * Rate;
}
