using Hl7.Fhir.Model;
using RespDerive.Fhir.Writing;
using RespDerive.Physiology;

namespace RespDerive.Fhir.Tests.Writing;

public sealed class TransactionTests
{
    private const string Identity = "5d0c7a52-8f0e-5b7e-9f0a-2a6c1b3d4e5f";

    private static Bundle Rendered(Edition edition, Func<RenderOptions, RenderOptions>? change = null) => Samples.Renderer(change).Transaction(Samples.PfRatio, edition);

    [Fact]
    public void A_first_edition_is_created_unless_it_exists()
    {
        var bundle = Rendered(Samples.First);
        var request = bundle.Entry[0].Request;
        Assert.Equal((Bundle.HTTPVerb.POST, "Observation"), (request.Method, request.Url));
        Assert.Equal("identifier=https%3A%2F%2Frespderive.example%2Ffhir%2Fresult%7C" + Identity, request.IfNoneExist);
        Assert.All(request.IfNoneExist, c => Assert.True(char.IsAscii(c) && c is not ('+' or ' ')));
        Assert.Equal("urn:uuid:" + Identity, ((Provenance)bundle.Entry[1].Resource!).Target[0].Reference);
        Assert.Equal("urn:uuid:" + Identity, bundle.Entry[0].FullUrl);
    }

    [Fact]
    public void A_later_edition_updates_only_the_version_we_wrote()
    {
        var bundle = Rendered(Samples.Second);
        var request = bundle.Entry[0].Request;
        Assert.Equal((Bundle.HTTPVerb.PUT, "Observation/9001", "W/\"3\""), (request.Method, request.Url, request.IfMatch));
        Assert.Equal("9001", bundle.Entry[0].Resource!.Id);
        Assert.Equal("Observation/9001", ((Provenance)bundle.Entry[1].Resource!).Target[0].Reference);
    }

    [Fact]
    public void A_later_edition_without_the_version_before_is_refused()
    {
        Assert.Throws<ArgumentException>(() => Rendered(Samples.Second with { PreviousVersion = null }));
        Assert.Throws<ArgumentException>(() => Rendered(Samples.Second with { PreviousVersion = null }, options => options with { UsePutIds = true }));
        Assert.Throws<ArgumentException>(() => Rendered(Samples.Second with { ServerId = null }));
    }

    [Fact]
    public void With_our_own_ids_everything_is_put()
    {
        var first = Rendered(Samples.First, options => options with { UsePutIds = true, DeviceId = null });
        Assert.Equal("Observation/" + Identity, first.Entry[0].Request.Url);
        Assert.All(first.Entry, entry => Assert.Equal(Bundle.HTTPVerb.PUT, entry.Request.Method));
        Assert.Null(first.Entry[0].Request.IfMatch);
        var later = Rendered(Samples.Second, options => options with { UsePutIds = true });
        Assert.Equal(("Observation/" + Identity, "W/\"3\""), (later.Entry[0].Request.Url, later.Entry[0].Request.IfMatch));
        Assert.Contains(((Provenance)later.Entry[1].Resource!).Entity, entity => entity.What.Reference == $"Observation/{Identity}/_history/3");
    }

    [Fact]
    public void An_unknown_Device_is_created_once_and_pointed_at()
    {
        var bundle = Rendered(Samples.First, options => options with { DeviceId = null });
        var entry = bundle.Entry.Single(entry => entry.Resource is Device);
        Assert.StartsWith("identifier=", entry.Request.IfNoneExist, StringComparison.Ordinal);
        Assert.Equal(entry.FullUrl, ((Observation)bundle.Entry[0].Resource!).Device.Reference);
        Assert.Equal(entry.FullUrl, ((Provenance)bundle.Entry[1].Resource!).Agent[0].Who.Reference);
        Assert.DoesNotContain(Rendered(Samples.First).Entry, known => known.Resource is Device);
    }

    [Fact]
    public void Where_the_Device_is_does_not_change_the_digest()
    {
        static string Digest(Bundle bundle) => ((FhirString)((Provenance)bundle.Entry[1].Resource!).GetExtension(Samples.Renderer().Words.ContentDigest)!.Value!).Value!;
        var inside = Rendered(Samples.First, options => options with { DeviceId = null });
        Assert.Equal(Digest(Rendered(Samples.First)), Digest(inside));
        Assert.Equal(ContentDigest.Of((Observation)inside.Entry[0].Resource!), Digest(inside));
    }

    [Fact]
    public void A_transaction_stays_small()
    {
        var renderer = Samples.Renderer(options => options with { DeviceId = null });
        var library = renderer.Policy(Samples.Policy);
        var definition = renderer.Definition(Catalogue.Shipped.Find("pf-ratio")!);
        Assert.Equal(5, renderer.Transaction(Samples.PfRatio, Samples.First, library, definition).Entry.Count);
        Assert.Throws<ArgumentException>(() => renderer.Transaction(Samples.PfRatio, Samples.First, library, library, library, library));
    }

    [Fact]
    public void Full_urls_differ()
    {
        var renderer = Samples.Renderer(options => options with { DeviceId = null });
        var urls = renderer.Transaction(Samples.PfRatio, Samples.First, renderer.Policy(Samples.Policy)).Entry.ConvertAll(entry => entry.FullUrl);
        Assert.Equal(urls.Count, urls.Distinct().Count());
    }
}
