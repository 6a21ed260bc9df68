using System.Text.Json.Nodes;

namespace RespDerive.Sandbox.Patients;

/// <summary>What an event of the ward is.</summary>
public enum WardEventKind
{
    /// <summary>Patient, Encounter, Device, DeviceMetric, height.</summary>
    Standing,

    /// <summary>A ventilator setting.</summary>
    Setting,

    /// <summary>A value the devices stream.</summary>
    Measurement,

    /// <summary>Plateau or total PEEP of a hold.</summary>
    Hold,

    /// <summary>A blood gas result, its Specimen or what groups them.</summary>
    BloodGas,

    /// <summary>The same message once more.</summary>
    Duplicate,

    /// <summary>A corrected value.</summary>
    Correction,

    /// <summary>A value entered in error.</summary>
    Withdrawal,
}

/// <summary>One message of the ward: a whole resource under the ward's own id, to be written by update.</summary>
/// <param name="EventTime">When it happened at the bedside.</param>
/// <param name="FilingTime">When it reached the record.</param>
/// <param name="Kind">What it is.</param>
/// <param name="Patient"><c>Patient/id</c>.</param>
/// <param name="PatientName">Invented name.</param>
/// <param name="Type">Resource type.</param>
/// <param name="Id">Resource id.</param>
/// <param name="Summary">One line for a screen.</param>
/// <param name="Json">The resource.</param>
public sealed record ScenarioEvent(
    DateTimeOffset EventTime, DateTimeOffset FilingTime, WardEventKind Kind, string Patient, string PatientName, string Type, string Id, string Summary, JsonObject Json);
