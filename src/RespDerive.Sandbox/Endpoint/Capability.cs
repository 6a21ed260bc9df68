using System.Text.Json.Nodes;
using RespDerive.Sandbox.Search;

namespace RespDerive.Sandbox.Endpoint;

/// <summary>The CapabilityStatement at <c>/metadata</c>.</summary>
internal static class Capability
{
    public static FhirAnswer Statement(string baseUrl, DateTimeOffset at)
    {
        var statement = new JsonObject
        {
            ["resourceType"] = "CapabilityStatement",
            ["status"] = "active",
            ["date"] = ResourceJson.Instant(at),
            ["kind"] = "instance",
            ["software"] = new JsonObject { ["name"] = "RespDerive sandbox" },
            ["implementation"] = new JsonObject { ["description"] = "In-memory endpoint with invented patients", ["url"] = baseUrl },
            ["fhirVersion"] = "4.0.1",
            ["format"] = new JsonArray("application/fhir+json"),
            ["rest"] = new JsonArray(new JsonObject
            {
                ["mode"] = "server",
                ["resource"] = new JsonArray([.. SearchParameter.Types.Select(Resource)]),
                ["interaction"] = Codes("transaction", "batch"),
            }),
        };
        return new FhirAnswer(200, ResourceJson.Bytes(statement));
    }

    private static JsonObject Resource(string type) => new JsonObject
    {
        ["type"] = type,
        ["interaction"] = Codes("read", "vread", "update", "delete", "history-instance", "create", "search-type"),
        ["versioning"] = "versioned-update",
        ["readHistory"] = true,
        ["updateCreate"] = true,
        ["conditionalCreate"] = true,
        ["conditionalUpdate"] = true,
        ["conditionalDelete"] = "not-supported",
        ["searchParam"] = new JsonArray(
        [
            Parameter("_id", "token"),
            Parameter("_lastUpdated", "date"),
            Parameter("_tag", "token"),
            .. SearchParameter.Of(type).Select(p => Parameter(p.Name, p.Kind switch
            {
                SearchKind.Date => "date",
                SearchKind.Reference => "reference",
                _ => "token",
            })),
        ]),
    };

    private static JsonObject Parameter(string name, string type) => new JsonObject { ["name"] = name, ["type"] = type };

    private static JsonArray Codes(params string[] codes) => [.. codes.Select(code => new JsonObject { ["code"] = code })];
}
