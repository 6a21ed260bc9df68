using RespDerive.Storage.Tests;

return args switch
{
    ["append", var path] => await Crash.AppendAsync(path, Console.Out),
    _ when args.Contains("--server") || args.Contains("--internal-msbuild-node") =>
        await Xunit.MicrosoftTestingPlatform.TestPlatformTestFramework.RunAsync(args, SelfRegisteredExtensions.AddSelfRegisteredExtensions),
    _ => await Xunit.Runner.InProc.SystemConsole.ConsoleRunner.Run(args),
};
