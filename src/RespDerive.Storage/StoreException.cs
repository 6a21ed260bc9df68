namespace RespDerive.Storage;

/// <summary>The store cannot do what was asked; <see cref="Code"/> never changes, the message may.</summary>
public sealed class StoreException : Exception
{
    /// <summary>The file or a connection cannot promise that a commit survives power loss.</summary>
    public const string NotDurable = "store-not-durable";

    /// <summary>A newer version of this software has changed the file.</summary>
    public const string NewerThanSoftware = "store-newer-than-software";

    /// <summary>The file cannot be opened, is damaged, or belongs to another program.</summary>
    public const string Unusable = "store-unusable";

    /// <summary>A write or commit failed; nothing more is written until the service is started again.</summary>
    public const string Failed = "store-failed";

    /// <summary>Another process held the file for too long; may be tried again.</summary>
    public const string Busy = "store-busy";

    /// <summary>The store was closed.</summary>
    public const string Closed = "store-closed";

    internal StoreException(string code, string message, Exception? cause = null) : base(message, cause) => Code = code;

    /// <summary>One of the codes of this class.</summary>
    public string Code { get; }
}
