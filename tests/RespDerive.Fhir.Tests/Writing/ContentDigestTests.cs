using System.Text;
using System.Text.Json.Nodes;
using RespDerive.Fhir.Writing;

namespace RespDerive.Fhir.Tests.Writing;

public sealed class ContentDigestTests
{
    private static readonly string Expected = ContentDigest.Of(Samples.Renderer().Observation(Samples.DrivingPressure, Samples.First));

    private static string After(Action<JsonObject> change)
    {
        var json = JsonNode.Parse(FhirJson.Bytes(Samples.Renderer().Observation(Samples.DrivingPressure, Samples.First)))!.AsObject();
        change(json);
        return ContentDigest.Of(Encoding.UTF8.GetBytes(json.ToJsonString()));
    }

    [Fact]
    public void What_a_server_may_change_does_not_change_it()
    {
        Assert.Equal(Expected, After(json => (json["id"], json["meta"], json["text"]) = ("x", new JsonObject { ["versionId"] = "2" }, new JsonObject { ["status"] = "generated" })));
        Assert.Equal(Expected, After(json => json["valueQuantity"]!["value"] = 14));
        Assert.Equal(Expected, After(json => json["derivedFrom"]![0]!["reference"] = "Observation/hold-4"));
        Assert.Equal(Expected, After(json => json["device"]!["reference"] = "Device/other"));
    }

    [Fact]
    public void What_says_something_else_changes_it()
    {
        Assert.NotEqual(Expected, After(json => json["valueQuantity"]!["value"] = 14.1));
        Assert.NotEqual(Expected, After(json => json["subject"]!["reference"] = "Patient/other"));
        Assert.NotEqual(Expected, After(json => json["derivedFrom"]![0]!["identifier"]!["value"] = "another"));
        Assert.NotEqual(Expected, After(json => json["code"]!["text"] = "another"));
        Assert.NotEqual(Expected, After(json => json["status"] = "amended"));
    }
}
