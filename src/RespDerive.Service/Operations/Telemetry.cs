using System.Diagnostics.Metrics;

namespace RespDerive.Service.Operations;

/// <summary>Names of what is measured. Labels come from closed sets; none names a patient, resource or device.</summary>
internal static class Telemetry
{
    public static readonly Meter Meter = new("RespDerive");
}
