using CsCheck;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class ResourceSetTests
{
    private static ResourceFacts Version(string id, int? hour, string? number, string mark) => Facts(
        "{\"resourceType\":\"Patient\",\"id\":\"" + id + "\",\"x\":\"" + mark + "\",\"meta\":{\"a\":1"
        + (hour is null ? "" : $",\"lastUpdated\":\"2031-05-06T{hour:00}:00:00Z\"") + (number is null ? "" : $",\"versionId\":\"{number}\"") + "}}");

    [Fact]
    public void A_later_change_wins_over_a_higher_version()
    {
        var set = new InMemoryResourceSet();

        Assert.True(set.Add(Version("1", 9, "8", "old")));
        Assert.True(set.Add(Version("1", 10, "1", "restored")));
        Assert.False(set.Add(Version("1", 9, "9", "late")));
        Assert.Equal("1", set.Find("Patient/1")!.Version);
    }

    [Fact]
    public void The_winner_does_not_depend_on_the_order_of_arrival()
    {
        var version = Gen.Select(Gen.Int[0, 3], Gen.Int[0, 3], Gen.Int[0, 5], (hour, number, mark) =>
            Version("1", hour == 0 ? null : hour, number == 0 ? null : $"{number}", $"{mark}")).Where(facts => !facts.Order.IsUnordered);

        Gen.Select(version.Array[1, 6], Gen.Int).Sample((versions, seed) =>
        {
            Assert.Equal(Winner(versions), Winner([.. versions.OrderBy(facts => HashCode.Combine(seed, facts.Order.Digest))]));
        });

        static string Winner(IEnumerable<ResourceFacts> versions)
        {
            var set = new InMemoryResourceSet();
            foreach (var facts in versions)
            {
                set.Add(facts);
            }

            return set.Find("Patient/1")!.Order.Digest;
        }
    }

    [Fact]
    public void Without_version_and_time_the_later_line_wins()
    {
        var set = new InMemoryResourceSet();
        set.Add(Version("1", null, null, "a"));
        set.Add(Version("1", null, null, "b"));
        var digest = set.Find("Patient/1")!.Order.Digest;
        set.Add(Version("1", null, null, "a"));

        Assert.NotEqual(digest, set.Find("Patient/1")!.Order.Digest);
    }

    [Fact]
    public void A_panel_that_drops_a_member_no_longer_holds_it()
    {
        static ResourceFacts Panel(int version, string member) => Facts(
            "{\"resourceType\":\"Observation\",\"id\":\"panel\",\"meta\":{\"versionId\":\"" + version + "\"},\"hasMember\":[{\"reference\":\"Observation/" + member + "\"}]}");
        var set = new InMemoryResourceSet();

        set.Add(Panel(1, "a"));
        Assert.Single(set.PanelsOf("Observation/a"));
        set.Add(Panel(2, "b"));

        Assert.Empty(set.PanelsOf("Observation/a"));
        Assert.Single(set.PanelsOf("Observation/b"));
    }

    [Fact]
    public void A_logical_reference_finds_its_resource_and_becomes_its_reference()
    {
        const string patient = "{\"resourceType\":\"Patient\",\"id\":\"p7\",\"identifier\":[{\"system\":\"urn:mrn\",\"value\":\"12\"}]}";
        var json = Observation(Loinc("2703-7"), Quantity("80", "mm[Hg]")).Replace("{\"reference\":\"Patient/p1\"}", "{\"identifier\":{\"system\":\"urn:mrn\",\"value\":\"12\"}}", StringComparison.Ordinal);

        Assert.Equal("Patient/p7", One(json, patient).Patient);
        Assert.Equal("identifier:urn:mrn|12", One(json).Patient);
    }
}
