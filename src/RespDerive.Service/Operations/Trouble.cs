using Microsoft.Extensions.Logging;

namespace RespDerive.Service.Operations;

/// <summary>Logging of exceptions without their messages, which may quote a resource or an address: type and place only.</summary>
internal static class Trouble
{
    public static void Report(ILogger logger, Exception exception, string what) =>
        logger.LogError("{What}: {Exception} at {Place}", what, exception.GetType().FullName, Place(exception));

    private static string Place(Exception exception) =>
        string.Join(" < ", (exception.StackTrace ?? "").Split('\n').Select(line => line.Trim()).Where(line => line.StartsWith("at RespDerive", StringComparison.Ordinal))
            .Take(4).Select(line => line.Split(" in ")[0]));
}
