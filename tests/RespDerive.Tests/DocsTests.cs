using RespDerive.Commands;
using RespDerive.Docs;
using RespDerive.Physiology;

namespace RespDerive.Tests;

public sealed class DocsTests
{
    public static TheoryData<string> Pages => [.. Reference.Of(Catalogue.Shipped).Keys];

    [Theory]
    [MemberData(nameof(Pages))]
    public void A_reference_page_in_the_repository_is_what_the_catalogue_says(string page)
    {
        var file = Repository.PathOf(["docs", "reference", .. page.Split('/')]);
        Assert.True(File.Exists(file), $"{page} is missing: run 'respderive docs' in the repository.");
        Assert.True(Reference.Of(Catalogue.Shipped)[page] == File.ReadAllText(file), $"{page} is stale: run 'respderive docs' in the repository.");
    }

    [Fact]
    public void The_reference_folder_holds_no_page_of_a_value_that_is_gone() => Assert.Equal(
        Reference.Of(Catalogue.Shipped).Keys.Where(page => page.StartsWith("derived/", StringComparison.Ordinal)).Select(page => page["derived/".Length..]),
        Directory.EnumerateFiles(Repository.PathOf("docs", "reference", "derived")).Select(file => Path.GetFileName(file)!).Order(StringComparer.Ordinal));

    [Fact]
    public void Every_picture_a_page_shows_is_drawn() => Assert.All(
        Catalogue.Shipped.All.Where(definition => Pictures.Caption(definition) is not null),
        definition => Assert.True(File.Exists(Repository.PathOf("docs", "reference", "plots", definition.Key + ".svg")), $"{definition.Key}: run the project tests/RespDerive.Plots in the repository."));

    [Fact]
    public void A_page_tells_all_a_reader_needs_to_check_the_number()
    {
        foreach (var definition in Catalogue.Shipped.All)
        {
            var page = DefinitionPage.Of(definition, Catalogue.Shipped);
            Assert.All(
                [definition.Equation, definition.Assumptions, definition.Caution, .. definition.Citations.Select(citation => citation.Text), .. definition.Gates.Select(gate => gate.Code), .. definition.Codes.Select(code => code.Code), .. definition.Vectors.Select(vector => vector.Source)],
                part => Assert.Contains(part, page.Replace("\\|", "|", StringComparison.Ordinal), StringComparison.Ordinal));
        }
    }

    [Theory]
    [InlineData("A = B·(C − D)/E", @"\mathrm{A} = \frac{\mathrm{B}\cdot \left(\mathrm{C} - \mathrm{D}\right)}{\mathrm{E}}")]
    [InlineData("A = B / (C − D)", @"\mathrm{A} = \frac{\mathrm{B}}{\mathrm{C} - \mathrm{D}}")]
    [InlineData("A = 1 / (1 + (B/C)^2.7)", @"\mathrm{A} = \frac{1}{1 + \left(\frac{\mathrm{B}}{\mathrm{C}}\right)^{2.7}}")]
    [InlineData("A = (B + C)·(D + E)/2", @"\mathrm{A} = \frac{\left(\mathrm{B} + \mathrm{C}\right)\cdot \left(\mathrm{D} + \mathrm{E}\right)}{2}")]
    [InlineData("SO2 = exp(1.1·ln(PO2) − 3e-4)", @"\mathrm{SO_{2}} = \exp\left(1.1\cdot \ln\left(\mathrm{PO_{2}}\right) - 3\cdot 10^{-4}\right)")]
    [InlineData("A = ∛(B + √(C² + 4π²))", @"\mathrm{A} = \sqrt[3]{\mathrm{B} + \sqrt{\mathrm{C}^{2} + 4\cdot \mathrm{π}^{2}}}")]
    [InlineData("A = B/C, C = max(D, 1), D in %", @"\begin{gathered} \mathrm{A} = \frac{\mathrm{B}}{\mathrm{C}} \\ \mathrm{C} = \max\left(\mathrm{D}, 1\right) \\ \text{D in \%} \end{gathered}")]
    [InlineData("A = B − C (= D)", @"\mathrm{A} = \mathrm{B} - \mathrm{C} = \mathrm{D}")]
    [InlineData("dP = Pes_ei − −3", null)]
    [InlineData("A = 50 (male) or 45 (female)", null)]
    [InlineData("A = B / (C − D", null)]
    [InlineData("A = f(B)", null)]
    [InlineData("A = 2 B", null)]
    public void Simple_algebra_is_set_as_such_and_nothing_else(string equation, string? latex) => Assert.Equal(latex, Latex.Of(equation));

    [Fact]
    public async Task A_folder_that_cannot_be_written_is_an_error_of_the_environment()
    {
        var (code, _, error) = await Cli.RunAsync("docs", "--out", Path.Combine(Repository.Root, "RespDerive.sln"));
        Assert.Equal(Exit.Environment, code);
        Assert.NotEmpty(error);
    }
}
