using System.Text.Json;

namespace RespDerive.Fhir.Server;

/// <summary>What matters of a CapabilityStatement; a server may generate the rest without meaning it.</summary>
internal static class CapabilityReading
{
    public static Capability Of(JsonElement statement)
    {
        var rest = statement.Items("rest").FirstOrDefault(rest => rest.Text("mode") is null or "server");
        var resources = rest.Items("resource").ToLookup(resource => resource.Text("type"));
        var software = statement.Member("software");
        return new Capability(
            statement.Text("fhirVersion"),
            rest.Items("interaction").Any(interaction => interaction.Text("code") == "transaction"),
            resources["Observation"].Any(resource => Says(resource, "conditionalCreate")),
            resources["Observation"].Any(resource => Says(resource, "updateCreate")) && resources["Provenance"].Any(resource => Says(resource, "updateCreate")),
            software.Text("name") is { } name ? $"{name} {software.Text("version")}".TrimEnd() : null);
    }

    private static bool Says(JsonElement resource, string name) => resource.Member(name).ValueKind == JsonValueKind.True;
}
