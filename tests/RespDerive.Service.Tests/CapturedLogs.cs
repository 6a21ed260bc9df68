using System.Text;

[assembly: AssemblyFixture(typeof(RespDerive.Service.Tests.CapturedLogs))]

namespace RespDerive.Service.Tests;

/// <summary>Everything that services of this run log, in place of standard error.</summary>
public sealed class CapturedLogs : IDisposable
{
    private static readonly StringBuilder s_text = new();
    private readonly TextWriter _before = Console.Error;

    public CapturedLogs() => Console.SetError(TextWriter.Synchronized(new StringWriter(s_text)));

    /// <summary>What has been logged so far.</summary>
    public static string Text
    {
        get
        {
            // The synchronized writer locks on itself, so writing and reading take turns.
            lock (Console.Error)
            {
                return s_text.ToString();
            }
        }
    }

    public void Dispose() => Console.SetError(_before);
}
