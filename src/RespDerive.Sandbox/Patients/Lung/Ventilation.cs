namespace RespDerive.Sandbox.Patients.Lung;

/// <summary>How a breath is driven.</summary>
internal enum BreathMode
{
    VolumeControlled,
    PressureControlled,
    PressureSupport,
}

/// <summary>What the ventilator is set to.</summary>
internal sealed record Ventilation(BreathMode Mode)
{
    /// <summary>Volume control: L.</summary>
    public double TidalVolume { get; init; }

    /// <summary>Volume control, constant flow: L/s.</summary>
    public double Flow { get; init; }

    /// <summary>Pressure modes: cm[H2O] above PEEP.</summary>
    public double InspiratoryPressure { get; init; }

    /// <summary>Pressure modes: s.</summary>
    public double InspiratoryTime { get; init; }

    /// <summary>Breaths per minute.</summary>
    public double Rate { get; init; }

    /// <summary>cm[H2O].</summary>
    public double Peep { get; init; }

    /// <summary>Fraction.</summary>
    public double FiO2 { get; init; }

    /// <summary>Pressure of the patient's own muscles during inspiration, cm[H2O]; zero when passive.</summary>
    public double Effort { get; init; }

    public bool Passive => Effort == 0;

    public double Cycle => 60 / Rate;
}
