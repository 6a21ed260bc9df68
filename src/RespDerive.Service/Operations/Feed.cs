using RespDerive.Storage;
using RespDerive.Timeline;

namespace RespDerive.Service.Operations;

/// <summary>What the service does, told to a screen in the same process. Nobody listens outside the demo.</summary>
public sealed class Feed
{
    /// <summary>A new resource version was journalled; its type.</summary>
    public event Action<string>? OnReceived;

    /// <summary>A turn was committed.</summary>
    public event Action<TurnChanges>? OnTurn;

    /// <summary>The server has taken an edition of a result.</summary>
    public event Action<Outcome, int>? OnDelivered;

    /// <summary>The server has refused one for good; code and what was wrong where.</summary>
    public event Action<string, string>? OnParked;

    internal void Received(string type) => OnReceived?.Invoke(type);

    internal void Turned(TurnChanges changes) => OnTurn?.Invoke(changes);

    internal void Delivered(Outcome outcome, int revision) => OnDelivered?.Invoke(outcome, revision);

    internal void Parked(string code, string text) => OnParked?.Invoke(code, text);
}
