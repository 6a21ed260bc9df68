using System.Text.Json;
using System.Text.Json.Nodes;
using RespDerive.Physiology;

namespace RespDerive.Fhir.Writing;

/// <summary>One revision of a definition as canonical JSON: what a reader needs to check a number by hand.</summary>
public static class DefinitionDocument
{
    /// <summary>The document.</summary>
    public static byte[] Of(Definition definition)
    {
        var document = new JsonObject
        {
            ["key"] = definition.Key,
            ["revision"] = definition.Revision,
            ["name"] = definition.Result.Name,
            ["symbol"] = definition.Result.Symbol,
            ["summary"] = definition.Summary,
            ["equation"] = definition.Equation,
            ["unit"] = definition.Result.Unit,
            ["decimals"] = definition.Decimals,
            ["possible"] = Range(definition.Result.Least, definition.Result.Greatest),
            ["usual"] = Range(definition.Usual.Least, definition.Usual.Greatest),
            ["assumptions"] = definition.Assumptions,
            ["caution"] = definition.Caution,
            ["anchors"] = Array(definition.Calling.Anchors.Select(kind => (JsonNode?)kind.Key)),
            ["inputs"] = Array(definition.Result.Needs.Select(slot => (JsonNode?)new JsonObject
            {
                ["name"] = slot.Name,
                ["options"] = Array(slot.Options.Select(option => (JsonNode?)Array(option.Terms.Select(term =>
                    (JsonNode?)Array(term.AnyOf.Select(kind => (JsonNode?)new JsonObject { ["kind"] = kind.Key, ["unit"] = kind.Unit })))))),
            })),
            ["withheldWhen"] = Array(definition.Gates.Select(gate => (JsonNode?)new JsonObject { ["code"] = gate.Code, ["text"] = gate.Text })),
            ["codes"] = Array(definition.Codes.Select(code => (JsonNode?)new JsonObject { ["system"] = code.System, ["code"] = code.Code, ["display"] = code.Display })),
            ["sources"] = Array(definition.Citations.Select(citation => (JsonNode?)new JsonObject { ["text"] = citation.Text, ["doi"] = citation.Doi })),
        };
        if (definition is Classification classification)
        {
            document["bands"] = Array(definition.Result.Codes.Select(code => (JsonNode?)new JsonObject { ["code"] = code, ["text"] = classification.Text(code) }));
            document["criteria"] = Array(classification.Criteria.Select(criterion => (JsonNode?)new JsonObject
            {
                ["name"] = criterion.Name,
                ["number"] = criterion.Number.Key,
                ["codes"] = Array(criterion.Codes.Select(code => (JsonNode?)code)),
                ["cuts"] = Array(criterion.Cuts.Select(cut => (JsonNode?)cut)),
                ["cutIsBelow"] = criterion.CutIsBelow,
            }));
        }

        return CanonicalJson.Of(JsonSerializer.SerializeToElement(document));
    }

    /// <summary>SHA-256 of the document.</summary>
    public static string Hash(Definition definition) => CanonicalJson.Hash(Of(definition));

    private static JsonArray Range(double least, double greatest) => Array([Bound(least), Bound(greatest)]);

    private static JsonValue? Bound(double value) => double.IsFinite(value) ? JsonValue.Create(value) : null;

    private static JsonArray Array(IEnumerable<JsonNode?> items) => new([.. items]);
}
