using RespDerive.Sandbox.Patients.Charting;
using RespDerive.Sandbox.Patients.Gas;
using RespDerive.Sandbox.Patients.Lung;

namespace RespDerive.Sandbox.Patients;

/// <summary>A planned change of settings, some hours after the start.</summary>
internal sealed record PlannedStep(double Hours, Func<Ventilation, Ventilation> Change);

/// <summary>One kind of invented patient: who, which illness, how it runs, and how this bed's systems report.</summary>
internal sealed record Profile
{
    public required string GivenName { get; init; }
    public required string Gender { get; init; }
    public required string BirthDate { get; init; }

    /// <summary>cm.</summary>
    public required double Height { get; init; }

    public required Units Units { get; init; }
    public required Ventilation Start { get; init; }
    public required PlannedStep[] Plan { get; init; }

    /// <summary>The lung after some hours.</summary>
    public required Func<double, RespiratorySystem> Lung { get; init; }

    /// <summary>Gas exchange after some hours.</summary>
    public required Func<double, Circulation> Body { get; init; }

    /// <summary>Range of SpO2 within which staff leave FiO2 alone.</summary>
    public required (double Low, double High) SpO2Target { get; init; }

    /// <summary>The analyser's results carry the time of analysis; only the Specimen knows when blood was drawn.</summary>
    public bool AnalysisTime { get; init; }

    /// <summary>How the results of one sample are held together.</summary>
    public Grouping Grouping { get; init; }

    /// <summary>The ventilator has an oxygen cell and streams what it measures; without, only the setting tells FiO2.</summary>
    public bool MeasuresOxygen { get; init; } = true;

    /// <summary>Holds are sent by the ventilator itself, not written down by a person.</summary>
    public bool HoldsFromDevice { get; init; }
}

internal enum Grouping
{
    None,
    Report,
    Panel,
}
