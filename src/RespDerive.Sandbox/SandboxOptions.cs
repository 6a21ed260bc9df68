namespace RespDerive.Sandbox;

/// <summary>How the sandbox endpoint behaves; every default suits a test.</summary>
public sealed class SandboxOptions
{
    /// <summary>TCP port on 127.0.0.1; 0 lets the system choose one.</summary>
    public int Port { get; init; }

    /// <summary>The clock behind <c>meta.lastUpdated</c> and the journal. Delays and back-off run in real time.</summary>
    public TimeProvider Clock { get; init; } = TimeProvider.System;

    /// <summary>Entries on a page when the client does not ask.</summary>
    public int DefaultPageSize { get; init; } = 50;

    /// <summary>Upper limit of <c>_count</c>.</summary>
    public int MaxPageSize { get; init; } = 1000;

    /// <summary>
    /// Check posted resources against the R4 model (422 when they fail).
    /// Off, only JSON and <c>resourceType</c> are checked, so that a test can plant a defective resource.
    /// </summary>
    public bool Validate { get; init; } = true;

    /// <summary>Attempts to deliver one notification before it is dropped and counted.</summary>
    public int NotificationAttempts { get; init; } = 4;

    /// <summary>First back-off between attempts; it doubles each time.</summary>
    public TimeSpan NotificationBackOff { get; init; } = TimeSpan.FromMilliseconds(50);
}
