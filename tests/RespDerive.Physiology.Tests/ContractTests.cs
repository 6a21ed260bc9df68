using System.Globalization;

namespace RespDerive.Physiology.Tests;

/// <summary>
/// What each revision gave for its worked examples is written down, a line for each definition and revision: the number published,
/// and unrounded to nine figures, or the code of the band. A line that is there may grow by new examples at its end and never change: a number that changes needs a new revision.
/// </summary>
/// <remarks>With the environment variable RESPDERIVE_APPROVE=1 the test adds the lines and examples that are missing; it changes none.</remarks>
public sealed class ContractTests
{
    [Fact]
    public void Outputs_change_only_with_a_new_revision()
    {
        var approved = Read();
        var found = Catalogue.Shipped.Revisions.ToDictionary(Name, Line, StringComparer.Ordinal);

        var changed = approved.Where(line => !found.TryGetValue(line.Key, out var now) || !IsGrown(line.Value, now)).Select(line => $"{line.Key}: was {line.Value}, is {found.GetValueOrDefault(line.Key, "gone")}");
        Assert.True(!changed.Any(), "Outputs changed without a new revision; keep the old definition, frozen, and raise Revision:\n" + string.Join('\n', changed));
        if (Environment.GetEnvironmentVariable("RESPDERIVE_APPROVE") == "1")
        {
            File.WriteAllText(Approved(), string.Concat(Catalogue.Shipped.Revisions.Select(definition => $"{Name(definition)}: {found[Name(definition)]}\n")));
            return;
        }

        var missing = found.Where(line => !approved.TryGetValue(line.Key, out var was) || was != line.Value).Select(line => $"{line.Key}: {line.Value}");
        Assert.True(!missing.Any(), "Not in Approved/outputs.txt; look at them, then run this test once with RESPDERIVE_APPROVE=1:\n" + string.Join('\n', missing));
    }

    [Theory]
    [InlineData("1 (1), 2 (2)", "1 (1), 2 (2)", true)]
    [InlineData("1 (1), 2 (2)", "1 (1), 2 (2), 3 (3)", true)]
    [InlineData("1 (1), 2 (2)", "1 (1), 2 (2.1)", false)]
    [InlineData("1 (1), 2 (2)", "1 (1)", false)]
    [InlineData("1 (1)", "1 (1), 2 (2)", true)]
    [InlineData("1 (1)", "1 (10), 2 (2)", false)]
    public void A_line_may_grow_at_its_end_only(string was, string now, bool allowed) => Assert.Equal(allowed, IsGrown(was, now));

    private static bool IsGrown(string was, string now) => now == was || now.StartsWith(was + ", ", StringComparison.Ordinal);

    private static string Name(Definition definition) => string.Create(CultureInfo.InvariantCulture, $"{definition.Key} {definition.Revision}");

    private static string Line(Definition definition) => string.Join(", ", definition.Vectors.Select(vector =>
    {
        var computed = ByHand.Compute(definition, vector.Inputs).Computation;
        return computed.Withheld ?? computed.Placement?.Code ?? string.Create(CultureInfo.InvariantCulture, $"{Publication.Text(computed.Published, definition.Decimals)} ({computed.Value:G9})");
    }));

    private static Dictionary<string, string> Read() => File.ReadLines(Approved()).Select(line => line.Split(": ", 2)).ToDictionary(parts => parts[0], parts => parts[1], StringComparer.Ordinal);

    private static string Approved()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (!File.Exists(Path.Combine(folder.FullName, "RespDerive.sln")))
        {
            folder = folder.Parent ?? throw new InvalidOperationException("RespDerive.sln not found above the tests.");
        }

        return Path.Combine(folder.FullName, "tests", "RespDerive.Physiology.Tests", "Approved", "outputs.txt");
    }
}
