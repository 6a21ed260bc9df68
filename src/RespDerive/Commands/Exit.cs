namespace RespDerive.Commands;

/// <summary>Exit codes of every command.</summary>
internal static class Exit
{
    public const int Ok = 0;

    /// <summary>The command ran and found something: a withheld value, a mismatch.</summary>
    public const int Findings = 1;

    /// <summary>The command line or the configuration is wrong.</summary>
    public const int Usage = 2;

    /// <summary>Something around the program, such as the disk, does not allow it to run.</summary>
    public const int Environment = 3;

    /// <summary>Some of the data read cannot be used.</summary>
    public const int Data = 5;
}
