using System.Reflection;

namespace RespDerive.Service;

/// <summary>What this software is.</summary>
public static class Software
{
    /// <summary>Its version, without build metadata.</summary>
    public static string Version { get; } =
        (typeof(Software).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "0.0.0").Split('+')[0];
}
