using System.Diagnostics;
using System.Text.Json.Nodes;

namespace RespDerive.Tests;

/// <summary>The built program itself, started as a process.</summary>
public sealed class ExecutableTests
{
    [Fact]
    public async Task The_executable_answers_a_line_while_its_input_is_still_open()
    {
        using var process = Start("compute", "--lines");
        await process.StandardInput.WriteLineAsync("""{"id":"a","definition":"pf-ratio","inputs":{"PaO2":{"value":85,"unit":"mm[Hg]"},"FiO2":0.4}}""");
        await process.StandardInput.FlushAsync(TestContext.Current.CancellationToken);

        // Read before the input is closed: an answer held back in a buffer would hang here.
        var answer = JsonNode.Parse((await process.StandardOutput.ReadLineAsync(TestContext.Current.CancellationToken))!)!;
        Assert.Equal(212.5, (double)answer["value"]!, 1e-9);
        Assert.Equal("213", (string)answer["published"]!);

        process.StandardInput.Close();
        await process.WaitForExitAsync(TestContext.Current.CancellationToken);
        Assert.Equal(0, process.ExitCode);
    }

    [Fact]
    public async Task The_executable_exits_with_the_code_of_the_command()
    {
        using var process = Start("compute", "pf-ratio", "pao2=90");
        await process.StandardOutput.ReadToEndAsync(TestContext.Current.CancellationToken);
        await process.WaitForExitAsync(TestContext.Current.CancellationToken);
        Assert.Equal(1, process.ExitCode);
    }

    private static Process Start(params string[] args) => Process.Start(
        new ProcessStartInfo("dotnet", [Path.Combine(AppContext.BaseDirectory, "respderive.dll"), .. args])
        {
            RedirectStandardInput = true,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
        })!;
}
