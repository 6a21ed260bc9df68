using System.Text.Json.Nodes;

namespace RespDerive.Acceptance.Tests;

public sealed class DemoTests
{
    [Fact]
    public async Task Demo_derives_and_delivers_with_no_set_up_at_all()
    {
        var (code, output, error) = await Executable.RunAsync("demo", "--seconds", "20", "--output", "json");
        Assert.True(code == 0, error);
        var summary = JsonNode.Parse(output.TrimEnd().Split('\n')[^1])!.AsObject();
        Assert.Equal(["received", "readings", "results", "revisions", "retractions", "withheld", "delivered", "refused", "pending"], summary.Select(pair => pair.Key));
        Assert.True((long)summary["results"]! > 0, output);
        Assert.True((long)summary["delivered"]! > 0, output);
        Assert.Equal(0, (long)summary["refused"]!);

        // What is still under way when the time is up depends on the machine, so it is only told apart.
        Assert.True((long)summary["pending"]! >= 0, output);
    }
}
